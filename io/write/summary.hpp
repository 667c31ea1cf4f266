#pragma once

#include <string>
#include <vector>

#include "io/write/result.hpp"

namespace raiser::io {

/// Several cases, a line for each: its worst hole's peak and Kt, or why there
/// is none; then how many ended how. At most 80 columns.
std::string summary_table(const std::vector<Outcome>& outcomes);

/// "5 cases: 3 settled, 1 not met, 1 not read".
std::string tally(const std::vector<Outcome>& outcomes);

}  // namespace raiser::io
