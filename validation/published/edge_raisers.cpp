#include "validation/published/edge_raisers.hpp"

#include <array>
#include <cmath>

namespace raiser::validation {

namespace {

/// C1 + C2 x + C3 x^2 + C4 x^3, each coefficient c0 + c1 sqrt(q) + c2 q.
using Coefficients = std::array<std::array<double, 3>, 4>;

double cubic(const Coefficients& c, double middle, double last, double x) {
  double sum = 0.0;
  for (std::size_t i = 4; i-- > 0;) sum = sum * x + c[i][0] + c[i][1] * middle + c[i][2] * last;
  return sum;
}

double in_root(const Coefficients& c, double q, double x) { return cubic(c, std::sqrt(q), q, x); }
double in_square(const Coefficients& c, double q, double x) { return cubic(c, q, q * q, x); }

}  // namespace

// All after W. C. Young and R. G. Budynas, Roark's Formulas for Stress and
// Strain, 7th ed. (2002), Table 17.1; digits from memory.

double u_pair_tension(double q, double x) {
  constexpr Coefficients blunt{
      {{0.850, 2.628, -0.413}, {-1.119, -4.826, 2.575}, {3.563, -0.514, -2.402}, {-2.294, 2.713, 0.240}}};
  constexpr Coefficients sharp{
      {{0.833, 2.069, -0.009}, {2.732, -4.157, 0.176}, {-8.859, 5.327, -0.320}, {6.294, -3.239, 0.154}}};
  return in_root(q <= 2 ? blunt : sharp, q, x);
}

double u_pair_bending(double q, double x) {
  constexpr Coefficients blunt{
      {{0.723, 2.845, -0.504}, {-1.836, -5.746, 1.314}, {7.254, -1.885, 1.646}, {-5.140, 4.785, -2.456}}};
  constexpr Coefficients sharp{
      {{0.833, 2.069, -0.009}, {0.024, -5.383, 0.126}, {-0.856, 6.460, -0.199}, {0.999, -3.146, 0.082}}};
  return in_root(q <= 2 ? blunt : sharp, q, x);
}

double u_single_tension(double q, double x) {
  constexpr Coefficients c{
      {{0.907, 2.125, 0.023}, {0.710, -11.289, 1.708}, {-0.672, 18.754, -4.046}, {0.175, -9.759, 2.365}}};
  return in_root(c, q, x);
}

double u_single_bending(double q, double x) {
  constexpr Coefficients blunt{
      {{1.795, 1.481, -0.211}, {-3.544, -3.677, 0.578}, {5.459, 3.691, -0.565}, {-2.678, -1.531, 0.205}}};
  constexpr Coefficients sharp{
      {{2.966, 0.502, -0.009}, {-6.475, -1.126, 0.019}, {8.023, 1.253, -0.020}, {-3.572, -0.634, 0.010}}};
  return in_square(q <= 2 ? blunt : sharp, q, x);
}

double u_single_nominal(double x) { return (1 + 2 * x) / ((1 - x) * (1 - x)); }

double u_half_plane(double t_over_r) { return 0.780 + 2.243 * std::sqrt(t_over_r); }

double ellipse_half_plane(double t_over_r) { return 0.855 + 2.21 * std::sqrt(t_over_r); }

double neuber_deep_tension(double q) {
  const double s = std::sqrt(q);
  return 2 * (q + 1) * s / ((q + 1) * std::atan(s) + s);
}

double neuber_deep_bending(double q) {
  const double s = std::sqrt(q);
  return 4 * q * s / (3 * (s + (q - 1) * std::atan(s)));
}

double v_pair_shallow(double ktu, double degrees) {
  if (degrees < 90) return ktu;
  return 1.11 * ktu - (0.0275 + 0.000145 * degrees + 0.0164 * std::pow(degrees / 120, 8)) * ktu * ktu;
}

double v_pair_deep(double ktu, double degrees) {
  if (degrees < 60) return ktu;
  return 1.11 * ktu - (0.0275 + 0.00042 * degrees + 0.0075 * std::pow(degrees / 120, 8)) * ktu * ktu;
}

double fillet_tension(double q, double x) {
  constexpr Coefficients blunt{
      {{1.007, 1.000, -0.031}, {-0.114, -0.585, 0.314}, {0.241, -0.992, -0.271}, {-0.134, 0.577, -0.012}}};
  constexpr Coefficients sharp{
      {{1.042, 0.982, -0.036}, {-0.074, -0.156, -0.010}, {-3.418, 1.220, -0.005}, {3.450, -2.046, 0.051}}};
  return in_root(q <= 2 ? blunt : sharp, q, x);
}

double fillet_bending(double q, double x) {
  constexpr Coefficients blunt{
      {{1.007, 1.000, -0.031}, {-0.270, -2.404, 0.749}, {0.677, 1.133, -0.904}, {-0.414, 0.271, 0.186}}};
  constexpr Coefficients sharp{
      {{1.042, 0.982, -0.036}, {-3.599, 1.619, -0.431}, {6.084, -5.607, 1.158}, {-2.527, 3.006, -0.691}}};
  return in_root(q <= 2 ? blunt : sharp, q, x);
}

double fillet_bending_power(double r_over_d) { return 1.0147 * std::pow(r_over_d, -0.2179); }

std::optional<double> fillet_tension_chart(double D_over_d, double r_over_d) {
  constexpr std::array<std::array<double, 3>, 14> read{{{1.05, 0.05, 1.680},
                                                        {1.05, 0.03, 1.895},
                                                        {1.1, 0.1, 1.630},
                                                        {1.1, 0.02, 2.456},
                                                        {1.2, 0.05, 2.264},
                                                        {1.2, 0.1, 1.911},
                                                        {1.3, 0.05, 2.513},
                                                        {1.3, 0.1, 2.072},
                                                        {1.5, 0.05, 2.800},
                                                        {1.5, 0.1, 2.254},
                                                        {1.5, 0.2, 1.858},
                                                        {2, 0.05, 3.077},
                                                        {2, 0.1, 2.449},
                                                        {2, 0.2, 1.969}}};
  for (const auto& [wide, radius, factor] : read)
    if (std::abs(wide - D_over_d) < 1e-9 && std::abs(radius - r_over_d) < 1e-9) return factor;
  return std::nullopt;
}

double lug_net(double x) { return 12.882 + x * (-52.714 + x * (89.762 - 51.667 * x)); }

double lug_bearing(double x) { return 0.2880 + x * (8.820 + x * (-23.196 + 29.167 * x)); }

double orthotropic_strip(double kt_infinite, double x) {
  const double isotropic = 3 * (1 - x) / (2 + std::pow(1 - x, 3));  // infinite over strip
  const double m2 = (std::sqrt(1 - 8 * (isotropic - 1)) - 1) / (2 * x * x);
  const double share = x * x * m2;
  const double ratio = isotropic + 0.5 * std::pow(share, 3) * (kt_infinite - 3) * (1 - share);
  return kt_infinite / ratio;
}

}  // namespace raiser::validation
