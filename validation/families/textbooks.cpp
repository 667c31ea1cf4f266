// Flat bars of textbook problems: the factor that the book reads off its chart.
#include <array>
#include <cmath>

#include "validation/families/list.hpp"
#include "validation/families/question.hpp"

namespace raiser::validation {

namespace {

/// A bar with a central hole as the book gives it, in its own unit of length.
struct Bar {
  Reference book;
  double diameter, width;
  double factor;

  double share() const { return diameter / width; }
};

constexpr std::array<Bar, 5> bars{{{Reference::gere_bars, 1, 6, 2.60},
                                   {Reference::gere_bars, 12, 60, 2.51},
                                   {Reference::gere_bars, 2, 6, 2.31},
                                   {Reference::bhandari_bars, 10, 50, 2.51},
                                   {Reference::bhandari_bars, 15, 30, 2.16}}};

FamilyCurve curve_of(Reference book) {
  FamilyCurve curve{book, "", {}, 0.1, 0.5, true, {}};
  for (const Bar& bar : bars)
    if (bar.book == book) curve.points.push_back(bar.share());
  curve.at = [book](double x) -> std::optional<double> {
    for (const Bar& bar : bars)
      if (bar.book == book && std::abs(bar.share() - x) < 1e-9) return bar.factor;
    return std::nullopt;
  };
  return curve;
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
  for (const Bar& bar : bars) {
    const double x = bar.share();
    auto problem =
        plate_under(6 * bar.width, bar.width, {circle(bar.diameter)}, {solver::Load::Kind::tension});
    f.points.push_back({"",
                        {{"d/W", x}},
                        {{bar.book, bar.factor}},
                        settled(std::move(problem), largest_over(unit_stress / (1 - x))),
                        x == 0.5 || x == 0.2});
  }
  f.curves = {curve_of(Reference::gere_bars), curve_of(Reference::bhandari_bars)};
  return f;
}

}  // namespace raiser::validation
