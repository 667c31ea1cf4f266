#include "io/write/layout.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <initializer_list>
#include <utility>

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

bool is_one_of(std::string_view word, std::initializer_list<std::string_view> words) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

// Whether a line must not break between two words: a number stays with its
// unit, a value with its bound.
bool bound_together(std::string_view word, std::string_view next) {
  const std::size_t end = next.find_last_not_of(",;:.)");
  next = next.substr(0, end == std::string_view::npos ? 0 : end + 1);
  if (next == "±" || word == "±") return true;
  if (word == "N") return next == "mm";
  const bool number = word.find_first_of("0123456789") == (word.front() == '-' ? 1U : 0U);
  return number && is_one_of(next, {"mm", "mm^2", "MPa", "N", "s", "deg", "%"});
}

// The next piece of text that stays on one line, as [begin, end); empty when only blanks are left.
std::pair<std::size_t, std::size_t> next_piece(std::string_view text, std::size_t at) {
  const auto word_from = [&](std::size_t from) {
    const std::size_t begin = std::min(text.find_first_not_of(' ', from), text.size());
    return std::pair{begin, std::min(text.find(' ', begin), text.size())};
  };
  auto word = word_from(at);
  const std::size_t begin = word.first;
  while (word.second < text.size()) {
    const auto next = word_from(word.second);
    if (!bound_together(text.substr(word.first, word.second - word.first),
                        text.substr(next.first, next.second - next.first)))
      break;
    word = next;
  }
  return {begin, word.second};
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

std::string plural(mesh::Raiser::Kind kind) {
  return std::string(mesh::word(kind)) + (kind == mesh::Raiser::Kind::notch ? "es" : "s");
}

std::string phrase(const mesh::Raiser& raiser) {
  const std::string shown = plain(raiser.name);
  const std::string kind = std::string(mesh::word(raiser.kind)) + " ";
  return shown.rfind(kind, 0) == 0 ? shown : kind + shown;
}

std::string wrapped(std::string_view text, std::string_view first, std::size_t indent) {
  std::string lines, line(first);
  bool empty = true;
  std::size_t at = 0;
  while (at < text.size()) {
    const auto [begin, end] = next_piece(text, at);
    if (begin == end) break;
    at = end;
    const std::string_view word = text.substr(begin, end - begin);
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
  const std::string text = fmt::format("{:.{}g}", value == 0.0 ? 0.0 : value, significant);
  const bool written_out = text.find("e+") != std::string::npos && std::abs(value) < 1e9;
  return written_out ? fmt::format("{:.0f}", value) : text;
}

std::string percent(double fraction) { return brief(100.0 * fraction, 2) + " %"; }

std::string count(std::size_t number) {
  std::string text = fmt::format("{}", number);
  for (std::size_t i = text.size(); i > 3; i -= 3) text.insert(i - 3, 1, ' ');
  return text;
}

}  // namespace raiser::io
