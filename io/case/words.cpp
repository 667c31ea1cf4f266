#include "io/case/words.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <limits>
#include <vector>

namespace raiser::io {

namespace {

constexpr std::size_t longest_word = 40;

char lower(char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; }

double replacement(char a, char b) {
  if (a == b) return 0.0;
  return lower(a) == lower(b) ? 0.5 : 1.0;
}

}  // namespace

double edit_distance(std::string_view a, std::string_view b) {
  std::vector<double> before_last(b.size() + 1);
  std::vector<double> last(b.size() + 1);
  std::vector<double> row(b.size() + 1);
  for (std::size_t j = 0; j <= b.size(); ++j) row[j] = static_cast<double>(j);
  for (std::size_t i = 1; i <= a.size(); ++i) {
    before_last.swap(last);
    last.swap(row);
    row[0] = static_cast<double>(i);
    for (std::size_t j = 1; j <= b.size(); ++j) {
      row[j] = std::min({last[j] + 1.0, row[j - 1] + 1.0, last[j - 1] + replacement(a[i - 1], b[j - 1])});
      const bool swapped = i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1];
      if (swapped) row[j] = std::min(row[j], before_last[j - 2] + 1.0);
    }
  }
  return row[b.size()];
}

std::string_view nearest(std::string_view word, std::span<const std::string_view> candidates) {
  std::string_view best;
  auto best_distance = std::numeric_limits<double>::infinity();
  if (word.size() > longest_word) return best;
  for (const std::string_view candidate : candidates) {
    const auto difference = static_cast<double>(std::max(word.size(), candidate.size()) -
                                                std::min(word.size(), candidate.size()));
    if (candidate.size() > longest_word || difference >= best_distance) continue;
    const double distance = edit_distance(word, candidate);
    if (distance < best_distance) {
      best = candidate;
      best_distance = distance;
    }
  }
  return best;
}

bool is_near(std::string_view word, std::string_view candidate) {
  if (word.size() > longest_word || candidate.empty() || candidate.size() > longest_word) return false;
  const auto length = static_cast<double>(std::max(word.size(), candidate.size()));
  return edit_distance(word, candidate) <= std::max(1.0, length / 3.0);
}

std::string shown(std::string_view content, std::size_t longest) {
  std::string result;
  for (const char c : content) {
    const auto byte = static_cast<unsigned char>(c);
    const bool starts_character = (byte & 0xC0U) != 0x80U;
    if (result.size() >= longest && starts_character) return result + "...";
    if (byte < 0x20 || byte == 0x7F) {
      result += fmt::format("\\x{:02x}", byte);
    } else {
      result += c;
    }
  }
  return result;
}

std::string list(std::span<const std::string_view> words) {
  return fmt::format("{}", fmt::join(words, ", "));
}

}  // namespace raiser::io
