#pragma once

#include <string>

#include "io/case/case.hpp"

namespace raiser::io {

/// The cracks of a case and their tips, for a person; empty when there are none.
std::string describe_cracks(const Case& input);

}  // namespace raiser::io
