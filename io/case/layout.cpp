#include "io/case/layout.hpp"

#include <algorithm>

namespace raiser::io {

namespace {

constexpr std::size_t indent = 16;
constexpr std::size_t widest = 80;

}  // namespace

std::size_t columns(std::string_view content) {
  return static_cast<std::size_t>(std::count_if(content.begin(), content.end(), [](char c) {
    return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U;
  }));
}

std::string row(std::string_view label, const std::vector<std::string>& phrases) {
  std::string result{label};
  std::size_t column = columns(label);
  const auto new_line = [&] {
    result += '\n' + std::string(indent, ' ');
    column = indent;
  };
  if (column + 2 > indent) {
    new_line();
  } else {
    result += std::string(indent - column, ' ');
    column = indent;
  }
  for (std::size_t i = 0; i < phrases.size(); ++i) {
    const bool last = i + 1 == phrases.size();
    const std::size_t width = columns(phrases[i]) + (last ? 0 : 1);
    if (i > 0 && column + 1 + width > widest) {
      new_line();
    } else if (i > 0) {
      result += ' ';
      ++column;
    }
    result += phrases[i] + (last ? "" : ",");
    column += width;
  }
  return result + '\n';
}

}  // namespace raiser::io
