// Held edges: patch tests, reactions, what supports can take up, and plates
// that are the same plate held otherwise.
#include "solver/elasticity/support.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

namespace rectangle = mesh::rectangle;
using mesh::HoleShape;

constexpr double pi = std::numbers::pi;
const HookeLaw steel{210000, 0.3, PlaneState::stress};

Plate strip() { return {100, 40, 5, {{"a", HoleShape::circle, 12, 12, 0, Point(0, 0), 0}}}; }

Support clamp(std::size_t edge) { return {"clamp", edge, 0.0, 0.0}; }
Support slide(std::size_t edge) { return {"slide", edge, 0.0, std::nullopt}; }

Load on_edge(std::size_t edge, double stress, double along = 0.0) {
  Load load;
  load.kind = Load::Kind::edge;
  load.edge = edge;
  load.stress = stress;
  load.along = along;
  load.name = "pull";
  return load;
}

std::vector<Ask> both(double tolerance = 1e-4) {
  return {{Quantity::largest_edge_stress, 0, tolerance, ""},
          {Quantity::smallest_edge_stress, 0, tolerance, ""}};
}

Solution solved(const Problem& problem, double tolerance = 1e-4) {
  Solution solution = settle(problem, both(tolerance));
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  EXPECT_LT(solution.checks.equilibrium_residual, 1e-9);
  EXPECT_LT(solution.checks.support_miss, 1e-8);
  return solution;
}

double largest(const Solution& solution) { return solution.combined.raisers[0].largest.stress.value; }

TEST(EdgeLine, RunsAnticlockwiseWithTheNormalOutward) {
  const auto top = straight_edge(strip(), rectangle::top);
  ASSERT_TRUE(top);
  EXPECT_LT((top->start - Point(50, 20)).norm(), 1e-12);
  EXPECT_LT((top->at(top->length) - Point(-50, 20)).norm(), 1e-12);
  EXPECT_LT((top->normal() - Point(0, 1)).norm(), 1e-12);
  EXPECT_FALSE(straight_edge(strip(), 4));
}

TEST(Supports, TakeUpWhatTheyHold) {
  const Plate plate = strip();
  EXPECT_EQ(takes_up(plate, {}, 50).size(), 0U);
  EXPECT_EQ(takes_up(plate, {clamp(rectangle::left)}, 50).size(), 3U);
  EXPECT_EQ(takes_up(plate, {slide(rectangle::left)}, 50).size(), 2U);  // a force along x and a moment
  EXPECT_EQ(takes_up(plate, {slide(rectangle::left), slide(rectangle::bottom)}, 50).size(), 3U);
  const Support rail{"rail", rectangle::left, std::nullopt, 0.0};
  EXPECT_EQ(takes_up(plate, {rail}, 50).size(), 1U);
}

TEST(Supports, FaultsNameEachOne) {
  const Plate plate = strip();
  EXPECT_TRUE(faults(plate, {clamp(rectangle::left), slide(rectangle::top)}).empty());
  const Support moved{"moved", rectangle::bottom, 0.0, 0.5};
  const std::vector<Support> bad{clamp(rectangle::left),
                                 clamp(rectangle::left),
                                 {"none", rectangle::top, {}, {}},
                                 {"far", 9, 0.0, 0.0},
                                 moved};
  const auto found = faults(plate, bad);
  ASSERT_EQ(found.size(), 4U);
  EXPECT_EQ(found[0].support, 1U);
  EXPECT_EQ(found[3].support, 4U);  // slides away from the corner that is clamped
  // The normal displacement of the bottom edge agrees with a left edge clamped at its place.
  EXPECT_TRUE(faults(plate, {{"l", rectangle::left, 0.0, 0.5}, {"b", rectangle::bottom, 0.5, 0.0}}).empty());
}

TEST(Supports, OnlyLoadsThatAreHeldNeedNotBalance) {
  const Plate plate = strip();
  const std::vector<Load> pull{on_edge(rectangle::right, 10)};
  const std::vector<Load> lift{on_edge(rectangle::right, 0, 10)};
  EXPECT_TRUE(imbalance(plate, pull));
  EXPECT_FALSE(imbalance(plate, pull, {slide(rectangle::left)}));
  EXPECT_FALSE(imbalance(plate, lift, {clamp(rectangle::left)}));
  const auto fault = imbalance(plate, lift, {slide(rectangle::left)});
  ASSERT_TRUE(fault);
  EXPECT_NEAR(fault->by.force.y(), 10 * 40 * 5, 1e-6);
  EXPECT_NEAR(fault->by.force.x(), 0.0, 1e-6);
  EXPECT_NEAR(fault->by.moment, 0.0, 1e-6);
  EXPECT_NE(fault->what.find("where the supports leave the plate free"), std::string::npos);
}

// A plate without a hole between sliding edges carries a uniform stress, to
// rounding at every degree, also when an edge is displaced.
TEST(HeldEdges, PatchOfUniformStressIsExact) {
  Plate plate{60, 40, 5, {}};
  const std::vector<Support> supports{
      slide(rectangle::left), slide(rectangle::bottom), {"moved", rectangle::right, 0.06, std::nullopt}};
  const std::vector<UnitLoad> loads = unit_loads(plate, {}, supports);
  ASSERT_EQ(loads.size(), 1U);
  ASSERT_TRUE(loads[0].displaces);
  const Model model(mesh::triangulate(mesh::trace(plate), {}), {}, steel, plate.thickness, loads,
                    held_edges(plate, supports));
  for (const int degree : {1, 2, 5}) {
    const Displacements u = model.solve(degree);
    const Field field(model, u);
    const auto value = field.at({11, -7});
    ASSERT_TRUE(value);
    EXPECT_NEAR(value->stress.xx, 210000 * 0.001, 1e-7) << degree;
    EXPECT_NEAR(value->stress.yy, 0.0, 1e-7);
    EXPECT_NEAR(value->stress.xy, 0.0, 1e-7);
    EXPECT_NEAR(value->displacement.x(), 0.001 * 41, 1e-12);
    const auto reactions = model.reactions(u);
    EXPECT_NEAR(reactions[0][0].force.x(), -210 * 40 * 5, 1e-4);
    EXPECT_NEAR(reactions[2][0].force.x(), 210 * 40 * 5, 1e-4);
    EXPECT_NEAR(reactions[1][0].force.norm(), 0.0, 1e-4);
    const Balance balance = model.balance(u);
    EXPECT_LT(balance.residual, 1e-11);
    EXPECT_NEAR(balance.strain_energy, balance.external_work, 1e-9 * balance.strain_energy);
    EXPECT_NEAR(balance.strain_energy, 0.5 * 210 * 0.001 * 60 * 40 * 5, 1e-6);
  }
}

// The same plate turned by an angle: its edges lie along no axis.
TEST(HeldEdges, PatchOfUniformStressIsExactOnSlantedEdges) {
  const double angle = 0.4;
  const Point e(std::cos(angle), std::sin(angle)), n(-e.y(), e.x());
  mesh::Outline outline;
  const std::vector<Point> corners{-30 * e - 20 * n, 30 * e - 20 * n, 30 * e + 20 * n, -30 * e + 20 * n};
  outline.edges = {"a", "b", "c", "d"};
  for (std::size_t k = 0; k < 4; ++k)
    outline.curves.push_back(mesh::line(corners[k], corners[(k + 1) % 4], {Owner::Kind::edge, k}));
  Plate plate{60 * e.x() + 40 * e.y(), 60 * e.y() + 40 * e.x(), 5, {}, outline};
  const std::vector<Support> supports{
      {"a", 0, 0.0, std::nullopt}, {"d", 3, 0.0, std::nullopt}, {"b", 1, 0.06, std::nullopt}};
  const Model model(mesh::triangulate(mesh::trace(plate), {}), {}, steel, plate.thickness,
                    unit_loads(plate, {}, supports), held_edges(plate, supports));
  for (const int degree : {1, 3}) {
    const Displacements u = model.solve(degree);
    const auto value = Field(model, u).at({3, 2});
    ASSERT_TRUE(value);
    EXPECT_NEAR(value->stress.xx, 210 * e.x() * e.x(), 1e-7);
    EXPECT_NEAR(value->stress.yy, 210 * e.y() * e.y(), 1e-7);
    EXPECT_NEAR(value->stress.xy, 210 * e.x() * e.y(), 1e-7);
    const auto reactions = model.reactions(u);
    EXPECT_LT((reactions[2][0].force - 210 * 200 * e).norm(), 1e-4);
    EXPECT_LT(model.balance(u).residual, 1e-11);
  }
}

// A cantilever without a hole under an end shear: its end moves by what
// Timoshenko's beam with shear gives, within what beam theory can promise.
TEST(HeldEdges, ClampedBeamBendsAsBeamsDo) {
  Plate plate{200, 10, 1, {}};
  const std::vector<Support> supports{clamp(rectangle::left)};
  const std::vector<Load> loads{on_edge(rectangle::right, 0, 1)};
  const Model model(mesh::triangulate(mesh::trace(plate), {}), {}, steel, 1,
                    unit_loads(plate, loads, supports), held_edges(plate, supports));
  const auto value = Field(model, model.solve(6)).at({100, 0});
  ASSERT_TRUE(value);
  const double inertia = 1000.0 / 12, shear = 210000 / 2.6;
  const double beam = 10 * 8e6 / (3 * 210000 * inertia) + 1.2 * 10 * 200 / (shear * 10);
  EXPECT_NEAR(value->displacement.y(), beam, 2e-3 * beam);
}

TEST(HeldEdges, AnEndHeldFromSlidingIsHalfAPlatePulledAtBothEnds) {
  Problem whole;
  whole.plate = {200,
                 40,
                 5,
                 {{"a", HoleShape::circle, 12, 12, 0, Point(50, 0), 0},
                  {"b", HoleShape::circle, 12, 12, 0, Point(-50, 0), 0}}};
  whole.material = steel;
  whole.loads = {on_edge(rectangle::right, 100), on_edge(rectangle::left, 100)};
  Problem half;
  half.plate = strip();
  half.material = steel;
  half.supports = {slide(rectangle::left)};
  half.loads = {on_edge(rectangle::right, 100)};
  const Solution a = solved(whole), b = solved(half);
  const Estimate& x = a.combined.raisers[0].largest.stress;
  const Estimate& y = b.combined.raisers[0].largest.stress;
  EXPECT_NEAR(x.value, y.value, x.bound + y.bound);
  EXPECT_TRUE(b.mirrors_used.y);
  EXPECT_FALSE(b.mirrors_used.x);
  ASSERT_EQ(b.reactions.size(), 1U);
  EXPECT_NEAR(b.reactions[0].reaction.force.x(), -100 * 40 * 5, 1e-5);
  EXPECT_NEAR(b.combined.raisers[0].gross.nominal, 100, 1e-6);
  EXPECT_NEAR(b.checks.far_applied, 100, 1e-6);
  EXPECT_NEAR(b.checks.far_recovered, 100, 1e-3);
}

TEST(HeldEdges, FarFromAClampTheHoleDoesNotFeelIt) {
  Problem clamped;
  clamped.plate = {300, 40, 5, {{"a", HoleShape::circle, 12, 12, 0, Point(60, 0), 0}}};
  clamped.material = steel;
  clamped.supports = {clamp(rectangle::left)};
  clamped.loads = {on_edge(rectangle::right, 100)};
  Problem loose = clamped;
  loose.supports.clear();
  loose.loads.push_back(on_edge(rectangle::left, 100));
  const double with = largest(solved(clamped)), without = largest(solved(loose));
  EXPECT_NEAR(with, without, 3e-4 * without);
}

TEST(HeldEdges, ReactionsCarryShearAndMoment) {
  Problem problem;
  problem.plate = strip();
  problem.material = steel;
  problem.supports = {clamp(rectangle::left)};
  problem.loads = {on_edge(rectangle::right, 0, 20)};
  const Solution solution = solved(problem);
  EXPECT_FALSE(solution.mirrors_used.x);
  EXPECT_TRUE(solution.mirrors_used.y);
  const Resultant& reaction = solution.reactions.at(0).reaction;
  EXPECT_NEAR(reaction.force.y(), -20 * 40 * 5, 1e-5);
  EXPECT_NEAR(reaction.moment, -50 * 20 * 40 * 5, 1e-3);  // about the plate's centre
  const Section& section = solution.combined.raisers[0].section;
  EXPECT_NEAR(section.shear_force, 20 * 40 * 5, 1e-4);
  EXPECT_NEAR(section.moment, -20 * 40 * 5 * 50, 1e-2);
}

TEST(HeldEdges, EachLoadIsOneByItselfWhereEverythingIsHeld) {
  Problem problem;
  problem.plate = strip();
  problem.material = steel;
  problem.supports = {clamp(rectangle::left)};
  problem.loads = {on_edge(rectangle::right, 50), on_edge(rectangle::right, 0, 20)};
  problem.loads[1].name = "lift";
  const Solution solution = solved(problem);
  ASSERT_EQ(solution.units.size(), 2U);
  EXPECT_EQ(solution.units[0].name, "pull");
  EXPECT_EQ(solution.units[1].loads, std::vector<std::size_t>{1});
  problem.loads.pop_back();
  EXPECT_NEAR(largest(solved(problem)), solution.units[0].raisers[0].largest.stress.value, 0.05);
}

TEST(HeldEdges, ADisplacedEndPullsLikeItsReaction) {
  Problem moved;
  moved.plate = strip();
  moved.material = steel;
  moved.supports = {slide(rectangle::left), {"jack", rectangle::right, 0.05, std::nullopt}};
  const Solution a = solved(moved);
  const double force = a.reactions.at(1).reaction.force.x();
  EXPECT_GT(force, 0.0);
  EXPECT_NEAR(a.combined.raisers[0].section.normal_force, force, 1e-4 * force);
  EXPECT_NEAR(a.checks.strain_energy, 0.5 * force * 0.05, 1e-6 * a.checks.strain_energy);
  EXPECT_NEAR(a.checks.strain_energy, a.checks.external_work, 1e-8 * a.checks.strain_energy);
}

TEST(HeldEdges, NoNominalStressBesideAHeldSide) {
  Problem problem;
  problem.plate = strip();
  problem.material = steel;
  problem.supports = {clamp(rectangle::bottom)};
  problem.loads = {on_edge(rectangle::right, 50)};
  const Solution solution = solved(problem);
  EXPECT_FALSE(solution.combined.raisers[0].gross.kt);
  EXPECT_NE(solution.combined.raisers[0].net.why.find("holds the plate along both sides"), std::string::npos);
}

}  // namespace
}  // namespace raiser::solver
