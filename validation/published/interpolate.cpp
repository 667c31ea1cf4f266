#include "validation/published/interpolate.hpp"

#include <algorithm>
#include <cstddef>

namespace raiser::validation {

std::optional<double> interpolate(std::span<const std::pair<double, double>> table, double x) {
  if (table.empty() || !(x >= table.front().first && x <= table.back().first)) return std::nullopt;
  const auto above = std::lower_bound(table.begin(), table.end(), x,
                                      [](const auto& entry, double value) { return entry.first < value; });
  const auto index = static_cast<std::size_t>(above - table.begin());
  const std::size_t count = std::min<std::size_t>(4, table.size());
  const std::size_t first = std::min(index > 2 ? index - 2 : 0, table.size() - count);
  const auto used = table.subspan(first, count);
  double sum = 0.0;
  for (const auto& [xi, yi] : used) {
    double weight = 1.0;
    for (const auto& [xj, yj] : used) {
      if (xj != xi) weight *= (x - xj) / (xi - xj);
    }
    sum += weight * yi;
  }
  return sum;
}

}  // namespace raiser::validation
