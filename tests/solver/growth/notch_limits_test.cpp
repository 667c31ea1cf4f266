#include "solver/growth/notch_limits.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "mesh/plate/build.hpp"
#include "solver/growth/growth.hpp"

namespace raiser::solver {
namespace {

/// A hole of radius 1 mm in a plate so wide that it counts as infinite, with one
/// crack from its top, normal to a tension of 100 MPa.
Problem cracked_hole(double a, bool has_second) {
  Problem problem;
  problem.plate.length = 160.0;
  problem.plate.width = 160.0;
  problem.plate.thickness = 1.0;
  mesh::Hole hole;
  hole.name = "hole";
  hole.length = hole.width = 2.0;
  problem.plate.holes = {hole};
  mesh::Crack crack;
  crack.name = "up";
  crack.points = {{0.0, 1.0}, {0.0, 1.0 + a}};
  crack.has_mouth = true;
  problem.plate.cracks = {crack};
  if (has_second) {
    crack.name = "down";
    crack.points = {{0.0, -1.0}, {0.0, -1.0 - a}};
    problem.plate.cracks.push_back(crack);
  }
  problem.material = {2e5, 0.3, PlaneState::stress};
  Load load;
  load.kind = Load::Kind::tension;
  load.name = "tension";
  load.stress = 100.0;
  problem.loads = {load};
  return problem;
}

double settled_k(const Problem& problem) {
  const Solution solution = settle(problem, {{Quantity::stress_intensity, 0, 1e-4, ""}}, Report::brief);
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  return solution.combined.tips[0].k_one.value;
}

TEST(NotchLimits, AtAHoleTheyAreThoseOfKirschAndOfOneLongCrack) {
  const Problem problem = cracked_hole(0.1, false);
  const NotchReading reading = notch_limits(problem, 0, 1e-4);
  ASSERT_TRUE(reading.limits) << reading.why;
  const NotchLimits& limits = *reading.limits;
  EXPECT_NEAR(limits.kt(), 3.0, 3e-3);  // G. Kirsch, Z. VDI 42 (1898) 797; the plate is 80 holes wide
  EXPECT_GT(limits.edge_stress.bound, 0.0);
  EXPECT_LT(limits.edge_stress.bound, 1e-3 * limits.edge_stress.value);
  EXPECT_NEAR(limits.root_radius, 1.0, 1e-12);
  EXPECT_NEAR(limits.depth, 2.0, 1e-9);
  EXPECT_NEAR(limits.short_crack(0.1), 1.1215 * limits.edge_stress.value * std::sqrt(0.1 * std::numbers::pi),
              1e-9);
  EXPECT_NEAR(limits.long_crack(2.0), 100 * std::sqrt(std::numbers::pi * 4.0 / 2), 1e-9);
  EXPECT_FALSE(limits.between(0.6));
  const NotchReading pair = notch_limits(cracked_hole(0.1, true), 0);
  EXPECT_NEAR(pair.limits->depth, 1.0, 1e-9);
  EXPECT_EQ(pair.limits->long_factor, 1.0);
  const double l = *limits.transition();
  EXPECT_NEAR(limits.short_crack(l), limits.long_crack(l), 1e-9 * limits.long_crack(l));
}

TEST(NotchLimits, KGoesFromOneToTheOther) {
  const NotchLimits limits = *notch_limits(cracked_hole(0.1, false), 0, 1e-4).limits;
  // From 0.5 % of the root radius on: below the short limit, and nearer to it the shorter.
  double before = 1.0;
  for (const double a : {0.005, 0.02, 0.1}) {
    const double ratio = settled_k(cracked_hole(a, false)) / limits.short_crack(a);
    EXPECT_LT(ratio, before) << a;
    EXPECT_GT(ratio, 1.0 / (1 + 3 * a)) << a;
    before = ratio;
  }
  EXPECT_GT(settled_k(cracked_hole(0.005, false)), 0.985 * limits.short_crack(0.005));
  EXPECT_NEAR(settled_k(cracked_hole(10.0, false)) / limits.long_crack(10.0), 1.0, 0.03);
}

/// Fit for one crack at a hole in an infinite plate, from public notes, within 0.5 % of
/// finite elements for 0 <= c/R <= 10.
double one_crack_fit(double c) {
  const double x = 1.0 / (1.0 + c);
  return 0.7071 + x * (0.7548 + x * (0.3415 + x * (0.6420 + x * 0.9196)));
}

TEST(NotchLimits, CracksAtAHoleAreAsPublished) {
  for (const double c : {0.02, 0.1, 0.5, 1.0, 2.0}) {
    const double y = settled_k(cracked_hole(c, false)) / (100 * std::sqrt(std::numbers::pi * c));
    EXPECT_NEAR(y / one_crack_fit(c), 1.0, 6e-3) << c;
  }
  // O. L. Bowie, J. Math. and Phys. 35 (1956) 60, as P. C. Paris and G. C. Sih tabulate it in ASTM
  // STP 381 (1965), from memory; the table is up to 3.4 % off for two cracks.
  const std::pair<double, double> two[] = {{0.1, 2.73}, {0.5, 1.83}, {1.0, 1.45}, {2.0, 1.21}};
  for (const auto& [c, y] : two)
    EXPECT_NEAR(settled_k(cracked_hole(c, true)) / (100 * std::sqrt(std::numbers::pi * c)), y, 0.035 * y)
        << c;
}

/// A semicircular notch of radius 1 mm in the upper edge of a plate so large that it counts as a
/// half plane, and a crack of length `l` from its root.
Problem cracked_notch(double l) {
  Problem problem = cracked_hole(l, false);
  problem.plate.holes.clear();
  mesh::Notch notch;
  notch.name = "notch";
  notch.shape = mesh::NotchShape::semicircle;
  notch.edge = mesh::rectangle::top;
  notch.depth = notch.root_radius = 1.0;
  problem.plate.outline = mesh::with_notches(mesh::outline_of(problem.plate), {notch}).outline.value();
  problem.plate.cracks.front().points = {{0.0, 79.0}, {0.0, 79.0 - l}};
  return problem;
}

TEST(NotchLimits, CracksAtASemicircularNotchAreAsFiniteElementsHaveThem) {
  const NotchReading reading = notch_limits(cracked_notch(0.1), 0);
  ASSERT_TRUE(reading.limits) << reading.why;
  EXPECT_NEAR(reading.limits->kt(), 3.065, 0.02);  // half plane; the plate is 160 notches wide
  EXPECT_NEAR(reading.limits->depth, 1.0, 1e-9);
  EXPECT_NEAR(reading.limits->root_radius, 1.0, 1e-9);
  // K / S of independent finite elements in the half plane, l / rho from 0.02 to 0.5. P. Lukas and
  // M. Klesnil (1978) is within 1 % of them up to l / rho = 0.2.
  const std::pair<double, double> known[] = {{0.02, 0.8299}, {0.1, 1.6105}, {0.5, 2.4322}};
  for (const auto& [l, k] : known) EXPECT_NEAR(settled_k(cracked_notch(l)) / 100, k, 8e-3 * k) << l;
  // Their 3.5221 at l / rho = 2 is 2.3 % above the long crack, ours 0.4 %: a plate of smaller width.
  EXPECT_NEAR(settled_k(cracked_notch(2.0)) / reading.limits->long_crack(2.0), 1.0, 0.01);
  for (const double l : {0.02, 0.1, 0.2})
    EXPECT_NEAR(*reading.limits->between(l) / settled_k(cracked_notch(l)), 1.0, 0.012) << l;
}

TEST(NotchLimits, AreNotGivenWhereThereIsNoNotch) {
  Problem problem = cracked_hole(0.5, false);
  problem.plate.cracks[0].points = {{0.0, 80.0}, {0.0, 70.0}};
  EXPECT_NE(notch_limits(problem, 0).why.find("plain edge"), std::string::npos);
  problem.plate.cracks[0].points = {{5.0, 0.0}, {10.0, 0.0}};
  problem.plate.cracks[0].has_mouth = false;
  EXPECT_NE(notch_limits(problem, 0).why.find("opens at no edge"), std::string::npos);
  problem = cracked_hole(0.5, false);
  problem.loads[0].kind = Load::Kind::face_pressure;
  EXPECT_NE(notch_limits(problem, 0).why.find("crack faces"), std::string::npos);
}

}  // namespace
}  // namespace raiser::solver
