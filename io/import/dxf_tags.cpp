#include "io/import/dxf_tags.hpp"

#include <charconv>
#include <cmath>

namespace raiser::io {
namespace {

std::string_view trimmed(std::string_view text) {
  constexpr std::string_view blank = " \t\r";
  const auto first = text.find_first_not_of(blank);
  if (first == std::string_view::npos) return {};
  return text.substr(first, text.find_last_not_of(blank) - first + 1);
}

/// Takes lines off the front of a text.
class Lines {
 public:
  explicit Lines(std::string_view text) : rest_(text) {}
  std::optional<std::string_view> next() {
    if (rest_.empty()) return std::nullopt;
    ++line_;
    const auto end = rest_.find('\n');
    const std::string_view taken = rest_.substr(0, end);
    rest_ = end == std::string_view::npos ? std::string_view() : rest_.substr(end + 1);
    return trimmed(taken);
  }
  std::size_t line() const { return line_; }

 private:
  std::string_view rest_;
  std::size_t line_ = 0;
};

Diagnostic fault(const std::string& file, std::size_t line, std::string_view value, std::string what,
                 std::string cure) {
  constexpr std::size_t most_shown = 40;
  std::string shown;
  for (const char c : value.substr(0, most_shown)) shown += c >= ' ' && c < 127 ? c : '?';
  return {Diagnostic::Kind::input, file, Position{line, 1}, "", shown, std::move(what), std::move(cure)};
}

/// Groups up to the next one with code 0, which starts a record.
std::vector<Record> records(std::span<const Tag> tags) {
  std::vector<Record> result;
  std::size_t begin = 0;
  while (begin < tags.size() && tags[begin].code != 0) ++begin;
  while (begin < tags.size()) {
    std::size_t end = begin + 1;
    while (end < tags.size() && tags[end].code != 0) ++end;
    result.push_back({tags[begin].value, tags[begin].line, tags.subspan(begin + 1, end - begin - 1)});
    begin = end;
  }
  return result;
}

bool is(const Tag& tag, int code, std::string_view value) { return tag.code == code && tag.value == value; }

}  // namespace

std::variant<std::vector<Tag>, Diagnostic> split_dxf(std::string_view content, const std::string& file) {
  std::vector<Tag> tags;
  Lines lines(content);
  while (const auto head = lines.next()) {
    int code = 0;
    const auto [end, error] = std::from_chars(head->data(), head->data() + head->size(), code);
    const bool is_code = error == std::errc() && end == head->data() + head->size();
    const bool is_tail = head->empty() && !tags.empty() && is(tags.back(), 0, "EOF");
    if (is_tail) break;
    if (!is_code)
      return fault(file, lines.line(), *head, "a DXF file has a whole number, the group code, here",
                   "save the drawing as an ASCII DXF file once more");
    const auto value = lines.next();
    if (!value)
      return fault(file, lines.line(), *head, "the file ends after a group code, without the value",
                   "the file is cut off: save or copy it once more");
    tags.push_back({code, *value, lines.line()});
  }
  return tags;
}

std::optional<std::string_view> value_of(const Record& record, int code) {
  for (const Tag& tag : record.tags)
    if (tag.code == code) return tag.value;
  return std::nullopt;
}

std::optional<double> number(std::string_view text) {
  if (!text.empty() && text.front() == '+') text.remove_prefix(1);
  double value = 0.0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (error != std::errc() || end != text.data() + text.size() || !std::isfinite(value)) return std::nullopt;
  return value;
}

std::optional<double> number_of(const Record& record, int code) {
  const auto text = value_of(record, code);
  return text ? number(*text) : std::nullopt;
}

unsigned flags_of(const Record& record, int code) {
  const double value = number_of(record, code).value_or(0.0);
  return value >= 0.0 && value < 65536.0 ? static_cast<unsigned>(value) : 0U;
}

DxfSections sections_of(std::span<const Tag> tags) {
  DxfSections result;
  std::size_t at = 0;
  bool is_closed = true;
  while (at + 1 < tags.size()) {
    if (!is(tags[at], 0, "SECTION") || tags[at + 1].code != 2) {
      ++at;
      continue;
    }
    const std::string_view name = tags[at + 1].value;
    const std::size_t begin = at + 2;
    std::size_t end = begin;
    while (end < tags.size() && !is(tags[end], 0, "ENDSEC")) ++end;
    is_closed = is_closed && end < tags.size();
    const auto part = tags.subspan(begin, end - begin);
    if (name == "HEADER") result.header = part;
    if (name == "TABLES") result.tables = records(part);
    if (name == "BLOCKS") result.blocks = records(part);
    if (name == "ENTITIES") {
      result.entities = records(part);
      result.has_entities = true;
    }
    at = end + 1;
  }
  result.is_complete = is_closed && !tags.empty() && is(tags.back(), 0, "EOF");
  return result;
}

}  // namespace raiser::io
