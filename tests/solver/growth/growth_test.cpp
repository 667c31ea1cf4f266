#include "solver/growth/growth.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "solver/growth/factor.hpp"

namespace raiser::solver {
namespace {

mesh::Crack crack(std::vector<Point> points, bool has_mouth) {
  mesh::Crack result;
  result.name = "c";
  result.points = std::move(points);
  result.has_mouth = has_mouth;
  return result;
}

Load tension(double stress) {
  Load load;
  load.kind = Load::Kind::tension;
  load.name = "tension";
  load.stress = stress;
  return load;
}

Problem strip(double length, double width, std::vector<mesh::Crack> cracks) {
  Problem problem;
  problem.plate.length = length;
  problem.plate.width = width;
  problem.plate.thickness = 1.0;
  problem.plate.cracks = std::move(cracks);
  problem.material = {2e5, 0.3, PlaneState::stress};
  problem.loads = {tension(100.0)};
  return problem;
}

/// A strip 40 mm wide with a hole of radius 5 mm in its middle and a crack from
/// its top towards the edge, 15 mm away.
Problem cracked_hole(double crack_length) {
  Problem problem = strip(160.0, 40.0, {crack({{0.0, 5.0}, {0.0, 5.0 + crack_length}}, true)});
  mesh::Hole hole;
  hole.name = "bolt";
  hole.length = hole.width = 10.0;
  problem.plate.holes = {hole};
  return problem;
}

GrowthPlan plan(std::vector<std::size_t> tips, double from, double to, std::size_t count) {
  GrowthPlan result;
  result.tips = std::move(tips);
  result.lengths = spaced(from, to, count);
  return result;
}

TEST(Growth, FromAHoleAcrossTheLigamentEveryStepIsSolvedAndKIsSmooth) {
  const Problem problem = cracked_hole(1.0);
  const GrowthPlan steps = plan({0}, 0.15, 14.25, 100);
  const Growth growth = grow(problem, steps);
  ASSERT_EQ(growth.steps.size(), 100u);
  std::vector<double> k;
  double cpu = 0.0;
  for (const GrowthStep& step : growth.steps) {
    ASSERT_EQ(step.status, GrowthStep::Status::settled) << step.length << " mm: " << step.reason;
    EXPECT_FALSE(step.is_closed);
    const TipFindings& tip = step.tips.front();
    EXPECT_LE(tip.k_one.bound, 1e-3 * tip.k_one.value);
    EXPECT_NEAR(tip.energy_release.value, tip.k_one.value * tip.k_one.value / 2e5,
                3e-3 * tip.energy_release.value);
    k.push_back(tip.k_one.value);
    cpu += step.seconds;
  }
  RecordProperty("milliseconds", std::to_string(1e3 * cpu));
  // Smooth: third differences of log K within what the bounds allow, away from the steep ends.
  for (std::size_t i = 10; i + 3 < k.size() - 4; ++i) {
    const double third = std::log(k[i + 3] / k[i]) - 3 * std::log(k[i + 2] / k[i + 1]);
    EXPECT_LT(std::abs(third), 2e-3) << growth.steps[i].length;
  }
  const GeometryFactor factor = geometry_factor(problem, steps, growth);
  ASSERT_TRUE(factor.fit) << factor.why;
  EXPECT_LT(factor.fit->error, 1e-3);
}

TEST(Growth, FewerStepsGiveTheSameK) {
  const Growth many = grow(cracked_hole(1.0), plan({0}, 2.0, 6.0, 5));
  const Growth one = grow(cracked_hole(4.0), plan({0}, 4.0, 5.0, 2));
  const Estimate& a = many.steps[2].tips.front().k_one;
  const Estimate& b = one.steps[0].tips.front().k_one;
  EXPECT_EQ(many.steps[2].length, 4.0);
  EXPECT_NEAR(a.value, b.value, a.bound + b.bound);
}

/// Both tips of a centre crack, and the tips of two cracks at one hole.
TEST(Growth, TipsThatGrowTogetherKeepTheSymmetry) {
  const Growth centre =
      grow(strip(120.0, 40.0, {crack({{0.0, -2.0}, {0.0, 2.0}}, false)}), plan({0, 1}, 4.0, 30.0, 4));
  Problem both = cracked_hole(1.0);
  both.plate.cracks.push_back(crack({{0.0, -5.0}, {0.0, -6.0}}, true));
  both.plate.cracks.back().name = "opposite";
  const Growth pair = grow(both, plan({0, 1}, 1.0, 12.0, 3));
  for (const Growth* growth : {&centre, &pair})
    for (const GrowthStep& step : growth->steps) {
      ASSERT_EQ(step.status, GrowthStep::Status::settled) << step.reason;
      EXPECT_NEAR(step.at[0].y(), -step.at[1].y(), 1e-12);
      EXPECT_NEAR(step.tips[0].k_one.value, step.tips[1].k_one.value,
                  step.tips[0].k_one.bound + step.tips[1].k_one.bound);
      for (const TipFindings& tip : step.tips) EXPECT_LE(std::abs(tip.k_two.value), tip.k_two.bound);
    }
  // C. E. Feddersen, ASTM STP 410 (1966) 77: sqrt(sec(pi a / W)), within 0.3 % up to 2 a / W = 0.7.
  for (std::size_t i = 0; i < 3; ++i) {
    const GrowthStep& step = centre.steps[i];
    const double a = step.length / 2;
    EXPECT_NEAR(step.tips[0].k_one.value,
                100 * std::sqrt(std::numbers::pi * a / std::cos(std::numbers::pi * a / 40)),
                4e-3 * step.tips[0].k_one.value);
  }
}

TEST(Growth, OneTipOfTwoMovesAlone) {
  const Growth growth =
      grow(strip(120.0, 40.0, {crack({{0.0, -2.0}, {0.0, 2.0}}, false)}), plan({1}, 4.0, 8.0, 3));
  EXPECT_NEAR(growth.steps.back().at[0].y(), 6.0, 1e-12);
  EXPECT_NEAR(growth.cracks[0].points.front().y(), -2.0, 1e-12);
  EXPECT_GT(growth.steps.back().tips[0].k_one.value, growth.steps.front().tips[0].k_one.value);
}

double slope_of_last_segment(const mesh::Crack& crack) {
  const Point last = crack.points.back() - crack.points[crack.points.size() - 2];
  return std::atan2(last.y(), last.x());
}

GrowthPlan kinked(std::vector<std::size_t> tips, double from, double to, std::size_t count) {
  GrowthPlan result = plan(std::move(tips), from, to, count);
  result.path = GrowthPlan::Path::kinked;
  return result;
}

TEST(Growth, AnInclinedCrackTurnsNormalToTheLoad) {
  const double c = std::cos(std::numbers::pi / 4);
  const Problem problem = strip(200.0, 100.0, {crack({{-5.0 * c, -5.0 * c}, {5.0 * c, 5.0 * c}}, false)});
  const Growth growth = grow(problem, kinked({0, 1}, 10.0, 34.0, 9));
  for (const GrowthStep& step : growth.steps)
    ASSERT_EQ(step.status, GrowthStep::Status::settled) << step.length << ": " << step.reason;
  // The first turn: 53.13 degrees for K_I = K_II far from the edges (Erdogan and Sih 1963).
  EXPECT_NEAR(*growth.steps.front().tips[1].kink_angle, 53.13 * std::numbers::pi / 180, 0.02);
  EXPECT_NEAR(slope_of_last_segment(growth.cracks[0]), std::numbers::pi / 2, 0.03);
  const TipFindings& last = growth.steps.back().tips[1];
  EXPECT_LT(std::abs(last.k_two.value), 0.03 * last.k_one.value);
  EXPECT_NEAR(growth.cracks[0].length(), 34.0, 1e-9);
}

TEST(Growth, ASymmetricCrackKeepsStraightOnTheKinkedPath) {
  const Problem problem = cracked_hole(1.0);
  const Growth turning = grow(problem, kinked({0}, 2.0, 8.0, 4));
  const Growth straight = grow(problem, plan({0}, 2.0, 8.0, 4));
  EXPECT_EQ(turning.cracks[0].points.size(), 2u);
  for (std::size_t i = 0; i < 4; ++i)
    EXPECT_NEAR(turning.steps[i].tips[0].k_one.value, straight.steps[i].tips[0].k_one.value,
                1e-9 * straight.steps[i].tips[0].k_one.value);
}

TEST(Growth, WhatCannotBeDrawnIsSaidAndTheRestStays) {
  // The second length takes the tip across the plate's edge.
  const Growth out = grow(cracked_hole(1.0), plan({0}, 10.0, 20.0, 2));
  ASSERT_EQ(out.steps.size(), 2u);
  EXPECT_EQ(out.steps[0].status, GrowthStep::Status::settled);
  EXPECT_EQ(out.steps[1].status, GrowthStep::Status::not_solved);
  EXPECT_FALSE(out.steps[1].reason.empty());
  EXPECT_TRUE(out.steps[1].tips.empty());

  // The first one takes the whole last segment away; a straight path goes on.
  Problem chain = cracked_hole(1.0);
  chain.plate.cracks[0].points = {{0.0, 5.0}, {0.2, 6.5}, {0.2, 8.0}};
  const Growth back = grow(chain, plan({0}, 1.0, 3.0, 2));
  EXPECT_EQ(back.steps[0].status, GrowthStep::Status::not_solved);
  EXPECT_NE(back.steps[0].reason.find("takes away the last segment"), std::string::npos);
  EXPECT_EQ(back.steps[1].status, GrowthStep::Status::settled) << back.steps[1].reason;
}

TEST(Growth, APressedCrackHasNoKinkedPath) {
  Problem problem = cracked_hole(1.0);
  problem.loads = {tension(-100.0)};
  const Growth growth = grow(problem, kinked({0}, 1.0, 4.0, 3));
  EXPECT_TRUE(growth.steps[0].is_closed);
  EXPECT_EQ(growth.steps[1].status, GrowthStep::Status::not_solved);
  EXPECT_NE(growth.steps[1].reason.find("do not open the crack"), std::string::npos);
  EXPECT_EQ(growth.steps[2].reason, growth.steps[1].reason);
}

TEST(Growth, StopsWhenTold) {
  const Growth growth = grow(cracked_hole(1.0), plan({0}, 1.0, 4.0, 5),
                             [](const GrowthStep& step) { return step.length < 1.5; });
  EXPECT_EQ(growth.steps.size(), 2u);
}

TEST(Growth, EveryFaultOfAPlanIsNamed) {
  const Problem problem = cracked_hole(1.0);
  GrowthPlan bad;
  bad.tips = {3, 0, 0};
  bad.lengths = {2.0, 1.0, -1.0};
  bad.tolerance = 0.0;
  const std::vector<std::string> found = faults(bad, problem.plate);
  EXPECT_EQ(found.size(), 6u);
  EXPECT_THROW(grow(problem, bad), std::invalid_argument);
  EXPECT_TRUE(faults(plan({0}, 1.0, 2.0, 2), problem.plate).empty());
}

}  // namespace
}  // namespace raiser::solver
