// Closed forms of the infinite plate solved by the finite elements: the exact
// traction acts on the outline of a finite plate, and the solution must be the
// closed form everywhere. Scored in digits.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/sequence.hpp"
#include "solver/field/edge.hpp"
#include "validation/exact/exact.hpp"

namespace raiser::validation {
namespace {

using mesh::HoleShape;
using mesh::Mirrors;
using solver::Displacements;
using solver::Model;
using solver::Owner;
using solver::PlaneState;
using solver::Quantity;
using solver::UnitLoad;
using Parity = UnitLoad::Parity;

constexpr double pi = std::numbers::pi;

double digits_of(double error) { return -std::log10(std::max(error, 1e-16)); }

struct Case {
  mesh::Plate plate;
  StressField field;
  double pressure = 0.0;  // in the hole
  Mirrors lines;
  Parity parity = Parity::even;
  solver::HookeLaw material{210000, 0.3, PlaneState::stress};
};

// Digits of agreement, all relative to the largest edge stress.
struct Score {
  double largest = 0.0;   // of the largest edge stress
  double smallest = 0.0;  // of the smallest
  double edge = 0.0;      // of the edge stress anywhere
  double inside = 0.0;    // of every stress component anywhere inside
};

Model model_of(const Case& c, double turn) {
  mesh::SizeRule rule;
  rule.turn = turn;
  rule.growth = 0.7;
  const double pressure = c.pressure;
  const solver::Traction outer = traction_of(c.field);
  UnitLoad load{"exact",
                [outer, pressure](const Owner& owner, const Point& x, const Point& n) -> Point {
                  if (owner.kind == Owner::Kind::raiser) return -pressure * n;
                  return outer(owner, x, n);
                },
                c.parity, c.parity};
  return {mesh::triangulate(mesh::cut(mesh::trace(c.plate), c.lines), rule),
          c.lines,
          c.material,
          c.plate.thickness,
          {load}};
}

double tangential(const Stress& s, const Point& t) {
  return s.xx * t.x() * t.x() + s.yy * t.y() * t.y() + 2 * s.xy * t.x() * t.y();
}

double edge_miss(const Model& model, const Case& c, const Displacements& solved) {
  const std::vector<double> s{-1.0, -0.63, -0.2, 0.11, 0.57, 0.93};
  const solver::SideTables tables(solved.degree, s);
  const solver::EdgeProbe probe(model, solved.degree, s, tables);
  double miss = 0.0;
  for (const mesh::BoundarySide& side : model.mesh().boundary()) {
    if (side.curve.owner.kind != Owner::Kind::raiser) continue;
    const Eigen::MatrixXd seen = probe.at(side, solved).tangential;
    for (std::size_t q = 0; q < s.size(); ++q) {
      const double t = side.parameter(s[q]);
      const double wanted = tangential(c.field(side.curve.at(t)), side.curve.derivative(t).normalized());
      miss = std::max(miss, std::abs(seen(static_cast<Eigen::Index>(q), 0) - wanted));
    }
  }
  return miss;
}

// At points of rays from the hole, through Field::at and over the whole plate.
double inside_miss(const Model& model, const Case& c, const Displacements& solved) {
  const solver::Field field(model, solved);
  const mesh::Hole& hole = c.plate.holes.front();
  const double reach = 0.48 * std::min(c.plate.length, c.plate.width);
  double miss = 0.0;
  int seen_points = 0;
  for (int k = 0; k < 24; ++k)
    for (const double share : {0.02, 0.2, 0.55, 0.98}) {
      const double eta = 2 * pi * (k + 0.3) / 24;
      const Point edge(hole.length / 2 * std::cos(eta), hole.width / 2 * std::sin(eta));
      const Point far = reach * Point(std::cos(eta), std::sin(eta));
      const Point own = edge + share * (far - edge);
      const Point x(std::cos(hole.angle) * own.x() - std::sin(hole.angle) * own.y(),
                    std::sin(hole.angle) * own.x() + std::cos(hole.angle) * own.y());
      const auto found = field.at(x);
      if (!found) continue;
      ++seen_points;
      const Stress wanted = c.field(x);
      for (const double d :
           {found->stress.xx - wanted.xx, found->stress.yy - wanted.yy, found->stress.xy - wanted.xy})
        miss = std::max(miss, std::abs(d));
    }
  EXPECT_EQ(seen_points, 96) << "Field::at found no cell at some point of the material";
  return miss;
}

Score score(const Case& c, double largest, double smallest, double turn = 0.2, int degree = 12) {
  const Model model = model_of(c, turn);
  solver::DegreeSequence sequence(model, c.plate);
  sequence.solve(degree);
  const double scale = std::max(std::abs(largest), std::abs(smallest));
  const Displacements& solved = sequence.displacements().back();
  const auto extreme = [&](Quantity quantity) { return sequence.value(0, 0, quantity).stress.value; };
  Score result;
  result.largest = digits_of(std::abs(extreme(Quantity::largest_edge_stress) - largest) / scale);
  result.smallest = digits_of(std::abs(extreme(Quantity::smallest_edge_stress) - smallest) / scale);
  result.edge = digits_of(edge_miss(model, c, solved) / scale);
  result.inside = digits_of(inside_miss(model, c, solved) / scale);
  const solver::Balance balance = model.balance(solved);
  EXPECT_LT(balance.reaction, 1e-9);
  EXPECT_LT(balance.residual, 1e-10);
  testing::Test::RecordProperty("digits",
                                std::to_string(result.largest) + " " + std::to_string(result.smallest) + " " +
                                    std::to_string(result.edge) + " " + std::to_string(result.inside));
  return result;
}

void expect_digits(const Score& s, double peak, double everywhere) {
  EXPECT_GE(s.largest, peak);
  EXPECT_GE(s.smallest, peak);
  EXPECT_GE(s.edge, everywhere);
  EXPECT_GE(s.inside, everywhere);
}

mesh::Plate round(double radius) {
  return {60, 50, 4, {{"", HoleShape::circle, 2 * radius, 2 * radius, 0, Point(0, 0), 0}}};
}

Case kirsch_case(const RemoteStress& remote, Mirrors lines, Parity parity) {
  constexpr double radius = 8.0;
  return {round(radius), [remote](const Point& x) { return kirsch(remote, radius, x); }, 0.0, lines, parity};
}

// Reached where this was written, at degree 12: circles 11.4 digits in the
// peaks, 11 along the whole edge and 10.1 inside; ellipses of a/b up to 20 at
// any angle 10.2 in the peaks, 8.8 along the edge and 8.7 inside.
TEST(SolvedKirsch, Uniaxial) {
  const RemoteStress remote{100, 0, 0};
  expect_digits(score(kirsch_case(remote, {true, true}, Parity::even), 300, -100), 10.5, 9.5);
  expect_digits(score(kirsch_case(remote, {true, false}, Parity::even), 300, -100), 10.5, 9.5);
  expect_digits(score(kirsch_case(remote, {}, Parity::neither), 300, -100), 10.5, 9.5);
}

TEST(SolvedKirsch, Biaxial) {
  expect_digits(score(kirsch_case({80, 80, 0}, {true, true}, Parity::even), 160, 160), 10.5, 9.5);
  expect_digits(score(kirsch_case({80, -30, 0}, {false, true}, Parity::even), 270, -170), 10.5, 9.5);
}

TEST(SolvedKirsch, ShearIsOddUnderBothMirrors) {
  expect_digits(score(kirsch_case({0, 0, 50}, {true, true}, Parity::odd), 200, -200), 10.5, 9.5);
  expect_digits(score(kirsch_case({0, 0, 50}, {}, Parity::neither), 200, -200), 10.5, 9.5);
}

TEST(SolvedKirsch, InPlaneStrainHasTheSameStress) {
  Case c = kirsch_case({100, 0, 0}, {true, true}, Parity::even);
  c.material.state = PlaneState::strain;
  expect_digits(score(c, 300, -100), 10.5, 9.5);
}

TEST(SolvedLame, HoleUnderPressure) {
  constexpr double radius = 8.0;
  const StressField field = [](const Point& x) { return lame(70, radius, x); };
  expect_digits(score({round(radius), field, 70, {true, true}}, 70, 70), 10.5, 9.5);
  expect_digits(score({round(radius), field, 70, {}, Parity::neither}, 70, 70), 10.5, 9.5);
}

// The long axis is 2 a long and the hole turned by `angle`.
Case inglis_case(const RemoteStress& remote, double ratio, double angle) {
  constexpr double a = 10.0;
  const Ellipse ellipse{a, a / ratio};
  const RemoteStress own = turned(remote, angle);
  return {{60, 60, 4, {{"", HoleShape::ellipse, 2 * a, 2 * a / ratio, 0, Point(0, 0), angle}}},
          placed([own, ellipse](const Point& x) { return inglis(own, ellipse, x); }, Point(0, 0), angle),
          0.0,
          {},
          Parity::neither};
}

TEST(SolvedInglis, EllipsesOfEveryRatioAtSeveralAngles) {
  const RemoteStress remote{20, 100, 30};
  for (const double ratio : {2.0, 5.0, 20.0})
    for (const double angle : {0.0, 0.4, pi / 2, 2.2}) {
      SCOPED_TRACE("a/b " + std::to_string(ratio) + " at " + std::to_string(angle) + " rad");
      const auto [smallest, largest] = inglis_extremes(turned(remote, angle), {10.0, 10.0 / ratio});
      expect_digits(score(inglis_case(remote, ratio, angle), largest, smallest), 9.5, 8.3);
    }
}

TEST(SolvedInglis, PeakOfATensionAcrossTheLongAxisIsOnePlusTwiceTheRatio) {
  for (const double ratio : {3.0, 20.0})
    EXPECT_GE(score(inglis_case({0, 100, 0}, ratio, 0.0), 100 * (1 + 2 * ratio), -100).largest, 9.5);
}

TEST(SolvedInglis, EllipseUnderPressure) {
  constexpr double a = 10.0;
  constexpr double b = 4.0;
  const StressField field = [](const Point& x) { return inglis_pressure(60, {a, b}, x); };
  const auto [smallest, largest] = inglis_extremes({60, 60, 0}, {a, b});
  Case c{{60, 60, 4, {{"", HoleShape::ellipse, 2 * a, 2 * b, 0, Point(0, 0), 0}}}, field, 60, {true, true}};
  expect_digits(score(c, largest - 60, smallest - 60), 10.5, 9.5);
}

// The sheet of record A31 in published.json: carbon fibres in epoxy.
solver::HookeLaw carbon(double angle) {
  return {138000, 0.3, PlaneState::stress, solver::Orthotropy{9000, 6900, angle}};
}

// Extremes of the closed form along the edge, to rounding: the field is
// analytic in the eccentric angle.
std::pair<double, double> edge_extremes(const StressField& field, const mesh::Hole& hole) {
  const auto at = [&](double eta) {
    const double c = std::cos(eta), n = std::sin(eta), ca = std::cos(hole.angle), sa = std::sin(hole.angle);
    const Point own(hole.length / 2 * c, hole.width / 2 * n);
    const Point along = Point(-hole.length / 2 * n, hole.width / 2 * c).normalized();
    return tangential(field(Point(ca * own.x() - sa * own.y(), sa * own.x() + ca * own.y())),
                      Point(ca * along.x() - sa * along.y(), sa * along.x() + ca * along.y()));
  };
  const auto refine = [&](double middle, double step, double sign) {
    for (; step > 1e-9; step /= 2)
      for (const double eta : {middle - step, middle + step})
        if (sign * at(eta) > sign * at(middle)) middle = eta;
    return at(middle);
  };
  constexpr int steps = 2000;
  double low = 0, high = 0;
  for (int k = 1; k < steps; ++k) {
    if (at(2 * pi * k / steps) < at(low)) low = 2 * pi * k / steps;
    if (at(2 * pi * k / steps) > at(high)) high = 2 * pi * k / steps;
  }
  return {refine(low, 2 * pi / steps, -1), refine(high, 2 * pi / steps, 1)};
}

// The field is that of an isotropic one in coordinates stretched by up to 4,
// in which the circle is a slender ellipse: fewer digits on a mesh as fine.
// Reached: 6.3 to 12 in the peaks, 6.3 along the edge and 6.1 inside.
Case lekhnitskii_case(const RemoteStress& remote, double ratio, double fibres, double hole_angle) {
  constexpr double a = 8.0;
  const Lekhnitskii own(carbon(fibres - hole_angle), turned(remote, hole_angle), {a, a / ratio});
  return {{60, 60, 4, {{"", HoleShape::ellipse, 2 * a, 2 * a / ratio, 0, Point(0, 0), hole_angle}}},
          placed([own](const Point& x) { return own.at(x); }, Point(0, 0), hole_angle),
          0.0,
          {},
          Parity::neither,
          carbon(fibres)};
}

TEST(SolvedLekhnitskii, CircleInAUnidirectionalSheet) {
  for (const double angle : {0.0, 0.5, pi / 2}) {
    SCOPED_TRACE("fibres at " + std::to_string(angle) + " rad");
    const Case c = lekhnitskii_case({100, 0, 0}, 1.0, angle, 0.0);
    const auto [smallest, largest] = edge_extremes(c.field, c.plate.holes.front());
    expect_digits(score(c, largest, smallest, 0.05), 6.2, 6.0);
  }
}

TEST(SolvedLekhnitskii, MirrorsOfThePlateHoldForFibresAlongItsAxes) {
  for (const double angle : {0.0, pi / 2}) {
    Case c = lekhnitskii_case({100, 40, 0}, 1.0, angle, 0.0);
    c.lines = {true, true};
    c.parity = Parity::even;
    const auto [smallest, largest] = edge_extremes(c.field, c.plate.holes.front());
    expect_digits(score(c, largest, smallest, 0.05), 6.2, 6.0);
  }
  Case c = lekhnitskii_case({100, 0, 0}, 1.0, 0.5, 0.0);
  c.lines = {true, true};
  c.parity = Parity::even;
  EXPECT_THROW(model_of(c, 0.2), std::invalid_argument);
}

TEST(SolvedLekhnitskii, TurnedEllipseWithFibresAtAnAngle) {
  const Case c = lekhnitskii_case({20, 100, 30}, 2.5, 0.6, 1.1);
  const auto [smallest, largest] = edge_extremes(c.field, c.plate.holes.front());
  expect_digits(score(c, largest, smallest, 0.05), 6.2, 6.0);
}

}  // namespace
}  // namespace raiser::validation
