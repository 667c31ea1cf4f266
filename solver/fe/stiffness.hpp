#pragma once

#include <Eigen/Core>
#include <array>
#include <vector>

#include "mesh/mesh.hpp"
#include "solver/fe/reference.hpp"

namespace raiser::solver {

/// Element stiffness matrices of one degree and one material, unit thickness.
///
/// A matrix is 2 n x 2 n for n = shape_count(degree); row 2 a + c belongs to
/// component c of shape function a in ShapeTable's order, signs not applied.
/// Straight triangles combine three matrices of the reference triangle
/// exactly; curved ones are integrated with (degree + 3)^2 points.
class Stiffness {
 public:
  /// `law` maps (eps_xx, eps_yy, gamma_xy) to stress, MPa.
  Stiffness(int degree, const Eigen::Matrix3d& law);

  /// Computes triangle `t` of `mesh` into `out`. Scratch space is the object's:
  /// one object a thread.
  void element(const mesh::Mesh& mesh, int t, Eigen::MatrixXd& out);

 private:
  void straight(const mesh::Mesh& mesh, int t, Eigen::MatrixXd& out) const;
  void curved(const mesh::Mesh& mesh, int t, Eigen::MatrixXd& out);

  /// [a][b](i, j): stiffness between the slope of component a along i and that
  /// of component b along j.
  std::array<std::array<Eigen::Matrix2d, 2>, 2> weights_;
  const ReferenceElement* reference_;
  Eigen::MatrixXd
      gradients_;  ///< of a curved triangle: x, then y; one column a point, square root of weight in
  Eigen::MatrixXd products_;
  std::vector<mesh::MapPoint> points_;
};

}  // namespace raiser::solver
