#pragma once

#include <cstdint>

#include "solver/solution.hpp"

namespace raiser::validation {

/// A random legal plate with balanced loads, for calibrating error bounds.
/// 1 to 12 holes of all shapes; ligaments from 0.02 to 10 diameters (of the
/// smaller hole, sqrt(length width)), log-uniform, the narrow ones forced by
/// placing a hole beside another or beside an edge; ellipse ratios 0.1 to 10;
/// corner radii from 1 % of the smaller side to half of it; every kind of load
/// alone, several together, and groups of edge loads that balance jointly.
/// The same seed gives the same plate on every machine, to rounding.
solver::Problem random_plate(std::uint64_t seed);

/// The diameter that those ligaments are measured in, mm.
double mean_diameter(const mesh::Hole& hole);

}  // namespace raiser::validation
