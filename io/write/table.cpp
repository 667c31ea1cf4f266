#include "io/write/table.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>
#include <vector>

#include "io/case/alloys.hpp"
#include "io/write/crack_words.hpp"
#include "io/write/layout.hpp"
#include "io/write/table_parts.hpp"

namespace raiser::io {
namespace {

std::string coloured(std::string_view text, std::string_view code, bool colour) {
  return colour ? fmt::format("\x1b[{}m{}\x1b[0m", code, text) : std::string(text);
}

std::string load_text(const solver::Load& load) {
  std::string text = fmt::format("{} {} MPa", solver::word(load.kind), brief(load.stress));
  if (load.kind == solver::Load::Kind::pin)
    text =
        fmt::format("pin {} N at {} deg", brief(load.force), brief(load.direction * 180 / std::numbers::pi));
  if (load.stress_to) text = fmt::format("edge {} to {} MPa", brief(load.stress), brief(*load.stress_to));
  if (load.kind == solver::Load::Kind::edge && load.along != 0.0) {
    text += fmt::format(" and {} MPa along", brief(load.along));
  }
  const std::string name = plain(load.name);
  return name.empty() || name == solver::word(load.kind) ? text : fmt::format("{} ({})", name, text);
}

std::string constants_text(const solver::HookeLaw& law) {
  if (!law.orthotropy)
    return fmt::format("E = {} MPa, nu = {}", brief(law.youngs_modulus), brief(law.poissons_ratio));
  return fmt::format("E1 {} MPa at {} deg, E2 {} MPa, G12 {} MPa, nu12 {}", brief(law.youngs_modulus),
                     brief(law.orthotropy->angle * 180 / std::numbers::pi),
                     brief(law.orthotropy->youngs_modulus_2), brief(law.orthotropy->shear_modulus),
                     brief(law.poissons_ratio));
}

// "1 hole", "2 holes, 1 notch".
std::string count_of_raisers(const mesh::Plate& plate) {
  std::map<mesh::Raiser::Kind, std::size_t> counts;
  for (const mesh::Raiser& raiser : mesh::raisers(plate)) ++counts[raiser.kind];
  std::vector<std::string> parts;
  for (const auto& [kind, number] : counts)
    parts.push_back(fmt::format("{} {}", number, number == 1 ? std::string(mesh::word(kind)) : plural(kind)));
  if (!plate.cracks.empty())
    parts.push_back(fmt::format("{} crack{}", plate.cracks.size(), plate.cracks.size() == 1 ? "" : "s"));
  return fmt::format("{}", fmt::join(parts, ", "));
}

std::string heading(const Case& input) {
  constexpr std::size_t shown = 6;
  const mesh::Plate& plate = input.problem.plate;
  const solver::HookeLaw& material = input.problem.material;
  const auto& loads = input.problem.loads;
  std::string text = input.title.empty() ? "" : wrapped(plain(input.title));
  text += wrapped(fmt::format("Plate {} x {} x {} mm, plane {}, {}; {}", brief(plate.length),
                              brief(plate.width), brief(plate.thickness),
                              material.state == solver::PlaneState::stress ? "stress" : "strain",
                              constants_text(material), count_of_raisers(plate)));
  if (const auto alloy = input.alloy ? find_alloy(*input.alloy) : std::nullopt)
    text += wrapped(fmt::format("{}, {}; {} ({}); no design values", alloy->name, alloy->condition,
                                alloy->range, alloy->source),
                    "Material: ", 10);
  std::string list;
  for (std::size_t i = 0; i < std::min(loads.size(), shown); ++i) {
    list += (i == 0 ? "" : ", ") + load_text(loads[i]);
  }
  if (loads.size() > shown) list += fmt::format(" and {} more", loads.size() - shown);
  return text + wrapped(list, loads.size() == 1 ? "Load: " : "Loads: ", 7);
}

std::string status_lines(const Result& result, bool colour) {
  const bool settled = result.solution.status == solver::Solution::Status::settled;
  std::string text = settled ? wrapped("every asked number is within its tolerance.", "SETTLED: ", 9)
                             : wrapped(plain(result.solution.reason), "NOT MET: ", 9);
  const std::size_t word = 7;  // both words are as long
  return coloured(text.substr(0, word), settled ? "1;32" : "1;31", colour) + text.substr(word);
}

std::string asked_lines(const Result& result) {
  constexpr std::size_t shown = 12;
  std::string text;
  std::size_t left_out = 0, lines = 0;
  for (const Answer& answer : answers(result.input, result.solution)) {
    if (answer.ask.name.empty() && answer.met) continue;
    if (++lines > shown && ++left_out > 0) continue;
    const std::string place = mesh::raiser(result.input.problem.plate, answer.ask.raiser).name;
    const std::string name = answer.ask.name.empty() ? "" : plain(answer.ask.name) + ": ";
    text += wrapped(fmt::format("{}{} at {} {} MPa, tolerance {} {}", name, words(answer.ask.quantity),
                                plain(place), with_bound(answer.value.stress), percent(answer.ask.tolerance),
                                answer.met ? "met" : "NOT MET"),
                    "  ", 4);
  }
  const std::vector<mesh::CrackTip> tips = mesh::tips(result.input.problem.plate.cracks);
  for (const TipAnswer& answer : tip_answers(result.input, result.solution)) {
    if (answer.ask.name.empty() && answer.met) continue;
    if (++lines > shown && ++left_out > 0) continue;
    const bool is_k = answer.values.size() > 1;
    const std::string values = is_k ? fmt::format("K_I {}, K_II {} MPa sqrt(mm)",
                                                  with_bound(answer.values[0]), with_bound(answer.values[1]))
                                    : with_bound(answer.values[0]) + " MPa";
    const std::string name = answer.ask.name.empty() ? "" : plain(answer.ask.name) + ": ";
    text += wrapped(fmt::format("{}{} at {}: {}, tolerance {} {}", name, words(answer.ask.quantity),
                                tip_phrase(tips.at(answer.ask.raiser).name), values,
                                percent(answer.ask.tolerance), answer.met ? "met" : "NOT MET"),
                    "  ", 4);
  }
  if (left_out > 0) text += fmt::format("  and {} more\n", left_out);
  return text.empty() ? text : "\nAsked\n" + text;
}

}  // namespace

namespace {

// Whose edges are searched, in words.
std::string_view edges_of(const mesh::Plate& plate) {
  return plate.outline ? "edges of holes, notches and fillets" : "holes' edges";
}

}  // namespace

std::string yield_remark(const Case& input, const solver::LoadFindings& findings) {
  if (!input.yield_strength || findings.raisers.empty()) return "";
  const auto worst = std::max_element(
      findings.raisers.begin(), findings.raisers.end(),
      [](const auto& a, const auto& b) { return a.von_mises.stress.value < b.von_mises.stress.value; });
  const solver::Estimate& largest = worst->von_mises.stress;
  const std::string place = phrase(mesh::raiser(input.problem.plate, worst->raiser));
  if (largest.value + largest.bound < *input.yield_strength) {
    return fmt::format("the largest von Mises stress on the {} is {} of the yield strength ({} MPa), at {}.",
                       edges_of(input.problem.plate), percent(largest.value / *input.yield_strength),
                       brief(*input.yield_strength), place);
  }
  return fmt::format(
      "elastic peak above yield is fictitious: the largest von Mises stress on the {}, {} MPa at "
      "{}, "
      "{} the yield strength of {} MPa. The material yields there and sheds load; take the peak as a measure "
      "for fatigue "
      "or for "
      "an estimate of local plasticity, not as a stress that occurs.",
      edges_of(input.problem.plate), solver::digits(largest), place,
      largest.value - largest.bound > *input.yield_strength ? "exceeds" : "may exceed",
      brief(*input.yield_strength));
}

std::string_view cautions() {
  return "linear elastic, two-dimensional, nominal geometry, no residual stress. Not a substitute for the "
         "codes that "
         "apply where the part is used, nor for the judgement of a licensed engineer.";
}

std::string table(const Result& result, const TableStyle& style) {
  const std::string yield = yield_remark(result.input, result.solution.combined);
  std::string text = heading(result.input);
  text += fmt::format("\n{}", status_lines(result, style.colour));
  text += asked_lines(result);
  text += raisers_part(result, style.rest);
  text += loads_part(result);
  text += tips_part(result, style.rest);
  text += places_part(result);
  text += published_part(result, style.rest);
  text += holding_part(result) + checks_part(result);
  text += "\n";
  if (!yield.empty()) text += wrapped(yield, "Yield: ", 7);
  text += wrapped(cautions(), "Caution: ", 9);
  if (!result.input.problem.plate.cracks.empty()) text += wrapped(crack_cautions(), "Cracks: ", 8);
  return text;
}

}  // namespace raiser::io
