#pragma once

#include <cstddef>

namespace raiser::solver {

/// The quantities that are searched for, and can be asked for, at every hole.
enum class Quantity { largest_edge_stress, smallest_edge_stress, von_mises };
inline constexpr std::size_t quantity_count = 3;

}  // namespace raiser::solver
