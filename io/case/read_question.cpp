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
                                Quantity::von_mises, Quantity::stress_intensity, Quantity::t_stress};
constexpr std::size_t usual = 4;  ///< of these are asked for without being named
constexpr std::array<std::string_view, 5> edge_result_keys{"name", "of", "at", "hole", "tolerance"};
constexpr std::array<std::string_view, 4> tip_result_keys{"name", "of", "tip", "tolerance"};
constexpr std::array<std::string_view, 6> result_keys{"name", "of", "at", "hole", "tip", "tolerance"};

/// What can be asked for where, and how closely.
struct Context {
  const Words& holes;
  const Words& raisers;
  const Words& tips;
  double tolerance;
  double t_stress_tolerance;

  double usual_tolerance(Quantity quantity) const {
    return quantity == Quantity::t_stress ? t_stress_tolerance : tolerance;
  }
};

Words quantity_words() {
  Words words;
  for (const Quantity quantity : quantities) words.push_back(word(quantity));
  return words;
}

/// A tolerance, or `otherwise` when the table has none; empty when faulty.
std::optional<double> read_tolerance(const Table& table, std::string_view key, double otherwise) {
  const Entry* entry = find(table, key);
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

/// The indices that a list of words picks, or the first `otherwise` when the key is absent.
std::vector<std::size_t> read_selection(const Table& table, std::string_view key, const Words& words,
                                        std::size_t otherwise) {
  std::vector<std::size_t> picked;
  const Entry* entry = find(table, key);
  if (entry == nullptr) {
    picked.resize(otherwise);
    std::iota(picked.begin(), picked.end(), std::size_t{0});
    return picked;
  }
  const std::string sample = words.empty() ? "[]" : fmt::format("[{}]", sample_of(words));
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

/// The raiser or tip of a single result.
std::optional<std::size_t> read_place(const Table& table, Quantity of, const Context& context) {
  constexpr std::array<std::string_view, 2> places{"at", "hole"};
  if (solver::is_at_tip(of)) {
    refuse_unfitting(table, "a result at a crack tip", result_keys, tip_result_keys);
    return choice(table, require(table, "tip", sample_of(context.tips, "crack 1")), context.tips);
  }
  refuse_unfitting(table, "a stress on an edge", result_keys, edge_result_keys);
  const Entry* place = require_one(table, places, sample_of(context.raisers));
  return choice(table, place, place != nullptr && place->key == "hole" ? context.holes : context.raisers);
}

/// Reports what is wrong with the places of a result whose quantity is not known.
void check_places(const Table& table, const Context& context) {
  const Entry* at = find(table, "at");
  const Entry* hole = find(table, "hole");
  const Entry* tip = find(table, "tip");
  choice(table, at, context.raisers);
  choice(table, hole, context.holes);
  choice(table, tip, context.tips);
  if (at == nullptr && hole == nullptr && tip == nullptr) require(table, "at", sample_of(context.raisers));
}

std::optional<Ask> read_result(const Table& table, const Context& context, Names& names) {
  refuse_unknown(table, result_keys);
  const auto word = choice(table, require(table, "of", "\"largest edge stress\""), quantity_words());
  std::optional<std::size_t> place;
  if (word)
    place = read_place(table, quantities[*word], context);
  else
    check_places(table, context);
  const double usual_one = word ? context.usual_tolerance(quantities[*word]) : context.tolerance;
  const auto tolerance = read_tolerance(table, "tolerance", usual_one);
  require(table, "name", "\"peak at the bolt\"");
  const std::string name = unique_name(table, fmt::format("result {}", names.size() + 1), names);
  if (!word || !place || !tolerance) return std::nullopt;
  return Ask{quantities[*word], *place, *tolerance, name};
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

Question read_question(const Table& document, const Words& holes, const Words& raisers, const Words& tips) {
  constexpr std::array<std::string_view, 7> keys{
      "tolerance", "t_stress_tolerance", "at", "holes", "tips", "results", "result"};
  static const Node nothing;
  const auto written = table_at(*document.node, "ask", *document.report);
  const Table table = written.value_or(Table{&nothing, "ask", "ask", document.report});
  refuse_unknown(table, keys);
  Question question;
  question.tolerance = read_tolerance(table, "tolerance", question.tolerance).value_or(question.tolerance);
  question.t_stress_tolerance = read_tolerance(table, "t_stress_tolerance", question.t_stress_tolerance)
                                    .value_or(question.t_stress_tolerance);
  const Context context{holes, raisers, tips, question.tolerance, question.t_stress_tolerance};
  const auto of = read_selection(table, "results", quantity_words(), usual);
  const auto ask_at = [&](const std::vector<std::size_t>& places, bool at_tips) {
    for (const std::size_t place : places)
      for (const std::size_t quantity : of)
        if (solver::is_at_tip(quantities[quantity]) == at_tips)
          question.asks.push_back(
              {quantities[quantity], place, context.usual_tolerance(quantities[quantity]), ""});
  };
  const Entry* both = find(table, "at") == nullptr ? nullptr : find(table, "holes");
  if (both != nullptr) complain(table, *both, "at and holes say the same", "keep at");
  const bool by_holes = find(table, "holes") != nullptr && both == nullptr;
  ask_at(by_holes ? read_selection(table, "holes", holes, holes.size())
                  : read_selection(table, "at", raisers, raisers.size()),
         false);
  ask_at(read_selection(table, "tips", tips, tips.size()), true);
  Names names;
  const auto singles = tables_at(table, "result");
  for (const Table& single : singles) {
    const auto ask = read_result(single, context, names);
    if (ask) question.asks.push_back(*ask);
  }
  const bool has_places = !raisers.empty() || !tips.empty();
  const bool nothing_asked = written && singles.empty() && question.asks.empty() && has_places;
  if (nothing_asked && document.report->faults.empty()) {
    complain(table, "nothing is asked for", "remove the empty list, or add an [[ask.result]]");
  }
  return question;
}

}  // namespace raiser::io
