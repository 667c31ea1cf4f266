#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "io/write/result.hpp"

namespace raiser::io {

/// Version of the JSON documents. It grows when a key changes its meaning or
/// goes; new keys may come without.
inline constexpr int json_format = 1;

/// The result of one case as a JSON document, after io/write/result.schema.json.
/// Every quantity is an object with its value, its unit and, where it has one,
/// its bound. A number that does not exist or is not finite is null, with the
/// reason beside it.
std::string json(const Result& result);

/// An entry of a document of several cases: how the case ended, its faults, and
/// its result (a text from json(), or empty for none).
std::string json_entry(const Outcome& outcome, const std::vector<std::string>& faults,
                       std::string_view result);

/// What comes before, between and after the entries of a document.
std::string json_begin();
std::string_view json_between();
std::string_view json_end();

/// A text as a JSON string in its quotes; bytes that are not UTF-8 are replaced.
std::string json_text(std::string_view text);

}  // namespace raiser::io
