#include "solver/corner/wedge.hpp"

#include <gtest/gtest.h>

#include <Eigen/LU>
#include <array>
#include <cmath>
#include <numbers>
#include <random>

namespace raiser::solver {
namespace {

constexpr double pi = std::numbers::pi;
using Complex = std::complex<double>;
using Symmetry = WedgeMode::Symmetry;

const PlaneConstants steel = plane_constants({210000.0, 0.3, PlaneState::stress});

double smallest(const Wedge& wedge, Symmetry symmetry) {
  for (const Exponent& e : exponents(wedge, steel.kappa, 1.9))
    if (e.symmetry == symmetry) return e.value.real();
  return 0.0;
}

// M. L. Williams, J. Appl. Mech. 19 (1952) 526: smallest exponents of a notch
// with free flanks by its opening angle, four digits (roots computed for this
// project from the published equations).
TEST(Wedge, ExponentsOfAFreeNotchAreThosePublished) {
  struct Row {
    double opening, symmetric, antisymmetric;
  };
  const Row table[] = {{0, 0.5, 0.5},         {15, 0.5002, 0.5453},  {30, 0.5015, 0.5982},
                       {45, 0.505, 0.6597},   {60, 0.5122, 0.7309},  {75, 0.5247, 0.8132},
                       {90, 0.5445, 0.9085},  {105, 0.5739, 1.0193}, {120, 0.6157, 1.1489},
                       {135, 0.6736, 1.3021}, {150, 0.752, 1.4858},  {165, 0.8573, 1.7113}};
  for (const Row& row : table) {
    const Wedge wedge{2 * pi - row.opening * pi / 180};
    EXPECT_NEAR(smallest(wedge, Symmetry::symmetric), row.symmetric, 5.1e-5) << row.opening;
    EXPECT_NEAR(smallest(wedge, Symmetry::antisymmetric), row.antisymmetric, 5.1e-5) << row.opening;
  }
}

TEST(Wedge, ConvexFreeCornersAreNotSingular) {
  for (const double degrees : {20.0, 90.0, 150.0, 179.0, 180.0})
    EXPECT_TRUE(singular_modes({degrees * pi / 180}, steel).empty()) << degrees;
}

// Williams 1952, clamped-free: at the right angle of a plate held at its end
// the stress grows although the corner is convex; with kappa = 3 - 4 nu and
// nu = 0.3 in plane strain the exponent is 0.7112 (from memory of A. C. Zak and
// M. L. Williams' family of values; the residual test below does not lean on it).
TEST(Wedge, AClampedEndIsSingularAtARightAngle) {
  const auto modes = singular_modes({pi / 2, WedgeEdge::clamped, WedgeEdge::free},
                                    plane_constants({1.0, 0.3, PlaneState::strain}));
  ASSERT_EQ(modes.size(), 1U);
  EXPECT_NEAR(modes[0].exponent.real(), 0.7112, 1e-4);
}

// A half-plane clamped on one side of the point and free on the other: the
// exponent is 1/2 + i ln(kappa) / (2 pi), the classical rigid punch without
// slip. N. I. Muskhelishvili, Some Basic Problems (1953), section 114.
TEST(Wedge, TheRigidPunchOscillates) {
  const auto found = exponents({pi, WedgeEdge::clamped, WedgeEdge::free}, steel.kappa, 1.0);
  ASSERT_EQ(found.size(), 1U);
  EXPECT_NEAR(found[0].value.real(), 0.5, 1e-13);
  EXPECT_NEAR(found[0].value.imag(), std::log(steel.kappa) / (2 * pi), 1e-13);
}

// A smooth rigid punch has the square root without oscillation.
TEST(Wedge, TheSmoothPunchHasASquareRoot) {
  const auto found = exponents({pi, WedgeEdge::sliding, WedgeEdge::free}, steel.kappa, 1.0);
  ASSERT_FALSE(found.empty());
  EXPECT_NEAR(found[0].value.real(), 0.5, 1e-13);
}

std::vector<Wedge> wedges() {
  std::vector<Wedge> all;
  std::mt19937 random(11);
  std::uniform_real_distribution<double> angle(0.3, 2 * pi);
  for (const WedgeEdge a : {WedgeEdge::free, WedgeEdge::clamped, WedgeEdge::sliding})
    for (const WedgeEdge b : {WedgeEdge::free, WedgeEdge::clamped, WedgeEdge::sliding}) {
      if (a != WedgeEdge::sliding || b != WedgeEdge::sliding) all.push_back({2 * pi, a, b});
      all.push_back({1.5 * pi, a, b});
      all.push_back({pi, a, b});
      for (int k = 0; k < 8; ++k) all.push_back({angle(random), a, b});
    }
  return all;
}

// What an edge must not show: the two quantities that its condition makes zero.
double breach(const WedgeField& f, WedgeEdge edge) {
  const double stress = edge == WedgeEdge::free ? std::hypot(f.tt, f.rt) : 0.0;
  const double held = edge == WedgeEdge::clamped ? std::hypot(f.u_r, f.u_t) : 0.0;
  const double slides = edge == WedgeEdge::sliding ? std::hypot(f.rt / steel.shear_modulus, f.u_t) : 0.0;
  return stress / steel.shear_modulus + held + slides;
}

TEST(Wedge, FieldsKeepTheirEdgeConditions) {
  int fields = 0;
  for (const Wedge& wedge : wedges())
    for (const WedgeMode& mode : singular_modes(wedge, steel))
      for (const WedgeMode& field : {mode, dual(mode, wedge, steel)}) {
        ++fields;
        double size = 0.0;
        for (const double share : {-0.4, -0.1, 0.3}) {
          const WedgeField inside = field.at(1.0, share * wedge.angle, steel);
          size += std::hypot(inside.u_r, inside.u_t) + std::hypot(inside.tt, inside.rr) / steel.shear_modulus;
        }
        const WedgeField low = field.at(1.0, -wedge.angle / 2, steel);
        const WedgeField high = field.at(1.0, wedge.angle / 2, steel);
        EXPECT_LT(breach(low, wedge.first), 1e-11 * size) << wedge.angle << " " << field.exponent;
        EXPECT_LT(breach(high, wedge.second), 1e-11 * size) << wedge.angle << " " << field.exponent;
      }
  EXPECT_GT(fields, 150);
}

// Equilibrium and Hooke's law by differences in the plane, apart from how the
// fields are written.
TEST(Wedge, FieldsAreInEquilibriumAndElastic) {
  const Wedge wedge{1.6 * pi, WedgeEdge::clamped, WedgeEdge::free};
  for (const WedgeMode& mode : singular_modes(wedge, steel)) {
    const double r = 1.3, t = 0.7, h = 1e-5;
    const auto at = [&](double dr, double dt) { return mode.at(r + dr, t + dt, steel, Complex(0.6, 0.8)); };
    const WedgeField f = at(0, 0);
    const auto by_r = [&](double WedgeField::*v) { return (at(h, 0).*v - at(-h, 0).*v) / (2 * h); };
    const auto by_t = [&](double WedgeField::*v) { return (at(0, h).*v - at(0, -h).*v) / (2 * h * r); };
    EXPECT_NEAR(by_r(&WedgeField::rr) + by_t(&WedgeField::rt) + (f.rr - f.tt) / r, 0, 1e-8);
    EXPECT_NEAR(by_r(&WedgeField::rt) + by_t(&WedgeField::tt) + 2 * f.rt / r, 0, 1e-8);
    const double radial = by_r(&WedgeField::u_r);
    const double hoop = by_t(&WedgeField::u_t) + f.u_r / r;
    const double shear = by_t(&WedgeField::u_r) + by_r(&WedgeField::u_t) - f.u_t / r;
    const double e = 210000.0, nu = 0.3;
    EXPECT_NEAR(e * radial, f.rr - nu * f.tt, 1e-6);
    EXPECT_NEAR(e * hoop, f.tt - nu * f.rr, 1e-6);
    EXPECT_NEAR(steel.shear_modulus * shear, f.rt, 1e-6);
  }
}

// Every root in the strip is found: as many as the argument of the
// determinant of the edge conditions turns round it. The determinant is built
// here from the fields of the four coefficients.
Complex determinant(const Wedge& wedge, Complex e) {
  Eigen::Matrix4cd m;
  for (int c = 0; c < 4; ++c) {
    WedgeMode unit{e, Symmetry::none, {}};
    unit.coefficients[c] = 1.0;
    for (int k = 0; k < 2; ++k) {
      const WedgeEdge edge = k == 0 ? wedge.first : wedge.second;
      const double t = (k - 0.5) * wedge.angle;
      // Real and imaginary part by two amplitudes.
      const WedgeField re = unit.at(1.0, t, steel), im = unit.at(1.0, t, steel, Complex(0, -1));
      const auto value = [&](double WedgeField::*v) { return Complex(re.*v, im.*v); };
      const double mu2 = 2 * steel.shear_modulus;
      m(2 * k, c) = edge == WedgeEdge::free      ? value(&WedgeField::tt) / (e * (e + 1.0))
                    : edge == WedgeEdge::clamped ? mu2 * value(&WedgeField::u_r)
                                                 : value(&WedgeField::rt) / e;
      m(2 * k + 1, c) = edge == WedgeEdge::free ? value(&WedgeField::rt) / e : mu2 * value(&WedgeField::u_t);
    }
  }
  return m.determinant();
}

TEST(Wedge, NoSingularExponentIsMissed) {
  for (const Wedge& wedge : wedges()) {
    const double left = 0.02, right = 0.98, top = 1.5;
    const std::array<Complex, 5> corner{
        Complex(left, -top), {right, -top}, {right, top}, {left, top}, {left, -top}};
    double turn = 0.0;
    constexpr int steps = 400;
    Complex before = determinant(wedge, corner[0]);
    for (int side = 0; side < 4; ++side)
      for (int k = 1; k <= steps; ++k) {
        const Complex now =
            determinant(wedge, corner[side] + (corner[side + 1] - corner[side]) * (1.0 * k / steps));
        turn += std::arg(now / before);
        before = now;
      }
    int count = 0;
    for (const Exponent& e : exponents(wedge, steel.kappa, right))
      if (e.value.real() > left) count += e.value.imag() > 0 ? 2 : 1;
    EXPECT_EQ(count, std::lround(turn / (2 * pi)))
        << wedge.angle << " " << static_cast<int>(wedge.first) << static_cast<int>(wedge.second);
  }
}

TEST(Wedge, RootsHoldToRounding) {
  for (const Wedge& wedge : wedges())
    for (const Exponent& e : exponents(wedge, steel.kappa, 1.0)) {
      const double h = 1e-9;
      const double slope =
          std::abs(determinant(wedge, e.value + h) - determinant(wedge, e.value - h)) / (2 * h);
      if (slope < 1e-3) continue;  // roots that coincide or nearly so
      EXPECT_LT(std::abs(determinant(wedge, e.value)) / slope, 1e-12) << wedge.angle;
    }
}

// Betti's theorem: a field is paired with its own dual only, on any arc.
TEST(Wedge, OnlyTheOwnDualAnswers) {
  for (const Wedge& wedge : wedges()) {
    const auto modes = singular_modes(wedge, steel);
    for (const WedgeMode& a : modes)
      for (const WedgeMode& b : modes) {
        const Complex own = pairing(b, dual(b, wedge, steel), wedge, steel);
        const Complex other = pairing(a, dual(b, wedge, steel), wedge, steel);
        const bool is_same = std::abs(a.exponent - b.exponent) < 1e-12 && a.symmetry == b.symmetry;
        if (is_same)
          EXPECT_GT(std::abs(own), 1e-9);
        else
          EXPECT_LT(std::abs(other), 1e-9 * std::abs(own)) << a.exponent << b.exponent;
      }
  }
}

TEST(Wedge, RefusesAnAngleThatIsNone) {
  EXPECT_THROW(exponents({0.0}, 2.0, 1.0), std::invalid_argument);
  EXPECT_THROW(exponents({7.0}, 2.0, 1.0), std::invalid_argument);
  EXPECT_THROW(exponents({2 * pi, WedgeEdge::sliding, WedgeEdge::sliding}, 2.0, 1.0), std::invalid_argument);
}

}  // namespace
}  // namespace raiser::solver
