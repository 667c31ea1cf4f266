#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "io/case/case.hpp"

namespace raiser::io {

/// Whether a text is fit to be parsed: not empty, not larger than
/// `most_bytes`, valid UTF-8 without NUL, nothing but ASCII outside quotes and
/// comments (as TOML demands), and no deeper nesting than any case has. The
/// first breach, or nothing. One pass, no recursion.
std::optional<Diagnostic> screen(std::string_view content, const std::string& name);

/// The text without a leading UTF-8 byte order mark.
std::string_view without_byte_order_mark(std::string_view content);

/// The reason and cure for a text of more than `most_bytes` bytes.
Diagnostic too_large(std::uintmax_t bytes, const std::string& name);

}  // namespace raiser::io
