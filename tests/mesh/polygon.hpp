#pragma once

#include <vector>

#include "mesh/region/region.hpp"

namespace raiser::mesh {

/// The owner of line k.
inline Owner side_owner(std::size_t k) { return {Owner::Kind::raiser, k}; }

/// A region bounded by straight lines through the points, anticlockwise; line k
/// starts at point k and is owned by raiser k, so that each can be told apart.
inline Region polygon(const std::vector<Point>& points) {
  Region region;
  region.loops.emplace_back();
  for (std::size_t k = 0; k < points.size(); ++k)
    region.loops.back().push_back({Curve::Kind::line, points[k], points[(k + 1) % points.size()] - points[k],
                                   Point::Zero(), 0.0, 1.0, side_owner(k)});
  return region;
}

/// Which line of a polygon an owner is.
inline std::size_t side_of(const Owner& owner) { return owner.index; }

}  // namespace raiser::mesh
