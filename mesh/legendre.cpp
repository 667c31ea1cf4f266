#include "mesh/legendre.hpp"

#include <cmath>
#include <numbers>

namespace raiser::mesh {

void legendre(int n, double s, double* values, double* slopes) {
  values[0] = 1.0;
  slopes[0] = 0.0;
  if (n == 0) return;
  values[1] = s;
  slopes[1] = 1.0;
  for (int k = 1; k < n; ++k) {
    values[k + 1] = ((2 * k + 1) * s * values[k] - k * values[k - 1]) / (k + 1);
    slopes[k + 1] = slopes[k - 1] + (2 * k + 1) * values[k];
  }
}

GaussRule gauss_legendre(int n) {
  GaussRule rule;
  std::vector<double> value(n + 1);
  std::vector<double> slope(n + 1);
  for (int i = 0; i < n; ++i) {
    double s = -std::cos(std::numbers::pi * (i + 0.75) / (n + 0.5));
    for (int step = 0; step < 20; ++step) {
      legendre(n, s, value.data(), slope.data());
      const double change = value[n] / slope[n];
      s -= change;
      if (std::abs(change) < 1e-16) break;
    }
    legendre(n, s, value.data(), slope.data());
    rule.points.push_back(s);
    rule.weights.push_back(2.0 / ((1.0 - s * s) * slope[n] * slope[n]));
  }
  return rule;
}

}  // namespace raiser::mesh
