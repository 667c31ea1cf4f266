#include <fmt/format.h>

#include <array>
#include <numeric>

#include "io/case/parts.hpp"

namespace raiser::io {

namespace {

using solver::Ask;
using solver::Quantity;
using Words = std::vector<std::string_view>;

constexpr std::array quantities{Quantity::largest_edge_stress, Quantity::smallest_edge_stress,
                                Quantity::von_mises};

Words quantity_words() {
  Words words;
  for (const Quantity quantity : quantities) words.push_back(word(quantity));
  return words;
}

/// A tolerance, or `otherwise` when the table has none; empty when faulty.
std::optional<double> read_tolerance(const Table& table, double otherwise) {
  const Entry* entry = find(table, "tolerance");
  if (entry == nullptr) return otherwise;
  const auto tolerance = quantity(table, entry, Dimension::ratio, Sign::positive);
  if (!tolerance || (*tolerance >= finest_tolerance && *tolerance < 1.0)) return tolerance;
  const bool fine = *tolerance < 1.0;
  complain(table, *entry,
           fine ? fmt::format("double precision gives no better than {:g}", finest_tolerance)
                : "a tolerance is relative and below 1 (100 %)",
           "write e.g. \"0.1 %\" or \"0.001 %\"");
  return std::nullopt;
}

/// The indices that a list of words picks, or all when the key is absent.
std::vector<std::size_t> read_selection(const Table& table, std::string_view key, const Words& words) {
  std::vector<std::size_t> picked;
  const Entry* entry = find(table, key);
  if (entry == nullptr) {
    picked.resize(words.size());
    std::iota(picked.begin(), picked.end(), std::size_t{0});
    return picked;
  }
  const std::string sample = words.empty() ? "[]" : fmt::format("[\"{}\"]", words.front());
  const std::vector<Node>* list = items(table, entry, sample);
  std::vector<bool> seen(words.size(), false);
  for (const Node& item : list == nullptr ? std::vector<Node>{} : *list) {
    const auto index = choice(table, *entry, item, words);
    if (!index) continue;
    if (seen[*index]) {
      complain(table, *entry, fmt::format("\"{}\" stands twice in the list", words[*index]), "write it once");
    } else {
      picked.push_back(*index);
    }
    seen[*index] = true;
  }
  return picked;
}

std::optional<Ask> read_result(const Table& table, const Words& holes, const Words& raisers, double tolerance,
                               Names& names) {
  constexpr std::array<std::string_view, 5> keys{"name", "of", "at", "hole", "tolerance"};
  constexpr std::array<std::string_view, 2> places{"at", "hole"};
  refuse_unknown(table, keys);
  const auto of = choice(table, require(table, "of", "\"largest edge stress\""), quantity_words());
  const Entry* place = require_one(table, places, sample_of(raisers));
  const auto at = choice(table, place, place != nullptr && place->key == "hole" ? holes : raisers);
  const auto own_tolerance = read_tolerance(table, tolerance);
  require(table, "name", "\"peak at the bolt\"");
  const std::string name = unique_name(table, fmt::format("result {}", names.size() + 1), names);
  if (!of || !at || !own_tolerance) return std::nullopt;
  return Ask{quantities[*of], *at, *own_tolerance, name};
}

}  // namespace

std::string_view word(Quantity quantity) {
  switch (quantity) {
    case Quantity::largest_edge_stress:
      return "largest edge stress";
    case Quantity::smallest_edge_stress:
      return "smallest edge stress";
    case Quantity::von_mises:
      return "von Mises";
    case Quantity::stress_intensity:
      return "stress intensity";
    case Quantity::t_stress:
      return "T-stress";
  }
  return "";
}

Question read_question(const Table& document, const Words& holes, const Words& raisers) {
  constexpr std::array<std::string_view, 5> keys{"tolerance", "at", "holes", "results", "result"};
  static const Node nothing;
  const auto written = table_at(*document.node, "ask", *document.report);
  const Table table = written.value_or(Table{&nothing, "ask", "ask", document.report});
  refuse_unknown(table, keys);
  Question question;
  question.tolerance = read_tolerance(table, question.tolerance).value_or(question.tolerance);
  const Entry* both = find(table, "at") == nullptr ? nullptr : find(table, "holes");
  if (both != nullptr) complain(table, *both, "at and holes say the same", "keep at");
  const bool by_holes = find(table, "holes") != nullptr && both == nullptr;
  const auto at = by_holes ? read_selection(table, "holes", holes) : read_selection(table, "at", raisers);
  const auto of = read_selection(table, "results", quantity_words());
  for (const std::size_t raiser : at) {
    for (const std::size_t quantity : of) {
      question.asks.push_back({quantities[quantity], raiser, question.tolerance, ""});
    }
  }
  Names names;
  const auto singles = tables_at(table, "result");
  for (const Table& single : singles) {
    const auto ask = read_result(single, holes, raisers, question.tolerance, names);
    if (ask) question.asks.push_back(*ask);
  }
  const bool nothing_asked = written && singles.empty() && (at.empty() || of.empty()) && !raisers.empty();
  if (nothing_asked && document.report->faults.empty()) {
    complain(table, "nothing is asked for", "remove the empty list, or add an [[ask.result]]");
  }
  return question;
}

}  // namespace raiser::io
