// Plates of an orthotropic material: what must follow from what, and where the
// largest edge stress is.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

constexpr double pi = std::numbers::pi;

HookeLaw carbon(double angle) { return {138000, 0.3, PlaneState::stress, Orthotropy{9000, 6900, angle}}; }

Problem sheet(const HookeLaw& law, Load::Kind kind = Load::Kind::tension) {
  Problem problem;
  problem.plate = {100, 100, 2, {{"a", mesh::HoleShape::circle, 20, 20, 0, Point(0, 0), 0}}};
  problem.material = law;
  Load load;
  load.kind = kind;
  load.stress = 100;
  problem.loads = {load};
  return problem;
}

RaiserFindings solved(const Problem& problem, double tolerance = 1e-4) {
  std::vector<Ask> asks;
  for (const Quantity q : {Quantity::largest_edge_stress, Quantity::smallest_edge_stress})
    asks.push_back({q, 0, tolerance, ""});
  const Solution solution = settle(problem, asks);
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  return solution.combined.raisers.at(0);
}

void expect_same(const Estimate& a, const Estimate& b) { EXPECT_NEAR(a.value, b.value, a.bound + b.bound); }

TEST(OrthotropicPlate, TurningPlateLoadAndFibresTogetherChangesNothing) {
  const RaiserFindings along = solved(sheet(carbon(0.35)));
  const RaiserFindings across = solved(sheet(carbon(0.35 + pi / 2), Load::Kind::transverse));
  expect_same(along.largest.stress, across.largest.stress);
  expect_same(along.smallest.stress, across.smallest.stress);
  const Point turned(-along.largest.point.y(), along.largest.point.x());
  const double distance =
      std::min((turned - across.largest.point).norm(), (turned + across.largest.point).norm());
  EXPECT_LT(distance, 0.1);
}

TEST(OrthotropicPlate, FibresThatLeanTheOtherWayGiveTheMirrorImage) {
  const RaiserFindings up = solved(sheet(carbon(0.5)));
  const RaiserFindings down = solved(sheet(carbon(-0.5)));
  expect_same(up.largest.stress, down.largest.stress);
  expect_same(up.smallest.stress, down.smallest.stress);
  const Point a = up.largest.point, b = down.largest.point;
  EXPECT_LT(std::abs(std::abs(a.x()) - std::abs(b.x())), 0.1);
  EXPECT_LT(std::abs(a.x() * a.y() + b.x() * b.y()), 3.0);
}

TEST(OrthotropicPlate, EqualModuliAreIsotropicAtAnyAngle) {
  HookeLaw law{70000, 0.33, PlaneState::stress};
  const RaiserFindings isotropic = solved(sheet(law));
  law.orthotropy = Orthotropy{70000, 70000 / 2.66, 0.7};
  const RaiserFindings same = solved(sheet(law));
  expect_same(isotropic.largest.stress, same.largest.stress);
  expect_same(isotropic.smallest.stress, same.smallest.stress);
}

TEST(OrthotropicPlate, ThePeakLeavesTheEndOfTheDiameterAcross) {
  EXPECT_NEAR(std::abs(solved(sheet(carbon(0.0))).largest.angle), pi / 2, 1e-4);
  const RaiserFindings leaning = solved(sheet(carbon(pi / 6)));
  const double off = std::abs(std::abs(leaning.largest.angle) - pi / 2);
  EXPECT_GT(off, 0.2);
  EXPECT_LT(off, 0.6);
  // Loaded across its fibres the sheet has its peak where the fibres touch the edge, or near it.
  const RaiserFindings across = solved(sheet(carbon(pi / 2)));
  EXPECT_LT(across.largest.stress.value, 300.0);
}

TEST(OrthotropicPlate, MirrorsAreUsedOnlyAlongTheAxes) {
  const std::vector<Ask> asks{{Quantity::largest_edge_stress, 0, 1e-2, ""}};
  EXPECT_TRUE(settle(sheet(carbon(0.0)), asks).mirrors_used.x);
  EXPECT_TRUE(settle(sheet(carbon(pi / 2)), asks).mirrors_used.y);
  EXPECT_EQ(settle(sheet(carbon(0.1)), asks).mirrors_used, mesh::Mirrors{});
}

TEST(OrthotropicPlate, AnUnstableLawIsRefused) {
  HookeLaw law = carbon(0.0);
  law.poissons_ratio = 5.0;
  EXPECT_THROW(settle(sheet(law), {}), std::invalid_argument);
}

}  // namespace
}  // namespace raiser::solver
