// Notches in the edges of bars and of a half plane.
#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "validation/families/bars.hpp"
#include "validation/families/list.hpp"
#include "validation/families/question.hpp"
#include "validation/published/edge_raisers.hpp"

namespace raiser::validation {

namespace {

using solver::Load;

constexpr double D = 100.0;       // mm, width of the bar
constexpr double length = 6 * D;  // of the bar
constexpr double s = unit_stress;

constexpr auto bar_reading =
    "a bar six widths long, uniform or linear traction on its ends; largest stress on the notch's edge over "
    "the "
    "nominal stress";
constexpr auto fit_deviation =
    "a cubic in the depth with coefficients fitted in h/r to photoelastic charts; where our bound is a "
    "thousandth "
    "of the difference the fit is what is off";

Question bar_question(const NotchForm& notch, bool both, Load::Kind load, double nominal) {
  solver::Problem problem{notched_bar(length, D, notch, both), family_material, {unit_load(load)}};
  const std::size_t at = upper_raiser(problem.plate);
  return settled(std::move(problem), largest_over(nominal, at), std::exp(-4.2 * length / 2 / D), at);
}

/// One of the four families of U notches in a bar.
struct Bar {
  Reference source;
  double (*formula)(double q, double x);
  bool both;
  Load::Kind load;
  double (*nominal)(double x);  ///< net over gross stress
  std::vector<double> sharpness, depths;
};

void add(Family& f, const Bar& bar) {
  for (const double q : bar.sharpness) {
    const std::string series = fmt::format("h/r {:g}", q);
    for (const double x : bar.depths) {
      const double h = bar.both ? x * D / 2 : x * D;
      f.points.push_back({series,
                          {{bar.both ? "2h/D" : "h/D", x}, {"h/r", q}},
                          {{bar.source, bar.formula(q, x)}},
                          bar_question({h, h / q}, bar.both, bar.load, s * bar.nominal(x)),
                          x == 0.3 && (q == 1 || q == 4)});
    }
    f.curves.push_back({bar.source,
                        series,
                        [=, formula = bar.formula](double x) { return formula(q, x); },
                        0.05,
                        bar.depths.back(),
                        false,
                        {}});
  }
}

Family bar_family(const char* id, const char* record, const char* title, bool both, const char* ordinate) {
  Family f;
  f.id = id;
  f.records = record;
  f.title = title;
  f.abscissa = both ? "2h/D: both depths over width" : "h/D: depth over width";
  f.ordinate = ordinate;
  f.reading = bar_reading;
  f.deviation = fit_deviation;
  return f;
}

double pair_tension(double x) { return 1 / (1 - x); }
double bending(double x) { return 1 / ((1 - x) * (1 - x)); }

/// A bar cut out from between deep hyperbolic notches, across their net section: its
/// own notches, half ellipses three times as blunt, touch their roots from within the
/// material, and the field's exact traction acts on all of its outline.
Question deep_question(double q, bool is_bending) {
  constexpr double half = D / 2, depth = 0.3 * half, blunt = 3;
  const DeepNotches notches(half, half / q);
  const mesh::Plate plate =
      notched_bar(4 * half, 2 * (half + depth), {depth, blunt * half / q, 0.0, true}, true);
  const auto field = [notches, is_bending](const Point& x) {
    return is_bending ? notches.bending(x) : notches.tension(x);
  };
  return exact_field(plate, placed(field, Point::Zero(), std::numbers::pi / 2),
                     solver::Quantity::largest_edge_stress, 1.0, family_material, upper_raiser(plate));
}

}  // namespace

Family deep_notches() {
  Family f{"notch-deep",
           "A23",
           "Infinitely deep hyperbolic notches on both sides, tension and bending",
           "a/rho: half the net width over the root radius",
           "Kt net, at the root: on P/(2 a t), on 6M/(t (2a)^2)",
           "a bar cut out from between the notches, its outline inside the material and touching both roots, "
           "on which the field's exact traction acts; largest edge stress over the nominal one",
           "the source is exact: rounding and the bound only",
           9e-7,  // as close as the highest degree comes
           {},
           {}};
  for (const bool is_bending : {false, true}) {
    const std::string series = is_bending ? "bending" : "tension";
    const auto source = is_bending ? Reference::neuber_deep_bending : Reference::neuber_deep_tension;
    const auto formula = is_bending ? neuber_deep_bending : neuber_deep_tension;
    for (const double q : {1.0, 2.0, 5.0, 10.0, 25.0})
      f.points.push_back(
          {series, {{"a/rho", q}}, {{source, formula(q)}}, deep_question(q, is_bending), q == 5});
    f.curves.push_back({source, series, formula, 1, 25, false, {}});
  }
  return f;
}

Family notch_pair_tension() {
  Family f = bar_family("notch-u-pair-tension", "A18",
                        "Opposite U notches of depth h and root radius r, bar of width D, tension", true,
                        "Kt net, on P/(t(D-2h))");
  add(f, {Reference::u_pair_tension,
          u_pair_tension,
          true,
          Load::Kind::tension,
          pair_tension,
          {0.25, 0.5, 1, 2, 4, 10},
          {0.1, 0.3, 0.5, 0.7}});
  return f;
}

Family notch_pair_bending() {
  Family f = bar_family("notch-u-pair-bending", "A19",
                        "Opposite U notches of depth h and root radius r, bar of width D, bending", true,
                        "Kt net, on 6M/(t(D-2h)^2)");
  add(f, {Reference::u_pair_bending,
          u_pair_bending,
          true,
          Load::Kind::bending,
          bending,
          {0.25, 0.5, 1, 2, 4, 10},
          {0.1, 0.3, 0.5, 0.7}});
  return f;
}

Family notch_single_tension() {
  Family f = bar_family("notch-u-single-tension", "A20",
                        "One U notch of depth h and root radius r, bar of width D, uniform far tension",
                        false, "Kt net, on P/A + M c/I of the net section");
  f.deviation =
      "the net section bends under uniform tension, and only with that bending in the nominal stress does "
      "the fit "
      "work; on P/(t(D-h)) alone the factor is up to four times as large";
  add(f, {Reference::u_single_tension,
          u_single_tension,
          false,
          Load::Kind::tension,
          u_single_nominal,
          {0.5, 1, 2, 4, 10},
          {0.1, 0.2, 0.3, 0.5}});
  return f;
}

Family notch_single_bending() {
  Family f = bar_family("notch-u-single-bending", "A21",
                        "One U notch of depth h and root radius r, bar of width D, bending", false,
                        "Kt net, on 6M/(t(D-h)^2)");
  f.deviation = "a fit to photoelastic tests; 6 to 15 % high, on the safe side, for blunt notches";
  add(f, {Reference::u_single_bending,
          u_single_bending,
          false,
          Load::Kind::bending,
          bending,
          {0.5, 1, 2, 4, 10},
          {0.1, 0.2, 0.3, 0.5}});
  return f;
}

Family notch_half_plane() {
  Family f{"notch-half-plane",
           "A22",
           "Notch of depth t and root radius r in the edge of a half plane, tension along the edge",
           "t/r: depth over root radius",
           "Kt gross",
           "a bar 2000 depths wide and long with the notch in one edge; largest stress on its edge over the "
           "gross stress",
           "straight lines in the root of t/r through computed points; the semicircle is exact to its digits",
           1e-5,
           {},
           {}};
  constexpr double t = 10.0, size = 2000 * t;
  for (const bool is_ellipse : {false, true}) {
    const std::string series = is_ellipse ? "half ellipse" : "U notch";
    const Reference source = is_ellipse ? Reference::ellipse_half_plane : Reference::u_half_plane;
    const auto formula = is_ellipse ? ellipse_half_plane : u_half_plane;
    for (const double ratio : {1.0, 2.0, 4.0, 9.0, 16.0}) {
      solver::Problem problem{notched_bar(size, size, {t, t / ratio, 0.0, is_ellipse}, false),
                              family_material,
                              {unit_load(Load::Kind::tension)}};
      std::vector<Cited> cited{{source, formula(ratio)}};
      if (ratio == 1 && is_ellipse)
        cited.push_back({Reference::semicircle_half_plane, semicircle_half_plane});
      // The edge crack of the same depth feels the width as (1 + 7 (t/D)^2), nearly.
      f.points.push_back({series,
                          {{"t/r", ratio}},
                          std::move(cited),
                          settled(std::move(problem), largest_over(s), 1e-5),
                          ratio == 4 || (ratio == 1 && is_ellipse)});
    }
    f.curves.push_back({source, series, formula, 1, 25, false, {}});
  }
  f.curves.push_back({Reference::semicircle_half_plane,
                      "half ellipse",
                      [](double) { return std::optional(semicircle_half_plane); },
                      1,
                      1,
                      true,
                      {1.0}});
  return f;
}

Family notch_v_pair() {
  Family f{"notch-v-pair",
           "A24",
           "Opposite V notches of depth h and root radius r, opening angle alpha, bar of width D, tension",
           "alpha, degrees: opening angle",
           "Kt net, on P/(t(D-2h))",
           bar_reading,
           "a parabola in the factor of the U notch (taken as computed) fitted to two depths, within a range "
           "of that factor",
           1e-5,
           {},
           {}};
  struct Depth {
    double x, q, ktu;  ///< the U notch's factor computed by another code
  };
  for (const Depth& depth : {Depth{0.398, 4, 3.2473}, Depth{0.398, 10, 4.8935}, Depth{0.667, 10, 3.1238}}) {
    const bool is_shallow = depth.x < 0.5;
    const auto formula = is_shallow ? v_pair_shallow : v_pair_deep;
    const Reference source = is_shallow ? Reference::v_pair : Reference::v_pair_deep;
    const std::string series = fmt::format("2h/D {:g}, h/r {:g}", depth.x, depth.q);
    const double h = depth.x * D / 2;
    for (const double degrees : {60.0, 90.0, 120.0})
      f.points.push_back({series,
                          {{"alpha", degrees}, {"Ktu", depth.ktu}, {"2h/D", depth.x}},
                          {{source, formula(depth.ktu, degrees)}},
                          bar_question({h, h / depth.q, degrees * std::numbers::pi / 180}, true,
                                       Load::Kind::tension, s / (1 - depth.x)),
                          degrees == 90 && depth.q == 4});
    f.curves.push_back({source, series, [=](double x) { return formula(depth.ktu, x); }, 60, 120, false, {}});
  }
  return f;
}

}  // namespace raiser::validation
