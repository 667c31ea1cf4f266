#pragma once

#include <optional>
#include <span>
#include <utility>

namespace raiser::validation {

/// The value at x of the cubic through the four table entries (x, y) nearest
/// to it, fewer when the table is shorter; x ascending. Empty outside the table.
std::optional<double> interpolate(std::span<const std::pair<double, double>> table, double x);

}  // namespace raiser::validation
