#include <cmath>
#include <stdexcept>

#include "validation/exact/exact.hpp"

namespace raiser::validation {

namespace {

using Complex = std::complex<double>;

/// The roots with positive imaginary part of the characteristic equation
/// S11 mu^4 + (2 S12 + S66) mu^2 + S22 = 0 in the material's own axes.
std::array<Complex, 2> own_parameters(const solver::HookeLaw& law) {
  const double e1 = law.youngs_modulus;
  const double e2 = law.orthotropy ? law.orthotropy->youngs_modulus_2 : e1;
  const double g = law.orthotropy ? law.orthotropy->shear_modulus : e1 / (2 * (1 + law.poissons_ratio));
  const double sum = e1 / g - 2 * law.poissons_ratio;  // mu1^2 + mu2^2 = -sum, mu1^2 mu2^2 = E1 / E2
  const Complex root = std::sqrt(Complex(sum * sum / 4 - e1 / e2));
  std::array<Complex, 2> mu = {std::sqrt(-sum / 2 + root), std::sqrt(-sum / 2 - root)};
  for (Complex& m : mu)
    if (m.imag() < 0) m = -m;
  return mu;
}

/// The same root in axes turned clockwise by `angle`.
Complex turned_back(const Complex& mu, double angle) {
  const double c = std::cos(angle);
  const double s = std::sin(angle);
  return (mu * c + s) / (c - mu * s);
}

}  // namespace

Lekhnitskii::Lekhnitskii(const solver::HookeLaw& law, const RemoteStress& remote, const Ellipse& ellipse)
    : remote_(remote), ellipse_(ellipse), mu_(own_parameters(law)) {
  if (law.orthotropy)
    for (Complex& m : mu_) m = turned_back(m, law.orthotropy->angle);
  if (std::abs(mu_[0] - mu_[1]) < 1e-5)
    throw std::invalid_argument("Lekhnitskii: the two complex parameters coincide; use inglis()");
  // With phi_k = A_k / zeta_k, and dU/dx and dU/dy of Airy's function constant
  // along the free edge, where every zeta_k is exp(i theta):
  const double a = ellipse.along_x;
  const double b = ellipse.along_y;
  const Complex sum = 0.5 * Complex(-remote.yy * a, remote.xy * b);       // A1 + A2
  const Complex weighted = 0.5 * Complex(remote.xy * a, -remote.xx * b);  // mu1 A1 + mu2 A2
  amplitude_[0] = (weighted - mu_[1] * sum) / (mu_[0] - mu_[1]);
  amplitude_[1] = (weighted - mu_[0] * sum) / (mu_[1] - mu_[0]);
}

Stress Lekhnitskii::at(const Point& x) const {
  Stress stress{remote_.xx, remote_.yy, remote_.xy, 0.0};
  for (int k = 0; k < 2; ++k) {
    const Complex mu = mu_[k];
    const Complex foot = ellipse_.along_x - Complex(0, 1) * mu * ellipse_.along_y;
    const Complex z = x.x() + mu * x.y();
    const Complex square =
        ellipse_.along_x * ellipse_.along_x + mu * mu * ellipse_.along_y * ellipse_.along_y;
    Complex root = std::sqrt(z * z - square);
    if (std::norm(z - root) > std::norm(z + root)) root = -root;
    const Complex zeta = (z + root) / foot;
    const Complex slope = -amplitude_[k] / (zeta * root);  // phi_k'(z_k)
    stress.xx += 2 * (mu * mu * slope).real();
    stress.yy += 2 * slope.real();
    stress.xy -= 2 * (mu * slope).real();
  }
  return stress;
}

double lekhnitskii_factor(const solver::HookeLaw& law) {
  const double e1 = law.youngs_modulus;
  const double e2 = law.orthotropy ? law.orthotropy->youngs_modulus_2 : e1;
  const double g = law.orthotropy ? law.orthotropy->shear_modulus : e1 / (2 * (1 + law.poissons_ratio));
  return 1 + std::sqrt(2 * (std::sqrt(e1 / e2) - law.poissons_ratio) + e1 / g);
}

}  // namespace raiser::validation
