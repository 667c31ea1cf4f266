#pragma once

#include <cstddef>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

#include "io/case/case.hpp"

namespace raiser::io {

/// A group of a DXF file: a code, and a value on the line after it.
struct Tag {
  int code = 0;
  std::string_view value;
  std::size_t line = 0;  ///< of the value, from 1
};

/// Splits a DXF file into its groups. The first line that breaks the format is
/// the one fault returned. The groups view into `content`.
std::variant<std::vector<Tag>, Diagnostic> split_dxf(std::string_view content, const std::string& file);

/// An entity or table entry: a name and the groups that follow it.
struct Record {
  std::string_view kind;
  std::size_t line = 0;
  std::span<const Tag> tags;
};

/// The value of the first group with this code.
std::optional<std::string_view> value_of(const Record& record, int code);
/// The same as a number; nothing when there is none or it is not a finite number.
std::optional<double> number_of(const Record& record, int code);
std::optional<double> number(std::string_view text);
/// The same as bits; none where it is no whole number that they could be.
unsigned flags_of(const Record& record, int code);

/// The sections of a drawing that raiser reads, as records.
struct DxfSections {
  std::span<const Tag> header;
  std::vector<Record> tables;
  std::vector<Record> blocks;
  std::vector<Record> entities;
  bool has_entities = false;
  bool is_complete = false;  ///< ended by EOF, every section closed
};
DxfSections sections_of(std::span<const Tag> tags);

}  // namespace raiser::io
