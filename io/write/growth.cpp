#include "io/write/growth.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <iterator>
#include <numbers>

#include "io/write/crack_words.hpp"
#include "io/write/layout.hpp"

namespace raiser::io {
namespace {

using solver::GrowthStep;

constexpr std::size_t most_lines = 30;

mesh::CrackTip tip_of(const GrowthResult& result, std::size_t i) {
  return mesh::tips(result.input.problem.plate.cracks).at(result.plan.tips.at(i));
}

double size_of(const GrowthResult& result, const GrowthStep& step) {
  const mesh::Crack& crack = result.input.problem.plate.cracks.at(tip_of(result, 0).crack);
  return step.length * (crack.has_mouth ? 1.0 : 0.5);
}

std::string factor_of(const GrowthResult& result, const GrowthStep& step) {
  if (result.factor.nominal == 0.0) return "-";
  const double unit = result.factor.nominal * std::sqrt(std::numbers::pi * size_of(result, step));
  return fitted_value(step.tips.front().k_one.scaled(1.0 / unit), 10);
}

std::string step_line(const GrowthResult& result, const GrowthStep& step) {
  if (step.tips.empty())
    return wrapped("not solved: " + plain(step.reason), "  " + left(brief(step.length), 10), 12);
  const solver::TipFindings& tip = step.tips.front();
  const Kink turn = kink(result.input, tip);
  std::string line = fmt::format("  {}{}{}{}{}{}\n", left(brief(step.length), 10),
                                 right(fitted(tip.k_one, 18), 18), right(fitted(tip.k_two, 16), 16),
                                 right(fitted(tip.t_stress, 15), 15), right(factor_of(result, step), 10),
                                 right(turn.angle ? fitted_value(*turn.angle, 8) : "-", 8));
  if (step.status == GrowthStep::Status::not_met)
    line += wrapped("tolerance not met: " + plain(step.reason), "            ", 12);
  if (step.is_closed)
    line += wrapped("its faces press on each other: K of free faces does not hold", "            ", 12);
  return line;
}

/// All of few steps, else an even choice with both ends.
std::vector<std::size_t> lines_shown(std::size_t steps) {
  std::vector<std::size_t> shown;
  const std::size_t lines = std::min(steps, most_lines);
  for (std::size_t i = 0; i < lines; ++i) shown.push_back(lines == 1 ? 0 : i * (steps - 1) / (lines - 1));
  return shown;
}

std::string title_of(const GrowthResult& result) {
  const bool is_kinked = result.plan.path == solver::GrowthPlan::Path::kinked;
  std::string tips;
  for (std::size_t i = 0; i < result.plan.tips.size(); ++i)
    tips += (i == 0 ? "" : ", ") + tip_phrase(tip_of(result, i).name);
  return fmt::format("{} grown {}{}, {} lengths",
                     plain(mesh::label(result.input.problem.plate.cracks, tip_of(result, 0).crack)),
                     is_kinked ? "along the direction of the largest hoop stress" : "along its own line",
                     result.plan.tips.size() > 1 ? " together at " + tips : " at " + tips,
                     result.growth.steps.size());
}

std::string limits_part(const GrowthResult& result) {
  if (!result.notch.limits) return "";
  const solver::NotchLimits& limits = *result.notch.limits;
  std::string text =
      fmt::format("\nShort and long crack at the notch (wide plate)\n  {}{}{}{}{}\n", left("length", 10),
                  right("K_I", 14), right("short", 14), right("long", 14), right("Lukas-Klesnil", 16));
  for (const std::size_t i : lines_shown(result.growth.steps.size())) {
    const GrowthStep& step = result.growth.steps[i];
    if (step.tips.empty()) continue;
    const auto between = limits.between(step.length);
    text += fmt::format(
        "  {}{}{}{}{}\n", left(brief(step.length), 10), right(value_text(step.tips.front().k_one), 14),
        right(brief(limits.short_crack(step.length), 5), 14),
        right(brief(limits.long_crack(step.length), 5), 14), right(between ? brief(*between, 5) : "-", 16));
  }
  text += wrapped(fmt::format("1.1215 Kt S sqrt(pi a) with Kt = {:.5g} at its mouth in the plate without "
                              "cracks (edge stress {} MPa), S = {} MPa = {}",
                              limits.kt(), with_bound(limits.edge_stress), brief(limits.nominal),
                              plain(limits.definition)),
                  "  short: ", 4);
  text += wrapped(fmt::format("F S sqrt(pi (d + a)) with F = {}, d = {} mm: {}", brief(limits.long_factor, 5),
                              brief(limits.depth), limits.long_definition),
                  "  long: ", 4);
  if (const auto l = limits.transition())
    text += wrapped(fmt::format("they are equal at a = {} mm (N. E. Dowling, Fatigue Eng. Mater. Struct. 2 "
                                "(1979) 129); Lukas-Klesnil: short / sqrt(1 + 4.5 a / {} mm), Mater. Sci. "
                                "Eng. 34 (1978) 61, up to half that root radius",
                                brief(*l, 4), brief(limits.root_radius)),
                    "  ", 4);
  return text;
}

bool any_closed(const solver::Growth& growth) {
  return std::any_of(growth.steps.begin(), growth.steps.end(),
                     [](const GrowthStep& s) { return s.is_closed; });
}

}  // namespace

std::string_view words(GrowthStep::Status status) {
  switch (status) {
    case GrowthStep::Status::settled:
      return "settled";
    case GrowthStep::Status::not_met:
      return "not met";
    case GrowthStep::Status::not_solved:
      break;
  }
  return "not solved";
}

std::string factor_text(const GrowthResult& result) {
  const solver::GeometryFactor& factor = result.factor;
  if (factor.nominal == 0.0) return wrapped(factor.why, "Y undefined: ", 2);
  std::string text = wrapped(
      fmt::format("S = {} MPa = {}; a = {}; W = {} mm, {}", brief(factor.nominal), plain(factor.definition),
                  factor.size_definition, brief(factor.width), factor.width_definition),
      "Y = K_I / (S sqrt(pi a)): ", 2);
  if (!factor.fit) return text + wrapped(factor.why, "No fit of Y: ", 2);
  const solver::FittedPolynomial& fit = *factor.fit;
  text +=
      wrapped(fmt::format("{:.8g} <= a/W <= {:.8g}; largest error {} (at a/W = {:.4g}), at points left out "
                          "of the fit {}{}",
                          fit.low, fit.high, percent(fit.error), fit.worst_at, percent(fit.error_between),
                          fit.is_within() ? "" : fmt::format("; aimed at {}", percent(fit.tolerance))),
              "Fit of Y for ", 2);
  text += fmt::format("  s = (a/W - {:.10g}) / {:.10g}\n  Y = ", (fit.low + fit.high) / 2,
                      (fit.high - fit.low) / 2);
  for (std::size_t k = 0; k < fit.coefficients.size(); ++k) {
    if (k > 0) text += k % 4 == 0 ? "\n      " : " ";
    fmt::format_to(std::back_inserter(text), "{:+.{}f}", fit.coefficients[k],
                   solver::FittedPolynomial::digits);
    if (k > 0) fmt::format_to(std::back_inserter(text), " s^{}", k);
  }
  return text + "\n";
}

std::string growth_table(const GrowthResult& result) {
  const auto& steps = result.growth.steps;
  std::string text = wrapped(plain(result.input.title)) + wrapped(title_of(result));
  if (result.plan.tips.size() > 1)
    text += wrapped(fmt::format("the numbers are those at {}", tip_phrase(tip_of(result, 0).name)), "  ", 2);
  text += fmt::format("\n  {}{}{}{}{}{}\n", left("length", 10), right("K_I", 18), right("K_II", 16),
                      right("T", 15), right("Y", 10), right("kink", 8));
  text += fmt::format("  {}{}{}{}{}{}\n", left("mm", 10), right("MPa sqrt(mm)", 18),
                      right("MPa sqrt(mm)", 16), right("MPa", 15), right("", 10), right("deg", 8));
  const auto shown = lines_shown(steps.size());
  for (const std::size_t i : shown) text += step_line(result, steps[i]);
  if (shown.size() < steps.size())
    text += fmt::format("  {} of {} lengths; all of them in the CSV file\n", shown.size(), steps.size());
  text += "\n" + factor_text(result) + limits_part(result) + "\n";
  if (any_closed(result.growth))
    text += wrapped("at some lengths the faces press on each other; K, T and Y there do not hold.",
                    "ATTENTION: ", 11);
  text += wrapped(std::string(crack_cautions()) +
                      " The path and the lengths are assumed, not predicted: no growth rate, no arrest, no "
                      "instability is computed.",
                  "Note: ", 6);
  return text;
}

}  // namespace raiser::io
