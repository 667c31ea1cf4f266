#include <gtest/gtest.h>

#include <Eigen/Geometry>
#include <cmath>
#include <numbers>

#include "mesh/plate/drawn.hpp"
#include "mesh/region/region.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

using mesh::Curve;
using mesh::Hole;
using mesh::HoleShape;
using mesh::Loop;

constexpr double pi = std::numbers::pi;

Curve arc(const Point& centre, double radius, double begin, double end) {
  return {Curve::Kind::arc, centre, {radius, 0}, {0, radius}, begin, end, {}};
}

Curve turned(Curve curve, double angle) {
  const Eigen::Rotation2Dd turn(angle);
  curve.centre = turn * curve.centre;
  curve.u = turn * curve.u;
  curve.v = turn * curve.v;
  return curve;
}

/// A half ring with round ends, clockwise: its middle lies in the material.
Loop kidney(double outer, double inner) {
  const double r = (outer - inner) / 2, middle = (outer + inner) / 2;
  return {arc({0, 0}, outer, pi, 0), arc({middle, 0}, r, 0, -pi), arc({0, 0}, inner, 0, pi),
          arc({-middle, 0}, r, 0, -pi)};
}

/// The edge with each curve cut at this share of it.
Loop cut(const Loop& edge, double share) {
  Loop result;
  for (const Curve& curve : edge) {
    const double at = curve.begin + share * (curve.end - curve.begin);
    result.push_back(mesh::part(curve, curve.begin, at));
    result.push_back(mesh::part(curve, at, curve.end));
  }
  return result;
}

Solution solve(const Hole& hole, Load::Kind kind = Load::Kind::tension) {
  mesh::Plate plate{140, 80, 5, {hole}};
  Load load;
  load.kind = kind;
  load.stress = 100.0;
  return settle({plate, {210000.0, 0.3, PlaneState::stress}, {load}}, {Ask{}});
}

void expect_same(const EdgeValue& a, const EdgeValue& b) {
  EXPECT_LE(std::abs(a.stress.value - b.stress.value), a.stress.bound + b.stress.bound)
      << a.stress.value << " +- " << a.stress.bound << ", " << b.stress.value << " +- " << b.stress.bound;
}

void expect_same(const Solution& a, const Solution& b) {
  EXPECT_EQ(a.status, Solution::Status::settled) << a.reason;
  EXPECT_EQ(b.status, Solution::Status::settled) << b.reason;
  const RaiserFindings& one = a.combined.raisers.at(0);
  const RaiserFindings& other = b.combined.raisers.at(0);
  expect_same(one.largest, other.largest);
  expect_same(one.smallest, other.smallest);
  expect_same(one.von_mises, other.von_mises);
  EXPECT_NEAR(one.net.nominal, other.net.nominal, 1e-9 * other.net.nominal);
  EXPECT_NEAR(one.gross.nominal, other.gross.nominal, 1e-9 * other.gross.nominal);
}

// The same curves, however they are cut, are the same hole as the shape that has a name.
TEST(DrawnHole, HasTheStressesOfTheShapeThatItIs) {
  const Point at(7, -5);
  for (const Hole& hole :
       {Hole{"a", HoleShape::slot, 36, 16, 0, at, 0.5},
        Hole{"a", HoleShape::rounded_rectangle, 30, 20, 3, at, -0.4},
        Hole{"a", HoleShape::circle, 24, 24, 0, at, 0}, Hole{"a", HoleShape::ellipse, 15, 40, 0, at, 0.2}}) {
    SCOPED_TRACE(mesh::word(hole.shape));
    const Solution named = solve(hole);
    expect_same(named, solve(mesh::drawn_hole(cut(mesh::trace(hole, {}), 0.37))));
    expect_same(solve(hole, Load::Kind::bending),
                solve(mesh::drawn_hole(mesh::trace(hole, {})), Load::Kind::bending));
  }
}

// What a plate is asked lengthwise, the plate turned by a right angle is asked across.
TEST(DrawnHole, TurnsWithThePlate) {
  Loop edge = kidney(20, 10);
  for (Curve& curve : edge) curve = turned(curve, 0.6);
  const Hole level = mesh::drawn_hole(edge);
  for (Curve& curve : edge) curve = turned(curve, pi / 2);
  Load pull, across;
  pull.stress = across.stress = 100.0;
  across.kind = Load::Kind::transverse;
  const HookeLaw steel{210000.0, 0.3, PlaneState::stress};
  const Solution a = settle({{140, 80, 5, {level}}, steel, {pull}}, {Ask{}});
  const Solution b = settle({{80, 140, 5, {mesh::drawn_hole(edge)}}, steel, {across}}, {Ask{}});
  expect_same(a, b);
  EXPECT_GT(a.combined.raisers[0].gross.kt->value, 3.0);
}

// The ways to points of the edge follow the edge, also where it turns back, once
// round and anticlockwise: with the hole on the left.
TEST(DrawnHole, ItsEdgeIsFollowed) {
  Loop edge = kidney(20, 10);
  for (Curve& curve : edge) curve = turned(curve, pi / 2);
  Hole window = mesh::drawn_hole(edge);
  window.name = "window";
  const Solution solution = solve(window);
  const auto& samples = solution.edges.at(0);
  ASSERT_GT(samples.size(), 20U);
  const double perimeter = pi * (20 + 10 + 2 * 5.0);
  double area = 0.0;
  for (std::size_t i = 0; i < samples.size(); ++i) {
    const auto& next = samples[(i + 1) % samples.size()];
    const Point step = next.point - samples[i].point;
    EXPECT_LT(step.norm(), perimeter / 20);
    area += samples[i].point.x() * next.point.y() - samples[i].point.y() * next.point.x();
    EXPECT_GE(samples[i].angle, samples.front().angle);
  }
  EXPECT_NEAR(samples.back().arc_length, perimeter, 0.02 * perimeter);
  EXPECT_NEAR(area / 2, pi / 2 * (400 - 100) + pi * 25, 0.01 * 600);
  // The section through the middle of its box meets both arms: the tongue between
  // them is a ligament of either.
  EXPECT_EQ(solution.ligaments.size(), 4U);
  EXPECT_TRUE(solution.ligaments[0].from.starts_with("hole window, y ")) << solution.ligaments[0].from;
}

}  // namespace
}  // namespace raiser::solver
