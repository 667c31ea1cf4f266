#pragma once

#include <vector>

#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

/// What makes the plate's outline illegal: it does not close, runs clockwise,
/// touches or crosses itself, has a neck too thin or a corner too pointed to
/// resolve, or its bounding box is not centred at the origin.
std::vector<PlateFault> outline_faults(const Plate& plate);

/// The same for hole `hole` and the plate's outline: outside, crossing,
/// touching or too near. `hole` must have legal sizes and the outline no faults.
std::vector<PlateFault> faults_at_outline(const Plate& plate, std::size_t hole);

}  // namespace raiser::mesh
