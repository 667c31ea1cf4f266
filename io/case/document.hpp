#pragma once

#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "io/case/case.hpp"

namespace raiser::io {

struct Entry;

/// A value of a parsed TOML document with its place in the text.
struct Node {
  enum class Kind { text, integer, real, boolean, date, array, table };
  Kind kind = Kind::table;
  Position at;
  std::string text;            ///< the content of a string; other plain values as they read
  double number = 0.0;         ///< integer and real
  std::vector<Node> items;     ///< array
  std::vector<Entry> entries;  ///< table, in the order of the text
};

/// A key of a table with its value; `at` is the key's place.
struct Entry {
  std::string key;
  Position at;
  Node value;
};

/// The kind of a value for messages: "a text in quotes", "a whole number", ...
std::string_view word(Node::Kind kind);

/// Parses TOML 1.0 that has passed screen(). The first breach of TOML's own
/// grammar ends the parse and is the one fault returned; its cure says so.
std::variant<Node, Diagnostic> parse_document(std::string_view content, const std::string& name);

}  // namespace raiser::io
