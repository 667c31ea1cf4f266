#pragma once

#include <string>

#include "io/case/case.hpp"
#include "io/write/result.hpp"

namespace raiser::io::test {

/// The text of a small case, and a case with two holes and two loads.
extern const char* const one_hole;
extern const char* const two_holes;

/// A case from text that is known to be good. Throws std::runtime_error with
/// its faults when it is not.
Case case_from(const std::string& text);

/// The same solved, once for each text in a process; a copy to alter at will.
Result solved(const std::string& text);

/// The longest line of a text, in columns.
std::size_t widest(const std::string& text);

}  // namespace raiser::io::test
