#include <cmath>
#include <complex>

#include "validation/exact/exact.hpp"

namespace raiser::validation {

namespace {

using Complex = std::complex<double>;

/// The field of two potentials: phi' and phi'', and psi', as derivatives to z.
Stress of_potentials(const Point& x, const Complex& phi_1, const Complex& phi_2, const Complex& psi_1) {
  const double sum = 4 * phi_1.real();
  const Complex difference = 2.0 * (Complex(x.x(), -x.y()) * phi_2 + psi_1);
  return {(sum - difference.real()) / 2, (sum + difference.real()) / 2, difference.imag() / 2, 0.0};
}

}  // namespace

DeepNotches::DeepNotches(double half_width, double root_radius)
    : half_width_(half_width),
      edge_(std::atan(std::sqrt(half_width / root_radius))),
      focus_(half_width / std::sin(edge_)) {}

Stress DeepNotches::tension(const Point& x) const {
  const Complex w = std::asin(Complex(x.x(), x.y()) / focus_), c = std::cos(w);
  // phi = k w, psi = k (w + cos(2 edge) tan w); the section carries 2 k (2 edge + sin(2 edge)).
  const double k = half_width_ / (2 * edge_ + std::sin(2 * edge_));
  return of_potentials(x, k / (focus_ * c), k * std::sin(w) / (focus_ * focus_ * c * c * c),
                       k * (std::cos(2 * edge_) / (c * c) + 1.0) / (focus_ * c));
}

Stress DeepNotches::bending(const Point& x) const {
  const Complex w = std::asin(Complex(x.x(), x.y()) / focus_), c = std::cos(w);
  // phi = k focus cos w, psi = -k focus cos(2 edge) / cos w; the section carries the moment
  // -k focus^2 (sin(2 edge) - 2 edge cos(2 edge)).
  const double sine = std::sin(edge_);
  const double k = -2 * sine * sine / (3 * (std::sin(2 * edge_) - 2 * edge_ * std::cos(2 * edge_)));
  return of_potentials(x, -k * std::tan(w), -k / (focus_ * c * c * c),
                       -k * std::cos(2 * edge_) * std::sin(w) / (c * c * c));
}

}  // namespace raiser::validation
