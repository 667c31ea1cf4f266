#include "validation/exact/exact.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>
#include <vector>

#include "validation/published/edge_raisers.hpp"

namespace raiser::validation {
namespace {

constexpr double pi = std::numbers::pi;

struct Named {
  const char* name;
  StressField field;
};

const RemoteStress mixed{80.0, -30.0, 45.0};

std::vector<Named> fields() {
  std::vector<Named> list{{"Kirsch", [](const Point& x) { return kirsch(mixed, 2.0, x); }},
                          {"Lame", [](const Point& x) { return lame(70.0, 2.0, x); }}};
  for (const Ellipse e : {Ellipse{2.0, 2.0}, Ellipse{2.0, 0.4}, Ellipse{0.1, 2.0}}) {
    list.push_back({"Inglis", [e](const Point& x) { return inglis(mixed, e, x); }});
    list.push_back({"pressurised ellipse", [e](const Point& x) { return inglis_pressure(70.0, e, x); }});
  }
  list.push_back({"turned", placed(
                                [](const Point& x) {
                                  return inglis(mixed, {2.0, 0.4}, x);
                                },
                                {0.3, -0.2}, 0.7)});
  return list;
}

std::vector<Point> points() {
  std::vector<Point> list;
  for (int i = 0; i < 12; ++i) {
    const double angle = 2 * pi * i / 12 + 0.1;
    for (const double r : {2.6, 4.0, 9.0}) list.emplace_back(r * std::cos(angle), r * std::sin(angle));
  }
  return list;
}

/// Fourth-order central difference of one component.
double slope(const StressField& field, double Stress::*part, const Point& x, const Point& step) {
  const auto at = [&](double k) { return field(x + k * step).*part; };
  return (8 * (at(1) - at(-1)) - (at(2) - at(-2))) / (12 * step.norm());
}

TEST(ExactField, EquilibriumHoldsEverywhere) {
  const Point dx(1e-3, 0), dy(0, 1e-3);
  for (const auto& [name, field] : fields()) {
    for (const Point& x : points()) {
      EXPECT_NEAR(slope(field, &Stress::xx, x, dx) + slope(field, &Stress::xy, x, dy), 0, 1e-7) << name;
      EXPECT_NEAR(slope(field, &Stress::xy, x, dx) + slope(field, &Stress::yy, x, dy), 0, 1e-7) << name;
    }
  }
}

TEST(ExactField, TraceIsHarmonic) {
  // Compatibility of plane elasticity without body forces. The second-order
  // five-point difference is Richardson-extrapolated.
  for (const auto& [name, field] : fields()) {
    const auto trace = [&field = field](const Point& x) { return field(x).xx + field(x).yy; };
    const auto laplacian = [&trace](const Point& x, double h) {
      return (trace(x + Point(h, 0)) + trace(x - Point(h, 0)) + trace(x + Point(0, h)) +
              trace(x - Point(0, h)) - 4 * trace(x)) /
             (h * h);
    };
    for (const Point& x : points()) {
      EXPECT_NEAR((4 * laplacian(x, 5e-3) - laplacian(x, 1e-2)) / 3, 0, 2e-5) << name;
    }
  }
}

TEST(ExactField, EllipseEdgeIsFreeAndCarriesThePublishedTangentialStress) {
  for (const Ellipse e : {Ellipse{2.0, 2.0}, Ellipse{2.0, 0.1}, Ellipse{0.1, 2.0}, Ellipse{1.0, 0.7}}) {
    const double scale = 100.0 * (1 + 2 * std::max(e.along_x / e.along_y, e.along_y / e.along_x));
    for (int i = 0; i < 72; ++i) {
      const double eta = 2 * pi * i / 72;
      const Point x(e.along_x * std::cos(eta), e.along_y * std::sin(eta));
      const Point n = Point(e.along_y * std::cos(eta), e.along_x * std::sin(eta)).normalized();
      const Stress s = inglis(mixed, e, x);
      const Point t(s.xx * n.x() + s.xy * n.y(), s.xy * n.x() + s.yy * n.y());
      EXPECT_LT(t.norm(), 1e-11 * scale) << "eta " << eta;
      EXPECT_NEAR(s.xx + s.yy, inglis_edge(mixed, e, eta), 1e-11 * scale) << "eta " << eta;
      const Stress p = inglis_pressure(70.0, e, x);
      const Point q(p.xx * n.x() + p.xy * n.y() + 70.0 * n.x(), p.xy * n.x() + p.yy * n.y() + 70.0 * n.y());
      EXPECT_LT(q.norm(), 1e-11 * scale);
    }
  }
}

TEST(ExactField, CircleEdgeIsFree) {
  for (int i = 0; i < 36; ++i) {
    const double theta = 2 * pi * i / 36;
    const Point n(std::cos(theta), std::sin(theta));
    const Stress s = kirsch(mixed, 3.0, 3.0 * n);
    EXPECT_NEAR(s.xx * n.x() + s.xy * n.y(), 0, 1e-11);
    EXPECT_NEAR(s.xy * n.x() + s.yy * n.y(), 0, 1e-11);
    EXPECT_NEAR(s.xx + s.yy, kirsch_edge(mixed, theta), 1e-11);
    const Stress p = lame(50.0, 3.0, 3.0 * n);
    EXPECT_NEAR(p.xx * n.x() + p.xy * n.y(), -50.0 * n.x(), 1e-11);
    EXPECT_NEAR(p.xx + p.yy, 0, 1e-12);
  }
}

TEST(ExactField, FarAwayTheRemoteStressIsLeft) {
  for (const StressField& field :
       {StressField([](const Point& x) { return kirsch(mixed, 1.0, x); }), StressField([](const Point& x) {
          return inglis(mixed, {1.0, 0.2}, x);
        })}) {
    for (const Point& x : {Point(1e5, 0), Point(0, -1e5), Point(-7e4, 7e4)}) {
      const Stress s = field(x);
      EXPECT_NEAR(s.xx, mixed.xx, 1e-6);
      EXPECT_NEAR(s.yy, mixed.yy, 1e-6);
      EXPECT_NEAR(s.xy, mixed.xy, 1e-6);
    }
  }
}

TEST(ExactField, TwoRoutesToTheCircleAgree) {
  for (const Point& x : points()) {
    const Stress a = kirsch(mixed, 2.0, x), b = inglis(mixed, {2.0, 2.0}, x);
    EXPECT_NEAR(a.xx, b.xx, 1e-11);
    EXPECT_NEAR(a.yy, b.yy, 1e-11);
    EXPECT_NEAR(a.xy, b.xy, 1e-11);
    EXPECT_NEAR(inglis_pressure(5.0, {2.0, 2.0}, x).xy, lame(5.0, 2.0, x).xy, 1e-12);
  }
}

TEST(ExactField, ExtremesAreThoseOfTheEdge) {
  for (const Ellipse e : {Ellipse{1.0, 1.0}, Ellipse{20.0, 1.0}, Ellipse{0.3, 1.0}}) {
    const auto [low, high] = inglis_extremes(mixed, e);
    double seen_low = 1e9, seen_high = -1e9;
    for (int i = 0; i < 200000; ++i) {
      const double s = inglis_edge(mixed, e, 2 * pi * i / 200000);
      seen_low = std::min(seen_low, s);
      seen_high = std::max(seen_high, s);
    }
    EXPECT_NEAR(low, seen_low, 1e-6 * std::abs(low));
    EXPECT_NEAR(high, seen_high, 1e-6 * std::abs(high));
  }
}

// The field against its own definition: no traction on the hyperbola, the net section
// carries the nominal load, stresses balance, and the roots have Neuber's factors.
TEST(ExactField, DeepNotchesHaveNeubersFactors) {
  for (const double q : {0.1, 1.0, 5.0, 25.0}) {
    const double a = 3.0, h = 1e-4 * a / q;
    const DeepNotches notches(a, a / q);
    EXPECT_NEAR(notches.tension({a, 0.0}).yy, neuber_deep_tension(q), 1e-12 * q);
    EXPECT_NEAR(notches.bending({a, 0.0}).yy, neuber_deep_bending(q), 1e-11 * q);
    for (const bool is_bending : {false, true}) {
      const auto at = [&](const Point& x) { return is_bending ? notches.bending(x) : notches.tension(x); };
      for (const double y : {0.0, 0.3 * a, -2.0 * a}) {
        const Point x(notches.edge(y), y);
        const double b2 = a * a / q;  // the other half axis, squared
        const Point n = Point(x.x() / (a * a), -y / b2).normalized();
        const Stress s = at(x);
        EXPECT_NEAR(s.xx * n.x() + s.xy * n.y(), 0.0, 1e-12 * q);
        EXPECT_NEAR(s.xy * n.x() + s.yy * n.y(), 0.0, 1e-12 * q);
      }
      double force = 0.0, moment = 0.0;
      constexpr int pieces = 20000;
      for (int i = 0; i < pieces; ++i) {
        const double phi = pi * (i + 0.5) / pieces - pi / 2;  // dense at the roots
        const double x = a * std::sin(phi), dx = a * std::cos(phi) * pi / pieces;
        force += at({x, 0.0}).yy * dx;
        moment += at({x, 0.0}).yy * x * dx;
      }
      EXPECT_NEAR(force / (2 * a), is_bending ? 0.0 : 1.0, 1e-6);
      EXPECT_NEAR(6 * moment / (4 * a * a), is_bending ? 1.0 : 0.0, 1e-6);
      const Point x(0.4 * a, 0.2 * a);
      const Stress e = at(x + Point(h, 0)), w = at(x - Point(h, 0)), n = at(x + Point(0, h)),
                   s = at(x - Point(0, h));
      EXPECT_NEAR((e.xx - w.xx + n.xy - s.xy) / (2 * h), 0.0, 1e-5);
      EXPECT_NEAR((e.xy - w.xy + n.yy - s.yy) / (2 * h), 0.0, 1e-5);
    }
  }
}

/// The hyperbolic form printed in S. P. Timoshenko and J. N. Goodier, Theory of
/// Elasticity, 3rd ed. (1970), elliptic-hole section, from memory.
TEST(ExactField, EdgeStressMatchesThePrintedForm) {
  for (const double ratio : {2.0, 5.0, 20.0}) {
    const double xi = std::atanh(1 / ratio);
    for (const double beta : {0.0, 0.4, pi / 4, 1.3}) {
      const RemoteStress remote = turned({1.0, 0.0, 0.0}, -beta);  // tension 1 at beta to the major axis
      for (const double eta : {0.0, 0.3, 1.1, 2.5}) {
        const double printed =
            (std::sinh(2 * xi) + std::cos(2 * beta) - std::exp(2 * xi) * std::cos(2 * (beta - eta))) /
            (std::cosh(2 * xi) - std::cos(2 * eta));
        EXPECT_NEAR(inglis_edge(remote, {ratio, 1.0}, eta), printed, 1e-11 * ratio * ratio);
      }
    }
  }
}

/// Digits of the same formula, evaluated apart from this code: a/b, angle of
/// the load to the major axis in degrees, largest and smallest factor.
TEST(ExactField, EllipseAtAnAngleHasTheTabulatedExtremes) {
  const double table[][4] = {{2, 0, 2.0, -1},          {2, 30, 2.8593, -1.1093}, {2, 45, 3.6217, -1.1217},
                             {2, 60, 4.3292, -1.0792}, {2, 90, 5.0, -1},         {3, 30, 3.3094, -1.3094},
                             {3, 45, 4.6481, -1.3148}, {3, 60, 5.861, -1.1943},  {5, 30, 4.5749, -1.7749},
                             {5, 45, 6.9267, -1.7267}, {5, 60, 9.0307, -1.4307}, {10, 45, 12.867, -2.767}};
  for (const auto& [ratio, degrees, most, least] : table) {
    const auto [low, high] = inglis_extremes(turned({1.0, 0.0, 0.0}, -degrees * pi / 180), {ratio, 1.0});
    EXPECT_NEAR(high, most, 5.1e-4) << ratio << " at " << degrees;
    EXPECT_NEAR(low, least, 5.1e-4) << ratio << " at " << degrees;
  }
}

TEST(ExactField, KirschLimits) {
  EXPECT_DOUBLE_EQ(kirsch_edge({1, 0, 0}, pi / 2), 3.0);
  EXPECT_DOUBLE_EQ(kirsch_edge({1, 0, 0}, 0), -1.0);
  EXPECT_DOUBLE_EQ(kirsch_edge({1, 1, 0}, 0.7), 2.0);
  EXPECT_DOUBLE_EQ(kirsch_edge({0, 0, 1}, -pi / 4), 4.0);
  const Stress s = kirsch({1, 0, 0}, 1.0, {0, 2.0});  // on the ligament: 1 + 1/8 + 3/32
  EXPECT_NEAR(s.xx, 1 + 1 / 8.0 + 3 / 32.0, 1e-14);
}

solver::HookeLaw orthotropic(double e1, double e2, double g12, double nu12, double angle = 0.0) {
  return {e1, nu12, solver::PlaneState::stress, solver::Orthotropy{e2, g12, angle}};
}

/// Record A31: carbon and glass fibres along and across the load.
TEST(ExactField, FactorOfAnOrthotropicSheetIsThatOfTheRecord) {
  EXPECT_NEAR(lekhnitskii_factor(orthotropic(138, 9, 6.9, 0.3)), 6.218, 1e-3);
  EXPECT_NEAR(lekhnitskii_factor(orthotropic(38.6, 8.27, 4.14, 0.26)), 4.623, 1e-3);
  EXPECT_NEAR(lekhnitskii_factor(orthotropic(9, 138, 6.9, 0.3 * 9 / 138)), 2.333, 1e-3);
  EXPECT_NEAR(lekhnitskii_factor(orthotropic(70, 70, 70 / 2.6, 0.3)), 3.0, 1e-12);
}

TEST(ExactField, LekhnitskiiAtTheEndsOfTheDiameterAcross) {
  const auto law = orthotropic(138, 9, 6.9, 0.3);
  const Lekhnitskii field(law, {1, 0, 0}, {2.0, 2.0});
  EXPECT_NEAR(field.at({0, 2}).xx, lekhnitskii_factor(law), 1e-12);
  EXPECT_NEAR(field.at({0, -2}).xx, lekhnitskii_factor(law), 1e-12);
  EXPECT_NEAR(field.at({2, 0}).yy, -std::sqrt(9 / 138.0), 1e-12);  // -sqrt(E2 / E1), from memory
  EXPECT_NEAR(field.at({2e6, 1e6}).xx, 1.0, 1e-9);
}

TEST(ExactField, LekhnitskiiIsFreeOnTheEdgeAndInBalance) {
  for (const double angle : {0.0, 0.4, 1.9}) {
    const Ellipse ellipse{3.0, 1.2};
    const Lekhnitskii field(orthotropic(138, 9, 6.9, 0.3, angle), {20, 100, 30}, ellipse);
    for (const double eta : {0.1, 0.9, 2.2, 3.7, 5.5}) {
      const Point x(ellipse.along_x * std::cos(eta), ellipse.along_y * std::sin(eta));
      const Point n = Point(std::cos(eta) / ellipse.along_x, std::sin(eta) / ellipse.along_y).normalized();
      const Stress s = field.at(x);
      EXPECT_NEAR(s.xx * n.x() + s.xy * n.y(), 0.0, 1e-11 * 600);
      EXPECT_NEAR(s.xy * n.x() + s.yy * n.y(), 0.0, 1e-11 * 600);
      const Point y = 1.7 * x;
      const double h = 1e-4;
      const auto slope = [&](auto component, const Point& d) {
        return (component(field.at(y + h * d)) - component(field.at(y - h * d))) / (2 * h);
      };
      const auto xx = [](const Stress& t) { return t.xx; };
      const auto yy = [](const Stress& t) { return t.yy; };
      const auto xy = [](const Stress& t) { return t.xy; };
      EXPECT_NEAR(slope(xx, Point::UnitX()) + slope(xy, Point::UnitY()), 0.0, 1e-4);
      EXPECT_NEAR(slope(xy, Point::UnitX()) + slope(yy, Point::UnitY()), 0.0, 1e-4);
    }
  }
}

/// Almost isotropic: the fields of Inglis within the departure.
TEST(ExactField, LekhnitskiiTendsToInglis) {
  const Ellipse ellipse{3.0, 1.2};
  const RemoteStress remote{20, 100, 30};
  const Lekhnitskii field(orthotropic(70, 70, 70 / 2.6 * 1.000001, 0.3, 0.3), remote, ellipse);
  for (const Point& x : {Point(3.5, 1.0), Point(-0.3, 2.0), Point(1.0, -4.0)}) {
    const Stress a = field.at(x), b = inglis(remote, ellipse, x);
    EXPECT_NEAR(a.xx, b.xx, 1e-3);
    EXPECT_NEAR(a.yy, b.yy, 1e-3);
    EXPECT_NEAR(a.xy, b.xy, 1e-3);
  }
  EXPECT_THROW(Lekhnitskii(orthotropic(70, 70, 70 / 2.6, 0.3), remote, ellipse), std::invalid_argument);
}

TEST(ExactField, TractionIsStressTimesNormal) {
  const auto traction = traction_of([](const Point&) { return Stress{1, 2, 3, 0}; });
  const Point t = traction({}, {0, 0}, {0.6, 0.8});
  EXPECT_DOUBLE_EQ(t.x(), 0.6 + 2.4);
  EXPECT_DOUBLE_EQ(t.y(), 1.8 + 1.6);
}

}  // namespace
}  // namespace raiser::validation
