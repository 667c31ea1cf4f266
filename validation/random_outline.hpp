#pragma once

#include <cstdint>

#include "solver/solution.hpp"

namespace raiser::validation {

/// A random legal plate whose outline raises the stress, with balanced or held
/// loads, for calibrating error bounds. A third each: a rectangle with one to four
/// notches of all shapes, a bar with one to three shoulders and every fillet that
/// has a peak, a free outline of straight pieces with corner radii and inward
/// arcs between two ends. None to two holes of all shapes in it. Root and fillet
/// radii from 0.5 % of the depth to all of it, depths from 2 % to 45 % of the width.
/// Every third plate is orthotropic, E1 / E2 from 1 to 20, at any angle. Loads:
/// tension and bending on the ends, pressure in a hole, alone and together, or edge
/// loads on a plate clamped at its left end. The same seed gives the same plate on
/// every machine, to rounding.
solver::Problem random_outlined_plate(std::uint64_t seed);

}  // namespace raiser::validation
