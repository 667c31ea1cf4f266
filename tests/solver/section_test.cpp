#include "solver/extract/section.hpp"

#include <gtest/gtest.h>

#include <cmath>

namespace raiser::solver {
namespace {

using mesh::Direction;
using mesh::HoleShape;
using Kind = Load::Kind;

Load of(Kind kind, double stress) {
  Load load;
  load.kind = kind;
  load.stress = stress;
  return load;
}

mesh::Hole circle(double diameter, Point centre) {
  return {"", HoleShape::circle, diameter, diameter, 0, centre, 0};
}

constexpr double w = 60;
constexpr double l = 240;
constexpr double t = 6;
constexpr double d = 18;

Plate central() { return {l, w, t, {circle(d, Point(0, 0))}}; }

// Net bases of the published charts: R. E. Peterson, Stress Concentration
// Factors, 1974 (formulas from memory).
TEST(Nominal, OfACentralHoleIsTheChartsBasis) {
  const Nominal tension = nominal(central(), {of(Kind::tension, 100)}, 0);
  EXPECT_DOUBLE_EQ(tension.gross.stress, 100);
  EXPECT_NEAR(tension.net.stress, 100 * w / (w - d), 1e-12);
  EXPECT_EQ(tension.gross.definition, "F / (W t), gross section x = 0 mm");
  EXPECT_NE(tension.net.definition.find("F / A_net, net section x = 0 mm"), std::string::npos);
  EXPECT_NEAR(tension.section.normal_force, 100 * w * t, 1e-9);
  EXPECT_DOUBLE_EQ(tension.section.gross_area, w * t);
  EXPECT_NEAR(tension.section.net_area, (w - d) * t, 1e-12);

  const Nominal bending = nominal(central(), {of(Kind::bending, 50)}, 0);
  const double moment = 50 * w * w * t / 6;
  EXPECT_DOUBLE_EQ(bending.gross.stress, 50);
  EXPECT_NEAR(bending.section.moment, moment, 1e-9);
  EXPECT_NEAR(bending.net.stress, 6 * moment * d / ((w * w * w - d * d * d) * t), 1e-12);

  const Nominal shear = nominal(central(), {of(Kind::shear, -30)}, 0);
  EXPECT_NEAR(shear.gross.stress, 30, 1e-12);
  EXPECT_NEAR(shear.net.stress, 30 * w / (w - d), 1e-12);
  EXPECT_EQ(shear.section.direction, Direction::across);

  const Nominal transverse = nominal(central(), {of(Kind::transverse, 40)}, 0);
  EXPECT_EQ(transverse.section.direction, Direction::along);
  EXPECT_DOUBLE_EQ(transverse.section.gross_area, l * t);
  EXPECT_NEAR(transverse.net.stress, 40 * l / (l - d), 1e-12);
  EXPECT_EQ(transverse.gross.definition, "F / (L t), gross section y = 0 mm");
}

TEST(Nominal, TakesOutEveryHoleOnTheSection) {
  Plate plate{l, w, t, {circle(10, Point(30, 12)), circle(8, Point(31, -14)), circle(20, Point(-50, 0))}};
  const Nominal found = nominal(plate, {of(Kind::tension, 1)}, 0);
  const double net = w - 10 - 2 * std::sqrt(15.0);
  EXPECT_NEAR(found.net.stress, w / net, 1e-12);
  const Section& section = found.section;
  double area = 0, first = 0, second = 0;  // by summing thin strips
  constexpr int n = 600000;
  for (int i = 0; i < n; ++i) {
    const double y = -w / 2 + w * (i + 0.5) / n;
    if (std::hypot(30 - 30, y - 12) < 5 || std::hypot(30 - 31, y + 14) < 4) continue;
    area += t * w / n, first += t * w / n * y, second += t * w / n * y * y;
  }
  EXPECT_NEAR(section.net_area, area, 1e-2);
  EXPECT_NEAR(section.net_centroid, first / area, 1e-4);
  EXPECT_NEAR(section.net_inertia, second - first * first / area, 1e-4 * second);
}

TEST(Nominal, BendsAnEccentricHoleAboutTheNetCentroid) {
  const Plate plate{l, w, t, {circle(12, Point(5, 9))}};
  const Nominal found = nominal(plate, {of(Kind::bending, 50)}, 0);
  const double lower = 33, upper = 15;  // the two pieces of material
  const double area = lower + upper;
  const double centroid = (lower * (-30 + 16.5) + upper * 22.5) / area;
  const double inertia = std::pow(lower, 3) / 12 + lower * std::pow(-13.5 - centroid, 2) +
                         std::pow(upper, 3) / 12 + upper * std::pow(22.5 - centroid, 2);
  EXPECT_NEAR(found.net.stress, 50 * w * w / 6 * (15 - centroid) / inertia, 1e-10);
  EXPECT_NE(found.net.definition.find("x = 5 mm"), std::string::npos) << found.net.definition;
}

TEST(Nominal, OfSeveralLoadsIsTheirLargestPrincipalStress) {
  const std::vector<Load> loads = {of(Kind::tension, -80), of(Kind::bending, 25), of(Kind::transverse, 20),
                                   of(Kind::shear, 30)};
  const Nominal found = nominal(central(), loads, 0);
  const auto magnitude = [](double xx, double yy, double xy) {
    const double radius = std::hypot((xx - yy) / 2, xy);
    return std::max(std::abs((xx + yy) / 2 + radius), std::abs((xx + yy) / 2 - radius));
  };
  EXPECT_NEAR(found.gross.stress, magnitude(-105, 20, 30), 1e-12);
  const double bending = 25 * w * w * d / (w * w * w - d * d * d);
  EXPECT_NEAR(found.net.stress, magnitude(-80 * w / (w - d) - bending, 20 * l / (l - d), 30 * w / (w - d)),
              1e-12);
  for (const char* part : {"F / (W t)", "6 M / (W^2 t)", "F_y / (L t)", "V / (W t)", "x = 0 mm and y = 0 mm"})
    EXPECT_NE(found.gross.definition.find(part), std::string::npos) << found.gross.definition;
}

TEST(Nominal, OfAPressureIsThePressureAndHasNoNetBasis) {
  Load load = of(Kind::pressure, -12);
  const Nominal alone = nominal(central(), {load}, 0);
  EXPECT_DOUBLE_EQ(alone.gross.stress, 12);
  EXPECT_TRUE(alone.gross.why.empty());
  EXPECT_FALSE(alone.net.why.empty());
  const Nominal both = nominal(central(), {load, of(Kind::tension, 30)}, 0);
  EXPECT_DOUBLE_EQ(both.gross.stress, 30);
  EXPECT_NE(both.gross.definition.find("pressure in the hole does not count"), std::string::npos);
  Plate two = central();
  two.holes.push_back(circle(10, Point(60, 0)));
  const Nominal other = nominal(two, {load}, 1);
  EXPECT_FALSE(other.gross.why.empty());
  EXPECT_FALSE(other.net.why.empty());
}

TEST(Concentration, DividesThePeakAndItsBoundByTheNominal) {
  const Basis basis{50, "text", ""};
  const Concentration found = concentration({-150, 0.5}, basis);
  ASSERT_TRUE(found.kt);
  EXPECT_DOUBLE_EQ(found.kt->value, 3.0);
  EXPECT_DOUBLE_EQ(found.kt->bound, 0.01);
  EXPECT_DOUBLE_EQ(found.nominal, 50);
  EXPECT_EQ(found.definition, "text");
  const Concentration none = concentration({-150, 0.5}, {0, "", "because"});
  EXPECT_FALSE(none.kt);
  EXPECT_EQ(none.why, "because");
}

TEST(Nominal, NeverStandsOnRounding) {
  int rounded = 0;  // loads that cancel, most of them not exactly
  for (int i = 1; i < 50; ++i) {
    const double a = 1.0 / i;
    const double b = std::sqrt(double(i));
    const std::vector<Load> loads = {of(Kind::tension, a), of(Kind::tension, b), of(Kind::tension, -(a + b))};
    if (nominal_state(central(), loads, 0).xx != 0.0) ++rounded;
    const Nominal found = nominal(central(), loads, 0);
    EXPECT_FALSE(found.gross.why.empty());
    EXPECT_FALSE(found.net.why.empty());
    EXPECT_FALSE(concentration({1.0, 0.1}, found.gross).kt);
  }
  EXPECT_GT(rounded, 5);
}

}  // namespace
}  // namespace raiser::solver
