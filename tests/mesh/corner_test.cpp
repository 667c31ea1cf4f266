#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/region/vertex.hpp"
#include "mesh/triangulate/triangulate.hpp"
#include "tests/mesh/polygon.hpp"

namespace raiser::mesh {
namespace {

constexpr double pi = std::numbers::pi;

const Region l_shape = polygon({{0, 0}, {40, 0}, {40, 15}, {15, 15}, {15, 40}, {0, 40}});

double shortest_side_at(const Mesh& mesh, const Point& x) {
  double least = 1e300;
  for (const auto& edge : mesh.edges()) {
    const Point& a = mesh.points()[edge[0]];
    const Point& b = mesh.points()[edge[1]];
    if ((a - x).norm() < 1e-12 || (b - x).norm() < 1e-12) least = std::min(least, (a - b).norm());
  }
  return least;
}

TEST(Corners, OfAPolygonHaveTheirAngles) {
  const auto found = vertices(l_shape);
  ASSERT_EQ(found.size(), 6U);
  int re_entrant = 0;
  double sum = 0.0;
  for (const Vertex& v : found) {
    sum += v.angle;
    if (v.angle < pi) continue;
    ++re_entrant;
    EXPECT_NEAR(v.angle, 1.5 * pi, 1e-14);
    EXPECT_EQ(v.at, Point(15, 15));
    EXPECT_NEAR(v.direction, pi / 2, 1e-14);  // the edge that leaves it runs upwards, material to its left
    EXPECT_NEAR(reach(l_shape, v), 15, 1e-12);
  }
  EXPECT_EQ(re_entrant, 1);
  EXPECT_NEAR(sum, 4 * pi, 1e-12);
}

TEST(Corners, BetweenArcsAreMeasuredOnTheirTangents) {
  // A hole of two equal arcs that meet at 60 degrees: the material there has 300.
  Region region = polygon({{-20, -20}, {20, -20}, {20, 20}, {-20, 20}});
  const double t = pi / 6;
  const auto arc = [&](double begin) {
    const double side = begin < pi ? -1.0 : 1.0;
    return Curve{Curve::Kind::arc,
                 Point(0, side * 5 * std::cos(t)),
                 Point(5, 0),
                 Point(0, 5),
                 begin,
                 begin - 2 * t,
                 {}};
  };
  region.loops.push_back({arc(pi / 2 + t), arc(1.5 * pi + t)});
  for (const Vertex& v : vertices(region))
    if (v.angle > pi) {
      EXPECT_NEAR(v.angle, 2 * pi - 2 * t, 1e-12);
      EXPECT_NEAR(std::abs(v.at.x()), 5 * std::sin(t), 1e-12);
    }
}

TEST(Corners, DrawTheMeshInGeometrically) {
  SizeRule rule;
  const Mesh mesh = triangulate(l_shape, rule);
  EXPECT_TRUE(inverted_triangles(mesh).empty());
  const double at_corner = shortest_side_at(mesh, Point(15, 15));
  EXPECT_LT(at_corner, 15 * rule.corner * 3);
  EXPECT_GT(at_corner, 15 * rule.corner / 30);
  EXPECT_GT(shortest_side_at(mesh, Point(40, 15)), 1.0);
  EXPECT_LT(mesh.triangles().size(), 400U);
}

TEST(Corners, AnyPlaceAskedForIsGradedInto) {
  SizeRule rule;
  rule.singular.push_back(Point(40, 15));
  const Mesh mesh = triangulate(l_shape, rule);
  EXPECT_LT(shortest_side_at(mesh, Point(40, 15)), 0.01);
  EXPECT_GT(shortest_side_at(mesh, Point(40, 0)), 1.0);
}

TEST(Corners, MayBeAsFineAsAsked) {
  SizeRule rule;
  for (const double size : {1e-3, 1e-6, 1e-8}) {
    rule.corner = size;
    const Mesh mesh = triangulate(l_shape, rule);
    EXPECT_TRUE(inverted_triangles(mesh).empty()) << size;
    EXPECT_LT(shortest_side_at(mesh, Point(15, 15)), 15 * size * 3) << size;
    EXPECT_LT(mesh.triangles().size(), 1000U) << size;
  }
}

// Two edges that meet at a sharp convex angle come arbitrarily close: they must
// not divide one another for ever.
TEST(Corners, SharpConvexOnesAreMeshed) {
  for (const double half : {0.7, 0.5, 0.3, 0.15, 0.05}) {
    const double w = 40 * std::tan(half);
    for (const auto& points : {std::vector<Point>{{0, 0}, {40, -w}, {40, w}},
                               std::vector<Point>{{0, 0}, {40, -w}, {80, 0}, {40, w}}}) {
      const Mesh mesh = triangulate(polygon(points), {});
      EXPECT_TRUE(inverted_triangles(mesh).empty()) << half;
      EXPECT_LT(mesh.triangles().size(), 400U) << half;
    }
  }
}

TEST(Corners, SharpConvexOnesAreMeshedOnMirrorLinesToo) {
  for (const double half : {0.7, 0.3, 0.1}) {
    const double w = 40 * std::tan(half);
    const Region whole = polygon({{-40, 0}, {0, -w}, {40, 0}, {0, w}});
    const Mesh mesh = triangulate(cut(whole, {.x = true, .y = true}), {});
    EXPECT_TRUE(inverted_triangles(mesh).empty()) << half;
    EXPECT_LT(mesh.triangles().size(), 200U) << half;
  }
}

}  // namespace
}  // namespace raiser::mesh
