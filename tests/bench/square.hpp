#pragma once

#include <vector>

#include "mesh/mesh.hpp"
#include "mesh/plate/outline.hpp"

namespace raiser::bench {

/// A square of 2 n^2 straight triangles.
inline mesh::Mesh square(int n) {
  namespace edge = mesh::rectangle;
  std::vector<mesh::Point> points;
  const double half = 50.0;
  for (int j = 0; j <= n; ++j)
    for (int i = 0; i <= n; ++i) points.emplace_back(2 * half * i / n - half, 2 * half * j / n - half);
  std::vector<mesh::Mesh::Triangle> triangles;
  std::vector<mesh::BoundarySide> boundary;
  const auto add_side = [&](int side, std::size_t owner) {
    const int t = static_cast<int>(triangles.size()) - 1;
    const mesh::Point from = points[triangles[t][side]], to = points[triangles[t][(side + 1) % 3]];
    boundary.push_back(
        {t,
         side,
         {mesh::Curve::Kind::line, from, to - from, {0, 0}, 0.0, 1.0, {mesh::Owner::Kind::edge, owner}}});
  };
  for (int j = 0; j < n; ++j)
    for (int i = 0; i < n; ++i) {
      const int a = j * (n + 1) + i, b = a + 1, c = b + n + 1, d = a + n + 1;
      triangles.push_back({a, b, c});
      if (j == 0) add_side(0, edge::bottom);
      if (i == n - 1) add_side(1, edge::right);
      triangles.push_back({a, c, d});
      if (j == n - 1) add_side(1, edge::top);
      if (i == 0) add_side(2, edge::left);
    }
  return {std::move(points), std::move(triangles), std::move(boundary)};
}

}  // namespace raiser::bench
