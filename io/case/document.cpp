#include "io/case/document.hpp"

// The library's assertions abort on malformed input that it goes on to report
// as an ordinary error when they are off.
#define TOML_ASSERT(expr) static_cast<void>(0)
#define TOML_ENABLE_FORMATTERS 0
#include <fmt/format.h>
#include <toml++/toml.h>

#include <algorithm>
#include <array>
#include <tuple>

#include "io/case/words.hpp"

namespace raiser::io {

namespace {

Position begin(const toml::source_region& region) { return {region.begin.line, region.begin.column}; }

Node convert(const toml::node& node);

Node convert_table(const toml::table& table) {
  Node result;
  for (const auto& [key, value] : table) {
    result.entries.push_back({std::string{key.str()}, begin(key.source()), convert(value)});
  }
  std::sort(result.entries.begin(), result.entries.end(), [](const Entry& a, const Entry& b) {
    return std::tie(a.at.line, a.at.column) < std::tie(b.at.line, b.at.column);
  });
  return result;
}

Node convert_array(const toml::array& array) {
  Node result;
  result.kind = Node::Kind::array;
  for (const toml::node& item : array) result.items.push_back(convert(item));
  return result;
}

Node plain(Node::Kind kind, std::string text, double number = 0.0) {
  Node result;
  result.kind = kind;
  result.text = std::move(text);
  result.number = number;
  return result;
}

Node convert_value(const toml::node& node) {
  if (const auto* text = node.as_string()) return plain(Node::Kind::text, text->get());
  if (const auto* whole = node.as_integer()) {
    return plain(Node::Kind::integer, fmt::format("{}", whole->get()), static_cast<double>(whole->get()));
  }
  if (const auto* real = node.as_floating_point()) {
    return plain(Node::Kind::real, fmt::format("{}", real->get()), real->get());
  }
  if (const auto* flag = node.as_boolean()) return plain(Node::Kind::boolean, flag->get() ? "true" : "false");
  return plain(Node::Kind::date, "");
}

Node convert(const toml::node& node) {
  Node result = node.is_table()   ? convert_table(*node.as_table())
                : node.is_array() ? convert_array(*node.as_array())
                                  : convert_value(node);
  result.at = begin(node.source());
  return result;
}

std::string_view line_of(std::string_view content, std::size_t number) {
  for (std::size_t line = 1; line < number; ++line) {
    const std::size_t end = content.find('\n');
    if (end == std::string_view::npos) return {};
    content.remove_prefix(end + 1);
  }
  return content.substr(0, content.find('\n'));
}

/// Whether a line reads like `width = 60 mm`: a number and a unit unquoted.
bool is_bare_quantity(std::string_view line) {
  const std::size_t equals = line.find('=');
  if (equals == std::string_view::npos) return false;
  const std::size_t value = line.find_first_not_of(" \t[", equals + 1);
  if (value == std::string_view::npos) return false;
  const std::size_t unit = line.find_first_not_of("0123456789.+-eE_ \t", value);
  return unit != std::string_view::npos && unit > value && line[unit] != '"' && line[unit] != '\'';
}

/// The parser's description without the words that every one starts with.
std::string_view reason(std::string_view description) {
  constexpr std::string_view opening = "Error while parsing ";
  return description.starts_with(opening) ? description.substr(opening.size()) : description;
}

std::string cure_for(std::string_view description, std::string_view line) {
  constexpr std::string_view stops =
      " (reading stops at a breach of TOML's grammar; there may be more faults)";
  if (description.find("redefine") != std::string_view::npos) {
    return fmt::format("write each key and each [table] once, and [[double brackets]] for lists of tables{}",
                       stops);
  }
  if (is_bare_quantity(line)) {
    return fmt::format("put quantities with a unit in double quotes, e.g. \"60 mm\"{}", stops);
  }
  if (reason(description).starts_with("string")) {
    return fmt::format("close each text's quotes on the line that opens them{}", stops);
  }
  return fmt::format("write key = \"text\", key = number, [table] or [[table]]{}", stops);
}

}  // namespace

std::string_view word(Node::Kind kind) {
  constexpr std::array<std::string_view, 7> words{
      "a text", "a whole number", "a number", "true or false", "a date or time", "a list", "a table"};
  return words[static_cast<std::size_t>(kind)];
}

std::variant<Node, Diagnostic> parse_document(std::string_view content, const std::string& name) {
  try {
    return convert(toml::parse(content));
  } catch (const toml::parse_error& error) {
    Diagnostic fault;
    fault.file = name;
    fault.position = begin(error.source());
    fault.what = fmt::format("this is not TOML: {}", shown(reason(error.description()), 200));
    fault.cure = cure_for(error.description(), line_of(content, fault.position->line));
    return fault;
  }
}

}  // namespace raiser::io
