#pragma once

#include <cstdint>

#include "solver/solution.hpp"

namespace raiser::validation {

/// A random legal plate with cracks and balanced loads, for calibrating the
/// bounds of K and T: one to four cracks, inside the plate, from an edge or from a
/// hole, straight, inclined or kinked; none to three holes of all shapes; lengths
/// from 1 % to half of the plate's smaller side or from 3 % to twice the hole's
/// mean diameter; every kind of load, alone and together, and pressure on the
/// faces of cracks. Now and then a crack lies on a mirror line of its plate.
/// The same seed gives the same plate on every machine, to rounding.
solver::Problem random_cracked_plate(std::uint64_t seed);

}  // namespace raiser::validation
