// Cracks in an infinite plate or half plane, by themselves and at a hole: a
// plate thousands of times as wide stands for it.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "solver/crack/tip_scan.hpp"
#include "validation/families/list.hpp"
#include "validation/families/series.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::validation {

namespace {

using mesh::Crack;
using solver::Load;

constexpr double breadth = 6000.0;  // of the plate, in half sizes of what is in it
constexpr double s = unit_stress;
constexpr double degree = std::numbers::pi / 180;

/// As for holes: what the outline does to the answer, with three times that of a circle.
constexpr double outline_effect = 3 * 2.6 * (2 / breadth) * (2 / breadth);

constexpr auto free_reading =
    "a square plate 3000 times as wide as what is in it, with uniform tractions; interaction integral over "
    "rings about the tip";

double unit_k(double a) { return s * std::sqrt(std::numbers::pi * a); }

solver::Problem large_plate(double half, std::vector<mesh::Hole> holes, std::vector<Crack> cracks,
                            const std::vector<Load::Kind>& loads) {
  auto problem = plate_under(breadth * half, breadth * half, std::move(holes), loads);
  problem.plate.cracks = std::move(cracks);
  return problem;
}

}  // namespace

namespace {

constexpr double half_length = 10.0;  // mm
const std::vector<double> angles{15.0, 30.0, 45.0, 60.0, 75.0, 90.0};

/// A crack at the angle beta (degrees) to a tension along x.
solver::Problem inclined_plate(double beta) {
  const Point end = half_length * Point(std::cos(beta * degree), std::sin(beta * degree));
  return large_plate(half_length, {}, {{"crack", {-end, end}, false, {}}}, {Load::Kind::tension});
}

double inclined_one(double beta) { return inclined(beta * degree).first; }
double inclined_two(double beta) { return inclined(beta * degree).second; }
/// sigma along less sigma across.
double inclined_t(double beta) { return beta == 45.0 ? 0.0 : std::cos(2 * beta * degree); }

/// Size of the kink angle in degrees where the hoop stress is largest.
double inclined_kink(double beta) {
  return std::abs(solver::kink_angle(inclined_one(beta), inclined_two(beta)).value_or(0.0)) / degree;
}

/// The same from our K, with what their bounds leave open.
Measure kink_in_degrees() {
  return [](const solver::Solution& solution) -> std::optional<solver::Estimate> {
    const solver::TipFindings& tip = solution.combined.tips.front();
    const auto angle = solver::kink_angle(tip.k_one.value, tip.k_two.value);
    if (!angle) return std::nullopt;
    double off = 0.0;
    for (const double one : {-1.0, 1.0})
      for (const double two : {-1.0, 1.0}) {
        const auto other = solver::kink_angle(tip.k_one.value + one * tip.k_one.bound,
                                              tip.k_two.value + two * tip.k_two.bound);
        if (!other) return std::nullopt;
        off = std::max(off, std::abs(*other - *angle));
      }
    return solver::Estimate{std::abs(*angle) / degree, off / degree};
  };
}

}  // namespace

Family crack_inclined() {
  Family f{"crack-inclined",
           "B01, B08",
           "Crack of length 2a at the angle beta to the tension, infinite plate",
           "beta, degrees: angle between tension and crack",
           "K/(sigma sqrt(pi a)) and T/sigma; off relative to sigma where T is smaller",
           free_reading,
           "the formulas are exact, the plate finite",
           1e-7,
           {},
           {}};
  const std::vector<double> oblique(angles.begin(), angles.end() - 1);  // at 90 degrees K_II is 0
  const auto k_one = [](double beta) {
    return settled_tip(inclined_plate(beta), k_one_over(unit_k(half_length)), outline_effect);
  };
  // K_II is positive as published for a crack turned clockwise from the tension.
  const auto k_two = [](double beta) {
    return settled_tip(inclined_plate(beta), k_two_size_over(unit_k(half_length)), outline_effect);
  };
  const auto t = [](double beta) {
    return no_finer_than(
        1e-5, settled_tip(inclined_plate(beta), t_over(s), outline_effect, solver::Quantity::t_stress));
  };
  add_series(f, {"K_I", "beta", angles, {45}, k_one, {{Reference::inclined_crack, inclined_one}}, 15, 90});
  add_series(f, {"K_II", "beta", oblique, {45}, k_two, {{Reference::inclined_crack, inclined_two}}, 15, 90});
  add_series(f, {"T", "beta", angles, {}, t, {{Reference::through_crack, inclined_t}}, 15, 90, {}, 1.0});
  return f;
}

Family crack_kink() {
  Family f{
      "crack-kink",
      "B08",
      "Kink angle of a crack at the angle beta to the tension, infinite plate, by the largest hoop stress",
      "beta, degrees: angle between tension and crack",
      "size of the kink angle, degrees",
      free_reading,
      "the formula is exact for the criterion, the plate finite",
      1e-6,
      {},
      {}};
  const std::vector<double> oblique(angles.begin(), angles.end() - 1);
  add_series(
      f, {"",
          "beta",
          oblique,
          {45},
          [](double beta) { return settled_tip(inclined_plate(beta), kink_in_degrees(), outline_effect); },
          {{Reference::inclined_crack, inclined_kink}},
          10,
          90});
  return f;
}

namespace {

constexpr double R = 10.0;  // mm, of the hole

/// One crack at the upper side of the hole or two, of length q R, across the tension.
std::vector<Crack> at_hole(HoleCracks cracks, double q) {
  std::vector<Crack> list{{"upper", {{0, R}, {0, R + q * R}}, true, {}}};
  if (cracks == HoleCracks::two) list.push_back({"lower", {{0, -R}, {0, -R - q * R}}, true, {}});
  return list;
}

Question hole_question(HoleCracks cracks, Tension tension, double q) {
  std::vector<Load::Kind> loads{Load::Kind::tension};
  if (tension == Tension::biaxial) loads.push_back(Load::Kind::transverse);
  return settled_tip(large_plate(R * (1 + q), {circle(2 * R)}, at_hole(cracks, q), loads),
                     k_one_over(unit_k(q * R)), outline_effect);
}

Family hole_family(HoleCracks cracks, Tension tension) {
  const bool is_one = cracks == HoleCracks::one, is_biaxial = tension == Tension::biaxial;
  Family f;
  f.id = fmt::format("crack-hole-{}{}", is_one ? "one" : "two", is_biaxial ? "-biaxial" : "");
  f.records = is_biaxial ? "B09, B11" : "B09-B12";
  f.title = fmt::format("{} of length a at a circular hole of radius R, infinite plate, {}",
                        is_one ? "One crack" : "Two cracks",
                        is_biaxial ? "equal tension both ways" : "tension across");
  f.abscissa = "a/R: crack length over radius";
  f.ordinate = "F = K_I/(sigma sqrt(pi a))";
  f.reading = free_reading;
  f.deviation =
      "Bowie's table, made by hand from few terms of a series, carries errors of 2 to 5 %, and the fits to "
      "it keep them";
  f.tolerance = 1e-5;
  return f;
}

void add_table(Family& f, HoleCracks cracks, Tension tension, Reference bowie_record, Reference tada_record) {
  std::vector<double> entries{0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.8, 1.0, 1.5, 2.0, 3.0, 5.0, 10.0};
  for (const double q : entries)
    f.points.push_back(
        {"",
         {{"a/R", q}},
         {{bowie_record, *bowie(cracks, tension, q)}, {tada_record, tada_hole(cracks, tension, q)}},
         hole_question(cracks, tension, q),
         q == 0.5});
  f.curves = {
      {bowie_record, "", [=](double q) { return bowie(cracks, tension, q); }, 0.1, 10, true,
       std::move(entries)},
      {tada_record, "", [=](double q) { return tada_hole(cracks, tension, q); }, 0.02, 10, false, {}}};
}

void cite(Family& f, Reference reference, const std::function<double(double)>& form) {
  for (FamilyPoint& point : f.points)
    point.cited.push_back({reference, form(point.parameters.front().value)});
  f.curves.push_back({reference, "", form, 0.02, 10, false, {}});
}

}  // namespace

Family crack_hole_one() {
  Family f = hole_family(HoleCracks::one, Tension::uniaxial);
  add_table(f, HoleCracks::one, Tension::uniaxial, Reference::bowie_one, Reference::tada_one);
  cite(f, Reference::one_crack_fit, one_crack_fit);
  cite(f, Reference::grandt_one, [](double q) { return grandt_hole(HoleCracks::one, q); });
  cite(f, Reference::newman_one, [](double q) { return newman_hole(HoleCracks::one, q); });
  return f;
}

Family crack_hole_two() {
  Family f = hole_family(HoleCracks::two, Tension::uniaxial);
  add_table(f, HoleCracks::two, Tension::uniaxial, Reference::bowie_two, Reference::tada_two);
  cite(f, Reference::two_cracks_fit, two_cracks_fit);
  cite(f, Reference::grandt_two, [](double q) { return grandt_hole(HoleCracks::two, q); });
  cite(f, Reference::newman_two, [](double q) { return newman_hole(HoleCracks::two, q); });
  return f;
}

Family crack_hole_one_biaxial() {
  Family f = hole_family(HoleCracks::one, Tension::biaxial);
  add_table(f, HoleCracks::one, Tension::biaxial, Reference::bowie_one, Reference::tada_one);
  return f;
}

Family crack_hole_two_biaxial() {
  Family f = hole_family(HoleCracks::two, Tension::biaxial);
  add_table(f, HoleCracks::two, Tension::biaxial, Reference::bowie_two, Reference::tada_two);
  return f;
}

namespace {

/// Two cracks at a hole under pressure on its wall, and on the cracks' faces as well.
Question pressed_hole(double q, bool on_faces) {
  auto problem =
      large_plate(R * (1 + q), {circle(2 * R)}, at_hole(HoleCracks::two, q), {Load::Kind::pressure});
  if (on_faces)
    for (std::size_t k = 0; k < problem.plate.cracks.size(); ++k) {
      problem.loads.push_back(unit_load(Load::Kind::face_pressure));
      problem.loads.back().crack = k;
    }
  return settled_tip(std::move(problem), k_one_over(unit_k(q * R)), outline_effect);
}

}  // namespace

Family crack_hole_pressure() {
  Family f{
      "crack-hole-pressure",
      "B16",
      "Two cracks of length a at a circular hole of radius R under pressure p, infinite plate",
      "a/R: crack length over radius",
      "F = K_I/(p sqrt(pi a))",
      free_reading,
      "of the wall alone no published table is known to us: finite elements of another code. With the faces "
      "pressed as well K is that of an equal tension p both ways, for which the sources are a fit and a "
      "table made by hand",
      1e-5,
      {},
      {}};
  const std::vector<double> entries{0.1, 0.5, 1.0, 2.0};
  add_series(f, {"wall",
                 "a/R",
                 entries,
                 {1.0},
                 [](double q) { return pressed_hole(q, false); },
                 {{Reference::pressurised_wall, pressurised_wall, entries}},
                 0.1,
                 2.0});
  add_series(
      f, {"wall and faces",
          "a/R",
          entries,
          {1.0},
          [](double q) { return pressed_hole(q, true); },
          {{Reference::tada_two, [](double q) { return tada_hole(HoleCracks::two, Tension::biaxial, q); }},
           {Reference::bowie_two, [](double q) { return bowie(HoleCracks::two, Tension::biaxial, q); },
            entries}},
          0.1,
          2.0});
  return f;
}

Family cracks_collinear() {
  Family f{"cracks-collinear",
           "B13",
           "Two cracks of length 2a on a line, centres 2e apart, infinite plate, tension across",
           "a/e: crack length over distance of centres",
           "F = K_I/(sigma sqrt(pi a))",
           free_reading,
           "the formulas are exact, the plate finite",
           1e-7,
           {},
           {}};
  constexpr double a = 10.0;
  for (const bool is_inner : {true, false}) {
    const std::string series = is_inner ? "inner tips" : "outer tips";
    const auto form = is_inner ? collinear_inner : collinear_outer;
    for (const double x : {0.1, 0.3, 0.5, 0.7, 0.9}) {
      const double e = a / x;
      std::vector<Crack> cracks{{"upper", {{0, e - a}, {0, e + a}}, false, {}},
                                {"lower", {{0, -e - a}, {0, -e + a}}, false, {}}};
      f.points.push_back({series,
                          {{"a/e", x}},
                          {{Reference::collinear, form(x)}},
                          settled_tip(large_plate(e + a, {}, std::move(cracks), {Load::Kind::tension}),
                                      k_one_over(unit_k(a), is_inner ? 0 : 1), outline_effect,
                                      solver::Quantity::stress_intensity, is_inner ? 0 : 1),
                          x == 0.5});
    }
    f.curves.push_back({Reference::collinear, series, form, 0.05, 0.92, false, {}});
  }
  return f;
}

Family crack_half_plane() {
  Family f{"crack-half-plane",
           "B14",
           "Crack of length a at the edge of a half plane, tension along the edge",
           "number: 1 is F, 2 is T/sigma",
           "F = K_I/(sigma sqrt(pi a)) and T/sigma",
           "a square plate 6000 a wide, crack in the middle of one side; interaction integral over rings "
           "about the tip",
           "exact to the digits that are quoted",
           1e-6,
           {},
           {}};
  constexpr double a = 10.0;
  const double side = breadth * a / 2;
  const auto problem =
      large_plate(a, {}, {{"crack", {{0, side}, {0, side - a}}, true, {}}}, {Load::Kind::tension});
  f.points = {
      {"",
       {{"number", 1}},
       {{Reference::half_plane_crack, half_plane_crack}},
       settled_tip(problem, k_one_over(unit_k(a)), outline_effect),
       true},
      {"",
       {{"number", 2}},
       {{Reference::half_plane_crack, half_plane_crack_t}},
       no_finer_than(1e-5, settled_tip(problem, t_over(s), outline_effect, solver::Quantity::t_stress)),
       true}};
  f.curves.push_back({Reference::half_plane_crack,
                      "",
                      [](double x) { return std::optional(x < 1.5 ? half_plane_crack : half_plane_crack_t); },
                      1,
                      2,
                      true,
                      {1, 2}});
  return f;
}

}  // namespace raiser::validation
