#include "io/write/summary.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <map>
#include <set>

#include "io/write/layout.hpp"

namespace raiser::io {
namespace {

constexpr std::size_t case_width = 16;
constexpr std::size_t status_width = 12;

// The end of a path tells cases apart better than its beginning.
std::string path_text(const std::string& path, std::size_t width) {
  std::string text = plain(path);
  if (columns(text) <= width) return text;
  std::size_t drop = columns(text) - width + 1, at = 0;
  while (at < text.size() && (drop > 0 || (static_cast<unsigned char>(text[at]) & 0xC0U) == 0x80U)) {
    ++at;
    if (at < text.size() && (static_cast<unsigned char>(text[at]) & 0xC0U) != 0x80U) --drop;
  }
  return "…" + text.substr(at);
}

const solver::RaiserFindings& worst(const Outcome& outcome) {
  return *std::max_element(outcome.raisers.begin(), outcome.raisers.end(),
                           [](const auto& a, const auto& b) { return peak(a) < peak(b); });
}

std::string kt_text(const solver::Concentration& kt) { return kt.kt ? fitted(*kt.kt, 15) : "-"; }

// The names of the files, or their paths where two have the same name.
std::vector<std::string> case_names(const std::vector<Outcome>& outcomes) {
  std::vector<std::string> names, paths;
  for (const Outcome& outcome : outcomes) {
    paths.push_back(outcome.case_file);
    names.push_back(std::filesystem::path(outcome.case_file).filename().string());
  }
  const std::set<std::string> distinct(names.begin(), names.end());
  return distinct.size() == names.size() ? names : paths;
}

std::string line(const Outcome& outcome, const std::string& name) {
  const std::string head =
      left(path_text(name, case_width - 1), case_width) + left(outcome.status, status_width);
  if (outcome.raisers.empty() && !outcome.tips.empty()) return head + "no hole; its crack is below\n";
  if (outcome.raisers.empty()) {
    return head + shortened(plain(outcome.message), page_width - case_width - status_width) + "\n";
  }
  const solver::RaiserFindings& found = worst(outcome);
  const std::size_t index = static_cast<std::size_t>(&found - outcome.raisers.data());
  const bool upper = std::abs(found.largest.stress.value) >= std::abs(found.smallest.stress.value);
  return fmt::format("{}{}{}{}{}\n", head, left(shortened(plain(outcome.raiser_names[index]), 7), 8),
                     right(fitted(upper ? found.largest.stress : found.smallest.stress, 14), 14),
                     right(kt_text(found.gross), 15), right(kt_text(found.net), 15));
}

const solver::TipFindings& worst_tip(const Outcome& outcome) {
  return *std::max_element(outcome.tips.begin(), outcome.tips.end(), [](const auto& a, const auto& b) {
    return std::hypot(a.k_one.value, a.k_two.value) < std::hypot(b.k_one.value, b.k_two.value);
  });
}

std::string tip_line(const Outcome& outcome, const std::string& name) {
  const solver::TipFindings& found = worst_tip(outcome);
  const std::size_t index = static_cast<std::size_t>(&found - outcome.tips.data());
  return fmt::format("{}{}{}{}{}\n", left(path_text(name, case_width - 1), case_width),
                     left(shortened(plain(outcome.tip_names[index]), 11), 12),
                     right(fitted(found.k_one, 16), 16), right(fitted(found.k_two, 16), 16),
                     right(fitted(found.t_stress, 14), 14));
}

/// The worst tip of each case that has cracks.
std::string tip_lines(const std::vector<Outcome>& outcomes, const std::vector<std::string>& names) {
  std::string text;
  for (std::size_t i = 0; i < outcomes.size(); ++i)
    if (!outcomes[i].tips.empty()) text += tip_line(outcomes[i], names[i]);
  if (text.empty()) return text;
  return fmt::format("\n{}{}{}{}{}\n", left("case", case_width), left("worst tip", 12), right("K_I", 16),
                     right("K_II", 16), right("T, MPa", 14)) +
         fmt::format("{}{}{}\n", left("", case_width + 12), right("MPa sqrt(mm)", 16),
                     right("MPa sqrt(mm)", 16)) +
         text;
}

}  // namespace

std::string tally(const std::vector<Outcome>& outcomes) {
  std::map<std::pair<int, std::string>, std::size_t> counted;  // by exit code, the settled ones first
  for (const Outcome& outcome : outcomes) ++counted[{outcome.exit_code, outcome.status}];
  std::string text = fmt::format("{} case{}", count(outcomes.size()), outcomes.size() == 1 ? "" : "s");
  const char* separator = ": ";
  for (const auto& [ending, number] : counted) {
    text += fmt::format("{}{} {}", separator, count(number), ending.second);
    separator = ", ";
  }
  return text;
}

std::string summary_table(const std::vector<Outcome>& outcomes) {
  std::string text =
      fmt::format("{}{}{}{}{}{}\n", left("case", case_width), left("status", status_width),
                  left("worst at", 8), right("peak, MPa", 14), right("Kt gross", 15), right("Kt net", 15));
  const std::vector<std::string> names = case_names(outcomes);
  for (std::size_t i = 0; i < outcomes.size(); ++i) text += line(outcomes[i], names[i]);
  text += tip_lines(outcomes, names);
  return text + "\n" + wrapped(tally(outcomes));
}

}  // namespace raiser::io
