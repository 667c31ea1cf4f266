#pragma once

#include <string>

#include "io/case/case.hpp"

namespace raiser::io {

/// The case as understood, for a person: every value with its unit, every
/// default marked as one, and the figures that follow from them (gross area,
/// force of each load, net section at each hole). At most 80 columns as long
/// as the author's own names are short; many holes are abbreviated.
std::string describe(const Case& input);

}  // namespace raiser::io
