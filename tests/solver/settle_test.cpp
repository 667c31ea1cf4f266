// The loop that raises the degree and refines: tolerances, reasons, refusals,
// and the checks that every solution carries.
#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <string>

#include "mesh/plate/shoulder.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

using mesh::HoleShape;
using Kind = Load::Kind;

Load of(Kind kind, double stress) {
  Load load;
  load.kind = kind;
  load.name = std::string(word(kind));
  load.stress = stress;
  return load;
}

// Invented: the strip of a footbridge's hanger with a slot and a bolt hole.
Problem hanger() {
  return {{200,
           60,
           6,
           {{"slot", HoleShape::slot, 22, 9, 0, Point(-30, 4), 0.5},
            {"bolt", HoleShape::circle, 18, 18, 0, Point(25, -3), 0}}},
          {210000, 0.3, PlaneState::stress},
          {of(Kind::tension, 100), of(Kind::shear, 15)}};
}

std::vector<Ask> all_at(double tolerance, std::size_t holes) {
  std::vector<Ask> asks;
  for (std::size_t hole = 0; hole < holes; ++hole)
    for (const Quantity q :
         {Quantity::largest_edge_stress, Quantity::smallest_edge_stress, Quantity::von_mises})
      asks.push_back({q, hole, tolerance, ""});
  return asks;
}

double peak(const RaiserFindings& hole) {
  return std::max(std::abs(hole.largest.stress.value), std::abs(hole.smallest.stress.value));
}

void expect_met(const Solution& solution, double tolerance) {
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  EXPECT_TRUE(solution.reason.empty());
  for (const RaiserFindings& hole : solution.combined.raisers)
    for (const EdgeValue* value : {&hole.largest, &hole.smallest, &hole.von_mises}) {
      EXPECT_LE(value->stress.bound, tolerance * peak(hole));
      EXPECT_GT(value->stress.bound, 0.0);
    }
}

TEST(Settle, MeetsTolerancesOfThreeFiveAndEightDigits) {
  const Problem problem = hanger();
  const Solution best = settle(problem, all_at(1e-8, 2));
  expect_met(best, 1e-8);
  for (const double tolerance : {1e-3, 1e-5}) {
    const Solution rough = settle(problem, all_at(tolerance, 2));
    expect_met(rough, tolerance);
    EXPECT_LT(rough.unknowns, best.unknowns);
    for (std::size_t h = 0; h < 2; ++h) {
      const RaiserFindings& a = rough.combined.raisers[h];
      const RaiserFindings& b = best.combined.raisers[h];
      EXPECT_NEAR(a.largest.stress.value, b.largest.stress.value, a.largest.stress.bound);
      EXPECT_NEAR(a.smallest.stress.value, b.smallest.stress.value, a.smallest.stress.bound);
      EXPECT_NEAR(a.von_mises.stress.value, b.von_mises.stress.value, a.von_mises.stress.bound);
    }
  }
}

TEST(Settle, AsksOnlyWhatIsAsked) {
  const Problem problem = hanger();
  const Solution bolt = settle(problem, {{Quantity::largest_edge_stress, 1, 1e-6, ""}});
  EXPECT_EQ(bolt.status, Solution::Status::settled);
  const RaiserFindings& hole = bolt.combined.raisers[1];
  EXPECT_LE(hole.largest.stress.bound, 1e-6 * peak(hole));
}

// A little less than rounding allows, so that the bound comes close to it.
TEST(Settle, SaysWhyAToleranceIsNotMet) {
  const Problem problem{{200, 60, 6, {{"bolt", HoleShape::circle, 18, 18, 0, Point(0, 0), 0}}},
                        {210000, 0.3, PlaneState::stress},
                        {of(Kind::tension, 100)}};
  const Solution solution = settle(problem, all_at(1e-12, 1));
  EXPECT_EQ(solution.status, Solution::Status::not_met);
  EXPECT_NE(solution.reason.find("3 of 3 asked numbers"), std::string::npos) << solution.reason;
  EXPECT_NE(solution.reason.find("bolt"), std::string::npos) << solution.reason;
  // The numbers are there all the same, with honest bounds.
  const Estimate largest = solution.combined.raisers[0].largest.stress;
  EXPECT_GT(largest.bound, 1e-12 * largest.value);
  EXPECT_LT(largest.bound, 1e-8 * largest.value);
}

TEST(Settle, KeepsTheSequenceThatTheBoundsStandOn) {
  const Solution solution = settle(hanger(), all_at(1e-4, 2));
  ASSERT_GE(solution.levels.size(), 3u);
  for (std::size_t k = 1; k < solution.levels.size(); ++k) {
    const Level& before = solution.levels[k - 1];
    const Level& here = solution.levels[k];
    if (here.refinement == before.refinement) {
      EXPECT_EQ(here.degree, before.degree + 1);
      EXPECT_EQ(here.triangles, before.triangles);
      EXPECT_GT(here.unknowns, before.unknowns);
    } else {
      EXPECT_EQ(here.refinement, before.refinement + 1);
    }
    EXPECT_GE(here.seconds, before.seconds);
  }
  const Level& last = solution.levels.back();
  EXPECT_EQ(last.degree, solution.degree);
  EXPECT_EQ(last.unknowns, solution.unknowns);
  EXPECT_EQ(last.triangles, solution.triangles);
  EXPECT_LE(last.worst, 1.0);
  const auto& holes = solution.combined.raisers;
  EXPECT_DOUBLE_EQ(last.peak, std::max(peak(holes[0]), peak(holes[1])));
}

std::string refusal(const Problem& problem, const std::vector<Ask>& asks) {
  try {
    settle(problem, asks);
  } catch (const std::invalid_argument& error) {
    return error.what();
  }
  return "accepted";
}

TEST(Settle, RefusesWhatIsNotLegalInWords) {
  const auto says = [](const std::string& message, const char* words) {
    return message.find(words) != std::string::npos ? testing::AssertionSuccess()
                                                    : testing::AssertionFailure() << message;
  };
  const std::vector<Ask> asks = all_at(1e-3, 2);
  EXPECT_EQ(refusal(hanger(), {}), "accepted");
  Problem outside = hanger();
  outside.plate.holes[1].centre.y() = -25;
  EXPECT_TRUE(says(refusal(outside, asks), "bottom edge"));
  Problem bare = hanger();
  bare.loads.clear();
  EXPECT_TRUE(says(refusal(bare, asks), "no load"));
  Problem pulled = hanger();
  Load pull = of(Kind::edge, 10);
  pull.edge = mesh::rectangle::right;
  pulled.loads.push_back(pull);
  EXPECT_TRUE(says(refusal(pulled, asks), "balance"));
  const double nan = std::numeric_limits<double>::quiet_NaN();
  Problem endless = hanger();
  endless.loads[0].stress = nan;
  EXPECT_NE(refusal(endless, asks), "accepted");
  EXPECT_TRUE(says(refusal(hanger(), {{Quantity::von_mises, 2, 1e-3, ""}}), "names no raiser"));
  for (const double tolerance : {0.0, -1e-3, nan})
    EXPECT_TRUE(says(refusal(hanger(), {{Quantity::von_mises, 0, tolerance, ""}}), "no tolerance"));
}

// Energy is half the work of the loads, nothing holds the plate, and the stress
// far from the holes is what the loads make.
TEST(Settle, ChecksItsOwnEquilibrium) {
  const Problem problem = hanger();
  const Solution solution = settle(problem, all_at(1e-5, 2));
  const PlateChecks& checks = solution.checks;
  EXPECT_LT(checks.equilibrium_residual, 1e-10);
  EXPECT_LT(checks.reaction, 1e-9);
  EXPECT_NEAR(checks.strain_energy / checks.external_work, 1.0, 1e-10);
  EXPECT_DOUBLE_EQ(checks.far_applied, 100.0);
  EXPECT_NEAR(checks.far_recovered, checks.far_applied, 1e-4 * checks.far_applied);
  EXPECT_LT(checks.far_scatter, 0.05);
  EXPECT_GT(std::abs(checks.far_station), 50.0);
  // More energy than the plate without holes, less than twice as much.
  const double volume = 200.0 * 60 * 6;
  const double solid = volume * (100.0 * 100 / 2 + 15.0 * 15 * (1 + 0.3)) / 210000;
  EXPECT_GT(checks.strain_energy, solid * 0.95);
  EXPECT_LT(checks.strain_energy, solid * 1.5);
}

TEST(Settle, EnergyOfAPlateWithoutHolesIsThatOfUniformStress) {
  const Problem problem{{80, 50, 4, {}},
                        {70000, 0.25, PlaneState::stress},
                        {of(Kind::tension, 60), of(Kind::transverse, -20), of(Kind::shear, 30)}};
  const Solution solution = settle(problem, {});
  const double density = (60.0 * 60 + 20.0 * 20 + 2 * 0.25 * 60 * 20 + 2 * 1.25 * 30 * 30) / (2 * 70000);
  EXPECT_NEAR(solution.checks.strain_energy / (density * 80 * 50 * 4), 1.0, 1e-10);
  EXPECT_NEAR(solution.checks.external_work / (density * 80 * 50 * 4), 1.0, 1e-10);
}

// Every force on the material on one side of a section is carried through it.
TEST(Settle, StressOnASectionThroughTheHolesBalancesTheLoad) {
  const Problem problem = hanger();
  const Solution solution = settle(problem, all_at(1e-6, 2));
  for (const double station : {25.0, 0.0}) {
    Point force = Point::Zero();  // normal and shear, per thickness
    for (const mesh::Interval& piece :
         mesh::material_along(problem.plate, mesh::Direction::across, station)) {
      constexpr int n = 400;
      for (int i = 0; i < n; ++i) {
        // Midpoints crowded towards both ends, where the stress is steep.
        const double a = M_PI * (i + 0.5) / n;
        const double y = (piece.begin + piece.end) / 2 - (piece.end - piece.begin) / 2 * std::cos(a);
        const double weight = (piece.end - piece.begin) / 2 * std::sin(a) * M_PI / n;
        const auto value = solution.field.at(Point(station, y));
        ASSERT_TRUE(value.has_value()) << station << ' ' << y;
        force += weight * Point(value->stress.xx, value->stress.xy);
      }
    }
    EXPECT_NEAR(force.x(), 100.0 * 60, 1e-4 * 6000) << station;
    EXPECT_NEAR(force.y(), 15.0 * 60, 1e-4 * 6000) << station;
  }
}

TEST(Settle, SaysWhatTheOuterEdgeCarriesBesideAHoleNearAnEnd) {
  Problem problem = hanger();
  problem.plate.holes = {{"bolt", HoleShape::circle, 18, 18, 0, Point(90, 0), 0}};
  problem.loads = {of(Kind::tension, 100)};
  const Solution solution = settle(problem, all_at(1e-3, 1));
  const PlateChecks& checks = solution.checks;
  EXPECT_GT(checks.outer_von_mises, solution.combined.raisers[0].von_mises.stress.value);
  EXPECT_NEAR(checks.outer_point.x(), 100.0, 1e-9);
  const auto there = solution.field.at(checks.outer_point - Point(1e-9, 0));
  ASSERT_TRUE(there);
  EXPECT_NEAR(von_mises(there->stress), checks.outer_von_mises, 0.01 * checks.outer_von_mises);
  problem.plate.holes[0].centre.x() = 0.0;
  const Solution middle = settle(problem, all_at(1e-3, 1));
  EXPECT_LT(middle.checks.outer_von_mises, middle.combined.raisers[0].von_mises.stress.value);
  EXPECT_GT(middle.checks.outer_von_mises, 100.0);
}

// A pressurised hole, and far from it a slender fillet that carries 1e-9 of its
// peak: 1e-7 of that is below what double precision can tell on sides that short.
// No finer mesh can be made in the end, and what is found by then is rounding, with
// a bound that says so.
TEST(Settle, KeepsWhatWasFoundWhereNoFinerMeshCanBeMade) {
  const auto settled = [](double tolerance) {
    mesh::Shoulder shoulder;
    shoulder.name = "step";
    shoulder.at = 91;
    shoulder.width = 15.3;
    shoulder.fillet.shape = mesh::FilletShape::ellipse;
    shoulder.fillet.along = 27.7;
    shoulder.fillet.across = 1.1;
    mesh::Plate plate{300, 49, 1, {{"bore", HoleShape::circle, 11.5, 11.5, 0, Point(-144, 0), 0}}};
    plate.outline = mesh::stepped_bar(plate.length, plate.width, {shoulder}).outline;
    std::vector<Ask> asks;
    for (const std::size_t fillet : {1, 2})
      asks.push_back({Quantity::smallest_edge_stress, fillet, tolerance, ""});
    return settle({plate, {200000, 0.3, PlaneState::stress}, {of(Kind::pressure, 30)}}, asks);
  };
  const Solution coarse = settled(1e-3), fine = settled(1e-7);
  EXPECT_EQ(coarse.status, Solution::Status::settled) << coarse.reason;
  EXPECT_EQ(fine.status, Solution::Status::not_met);
  EXPECT_NE(fine.reason.find("no finer mesh could be made"), std::string::npos) << fine.reason;
  for (std::size_t r = 0; r < 3; ++r) {
    const Estimate a = coarse.combined.raisers.at(r).smallest.stress;
    const Estimate b = fine.combined.raisers.at(r).smallest.stress;
    EXPECT_NEAR(a.value, b.value, a.bound + b.bound) << r;
  }
}

}  // namespace
}  // namespace raiser::solver
