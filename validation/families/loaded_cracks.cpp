// Cracks whose faces are loaded on a part of their length.
#include <cmath>

#include "mesh/region/breaks.hpp"
#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/sequence.hpp"
#include "validation/families/list.hpp"
#include "validation/families/series.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::validation {

namespace {

using mesh::Owner;

constexpr double b = 50.0;    // mm, half the strip's width
constexpr double P = 1000.0;  // N for each mm of thickness

/// The forces are spread over this part of the crack's length: point forces need
/// their own stress, which no degree resolves.
constexpr double share = 0.01;

/// What that does: in the infinite plate the force at x has K in proportion to
/// 1/sqrt(1 - (x/a)^2), the mean of which over |x| < share a is larger by this.
constexpr double spread_effect = share * share / 6;

/// Forces that open the crack at its middle, on a quarter of the strip.
Ours opened_in_the_middle(double a_over_b, double tolerance) {
  const double a = a_over_b * b, half = share * a;
  mesh::Plate plate{12 * b, 2 * b, 1.0, {}};
  plate.cracks = {{"crack", {{0, -a}, {0, a}}, false, {}}};
  const Owner face{Owner::Kind::crack, 0};
  const auto push = [=](const Owner& owner, const Point& x, const Point& n) -> Point {
    return (owner == face && std::abs(x.y()) < half ? -P / (2 * half) : 0.0) * n;
  };
  const mesh::Mirrors both{true, true};
  const mesh::Region quarter =
      mesh::broken(mesh::cut(mesh::trace(plate), both), {{face, {0, half}, 0.1 * half}});
  mesh::SizeRule rule;
  rule.growth = rule.crack_growth = 0.7;
  rule.tip_sectors = 8;
  rule.tip_rings = 6;
  rule.singular = {{0, half}};  // the traction ends there
  using Parity = solver::UnitLoad::Parity;
  const solver::Model model(mesh::triangulate(quarter, rule), both, family_material, plate.thickness,
                            {{"forces", push, Parity::even, Parity::even}});
  Ours ours = with_rising_degree(model, plate, {solver::Quantity::stress_intensity, 0, tolerance, ""},
                                 P / std::sqrt(b));
  ours.model = spread_effect;
  return ours;
}

}  // namespace

Family crack_point_forces() {
  Family f{"crack-point-forces",
           "B19",
           "Crack of length 2a in the middle of a strip of width 2b, opened by forces P on the middle of its "
           "faces",
           "a/b: crack length over width",
           "K_I t sqrt(b)/P",
           "a quarter of a strip six widths long; the forces spread over 1 % of the crack's length, which "
           "raises K by 2e-5",
           "an interpolation between the limits of a small and of a deep crack",
           1e-5,
           {},
           {}};
  add_series(f,
             {"",
              "a/b",
              {0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9},
              {0.5},
              [](double x) { return [x](double tolerance) { return opened_in_the_middle(x, tolerance); }; },
              {{Reference::point_forces, point_forces}},
              0.05,
              0.95});
  return f;
}

}  // namespace raiser::validation
