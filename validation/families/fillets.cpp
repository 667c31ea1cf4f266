// Stepped flat bars with circular fillets.
#include <fmt/format.h>

#include <cmath>

#include "mesh/triangulate/triangulate.hpp"
#include "validation/families/bars.hpp"
#include "validation/families/list.hpp"
#include "validation/families/steps.hpp"
#include "validation/published/edge_raisers.hpp"

namespace raiser::validation {

namespace {

using solver::Load;

constexpr double D = 100.0;  // mm, width of the wide part

void add(Family& f, Reference source, double (*formula)(double, double), Load::Kind load) {
  for (const double q : {0.25, 0.5, 1.0, 2.0, 4.0, 8.0, 16.0}) {
    const std::string series = fmt::format("h/r {:g}", q);
    for (const double x : {0.1, 0.2, 0.3, 0.5, 0.7}) {
      const double h = x * D / 2;
      f.points.push_back({series,
                          {{"2h/D", x}, {"h/r", q}},
                          {{source, formula(q, x)}},
                          step_question(D, D - 2 * h, h / q, load),
                          x == 0.3 && (q == 1 || q == 4)});
    }
    f.curves.push_back({source, series, [=](double x) { return formula(q, x); }, 0.05, 0.7, false, {}});
  }
}

}  // namespace

Question step_question(double wide, double narrow, double radius, Load::Kind load) {
  solver::Problem problem{stepped_bar(6 * wide, wide, narrow, radius), family_material, {unit_load(load)}};
  const std::size_t at = upper_raiser(problem.plate);
  return settled(std::move(problem), largest_over(unit_stress, at), std::exp(-4.2 * 3), at);
}

Family fillet_step_tension() {
  Family f{"fillet-tension",
           "A25",
           "Stepped flat bar, D and d wide, h = (D-d)/2, fillet radius r, tension",
           "2h/D: both steps over the wide part's width",
           "Kt on P/(t d)",
           step_reading,
           "a cubic in the step with coefficients fitted in h/r to photoelastic charts: too low for shallow "
           "steps, too "
           "high for blunt fillets at deep ones",
           1e-5,
           {},
           {}};
  add(f, Reference::fillet_tension, fillet_tension, Load::Kind::tension);
  return f;
}

Family fillet_step_bending() {
  Family f{
      "fillet-bending",
      "A26",
      "Stepped flat bar, D and d wide, h = (D-d)/2, fillet radius r, bending",
      "2h/D: both steps over the wide part's width",
      "Kt on 6M/(t d^2)",
      step_reading,
      "a cubic in the step with coefficients fitted in h/r to photoelastic charts: too low for shallow steps",
      1e-5,
      {},
      {}};
  add(f, Reference::fillet_bending, fillet_bending, Load::Kind::bending);
  return f;
}

Family fillet_chart() {
  Family f{"fillet-chart",
           "A25",
           "Stepped flat bar, D and d wide, fillet radius r, tension: figures off the printed chart",
           "r/d: fillet radius over narrow width",
           "Kt on P/(t d)",
           step_reading,
           "photoelastic tests of 1935 and a chart read by eye: low throughout",
           1e-5,
           {},
           {}};
  const std::vector<std::pair<double, std::vector<double>>> read{
      {1.05, {0.03, 0.05}}, {1.1, {0.02, 0.1}},      {1.2, {0.05, 0.1}},
      {1.3, {0.05, 0.1}},   {1.5, {0.05, 0.1, 0.2}}, {2.0, {0.05, 0.1, 0.2}}};
  for (const auto& [ratio, radii] : read) {
    const std::string series = fmt::format("D/d {:g}", ratio);
    for (const double x : radii)
      f.points.push_back({series,
                          {{"r/d", x}, {"D/d", ratio}},
                          {{Reference::fillet_tension_chart, *fillet_tension_chart(ratio, x)}},
                          step_question(D, D / ratio, x * D / ratio, Load::Kind::tension),
                          ratio == 1.5 && x == 0.1});
    f.curves.push_back({Reference::fillet_tension_chart, series,
                        [r = ratio](double x) { return fillet_tension_chart(r, x); }, 0.02, 0.2, true,
                        radii});
  }
  return f;
}

Family fillet_power() {
  Family f{"fillet-power",
           "A27, D09",
           "Stepped flat bar, D/d 1.111, fillet radius r, bending",
           "r/d: fillet radius over narrow width",
           "Kt on 6M/(t d^2)",
           step_reading,
           "a power law through one line of a printed chart",
           1e-5,
           {},
           {}};
  constexpr double ratio = 1.111;
  for (const double x : {0.05, 0.1, 0.25 / 1.8, 0.2})
    f.points.push_back({"",
                        {{"r/d", x}},
                        {{Reference::fillet_bending_power, fillet_bending_power(x)}},
                        step_question(D, D / ratio, x * D / ratio, Load::Kind::bending),
                        x == 0.1});
  f.curves.push_back({Reference::fillet_bending_power, "", fillet_bending_power, 0.03, 0.25, false, {}});
  return f;
}

Family elliptic_membrane() {
  Family f{"elliptic-membrane",
           "LE1",
           "Elliptic membrane: ellipse of half axes 3.25 m and 2.75 m with an elliptical hole of 2 m and 1 "
           "m, 10 MPa "
           "outward on the outer edge",
           "x, m: place on the axis",
           "sigma_yy at (2 m, 0), MPa",
           "a quarter of the ring between its lines of symmetry; largest stress on the hole's edge, at the "
           "end of its long axis",
           "the target is given to three digits",
           1e-6,
           {},
           {}};
  const auto solve = [](double tolerance) {
    const mesh::Plate plate = elliptic_ring({6500, 5500}, {4000, 2000});
    const auto outward = [](const mesh::Owner& owner, const mesh::Point&,
                            const mesh::Point& n) -> mesh::Point {
      return (owner.kind == mesh::Owner::Kind::edge ? 10.0 : 0.0) * n;
    };
    using Parity = solver::UnitLoad::Parity;
    const mesh::Mirrors both{true, true};
    const solver::Model model(mesh::triangulate(mesh::cut(mesh::trace(plate), both), {}), both,
                              {210e3, 0.3, solver::PlaneState::stress}, plate.thickness,
                              {{"outward", outward, Parity::even, Parity::even}});
    return with_rising_degree(model, plate, {solver::Quantity::largest_edge_stress, 0, tolerance, ""}, 1.0);
  };
  f.points.push_back({"", {{"x", 2.0}}, {{Reference::elliptic_membrane, 92.7}}, solve, true});
  f.curves.push_back(
      {Reference::elliptic_membrane, "", [](double) { return std::optional(92.7); }, 2, 2, true, {2.0}});
  return f;
}

}  // namespace raiser::validation
