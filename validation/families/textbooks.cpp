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
  const char* series;
  double width, diameter;
  double factor;
};

constexpr std::array<Bar, 6> bars{{{Reference::gere_bars, "Gere 2.10-1", 6, 1, 2.60},
                                   {Reference::gere_bars, "Gere 2.10-1", 6, 2, 2.31},
                                   {Reference::gere_bars, "Gere 2.10-2", 60, 12, 2.51},
                                   {Reference::gere_bars, "Gere 2.10-2", 60, 20, 2.31},
                                   {Reference::bhandari_bars, "Bhandari 5.3", 50, 10, 2.51},
                                   {Reference::bhandari_bars, "Bhandari 5.1", 30, 15, 2.16}}};

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
    const double x = bar.diameter / bar.width;
    auto problem =
        plate_under(6 * bar.width, bar.width, {circle(bar.diameter)}, {solver::Load::Kind::tension});
    f.points.push_back({bar.series,
                        {{"d/W", x}},
                        {{bar.book, bar.factor}},
                        settled(std::move(problem), largest_over(unit_stress / (1 - x))),
                        x == 0.5 || x == 0.2});
  }
  for (const char* series : {"Gere 2.10-1", "Gere 2.10-2", "Bhandari 5.3", "Bhandari 5.1"}) {
    FamilyCurve curve{Reference::gere_bars, series, {}, 0.1, 0.5, true, {}};
    for (const Bar& bar : bars)
      if (std::string_view(bar.series) == series) {
        curve.reference = bar.book;
        curve.points.push_back(bar.diameter / bar.width);
      }
    curve.at = [series](double x) -> std::optional<double> {
      for (const Bar& bar : bars)
        if (std::string_view(bar.series) == series && std::abs(bar.diameter / bar.width - x) < 1e-9)
          return bar.factor;
      return std::nullopt;
    };
    f.curves.push_back(std::move(curve));
  }
  return f;
}

}  // namespace raiser::validation
