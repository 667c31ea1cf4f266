// Tractions that change along an edge or act on a part of it, and pins with a
// cosine pressure.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "mesh/plate/chain.hpp"
#include "solver/elasticity/outer_edge.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

namespace rectangle = mesh::rectangle;
using mesh::HoleShape;

constexpr double pi = std::numbers::pi;

Plate strip(double length = 200) {
  return {length, 50, 4, {{"a", HoleShape::circle, 10, 10, 0, Point(0, 0), 0}}};
}

Load on_edge(std::size_t edge, double stress, std::optional<double> stress_to = {},
             std::optional<double> from = {}, std::optional<double> to = {}) {
  Load load;
  load.kind = Load::Kind::edge;
  load.edge = edge;
  load.stress = stress;
  load.stress_to = stress_to;
  load.from = from;
  load.to = to;
  return load;
}

Load pin(std::size_t hole, double force, double direction) {
  Load load;
  load.kind = Load::Kind::pin;
  load.hole = hole;
  load.force = force;
  load.direction = direction;
  return load;
}

Solution solved(const Plate& plate, const std::vector<Load>& loads, double tolerance = 1e-4) {
  Problem problem{plate, {210000, 0.3, PlaneState::stress}, loads};
  std::vector<Ask> asks;
  for (std::size_t h = 0; h < plate.holes.size(); ++h)
    asks.push_back({Quantity::largest_edge_stress, h, tolerance, ""});
  Solution solution = settle(problem, asks);
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  return solution;
}

const Estimate& largest(const Solution& solution, std::size_t hole = 0) {
  return solution.combined.raisers.at(hole).largest.stress;
}

TEST(EdgeLoad, ResultantOfALinearPart) {
  // On the right edge (upward from y = -25), from 10 to 30 mm, 6 to 12 MPa: y from -15 to 5.
  const Resultant r = resultant(strip(), on_edge(rectangle::right, 6, 12, 10, 30));
  EXPECT_NEAR(r.force.x(), 4 * 20 * 9, 1e-9);
  EXPECT_NEAR(r.force.y(), 0, 1e-9);
  const double centroid = -15 + 20 * (6 + 2 * 12) / (3.0 * (6 + 12));
  EXPECT_NEAR(r.moment, -4 * 20 * 9 * centroid, 1e-8);
}

TEST(EdgeLoad, PartsThatAreNotOnTheEdgeAreRefused) {
  EXPECT_TRUE(imbalance(strip(), {on_edge(rectangle::right, 6, {}, 10, 60)}));
  EXPECT_TRUE(imbalance(strip(), {on_edge(rectangle::right, 6, {}, 30, 10)}));
  EXPECT_NE(imbalance(strip(), {on_edge(rectangle::right, 6, {}, 30, 10)})->what.find("must have a length"),
            std::string::npos);
}

TEST(EdgeLoad, LinearTractionsOnBothEndsAreTheBendingLoad) {
  Load bending;
  bending.kind = Load::Kind::bending;
  bending.stress = 80;
  const Solution a = solved(strip(), {bending});
  // The left edge runs downward: its far end is at y = -width / 2.
  const Solution b = solved(strip(), {on_edge(rectangle::right, -80, 80), on_edge(rectangle::left, 80, -80)});
  EXPECT_NEAR(largest(a).value, largest(b).value, largest(a).bound + largest(b).bound);
  EXPECT_TRUE(b.mirrors_used.x && b.mirrors_used.y);
  EXPECT_NEAR(b.combined.raisers[0].gross.nominal, 80, 1e-9);
}

TEST(EdgeLoad, TwoHalvesAreTheWhole) {
  const Solution a = solved(strip(), {on_edge(rectangle::right, 100), on_edge(rectangle::left, 100)});
  const Solution b = solved(strip(), {on_edge(rectangle::right, 100, {}, {}, 20),
                                      on_edge(rectangle::right, 100, {}, 20), on_edge(rectangle::left, 100)});
  EXPECT_NEAR(largest(a).value, largest(b).value, largest(a).bound + largest(b).bound);
}

// A uniform normal stress all round a closed edge balances, wherever its pieces meet.
TEST(EdgeLoad, AllRoundADiscIsTheSolutionOfLame) {
  for (const int pieces : {2, 3, 5, 8}) {
    std::vector<mesh::OutlinePoint> points;
    for (int k = 0; k < pieces; ++k) {
      const double t = 0.3 + 2 * std::numbers::pi * k / pieces;
      points.push_back({Point(17.123 + 31.7 * std::cos(t), 31.7 * std::sin(t)),
                        0,
                        "rim",
                        "",
                        {mesh::Piece::Kind::outwards, 31.7}});
    }
    const mesh::ChainResult chain = mesh::chain_outline(points);
    ASSERT_TRUE(chain.outline);
    mesh::Hole bore;
    bore.name = "bore";
    bore.length = bore.width = 12.0;
    Load pull;
    pull.kind = Load::Kind::edge;
    pull.edge = 0;
    pull.stress = 10;
    const Problem problem{{chain.length, chain.width, 2, {bore}, chain.outline}, {2e5, 0.3}, {pull}};
    ASSERT_FALSE(imbalance(problem.plate, problem.loads)) << pieces;
    const Solution solution = settle(problem, {{Quantity::largest_edge_stress, 0, 1e-4, ""}});
    const Estimate stress = solution.combined.raisers.front().largest.stress;
    const double expected = 2 * 10 * 31.7 * 31.7 / (31.7 * 31.7 - 6.0 * 6.0);
    EXPECT_NEAR(stress.value, expected, stress.bound + 1e-6) << pieces;
  }
}

TEST(EdgeLoad, FarAwayOnlyTheResultantOfAPartCounts) {
  const Plate plate = strip(400);
  const Solution a = solved(plate, {on_edge(rectangle::right, 100), on_edge(rectangle::left, 100)});
  const Solution b =
      solved(plate, {on_edge(rectangle::right, 250, {}, 15, 35), on_edge(rectangle::left, 250, {}, 15, 35)});
  EXPECT_NEAR(largest(a).value, largest(b).value, 1e-3 * largest(a).value);
  EXPECT_NEAR(b.combined.raisers[0].gross.nominal, 100, 1e-9);
  EXPECT_TRUE(b.mirrors_used.x && b.mirrors_used.y);
}

TEST(CosinePressure, CarriesItsForceAndNothingElse) {
  const BearingPressure p = cosine_pressure(1000, 0.7, 5, 4);
  EXPECT_NEAR(p.at(0.7), 2 * 1000 / (pi * 5 * 4), 1e-12);
  EXPECT_EQ(p.at(0.7 + 1.6), 0.0);
  EXPECT_EQ(p.at(0.7 + pi), 0.0);
  double along = 0, across = 0;
  constexpr int steps = 20000;
  for (int k = 0; k < steps; ++k) {
    const double t = 2 * pi * (k + 0.5) / steps;
    along += p.at(t) * std::cos(t - 0.7) * 5 * 4 * 2 * pi / steps;
    across += p.at(t) * std::sin(t - 0.7) * 5 * 4 * 2 * pi / steps;
  }
  EXPECT_NEAR(along, 1000, 1e-3);
  EXPECT_NEAR(across, 0, 1e-6);
}

TEST(Pin, BalancesAnEdgeAndCountsInSections) {
  const Plate plate = strip();
  const std::vector<Load> loads{pin(0, 20000, 0), on_edge(rectangle::left, 100)};
  EXPECT_FALSE(imbalance(plate, loads));
  EXPECT_TRUE(imbalance(plate, {pin(0, 20000, 0.1), on_edge(rectangle::left, 100)}));
  EXPECT_NEAR(section_forces(plate, loads, mesh::Direction::across, -50).normal, 20000, 1e-6);
  EXPECT_NEAR(section_forces(plate, loads, mesh::Direction::across, 0).normal, 20000, 1e-4);
  EXPECT_NEAR(section_forces(plate, loads, mesh::Direction::across, 50).normal, 0, 1e-6);
  const std::vector<UnitLoad> units = unit_loads(plate, loads);
  ASSERT_EQ(units.size(), 1U);
  EXPECT_EQ(units[0].name, "edges and pins");
  EXPECT_EQ(units[0].under_y, UnitLoad::Parity::even);
  EXPECT_EQ(units[0].under_x, UnitLoad::Parity::neither);
}

TEST(Pin, FaultsAreToldWithTheirFigures) {
  Plate plate = strip();
  plate.holes.push_back({"s", HoleShape::slot, 14, 6, 0, Point(40, 0), 0});
  EXPECT_NE(imbalance(plate, {pin(1, 5, 0)})->what.find("round hole"), std::string::npos);
  EXPECT_NE(imbalance(plate, {pin(0, -5, 0)})->what.find("-5 N"), std::string::npos);
  Load loose = pin(0, 5, 0);
  loose.clearance = 4.0;
  EXPECT_NE(imbalance(plate, {loose})->what.find("clearance of 4 mm"), std::string::npos);
}

// Record A28: W. D. Pilkey and D. F. Pilkey, Peterson's Stress Concentration Factors, 3rd ed. (2008),
// Chart 4.67, after Frocht and Hill (1940), from memory; with a cosine pressure finite elements gave these
// factors on the net section (published.json, c/H = 1, the far end pulled), good to 0.1 %.
TEST(Pin, CosinePressureInALugGivesTheFactorsOfTheRecord) {
  for (const auto& [ratio, factor] : {std::pair{0.2, 4.6856}, {0.3, 3.3379}, {0.4, 2.6834}, {0.5, 2.3172}}) {
    const double width = 40;
    const double d = ratio * width;
    const Plate plate{240, width, 2, {{"eye", HoleShape::circle, d, d, 0, Point(80, 0), 0}}};
    const Solution solution = solved(plate, {pin(0, 8000, 0), on_edge(rectangle::left, 100)});
    ASSERT_TRUE(solution.combined.raisers[0].net.kt);
    EXPECT_NEAR(solution.combined.raisers[0].net.kt->value, factor, 2e-3 * factor) << ratio;
  }
}

TEST(Pin, ARowOfBoltsSharesTheForce) {
  Plate plate{300, 60, 5, {}};
  for (int k = 0; k < 3; ++k)
    plate.holes.push_back(
        {"b" + std::to_string(k), HoleShape::circle, 12, 12, 0, Point(-40.0 + 40 * k, 0), 0});
  const std::vector<Load> loads{pin(0, 6000, 0), pin(1, 3000, 0), pin(2, 6000, 0),
                                on_edge(rectangle::left, 50)};
  const Solution solution = solved(plate, loads, 1e-3);
  EXPECT_NEAR(solution.combined.raisers[0].section.normal_force, 15000, 1e-3);
  EXPECT_NEAR(solution.combined.raisers[1].section.normal_force, 9000, 1e-3);
  EXPECT_NEAR(solution.combined.raisers[2].section.normal_force, 6000, 1e-3);
  EXPECT_LT(solution.checks.equilibrium_residual, 1e-10);
}

TEST(Pin, TurnedPlateTurnsTheAnswer) {
  const Plate along{160, 60, 4, {{"a", HoleShape::circle, 14, 14, 0, Point(30, 6), 0}}};
  const Plate across{60, 160, 4, {{"a", HoleShape::circle, 14, 14, 0, Point(-6, 30), 0}}};
  Load offset = on_edge(rectangle::left, 40);
  // The force on the line y = 6: 12 N M / (W^2 t) at the ends of the left edge.
  const double force = 40 * 60 * 4, outer = 6 * force * 6 / (60.0 * 60 * 4);
  offset.stress = 40 + outer;  // at the upper end, where the left edge begins
  offset.stress_to = 40 - outer;
  Load below = offset;
  below.edge = rectangle::bottom;
  std::swap(below.stress, *below.stress_to);
  below.stress = 40 + outer;
  below.stress_to = 40 - outer;
  const Solution a = solved(along, {pin(0, force, 0), offset});
  const Solution b = solved(across, {pin(0, force, pi / 2), below});
  EXPECT_NEAR(largest(a).value, largest(b).value, largest(a).bound + largest(b).bound);
}

}  // namespace
}  // namespace raiser::solver
