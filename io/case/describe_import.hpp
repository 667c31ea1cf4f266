#pragma once

#include <string>

#include "io/case/case.hpp"

namespace raiser::io {

/// What was taken from a drawing, left out and repaired, and where its edges lie
/// in the drawing's coordinates; empty for a case without [import].
std::string describe_import(const Case& input);

}  // namespace raiser::io
