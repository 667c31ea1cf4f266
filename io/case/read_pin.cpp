#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <numeric>

#include "io/case/parts.hpp"

namespace raiser::io {

namespace {

using solver::Load;

constexpr std::array<std::string_view, 9> pin_keys{"name",      "hole",  "holes",     "shares",      "force",
                                                   "direction", "model", "clearance", "interference"};

/// The holes of a pin or of a row of them, with the share of the force of each.
struct Row {
  std::vector<std::size_t> holes;
  std::vector<double> shares;
};

std::optional<Row> read_row(const Table& table, const Entry& entry,
                            const std::vector<std::string_view>& names) {
  Row row;
  const std::vector<Node>* list = items(table, &entry, "[\"a\", \"b\"]");
  if (list == nullptr) return std::nullopt;
  bool sound = !list->empty();
  if (list->empty()) complain(table, entry, "the list is empty", "name the holes of the row");
  for (const Node& item : *list) {
    const auto hole = choice(table, entry, item, names);
    sound = sound && hole;
    if (!hole) continue;
    if (std::find(row.holes.begin(), row.holes.end(), *hole) != row.holes.end()) {
      complain(table, entry, fmt::format("the hole \"{}\" is named twice", names[*hole]),
               "name each hole once");
      sound = false;
    }
    row.holes.push_back(*hole);
  }
  const Entry* given = find(table, "shares");
  if (given == nullptr) {
    row.shares.assign(row.holes.size(),
                      1.0 / static_cast<double>(std::max<std::size_t>(row.holes.size(), 1)));
    return sound ? std::optional(row) : std::nullopt;
  }
  const std::vector<Node>* shares = items(table, given, "[\"50 %\", \"50 %\"]");
  if (shares == nullptr) return std::nullopt;
  for (const Node& item : *shares) {
    const auto share = quantity(table, *given, item, Dimension::ratio, Sign::positive);
    sound = sound && share;
    row.shares.push_back(share.value_or(0.0));
  }
  const double sum = std::accumulate(row.shares.begin(), row.shares.end(), 0.0);
  if (sound && row.shares.size() != list->size()) {
    complain(table, *given, fmt::format("there are {} shares for {} holes", row.shares.size(), list->size()),
             "give one share for each hole");
    return std::nullopt;
  }
  if (sound && std::abs(sum - 1.0) > 1e-6) {
    complain(table, *given, fmt::format("the shares add up to {:.6g} %", 100 * sum),
             "let them add up to 100 %");
    return std::nullopt;
  }
  return sound ? std::optional(row) : std::nullopt;
}

std::optional<Row> read_holes_of(const Table& table, const std::vector<std::string_view>& names) {
  constexpr std::array<std::string_view, 2> keys{"hole", "holes"};
  const Entry* entry = require_one(table, keys, sample_of(names));
  if (entry == nullptr) return std::nullopt;
  if (entry->key == "holes") return read_row(table, *entry, names);
  if (const Entry* shares = find(table, "shares"))
    complain(table, *shares, "one hole takes all of the force", "remove the shares, or name several holes");
  const auto hole = choice(table, entry, names);
  if (!hole) return std::nullopt;
  return Row{{*hole}, {1.0}};
}

/// What the diameter of the hole exceeds that of the pin by; nothing inside for
/// a cosine pressure, nothing at all where it is faulty.
std::optional<std::optional<double>> read_fit(const Table& table) {
  constexpr std::array<std::string_view, 2> models{"cosine", "contact"};
  const Entry* clearance = find(table, "clearance");
  const Entry* interference = find(table, "interference");
  if (clearance != nullptr && interference != nullptr)
    complain(table, *interference, "clearance is given too", "give one of the two and remove the other");
  const Entry* fit = clearance != nullptr ? clearance : interference;
  const auto size = quantity(table, fit, Dimension::length, Sign::any);
  const Entry* entry = find(table, "model");
  const auto model =
      entry == nullptr ? std::optional<std::size_t>(fit == nullptr ? 0 : 1) : choice(table, entry, models);
  if (!model || (fit != nullptr && !size)) return std::nullopt;
  if (fit != nullptr && *size < 0.0) {
    complain(table, *fit, "this must not be negative",
             fmt::format("write it as {}", clearance != nullptr ? "interference" : "clearance"));
    return std::nullopt;
  }
  if (*model == 0 && fit != nullptr) {
    complain(table, *fit, fmt::format("a cosine pressure knows no {}", fit->key),
             "write model = \"contact\", or remove it");
    return std::nullopt;
  }
  if (*model == 0) return std::optional<double>();
  if (fit == nullptr) return std::optional(0.0);
  return std::optional(fit == clearance ? *size : -*size);
}

}  // namespace

std::vector<std::optional<Load>> read_pin(const Table& table, const std::vector<std::string_view>& holes) {
  refuse_unknown(table, pin_keys);
  const auto row = read_holes_of(table, holes);
  const auto force = quantity(table, require(table, "force", "\"20 kN\""), Dimension::force, Sign::positive);
  const auto direction =
      quantity(table, require(table, "direction", "\"0 deg\""), Dimension::angle, Sign::any);
  const auto fit = read_fit(table);
  const Entry* name = find(table, "name");
  const bool named = name == nullptr || text(table, name);
  if (!row || !force || !direction || !fit || !named) return {std::nullopt};
  std::vector<std::optional<Load>> loads;
  for (std::size_t i = 0; i < row->holes.size(); ++i) {
    Load load;
    load.kind = Load::Kind::pin;
    load.hole = row->holes[i];
    load.force = *force * row->shares[i];
    load.direction = *direction;
    load.clearance = *fit;
    loads.emplace_back(std::move(load));
  }
  return loads;
}

}  // namespace raiser::io
