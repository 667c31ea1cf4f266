#include <fmt/format.h>

#include <cmath>
#include <iterator>
#include <numbers>

#include "io/write/crack_words.hpp"
#include "io/write/growth.hpp"
#include "io/write/json.hpp"

namespace raiser::io {
namespace {

using solver::Estimate;
using solver::GrowthStep;

/// The shortest text that reads back as the same number.
std::string number(double value, std::string_view absent) {
  if (!std::isfinite(value)) return std::string(absent);
  return fmt::format("{}", value == 0.0 ? 0.0 : value);
}

std::string cell(std::string_view text) {
  std::string quoted = "\"";
  for (const char c : text) quoted.append(c == '"' ? 2 : 1, c);
  return quoted + "\"";
}

/// Lengths of a at which Y is known, in the order of the steps that have numbers.
struct Row {
  const GrowthStep* step;
  std::size_t tip;  ///< index into GrowthPlan::tips
};

std::string limit_cells(const GrowthResult& result, const GrowthStep& step) {
  if (!result.notch.limits) return ",";
  return number(result.notch.limits->short_crack(step.length), "") + "," +
         number(result.notch.limits->long_crack(step.length), "");
}

/// a / W and Y of the first tip; nothing for the others.
std::string factor_cells(const GrowthResult& result, const Row& row) {
  if (row.tip != 0 || result.factor.nominal == 0.0) return ",";
  const mesh::Crack& crack = result.input.problem.plate.cracks.at(
      mesh::tips(result.input.problem.plate.cracks).at(result.plan.tips[0]).crack);
  const double a = row.step->length * (crack.has_mouth ? 1.0 : 0.5);
  const double unit = result.factor.nominal * std::sqrt(std::numbers::pi * a);
  return number(a / result.factor.width, "") + "," + number(row.step->tips[0].k_one.value / unit, "");
}

std::string row_of(const GrowthResult& result, const Row& row) {
  const GrowthStep& step = *row.step;
  const std::string name =
      cell(mesh::tips(result.input.problem.plate.cracks).at(result.plan.tips[row.tip]).name);
  std::string text = number(step.length, "") + "," + name + ",";
  if (step.tips.empty())
    return text + std::string(16, ',') + cell(words(step.status)) + "," + cell(step.reason) + "\n";
  const solver::TipFindings& tip = step.tips[row.tip];
  const Kink turn = kink(result.input, tip);
  text += number(step.at[row.tip].x(), "") + "," + number(step.at[row.tip].y(), "");
  for (const Estimate& e : {tip.k_one, tip.k_two, tip.t_stress, tip.energy_release})
    text += "," + number(e.value, "") + "," + number(e.bound, "");
  text += "," + factor_cells(result, row) + "," + (turn.angle ? number(turn.angle->value, "") : "") + "," +
          limit_cells(result, step);
  return text + fmt::format(",{},{},{}\n", step.unknowns, cell(words(step.status)),
                            cell(step.is_closed ? "the faces press on each other" : step.reason));
}

std::string json_estimate(const Estimate& e) {
  return fmt::format("{{\"value\": {}, \"bound\": {}}}", number(e.value, "null"), number(e.bound, "null"));
}

std::string json_tip(const GrowthResult& result, const GrowthStep& step, std::size_t i) {
  const solver::TipFindings& tip = step.tips[i];
  const Kink turn = kink(result.input, tip);
  return fmt::format(
      "{{\"tip\": {}, \"at\": [{}, {}], \"K_I\": {}, \"K_II\": {}, \"T\": {}, \"G\": {}, \"kink_angle\": "
      "{}}}",
      json_text(mesh::tips(result.input.problem.plate.cracks).at(tip.tip).name),
      number(step.at[i].x(), "null"), number(step.at[i].y(), "null"), json_estimate(tip.k_one),
      json_estimate(tip.k_two), json_estimate(tip.t_stress), json_estimate(tip.energy_release),
      turn.angle ? json_estimate(*turn.angle) : "null");
}

std::string json_step(const GrowthResult& result, const GrowthStep& step) {
  std::string tips;
  for (std::size_t i = 0; i < step.tips.size(); ++i)
    tips += (i == 0 ? "" : ",\n     ") + json_tip(result, step, i);
  return fmt::format(
      "  {{\"length\": {}, \"status\": {}, \"reason\": {}, \"faces_closed\": {}, \"degree\": {}, "
      "\"unknowns\": {}, "
      "\"seconds\": {},\n    \"tips\": [{}]}}",
      number(step.length, "null"), json_text(words(step.status)), json_text(step.reason), step.is_closed,
      step.degree, step.unknowns, number(step.seconds, "null"), tips);
}

std::string json_fit(const solver::GeometryFactor& factor) {
  if (!factor.fit) return "null";
  const solver::FittedPolynomial& fit = *factor.fit;
  std::string list;
  for (const double c : fit.coefficients) list += (list.empty() ? "" : ", ") + number(c, "null");
  return fmt::format(
      "{{\"low\": {}, \"high\": {}, \"s\": \"(2 a/W - low - high) / (high - low)\", "
      "\"coefficients_of_powers_of_s\": "
      "[{}], \"largest_error\": {}, \"largest_error_at\": {}, \"largest_error_between\": {}, \"tolerance\": "
      "{}}}",
      number(fit.low, "null"), number(fit.high, "null"), list, number(fit.error, "null"),
      number(fit.worst_at, "null"), number(fit.error_between, "null"), number(fit.tolerance, "null"));
}

std::string json_factor(const solver::GeometryFactor& factor) {
  std::string points;
  for (const solver::XY& p : factor.points)
    points += fmt::format("{}[{}, {}]", points.empty() ? "" : ", ", number(p.x, "null"), number(p.y, "null"));
  return fmt::format(
      "{{\"definition\": \"Y = K_I / (S sqrt(pi a)) over a/W\", \"S\": {}, \"S_definition\": {}, "
      "\"a_definition\": {}, \"W\": {}, \"W_definition\": {},\n   \"points\": [{}],\n   \"fit\": {}, "
      "\"why\": {}}}",
      number(factor.nominal, "null"), json_text(factor.definition), json_text(factor.size_definition),
      number(factor.width, "null"), json_text(factor.width_definition), points, json_fit(factor),
      json_text(factor.why));
}

std::string json_notch(const solver::NotchReading& notch) {
  if (!notch.limits) return "null";
  const solver::NotchLimits& limits = *notch.limits;
  return fmt::format(
      "{{\"edge_stress\": {}, \"S\": {}, \"Kt\": {}, \"root_radius\": {}, \"short\": \"1.1215 Kt S sqrt(pi "
      "a)\", "
      "\"long\": \"F S sqrt(pi (depth + a))\", \"F\": {}, \"depth\": {}, \"long_definition\": {}}}",
      json_estimate(limits.edge_stress), number(limits.nominal, "null"), number(limits.kt(), "null"),
      number(limits.root_radius, "null"), number(limits.long_factor, "null"), number(limits.depth, "null"),
      json_text(limits.long_definition));
}

}  // namespace

std::string growth_csv(const GrowthResult& result) {
  std::string text = fmt::format("# raiser {}, case {}, sha256 {}\n", result.provenance.version,
                                 result.provenance.case_file, result.provenance.case_sha256);
  const std::string factor = factor_text(result);
  for (std::size_t from = 0; from < factor.size();) {
    const std::size_t to = factor.find('\n', from);
    text += "# " + factor.substr(from, to - from) + "\n";
    from = to == std::string::npos ? factor.size() : to + 1;
  }
  text +=
      "length_mm,tip,x_mm,y_mm,K_I_MPa_sqrt_mm,K_I_bound_MPa_sqrt_mm,K_II_MPa_sqrt_mm,K_II_bound_MPa_sqrt_mm,"
      "T_MPa,T_bound_MPa,G_N_per_mm,G_bound_N_per_mm,a_over_W,Y,kink_deg,short_limit_MPa_sqrt_mm,"
      "long_limit_MPa_sqrt_mm,unknowns,status,remark\n";
  for (const GrowthStep& step : result.growth.steps)
    for (std::size_t i = 0; i < result.plan.tips.size(); ++i) text += row_of(result, {&step, i});
  return text;
}

std::string growth_json(const GrowthResult& result) {
  std::string steps;
  for (const GrowthStep& step : result.growth.steps)
    steps += (steps.empty() ? "" : ",\n") + json_step(result, step);
  return fmt::format(
      "{{\"format\": \"raiser growth\", \"format_version\": 1, \"version\": {},\n \"case\": {}, "
      "\"case_sha256\": {},\n"
      " \"title\": {}, \"path\": \"{}\",\n"
      " \"units\": {{\"length\": \"mm\", \"K\": \"MPa sqrt(mm)\", \"T\": \"MPa\", \"G\": \"N/mm\", "
      "\"kink_angle\": "
      "\"deg\"}},\n \"steps\": [\n{}\n ],\n \"factor\":\n  {},\n \"notch\": {}, \"no_notch_because\": {},\n"
      " \"caution\": {}\n}}\n",
      json_text(result.provenance.version), json_text(result.provenance.case_file),
      json_text(result.provenance.case_sha256), json_text(result.input.title),
      result.plan.path == solver::GrowthPlan::Path::kinked ? "kinked" : "straight", steps,
      json_factor(result.factor), json_notch(result.notch), json_text(result.notch.why),
      json_text(crack_cautions()));
}

}  // namespace raiser::io
