#pragma once

#include <cstddef>
#include <vector>

#include "mesh/region/region.hpp"

namespace raiser::mesh {

/// A place of the boundary where one curve ends and the next begins.
struct Vertex {
  Point at = Point::Zero();
  double angle = 0.0;  ///< rad, of the material between both curves, in (0, 2 pi)
  /// rad, of the tangent of `after` at `at`; the material lies anticlockwise from it
  double direction = 0.0;
  Curve before;           ///< arrives at the place
  Curve after;            ///< leaves it
  std::size_t loop = 0;   ///< of the region
  std::size_t curve = 0;  ///< of the loop: `before`
};

/// Smallest departure of the angle from pi that counts as a corner, rad: below
/// it a drawing's rounding rules, and the strength of the singularity is nil.
inline constexpr double least_corner = 0.0175;

/// Whether an angle of the material, rad, lies between a right and a straight
/// one: stress there is finite, but as rough as a small power of the distance.
bool is_blunt(double angle);

/// Every place where two curves of the region meet.
std::vector<Vertex> vertices(const Region& region);

/// The radius in mm of the largest disc about a vertex that meets no boundary but
/// its two curves, neither's end and no crack; 0 where a crack starts there.
double reach(const Region& region, const Vertex& vertex);

/// The angle of the material where `before` ends and `after` begins, rad, in (0, 2 pi).
double angle_between(const Curve& before, const Curve& after);

}  // namespace raiser::mesh
