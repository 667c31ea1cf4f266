#pragma once

#include <cstdint>

#include "solver/solution.hpp"

namespace raiser::validation {

/// A random legal plate with balanced loads and holes of drawn shapes, for
/// calibrating error bounds. One to four holes, the first and half of the others
/// drawn: 3 to 8 straight pieces round a middle, their corners rounded with 1 % to
/// 15 % of the mean diameter, some of them inward, every other piece now and then
/// an arc. Ligaments and loads as random_plate(seed) has them, every third plate
/// orthotropic. The same seed gives the same plate on every machine, to rounding.
solver::Problem random_drawn_plate(std::uint64_t seed);

}  // namespace raiser::validation
