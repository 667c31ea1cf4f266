#include <array>
#include <cmath>
#include <utility>

#include "validation/published.hpp"
#include "validation/published/interpolate.hpp"

namespace raiser::validation {

namespace {

/// d/W and Kt net. R. C. J. Howland, Phil. Trans. R. Soc. A 229 (1930) 49-86,
/// table of the largest stress; digits from memory.
constexpr std::array<std::pair<double, double>, 6> howland_table{
    {{0.0, 3.0}, {0.1, 2.73}, {0.2, 2.51}, {0.3, 2.35}, {0.4, 2.24}, {0.5, 2.16}}};

/// r/c and Kt gross for one e/c. S. Sjostrom, FFA Report 36, Aeronautical
/// Research Institute of Sweden (1950): figures read off the chart.
using Row = std::pair<double, double>;
constexpr std::array<Row, 2> sjostrom_1{{{0.2, 3.1515}, {0.25, 3.2513}}};
constexpr std::array<Row, 4> sjostrom_2{{{0.25, 3.2257}, {0.3, 3.3399}, {0.4, 3.6685}, {0.45, 3.9047}}};
constexpr std::array<Row, 4> sjostrom_4{{{0.25, 3.2003}, {0.3, 3.3025}, {0.4, 3.5924}, {0.45, 3.7997}}};
constexpr std::array<Row, 3> sjostrom_half_plane{{{0.2, 3.0774}, {0.25, 3.1313}, {0.3, 3.2028}}};

struct SjostromCurve {
  double c_over_e;
  std::span<const Row> rows;
};

}  // namespace

std::optional<double> howland(double x) { return interpolate(howland_table, x); }

double heywood(double x) { return 2 + std::pow(1 - x, 3); }

double roark_circle(double x) { return 3.00 + x * (-3.13 + x * (3.66 - 1.53 * x)); }

double peterson_circle(double x) {
  const double y = 1 - x;
  return 2 + y * (0.284 + y * (-0.600 + 1.32 * y));
}

double bending_nominal(double x) { return x / (1 - x * x * x); }

double bending_edge_nominal(double x) { return 1 / (1 - x * x * x); }

double roark_eccentric(double q, double c_over_w) {
  const double root = std::sqrt(1 - q * q);
  const double nominal = root / (1 - q) * (1 - c_over_w) / (1 - c_over_w * (2 - root));
  return roark_circle(q) * nominal;
}

std::optional<double> sjostrom_eccentric(double q, double e_over_c) {
  const std::array<SjostromCurve, 4> curves{
      {{0.0, sjostrom_half_plane}, {0.25, sjostrom_4}, {0.5, sjostrom_2}, {1.0, sjostrom_1}}};
  const double s = 1 / e_over_c;
  for (std::size_t i = 0; i + 1 < curves.size(); ++i) {
    const auto& [low, low_rows] = curves[i];
    const auto& [high, high_rows] = curves[i + 1];
    if (s < low || s > high) continue;
    const auto at_low = interpolate(low_rows, q), at_high = interpolate(high_rows, q);
    if (at_low && s == low) return at_low;
    if (at_high && s == high) return at_high;
    if (at_low && at_high) return *at_low + (*at_high - *at_low) * (s - low) / (high - low);
  }
  return std::nullopt;
}

double half_plane_near(double q) {
  return 3.0004 + q * (0.083503 + q * (7.3417 + q * (-38.046 + q * (106.037 + q * (-130.133 + q * 65.065)))));
}

double half_plane_far(double q) {
  return 2.9943 + q * (0.54971 + q * (-2.32876 + q * (8.9718 + q * (-13.344 + q * 7.1452))));
}

double pressure_rim(double q) { return (q * q + 1) / (q * q - 1); }

double pressure_edge(double q) { return 4 / (q * q - 1); }

double pressure_ring(double ratio) { return (ratio * ratio + 1) / (ratio * ratio - 1); }

}  // namespace raiser::validation
