#include "mesh/triangulate/triangulate.hpp"

#include <gtest/gtest.h>

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <limits>
#include <map>
#include <numbers>

#include "mesh/legendre.hpp"
#include "tests/mesh/holes.hpp"

namespace raiser::mesh {
namespace {

constexpr double pi = std::numbers::pi;

Hole circle(double diameter, Point centre) {
  return {"", HoleShape::circle, diameter, diameter, 0, centre, 0};
}

// Integral of the Jacobian and its smallest value on a fine lattice, relative
// to the straight triangle's.
struct Check {
  double area = 0.0;
  double least = std::numeric_limits<double>::infinity();
};
Check check(const Mesh& mesh) {
  static const GaussRule rule = gauss_legendre(12);
  Check result;
  for (int t = 0; t < static_cast<int>(mesh.triangles().size()); ++t) {
    const auto jacobian = [&](double r, double s) { return mesh.map(t, {r, s}).jacobian.determinant(); };
    for (std::size_t i = 0; i < rule.points.size(); ++i)
      for (std::size_t j = 0; j < rule.points.size(); ++j) {
        const double s = (1 + rule.points[j]) / 2;
        const double r = (1 + rule.points[i]) / 2 * (1 - s);
        result.area += rule.weights[i] * rule.weights[j] * (1 - s) / 4 * jacobian(r, s);
      }
    for (int i = 0; i <= 11; ++i)
      for (int j = 0; i + j <= 11; ++j) result.least = std::min(result.least, jacobian(i / 11.0, j / 11.0));
  }
  return result;
}

Point on(const BoundarySide& side, double s) {
  const double la = (1 - s) / 2;
  const double lb = (1 + s) / 2;
  const Point places[] = {{lb, 0.0}, {la, lb}, {0.0, la}};
  return places[side.side];
}

void expect_sound(const Plate& plate, const SizeRule& rule) {
  const Mesh mesh = triangulate(trace(plate), rule);
  const Check found = check(mesh);
  EXPECT_NEAR(found.area, area(plate), 1e-11 * area(plate));
  EXPECT_GT(found.least, 0.0);
  EXPECT_TRUE(inverted_triangles(mesh).empty());
  // Euler's formula: one piece of material with as many holes as the plate.
  const auto vertices = static_cast<int>(mesh.points().size());
  const auto edges = static_cast<int>(mesh.edges().size());
  const auto triangles = static_cast<int>(mesh.triangles().size());
  EXPECT_EQ(vertices - edges + triangles, 1 - static_cast<int>(plate.holes.size()));
  for (const BoundarySide& side : mesh.boundary())
    for (const double s : {-1.0, -0.3, 0.5, 1.0})
      EXPECT_LT((mesh.map(side.triangle, on(side, s)).x - side.curve.at(side.parameter(s))).norm(),
                1e-13 * plate.length);
}

TEST(Triangulate, FillsTheMaterialRoundEveryShape) {
  for (Hole hole : holes_of_every_shape())
    for (const double angle : {0.0, 0.9}) {
      SCOPED_TRACE(hole.name);
      hole.centre = Point(4, -3);
      hole.angle = angle;
      expect_sound({60, 40, 5, {hole}}, {});
    }
}

TEST(Triangulate, FillsAPartBetweenMirrorLines) {
  for (Hole hole : holes_of_every_shape()) {
    SCOPED_TRACE(hole.name);
    const Plate plate{60, 40, 5, {hole}};
    const Mesh mesh = triangulate(cut(trace(plate), {true, true}), {});
    EXPECT_NEAR(4 * check(mesh).area, area(plate), 1e-11 * area(plate));
    for (const BoundarySide& side : mesh.boundary()) {
      const Point middle = side.curve.at(side.parameter(0.0));
      const auto kind = side.curve.owner.kind;
      EXPECT_EQ(kind == Owner::Kind::mirror_x, std::abs(middle.x()) < 1e-9);
      EXPECT_EQ(kind == Owner::Kind::mirror_y, std::abs(middle.y()) < 1e-9);
    }
  }
}

// Sides on an arc turn by no more than asked, or the factor of the hole less.
TEST(Triangulate, FollowsTheSizeRuleOnArcs) {
  const Plate plate{200, 100, 5, {circle(12, Point(-40, 0)), circle(20, Point(40, 0))}};
  SizeRule rule;
  rule.turn = 0.3;
  rule.refine = {1.0, 0.5};
  std::map<std::size_t, double> longest;
  const Mesh mesh = triangulate(trace(plate), rule);
  for (const BoundarySide& side : mesh.boundary())
    if (side.curve.owner.kind == Owner::Kind::raiser)
      longest[side.curve.owner.index] =
          std::max(longest[side.curve.owner.index], std::abs(side.curve.end - side.curve.begin));
  EXPECT_LE(longest[0], 0.3 + 1e-12);
  EXPECT_GT(longest[0], 0.2);
  EXPECT_LE(longest[1], 0.15 + 1e-12);
  EXPECT_GT(longest[1], 0.1);
}

// Where two sides face each other closely, neither is longer than the rule's
// share of the way between them, up to the halving of the sides.
void expect_fine_at(const Mesh& mesh, const Point& middle, double ligament) {
  double shortest = std::numeric_limits<double>::infinity();
  for (const BoundarySide& side : mesh.boundary()) {
    const Point from = side.curve.at(side.curve.begin);
    const Point to = side.curve.at(side.curve.end);
    if (std::min((from - middle).norm(), (to - middle).norm()) < 0.75 * ligament)
      shortest = std::min(shortest, (to - from).norm());
  }
  EXPECT_LE(shortest, 1.1 * ligament) << "no side as short as the ligament beside it";
}

TEST(Triangulate, ResolvesLigamentsOfTwoHundredthsOfADiameter) {
  const double gap = 0.02 * 10;
  struct Case {
    const char* name;
    Plate plate;
    Point middle;  // of the ligament
  };
  const std::vector<Case> cases = {
      {"two circles",
       {80, 50, 5, {circle(10, Point(-5 - gap / 2, 0)), circle(10, Point(5 + gap / 2, 0))}},
       Point(0, 0)},
      {"a circle at an edge", {80, 50, 5, {circle(10, Point(3, 20 - gap))}}, Point(3, 25 - gap / 2)},
      {"a circle beside a slot",
       {80,
        50,
        5,
        {circle(10, Point(0, 5 + gap / 2)), {"", HoleShape::slot, 24, 6, 0, Point(2, -3 - gap / 2), 0}}},
       Point(0, 0)},
      {"a small circle in a large one's shade",
       {80, 50, 5, {circle(30, Point(-15, 0)), circle(4, Point(2 + gap, 0))}},
       Point(gap / 2, 0)},
      {"an ellipse's tip at an edge",
       {80, 50, 5, {{"", HoleShape::ellipse, 10, 2, 0, Point(35 - gap, 4), 0}}},
       Point(40 - gap / 2, 4)},
      {"a corner at a corner",
       {80, 50, 5, {{"", HoleShape::rounded_rectangle, 10, 10, 0.1, Point(35 - gap, 20 - gap), 0}}},
       Point(40 - gap / 2, 20)}};
  for (const Case& tight : cases) {
    SCOPED_TRACE(tight.name);
    ASSERT_TRUE(faults(tight.plate).empty());
    expect_sound(tight.plate, {});
    expect_fine_at(triangulate(trace(tight.plate), {}), tight.middle, gap);
  }
}

// Such grading makes triangles so thin that shorter sides only make them
// thinner: they are taken as they are.
TEST(Triangulate, TakesThinTrianglesWhereGradingAsksForThem) {
  const Plate plate{200,
                    60,
                    6,
                    {{"slot", HoleShape::slot, 22, 9, 0, Point(-30, 4), 0.5},
                     {"bolt", HoleShape::circle, 18, 18, 0, Point(25, -3), 0}}};
  for (const double refine : {1.0, 0.6, 0.36}) {
    SizeRule rule;
    rule.joint = 0.002;
    rule.refine = {refine, refine};
    const Mesh mesh = triangulate(trace(plate), rule);
    const Check found = check(mesh);
    EXPECT_NEAR(found.area, area(plate), 1e-11 * area(plate));
    EXPECT_GT(found.least, 0.0);
    EXPECT_LT(mesh.triangles().size(), 1500u);
  }
}

TEST(Triangulate, GivesTheSameMeshAgain) {
  const Plate plate{80, 50, 5, {circle(10, Point(-12, 3)), circle(7, Point(15, -6))}};
  const Mesh one = triangulate(trace(plate), {});
  const Mesh two = triangulate(trace(plate), {});
  ASSERT_EQ(one.triangles(), two.triangles());
  for (std::size_t i = 0; i < one.points().size(); ++i) EXPECT_EQ(one.points()[i], two.points()[i]);
}

TEST(Divide, GradesTowardsAJumpOfCurvature) {
  const Plate plate{80, 50, 5, {{"", HoleShape::slot, 24, 8, 0, Point(0, 0), 0}}};
  SizeRule rule;
  rule.joint = 0.02;
  double at_joint = std::numeric_limits<double>::infinity();
  double turn = 0.0;
  const auto loops = divide(trace(plate), rule).loops;
  for (const Curve& piece : loops[1]) {
    at_joint = std::min(at_joint, (piece.at(piece.begin) - piece.at(piece.end)).norm());
    if (piece.kind == Curve::Kind::arc) turn += std::abs(piece.end - piece.begin);
  }
  EXPECT_LE(at_joint, 0.02 * 4 * std::sqrt(rule.joint_growth));
  EXPECT_NEAR(turn, 2 * pi, 1e-12);
}

}  // namespace
}  // namespace raiser::mesh
