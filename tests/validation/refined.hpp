#pragma once

#include <map>

#include "mesh/mesh.hpp"

namespace raiser::validation {

/// The mesh with every triangle divided into four at the middles of its sides,
/// those on the boundary taken on the curve.
inline mesh::Mesh refined(const mesh::Mesh& coarse) {
  using mesh::Point;
  std::vector<Point> points = coarse.points();
  std::map<int, Point> on_curve;
  for (const mesh::BoundarySide& side : coarse.boundary())
    on_curve[coarse.edge(side.triangle, side.side)] = side.curve.at(side.parameter(0.0));
  const int corners = static_cast<int>(points.size());
  for (int e = 0; e < static_cast<int>(coarse.edges().size()); ++e) {
    const auto [a, b] = coarse.edges()[e];
    const auto found = on_curve.find(e);
    points.push_back(found != on_curve.end() ? found->second : Point((points[a] + points[b]) / 2));
  }
  std::vector<mesh::Mesh::Triangle> triangles;
  for (int t = 0; t < static_cast<int>(coarse.triangles().size()); ++t) {
    const auto& v = coarse.triangles()[t];
    const int m[] = {corners + coarse.edge(t, 0), corners + coarse.edge(t, 1), corners + coarse.edge(t, 2)};
    triangles.push_back({v[0], m[0], m[2]});  // child k keeps the corner k as its own
    triangles.push_back({m[0], v[1], m[1]});
    triangles.push_back({m[2], m[1], v[2]});
    triangles.push_back({m[0], m[1], m[2]});
  }
  std::vector<mesh::BoundarySide> boundary;
  for (const mesh::BoundarySide& side : coarse.boundary())
    for (const int half : {0, 1}) {
      mesh::BoundarySide child = side;
      child.triangle = 4 * side.triangle + (side.side + half) % 3;
      (half == 0 ? child.curve.end : child.curve.begin) = side.parameter(0.0);
      boundary.push_back(child);
    }
  return {points, triangles, boundary};
}

}  // namespace raiser::validation
