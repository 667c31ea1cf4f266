#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "io/write/crack_words.hpp"
#include "io/write/layout.hpp"
#include "io/write/table_parts.hpp"
#include "solver/crack/factors.hpp"

namespace raiser::io {
namespace {

using solver::TipFindings;

constexpr std::size_t tips_in_full = 3;
constexpr std::size_t most_lines = 12;

std::string factor_text(const std::optional<solver::Estimate>& factor) {
  return factor ? fitted_value(*factor, 14) : "-";
}

std::string intensity_line(std::string_view name, const solver::Estimate& k,
                           const std::optional<solver::Estimate>& factor) {
  return fmt::format("  {}{}{}{}{}\n", left(name, 22), right(value_text(k), 14), right(bound_text(k), 10),
                     right(value_text(k.scaled(1.0 / root_metre)), 15), right(factor_text(factor), 14));
}

// "G 1.23 ± 0.01 N/mm; J integral +1e-7, virtual crack extension -2e-6 beside it".
std::string energy_line(const TipFindings& found) {
  const double g = found.energy_release.value;
  const auto off = [&](double value) {
    const auto difference = relative_difference(value, g);
    return difference ? fmt::format("{:+.1e} of it", *difference) : brief(value, 3) + " N/mm";
  };
  return wrapped(
      fmt::format("{} N/mm from K; beside it the J integral over a domain: {}, a virtual extension of "
                  "the crack: {}",
                  with_bound(found.energy_release), off(found.j_integral), off(found.extension)),
      "  energy release rate G ", 4);
}

std::string kink_line(const Case& input, const TipFindings& found) {
  const Kink turn = kink(input, found);
  if (!turn.angle) return wrapped(turn.why, "  kink angle undefined: ", 4);
  return wrapped(fmt::format("{} deg {} ({})", with_bound(*turn.angle), kink_sign(), kink_criterion()),
                 "  kink angle ", 4);
}

std::string factor_line(const solver::CrackFactors& factors) {
  if (!factors.why.empty()) return wrapped(factors.why, "  Y undefined: ", 4);
  return wrapped(fmt::format("S = {} MPa = {}; a = {} mm, {}", brief(factors.nominal),
                             plain(factors.definition), brief(factors.size), factors.size_definition),
                 "  Y = K / (S sqrt(pi a)): ", 4);
}

// How far the domains are apart, in parts of K.
std::string domains_line(const TipFindings& found) {
  const double k = std::hypot(found.k_one.value, found.k_two.value);
  double spread = 0.0;
  for (const Eigen::Vector3d& domain : found.domains)
    spread =
        std::max({spread, std::abs(domain[0] - found.k_one.value), std::abs(domain[1] - found.k_two.value)});
  if (k == 0.0 || found.domains.size() < 2) return "";
  return wrapped(fmt::format("{} domains of the interaction integral agree within {} of K",
                             found.domains.size(), percent(spread / k)),
                 "  ", 4);
}

std::string tip_in_full(const Result& result, const TipFindings& found) {
  const mesh::Plate& plate = result.input.problem.plate;
  const mesh::CrackTip tip = mesh::tips(plate.cracks).at(found.tip);
  const double angle = std::atan2(tip.direction.y(), tip.direction.x()) * 180.0 / std::numbers::pi;
  std::string name = tip_phrase(tip.name);
  if (name.starts_with("tip ")) name.front() = 'T';
  const solver::CrackFactors factors = solver::crack_factors(plate, result.input.problem.loads, found);
  std::string text(1, '\n');
  text += wrapped(fmt::format("tip of {}, at ({}, {}) mm, pointing {} deg from x",
                              plain(mesh::label(plate.cracks, tip.crack)), brief(tip.at.x()),
                              brief(tip.at.y()), brief(angle, 4)),
                  name + ": ", 2);
  text += fmt::format("  {}{}{}{}{}\n", left("", 22), right("MPa sqrt(mm)", 14), right("±", 10),
                      right("MPa sqrt(m)", 15), right("Y", 14));
  text += intensity_line("K_I, opening", found.k_one, factors.mode_one);
  text += intensity_line("K_II, sliding", found.k_two, factors.mode_two);
  text += factor_line(factors);
  text += wrapped(with_bound(found.t_stress) + " MPa", "  T-stress ", 4);
  text += energy_line(found);
  text += domains_line(found);
  return text + kink_line(result.input, found);
}

std::string tip_line(const std::string& name, const Case& input, const TipFindings& found) {
  const Kink turn = kink(input, found);
  return fmt::format("  {}{}{}{}{}\n", left(shortened(plain(name), 13), 14),
                     right(fitted(found.k_one, 18), 18), right(fitted(found.k_two, 18), 18),
                     right(fitted(found.t_stress, 16), 16),
                     right(turn.angle ? fitted_value(*turn.angle, 10) : "-", 10));
}

std::string tip_lines_head(std::string_view title) {
  return fmt::format("\n{}\n  {}{}{}{}{}\n", title, left("", 14), right("K_I", 18), right("K_II", 18),
                     right("T", 16), right("kink", 10)) +
         fmt::format("  {}{}{}{}{}\n", left("", 14), right("MPa sqrt(mm)", 18), right("MPa sqrt(mm)", 18),
                     right("MPa", 16), right("deg", 10));
}

std::string loads_at_tip(const Result& result, std::size_t tip) {
  const auto& units = result.solution.units;
  if (units.size() < 2) return "";
  std::string text;
  for (std::size_t i = 0; i < std::min(units.size(), most_lines); ++i)
    for (const TipFindings& found : units[i].tips)
      if (found.tip == tip) text += tip_line(units[i].name, result.input, found);
  if (units.size() > most_lines)
    text += fmt::format("  and {} more loads\n", count(units.size() - most_lines));
  const std::string name = mesh::tips(result.input.problem.plate.cracks).at(tip).name;
  return tip_lines_head(fmt::format("Each load by itself, at {}", tip_phrase(name))) + text;
}

}  // namespace

std::string tips_part(const Result& result, const std::string& rest) {
  const auto& tips = result.solution.combined.tips;
  if (tips.empty()) return "";
  const std::vector<mesh::CrackTip> all = mesh::tips(result.input.problem.plate.cracks);
  const std::vector<std::size_t> order = worst_tips_first(result.solution.combined);
  const std::size_t full = tips.size() <= tips_in_full ? tips.size() : 1;
  std::string text;
  for (std::size_t i = 0; i < full; ++i) text += tip_in_full(result, tips[order[i]]);
  const std::size_t shown = std::min(tips.size(), most_lines);
  if (full < shown) text += tip_lines_head("The other tips, worst first");
  for (std::size_t i = full; i < shown; ++i)
    text += tip_line(all.at(tips[order[i]].tip).name, result.input, tips[order[i]]);
  if (shown < tips.size())
    text += wrapped(fmt::format("and {} more tips, none of them worse{}", count(tips.size() - shown),
                                rest.empty() ? "" : ": see " + rest),
                    "  ", 2);
  text += "\n" + wrapped(std::string(no_kt()) + ".", "Note: ", 6);
  for (const solver::CrackOpening& opening : result.solution.openings)
    if (opening.is_closed()) text += wrapped(closed_warning(result.input, opening), "ATTENTION: ", 11);
  return text + loads_at_tip(result, tips[order.front()].tip);
}

}  // namespace raiser::io
