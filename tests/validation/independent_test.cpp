#include "validation/independent.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "mesh/plate/distance.hpp"

namespace raiser::validation {
namespace {

solver::RaiserFindings solve(const Independent& c, double tolerance) {
  const auto solution =
      solver::settle(c.problem, {{solver::Quantity::largest_edge_stress, c.raiser, tolerance, ""}});
  EXPECT_EQ(solution.status, solver::Solution::Status::settled) << c.name << ": " << solution.reason;
  return solution.combined.raisers.at(c.raiser);
}

TEST(Independent, CasesAreLegal) {
  for (const auto& c : independent_values()) {
    EXPECT_TRUE(mesh::faults(c.problem.plate).empty()) << c.name;
    if (c.raiser >= c.problem.plate.holes.size()) continue;
    const auto& hole = c.problem.plate.holes.at(c.raiser);
    const mesh::Point out = c.where - hole.centre;
    // The place given lies on the hole's edge or, at a rounded corner, inside its box.
    EXPECT_LE(std::abs(out.x()), mesh::half_extent(hole, mesh::Point::UnitX()) + 1e-6) << c.name;
    EXPECT_LE(std::abs(out.y()), mesh::half_extent(hole, mesh::Point::UnitY()) + 1e-6) << c.name;
    EXPECT_GT(out.norm(), 0.49 * std::min(hole.length, hole.width)) << c.name;
  }
}

TEST(Independent, BoundHoldsAtTheDefaultTolerance) {
  for (const auto& c : independent_values()) {
    const auto found = solve(c, 1e-3).largest.stress;
    const double target = c.factor * c.nominal;
    EXPECT_LE(std::abs(found.value - target), found.bound + c.uncertainty * c.nominal) << c.name;
    EXPECT_LE(found.bound, 1e-3 * target * (1 + 1e-9)) << c.name;
  }
}

TEST(Independent, EightDigitsOnRequest) {
  for (const auto& c : independent_values()) {
    const auto found = solve(c, 2e-9);
    const double target = c.factor * c.nominal;
    EXPECT_NEAR(found.largest.stress.value, target, 2e-8 * target) << c.name;
    EXPECT_LE(std::abs(found.largest.stress.value - target),
              found.largest.stress.bound + c.uncertainty * c.nominal)
        << c.name;
    // The plates are symmetric: the peak lies there or at a mirror image.
    const mesh::Point centre =
        c.problem.plate.outline ? mesh::Point(0, 0) : mesh::raiser(c.problem.plate, c.raiser).centre;
    const mesh::Point ours = found.largest.point - centre, theirs = c.where - centre;
    EXPECT_NEAR(std::abs(ours.x()), std::abs(theirs.x()), 0.01) << c.name;
    EXPECT_NEAR(std::abs(ours.y()), std::abs(theirs.y()), 0.01) << c.name;
  }
}

}  // namespace
}  // namespace raiser::validation
