#include "io/case/screen.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cstdint>

namespace raiser::io {

namespace {

constexpr int deepest = 16;  // a case needs 3

Diagnostic fault_at(const std::string& name, std::optional<Position> position, std::string what,
                    std::string cure) {
  Diagnostic fault;
  fault.file = name;
  fault.position = position;
  fault.what = std::move(what);
  fault.cure = std::move(cure);
  return fault;
}

/// The bytes of the UTF-8 character at the start of the text, 0 when it is not
/// valid (Unicode standard, table 3-7, well-formed byte sequences).
std::size_t character_length(std::string_view text) {
  const auto byte = [text](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const unsigned char first = byte(0);
  if (first < 0x80) return 1;
  const std::size_t length = first < 0xC2 ? 0 : first < 0xE0 ? 2 : first < 0xF0 ? 3 : first < 0xF5 ? 4 : 0;
  if (length == 0 || text.size() < length) return 0;
  const unsigned char low = first == 0xE0 ? 0xA0 : first == 0xF0 ? 0x90 : 0x80;
  const unsigned char high = first == 0xED ? 0x9F : first == 0xF4 ? 0x8F : 0xBF;
  if (byte(1) < low || byte(1) > high) return 0;
  for (std::size_t i = 2; i < length; ++i) {
    if ((byte(i) & 0xC0U) != 0x80U) return 0;
  }
  return length;
}

/// Walks over a text and knows whether it is inside quotes or a comment.
class Scanner {
 public:
  explicit Scanner(std::string_view text) : text_(text) {}

  bool done() const { return text_.empty(); }
  Position position() const { return position_; }
  bool in_quotes() const { return quote_ != '\0'; }
  bool in_comment() const { return comment_; }
  std::string_view rest() const { return text_; }
  int depth() const { return std::max(brackets_, dots_); }

  /// Whether the text goes on where a quote opens or closes in the middle of
  /// it, as in 3"x" or "a"b. There a parser may not see quotes where this
  /// scanner does.
  bool at_misplaced_quote() const {
    if (text_.empty() || in_quotes() || comment_) return false;
    const bool quote = text_[0] == '"' || text_[0] == '\'';
    if (before_ == closing_quote)
      return std::string_view(" \t\r\n]},=.#").find(text_[0]) == std::string_view::npos;
    return quote && std::string_view("\n \t\r=[{,.").find(before_) == std::string_view::npos;
  }

  /// Whether TOML's quotes for texts of several lines open here. No value of a
  /// case needs them, and a parser may read them otherwise, as in """a" = 1.
  bool at_tripled_quote() const {
    return !in_quotes() && !comment_ && (text_.starts_with("\"\"\"") || text_.starts_with("'''"));
  }

  /// Steps over one character of the given length in bytes.
  void step(std::size_t length) {
    const char c = text_[0];
    const bool quoted = in_quotes();
    if (c == '\n') {
      end_line();
    } else if (quoted) {
      length = step_in_quotes(length);
    } else if (!comment_) {
      length = step_outside(length);
    }
    before_ = quoted && !in_quotes() && c != '\n' ? closing_quote : c;
    text_.remove_prefix(length);
    if (c != '\n')
      position_.column += 1 + (length > 1 && static_cast<unsigned char>(c) < 0x80 ? length - 1 : 0);
  }

 private:
  static constexpr char closing_quote = '\x01';  // stands for either kind; no text has it outside quotes

  void end_line() {
    ++position_.line;
    position_.column = 1;
    comment_ = false;
    dots_ = 0;
    quote_ = '\0';
  }

  std::size_t step_in_quotes(std::size_t length) {
    const bool escaped = text_[0] == '\\' && quote_ == '"' && text_.size() > 1;
    if (escaped && (text_[1] == '"' || text_[1] == '\\')) return 2;
    if (text_[0] == quote_) quote_ = '\0';
    return length;
  }

  std::size_t step_outside(std::size_t length) {
    const char c = text_[0];
    if (c == '"' || c == '\'') quote_ = c;
    if (c == '#') comment_ = true;
    if (c == '.') ++dots_;
    if (c == '=' || c == ',') dots_ = 0;
    if (c == '[' || c == '{') ++brackets_;
    if ((c == ']' || c == '}') && brackets_ > 0) --brackets_;
    return length;
  }

  std::string_view text_;
  Position position_;
  char before_ = '\n';  ///< the character stepped over last
  char quote_ = '\0';
  bool comment_ = false;
  int brackets_ = 0;
  int dots_ = 0;
};

/// What is wrong with the character of `length` bytes that comes next.
std::optional<Diagnostic> breach(const Scanner& scanner, std::size_t length, const std::string& name) {
  if (length == 0 || scanner.rest()[0] == '\0') {
    return fault_at(name, scanner.position(), "this is not text in UTF-8",
                    "check that this is a case file, and save it as UTF-8");
  }
  if (scanner.at_tripled_quote()) {
    return fault_at(name, scanner.position(), "three quotes open a text of several lines",
                    "write each text in one pair of quotes on one line");
  }
  if (scanner.at_misplaced_quote()) {
    return fault_at(name, scanner.position(), "a quote opens or closes in the middle of a word",
                    "put the whole text in one pair of quotes, and a comma or a new line after it");
  }
  if (length > 1 && !scanner.in_quotes() && !scanner.in_comment()) {
    return fault_at(name, scanner.position(),
                    fmt::format("the character {} stands outside quotes", scanner.rest().substr(0, length)),
                    "use straight quotes (\") and plain spaces, and put any other text in quotes");
  }
  return std::nullopt;
}

}  // namespace

std::string_view without_byte_order_mark(std::string_view content) {
  constexpr std::string_view mark = "\xEF\xBB\xBF";
  return content.starts_with(mark) ? content.substr(mark.size()) : content;
}

Diagnostic too_large(std::uintmax_t bytes, const std::string& name) {
  return fault_at(
      name, std::nullopt, fmt::format("the file has {:.1f} MB", static_cast<double>(bytes) / 1048576.0),
      fmt::format("a case has at most {} MB; check that this is the right file", most_bytes / 1048576));
}

std::optional<Diagnostic> screen(std::string_view content, const std::string& name) {
  if (content.size() > most_bytes) return too_large(content.size(), name);
  if (content.find_first_not_of(" \t\r\n") == std::string_view::npos) {
    return fault_at(name, std::nullopt, "the file is empty",
                    "write a case; examples/hanger.toml is one to start from");
  }
  for (Scanner scanner(content); !scanner.done();) {
    const std::size_t length = character_length(scanner.rest());
    if (auto fault = breach(scanner, length, name)) return fault;
    scanner.step(length);
    if (scanner.depth() > deepest) {
      return fault_at(name, scanner.position(), "brackets or dots nest deeper than in any case",
                      "close each [ and {, and write one [table] or [[table]] at a time");
    }
  }
  return std::nullopt;
}

}  // namespace raiser::io
