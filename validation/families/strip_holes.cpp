// One hole in a long strip of width W.
#include <fmt/format.h>

#include <cmath>

#include "validation/families/bars.hpp"
#include "validation/families/list.hpp"
#include "validation/families/series.hpp"

namespace raiser::validation {

namespace {

using solver::Load;

constexpr double W = 100.0;       // mm
constexpr double length = 6 * W;  // of the strip

constexpr auto strip_reading =
    "a strip six widths long, uniform traction on its ends; largest edge stress over the nominal stress";

/// A self-balanced disturbance at an end of the strip fades as exp(-4.2 x/W):
/// J. Fadle, Ing.-Archiv 11 (1940), from memory.
double end_effect(double half_along) { return std::exp(-4.2 * (length / 2 - half_along) / W); }

Question strip_question(const mesh::Hole& hole, Load::Kind kind, double nominal) {
  return settled(plate_under(length, W, {hole}, {kind}), largest_over(nominal),
                 end_effect(std::max(hole.length, hole.width) / 2));
}

}  // namespace

Family circle_strip_tension() {
  Family f{"circle-strip-tension",
           "A02-A05",
           "Circular hole of diameter d in the middle of a strip of width W, tension",
           "d/W: diameter over width",
           "Kt net, on P/((W-d)t)",
           strip_reading,
           "Howland's table was computed by hand from a series and recalled here; the three formulas are "
           "fits to it, "
           "and share its few tenths of a per cent on the low side. Heywood's is good to d/W 0.3 only.",
           1e-5,
           {},
           {}};
  for (const double x : {0.02, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9}) {
    FamilyPoint point{"",
                      {{"d/W", x}},
                      {},
                      strip_question(circle(x * W), Load::Kind::tension, unit_stress / (1 - x)),
                      x == 0.5 || x == 0.2};
    if (const auto table = howland(x); table && x >= 0.1) point.cited.push_back({Reference::howland, *table});
    point.cited.push_back({Reference::heywood, heywood(x)});
    point.cited.push_back({Reference::roark_circle, roark_circle(x)});
    point.cited.push_back({Reference::peterson_circle, peterson_circle(x)});
    f.points.push_back(std::move(point));
  }
  f.curves = {{Reference::howland, "", howland, 0.0, 0.5, true, {0.1, 0.2, 0.3, 0.4, 0.5}},
              {Reference::heywood, "", heywood, 0.0, 1.0, false, {}},
              {Reference::roark_circle, "", roark_circle, 0.0, 1.0, false, {}},
              {Reference::peterson_circle, "", peterson_circle, 0.0, 1.0, false, {}}};
  return f;
}

namespace {

/// The largest stress on the strip's upper edge, which positive bending pulls.
Question outer_edge_question(double x) {
  auto problem = plate_under(length, W, {circle(x * W)}, {Load::Kind::bending});
  problem.plate = watched(std::move(problem.plate), mesh::rectangle::top);
  return settled(std::move(problem), largest_over(unit_stress * bending_edge_nominal(x), 1),
                 end_effect(x * W / 2), 1);
}

}  // namespace

Family circle_strip_bending() {
  Family f{
      "circle-strip-bending",
      "A06",
      "Circular hole of diameter d in the middle of a strip of width W, bending in the plane",
      "d/W: diameter over width",
      "Kt on 6 M c/((W^3-d^3) t), c = d or W",
      "a strip six widths long, linear traction on its ends; largest stress on the hole's edge and on the "
      "strip's upper edge over the nominal stress",
      "Kt = 2 is the exact value for a small hole (a linear field) kept for all widths; the nominal stress "
      "takes up most of the width's effect, not all. The outer edge's largest stress lies half a width "
      "beside the hole, where the nominal stress of the net section does not hold",
      1e-5,
      {},
      {}};
  const std::vector<double> shares{0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8};
  add_series(f, {"hole",
                 "d/W",
                 shares,
                 {0.4},
                 [](double x) {
                   return strip_question(circle(x * W), Load::Kind::bending,
                                         unit_stress * bending_nominal(x));
                 },
                 {{Reference::bending_circle, [](double) { return bending_factor; }}},
                 0.0,
                 0.8});
  add_series(f, {"outer edge",
                 "d/W",
                 shares,
                 {0.4},
                 outer_edge_question,
                 {{Reference::bending_outer_edge, [](double) { return bending_edge_factor; }}},
                 0.0,
                 0.8});
  return f;
}

Family ellipse_strip() {
  Family f{"ellipse-strip",
           "A14",
           "Elliptical hole, 2a across and 2b along the load, in the middle of a strip of width W, tension",
           "2a/W: axis across the load over width",
           "Kt net, on P/((W-2a)t)",
           strip_reading,
           "a cubic in 2a/W through Isida's series, with coefficients that are themselves fits in a/b: it "
           "waves about "
           "the true curve",
           1e-5,
           {},
           {}};
  for (const double ratio : {0.5, 1.0, 2.0, 4.0, 8.0}) {
    const std::string series = fmt::format("a/b {:g}", ratio);
    for (const double x : {0.1, 0.3, 0.5, 0.7}) {
      const double across = x * W;
      const auto hole = sized_hole(mesh::HoleShape::ellipse, across / ratio, across);
      f.points.push_back({series,
                          {{"2a/W", x}, {"a/b", ratio}},
                          {{Reference::roark_ellipse, roark_ellipse(ratio, x)}},
                          strip_question(hole, Load::Kind::tension, unit_stress / (1 - x)),
                          ratio == 4 && x == 0.3});
    }
    f.curves.push_back({Reference::roark_ellipse,
                        series,
                        [ratio](double x) { return roark_ellipse(ratio, x); },
                        0.0,
                        0.7,
                        false,
                        {}});
  }
  return f;
}

namespace {

/// Hole of radius q c at the distance c = share W from the edge y = +W/2.
Question eccentric_question(double q, double share) {
  const double c = share * W, radius = q * c;
  return strip_question(circle(2 * radius, {0.0, W / 2 - c}), Load::Kind::tension, unit_stress);
}

}  // namespace

Family circle_eccentric() {
  Family f{
      "circle-eccentric",
      "A09",
      "Circular hole of radius r at c from the near edge of a strip of width W, tension",
      "r/c: radius over distance to the near edge",
      "Kt gross, at the near side",
      strip_reading,
      "one cubic in r/c, that of a central hole, stands for every c/W; the strip solved is free to bend, as "
      "Sjostrom's is. Beyond r/c 0.5 the formula is low by more than any margin that it is used with.",
      1e-5,
      {},
      {}};
  for (const double share : {0.1, 0.2, 0.3, 0.4}) {
    const std::string series = fmt::format("c/W {:g}", share);
    for (const double q : {0.2, 0.5, 0.7})
      f.points.push_back({series,
                          {{"r/c", q}, {"c/W", share}},
                          {{Reference::roark_eccentric, roark_eccentric(q, share)}},
                          eccentric_question(q, share),
                          share == 0.3 && q == 0.5});
    f.curves.push_back({Reference::roark_eccentric,
                        series,
                        [share](double q) { return roark_eccentric(q, share); },
                        0.05,
                        0.75,
                        false,
                        {}});
  }
  return f;
}

Family circle_eccentric_chart() {
  Family f{"circle-eccentric-chart",
           "A10",
           "Circular hole of radius r between the near edge at c and the far edge at e, tension",
           "r/c: radius over distance to the near edge",
           "Kt gross, at the near side",
           strip_reading,
           "read off a printed chart, to about half a per cent",
           1e-5,
           {},
           {}};
  const std::vector<std::pair<double, std::vector<double>>> read{
      {1.0, {0.2, 0.25}}, {2.0, {0.25, 0.3, 0.4, 0.45}}, {4.0, {0.25, 0.3, 0.4, 0.45}}};
  for (const auto& [ratio, radii] : read) {
    const std::string series = fmt::format("e/c {:g}", ratio);
    for (const double q : radii)
      f.points.push_back({series,
                          {{"r/c", q}, {"e/c", ratio}},
                          {{Reference::sjostrom_eccentric, *sjostrom_eccentric(q, ratio)}},
                          eccentric_question(q, 1 / (1 + ratio)),
                          ratio == 2 && q == 0.3});
    f.curves.push_back({Reference::sjostrom_eccentric, series,
                        [r = ratio](double q) { return sjostrom_eccentric(q, r); }, 0.2, 0.45, true, radii});
  }
  return f;
}

}  // namespace raiser::validation
