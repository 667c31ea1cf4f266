#pragma once

#include <optional>

#include "mesh/region/region.hpp"

namespace raiser::mesh {

/// A place on the boundary where a crack can open.
struct Mouth {
  Point at = Point::Zero();
  Point inward = Point::UnitX();  ///< unit normal into the material
};

/// The place on straight edge `edge` of edge_names() at `position` mm from the edge's
/// middle, towards larger x, or towards larger y on an edge parallel to y.
/// Nothing beyond the edge's ends.
std::optional<Mouth> mouth_on_edge(const Plate& plate, std::size_t edge, double position);

/// The places on the edge of a raiser that lie in the direction `angle` from its
/// centre, rad from +x, anticlockwise; the nearest first. Throws std::out_of_range
/// when there is no such raiser.
std::vector<Mouth> mouths_on_raiser(const Plate& plate, std::size_t raiser, double angle);

/// The place on what belongs to one part of the plate that is nearest to a point.
Mouth nearest_mouth(const Plate& plate, const Owner& owner, const Point& x);

}  // namespace raiser::mesh
