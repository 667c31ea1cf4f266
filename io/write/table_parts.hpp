#pragma once

#include <string>

#include "io/write/result.hpp"

namespace raiser::io {

// The parts of table(), each a block of lines that begins with an empty one,
// or nothing when there is nothing to say.

/// The holes, worst first: in full where there is room, else a line for each.
std::string raisers_part(const Result& result, const std::string& rest);

/// What each of several loads does by itself at the worst hole.
std::string loads_part(const Result& result);

/// The crack tips, worst first, and what each of several loads does at the worst.
std::string tips_part(const Result& result, const std::string& rest);

/// Published values beside the answers.
std::string published_part(const Result& result, const std::string& rest);

/// The places where no peak stress exists: what is reported instead, and why.
std::string places_part(const Result& result);

/// Checks on the whole plate and how it was computed.
/// Contact of pins and reactions of supports; empty without either.
std::string holding_part(const Result& result);
std::string checks_part(const Result& result);

}  // namespace raiser::io
