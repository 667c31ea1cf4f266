#include "solver/corner/intensity.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "mesh/triangulate/triangulate.hpp"
#include "tests/mesh/polygon.hpp"

namespace raiser::solver {
namespace {

constexpr double pi = std::numbers::pi;

const HookeLaw steel{210000.0, 0.3, PlaneState::stress};
const PlaneConstants constants = plane_constants(steel);

/// The one re-entrant corner of a region, with free edges.
CornerSite corner_of(const mesh::Region& region) {
  for (const mesh::Vertex& v : mesh::vertices(region))
    if (v.angle > pi + mesh::least_corner) return {v, {v.angle}, {}};
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
      const auto found = amplitudes(field, site, modes, constants, share * site.vertex.reach);
      for (std::size_t m = 0; m < modes.size(); ++m) {
        EXPECT_NEAR(found[m].real(), amplitude[m], 3e-5) << site.wedge.angle << " " << share;
      }
    }
    for (const WedgeMode& mode : modes) {
      const auto exponent =
          measured_exponent(field, site, mode.symmetry, 2e-5 * site.vertex.reach, 1e-3 * site.vertex.reach);
      ASSERT_TRUE(exponent);
      EXPECT_NEAR(*exponent, mode.exponent.real(), 0.002) << site.wedge.angle;
    }
  }
}

}  // namespace
}  // namespace raiser::solver
