#include "solver/corner/intensity.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/corner/place_findings.hpp"
#include "tests/mesh/polygon.hpp"

namespace raiser::solver {
namespace {

constexpr double pi = std::numbers::pi;

const HookeLaw steel{210000.0, 0.3, PlaneState::stress};
const PlaneConstants constants = plane_constants(steel);

/// The one re-entrant corner of a region, with free edges.
CornerSite corner_of(const mesh::Region& region) {
  for (const mesh::Vertex& v : mesh::vertices(region))
    if (v.angle > pi + mesh::least_corner) return {v, mesh::reach(region, v), {v.angle}, {}};
  throw std::invalid_argument("the region has no corner");
}

/// The traction that a sum of the wedge's fields has on any edge.
UnitLoad exact_load(const CornerSite& site, const std::vector<double>& amplitude) {
  const auto modes = singular_modes(site.wedge, constants);
  const auto traction = [=](const Owner&, const Point& x, const Point& n) -> Point {
    const Point arm = x - site.vertex.at;
    const double bisector = site.vertex.direction + site.wedge.angle / 2;
    const double theta = std::remainder(std::atan2(arm.y(), arm.x()) - bisector, 2 * pi);
    Eigen::Matrix2d stress = Eigen::Matrix2d::Zero();
    for (std::size_t m = 0; m < modes.size(); ++m) {
      const WedgeField f = modes[m].at(arm.norm(), theta, constants, amplitude[m]);
      stress += (Eigen::Matrix2d() << f.rr, f.rt, f.rt, f.tt).finished();
    }
    const Point e_r = arm.normalized();
    const Point e_t(-e_r.y(), e_r.x());
    const Eigen::Matrix2d axes = (Eigen::Matrix2d() << e_r, e_t).finished();
    return axes * stress * axes.transpose() * n;
  };
  return {"wedge", traction, UnitLoad::Parity::neither, UnitLoad::Parity::neither};
}

// Corners of three openings, the exact field of the wedge on every edge: its
// amplitudes must come back, from any disc, and the growth with them.
TEST(Intensity, ComesBackFromTheWedgesOwnField) {
  const std::vector<std::vector<Point>> shapes{
      {{0, 0}, {40, 0}, {40, 15}, {15, 15}, {15, 40}, {0, 40}},
      {{0, 0}, {40, 0}, {40, 40}, {22, 40}, {20, 10}, {18, 40}, {0, 40}},
      {{0, 0}, {30, 0}, {30, 20}, {15, 12}, {0, 20}}};
  for (const auto& shape : shapes) {
    const mesh::Region region = mesh::polygon(shape);
    const CornerSite site = corner_of(region);
    const auto modes = singular_modes(site.wedge, constants);
    std::vector<double> amplitude{3.0, -2.0};
    amplitude.resize(modes.size());
    mesh::SizeRule rule;
    rule.corner = 1e-6;
    const Model model(mesh::triangulate(region, rule), {}, steel, 1.0, {exact_load(site, amplitude)});
    const Field field(model, model.solve(8));
    for (const double share : {0.9, 0.4}) {
      const auto found = amplitudes(field, site, modes, constants, share * site.reach);
      for (std::size_t m = 0; m < modes.size(); ++m) {
        EXPECT_NEAR(found[m].real(), amplitude[m], 3e-5) << site.wedge.angle << " " << share;
      }
    }
    for (const WedgeMode& mode : modes) {
      const auto exponent =
          measured_exponent(field, site, mode.symmetry, 2e-5 * site.reach, 1e-3 * site.reach);
      ASSERT_TRUE(exponent);
      EXPECT_NEAR(*exponent, mode.exponent.real(), 0.002) << site.wedge.angle;
    }
  }
}

/// Solutions of degrees 4 to 8 on one mesh.
std::vector<Field> solutions(const mesh::Region& region, const UnitLoad& load, double corner = 1e-6) {
  mesh::SizeRule rule;
  rule.corner = corner;
  const Model model(mesh::triangulate(region, rule), {}, steel, 1.0, {load});
  std::vector<Field> fields;
  for (int degree = 4; degree <= 8; ++degree) fields.emplace_back(model, model.solve(degree));
  return fields;
}

std::vector<SingularPlace> free_places(const mesh::Region& region, const Traction& traction) {
  return singular_places(
      region, [](const Owner&) { return WedgeEdge::free; }, traction, steel);
}

TEST(Intensity, LiesWithinItsBound) {
  const mesh::Region region = mesh::polygon({{0, 0}, {40, 0}, {40, 15}, {15, 15}, {15, 40}, {0, 40}});
  const UnitLoad load = exact_load(corner_of(region), {3.0, -2.0});
  const std::vector<Field> fields = solutions(region, load);
  const auto zero = [](const Owner&, const Point&, const Point&) -> Point { return Point::Zero(); };
  const auto places = free_places(region, zero);
  for (std::size_t used = 3; used <= fields.size(); ++used) {
    const std::vector<Field> some(fields.begin(), fields.begin() + static_cast<std::ptrdiff_t>(used));
    const auto found = place_findings(places, some, steel);
    ASSERT_EQ(found.size(), 1U);
    ASSERT_EQ(found[0].fields.size(), 2U);
    const double truth[] = {3.0, -2.0};
    for (int m = 0; m < 2; ++m) {
      const Estimate& q = found[0].fields[m].intensity;
      EXPECT_LE(std::abs(q.value - truth[m]), q.bound) << used;
      EXPECT_LT(q.bound, used == 3 ? 0.3 : 1e-2) << used;
    }
  }
  const auto found = place_findings(places, fields, steel);
  EXPECT_NEAR(found[0].fields[0].measured.value_or(0), 0.5445, 0.005);
  EXPECT_NEAR(found[0].fields[1].measured.value_or(0), 0.9085, 0.005);
  EXPECT_NE(found[0].why.find("r^-0.4555"), std::string::npos) << found[0].why;
}

// A notch of 2 degrees is a crack to three digits: single edge crack in tension,
// H. Tada, P. C. Paris and G. R. Irwin, The Stress Analysis of Cracks Handbook,
// 3rd ed. (2000) p. 2.11 (from memory; it claims 0.5 %).
TEST(Intensity, OfANotchAlmostClosedIsThatOfACrack) {
  const double a = 8, w = 20, h = 30, gap = a * std::tan(pi / 180);
  const mesh::Region region = mesh::polygon({{0, -h}, {w, -h}, {w, h}, {0, h}, {0, gap}, {a, 0}, {0, -gap}});
  const UnitLoad load{"tension",
                      [](const Owner& o, const Point&, const Point& n) -> Point {
                        return (mesh::side_of(o) == 0 || mesh::side_of(o) == 2 ? 10.0 : 0.0) * n;
                      },
                      UnitLoad::Parity::neither, UnitLoad::Parity::neither};
  const auto found = place_findings(free_places(region, load.traction), solutions(region, load), steel);
  ASSERT_EQ(found.size(), 1U);
  const double x = pi * a / (2 * w);
  const double factor =
      std::sqrt(std::tan(x) / x) * (0.752 + 2.02 * a / w + 0.37 * std::pow(1 - std::sin(x), 3)) / std::cos(x);
  const double published = factor * 10 * std::sqrt(pi * a);
  EXPECT_NEAR(found[0].fields[0].intensity.value, published, 0.006 * published);
  EXPECT_LT(found[0].fields[0].intensity.bound, 1e-3 * published);
  EXPECT_LT(std::abs(found[0].fields[1].intensity.value), 1e-4 * published);
}

// Edges that curve away from the wedge's: a hole of two arcs under tension. Discs
// of all sizes must give one value.
TEST(Intensity, AtCurvedEdgesDoesNotDependOnTheDisc) {
  mesh::Region region = mesh::polygon({{-40, -30}, {40, -30}, {40, 30}, {-40, 30}});
  const double t = pi / 4;
  for (const double side : {-1.0, 1.0}) {
    const double begin = side < 0 ? pi / 2 + t : 1.5 * pi + t;
    if (side < 0) region.loops.emplace_back();
    region.loops.back().push_back({mesh::Curve::Kind::arc,
                                   Point(0, side * 9 * std::cos(t)),
                                   Point(9, 0),
                                   Point(0, 9),
                                   begin,
                                   begin - 2 * t,
                                   {}});
    region.loops.back().back().owner = mesh::side_owner(side < 0 ? 4 : 5);
  }
  const UnitLoad load{"tension",
                      [](const Owner& o, const Point&, const Point& n) -> Point {
                        return (mesh::side_of(o) == 0 || mesh::side_of(o) == 2 ? 10.0 : 0.0) * n;
                      },
                      UnitLoad::Parity::neither, UnitLoad::Parity::neither};
  const auto fields = solutions(region, load, 1e-4);
  const auto places = free_places(region, load.traction);
  ASSERT_EQ(places.size(), 2U);
  std::vector<double> values;
  for (const double share : {0.9, 0.5, 0.2, 0.05})
    values.push_back(
        amplitudes(fields.back(), places[0].site, places[0].modes, constants, share * places[0].site.reach)[0]
            .real());
  for (const double v : values) EXPECT_NEAR(v, values[0], 1e-4 * std::abs(values[0]));
  EXPECT_GT(values[0], 10.0);
}

// A traction on the corner's own edge: of uniform stress, where nothing is singular.
TEST(Intensity, IsNothingUnderUniformStress) {
  const mesh::Region region = mesh::polygon({{0, 0}, {40, 0}, {40, 15}, {15, 15}, {15, 40}, {0, 40}});
  const Eigen::Matrix2d stress = (Eigen::Matrix2d() << 30.0, -8.0, -8.0, 12.0).finished();
  const UnitLoad load{"uniform",
                      [stress](const Owner&, const Point&, const Point& n) -> Point { return stress * n; },
                      UnitLoad::Parity::neither, UnitLoad::Parity::neither};
  const auto found = place_findings(free_places(region, load.traction), solutions(region, load), steel);
  ASSERT_EQ(found.size(), 1U);
  for (const auto& field : found[0].fields) EXPECT_NEAR(field.intensity.value, 0.0, 1e-4);
}

}  // namespace
}  // namespace raiser::solver
