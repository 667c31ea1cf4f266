#pragma once

#include <vector>

#include "mesh/mesh.hpp"
#include "mesh/triangulate/size_rule.hpp"

namespace raiser::mesh {

/// The fans about the region's crack tips. Takes them out of the region: slits
/// end at a fan's outer corner, loops go round it.
std::vector<Fan> take_out_fans(Region& region, const SizeRule& rule);

/// Triangles while a mesh is made. A seam is a directed edge along a crack with
/// its curve: material on both sides.
struct Draft {
  struct Seam {
    int from, to;
    Curve curve;
  };
  std::vector<Point> points;
  std::vector<Mesh::Triangle> triangles;
  std::vector<BoundarySide> sides;
  std::vector<Seam> seams;
  std::vector<TipFan> fans;
};

/// Fills a fan with triangles; `outer` are the points of its outer corners.
void fill(const Fan& fan, const std::vector<int>& outer, Draft& draft);

/// Opens the seams: gives the triangles on either side points and boundary
/// sides of their own, except at the tips.
void open_seams(Draft& draft);

}  // namespace raiser::mesh
