// Holes in an infinite plate or half plane without a closed form of the field:
// a plate thousands of times as wide stands for it.
#include <fmt/format.h>

#include <cmath>

#include "validation/families/bars.hpp"
#include "validation/families/list.hpp"
#include "validation/families/series.hpp"

namespace raiser::validation {

namespace {

using mesh::HoleShape;
using solver::Load;

constexpr double r = 10.0;  // mm, the hole's radius or half length

/// The square plate's side over half the size of what disturbs its stress.
constexpr double breadth = 6000.0;

constexpr auto large_reading =
    "a square plate 3000 times as wide as the hole (or pair) with uniform tractions; largest edge stress "
    "over "
    "the remote stress";

/// What the plate's outline does to the answer: to a central circle
/// 1.3 (d/W)^2 under tension and 2.6 (d/W)^2 under pressure (common practice,
/// as in the comparison of single plates); three times that is allowed for.
constexpr double outline_effect = 3 * 2.6 * (2 / breadth) * (2 / breadth);

Question in_large_plate(double half, std::vector<mesh::Hole> holes, const std::vector<Load::Kind>& loads,
                        Measure measure, std::size_t hole = 0) {
  return settled(plate_under(breadth * half, breadth * half, std::move(holes), loads), std::move(measure),
                 outline_effect, hole);
}

/// Hole of radius r at c from the side y = +half width.
Question in_half_plane(double c, Load::Kind load, bool at_far_side) {
  const Point centre(0.0, breadth * c / 2 - c);
  const Measure far_side = stress_at(centre - Point(0.0, r), unit_stress);
  return in_large_plate(c, {circle(2 * r, centre)}, {load},
                        at_far_side ? far_side : largest_over(unit_stress));
}

/// A hole under pressure at q radii from the side y = +half width, and the stress on that side.
Question pressed_near_edge(double q) { return in_half_plane(q * r, Load::Kind::pressure, false); }
Question edge_near_pressure(double q) {
  const double c = q * r, size = breadth * c;
  auto problem = plate_under(size, size, {circle(2 * r, {0.0, size / 2 - c})}, {Load::Kind::pressure});
  problem.plate = watched(std::move(problem.plate), mesh::rectangle::top);
  return settled(std::move(problem), largest_over(unit_stress, 1), outline_effect, 1);
}

/// Two holes L apart along y; the asked one is the upper.
Question of_two(double l_over_d, const std::vector<Load::Kind>& loads, bool at_crown) {
  const Point half(0.0, l_over_d * r);
  auto lower = circle(2 * r, -half);
  lower.name = "lower";
  return in_large_plate(
      half.y() + r, {lower, circle(2 * r, half)}, loads,
      at_crown ? stress_at(half + Point(r, 0.0), unit_stress, 1) : largest_over(unit_stress, 1), 1);
}

}  // namespace

Family circle_half_plane() {
  Family f{"circle-half-plane",
           "A11",
           "Circular hole of radius r at c from the edge of a half plane, tension along the edge",
           "r/c: radius over distance to the edge",
           "Kt gross, at the near side",
           "a square plate 6000 c wide with the hole near one side; edge stress at the side named over the "
           "remote "
           "stress",
           "a polynomial of the sixth degree fitted to a few points: it waves about the true curve",
           1e-5,
           {},
           {}};
  for (const bool is_near : {true, false}) {
    const std::string series = is_near ? "near side" : "far side";
    const Reference source = is_near ? Reference::half_plane : Reference::half_plane_far;
    const auto formula = is_near ? half_plane_near : half_plane_far;
    for (const double q : {0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9}) {
      f.points.push_back({series,
                          {{"r/c", q}},
                          {{source, formula(q)}},
                          in_half_plane(r / q, Load::Kind::tension, !is_near),
                          q == 0.5});
    }
    f.curves.push_back({source, series, formula, 0.0, 0.9, false, {}});
  }
  return f;
}

Family two_circles() {
  Family f{"two-circles",
           "A12",
           "Two equal circular holes of diameter d, centres L apart, infinite plate",
           "L/d: distance of centres over diameter",
           "Kt gross; along: at the crown",
           large_reading,
           "Ling's table is exact to its digits (recalled); along the line of centres its point is the "
           "crown, and the "
           "true peak beside it is up to 1 % higher",
           1e-5,
           {},
           {}};
  struct Way {
    const char* name;
    Pair pair;
    std::vector<Load::Kind> loads;
    std::vector<double> ratios;
  };
  const std::vector<Way> ways{
      {"across the line of centres", Pair::across, {Load::Kind::tension}, {1.5, 2, 3, 5, 6, 8}},
      {"along the line of centres", Pair::along, {Load::Kind::transverse}, {1.5, 2, 3, 5, 6, 8}},
      {"equal both ways",
       Pair::biaxial,
       {Load::Kind::tension, Load::Kind::transverse},
       {1.5, 2, 3, 4, 5, 6, 8}}};
  for (const Way& way : ways) {
    for (const double ratio : way.ratios) {
      f.points.push_back({way.name,
                          {{"L/d", ratio}},
                          {{Reference::ling, *ling(way.pair, ratio)}},
                          of_two(ratio, way.loads, way.pair == Pair::along),
                          ratio == 2});
    }
    f.curves.push_back({Reference::ling, way.name, [pair = way.pair](double x) { return ling(pair, x); }, 1.5,
                        8, true, way.ratios});
  }
  return f;
}

Family two_circles_along() {
  Family f{
      "two-circles-along",
      "A13",
      "Two equal circular holes of diameter d, centres L apart, infinite plate, tension along their line",
      "d/L: diameter over distance of centres",
      "Kt gross, largest edge stress",
      large_reading,
      "a parabola fitted to the crown's stress; the true peak lies beside the crown",
      1e-5,
      {},
      {}};
  for (const double x : {0.125, 0.2, 0.25, 1.0 / 3, 0.4, 0.5, 2.0 / 3}) {
    f.points.push_back({"",
                        {{"d/L", x}},
                        {{Reference::two_along_fit, two_along_fit(x)}},
                        of_two(1 / x, {Load::Kind::transverse}, false),
                        x == 0.5});
  }
  f.curves.push_back({Reference::two_along_fit, "", two_along_fit, 0.0, 0.67, false, {}});
  return f;
}

Family slot_infinite() {
  Family f{"slot-infinite",
           "A15",
           "Slot of length 2a across the load with round ends of radius r, infinite plate, tension",
           "a/r: half length over end radius",
           "Kt gross",
           large_reading,
           "an ellipse of the same length and end radius in the slot's place: an estimate, not a solution",
           1e-5,
           {},
           {}};
  for (const double ratio : {1.0, 1.5, 2.0, 4.0, 8.0, 16.0}) {
    const auto hole = ratio == 1 ? circle(2 * r) : sized_hole(HoleShape::slot, 2 * r / ratio, 2 * r);
    f.points.push_back({"",
                        {{"a/r", ratio}},
                        {{Reference::slot_estimate, slot_estimate(ratio)}},
                        in_large_plate(r, {hole}, {Load::Kind::tension}, largest_over(unit_stress)),
                        ratio == 4});
  }
  f.curves.push_back({Reference::slot_estimate, "", slot_estimate, 1.0, 16.0, false, {}});
  return f;
}

Family rounded_rectangle_infinite() {
  Family f{"rounded-rectangle",
           "A16",
           "Rectangular hole 2a across and 2b along the load, corner radius r, infinite plate, tension",
           "r/b: corner radius over half side along the load",
           "Kt gross",
           large_reading,
           "a cubic in b/a with coefficients fitted in r/b to a chart of conformal-mapping results",
           1e-5,
           {},
           {}};
  for (const double ratio : {0.3, 0.5, 0.7, 1.0}) {
    const std::string series = fmt::format("b/a {:g}", ratio);
    for (const double x : {0.2, 0.4, 0.6, 0.8, 1.0}) {
      const double b = ratio * r;
      const bool is_slot = x == 1.0;
      const auto rounded = sized_hole(HoleShape::rounded_rectangle, 2 * b, 2 * r, x * b);
      const auto round = ratio == 1 ? circle(2 * r) : sized_hole(HoleShape::slot, 2 * b, 2 * r);
      f.points.push_back({series,
                          {{"r/b", x}, {"b/a", ratio}},
                          {{Reference::rounded_rectangle, rounded_rectangle(ratio, x)}},
                          in_large_plate(1.5 * r, {is_slot ? round : rounded}, {Load::Kind::tension},
                                         largest_over(unit_stress)),
                          ratio == 0.5 && x == 0.4});
    }
    f.curves.push_back({Reference::rounded_rectangle,
                        series,
                        [ratio](double x) { return rounded_rectangle(ratio, x); },
                        0.15,
                        1.0,
                        false,
                        {}});
  }
  return f;
}

Family rounded_square_infinite() {
  Family f{
      "rounded-square-biaxial",
      "A17",
      "Square hole of side s with corner radius r, infinite plate, equal tension both ways",
      "r/s: corner radius over side",
      "Kt gross",
      large_reading,
      "no published table is known to us: converged finite elements of another code, in a plate of 60 to 120 "
      "radii, which is 0.03 % too high",
      1e-5,
      {},
      {}};
  std::vector<double> radii{0.05, 0.1, 0.2, 0.3, 0.4, 0.5};
  for (const double x : radii) {
    const auto hole =
        x == 0.5 ? circle(2 * r) : sized_hole(HoleShape::rounded_rectangle, 2 * r, 2 * r, 2 * r * x);
    f.points.push_back({"",
                        {{"r/s", x}},
                        {{Reference::rounded_square_biaxial, *rounded_square_biaxial(x)}},
                        in_large_plate(1.5 * r, {hole}, {Load::Kind::tension, Load::Kind::transverse},
                                       largest_over(unit_stress)),
                        x == 0.2});
  }
  f.curves.push_back(
      {Reference::rounded_square_biaxial, "", rounded_square_biaxial, 0.05, 0.5, true, std::move(radii)});
  return f;
}

Family pressure_half_plane() {
  Family f{
      "pressure-half-plane",
      "A29",
      "Circular hole of radius r under pressure p at c from the edge of a half plane",
      "c/r: distance to the edge over radius",
      "largest stress on the edge named over p",
      "a square plate 6000 c wide with the hole near one side; largest stress on the hole's edge and on that "
      "side over p",
      "the formulas are exact, the plate finite",
      1e-7,
      {},
      {}};
  for (const bool is_hole : {true, false})
    add_series(f, {is_hole ? "hole" : "straight edge opposite",
                   "c/r",
                   {1.2, 1.5, std::sqrt(3.0), 2.0, 3.0, 5.0},
                   {2.0},
                   [is_hole](double q) { return is_hole ? pressed_near_edge(q) : edge_near_pressure(q); },
                   {{Reference::pressure_half_plane, is_hole ? pressure_rim : pressure_edge}},
                   1.2,
                   5.0});
  return f;
}

Family pressure_ring_family() {
  Family f{"pressure-ring",
           "A29",
           "Ring of radii a and b under pressure p inside",
           "b/a: outer over inner radius",
           "largest stress on the inner edge over p",
           "the ring itself; largest edge stress over p",
           "the source is exact: rounding and the bound only",
           1e-8,
           {},
           {}};
  add_series(f, {"",
                 "b/a",
                 {1.2, 1.5, 2.0, 3.0, 5.0, 10.0},
                 {2.0},
                 [](double ratio) {
                   const double outer = 2 * r * ratio;
                   return settled({elliptic_ring({outer, outer}, {2 * r, 2 * r}),
                                   family_material,
                                   {unit_load(Load::Kind::pressure)}},
                                  largest_over(unit_stress));
                 },
                 {{Reference::pressure_ring, pressure_ring}},
                 1.2,
                 10.0});
  return f;
}

}  // namespace raiser::validation
