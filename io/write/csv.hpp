#pragma once

#include <string>
#include <vector>

#include "io/write/result.hpp"

namespace raiser::io {

// Comma-separated values after RFC 4180 (Y. Shafranovich, "Common Format and
// MIME Type for Comma-Separated Values (CSV) Files", 2005), lines ended by a
// single newline. The first line names the columns with their units. A number
// that does not exist is an empty cell.

/// Stress along the edge of every hole against the angle.
std::string edge_csv(const Case& input, const solver::Solution& solution);

/// Stress along every ligament.
std::string ligament_csv(const Case& input, const solver::Solution& solution);

/// Stress intensity, T and what goes with them at every crack tip, under all
/// loads together and under each.
std::string tips_csv(const Result& result);

/// A line for each raiser and each crack tip of each case, and one for each case
/// without results.
std::string summary_csv(const std::vector<Outcome>& outcomes);

}  // namespace raiser::io
