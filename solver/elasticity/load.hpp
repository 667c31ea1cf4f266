#pragma once

#include <cstddef>
#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "mesh/plate/section.hpp"
#include "mesh/region/region.hpp"
#include "solver/elasticity/bearing.hpp"
#include "solver/elasticity/support.hpp"

namespace raiser::solver {

/// What acts on the plate. Stresses in MPa on the gross section.
/// `tension`: normal stress on the ends x = +-length/2, uniform; on ends of
///   different size `stress` is that on the smaller one, and the other carries
///   the same force along the same line (see LoadedEnds).
/// `transverse`: the same on the sides y = +-width/2.
/// `shear`: uniform shear stress sigma_xy on all edges.
/// `bending`: stress on the ends that varies linearly with y; `stress` is its
///   largest value on the smaller end (positive: larger y in tension).
/// `pressure`: uniform pressure on the edge of hole `hole`, positive when it
///   pushes on the material.
/// `face_pressure`: uniform pressure on both faces of crack `crack`, positive when
///   it opens the crack.
/// `edge`: traction on edge `edge` of mesh::edge_names(): `stress` along its
///   outward normal, `along` along its direction (anticlockwise round the plate).
///   On a straight edge it may change linearly and act on a part only.
/// `pin`: a round pin presses on the edge of the round hole `hole` with the
///   force `force` in the direction `direction`; the pressure is a cosine over
///   the half that it presses on, or what `bearing` says. With `clearance` the
///   pin is rigid and the pressure that of contact, which has to be found.
struct Load {
  enum class Kind { tension, transverse, shear, bending, pressure, face_pressure, edge, pin };
  Kind kind = Kind::tension;
  std::string name;
  double stress = 0.0;
  double along = 0.0;                         ///< kind edge only
  std::size_t hole = 0;                       ///< kinds pressure and pin only
  std::size_t crack = 0;                      ///< kind face_pressure only
  std::size_t edge = mesh::rectangle::right;  ///< kind edge only

  /// Kind edge: the loaded part, mm from the edge's start anticlockwise round the
  /// plate (none: the whole edge), and the stresses at its far end (none: the same).
  std::optional<double> from = std::nullopt, to = std::nullopt;
  std::optional<double> stress_to = std::nullopt, along_to = std::nullopt;

  double force = 0.0;      ///< kind pin: N
  double direction = 0.0;  ///< kind pin: rad, of the force, from +x anticlockwise
  /// Kind pin: mm, diameter of the hole less that of the rigid pin; negative for interference.
  std::optional<double> clearance = std::nullopt;
  /// Kind pin: what has been found of its pressure, by arc of contact.
  std::vector<BearingPressure> bearing = {};
};

/// Whether the load must be balanced by others or held by supports.
bool needs_balance(const Load& load);

/// The largest stress that a load puts on the boundary, MPa; of a pin F / (d t).
double largest_stress(const Plate& plate, const Load& load);

/// Places where a load's traction begins, ends or has a kink: they should be
/// vertices of the mesh.
std::vector<mesh::Break> breaks(const Plate& plate, const Load& load);

/// The ends of a bearing pressure on a hole's edge, with side lengths that fit
/// the size of its arc. None for one all round.
std::vector<mesh::Break> breaks(const Owner& hole, const Point& centre, double radius,
                                const BearingPressure& pressure);

/// The word used for a kind of load in case files, tables and messages.
std::string_view word(Load::Kind kind);

/// Resultant of loads about the origin: forces in N, moment in N mm
/// (anticlockwise positive).
struct Resultant {
  Point force = Point::Zero();
  double moment = 0.0;
};

/// Traction on the boundary, MPa, at point x of a piece of boundary with
/// outward unit normal n.
using Traction = std::function<Point(const Owner&, const Point& x, const Point& n)>;

/// The traction of one load. Throws std::invalid_argument where it has nothing
/// to act on: a hole or an edge that is not there, ends that are not straight.
Traction traction(const Plate& plate, const Load& load);

Resultant resultant(const Plate& plate, const Load& load);

/// A self-balanced load solved as one right-hand side. How it behaves under a
/// mirror line: even (the load is its own mirror image), odd (its mirror image
/// is its negative) or neither.
struct UnitLoad {
  enum class Parity { even, odd, neither };
  std::string name;
  Traction traction;
  Parity under_x = Parity::neither;  ///< under (x, y) -> (-x, y)
  Parity under_y = Parity::neither;  ///< under (x, y) -> (x, -y)
  bool displaces = false;            ///< the held edges' values belong to it; otherwise they are 0
  /// Not part of all loads together: what is not known of a pressure.
  bool doubt = false;
  std::vector<std::size_t> loads = {};  ///< indices of the loads in it
};

/// Edge loads that take up a resultant about the plate's centre: together with
/// whatever left it over they balance. A normal stress on the left and bottom
/// edge for the force, a stress along the right and left edge for the moment;
/// components that are exactly zero get none. Of a rectangle only.
std::vector<Load> balancing(const Plate& plate, const Resultant& left_over);

/// Why a set of loads cannot be solved: it does not balance. `by` is the
/// resultant left over.
struct LoadFault {
  Resultant by;
  std::vector<std::size_t> loads;  ///< indices of the loads involved
  std::string what;
  std::string cure;
};
/// Nothing when the loads balance within 1e-9 of their own size, as far as the
/// supports cannot take up what they leave: all edge loads and pins together,
/// the others each by itself. Stresses that are not finite are a fault as well,
/// and loads with nothing to act on.
std::optional<LoadFault> imbalance(const Plate& plate, const std::vector<Load>& loads,
                                   const std::vector<Support>& supports = {});

/// One unit load for each load that balances by itself, in order, and one
/// named "edges", "pins" or "edges and pins" for all edge loads and pins
/// together, which balance only jointly; where supports take up anything, each
/// of these is one by itself as well. A last one, "supports", when supports
/// displace edges. Each has its load's own size, so that their sum is the whole
/// set of loads. Throws std::invalid_argument when the loads do not balance, a
/// load names no hole or edge of the plate or a support is not legal.
std::vector<UnitLoad> unit_loads(const Plate& plate, const std::vector<Load>& loads,
                                 const std::vector<Support>& supports = {});

/// The unit load of a traction that balances, with its behaviour under mirrors.
UnitLoad unit_load(const Plate& plate, std::string name, Traction traction);

/// The stress state that the loads would produce in the plate without holes and
/// notches on the gross sections of one raiser: linear in y. MPa.
struct NominalState {
  double xx = 0.0;        ///< mean sigma_xx
  double bending = 0.0;   ///< sigma_xx less the mean at the edge farthest from the centroid
  double yy = 0.0;        ///< mean sigma_yy
  double xy = 0.0;        ///< mean sigma_xy
  double pressure = 0.0;  ///< pressure on the raiser in question
};

/// What a section of the plate without holes carries under balanced loads. N and
/// N mm. `normal` is tension positive, `shear` has the sign of sigma_xy, and
/// `moment`, about the centroid of the gross section, is positive when it
/// stretches the side of larger y (across) or larger x (along).
struct SectionForces {
  double normal = 0.0;
  double shear = 0.0;
  double moment = 0.0;
};
SectionForces section_forces(const Plate& plate, const std::vector<Load>& loads, mesh::Direction direction,
                             double station);

/// The undisturbed state at a raiser: of the gross sections through its mouth.
/// Edge loads count through what those sections carry. Throws
/// std::out_of_range when there is no such raiser.
NominalState nominal_state(const Plate& plate, const std::vector<Load>& loads, std::size_t raiser);

}  // namespace raiser::solver
