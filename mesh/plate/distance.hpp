#pragma once

#include <array>

#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

/// Half the hole's extent in the direction of the unit vector `direction`, mm:
/// the hole lies between centre +- this, measured along `direction`. Exact for
/// every shape at any angle; of a drawn hole the larger of both sides.
double half_extent(const Hole& hole, const Point& direction);

/// Distance between the edges of two holes in mm. Negative when they overlap,
/// and then minus the shortest shift that would bring them apart. Good to
/// 1e-13 of the sizes and distances involved, or to 1e-4 of an overlap. Where one
/// of them is drawn, to 1e-6, and an overlap is that of their bounding boxes.
/// Both holes must have legal sizes.
double gap(const Hole& a, const Hole& b);

/// Distances from a hole to the right, top, left and bottom edge of the plate
/// in mm, negative by as much as the hole reaches over that edge. Exact.
std::array<double, 4> edge_distances(const Plate& plate, const Hole& hole);

/// The smallest of edge_distances().
double edge_distance(const Plate& plate, const Hole& hole);

}  // namespace raiser::mesh
