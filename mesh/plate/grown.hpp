#pragma once

#include "mesh/plate/crack.hpp"

namespace raiser::mesh {

/// The crack with one tip moved by `advance` mm along the line of its last
/// segment: out of the crack, or back into it when negative. Throws
/// std::invalid_argument when that takes the whole segment away.
Crack extended(Crack crack, bool at_end, double advance);

/// The crack with a segment of length `advance` mm added at one tip, turned from
/// straight ahead by `angle` rad, anticlockwise; no turn lengthens the last
/// segment. Throws std::invalid_argument when `advance` is not positive.
Crack kinked(Crack crack, bool at_end, double advance, double angle);

}  // namespace raiser::mesh
