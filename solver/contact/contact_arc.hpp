#pragma once

#include <vector>

#include "solver/elasticity/bearing.hpp"
#include "solver/extract/estimate.hpp"

namespace raiser::solver {

/// One arc over which a pin touches its hole.
struct ContactArc {
  BearingPressure pressure;
  bool all_round = false;   ///< the pin touches everywhere, as with enough interference
  Estimate begin;           ///< rad, from +x: the arc runs anticlockwise from here
  Estimate end;             ///< rad
  Estimate largest;         ///< MPa, the largest pressure on it
  double largest_at = 0.0;  ///< rad
};

/// The pressures on the arcs of one pin.
std::vector<BearingPressure> pressures(const std::vector<ContactArc>& arcs);

}  // namespace raiser::solver
