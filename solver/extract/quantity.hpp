#pragma once

#include <cstddef>

namespace raiser::solver {

/// The quantities that can be asked for: the first three are searched for at
/// every hole, the others belong to a crack tip.
enum class Quantity { largest_edge_stress, smallest_edge_stress, von_mises, stress_intensity, t_stress };
inline constexpr std::size_t quantity_count = 3;  ///< of those at a hole

constexpr bool is_at_tip(Quantity quantity) {
  return quantity == Quantity::stress_intensity || quantity == Quantity::t_stress;
}

}  // namespace raiser::solver
