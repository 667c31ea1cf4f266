#pragma once

#include <vector>

#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

/// What makes the plate's cracks illegal, with the place: figures that are not
/// finite, segments of no length or folded back, a mouth that lies on no edge, a
/// crack that leaves the plate, meets a hole, another crack or itself, and
/// distances too small to resolve. The plate without its cracks must be legal.
std::vector<PlateFault> crack_faults(const Plate& plate);

}  // namespace raiser::mesh
