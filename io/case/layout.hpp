#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace raiser::io {

/// One entry of a text for a person: the label in the left column, the phrases
/// beside it, separated by commas and broken between phrases so that lines
/// stay within 80 columns. Labels too wide for their column get a line of
/// their own.
std::string row(std::string_view label, const std::vector<std::string>& phrases);

/// The number of columns that UTF-8 text takes, one for each character.
std::size_t columns(std::string_view content);

}  // namespace raiser::io
