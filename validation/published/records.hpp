#pragma once

#include <vector>

#include "validation/published.hpp"

namespace raiser::validation {

/// The records of one group each, in the order of the enumeration.
std::vector<Published> notch_records();
std::vector<Published> step_and_lug_records();
std::vector<Published> strip_crack_records();
std::vector<Published> hole_crack_records();

}  // namespace raiser::validation
