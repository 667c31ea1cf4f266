#pragma once

#include <vector>

#include "mesh/region/region.hpp"

namespace raiser::mesh {

/// A place on the boundary where something changes that is no corner, such as
/// the end of a traction: it becomes a vertex of the mesh, and the sides beside
/// it get the length `size` in mm (0: whatever the size rule gives).
struct Break {
  Owner owner;  ///< whose edge it lies on
  Point at = Point::Zero();
  double size = 0.0;
};

/// The region with its curves divided at the breaks. A break takes the place
/// of its owner's edge that is nearest to it; nearer to a corner than a third of
/// its size it divides nothing, a joint of arcs as near moves to it.
Region broken(Region region, const std::vector<Break>& breaks);

}  // namespace raiser::mesh
