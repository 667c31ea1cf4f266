#pragma once

#include <cstddef>
#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "mesh/region/region.hpp"

namespace raiser::solver {

using mesh::Owner;
using mesh::Plate;
using mesh::Point;

/// What acts on the plate. Stresses in MPa on the gross section.
/// `tension`: uniform normal stress on the ends x = +-length/2.
/// `transverse`: uniform normal stress on the sides y = +-width/2.
/// `shear`: uniform shear stress sigma_xy on all four edges.
/// `bending`: stress on the ends that varies linearly with y; `stress` is its
///   value at y = +width/2 (positive: that side in tension).
/// `pressure`: uniform pressure on the edge of hole `hole`, positive when it
///   pushes on the material.
/// `edge`: uniform traction on one outer edge `edge`: `stress` along its
///   outward normal, `along` along its direction (anticlockwise round the plate).
struct Load {
  enum class Kind { tension, transverse, shear, bending, pressure, edge };
  Kind kind = Kind::tension;
  std::string name;
  double stress = 0.0;
  double along = 0.0;                     ///< kind edge only
  std::size_t hole = 0;                   ///< kind pressure only
  Owner::Kind edge = Owner::Kind::right;  ///< kind edge only
};

/// The word used for a kind of load in case files, tables and messages.
std::string_view word(Load::Kind kind);

/// Resultant of loads about the plate's centre: forces in N, moment in N mm
/// (anticlockwise positive).
struct Resultant {
  Point force = Point::Zero();
  double moment = 0.0;
};
Resultant resultant(const Plate& plate, const Load& load);

/// Traction on the boundary, MPa, at point x of a piece of boundary with
/// outward unit normal n.
using Traction = std::function<Point(const Owner&, const Point& x, const Point& n)>;

/// A self-balanced load solved as one right-hand side. How it behaves under a
/// mirror line: even (the load is its own mirror image), odd (its mirror image
/// is its negative) or neither.
struct UnitLoad {
  enum class Parity { even, odd, neither };
  std::string name;
  Traction traction;
  Parity under_x = Parity::neither;  ///< under (x, y) -> (-x, y)
  Parity under_y = Parity::neither;  ///< under (x, y) -> (x, -y)
};

/// Why a set of loads cannot be solved: it does not balance. `by` is the
/// resultant left over.
struct LoadFault {
  Resultant by;
  std::vector<std::size_t> loads;  ///< indices of the loads involved
  std::string what;
  std::string cure;
};
std::optional<LoadFault> imbalance(const Plate& plate, const std::vector<Load>& loads);

/// One unit load for each load that balances by itself, in order, and one
/// named "edges" for all edge loads together where they balance only jointly.
std::vector<UnitLoad> unit_loads(const Plate& plate, const std::vector<Load>& loads);

/// The stress state that the loads would produce in the plate without holes,
/// at x = `station`: linear in y. MPa.
struct NominalState {
  double xx = 0.0;        ///< mean sigma_xx
  double bending = 0.0;   ///< sigma_xx at y = +width/2 less the mean
  double yy = 0.0;        ///< mean sigma_yy
  double xy = 0.0;        ///< mean sigma_xy
  double pressure = 0.0;  ///< pressure on the hole in question
};

}  // namespace raiser::solver
