// Rigid round pins in contact with their holes: limits, scaling, equilibrium, an
// independent unilateral solution, and independence of mesh, mirrors and axes.
#include "solver/contact/contact.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/linear/threads.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

namespace rectangle = mesh::rectangle;
using mesh::HoleShape;

constexpr double pi = std::numbers::pi;
constexpr double modulus = 210000;
const HookeLaw steel{modulus, 0.3, PlaneState::stress};
// As the program does: small products gain nothing by threads.
[[maybe_unused]] const bool has_one_thread = (use_one_thread(), true);

Plate strip(double diameter = 20) {
  return {240, 60, 6, {{"a", HoleShape::circle, diameter, diameter, 0, Point(0, 0), 0}}};
}

/// What holds a pin's force (N/mm of thickness) at the left end of the strip, and
/// a tension that passes the pin by.
Traction balance(double force, double bypass) {
  return [=](const Owner& owner, const Point&, const Point& n) -> Point {
    const double stress = owner == Owner{Owner::Kind::edge, rectangle::left}    ? force / 60 + bypass
                          : owner == Owner{Owner::Kind::edge, rectangle::right} ? bypass
                                                                                : 0.0;
    return stress * n;
  };
}

Pin pin_in_the_middle(double force, double gap) {
  return {{Owner::Kind::raiser, 0}, Point::Zero(), 10.0, gap, Point(force, 0)};
}

/// A pin in the middle pulled to the right, the left end holding it. Force per
/// thickness, N/mm; gap on the radius; stress that passes by, MPa.
Contact found(double force, double gap, double tolerance = 1e-4, mesh::Mirrors mirrors = {false, true},
              double bypass = 0.0) {
  Contact contact = find_contact(strip(), steel, balance(force, bypass), mirrors, {},
                                 {pin_in_the_middle(force, gap)}, tolerance);
  EXPECT_TRUE(contact.settled) << contact.reason;
  return contact;
}

/// The pressures of the same pin found at places that are let go and taken up
/// again: no arc, no ends, other functions, another mesh.
PinSystem::Start unilateral(double force, double gap, double bypass) {
  const UnitLoad other{"other", balance(force, bypass), UnitLoad::Parity::even, UnitLoad::Parity::even};
  mesh::SizeRule rule;
  rule.turn = 0.08;
  const Model model(mesh::triangulate(mesh::trace(strip()), rule), {}, steel, 6, {other});
  Room room;
  const auto start = PinSystem(model, 4, {pin_in_the_middle(force, gap)}, room).unilateral(192);
  EXPECT_TRUE(start.settled);
  return start;
}

double arc(const Contact& contact) {
  return contact.pins.at(0).arcs.at(0).end.value - contact.pins.at(0).arcs.at(0).begin.value;
}

TEST(Contact, OfANeatFitHasAnArcThatNoLoadChanges) {
  const Contact a = found(1000, 0), b = found(10000, 0);
  EXPECT_NEAR(arc(a), arc(b), 1e-6);
  EXPECT_NEAR(b.pins[0].arcs[0].largest.value / a.pins[0].arcs[0].largest.value, 10, 1e-5);
  // In a plate this wide the arc is a little less than the half that a cosine pressure takes.
  EXPECT_GT(arc(a) / pi, 0.90);
  EXPECT_LT(arc(a) / pi, 1.00);
}

TEST(Contact, ArcGrowsWithTheLoadForClearanceAndShrinksForInterference) {
  EXPECT_LT(arc(found(2000, 0.02)), arc(found(5000, 0.02)));
  EXPECT_LT(arc(found(5000, 0.02)), arc(found(5000, 0.0)));
  EXPECT_GT(arc(found(5000, -0.01)), arc(found(10000, -0.01)));
  EXPECT_GT(arc(found(10000, -0.01)), arc(found(10000, 0.0)));
  EXPECT_TRUE(found(1000, -0.01).pins[0].arcs[0].all_round);
  EXPECT_FALSE(found(5000, -0.01).pins[0].arcs[0].all_round);
}

// Linear elasticity: twice the force on twice the interference is the same contact, twice as hard.
TEST(Contact, ForceAndInterferenceScaleTogether) {
  const Contact a = found(5000, -0.005), b = found(10000, -0.01);
  EXPECT_NEAR(arc(a), arc(b), 1e-6);
  EXPECT_NEAR(b.pins[0].arcs[0].largest.value / a.pins[0].arcs[0].largest.value, 2, 1e-5);
}

// H. Hertz (1882), a cylinder in a cylindrical hole, in the form of K. L. Johnson, Contact Mechanics (1985),
// section 4.2(c): half width b = sqrt(4 F R / (pi E)), 1 / R = 1 / r_pin - 1 / r_hole, largest pressure
// 2 F / (pi b); a rigid pin, plane stress. Both surfaces count as planes there, which is wrong by a share in
// proportion to b / r_hole (0.4 % at the larger of these forces): two forces tell the limit.
TEST(Contact, TendsToHertzForSmallArcs) {
  const double gap = 0.5, radius = 10;
  const double relative = radius * (radius - gap) / gap;
  const auto off = [&](double force) {
    const double half = std::sqrt(4 * force * relative / (pi * modulus));
    const Contact contact = found(force, gap, 1e-5);
    return std::pair{arc(contact) / 2 * radius / half - 1,
                     contact.pins[0].arcs[0].largest.value / (2 * force / (pi * half)) - 1};
  };
  const auto [width_at_60, pressure_at_60] = off(60);
  const auto [width_at_15, pressure_at_15] = off(15);  // an arc half as wide
  EXPECT_NEAR(width_at_60, 2 * width_at_15, 0.02 * std::abs(width_at_60));
  EXPECT_NEAR(2 * width_at_15 - width_at_60, 0.0, 2e-4);
  EXPECT_NEAR(2 * pressure_at_15 - pressure_at_60, 0.0, 2e-4);
}

// G. Lame (1852): a rigid disc pressed into a wide plate, p = E |gap| / ((1 + nu) a).
TEST(Contact, PressFitAloneIsLames) {
  const Plate plate{400, 400, 6, {{"a", HoleShape::circle, 20, 20, 0, Point(0, 0), 0}}};
  const Traction none = [](const Owner&, const Point&, const Point&) -> Point { return Point::Zero(); };
  const Pin pin{{Owner::Kind::raiser, 0}, Point::Zero(), 10.0, -0.01, Point(0, 0)};
  const Contact contact = find_contact(plate, steel, none, {true, true}, {}, {pin}, 1e-5);
  ASSERT_TRUE(contact.settled) << contact.reason;
  EXPECT_TRUE(contact.pins[0].arcs[0].all_round);
  const double wide = modulus * 0.01 / (1.3 * 10);
  EXPECT_NEAR(contact.pins[0].arcs[0].largest.value, wide, 0.006 * wide);
}

TEST(Contact, IsTheSameWithoutTheMirrorLine) {
  const Contact half = found(5000, 0.02), whole = found(5000, 0.02, 1e-4, {});
  for (const auto& [a, b] : {std::pair{half.pins[0].arcs[0].begin, whole.pins[0].arcs[0].begin},
                             {half.pins[0].arcs[0].end, whole.pins[0].arcs[0].end},
                             {half.pins[0].arcs[0].largest, whole.pins[0].arcs[0].largest}})
    EXPECT_NEAR(a.value, b.value, a.bound + b.bound);
}

TEST(Contact, BoundsHoldAgainstAFinerSolution) {
  for (const double gap : {0.0, 0.05, -0.008}) {
    const ContactArc coarse = found(5000, gap, 3e-3).pins.at(0).arcs.at(0);
    const ContactArc fine = found(5000, gap, 1e-6).pins.at(0).arcs.at(0);
    EXPECT_NEAR(coarse.begin.value, fine.begin.value, coarse.begin.bound) << gap;
    EXPECT_NEAR(coarse.largest.value, fine.largest.value, coarse.largest.bound) << gap;
  }
}

TEST(Contact, AgreesWithAUnilateralSolution) {
  struct Fit {
    double force, gap, bypass;
    std::size_t arcs;
  };
  // The last ones: two arcs where the tension draws the hole long, nearly all round with interference.
  for (const Fit& fit : {Fit{5000, 0.0, 0, 1},
                         {5000, 0.03, 0, 1},
                         {5000, -0.006, 0, 1},
                         {1000, 0.0, 150, 2},
                         {5000, -0.0145, 0, 1}}) {
    const PinSystem::Start start = unilateral(fit.force, fit.gap, fit.bypass);
    const PinContact contact = found(fit.force, fit.gap, 1e-4, {false, true}, fit.bypass).pins.at(0);
    ASSERT_EQ(contact.arcs.size(), fit.arcs) << fit.gap;
    double largest = 0.0;
    for (const ContactArc& arc : contact.arcs) largest = std::max(largest, arc.largest.value);
    for (std::size_t k = 0; k < start.angles[0].size(); ++k) {
      const double angle = start.angles[0][k];
      double pressure = 0.0;
      bool is_beside_an_end = false;  // where a polygon cannot follow a root
      for (const ContactArc& arc : contact.arcs) {
        const double from_begin = unwound(angle, arc.begin.value) - arc.begin.value;
        const double inside = std::min(from_begin, arc.end.value - arc.begin.value - from_begin);
        is_beside_an_end = is_beside_an_end || (inside > 0 && inside < 0.15);
        pressure += arc.pressure.at(angle);
      }
      if (!is_beside_an_end) {
        EXPECT_NEAR(start.pressure[0][k], pressure, 0.012 * largest) << fit.gap << ", " << angle;
      }
    }
  }
}

// The tension that passes by draws the hole long: the pin, pulled along, leaves
// the front and touches above and below it, alike on both sides.
TEST(Contact, OnTwoArcsIsTheSameWithoutTheMirrorLine) {
  const PinContact half = found(1000, 0.0, 1e-4, {false, true}, 150).pins.at(0);
  const PinContact whole = found(1000, 0.0, 1e-4, {false, false}, 150).pins.at(0);
  ASSERT_EQ(half.arcs.size(), 2U);
  ASSERT_EQ(whole.arcs.size(), 2U);
  EXPECT_NEAR(half.arcs[0].begin.value, -half.arcs[1].end.value, 1e-12);
  EXPECT_NEAR(half.arcs[0].largest_at, -half.arcs[1].largest_at, 1e-9);
  for (const ContactArc& a : half.arcs) {
    const ContactArc& b = *std::find_if(whole.arcs.begin(), whole.arcs.end(), [&](const ContactArc& arc) {
      return std::abs(std::remainder(arc.largest_at - a.largest_at, 2 * pi)) < 0.3;
    });
    EXPECT_NEAR(std::remainder(a.begin.value - b.begin.value, 2 * pi), 0, a.begin.bound + b.begin.bound);
    EXPECT_NEAR(std::remainder(a.end.value - b.end.value, 2 * pi), 0, a.end.bound + b.end.bound);
    EXPECT_NEAR(a.largest.value, b.largest.value, a.largest.bound + b.largest.bound);
  }
}

// A press fit without force in a plate that only a vertical line mirrors.
TEST(Contact, WithoutForceFollowsTheMirrorLineThereIs) {
  const Plate plate{120, 80, 5, {{"a", HoleShape::circle, 20, 20, 0, Point(0, 22), 0}}};
  const Pin pin{{Owner::Kind::raiser, 0}, Point(0, 22), 10.0, -0.01, Point::Zero()};
  const Traction none = [](const Owner&, const Point&, const Point&) -> Point { return Point::Zero(); };
  const Contact half = find_contact(plate, steel, none, {true, false}, {}, {pin}, 1e-4);
  const Contact whole = find_contact(plate, steel, none, {false, false}, {}, {pin}, 1e-4);
  ASSERT_TRUE(half.settled) << half.reason;
  ASSERT_TRUE(whole.settled) << whole.reason;
  for (double angle = 0; angle < 2 * pi; angle += 0.3)
    EXPECT_NEAR(half.pins[0].arcs[0].pressure.at(angle), whole.pins[0].arcs[0].pressure.at(angle),
                2e-4 * whole.pins[0].arcs[0].largest.value)
        << angle;
}

TEST(Contact, PressureVanishesAtTheEndsAndNowhereBetween) {
  const BearingPressure p = found(5000, 0.02).pins.at(0).arcs.at(0).pressure;
  EXPECT_EQ(p.form, BearingPressure::Form::arc);
  EXPECT_NEAR(p.at(p.begin + 1e-12), 0.0, 1e-3);
  for (int k = 1; k < 100; ++k) EXPECT_GT(p.at(p.begin + k * (p.end - p.begin) / 100), 0.0) << k;
}

Load pin_load(double force, double direction, std::optional<double> clearance) {
  Load load;
  load.kind = Load::Kind::pin;
  load.name = "pin";
  load.force = force;
  load.direction = direction;
  load.clearance = clearance;
  return load;
}

Load end(std::size_t edge, double stress) {
  Load load;
  load.kind = Load::Kind::edge;
  load.name = "end";
  load.edge = edge;
  load.stress = stress;
  return load;
}

Problem lug(std::optional<double> clearance) {
  Problem problem{{120, 40, 8, {{"eye", HoleShape::circle, 16, 16, 0, Point(35, 0), 0}}}, steel, {}};
  problem.loads = {pin_load(32000, 0, clearance), end(rectangle::left, 100)};
  return problem;
}

Solution settled(const Problem& problem, double tolerance = 1e-3) {
  std::vector<Ask> asks;
  for (std::size_t h = 0; h < problem.plate.holes.size(); ++h)
    asks.push_back({Quantity::largest_edge_stress, h, tolerance, ""});
  Solution solution = settle(problem, asks);
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  return solution;
}

/// What a pin in the eye of a lug presses on the half of its edge to the right, N.
double force_beyond(const PinFindings& pin) {
  constexpr int panels = 20000;
  double sum = 0;
  for (int k = 0; k < panels; ++k) {
    const double angle = -pi / 2 + pi * (k + 0.5) / panels;
    sum += pin.arcs.at(0).pressure.at(angle) * std::cos(angle) * pi / panels;
  }
  return sum * 8 * 8;  // radius, thickness
}

TEST(PinInContact, IsSettledWithItsForceCarried) {
  for (const double clearance : {0.0, 0.1, -0.02}) {
    const Solution solution = settled(lug(clearance));
    ASSERT_EQ(solution.pins.size(), 1U);
    EXPECT_LT(solution.pins[0].force_miss, 1e-8) << clearance;
    EXPECT_TRUE(solution.mirrors_used.y);
    // The section through the eye's centre carries what presses beyond it: with interference more
    // than the pin's force, since the pin presses the other way, too.
    EXPECT_NEAR(solution.combined.raisers[0].section.normal_force, force_beyond(solution.pins[0]), 20);
    const Estimate coarse = solution.combined.raisers[0].largest.stress;
    const Estimate fine = settled(lug(clearance), 2e-5).combined.raisers[0].largest.stress;
    EXPECT_NEAR(coarse.value, fine.value, coarse.bound);
    EXPECT_EQ(solution.units.size(), 1U);  // what is not known of the pressure is no load
  }
}

TEST(PinInContact, ClearanceRaisesThePeakOfALug) {
  const auto peak = [](const Problem& problem) {
    return settled(problem).combined.raisers[0].largest.stress.value;
  };
  EXPECT_LT(peak(lug(0.0)), peak(lug(0.1)));
  EXPECT_LT(peak(lug(0.1)), peak(lug(0.4)));
}

// By a support instead of a load at the other end: the same plate.
TEST(PinInContact, MayPullAtASupport) {
  Problem held = lug(0.05);
  held.loads.pop_back();
  held.supports = {{"wall", rectangle::left, 0.0, 0.0}};
  const Solution a = settled(held), b = settled(lug(0.05));
  EXPECT_NEAR(a.combined.raisers[0].largest.stress.value, b.combined.raisers[0].largest.stress.value,
              0.01 * b.combined.raisers[0].largest.stress.value);
  EXPECT_NEAR(a.reactions.at(0).reaction.force.x(), -32000, 1e-2);
  EXPECT_LT(a.checks.support_miss, 1e-6);
}

TEST(PinInContact, TurnedPlateTurnsTheAnswer) {
  Problem along = lug(0.05);
  Problem across{{40, 120, 8, {{"eye", HoleShape::circle, 16, 16, 0, Point(0, 35), 0}}}, steel, {}};
  across.loads = {pin_load(32000, pi / 2, 0.05), end(rectangle::bottom, 100)};
  const Solution a = settled(along), b = settled(across);
  EXPECT_TRUE(b.mirrors_used.x);
  EXPECT_NEAR(a.combined.raisers[0].largest.stress.value, b.combined.raisers[0].largest.stress.value,
              a.combined.raisers[0].largest.stress.bound + b.combined.raisers[0].largest.stress.bound);
  EXPECT_NEAR(a.pins[0].arcs[0].begin.value + pi / 2, b.pins[0].arcs[0].begin.value, 1e-3);
}

TEST(PinInContact, TwoPinsAndABypassAreFoundTogether) {
  Problem problem{{200,
                   50,
                   5,
                   {{"a", HoleShape::circle, 12, 12, 0, Point(-20, 3), 0},
                    {"b", HoleShape::circle, 12, 12, 0, Point(25, -3), 0}}},
                  steel,
                  {}};
  problem.supports = {{"wall", rectangle::left, 0.0, 0.0}};
  problem.loads = {pin_load(8000, 0.2, 0.04), pin_load(6000, -0.1, 0.02), end(rectangle::right, 30)};
  problem.loads[1].hole = 1;
  const Solution solution = settled(problem);
  ASSERT_EQ(solution.pins.size(), 2U);
  for (const PinFindings& pin : solution.pins) EXPECT_LT(pin.force_miss, 1e-8);
  EXPECT_LT(solution.checks.support_miss, 1e-6);
}

}  // namespace
}  // namespace raiser::solver
