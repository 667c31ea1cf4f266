#include "io/write/layout.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

namespace raiser::io {
namespace {

bool begins_character(char c) { return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U; }

// The estimate as text in less than `width` columns, the bound widened as far as need be.
template <class Text>
std::string narrowed(solver::Estimate estimate, std::size_t width, Text text) {
  for (int attempt = 0; attempt < 20; ++attempt) {
    if (columns(text(estimate)) < width || !std::isfinite(estimate.bound)) break;
    estimate.bound *= 10.0;
  }
  return text(estimate);
}

}  // namespace

std::string left(std::string_view text, std::size_t width) {
  const std::size_t used = columns(text);
  return std::string(text) + std::string(width > used ? width - used : 0, ' ');
}

std::string right(std::string_view text, std::size_t width) {
  const std::size_t used = columns(text);
  return std::string(width > used ? width - used : 0, ' ') + std::string(text);
}

std::string shortened(std::string_view text, std::size_t width) {
  if (columns(text) <= width) return std::string(text);
  std::size_t seen = 0, end = 0;
  while (end < text.size() && (!begins_character(text[end]) || ++seen < width)) ++end;
  return std::string(text.substr(0, end)) + "…";
}

std::string plain(std::string_view text) {
  std::string result(text);
  for (std::size_t i = 0; i < result.size(); ++i) {
    const auto c = static_cast<unsigned char>(result[i]);
    if (c < 0x20 || c == 0x7f) result[i] = ' ';
    // U+0080 to U+009F, the control characters of the upper half.
    const bool upper = c == 0xC2 && i + 1 < result.size() && static_cast<unsigned char>(result[i + 1]) < 0xA0;
    if (upper) result.replace(i, 2, 1, ' ');
  }
  return result;
}

std::string hole_phrase(std::string_view name) {
  const std::string shown = plain(name);
  return shown.rfind("hole ", 0) == 0 ? shown : fmt::format("hole {}", shown);
}

std::string wrapped(std::string_view text, std::string_view first, std::size_t indent) {
  std::string lines, line(first);
  bool empty = true;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t begin = text.find_first_not_of(' ', at);
    if (begin == std::string_view::npos) break;
    at = std::min(text.find(' ', begin), text.size());
    const std::string_view word = text.substr(begin, at - begin);
    const std::size_t gap = empty ? 0 : 1;
    if (!empty && columns(line) + gap + columns(word) > page_width) {
      lines += line + "\n";
      line.assign(indent, ' ');
      empty = true;
    }
    if (!empty) line += ' ';
    line += word;
    empty = false;
  }
  return lines + line + "\n";
}

std::string with_bound(const solver::Estimate& estimate) {
  if (!std::isfinite(estimate.value)) return "undefined";
  if (!std::isfinite(estimate.bound)) return solver::digits(estimate) + " (no bound)";
  return solver::digits(estimate) + " ± " + solver::bound_digits(estimate);
}

std::string value_text(const solver::Estimate& estimate) {
  return std::isfinite(estimate.value) ? solver::digits(estimate) : "undefined";
}

std::string bound_text(const solver::Estimate& estimate) {
  return std::isfinite(estimate.bound) ? solver::bound_digits(estimate) : "none";
}

std::string fitted(solver::Estimate estimate, std::size_t width) {
  return narrowed(estimate, width, [](const auto& e) { return value_text(e) + " ±" + bound_text(e); });
}

std::string fitted_value(solver::Estimate estimate, std::size_t width) {
  return narrowed(estimate, width, value_text);
}

std::string brief(double value, int significant) {
  if (!std::isfinite(value)) return "undefined";
  return fmt::format("{:.{}g}", value == 0.0 ? 0.0 : value, significant);
}

std::string percent(double fraction) { return brief(100.0 * fraction, 2) + " %"; }

std::string count(std::size_t number) {
  std::string text = fmt::format("{}", number);
  for (std::size_t i = text.size(); i > 3; i -= 3) text.insert(i - 3, 1, ' ');
  return text;
}

}  // namespace raiser::io
