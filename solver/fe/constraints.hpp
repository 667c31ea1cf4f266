#pragma once

#include <functional>
#include <optional>
#include <vector>

#include "solver/elasticity/load.hpp"
#include "solver/fe/discretisation.hpp"

namespace raiser::solver {

/// Which unknowns of a space are held, at what, and in which axes.
struct Constraints {
  std::vector<bool> held;  ///< by unknown
  Eigen::VectorXd value;   ///< by unknown, mm; of loads that displace supports
  struct Turned {
    int function = 0;
    Point first = Point::Zero();  ///< unit vector: unknown 2 f is along it, 2 f + 1 a quarter turn on
  };
  std::vector<Turned> turned;  ///< functions whose unknowns are not along x and y, rising
  /// The direction of an unknown's displacement.
  Point direction(int unknown) const;
  /// From x and y to the turned unknowns and back, a column a vector.
  void turn(Eigen::MatrixXd& vectors) const;
  void turn_back(Eigen::MatrixXd& vectors) const;
};

/// What is held along mirror lines (even or odd displacements) and held edges.
/// Throws std::invalid_argument when two edges hold a common corner at places
/// that contradict each other.
Constraints constraints_of(const Discretisation& space, bool odd_x, bool odd_y,
                           const std::vector<HeldEdge>& edges);

}  // namespace raiser::solver
