#pragma once

#include <cstdint>

#include "solver/solution.hpp"

namespace raiser::validation {

/// A random legal plate pulled by pins, for calibrating the bounds of bearing and
/// contact: one to three round holes, one or two of them with a pin, sometimes a
/// tension that passes them by; ligaments from 0.25 diameters up; half of the
/// plates with cosine pressures, half with rigid pins in contact, of which a
/// quarter fit neatly, others have clearance up to 1 % of the diameter or
/// interference; mean strain of bearing E^-1 F / (d t) from 1e-4 to 2e-3. The left
/// edge is clamped, or loads on the edges take the pins' forces up. The same seed
/// gives the same plate on every machine, to rounding.
solver::Problem random_pinned_plate(std::uint64_t seed);

}  // namespace raiser::validation
