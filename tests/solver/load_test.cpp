#include "solver/elasticity/load.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <numbers>
#include <random>

namespace raiser::solver {
namespace {

namespace rectangle = mesh::rectangle;
using mesh::Curve;
using mesh::Hole;
using mesh::HoleShape;
using Kind = Load::Kind;
using Parity = UnitLoad::Parity;

Plate plate_with_holes() {
  return {120.0,
          50.0,
          4.0,
          {{"a", HoleShape::circle, 10, 10, 0, Point(0, 0), 0},
           {"b", HoleShape::slot, 14, 6, 0, Point(-30, 8), 0.4},
           {"c", HoleShape::ellipse, 8, 5, 0, Point(0, -15), 0},
           {"d", HoleShape::rounded_rectangle, 9, 7, 1.5, Point(35, 0), 0.3}}};
}

Load of(Kind kind, double stress) {
  Load load;
  load.kind = kind;
  load.stress = stress;
  return load;
}

Load on_edge(std::size_t edge, double stress, double along) {
  Load load = of(Kind::edge, stress);
  load.edge = edge;
  load.along = along;
  return load;
}

Load pressure(double stress, std::size_t hole) {
  Load load = of(Kind::pressure, stress);
  load.hole = hole;
  return load;
}

// Uniform stress (xx, yy, xy) written as four edge loads.
std::vector<Load> uniform(double xx, double yy, double xy) {
  return {on_edge(rectangle::right, xx, xy), on_edge(rectangle::top, yy, -xy),
          on_edge(rectangle::left, xx, xy), on_edge(rectangle::bottom, yy, -xy)};
}

// Resultant of a traction over the whole traced boundary, by the midpoint rule
// on each curve: independent of any formula in the library.
Resultant integrate(const Plate& plate, const Traction& traction) {
  Resultant sum;
  for (const auto& loop : mesh::trace(plate).loops)
    for (const Curve& curve : loop) {
      constexpr int n = 2000;
      const double step = (curve.end - curve.begin) / n;
      for (int i = 0; i < n; ++i) {
        const double t = curve.begin + (i + 0.5) * step;
        const Point x = curve.at(t);
        const Point tangent = curve.derivative(t) * step;  // material on the left: outward is to the right
        const Point normal = Point(tangent.y(), -tangent.x()).normalized();
        const Point force = traction(curve.owner, x, normal) * tangent.norm() * plate.thickness;
        sum.force += force;
        sum.moment += x.x() * force.y() - x.y() * force.x();
      }
    }
  return sum;
}

TEST(UnitLoads, BalanceOverTheTracedBoundary) {
  const Plate plate = plate_with_holes();
  std::vector<Load> loads = {of(Kind::tension, 100), of(Kind::transverse, -40), of(Kind::shear, 30),
                             of(Kind::bending, 70),  pressure(20, 1),           pressure(15, 3)};
  for (const Load& load : uniform(12, -7, 9)) loads.push_back(load);
  const auto units = unit_loads(plate, loads);
  ASSERT_EQ(units.size(), 7u);
  EXPECT_EQ(units.back().name, "edges");
  EXPECT_EQ(units.front().name, "tension");
  for (const UnitLoad& unit : units) {
    const Resultant left = integrate(plate, unit.traction);
    EXPECT_LT(left.force.norm(), 1e-4) << unit.name;
    EXPECT_LT(std::abs(left.moment), 1e-3) << unit.name;
  }
}

TEST(UnitLoads, CarryTheStressTheyName) {
  const Plate plate = plate_with_holes();
  const Point right = Point::UnitX();
  const Point top = Point::UnitY();
  const auto units = unit_loads(plate, {of(Kind::tension, 100), of(Kind::transverse, 40), of(Kind::shear, 30),
                                        of(Kind::bending, 70), pressure(20, 1)});
  const Owner r{Owner::Kind::edge, rectangle::right};
  const Owner t{Owner::Kind::edge, rectangle::top};
  const Owner b{Owner::Kind::raiser, 1};
  const Owner other{Owner::Kind::raiser, 0};
  EXPECT_EQ(units[0].traction(r, Point(60, 3), right), Point(100, 0));
  EXPECT_EQ(units[0].traction(t, Point(0, 25), top), Point(0, 0));
  EXPECT_EQ(units[1].traction(t, Point(0, 25), top), Point(0, 40));
  EXPECT_EQ(units[2].traction(r, Point(60, 3), right), Point(0, 30));  // sigma n with sigma_xy = 30
  EXPECT_EQ(units[2].traction(t, Point(0, 25), top), Point(30, 0));
  EXPECT_EQ(units[3].traction(r, Point(60, 25), right), Point(70, 0));  // +: the top in tension
  EXPECT_EQ(units[3].traction(r, Point(60, -12.5), right), Point(-35, 0));
  EXPECT_EQ(units[4].traction(b, Point(0, 0), right), Point(-20, 0));  // pushes on the material
  EXPECT_EQ(units[4].traction(other, Point(0, 0), right), Point(0, 0));
}

TEST(UnitLoads, EdgeLoadsOfAUniformStressEqualThatStress) {
  const Plate plate = plate_with_holes();
  const UnitLoad edges = unit_loads(plate, uniform(12, -7, 9)).front();
  for (const auto& [edge, n] :
       {std::pair(rectangle::right, Point(1, 0)), std::pair(rectangle::top, Point(0, 1)),
        std::pair(rectangle::left, Point(-1, 0)), std::pair(rectangle::bottom, Point(0, -1))}) {
    const Point expected(12 * n.x() + 9 * n.y(), 9 * n.x() - 7 * n.y());
    EXPECT_LT((edges.traction({Owner::Kind::edge, edge}, Point::Zero(), n) - expected).norm(), 1e-14);
  }
}

// Compares the traction with its mirror image along the traced outline of a
// plate that has both mirror lines.
Parity seen(const Plate& plate, const UnitLoad& unit, bool mirror_x) {
  const auto reflect = [&](Point p) {
    (mirror_x ? p.x() : p.y()) *= -1.0;
    return p;
  };
  bool even = true;
  bool odd = true;
  const auto region = mesh::trace(plate);
  for (const auto& loop : region.loops)
    for (const Curve& curve : loop) {
      const double t = 0.7 * curve.begin + 0.3 * curve.end;
      const Point x = curve.at(t);
      const Point tangent = curve.derivative(t) * (curve.end > curve.begin ? 1.0 : -1.0);
      const Point n = Point(tangent.y(), -tangent.x()).normalized();
      Owner image = curve.owner;
      if (image.kind == Owner::Kind::raiser)
        image.index = mesh::mirror_image(plate, image.index, {mirror_x, !mirror_x});
      const auto swap = [&](std::size_t a, std::size_t b) {
        if (curve.owner.kind != Owner::Kind::edge) return;
        if (curve.owner.index == a) image.index = b;
        if (curve.owner.index == b) image.index = a;
      };
      if (mirror_x) swap(rectangle::right, rectangle::left);
      if (!mirror_x) swap(rectangle::top, rectangle::bottom);
      const Point here = unit.traction(curve.owner, x, n);
      const Point there = reflect(unit.traction(image, reflect(x), reflect(n)));
      even = even && (here - there).norm() < 1e-9;
      odd = odd && (here + there).norm() < 1e-9;
    }
  return even ? Parity::even : odd ? Parity::odd : Parity::neither;
}

TEST(UnitLoads, ParitiesAreThoseOfTheTractions) {
  const Plate plate{120,
                    50,
                    4,
                    {{"a", HoleShape::circle, 10, 10, 0, Point(0, 0), 0},
                     {"b", HoleShape::circle, 6, 6, 0, Point(20, 0), 0},
                     {"c", HoleShape::circle, 6, 6, 0, Point(-20, 0), 0}}};
  const std::vector<std::vector<Load>> sets = {
      {of(Kind::tension, 1), of(Kind::transverse, 1), of(Kind::shear, 1), of(Kind::bending, 1),
       pressure(1, 0), pressure(1, 1)},
      uniform(1, 2, 0),
      uniform(0, 0, 3),
      uniform(1, 2, 3),
      {on_edge(rectangle::top, 5, 0), on_edge(rectangle::bottom, 5, 0)},
      // even under x only: equal shear along the ends held by a pull on one side
      {on_edge(rectangle::right, 0, 6), on_edge(rectangle::left, 0, -6), on_edge(rectangle::bottom, 5, 0)}};
  int checked = 0;
  for (const auto& loads : sets)
    for (const UnitLoad& unit : unit_loads(plate, loads)) {
      EXPECT_EQ(unit.under_x, seen(plate, unit, true)) << unit.name << " " << checked;
      EXPECT_EQ(unit.under_y, seen(plate, unit, false)) << unit.name << " " << checked;
      ++checked;
    }
  EXPECT_EQ(checked, 11);
}

TEST(UnitLoads, PressureInATurnedHoleHasNoParity) {
  Plate plate{120, 50, 4, {{"a", HoleShape::ellipse, 10, 5, 0, Point(0, 0), 0.3}}};
  EXPECT_EQ(unit_loads(plate, {pressure(1, 0)})[0].under_x, Parity::neither);
  plate.holes[0].angle = 0.0;
  EXPECT_EQ(unit_loads(plate, {pressure(1, 0)})[0].under_x, Parity::even);
}

TEST(UnitLoads, RefuseWhatCannotBeSolved) {
  const Plate plate = plate_with_holes();
  EXPECT_THROW(unit_loads(plate, {pressure(1, 4)}), std::invalid_argument);
  EXPECT_THROW(unit_loads(plate, {on_edge(rectangle::right, 1, 0)}), std::invalid_argument);
  EXPECT_THROW(unit_loads(plate, {on_edge(4, 1, 0)}), std::invalid_argument);
}

TEST(Resultant, OfAnEdgeLoadIsItsIntegral) {
  const Plate plate = plate_with_holes();
  for (const std::size_t edge : {rectangle::right, rectangle::top, rectangle::left, rectangle::bottom}) {
    const Load load = on_edge(edge, 3.0, 2.0);
    const Traction on_one = [&](const Owner& owner, const Point&, const Point& n) -> Point {
      if (owner != Owner{Owner::Kind::edge, edge}) return Point::Zero();
      return load.stress * n + load.along * Point(-n.y(), n.x());
    };
    const Resultant expected = integrate(plate, on_one);
    const Resultant found = resultant(plate, load);
    EXPECT_LT((found.force - expected.force).norm(), 1e-8);
    EXPECT_NEAR(found.moment, expected.moment, 1e-6);
  }
}

TEST(Imbalance, SaysByHowMuchAndTheCureCures) {
  const Plate plate = plate_with_holes();
  std::mt19937 random(17);
  std::uniform_real_distribution<double> stress(-50, 50);
  for (int trial = 0; trial < 50; ++trial) {
    std::vector<Load> loads = {of(Kind::tension, 80),
                               on_edge(rectangle::right, stress(random), stress(random)),
                               on_edge(rectangle::top, stress(random), stress(random))};
    const auto fault = imbalance(plate, loads);
    ASSERT_TRUE(fault);
    EXPECT_EQ(fault->loads, (std::vector<std::size_t>{1, 2}));
    for (const Load& cure : balancing(plate, fault->by)) loads.push_back(cure);
    EXPECT_FALSE(imbalance(plate, loads)) << imbalance(plate, loads)->what;
  }
}

TEST(Imbalance, IsToldInWords) {
  const Plate plate{100, 50, 4, {}};
  const auto pull = imbalance(plate, {on_edge(rectangle::right, 10, 0)});
  ASSERT_TRUE(pull);
  EXPECT_NE(pull->what.find("a force of (2000, 0) N and a moment of 0 N mm about the plate's centre"),
            std::string::npos)
      << pull->what;
  EXPECT_NE(pull->cure.find("a normal stress of 10 MPa on the left edge"), std::string::npos) << pull->cure;
  const auto turn = imbalance(plate, {on_edge(rectangle::right, 0, 2), on_edge(rectangle::left, 0, 2)});
  ASSERT_TRUE(turn);
  EXPECT_NE(turn->what.find("(0, 0) N and a moment of 40000 N mm"), std::string::npos) << turn->what;
  const auto bad = imbalance(plate, {of(Kind::tension, std::numeric_limits<double>::quiet_NaN())});
  ASSERT_TRUE(bad);
  EXPECT_NE(bad->what.find("nan"), std::string::npos);
}

TEST(Imbalance, AllowsRoundingAndNoMore) {
  const Plate plate{100, 50, 4, {}};
  EXPECT_FALSE(imbalance(plate, {on_edge(rectangle::right, 10, 0), on_edge(rectangle::left, 10 + 1e-9, 0)}));
  EXPECT_TRUE(imbalance(plate, {on_edge(rectangle::right, 10, 0), on_edge(rectangle::left, 10 + 1e-7, 0)}));
  EXPECT_FALSE(imbalance(plate_with_holes(), {of(Kind::tension, 10), of(Kind::bending, 3), pressure(2, 0)}));
}

TEST(NominalState, OfEdgeLoadsEqualsTheUniformStressTheyMake) {
  const Plate plate = plate_with_holes();
  for (std::size_t hole = 0; hole < plate.holes.size(); ++hole) {
    const NominalState state = nominal_state(plate, uniform(12, -7, 9), hole);
    EXPECT_NEAR(state.xx, 12, 1e-12);
    EXPECT_NEAR(state.yy, -7, 1e-12);
    EXPECT_NEAR(state.xy, 9, 1e-12);
    EXPECT_NEAR(state.bending, 0, 1e-12);
  }
}

// A beam under shear at its end: V constant, M linear along x.
TEST(NominalState, OfACantileverHasTheMomentOfItsStation) {
  Plate plate = plate_with_holes();
  std::vector<Load> loads = {on_edge(rectangle::right, 0, 5)};  // V = 5 * 50 * 4 N at x = 60
  for (const Load& cure : balancing(plate, imbalance(plate, loads)->by)) loads.push_back(cure);
  const double v = 5.0 * 50 * 4;
  // taken up by a push on the bottom edge, spread over L, and a couple of end shears
  const double couple = v * 60.0;         // about the centre, from the end shear
  const double end = v - couple / 120.0;  // net shear force left on the right end
  for (std::size_t hole = 0; hole < plate.holes.size(); ++hole) {
    const double x = plate.holes[hole].centre.x();
    const double rest = 60.0 - x;
    const double moment = -(end * rest - v / 120.0 * rest * rest / 2.0);  // + stretches the top
    const NominalState state = nominal_state(plate, loads, hole);
    EXPECT_NEAR(state.xy * 200.0, end - v * rest / 120.0, 1e-9);
    EXPECT_NEAR(state.bending * 4.0 * 50 * 50 / 6.0, moment, 1e-7);
  }
}

TEST(NominalState, AddsLoadsAndCountsOnlyTheHolesOwnPressure) {
  const Plate plate = plate_with_holes();
  const NominalState state =
      nominal_state(plate,
                    {of(Kind::tension, 10), of(Kind::tension, 5), of(Kind::bending, 3),
                     of(Kind::transverse, -2), of(Kind::shear, 4), pressure(7, 1), pressure(8, 2)},
                    1);
  EXPECT_DOUBLE_EQ(state.xx, 15);
  EXPECT_DOUBLE_EQ(state.bending, 3);
  EXPECT_DOUBLE_EQ(state.yy, -2);
  EXPECT_DOUBLE_EQ(state.xy, 4);
  EXPECT_DOUBLE_EQ(state.pressure, 7);
  EXPECT_THROW(nominal_state(plate, {}, 4), std::out_of_range);
}

TEST(Imbalance, CureDoesNotTakeTheLoadBack) {
  const Plate plate{200, 100, 5, {}};
  Load pull;
  pull.kind = Load::Kind::edge;
  pull.edge = rectangle::left;
  pull.stress = 10;
  const auto fault = imbalance(plate, {pull});
  ASSERT_TRUE(fault);
  EXPECT_NE(fault->cure.find("a normal stress of 10 MPa on the right edge"), std::string::npos)
      << fault->cure;
  Load push = pull;
  push.edge = rectangle::right;
  EXPECT_FALSE(imbalance(plate, {pull, push}));
}

}  // namespace
}  // namespace raiser::solver
