#include "validation/random_outline.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <map>
#include <string>

namespace raiser::validation {
namespace {

constexpr std::uint64_t seeds = 150;

TEST(RandomOutline, EverySeedIsLegalAndBalancedOrHeld) {
  for (std::uint64_t seed = 0; seed < seeds; ++seed) {
    const auto problem = random_outlined_plate(seed);
    const auto wrong = mesh::faults(problem.plate);
    EXPECT_TRUE(wrong.empty()) << "seed " << seed << ": " << (wrong.empty() ? "" : wrong.front().what);
    EXPECT_TRUE(solver::faults(problem.material).empty()) << "seed " << seed;
    EXPECT_TRUE(solver::faults(problem.plate, problem.supports).empty()) << "seed " << seed;
    const auto left = solver::imbalance(problem.plate, problem.loads, problem.supports);
    EXPECT_FALSE(left.has_value()) << "seed " << seed << ": " << (left ? left->what : "");
    ASSERT_TRUE(problem.plate.outline.has_value()) << "seed " << seed;
    EXPECT_FALSE(problem.plate.outline->raisers.empty()) << "seed " << seed;
  }
}

TEST(RandomOutline, CoversEveryShapeMaterialAndKindOfLoad) {
  std::map<std::string, int> seen;
  for (std::uint64_t seed = 0; seed < seeds; ++seed) {
    const auto problem = random_outlined_plate(seed);
    ++seen[problem.material.orthotropy ? "orthotropic" : "isotropic"];
    ++seen[problem.supports.empty() ? "balanced" : "clamped"];
    if (!problem.plate.holes.empty()) ++seen["with holes"];
    for (const auto& load : problem.loads) ++seen[std::string(solver::word(load.kind))];
    for (const mesh::Raiser& raiser : problem.plate.outline->raisers) {
      if (raiser.notch)
        ++seen["notch " + std::string(mesh::word(raiser.notch->shape))];
      else if (raiser.fillet)
        ++seen["fillet " + std::string(mesh::word(raiser.fillet->shape))];
      else
        ++seen["free " + std::string(mesh::word(raiser.kind))];
    }
  }
  for (const char* name :
       {"orthotropic", "isotropic", "balanced", "clamped", "with holes", "tension", "bending", "pressure",
        "edge", "notch U", "notch V", "notch semicircle", "notch semi-ellipse", "notch keyhole",
        "fillet circle", "fillet ellipse", "fillet two radii", "fillet undercut", "free notch"})
    EXPECT_GT(seen[name], 5) << name;
}

TEST(RandomOutline, ASeedAlwaysGivesTheSamePlate) {
  const auto a = random_outlined_plate(5), b = random_outlined_plate(5), c = random_outlined_plate(6);
  EXPECT_EQ(a.plate.width, b.plate.width);
  EXPECT_EQ(a.plate.outline->curves.size(), b.plate.outline->curves.size());
  EXPECT_NE(a.plate.width, c.plate.width);
}

// The first mesh that six digits ask of this plate cannot be made: a plain one serves,
// and what it leaves out shows in the bound.
TEST(RandomOutline, APlainMeshServesWhereTheFinestCannotBeMade) {
  const solver::Problem problem = random_outlined_plate(6);
  const auto value_for = [&](double tolerance) {
    const std::vector<solver::Ask> asks{{solver::Quantity::largest_edge_stress, 2, tolerance, ""}};
    const solver::Solution solution = solver::settle(problem, asks, solver::Report::brief);
    EXPECT_EQ(solution.status, solver::Solution::Status::settled) << solution.reason;
    return solution.combined.raisers.at(2).largest.stress;
  };
  const solver::Estimate close = value_for(1e-6), plain = value_for(1e-3);
  EXPECT_LT(close.bound, 1e-2 * plain.bound);
  EXPECT_LE(std::abs(close.value - plain.value), plain.bound + close.bound);
}

}  // namespace
}  // namespace raiser::validation
