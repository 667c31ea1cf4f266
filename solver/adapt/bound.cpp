#include "solver/adapt/bound.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace raiser::solver {

double error_bound(std::span<const double> values, double scale) {
  const std::size_t n = values.size();
  if (n < 3) return std::numeric_limits<double>::infinity();
  constexpr double rounding = 2e-12;
  constexpr double decay = 6.0;  // of an earlier difference, from degree to degree
  const double last = std::abs(values[n - 1] - values[n - 2]);
  const double before = std::abs(values[n - 2] - values[n - 3]);
  double bound = std::max(last, before / decay);
  if (n > 3) bound = std::max(bound, std::abs(values[n - 3] - values[n - 4]) / (decay * decay));
  if (last > 0.5 * before) bound *= 2.0;
  return bound + rounding * std::abs(scale);
}

}  // namespace raiser::solver
