#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

using mesh::Crack;

Load of(Load::Kind kind, double stress) {
  Load load;
  load.kind = kind;
  load.stress = stress;
  return load;
}

Crack chain(std::vector<Point> points, bool has_mouth = false) {
  Crack crack;
  crack.points = std::move(points);
  crack.has_mouth = has_mouth;
  return crack;
}

Problem strip(std::vector<Crack> cracks, std::vector<Load> loads) {
  Problem problem;
  problem.plate.length = 400;
  problem.plate.width = 100;
  problem.plate.thickness = 2;
  problem.plate.cracks = std::move(cracks);
  problem.material.youngs_modulus = 200e3;
  problem.material.poissons_ratio = 0.3;
  problem.loads = std::move(loads);
  return problem;
}

std::vector<Ask> every_tip(const Problem& problem, double tolerance) {
  std::vector<Ask> asks;
  for (std::size_t t = 0; t < mesh::tips(problem.plate.cracks).size(); ++t)
    asks.push_back({Quantity::stress_intensity, t, tolerance, ""});
  return asks;
}

Solution solved(const Problem& problem, double tolerance = 1e-3) {
  Solution solution = settle(problem, every_tip(problem, tolerance));
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  return solution;
}

double factor(const Estimate& k, double a, double stress = 100) {
  return k.value / (stress * std::sqrt(std::numbers::pi * a));
}

/// Everything that must hold at every tip, whatever the plate.
void expect_consistent(const Solution& solution, double within) {
  for (const TipFindings& tip : solution.combined.tips) {
    const double g = tip.energy_release.value;
    EXPECT_NEAR(tip.j_integral, g, within * g);
    EXPECT_NEAR(tip.extension, g, within * g);
    ASSERT_EQ(tip.domains.size(), 4u);
    for (const Eigen::Vector3d& k : tip.domains) {
      EXPECT_LE(std::abs(k[0] - tip.k_one.value), tip.k_one.bound);
      EXPECT_LE(std::abs(k[1] - tip.k_two.value), tip.k_two.bound);
    }
    // T is small beside the near field in the inner domains.
    EXPECT_LE(std::abs(tip.domains[1][2] - tip.t_stress.value), tip.t_stress.bound);
  }
}

TEST(Cracks, SymmetryGivesModeOneAloneAndTheSameWithoutIt) {
  const Problem problem = strip({chain({{0, -25}, {0, 25}})}, {of(Load::Kind::tension, 100)});
  const Solution quarter = solved(problem);
  EXPECT_TRUE(quarter.mirrors_used.x && quarter.mirrors_used.y);
  Problem whole = problem;  // a crack far away and tiny takes the symmetry
  whole.plate.cracks.push_back(chain({{150, 20}, {150.2, 20.1}}));
  Solution full =
      settle(whole, {{Quantity::stress_intensity, 0, 1e-3, ""}, {Quantity::stress_intensity, 1, 1e-3, ""}});
  for (std::size_t t = 0; t < 2; ++t) {
    const TipFindings& a = quarter.combined.tips[t];
    const TipFindings& b = full.combined.tips[t];
    EXPECT_NEAR(a.k_one.value, b.k_one.value, a.k_one.bound + b.k_one.bound);
    EXPECT_LE(std::abs(a.k_two.value), a.k_two.bound);
    EXPECT_LE(std::abs(b.k_two.value), b.k_two.bound + 1e-4 * b.k_one.value);
    EXPECT_NEAR(a.t_stress.value, b.t_stress.value, a.t_stress.bound + b.t_stress.bound);
  }
  expect_consistent(quarter, 1e-3);
}

TEST(Cracks, MirroredTipsHaveModeTwoOfTheOtherSign) {
  const Problem problem =
      strip({chain({{-10, -20}, {10, -10}}), chain({{-10, 20}, {10, 10}})}, {of(Load::Kind::tension, 100)});
  const Solution solution = solved(problem);
  EXPECT_TRUE(solution.mirrors_used.y);
  for (const std::size_t t : {0u, 1u}) {
    EXPECT_NEAR(solution.combined.tips[t].k_one.value, solution.combined.tips[t + 2].k_one.value, 1e-9);
    EXPECT_NEAR(solution.combined.tips[t].k_two.value, -solution.combined.tips[t + 2].k_two.value, 1e-9);
    EXPECT_GT(std::abs(solution.combined.tips[t].k_two.value), 10.0);
  }
  Problem one = problem;
  one.plate.cracks.resize(1);  // no symmetry, hence no images: the same signs
  const Solution alone = solved(one);
  EXPECT_GT(alone.combined.tips[0].k_two.value * solution.combined.tips[0].k_two.value, 0.0);
  expect_consistent(solution, 1e-3);
}

// A crack along the tension: nothing opens it, K is zero and T the tension, and what
// rounding leaves of them lies within the bounds.
TEST(Cracks, AlongTheLoadHaveNoIntensityWithinTheBound) {
  const Solution solution = solved(strip({chain({{-12, 0}, {12, 0}})}, {of(Load::Kind::tension, 100)}));
  for (const TipFindings& tip : solution.combined.tips) {
    EXPECT_LE(std::abs(tip.k_one.value), tip.k_one.bound);
    EXPECT_LE(std::abs(tip.k_two.value), tip.k_two.bound);
    EXPECT_LE(std::abs(tip.t_stress.value - 100), tip.t_stress.bound);
    EXPECT_LT(tip.t_stress.bound, 1e-6);
  }
}

TEST(Cracks, FacePressureIsRemoteTensionLessTheUniformStress) {
  // Superposition: exact in any plate for a crack across uniform tension.
  for (const bool at_edge : {false, true}) {
    const Crack crack = at_edge ? chain({{0, -50}, {0, -20}}, true) : chain({{0, -15}, {0, 15}});
    const Solution pulled = solved(strip({crack}, {of(Load::Kind::tension, 100)}), 1e-5);
    const Solution pressed = solved(strip({crack}, {of(Load::Kind::face_pressure, 100)}), 1e-5);
    const TipFindings& a = pulled.combined.tips[0];
    const TipFindings& b = pressed.combined.tips[0];
    EXPECT_NEAR(a.k_one.value, b.k_one.value, 2e-5 * a.k_one.value);
    EXPECT_NEAR(a.t_stress.value, b.t_stress.value, a.t_stress.bound + b.t_stress.bound);
    expect_consistent(pressed, 1e-4);
  }
}

TEST(Cracks, ShearTurnsIntoModeTwoOfOneSign) {
  // Pure shear on a crack along x in a large plate: K_II = tau sqrt(pi a).
  Problem problem = strip({chain({{-1, 0}, {1, 0}})}, {of(Load::Kind::shear, 100)});
  problem.plate.length = problem.plate.width = 100;
  const Solution solution = solved(problem);
  for (const TipFindings& tip : solution.combined.tips) {
    EXPECT_NEAR(factor(tip.k_two, 1.0), 1.0, 2e-3);
    EXPECT_LE(std::abs(tip.k_one.value), tip.k_one.bound);
    EXPECT_FALSE(tip.kink_angle && std::abs(*tip.kink_angle) < 1.0);
  }
  expect_consistent(solution, 1e-3);
}

TEST(Cracks, OrthotropicPlatesKeepTheInfinitePlatesK) {
  // A crack in an infinite plate under balanced loads has sigma sqrt(pi a)
  // whatever the anisotropy (Sih, Paris and Irwin 1965); J takes another road.
  for (const double angle : {0.0, 0.6}) {
    Problem problem = strip({chain({{0, -1}, {0, 1}})}, {of(Load::Kind::tension, 100)});
    problem.plate.length = problem.plate.width = 200;
    problem.material.youngs_modulus = 140e3;
    problem.material.orthotropy = Orthotropy{20e3, 8e3, angle};
    const Solution solution = solved(problem);
    EXPECT_NEAR(factor(solution.combined.tips[0].k_one, 1.0), 1.0, 2e-3);
    EXPECT_NEAR(factor(solution.combined.tips[0].k_two, 1.0), 0.0, 2e-3);
    EXPECT_FALSE(solution.combined.tips[0].kink_angle);
    expect_consistent(solution, 1e-3);
  }
}

TEST(Cracks, LoadsAddUp) {
  Load bending = of(Load::Kind::bending, -40);
  const Problem problem =
      strip({chain({{5, -50}, {-5, -25}, {0, -15}}, true)}, {of(Load::Kind::tension, 70), bending});
  const Solution solution = solved(problem);
  ASSERT_EQ(solution.units.size(), 2u);
  const TipFindings& all = solution.combined.tips[0];
  const double sum = solution.units[0].tips[0].k_one.value + solution.units[1].tips[0].k_one.value;
  EXPECT_NEAR(all.k_one.value, sum, 1e-9 * std::abs(sum));
  const double shear = solution.units[0].tips[0].k_two.value + solution.units[1].tips[0].k_two.value;
  EXPECT_NEAR(all.k_two.value, shear, 1e-9 * std::abs(sum));
  expect_consistent(solution, 2e-3);
}

TEST(Cracks, TouchingFacesAreSaid) {
  const Crack crack = chain({{0, -10}, {0, 10}});
  EXPECT_TRUE(solved(strip({crack}, {of(Load::Kind::tension, -100)})).openings.at(0).is_closed());
  EXPECT_FALSE(solved(strip({crack}, {of(Load::Kind::tension, 100)})).openings.at(0).is_closed());
  // In bending one half of the faces overlaps, and the place is on that half.
  const Solution bent = solved(strip({crack}, {of(Load::Kind::bending, 100)}));
  EXPECT_TRUE(bent.openings.at(0).is_closed());
  EXPECT_LT(bent.openings.at(0).where.y(), 0.0);
  const Solution along = solved(strip({chain({{-10, 0}, {10, 0}})}, {of(Load::Kind::tension, 100)}));
  EXPECT_FALSE(along.openings.at(0).is_closed());
  EXPECT_NEAR(along.combined.tips[0].t_stress.value, 100, 1e-6);
}

TEST(Cracks, HolesBesideThemKeepTheirPeaks) {
  Problem problem = strip({chain({{30, -10}, {30, 10}})}, {of(Load::Kind::tension, 100)});
  mesh::Hole hole;
  hole.name = "bolt";
  hole.length = hole.width = 20;
  hole.centre = {-150, 0};
  problem.plate.holes = {hole};
  std::vector<Ask> asks = every_tip(problem, 1e-3);
  asks.push_back({Quantity::largest_edge_stress, 0, 1e-3, ""});
  const Solution with = settle(problem, asks);
  EXPECT_EQ(with.status, Solution::Status::settled) << with.reason;
  problem.plate.cracks.clear();
  const Solution without = settle(problem, {asks.back()});
  const double peak = without.combined.raisers[0].largest.stress.value;
  EXPECT_NEAR(with.combined.raisers[0].largest.stress.value, peak, 5e-3 * peak);
}

}  // namespace
}  // namespace raiser::solver
