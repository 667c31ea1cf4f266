// Bars and cracked plates as worked in textbooks.
#include <algorithm>
#include <cmath>
#include <numbers>

#include "validation/families/list.hpp"
#include "validation/families/series.hpp"
#include "validation/families/steps.hpp"

namespace raiser::validation {

namespace {

using solver::Load;

/// What a book works out: the sizes in its own unit of length, and its factor.
struct Example {
  Reference book;
  double x = 0.0;  ///< the chart's abscissa
  double factor = 0.0;
  std::vector<double> sizes;
  std::vector<Parameter> others = {};
  std::string name = "";
};

/// The factors of one book among the examples of one name, as a table over the abscissa.
FamilyCurve curve_of(Reference book, const std::string& name, const std::vector<Example>& examples) {
  FamilyCurve curve{book, name, {}, 0.0, 1.0, true, {}};
  std::vector<std::pair<double, double>> table;
  for (const Example& example : examples) {
    if (example.book != book || example.name != name) continue;
    curve.points.push_back(example.x);
    table.emplace_back(example.x, example.factor);
  }
  curve.at = [table = std::move(table)](double x) -> std::optional<double> {
    for (const auto& [at, factor] : table)
      if (std::abs(at - x) < 1e-9) return factor;
    return std::nullopt;
  };
  return curve;
}

/// Adds the examples as points, and the factors of each book as a table.
void add_examples(Family& f, std::string_view parameter, const std::vector<Example>& examples,
                  const std::vector<double>& quick, const std::function<Question(const Example&)>& question) {
  for (const Example& example : examples) {
    add_series(f, {example.name,
                   parameter,
                   {example.x},
                   quick,
                   [&](double) { return question(example); },
                   {},
                   0.0,
                   1.0,
                   example.others});
    f.points.back().cited = {{example.book, example.factor}};
    const auto is_drawn = [&](const FamilyCurve& curve) {
      return curve.reference == example.book && curve.series == example.name;
    };
    if (std::none_of(f.curves.begin(), f.curves.end(), is_drawn))
      f.curves.push_back(curve_of(example.book, example.name, examples));
  }
}

}  // namespace

Family textbook_holes() {
  Family f{"textbook-holes",
           "D07, D08, D10, D11",
           "Flat bars with a central hole in tension, as worked in textbooks",
           "d/W: diameter over width",
           "Kt net, on P/((W-d)t)",
           "a strip six widths long with the book's sizes; largest edge stress over the nominal stress",
           "the books read their factors off a printed chart to two or three digits",
           1e-5,
           {},
           {}};
  std::vector<Example> bars;  // diameter, width
  const auto add = [&](Reference book, double diameter, double width, double factor) {
    bars.push_back({book, diameter / width, factor, {diameter, width}});
  };
  add(Reference::gere_bars, 1, 6, 2.60);
  add(Reference::gere_bars, 12, 60, 2.51);
  add(Reference::gere_bars, 2, 6, 2.31);
  add(Reference::bhandari_bars, 10, 50, 2.51);
  add(Reference::bhandari_bars, 15, 30, 2.16);
  add_examples(f, "d/W", bars, {0.5, 0.2}, [](const Example& bar) {
    const double width = bar.sizes[1];
    return settled(plate_under(6 * width, width, {circle(bar.sizes[0])}, {Load::Kind::tension}),
                   largest_over(unit_stress / (1 - bar.x)));
  });
  return f;
}

Family textbook_fillets() {
  Family f{"textbook-fillets",
           "D07, D08, D10, D12",
           "Stepped flat bars in tension, as worked in textbooks",
           "r/d: fillet radius over narrow width",
           "Kt on P/(t d)",
           step_reading,
           "the books read their factors off printed charts, which are low",
           1e-5,
           {},
           {}};
  std::vector<Example> bars;  // wide, narrow, radius
  const auto add = [&](Reference book, double radius, double narrow, double wide, double factor) {
    bars.push_back({book, radius / narrow, factor, {wide, narrow, radius}, {{"D/d", wide / narrow}}});
  };
  add(Reference::gere_bars, 0.25, 2.5, 4, 2.30);
  add(Reference::gere_bars, 6, 40, 60, 2.00);
  add(Reference::gere_bars, 0.5, 2.5, 4, 1.87);
  add(Reference::gere_bars, 10, 40, 60, 1.75);
  add(Reference::bhandari_bars, 5, 50, 100, 2.27);
  add(Reference::bhandari_bars, 5, 30, 45, 1.80);
  add_examples(f, "r/d", bars, {0.1}, [](const Example& bar) {
    return step_question(bar.sizes[0], bar.sizes[1], bar.sizes[2], Load::Kind::tension);
  });
  return f;
}

namespace {

/// F of a crack of length a mm (half its length in the middle) with K in MPa sqrt(m) at a stress in MPa.
double factor_of(double k, double stress, double a) {
  return k / (stress * std::sqrt(std::numbers::pi * a / 1000));
}

/// A crack of length a at the edge of a plate of width W, or of 2a in its middle.
Question cracked_plate(double a, double width, bool is_edge) {
  auto problem = plate_under(6 * width, width, {}, {Load::Kind::tension});
  const double from = is_edge ? width / 2 : a, to = is_edge ? width / 2 - a : -a;
  problem.plate.cracks = {{"crack", {{0, from}, {0, to}}, is_edge, {}}};
  return settled_tip(std::move(problem), k_one_over(unit_stress * std::sqrt(std::numbers::pi * a)));
}

}  // namespace

Family textbook_cracks() {
  Family f{
      "textbook-cracks",
      "D01-D06",
      "Cracked plates as worked in textbooks: crack 2a in the middle of the width 2b, or a at the edge of "
      "the "
      "width b",
      "a/b: crack length over width, or over half of it",
      "F = K_I/(sigma sqrt(pi a)), from the book's answer",
      "a strip six widths long with the book's sizes. The answers: D01 K_I 16.0 MPa sqrt(m) (50 MPa, 2a 65 "
      "mm "
      "in 12 m); D02 a third of K_Ic 24 MPa sqrt(m) at a 2.04 mm, all of it at 16.3 mm (100 MPa, b 50 mm); "
      "D03 F 1.283 (a 6 mm, b 40 mm); D04 149 kN and 74.4 kN for a third of K_Ic 66 (a 10 and 24 mm, b 40 "
      "mm, "
      "t 15 mm); D05 125.9 kN for a third of K_Ic 80, itself worked back from the answer (a 18 mm, b 120 mm, "
      "t 12 mm); D06 114.5 MPa for K_Ic 23 (a 9 mm, b 150 mm)",
      "D02 and D04 take F as 1 for a small crack: with it D04's force is 4 % less than the 149 kN printed. "
      "D06 "
      "interpolates between coarse entries: the failure stress is 119.2 MPa",
      1e-6,
      {},
      {}};
  std::vector<Example> plates;  // a, width, 1 for an edge crack
  const auto centre = [&](std::string name, Reference book, double a, double b, double factor) {
    plates.push_back({book, a / b, factor, {a, 2 * b, 0}, {}, std::move(name)});
  };
  const auto edge = [&](std::string name, Reference book, double a, double b, double factor) {
    plates.push_back({book, a / b, factor, {a, b, 1}, {}, std::move(name)});
  };
  centre("D01", Reference::shigley_crack, 32.5, 6000, factor_of(16.0, 50, 32.5));
  centre("D02, third of K_Ic", Reference::dowling_cracks, 2.04, 50, factor_of(24.0 / 3, 100, 2.04));
  centre("D02, K_Ic", Reference::dowling_cracks, 16.3, 50, factor_of(24.0, 100, 16.3));
  edge("D03", Reference::dowling_cracks, 6, 40, 1.283);
  centre("D04, a 10 mm", Reference::dowling_cracks, 10, 40, factor_of(66.0 / 3, 149e3 / (80 * 15), 10));
  centre("D04, a 24 mm", Reference::dowling_cracks, 24, 40, factor_of(66.0 / 3, 74.4e3 / (80 * 15), 24));
  edge("D05", Reference::dowling_cracks, 18, 120, factor_of(80.0 / 3, 125.9e3 / (120 * 12), 18));
  edge("D06", Reference::boresi_crack, 9, 150, factor_of(23.0, 114.5, 9));
  add_examples(f, "a/b", plates, {0.25, 9.0 / 150}, [](const Example& plate) {
    return cracked_plate(plate.sizes[0], plate.sizes[1], plate.sizes[2] != 0);
  });
  return f;
}

}  // namespace raiser::validation
