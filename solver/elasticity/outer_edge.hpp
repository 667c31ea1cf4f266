#pragma once

#include <optional>

#include "solver/elasticity/load.hpp"

namespace raiser::solver {

/// Traction in MPa from a normal stress and one along the edge (anticlockwise
/// round the plate) where the outward unit normal is n.
Point edge_traction(double stress, double along, const Point& n);

/// The parts of the curves whose coordinate `axis` (0: x, 1: y) is at least
/// `station`. A line that lies on the station counts.
mesh::Loop beyond(const mesh::Loop& curves, int axis, double station);

/// Resultant of a traction on curves, about a point. Exact for tractions that
/// are linear along straight lines; to rounding for smooth ones on arcs.
Resultant integrate(const mesh::Loop& curves, double thickness, const Traction& traction, const Point& about);

/// The straight parts of the edges at one end of the plate's bounding box and
/// facing that way: what a load on both ends pulls at.
struct LoadedEnd {
  double position = 0.0;  ///< mm, the x of the end (the y of a side)
  double area = 0.0;      ///< mm^2
  double centroid = 0.0;  ///< mm, along the end
  double inertia = 0.0;   ///< mm^4, second moment of the area about its centroid
  double reach = 0.0;     ///< mm, largest distance from the centroid

  double modulus() const { return inertia / reach; }  ///< mm^3
};

/// Both ends, and the line along which a tension pulls.
struct LoadedEnds {
  LoadedEnd low, high;

  /// The smaller one: stresses of tension and bending loads stand on it.
  const LoadedEnd& reference() const { return high.area <= low.area ? high : low; }
  /// Position of the tension's line of action: the reference's centroid, or the
  /// middle between both for equal ends.
  double line_of_action() const;
};

/// The ends x = +-length/2 (axis 0) or the sides y = +-width/2 (axis 1);
/// nothing when the outline has no straight part at one of them.
std::optional<LoadedEnds> loaded_ends(const Plate& plate, int axis);

}  // namespace raiser::solver
