#pragma once

#include <limits>
#include <map>
#include <optional>
#include <set>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "io/case/case.hpp"
#include "io/case/document.hpp"
#include "io/case/quantity.hpp"

namespace raiser::io {

/// What a reading gathers: the faults and what the author wrote.
struct Report {
  std::string file;
  std::vector<Diagnostic> faults;
  std::map<std::string, std::string, std::less<>> written;
};

/// One table of a case while it is read. `node` and `report` outlive it.
struct Table {
  const Node* node;
  std::string label;  ///< for messages: "hole"
  std::string path;   ///< for Report::written: "hole.2"
  Report* report;
};

/// Adds a fault at the place of a value of the table.
void complain(const Table& table, const Entry& entry, std::string what, std::string cure);

/// Adds a fault at the place of one item of such a value.
void complain(const Table& table, const Entry& entry, const Node& item, std::string what, std::string cure);

/// Adds a fault of the table as a whole.
void complain(const Table& table, std::string what, std::string cure);

/// Faults for every key of the table that is not among the known ones.
void refuse_unknown(const Table& table, std::span<const std::string_view> known);
/// The same, naming as keys to use only those that are offered.
void refuse_unknown(const Table& table, std::span<const std::string_view> known,
                    std::span<const std::string_view> offered);

/// Faults for keys that are known in this table but not for a `subject` such
/// as "a slot", which takes the keys in `fitting`.
void refuse_unfitting(const Table& table, std::string_view subject, std::span<const std::string_view> known,
                      std::span<const std::string_view> fitting);

/// The key with its value, or nullptr; a value present counts as written.
const Entry* find(const Table& table, std::string_view key);

/// As find(), and a fault when there is none. `sample` shows how to write it.
const Entry* require(const Table& table, std::string_view key, std::string_view sample);

/// Exactly one of the keys; a fault when there is none or a second one.
const Entry* require_one(const Table& table, std::span<const std::string_view> keys, std::string_view sample);

enum class Sign { positive, nonzero, any };

/// The value in raiser's own unit, or nothing and a fault. Nothing without a
/// fault for a null entry. Magnitudes far outside engineering are refused, so
/// that no later arithmetic can overflow.
std::optional<double> quantity(const Table& table, const Entry* entry, Dimension dimension, Sign sign);
std::optional<double> quantity(const Table& table, const Entry& entry, const Node& value, Dimension dimension,
                               Sign sign);

/// The text, not empty and of one line, or nothing and a fault.
std::optional<std::string> text(const Table& table, const Entry* entry);
std::optional<std::string> text(const Table& table, const Entry& entry, const Node& value);

/// Stands in a list of names for those that are not known, since the drawing or
/// outline that has them could not be read: any text may then be one of them.
inline constexpr std::string_view any_name{};

/// Which of the words the text is, or nothing and a fault; nothing without a fault
/// for a text that may be one of names not known (any_name).
std::optional<std::size_t> choice(const Table& table, const Entry* entry,
                                  std::span<const std::string_view> words);
std::optional<std::size_t> choice(const Table& table, const Entry& entry, const Node& value,
                                  std::span<const std::string_view> words);

/// The items of a list, or nullptr and a fault.
const std::vector<Node>* items(const Table& table, const Entry* entry, std::string_view sample);

/// The table `[label]`, or nothing; a fault when it is something else.
std::optional<Table> table_at(const Node& document, std::string_view label, Report& report);

/// The tables `[[label]]` under the key, numbered in their paths from 1.
/// Empty when there are none; faults where it is something else.
std::vector<Table> tables_at(const Table& parent, std::string_view key);

/// Names taken so far by things of one sort.
using Names = std::set<std::string, std::less<>>;

/// The name written in the table or `otherwise`; a fault when it is taken.
/// Adds it to the names either way.
std::string unique_name(const Table& table, std::string otherwise, Names& names);

}  // namespace raiser::io
