#include "io/write/crack_words.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "io/write/layout.hpp"

namespace raiser::io {

std::string tip_phrase(std::string_view name) {
  const std::string shown = plain(name);
  return shown.starts_with("tip") || shown.starts_with("crack") ? shown : "tip " + shown;
}

std::string_view no_kt() {
  return "a crack has no Kt: the stress at its tip grows without limit with every step towards it; K "
         "measures "
         "how strongly";
}

std::string_view crack_cautions() {
  return "linear elastic fracture mechanics of a sharp crack through the whole thickness, in two dimensions; "
         "no plasticity at the tip, no residual stress, no growth. K means nothing without the toughness and "
         "the growth data of the real material at its thickness and temperature. Whether a crack may stay is "
         "a "
         "matter of the codes that apply and of licensed practice.";
}

Kink kink(const Case& input, const solver::TipFindings& found) {
  if (input.problem.material.orthotropy)
    return {std::nullopt, "the criterion is one for isotropic plates and this one is orthotropic"};
  if (!found.kink_angle) return {std::nullopt, "K_I does not open the crack"};
  const double degree = 180.0 / std::numbers::pi;
  double off = 0.0;
  for (const double one : {-1.0, 1.0})
    for (const double two : {-1.0, 1.0}) {
      const auto angle = solver::kink_angle(found.k_one.value + one * found.k_one.bound,
                                            found.k_two.value + two * found.k_two.bound);
      if (!angle) return {std::nullopt, "K_I is not known to open the crack"};
      off = std::max(off, std::abs(*angle - *found.kink_angle));
    }
  return {solver::Estimate{*found.kink_angle * degree, off * degree}, ""};
}

std::string_view kink_criterion() {
  return "largest hoop stress: F. Erdogan and G. C. Sih, J. Basic Eng. 85 (1963) 519";
}

std::string_view kink_sign() { return "from straight ahead, anticlockwise positive"; }

std::string closed_warning(const Case& input, const solver::CrackOpening& opening) {
  if (!opening.is_closed()) return "";
  return fmt::format(
      "the faces of {} would overlap by {} mm at ({}, {}) mm: they press on each other. They were solved as "
      "free of each other, so K, T and G at its tips do not hold: real faces carry the pressure and rub, "
      "which "
      "takes K_I away and lowers K_II. Change the loads, or take the crack out where it is closed.",
      mesh::label(input.problem.plate.cracks, opening.crack), brief(-opening.least, 3),
      brief(opening.where.x(), 5), brief(opening.where.y(), 5));
}

std::optional<double> relative_difference(double value, double reference) {
  if (reference == 0.0 || !std::isfinite(value)) return std::nullopt;
  return (value - reference) / std::abs(reference);
}

}  // namespace raiser::io
