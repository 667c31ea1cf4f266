#include "io/case/table.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

#include "io/case/words.hpp"

namespace raiser::io {

namespace {

constexpr std::ptrdiff_t longest_text = 200;  // characters

std::string joined(std::string_view label, std::string_view key) {
  return label.empty() ? std::string(key) : fmt::format("{}.{}", label, key);
}

void add_fault(Report& report, const Position& at, std::string key, std::string value, std::string what,
               std::string cure) {
  Diagnostic fault;
  fault.file = report.file;
  fault.position = at;
  fault.key = std::move(key);
  fault.value = std::move(value);
  fault.what = std::move(what);
  fault.cure = std::move(cure);
  report.faults.push_back(std::move(fault));
}

/// The value as it reads in a message; nothing for lists and tables.
std::string shown_value(const Node& value) {
  if (value.kind == Node::Kind::text) return fmt::format("\"{}\"", shown(value.text));
  return value.text;
}

void complain_of(const Table& table, const Entry& entry, const Node& value, std::string what,
                 std::string cure) {
  add_fault(*table.report, value.at, joined(table.label, entry.key), shown_value(value), std::move(what),
            std::move(cure));
}

void complain_of_kind(const Table& table, const Entry& entry, const Node& value, std::string_view expected,
                      std::string_view sample) {
  complain_of(table, entry, value, fmt::format("{} is expected and this is {}", expected, word(value.kind)),
              fmt::format("write e.g. {}", sample));
}

std::string as_written(const Node& value) {
  if (value.kind != Node::Kind::array) return value.text;
  std::vector<std::string> parts;
  for (const Node& item : value.items)
    parts.push_back(item.kind == Node::Kind::array ? fmt::format("({})", as_written(item)) : item.text);
  return fmt::format("{}", fmt::join(parts, ", "));
}

/// Whether the value is no table and no list of tables.
bool is_plain(const Node& value) {
  const bool of_tables = !value.items.empty() && value.items.front().kind == Node::Kind::table;
  return value.kind != Node::Kind::table && !of_tables;
}

struct Limits {
  double least = 0.0;  ///< of the magnitude, when the sign must not be any
  double most = 0.0;
  std::string_view unit;
};

constexpr Limits limits(Dimension dimension) {
  switch (dimension) {
    case Dimension::length:
      return {1e-6, 1e9, "mm"};
    case Dimension::force:
      return {1e-9, 1e15, "N"};
    case Dimension::stress:
      return {1e-9, 1e12, "MPa"};
    case Dimension::moment:
      return {1e-9, 1e18, "N mm"};
    case Dimension::angle:
      return {0.0, 2.0 * std::numbers::pi * (1.0 + 1e-12), "rad (one turn)"};
    case Dimension::ratio:
      return {0.0, 1e12, ""};
  }
  return {};
}

/// What is wrong with the magnitude or sign of a value; empty when nothing is.
QuantityFault range_fault(double value, Dimension dimension, Sign sign) {
  const Limits limit = limits(dimension);
  if (sign == Sign::positive && !(value > 0.0)) {
    return {"this must be greater than zero", fmt::format("write e.g. {}", example(dimension))};
  }
  if (sign == Sign::nonzero && value == 0.0) {
    return {"a load of zero does nothing", "give it a value or leave it out"};
  }
  const double magnitude = std::abs(value);
  if (magnitude > limit.most || (sign != Sign::any && magnitude < limit.least)) {
    const std::string range = sign == Sign::any
                                  ? fmt::format("at most {:g} {}", limit.most, limit.unit)
                                  : fmt::format("{:g} to {:g} {}", limit.least, limit.most, limit.unit);
    return {fmt::format("the magnitude is outside what can be analysed, {}", range),
            "check the number and its unit"};
  }
  return {};
}

std::variant<double, QuantityFault> number_of(const Node& value, Dimension dimension) {
  if (value.kind == Node::Kind::text) return parse_quantity(value.text, dimension);
  if (dimension != Dimension::ratio) return parse_quantity(value.text, dimension);
  if (!std::isfinite(value.number)) {
    return QuantityFault{"the number is not finite", fmt::format("write e.g. {}", example(dimension))};
  }
  return value.number;
}

bool starts_character(char c) { return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U; }

bool is_control(char c) { return static_cast<unsigned char>(c) < 0x20 || c == '\x7f'; }

}  // namespace

void complain(const Table& table, const Entry& entry, std::string what, std::string cure) {
  complain_of(table, entry, entry.value, std::move(what), std::move(cure));
}

void complain(const Table& table, const Entry& entry, const Node& item, std::string what, std::string cure) {
  complain_of(table, entry, item, std::move(what), std::move(cure));
}

void complain(const Table& table, std::string what, std::string cure) {
  add_fault(*table.report, table.node->at, table.label, "", std::move(what), std::move(cure));
}

void refuse_unknown(const Table& table, std::span<const std::string_view> known) {
  refuse_unknown(table, known, known);
}

void refuse_unknown(const Table& table, std::span<const std::string_view> known,
                    std::span<const std::string_view> offered) {
  for (const Entry& entry : table.node->entries) {
    if (std::find(known.begin(), known.end(), entry.key) != known.end()) continue;
    const std::string_view close = nearest(entry.key, offered);
    const std::string hint = close.empty() ? "" : fmt::format("; the nearest known key is \"{}\"", close);
    add_fault(*table.report, entry.at, joined(table.label, shown(entry.key)), shown_value(entry.value),
              fmt::format("unknown key{}", hint), fmt::format("the keys here are {}", list(offered)));
  }
}

void refuse_unfitting(const Table& table, std::string_view subject, std::span<const std::string_view> known,
                      std::span<const std::string_view> fitting) {
  for (const Entry& entry : table.node->entries) {
    if (std::find(known.begin(), known.end(), entry.key) == known.end()) continue;
    if (std::find(fitting.begin(), fitting.end(), entry.key) != fitting.end()) continue;
    add_fault(*table.report, entry.at, joined(table.label, entry.key), shown_value(entry.value),
              fmt::format("{} has no {}", subject, entry.key), fmt::format("it takes {}", list(fitting)));
  }
}

const Entry* find(const Table& table, std::string_view key) {
  const auto& entries = table.node->entries;
  const auto found =
      std::find_if(entries.begin(), entries.end(), [key](const Entry& e) { return e.key == key; });
  if (found == entries.end()) return nullptr;
  if (is_plain(found->value)) table.report->written[joined(table.path, key)] = as_written(found->value);
  return &*found;
}

const Entry* require(const Table& table, std::string_view key, std::string_view sample) {
  const Entry* entry = find(table, key);
  if (entry == nullptr) {
    add_fault(*table.report, table.node->at, joined(table.label, key), "", "the key is missing",
              fmt::format("add e.g. {} = {}", key, sample));
  }
  return entry;
}

const Entry* require_one(const Table& table, std::span<const std::string_view> keys,
                         std::string_view sample) {
  const Entry* first = nullptr;
  for (const std::string_view key : keys) {
    const Entry* entry = find(table, key);
    if (entry != nullptr && first != nullptr) {
      complain(table, *entry, fmt::format("{} is given too", first->key),
               "give one of the two and remove the other");
    }
    if (first == nullptr) first = entry;
  }
  if (first == nullptr) {
    add_fault(*table.report, table.node->at, joined(table.label, keys.front()), "", "the key is missing",
              fmt::format("add one of {}, e.g. {} = {}", list(keys), keys.front(), sample));
  }
  return first;
}

std::optional<double> quantity(const Table& table, const Entry& entry, const Node& value, Dimension dimension,
                               Sign sign) {
  const bool is_number = value.kind == Node::Kind::integer || value.kind == Node::Kind::real;
  if (value.kind != Node::Kind::text && !is_number) {
    complain_of_kind(table, entry, value, word(dimension), example(dimension));
    return std::nullopt;
  }
  const auto parsed = number_of(value, dimension);
  const auto* fault = std::get_if<QuantityFault>(&parsed);
  const QuantityFault outside =
      fault != nullptr ? *fault : range_fault(std::get<double>(parsed), dimension, sign);
  if (outside.what.empty()) return std::get<double>(parsed);
  complain_of(table, entry, value, outside.what, outside.cure);
  return std::nullopt;
}

std::optional<double> quantity(const Table& table, const Entry* entry, Dimension dimension, Sign sign) {
  if (entry == nullptr) return std::nullopt;
  return quantity(table, *entry, entry->value, dimension, sign);
}

std::optional<std::string> text(const Table& table, const Entry& entry, const Node& value) {
  if (value.kind != Node::Kind::text) {
    complain_of_kind(table, entry, value, "a text", "a word in double quotes");
    return std::nullopt;
  }
  const bool blank = value.text.find_first_not_of(' ') == std::string::npos;
  const bool control = std::any_of(value.text.begin(), value.text.end(), is_control);
  const bool too_long = std::count_if(value.text.begin(), value.text.end(), starts_character) > longest_text;
  if (blank || control || too_long) {
    complain_of(table, entry, value,
                blank     ? "the text is empty"
                : control ? "the text has control characters"
                          : "the text is too long",
                fmt::format("write one line of 1 to {} characters", longest_text));
    return std::nullopt;
  }
  return value.text;
}

std::optional<std::string> text(const Table& table, const Entry* entry) {
  if (entry == nullptr) return std::nullopt;
  return text(table, *entry, entry->value);
}

std::optional<std::size_t> choice(const Table& table, const Entry& entry, const Node& value,
                                  std::span<const std::string_view> words) {
  const bool has_first = !words.empty() && words.front() != any_name;
  const std::string sample = has_first ? fmt::format("\"{}\"", words.front()) : "a name";
  if (value.kind != Node::Kind::text) {
    complain_of_kind(table, entry, value, "a text", sample);
    return std::nullopt;
  }
  const auto found = std::find(words.begin(), words.end(), value.text);
  if (found != words.end() && *found != any_name) return static_cast<std::size_t>(found - words.begin());
  if (std::find(words.begin(), words.end(), any_name) != words.end()) {
    static_cast<void>(text(table, entry, value));  // complains of one that is no name
    return std::nullopt;
  }
  const std::string_view close = nearest(value.text, words);
  const std::string hint = close.empty() ? "" : fmt::format("; the nearest is \"{}\"", close);
  const std::string cure = words.empty() ? "the case has none of its kind: remove it, or add one"
                           : words.size() > 12
                               ? fmt::format("it is one of {} names, such as {}", words.size(), sample)
                               : fmt::format("it is one of: {}", list(words));
  complain_of(table, entry, value, fmt::format("this is not known here{}", hint), cure);
  return std::nullopt;
}

std::optional<std::size_t> choice(const Table& table, const Entry* entry,
                                  std::span<const std::string_view> words) {
  if (entry == nullptr) return std::nullopt;
  return choice(table, *entry, entry->value, words);
}

const std::vector<Node>* items(const Table& table, const Entry* entry, std::string_view sample) {
  if (entry == nullptr) return nullptr;
  if (entry->value.kind == Node::Kind::array) return &entry->value.items;
  complain_of_kind(table, *entry, entry->value, "a list", sample);
  return nullptr;
}

std::optional<Table> table_at(const Node& document, std::string_view label, Report& report) {
  const Table root{&document, "", "", &report};
  const Entry* entry = find(root, label);
  if (entry == nullptr) return std::nullopt;
  if (entry->value.kind == Node::Kind::table) {
    return Table{&entry->value, std::string(label), std::string(label), &report};
  }
  complain_of_kind(root, *entry, entry->value, "one table",
                   fmt::format("[{}] in single brackets, once", label));
  return std::nullopt;
}

std::vector<Table> tables_at(const Table& parent, std::string_view key) {
  std::vector<Table> tables;
  const Entry* entry = find(parent, key);
  if (entry == nullptr) return tables;
  const std::string label = joined(parent.label, key);
  const std::string path = joined(parent.path, key);
  const std::string sample = fmt::format("[[{}]] in double brackets, once for each", label);
  const auto add = [&](const Node& node) {
    if (node.kind != Node::Kind::table) return complain_of_kind(parent, *entry, node, "a table", sample);
    tables.push_back({&node, label, fmt::format("{}.{}", path, tables.size() + 1), parent.report});
  };
  if (entry->value.kind == Node::Kind::array) {
    for (const Node& item : entry->value.items) add(item);
    if (entry->value.items.empty())
      complain(parent, *entry, "the list is empty", fmt::format("write {}", sample));
  } else {
    complain_of_kind(parent, *entry, entry->value, "a list of tables", sample);
    if (entry->value.kind == Node::Kind::table) add(entry->value);
  }
  return tables;
}

std::string unique_name(const Table& table, std::string otherwise, Names& names) {
  const Entry* entry = find(table, "name");
  std::string name = text(table, entry).value_or(std::move(otherwise));
  if (!names.insert(name).second) {
    const std::string what = fmt::format("the name \"{}\" is taken", shown(name));
    if (entry != nullptr) {
      complain(table, *entry, what, "give each one a name of its own");
    } else {
      complain(table, what, fmt::format("add name = \"...\" to this {}", table.label));
    }
  }
  return name;
}

}  // namespace raiser::io
