#include "io/case/quantity.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <numbers>
#include <optional>
#include <vector>

#include "io/case/words.hpp"

namespace raiser::io {

namespace {

constexpr double pound = 4.4482216152605;  // N, exact

constexpr std::array all_units{
    Unit{"mm", Dimension::length},
    Unit{"cm", Dimension::length, 10.0},
    Unit{"m", Dimension::length, 1e3},
    Unit{"um", Dimension::length, 1.0, 1e3},
    Unit{"in", Dimension::length, 254.0, 10.0},
    Unit{"ft", Dimension::length, 3048.0, 10.0},
    Unit{"N", Dimension::force},
    Unit{"kN", Dimension::force, 1e3},
    Unit{"MN", Dimension::force, 1e6},
    Unit{"lbf", Dimension::force, pound},
    Unit{"kip", Dimension::force, pound * 1e3},
    Unit{"MPa", Dimension::stress},
    Unit{"kPa", Dimension::stress, 1.0, 1e3},
    Unit{"GPa", Dimension::stress, 1e3},
    Unit{"Pa", Dimension::stress, 1.0, 1e6},
    Unit{"N/mm^2", Dimension::stress},
    Unit{"N/mm2", Dimension::stress, 1.0, 1.0, true},
    Unit{"psi", Dimension::stress, pound * 1e2, 254.0 * 254.0},
    Unit{"ksi", Dimension::stress, pound * 1e5, 254.0 * 254.0},
    Unit{"Msi", Dimension::stress, pound * 1e8, 254.0 * 254.0},
    Unit{"N mm", Dimension::moment},
    Unit{"N m", Dimension::moment, 1e3},
    Unit{"kN mm", Dimension::moment, 1e3},
    Unit{"kN m", Dimension::moment, 1e6},
    Unit{"lbf in", Dimension::moment, pound * 254.0, 10.0},
    Unit{"kip in", Dimension::moment, pound * 254e3, 10.0},
    Unit{"lbf ft", Dimension::moment, pound * 3048.0, 10.0},
    Unit{"Nmm", Dimension::moment, 1.0, 1.0, true},
    Unit{"Nm", Dimension::moment, 1e3, 1.0, true},
    Unit{"kNmm", Dimension::moment, 1e3, 1.0, true},
    Unit{"kNm", Dimension::moment, 1e6, 1.0, true},
    Unit{"deg", Dimension::angle, std::numbers::pi, 180.0},
    Unit{"rad", Dimension::angle},
    Unit{"%", Dimension::ratio, 1.0, 100.0},
};

struct Spelling {
  std::string_view from;
  std::string_view to;
};

// Characters that people type or paste for what the table spells in ASCII.
constexpr std::array spellings{
    Spelling{"\u00a0", " "}, Spelling{"\u202f", " "}, Spelling{"\t", " "},      Spelling{"*", " "},
    Spelling{"\u00b7", " "}, Spelling{"\u22c5", " "}, Spelling{"\u00b2", "^2"}, Spelling{"\u00b0", "deg"},
    Spelling{"\u00b5", "u"}, Spelling{"\u03bc", "u"},
};

/// The text with one spelling for each character and single spaces.
std::string plain(std::string_view content) {
  std::string result;
  while (!content.empty()) {
    const auto match = std::find_if(spellings.begin(), spellings.end(),
                                    [content](const Spelling& s) { return content.starts_with(s.from); });
    const std::string_view next = match == spellings.end() ? content.substr(0, 1) : match->to;
    content.remove_prefix(match == spellings.end() ? 1 : match->from.size());
    if (next == " " && (result.empty() || result.back() == ' ')) continue;
    result += next;
  }
  if (!result.empty() && result.back() == ' ') result.pop_back();
  return result;
}

std::string list_of_units(Dimension dimension) {
  std::vector<std::string_view> names;
  for (const Unit& unit : all_units) {
    if (unit.dimension == dimension && !unit.alias) names.push_back(unit.name);
  }
  return list(names);
}

/// The word for a dimension without its article.
std::string_view noun(Dimension dimension) {
  const std::string_view with_article = word(dimension);
  return with_article.substr(with_article.find(' ') + 1);
}

std::string write_instead(Dimension expected) { return fmt::format("write e.g. {}", example(expected)); }

/// The unit that a misspelt name most likely means, of the expected dimension
/// if any of those is near; nullptr when none is.
const Unit* meant(const std::string& name, Dimension expected) {
  const Unit* best = nullptr;
  double best_distance = 0.0;
  if (name.size() > 20) return nullptr;
  for (const Unit& unit : all_units) {
    if (!is_near(name, unit.name)) continue;
    const double distance = edit_distance(name, unit.name) + (unit.dimension == expected ? 0.0 : 10.0);
    if (best != nullptr && distance >= best_distance) continue;
    best = &unit;
    best_distance = distance;
  }
  return best;
}

QuantityFault unknown_unit(const std::string& name, Dimension expected) {
  const Unit* unit = meant(name, expected);
  std::string hint;
  if (unit != nullptr) hint = fmt::format("; the nearest is \"{}\"", unit->name);
  if (unit != nullptr && unit->dimension != expected)
    hint += fmt::format(", a unit of {}", noun(unit->dimension));
  return {fmt::format("\"{}\" is not a unit known here{}", shown(name), hint),
          fmt::format("the units of {} are {}", noun(expected), list_of_units(expected))};
}

struct Number {
  double value = 0.0;
  std::size_t length = 0;  ///< characters of the text that it takes
};

/// The number at the start of the text, or why there is none.
std::variant<Number, QuantityFault> leading_number(const std::string& content, Dimension expected) {
  const bool plus = content.starts_with('+');
  const char* first = content.data() + (plus ? 1 : 0);
  const char* last = content.data() + content.size();
  Number number;
  const auto [end, error] = std::from_chars(first, last, number.value);
  const bool sign_twice = plus && first != last && (*first == '-' || *first == '+');
  if (error == std::errc::result_out_of_range) {
    return QuantityFault{"the number is outside the range of double precision", write_instead(expected)};
  }
  if (error != std::errc{} || sign_twice) {
    return QuantityFault{fmt::format("{} is expected and this does not start with a number", word(expected)),
                         write_instead(expected)};
  }
  if (!std::isfinite(number.value)) {
    return QuantityFault{"the number is not finite", write_instead(expected)};
  }
  number.length = static_cast<std::size_t>(end - content.data());
  return number;
}

QuantityFault wrong_dimension(const Unit& unit, Dimension expected) {
  return {
      fmt::format("{} is expected and {} is a unit of {}", word(expected), unit.name, noun(unit.dimension)),
      write_instead(expected)};
}

}  // namespace

std::string_view word(Dimension dimension) {
  constexpr std::array<std::string_view, 6> words{"a length", "a force",  "a stress",
                                                  "a moment", "an angle", "a ratio"};
  return words[static_cast<std::size_t>(dimension)];
}

std::string_view example(Dimension dimension) {
  constexpr std::array<std::string_view, 6> examples{"\"18 mm\"",  "\"36 kN\"",  "\"100 MPa\"",
                                                     "\"12 N m\"", "\"30 deg\"", "\"0.1 %\" or 0.001"};
  return examples[static_cast<std::size_t>(dimension)];
}

std::span<const Unit> units() { return all_units; }

std::variant<double, QuantityFault> parse_quantity(std::string_view content, Dimension expected) {
  const std::string text = plain(content);
  if (text.empty()) return QuantityFault{"nothing is written here", write_instead(expected)};
  const auto start = leading_number(text, expected);
  if (const auto* fault = std::get_if<QuantityFault>(&start)) return *fault;
  const Number number = std::get<Number>(start);
  std::string name = text.substr(number.length);
  if (name.starts_with(',')) {
    return QuantityFault{"a comma stands in the number", "the decimal sign is a point: 18.5, not 18,5"};
  }
  if (name.starts_with(' ')) name.erase(0, 1);
  if (name.empty()) {
    if (expected == Dimension::ratio) return number.value;
    return QuantityFault{fmt::format("{} needs a unit", word(expected)), write_instead(expected)};
  }
  const auto unit =
      std::find_if(all_units.begin(), all_units.end(), [&](const Unit& u) { return u.name == name; });
  if (unit == all_units.end()) return unknown_unit(name, expected);
  if (unit->dimension != expected) return wrong_dimension(*unit, expected);
  const double value = number.value * unit->factor / unit->divisor;
  if (!std::isfinite(value)) {
    return QuantityFault{"the number is outside the range of double precision", write_instead(expected)};
  }
  return value;
}

}  // namespace raiser::io
