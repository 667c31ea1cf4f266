#pragma once

#include "solver/elasticity/load.hpp"

namespace raiser::solver {

/// nominal_state() of the gross sections through any place; no pressure counts.
NominalState nominal_state_at(const Plate& plate, const std::vector<Load>& loads, const Point& place);

}  // namespace raiser::solver
