#include "solver/corner/wedge.hpp"

#include <Eigen/Core>
#include <Eigen/SVD>
#include <algorithm>
#include <cmath>
#include <functional>
#include <numbers>
#include <optional>
#include <stdexcept>

#include "mesh/legendre.hpp"

namespace raiser::solver {
namespace {

using Complex = std::complex<double>;
using Symmetry = WedgeMode::Symmetry;

/// A characteristic function and its derivative.
struct Characteristic {
  Symmetry symmetry;
  std::function<std::pair<Complex, Complex>(Complex)> at;
};

/// sin ew + factor e sin w.
Characteristic sine(double angle, double factor, Symmetry symmetry) {
  const double slope = factor * std::sin(angle);
  return {symmetry, [=](Complex e) {
            return std::pair(std::sin(e * angle) + slope * e, angle * std::cos(e * angle) + slope);
          }};
}

Characteristic clamped_free(double angle, double kappa) {
  const double s = std::sin(angle);
  return {Symmetry::none, [=](Complex e) {
            const Complex sine = std::sin(e * angle);
            return std::pair(4 * kappa * sine * sine - (kappa + 1) * (kappa + 1) + 4.0 * e * e * s * s,
                             8 * kappa * angle * sine * std::cos(e * angle) + 8.0 * e * s * s);
          }};
}

/// sin sin or cos cos of half the angle times e + 1 and e - 1.
Characteristic both_sliding(double angle, Symmetry symmetry) {
  const double shift = symmetry == Symmetry::symmetric ? 0.0 : std::numbers::pi / 2;
  return {symmetry, [=](Complex e) {
            const Complex a = (e + 1.0) * (angle / 2) + shift;
            const Complex b = (e - 1.0) * (angle / 2) + shift;
            return std::pair(std::sin(a) * std::sin(b),
                             angle / 2 * (std::cos(a) * std::sin(b) + std::sin(a) * std::cos(b)));
          }};
}

bool has(const Wedge& wedge, WedgeEdge edge) { return wedge.first == edge || wedge.second == edge; }

std::vector<Characteristic> characteristics(const Wedge& wedge, double kappa) {
  const double w = wedge.angle;
  const bool is_alike = wedge.first == wedge.second;
  if (is_alike && wedge.first == WedgeEdge::free)
    return {sine(w, 1.0, Symmetry::symmetric), sine(w, -1.0, Symmetry::antisymmetric)};
  if (is_alike && wedge.first == WedgeEdge::clamped)
    return {sine(w, -1.0 / kappa, Symmetry::symmetric), sine(w, 1.0 / kappa, Symmetry::antisymmetric)};
  if (is_alike) return {both_sliding(w, Symmetry::symmetric), both_sliding(w, Symmetry::antisymmetric)};
  if (!has(wedge, WedgeEdge::sliding)) return {clamped_free(w, kappa)};
  const double factor = has(wedge, WedgeEdge::free) ? 1.0 : -1.0 / kappa;
  return {sine(2 * w, factor, Symmetry::none)};
}

/// Newton's method; nothing when it does not come to rest.
std::optional<Complex> root_from(const Characteristic& f, Complex start) {
  Complex e = start;
  for (int step = 0; step < 60; ++step) {
    const auto [value, slope] = f.at(e);
    if (slope == 0.0) return std::nullopt;
    const Complex change = value / slope;
    e -= change;
    if (!(std::abs(e) < 50.0)) return std::nullopt;
    if (std::abs(change) < 4e-16 * (1 + std::abs(e))) return e;
    if (step > 40 && std::abs(change) < 1e-9) return e;  // a double root
  }
  return std::nullopt;
}

void add_roots(const Characteristic& f, double below, std::vector<Exponent>& out) {
  constexpr double close = 1e-7;
  const int columns = static_cast<int>(std::ceil(24 * below));
  constexpr int rows = 5;
  for (int i = 0; i <= columns; ++i)
    for (int j = 0; j < rows; ++j) {
      const auto found = root_from(f, {below * (i + 0.37) / columns, 0.3 * j});
      if (!found || found->real() < 1e-6 || found->real() >= below - 1e-9) continue;
      Complex e = *found;
      if (std::abs(e.imag()) < close) e = e.real();
      if (e.imag() < 0) e = std::conj(e);
      if (std::abs(e - 1.0) < close) continue;
      const auto is_known = [&](const Exponent& known) {
        return known.symmetry == f.symmetry && std::abs(known.value - e) < close;
      };
      if (std::none_of(out.begin(), out.end(), is_known)) out.push_back({e, f.symmetry});
    }
}

/// Values over the four coefficients of a quantity at theta, for r = 1.
using Row = std::array<Complex, 4>;
Row shape_row(Complex e, double t) {
  return {std::cos((e + 1.0) * t), std::sin((e + 1.0) * t), std::cos((e - 1.0) * t), std::sin((e - 1.0) * t)};
}
/// The first and second derivative of F, from its own row.
Row slope_row(Complex e, const Row& s) {
  return {-(e + 1.0) * s[1], (e + 1.0) * s[0], -(e - 1.0) * s[3], (e - 1.0) * s[2]};
}
Row curvature_row(Complex e, const Row& s) {
  const Complex a = -(e + 1.0) * (e + 1.0);
  const Complex b = -(e - 1.0) * (e - 1.0);
  return {a * s[0], a * s[1], b * s[2], b * s[3]};
}
/// 2 mu u_r and 2 mu u_t, from Kolosov's formula.
Row radial_row(Complex e, const Row& s, double kappa) {
  return {-(e + 1.0) * s[0], -(e + 1.0) * s[1], (kappa - e) * s[2], (kappa - e) * s[3]};
}
Row hoop_row(Complex e, const Row& s, double kappa) {
  return {(e + 1.0) * s[1], -(e + 1.0) * s[0], (kappa + e) * s[3], -(kappa + e) * s[2]};
}

Complex times(const Row& row, const std::array<Complex, 4>& c) {
  return row[0] * c[0] + row[1] * c[1] + row[2] * c[2] + row[3] * c[3];
}

/// The coefficients of the field with exponent e that keeps the conditions.
std::array<Complex, 4> coefficients(const Wedge& wedge, Complex e, Symmetry symmetry, double kappa) {
  Eigen::Matrix4cd conditions;
  const std::array edges{wedge.first, wedge.second};
  for (int k = 0; k < 2; ++k) {
    const double t = (k == 0 ? -0.5 : 0.5) * wedge.angle;
    const Row shape = shape_row(e, t);
    const Row first = edges[k] == WedgeEdge::free      ? shape
                      : edges[k] == WedgeEdge::clamped ? radial_row(e, shape, kappa)
                                                       : slope_row(e, shape);
    const Row second = edges[k] == WedgeEdge::free ? slope_row(e, shape) : hoop_row(e, shape, kappa);
    for (int c = 0; c < 4; ++c) {
      conditions(2 * k, c) = first[c];
      conditions(2 * k + 1, c) = second[c];
    }
  }
  std::array<Complex, 4> result{};
  if (symmetry == Symmetry::none) {
    const Eigen::JacobiSVD<Eigen::Matrix4cd> svd(conditions, Eigen::ComputeFullV);
    for (int c = 0; c < 4; ++c) result[c] = svd.matrixV()(c, 3);
    return result;
  }
  // A symmetric field has cosines only, an antisymmetric one sines only.
  const int first = symmetry == Symmetry::symmetric ? 0 : 1;
  Eigen::Matrix<Complex, 4, 2> part;
  part << conditions.col(first), conditions.col(first + 2);
  const Eigen::JacobiSVD<Eigen::Matrix<Complex, 4, 2>> svd(part, Eigen::ComputeFullV);
  for (int c = 0; c < 2; ++c) result[first + 2 * c] = svd.matrixV()(c, 1);
  return result;
}

/// Stress at theta on r = 1.
Complex hoop_stress(const WedgeMode& mode, double t) {
  return mode.exponent * (mode.exponent + 1.0) * times(shape_row(mode.exponent, t), mode.coefficients);
}
Complex shear_stress(const WedgeMode& mode, double t) {
  return -mode.exponent * times(slope_row(mode.exponent, shape_row(mode.exponent, t)), mode.coefficients);
}

void normalise(WedgeMode& mode, const Wedge& wedge) {
  const bool is_second = wedge.first == WedgeEdge::free || wedge.second == WedgeEdge::sliding;
  const double held = (is_second ? 0.5 : -0.5) * wedge.angle;
  std::array<Complex, 4> sizes{hoop_stress(mode, held), shear_stress(mode, held), hoop_stress(mode, 0.0),
                               shear_stress(mode, 0.0)};
  const double largest = std::abs(*std::max_element(
      sizes.begin(), sizes.end(), [](Complex a, Complex b) { return std::abs(a) < std::abs(b); }));
  const std::size_t first = mode.symmetry == Symmetry::none ? 0 : 2;
  const Complex size = *std::find_if(sizes.begin() + first, sizes.end(),
                                     [&](Complex v) { return std::abs(v) > 1e-6 * largest; });
  const Complex factor = 1.0 / (std::sqrt(2 * std::numbers::pi) * size);
  for (Complex& c : mode.coefficients) c *= factor;
}

WedgeMode mode_of(const Wedge& wedge, Complex exponent, Symmetry symmetry, const PlaneConstants& material) {
  return {exponent, symmetry, coefficients(wedge, exponent, symmetry, material.kappa)};
}

}  // namespace

PlaneConstants plane_constants(const HookeLaw& material) {
  const double nu = material.poissons_ratio;
  return {material.youngs_modulus / (2 * (1 + nu)),
          material.state == PlaneState::stress ? (3 - nu) / (1 + nu) : 3 - 4 * nu};
}

ComplexWedgeField WedgeMode::complex_at(double r, double theta, const PlaneConstants& material) const {
  const Complex e = exponent;
  const double kappa = material.kappa;
  const Complex growth = is_complex() ? std::pow(Complex(r), e) : Complex(std::pow(r, e.real()));
  const Complex stress = growth / r;
  const Complex displacement = growth / (2 * material.shear_modulus);
  const Row row = shape_row(e, theta);
  const Complex shape = times(row, coefficients);
  return {stress * (times(curvature_row(e, row), coefficients) + (e + 1.0) * shape),
          stress * e * (e + 1.0) * shape, -stress * e * times(slope_row(e, row), coefficients),
          displacement * times(radial_row(e, row, kappa), coefficients),
          displacement * times(hoop_row(e, row, kappa), coefficients)};
}

WedgeField WedgeMode::at(double r, double theta, const PlaneConstants& material, Complex amplitude) const {
  const ComplexWedgeField f = complex_at(r, theta, material);
  const auto part = [&](Complex value) { return (amplitude * value).real(); };
  return {part(f.rr), part(f.tt), part(f.rt), part(f.u_r), part(f.u_t)};
}

std::vector<Exponent> exponents(const Wedge& wedge, double kappa, double below) {
  if (!(wedge.angle > 0 && wedge.angle <= 2 * std::numbers::pi * (1 + 1e-12)))
    throw std::invalid_argument("exponents: the angle of a wedge lies above 0 and at most at 2 pi");
  if (wedge.first == WedgeEdge::sliding && wedge.second == WedgeEdge::sliding && wedge.angle > 6.28)
    throw std::invalid_argument("exponents: both faces of a slit cannot slide on supports");
  std::vector<Exponent> result;
  for (const Characteristic& f : characteristics(wedge, kappa)) add_roots(f, below, result);
  std::stable_sort(result.begin(), result.end(), [](const Exponent& a, const Exponent& b) {
    return a.value.real() < b.value.real() - 1e-12;
  });
  return result;
}

std::vector<WedgeMode> singular_modes(const Wedge& wedge, const PlaneConstants& material) {
  std::vector<WedgeMode> result;
  for (const Exponent& e : exponents(wedge, material.kappa, 1.0)) {
    WedgeMode mode = mode_of(wedge, e.value, e.symmetry, material);
    normalise(mode, wedge);
    result.push_back(mode);
  }
  return result;
}

WedgeMode dual(const WedgeMode& mode, const Wedge& wedge, const PlaneConstants& material) {
  return mode_of(wedge, -mode.exponent, mode.symmetry, material);
}

Complex pairing(const WedgeMode& mode, const WedgeMode& other, const Wedge& wedge,
                const PlaneConstants& material) {
  static const mesh::GaussRule rule = mesh::gauss_legendre(40);
  Complex sum = 0.0;
  for (std::size_t q = 0; q < rule.points.size(); ++q) {
    const double t = 0.5 * wedge.angle * rule.points[q];
    const ComplexWedgeField a = mode.complex_at(1.0, t, material);
    const ComplexWedgeField b = other.complex_at(1.0, t, material);
    sum += rule.weights[q] * (a.rr * b.u_r + a.rt * b.u_t - b.rr * a.u_r - b.rt * a.u_t);
  }
  return 0.5 * wedge.angle * sum;
}

}  // namespace raiser::solver
