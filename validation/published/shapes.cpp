#include <array>
#include <cmath>
#include <numbers>
#include <utility>

#include "validation/published.hpp"
#include "validation/published/interpolate.hpp"

namespace raiser::validation {

namespace {

/// r/s and Kt, computed with converged finite elements (domain effect +0.03 %);
/// 0.5 is a circle, exactly 2. No published table stands behind it.
constexpr std::array<std::pair<double, double>, 6> square_biaxial{
    {{0.05, 6.7225}, {0.1, 4.8384}, {0.2, 3.4211}, {0.3, 2.7446}, {0.4, 2.3132}, {0.5, 2.0}}};

}  // namespace

double inglis_inclined(double a_over_b, double beta) {
  const double xi = std::atanh(1 / a_over_b);
  const auto stress = [&](double eta) {
    return (std::sinh(2 * xi) + std::cos(2 * beta) - std::exp(2 * xi) * std::cos(2 * (beta - eta))) /
           (std::cosh(2 * xi) - std::cos(2 * eta));
  };
  constexpr int steps = 2000;
  constexpr double step = std::numbers::pi / steps;
  double at = 0.0;  // the stress repeats after half a turn
  for (int k = 1; k < steps; ++k)
    if (stress(k * step) > stress(at)) at = k * step;
  double low = at - step, high = at + step;  // halved round the one maximum between
  for (int k = 0; k < 100; ++k) {
    const double third = (high - low) / 3;
    if (stress(low + third) < stress(high - third))
      low += third;
    else
      high -= third;
  }
  return stress((low + high) / 2);
}

double roark_ellipse(double a_over_b, double x) {
  const double s = std::sqrt(a_over_b);
  const double c1 = 1.000 + 2.000 * a_over_b;
  const double c2 = -0.351 - 0.021 * s - 2.483 * a_over_b;
  const double c3 = 3.621 - 5.183 * s + 4.494 * a_over_b;
  const double c4 = -2.270 + 5.204 * s - 4.011 * a_over_b;
  return c1 + x * (c2 + x * (c3 + x * c4));
}

double slot_estimate(double a_over_r) { return 1 + 2 * std::sqrt(a_over_r); }

double rounded_rectangle(double b_over_a, double r_over_b) {
  const double X = r_over_b, s = std::sqrt(X);
  const double c1 = 14.815 - 15.774 * s + 8.149 * X;
  const double c2 = -11.201 - 9.750 * s + 9.600 * X;
  const double c3 = 0.202 + 38.622 * s - 27.374 * X;
  const double c4 = 3.232 - 23.002 * s + 15.482 * X;
  return c1 + b_over_a * (c2 + b_over_a * (c3 + b_over_a * c4));
}

std::optional<double> rounded_square_biaxial(double r_over_s) {
  return interpolate(square_biaxial, r_over_s);
}

}  // namespace raiser::validation
