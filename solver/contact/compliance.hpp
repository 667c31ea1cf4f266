#pragma once

#include <functional>
#include <span>
#include <vector>

#include "solver/elasticity/bearing.hpp"
#include "solver/fe/model.hpp"
#include "solver/fe/reference.hpp"

namespace raiser::solver {

/// The meshed part of the edge of one round hole, by angle about its centre.
struct RoundEdge {
  /// One side: position s on it belongs to angle from + (to - from) (1 + s) / 2.
  struct Side {
    mesh::BoundarySide side;
    double from = 0.0;
    double to = 0.0;  ///< less than `from`: a hole's edge runs clockwise
  };
  Point centre = Point::Zero();
  double radius = 0.0;  ///< mm
  std::vector<Side> sides;
};
RoundEdge round_edge(const mesh::Mesh& mesh, const Owner& owner, const Point& centre, double radius);

/// A place on a round edge with the lengths (mm) that functions of a basis have
/// there: the integral of basis function k over the edge is the sum of weight[k].
struct EdgePoint {
  std::size_t side = 0;  ///< of RoundEdge::sides
  double s = 0.0;
  double angle = 0.0;
  Eigen::VectorXd weight;
};

/// Functions on the edge that depend smoothly on phi within each of `pieces`,
/// a chain of angles in rising order: for arcs with ends that are singular, phi
/// is the substitution that takes the singularity away.
struct EdgeBasis {
  Eigen::Index count = 0;
  std::vector<double> pieces;  ///< angles where the smoothness ends, rising, at most a turn
  bool substituted = false;    ///< one piece, angle = middle + half its size cos(phi)
  /// The functions times d(angle)/d(phi) (times 1 when not substituted) at an angle or phi.
  std::function<void(double phi, Eigen::Ref<Eigen::VectorXd> values)> at;
};

/// Quadrature of the basis on the meshed part of the edge, exact to rounding
/// for products with shape functions of the degree.
std::vector<EdgePoint> edge_points(const RoundEdge& edge, const EdgeBasis& basis, int degree);

/// The model's equations of one degree, factorised, for loads on round edges.
class Compliance {
 public:
  /// The model's loads must all be of one class (even or odd alike).
  Compliance(const Model& model, int degree, Room& room);

  /// Load vectors of radial tractions, outward from the hole's centre, of 1 MPa
  /// times each basis function, for unit thickness.
  Eigen::MatrixXd radial_loads(const RoundEdge& edge, const std::vector<EdgePoint>& points) const;
  /// The model's own loads together.
  Model::Together own() const { return model_->together(space_, equations_); }
  Eigen::MatrixXd solve(const Eigen::MatrixXd& loads) const { return equations_.solve(loads); }
  /// The work of each load in the displacements of every other one.
  Eigen::MatrixXd work(const Eigen::MatrixXd& loads) const {
    const Eigen::MatrixXd half = equations_.halfway(loads);
    return half.transpose() * half;
  }
  /// Radial displacement at places on the edge, one column of `values` a column; mm.
  Eigen::MatrixXd radial_displacement(const RoundEdge& edge, std::span<const double> angles,
                                      const Eigen::MatrixXd& values) const;

 private:
  template <class Visit>
  void each(const RoundEdge& edge, std::size_t side, std::span<const double> s, Visit visit) const;

  const Model* model_;
  Discretisation space_;
  Equations equations_;
};

}  // namespace raiser::solver
