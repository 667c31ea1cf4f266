#pragma once

#include <array>
#include <vector>

#include "solver/contact/compliance.hpp"

namespace raiser::solver {

/// A rigid round pin in a round hole, pressed by a given force. Whole plate,
/// unit thickness.
struct Pin {
  Owner owner;                   ///< the hole's edge
  Point centre = Point::Zero();  ///< of the hole
  double radius = 0.0;           ///< of the hole, mm
  double gap = 0.0;              ///< mm: radius of the hole less that of the pin; negative for interference
  Point force = Point::Zero();   ///< N / mm of thickness, of the pin on the plate
  double direction() const;      ///< rad, of the force; 0 when there is none
  /// The gap is opening(angle) - d . e_r when the pin has moved by d from the
  /// hole's centre. Second order in the clearance: with |d| about the clearance,
  /// a pin of the hole's own radius would meet it elsewhere than a smaller one.
  double opening(double angle) const;
};

/// The line through the hole's centre that mirrors map to itself, by its angle
/// (rad): the force lies on it. The force's direction without mirrors.
double symmetry_axis(const Pin& pin, mesh::Mirrors mirrors);

/// Functions that the pressure of one pin is made of; a pin may have several.
struct Patch {
  std::size_t pin = 0;
  EdgeBasis basis;
};

/// What pressure on the pins' arcs closes the gap there and carries the forces,
/// found by the principle of virtual work with the same functions:
///   u_r = d . e_r - opening on the arc,  integral of p e_r = force,
/// u_r the radial displacement of the hole's edge and d the way of the pin.
class PinSystem {
 public:
  /// `even_x`, `even_y`: the mirror lines used; no force can act across them.
  PinSystem(const Model& model, int degree, const std::vector<Pin>& pins, Room& room);

  struct Answer {
    std::vector<Eigen::VectorXd> terms;  ///< by patch: coefficients of its basis, MPa
    std::vector<Point> way;              ///< by pin: d, mm
    Eigen::VectorXd load;                ///< load vector of the pressures together
  };
  Answer solve(const std::vector<Patch>& patches) const;

  /// What a unilateral start needs: pressures at equidistant places, each
  /// spread linearly to the next, none of them negative and none in a gap.
  struct Start {
    std::vector<std::vector<double>> angles;    ///< by pin, rising, from its symmetry axis
    std::vector<std::vector<double>> pressure;  ///< MPa, at least 0
    bool settled = false;                       ///< the choice of places came to an end
  };
  Start unilateral(int places) const;

  /// Width of the gap between pin and hole at angles about a pin's hole, mm.
  Eigen::VectorXd gap(const Answer& answer, std::size_t pin, std::span<const double> angles) const;

 private:
  struct Parts {
    Eigen::MatrixXd compliance, resultant;
    Eigen::VectorXd own, size;
    Eigen::MatrixXd loads;  ///< columns as the compliance's
    std::vector<Eigen::Index> first;
  };
  Parts assemble(const std::vector<Patch>& patches) const;
  Eigen::VectorXd solve(const Parts& parts, const std::vector<bool>& active) const;

  const Model* model_;
  int degree_;
  std::vector<Pin> pins_;
  std::vector<RoundEdge> edges_;
  std::vector<int> components_;  ///< of a force that the mirror lines allow
  Compliance compliance_;
  Eigen::VectorXd own_displacement_;
};

}  // namespace raiser::solver
