// Roots so sharp and ligaments so thin that uniform meshes would need millions of unknowns.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <vector>

#include "solver/solution.hpp"
#include "validation/families/bars.hpp"

namespace raiser::validation {
namespace {

/// Settles every largest edge stress to 0.1 %.
void expect_cheap(const mesh::Plate& plate, const char* what) {
  for (const auto kind : {solver::Load::Kind::tension, solver::Load::Kind::bending}) {
    solver::Load load;
    load.kind = kind;
    load.stress = 100.0;
    const solver::Problem problem{plate, {2e5, 0.3, solver::PlaneState::stress}, {load}};
    std::vector<solver::Ask> asks;
    for (std::size_t r = 0; r < mesh::raiser_count(plate); ++r)
      asks.push_back({solver::Quantity::largest_edge_stress, r, 1e-3, ""});
    const auto solution = solver::settle(problem, asks);
    EXPECT_EQ(solution.status, solver::Solution::Status::settled) << what << ": " << solution.reason;
    EXPECT_LT(solution.unknowns, 20000u) << what << ", " << solver::word(kind);
    for (const solver::RaiserFindings& found : solution.combined.raisers) {
      const double peak =
          std::max(std::abs(found.largest.stress.value), std::abs(found.smallest.stress.value));
      EXPECT_LE(found.largest.stress.bound, 1e-3 * peak) << what;
    }
  }
}

TEST(SharpRoots, NeedFewUnknowns) {
  constexpr double depth = 20.0, sharp = 0.005 * depth;
  for (const bool both : {false, true}) {
    expect_cheap(notched_bar(400, 100, {depth, sharp}, both), "U notch");
    expect_cheap(notched_bar(400, 100, {depth, sharp, 1.0}, both), "V notch");
  }
  expect_cheap(stepped_bar(400, 100, 50, 0.005 * 50), "shoulder fillet");
}

TEST(SharpRoots, ThinLigamentsNeedFewUnknowns) {
  expect_cheap(notched_bar(400, 100, {49.5, 5.0}, true), "two notches");
  expect_cheap(notched_bar(400, 100, {99.0, 5.0}, false), "one notch");
}

}  // namespace
}  // namespace raiser::validation
