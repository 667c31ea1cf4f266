// The standard specimens of fracture mechanics, and the T stress of cracked strips.
#include "validation/families/specimens.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "validation/families/bars.hpp"
#include "validation/families/question.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::validation {
namespace {

using solver::Load;

solver::Solution solved(const solver::Problem& problem, double tolerance,
                        solver::Quantity quantity = solver::Quantity::stress_intensity) {
  auto solution = solver::settle(problem, {{quantity, 0, tolerance, ""}});
  EXPECT_EQ(solution.status, solver::Solution::Status::settled) << solution.reason;
  return solution;
}

double k_of(const solver::Problem& problem, double tolerance) {
  return solved(problem, tolerance).combined.tips.front().k_one.value / 100;  // K B sqrt(W)/P
}

// K_I of converged finite elements of another code, with patches 4 % wide and a cosine pressure.
TEST(Specimens, AreAsOtherFiniteElementsHaveThem) {
  const std::pair<double, double> bent[] = {{0.2, 4.64769}, {0.5, 10.5729}, {0.7, 23.361}};
  for (const auto& [x, k] : bent) EXPECT_NEAR(k_of(bend_specimen_plate(x, 0.04), 1e-4), k, 1.2e-4 * k) << x;
  const std::pair<double, double> pulled[] = {{0.2, 4.45799}, {0.5, 9.61671}, {0.8, 41.1352}};
  for (const auto& [x, k] : pulled)
    EXPECT_NEAR(k_of(compact_specimen_plate(x, false), 1e-4), k, 1.2e-4 * k) << x;
}

// Spreading a force takes a part off K that falls with the square of the patch.
TEST(Specimens, AnEverNarrowerPatchOfForceHasALimit) {
  const double wide = k_of(bend_specimen_plate(0.5, 0.08), 1e-6);
  const double half = k_of(bend_specimen_plate(0.5, 0.04), 1e-6);
  const double quarter = k_of(bend_specimen_plate(0.5, 0.02), 1e-6);
  EXPECT_NEAR((half - wide) / (quarter - half), 4.0, 0.2);
  const double limit = quarter + (quarter - half) / 3;
  EXPECT_NEAR(quarter / limit, 1.0, 7e-5);
  EXPECT_LT(quarter, limit);
}

TEST(Specimens, HowThePinsPressMattersForShortCracksOnly) {
  const auto ratio = [](double x) {
    return k_of(compact_specimen_plate(x, true), 1e-3) / k_of(compact_specimen_plate(x, false), 1e-3);
  };
  EXPECT_NEAR(ratio(0.2), 0.9952, 1.5e-3);
  EXPECT_NEAR(ratio(0.7), 1.0, 1.5e-3);
}

TEST(Specimens, AThousandthTakesFewUnknownsAndSymmetryLeavesNoModeTwo) {
  for (const double x : {0.2, 0.45, 0.7})
    for (const auto& problem : {bend_specimen_plate(x, 0.02), compact_specimen_plate(x, false)}) {
      const auto solution = solved(problem, 1e-3);
      EXPECT_LT(solution.unknowns, 15'000U) << x;
      const auto& tip = solution.combined.tips.front();
      EXPECT_LE(tip.k_one.bound, 1e-3 * tip.k_one.value) << x;
      EXPECT_LE(std::abs(tip.k_two.value), tip.k_two.bound) << x;
      EXPECT_LE(solution.checks.equilibrium_residual, 1e-9) << x;
    }
}

/// A crack 2a = 20 mm long at the angle beta to a tension of unit_stress along x.
solver::Problem inclined_crack(double beta, double size) {
  auto problem = plate_under(size, size, {}, {Load::Kind::tension});
  const Point end = 10 * Point(std::cos(beta), std::sin(beta));
  problem.plate.cracks = {{"crack", {-end, end}, false, {}}};
  return problem;
}

// T = sigma along the crack less sigma across it, in an infinite plate.
TEST(TStress, OfAnInclinedCrackIsTheClosedForm) {
  for (const double degrees : {20.0, 45.0, 70.0, 90.0}) {
    const double beta = degrees * std::numbers::pi / 180;
    const auto solution = solved(inclined_crack(beta, 20'000), 1e-3, solver::Quantity::t_stress);
    const solver::Estimate t = solution.combined.tips.front().t_stress;
    EXPECT_NEAR(t.value / unit_stress, std::cos(2 * beta), t.bound / unit_stress + 1e-5) << degrees;
    EXPECT_LE(t.bound, 1.1e-3 * unit_stress) << degrees;
  }
}

// Deep cracks, and many digits: what the rings leave unresolved falls with the degree, not with their size.
TEST(TStress, OfDeepCracksSettlesToFewPartsInAHundredThousand) {
  for (const double depth : {80.0, 95.0}) {
    auto problem = plate_under(600, 100, {}, {Load::Kind::tension});
    problem.plate.cracks = {{"edge", {{0, 50}, {0, 50 - depth}}, true, {}}};
    const auto coarse = solved(problem, 3e-4, solver::Quantity::t_stress).combined.tips.front().t_stress;
    const auto fine = solved(problem, 1e-5, solver::Quantity::t_stress).combined.tips.front().t_stress;
    EXPECT_NEAR(coarse.value, fine.value, coarse.bound + fine.bound) << depth;
    EXPECT_LT(fine.bound, 3e-5 * std::abs(fine.value)) << depth;
  }
}

// T over the remote stress of strips, computed by another code to about 0.002.
TEST(TStress, OfCrackedStripsIsAsOtherFiniteElementsHaveIt) {
  const auto strip = [](Load::Kind load, std::vector<mesh::Crack> cracks) {
    auto problem = plate_under(600, 100, {}, {load});
    problem.plate.cracks = std::move(cracks);
    const auto solution = solved(problem, 3e-3, solver::Quantity::t_stress);
    return solution.combined.tips.front().t_stress.value / unit_stress;
  };
  const mesh::Crack edge{"edge", {{0, 50}, {0, 10}}, true, {}};
  const mesh::Crack other{"other", {{0, -50}, {0, -30}}, true, {}};
  const mesh::Crack upper{"upper", {{0, 50}, {0, 30}}, true, {}};
  EXPECT_NEAR(strip(Load::Kind::tension, {{"middle", {{0, -20}, {0, 20}}, false, {}}}),
              *t_stress(Cracked::centre, 0.4), 2e-3);
  EXPECT_NEAR(strip(Load::Kind::tension, {edge}), *t_stress(Cracked::edge, 0.4), 2e-3);
  EXPECT_NEAR(strip(Load::Kind::bending, {edge}), *t_stress(Cracked::edge_bending, 0.4), 2e-3);
  EXPECT_NEAR(strip(Load::Kind::tension, {upper, other}), *t_stress(Cracked::two_edges, 0.4), 2e-3);
}

// The largest stress on an edge that is no raiser of the part itself.
TEST(WatchedEdge, ABarInBendingHasItsNominalStressThere) {
  auto problem = plate_under(600, 100, {circle(1)}, {Load::Kind::bending});
  problem.plate = watched(problem.plate, mesh::rectangle::top);
  const auto solution = solver::settle(problem, {{solver::Quantity::largest_edge_stress, 1, 1e-4, ""}});
  EXPECT_NEAR(solution.combined.raisers.at(1).largest.stress.value, unit_stress, 1e-2);
}

}  // namespace
}  // namespace raiser::validation
