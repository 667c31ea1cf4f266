// Exponents of the stress at sharp corners.
#include <array>
#include <cmath>
#include <numbers>

#include "solver/corner/wedge.hpp"
#include "validation/families/list.hpp"
#include "validation/families/question.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::validation {

namespace {

constexpr double degree = std::numbers::pi / 180;

/// The smallest exponent of that symmetry of a notch of this opening, free flanks.
Ours smallest_exponent(double opening, solver::WedgeMode::Symmetry symmetry) {
  const double kappa = solver::plane_constants(family_material).kappa;
  Ours ours;
  for (const auto& exponent : solver::exponents({2 * std::numbers::pi - opening * degree}, kappa, 2.0)) {
    if (exponent.symmetry != symmetry) continue;
    ours.value = solver::Estimate{exponent.value.real(), 1e-12};
    return ours;
  }
  ours.reason = "no exponent below 2";
  return ours;
}

}  // namespace

Family corner_exponents() {
  Family f{"corner-exponents",
           "B18",
           "Sharp notch with free flanks: exponent lambda of the stress, which goes as r^(lambda-1)",
           "opening angle, degrees",
           "lambda",
           "roots of Williams' characteristic equation, from the geometry alone",
           "rounding of the table",
           1e-8,
           {},
           {}};
  using Symmetry = solver::WedgeMode::Symmetry;
  for (const bool is_first : {true, false}) {
    const std::string series = is_first ? "symmetric (I)" : "antisymmetric (II)";
    const auto symmetry = is_first ? Symmetry::symmetric : Symmetry::antisymmetric;
    std::vector<double> entries;
    for (int k = 0; k < 12; ++k) {
      const double opening = 15.0 * k;
      entries.push_back(opening);
      f.points.push_back({series,
                          {{"opening", opening}},
                          {{Reference::williams, *corner_exponent(is_first, opening)}},
                          [=](double) { return smallest_exponent(opening, symmetry); },
                          k == 0 || k == 6});
    }
    f.curves.push_back({Reference::williams, series, [=](double x) { return corner_exponent(is_first, x); },
                        0, 165, true, entries});
  }
  return f;
}

}  // namespace raiser::validation
