#include "solver/adapt/bound.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace raiser::solver {

double error_bound(std::span<const double> values, double scale, double slowness) {
  const std::size_t n = values.size();
  if (n < 3) return std::numeric_limits<double>::infinity();
  constexpr double rounding = 2e-12;
  constexpr double decay = 8.0;      // of an earlier difference, from degree to degree
  constexpr double irregular = 3.0;  // where the last difference is hardly smaller than the one before
  double bound = 0.0;
  double share = 1.0;
  for (std::size_t i = n - 1; i > 0; --i, share /= decay)
    bound = std::max(bound, share * std::abs(values[i] - values[i - 1]));
  const double last = std::abs(values[n - 1] - values[n - 2]);
  const double before = std::abs(values[n - 2] - values[n - 3]);
  bound *= std::max(slowness, last > 0.5 * before ? irregular : 1.0);
  return bound + rounding * std::abs(scale);
}

double tail_factor(std::span<const double> values, int degree) {
  constexpr double least = 1.25, most = 6.0;
  const std::size_t n = values.size();
  if (n < 3) return most;
  const double last = std::abs(values[n - 1] - values[n - 2]);
  const double before = std::abs(values[n - 2] - values[n - 3]);
  if (last == 0.0) return least;
  // Where the error is c / p^k, differences are in the ratio ((p - 1) / p)^(k + 1), and
  // p / k of the last one is still to come.
  const double p = degree;
  const double power = std::log(before / last) / std::log(p / (p - 1)) - 1;
  return power > 2 * p / most ? std::max(least, 2 * p / power) : most;
}

}  // namespace raiser::solver
