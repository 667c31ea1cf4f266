#pragma once

#include <cstddef>
#include <span>
#include <string>
#include <string_view>

namespace raiser::io {

/// Number of single-character insertions, deletions, replacements and swaps of
/// neighbours that turn one word into the other (optimal string alignment,
/// ASCII letter case ignored at half the cost of a replacement, so that "mpa"
/// is nearest to "MPa"). Cost grows with the product of the lengths.
double edit_distance(std::string_view a, std::string_view b);

/// The candidate with the smallest edit distance, the earliest of equals.
/// Empty when there are none. Words of more than 40 bytes are never near.
std::string_view nearest(std::string_view word, std::span<const std::string_view> candidates);

/// Whether `candidate` is close enough to `word` to be a misspelling of it.
bool is_near(std::string_view word, std::string_view candidate);

/// The text fit to stand in a one-line message: control characters and invalid
/// bytes escaped, shortened to about `longest` bytes.
std::string shown(std::string_view content, std::size_t longest = 60);

/// The words as a list: a, b, c.
std::string list(std::span<const std::string_view> words);

}  // namespace raiser::io
