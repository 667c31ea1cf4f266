#include "solver/crack/near_field.hpp"

#include <Eigen/Eigenvalues>
#include <cmath>
#include <numbers>

#include "mesh/legendre.hpp"

namespace raiser::solver {
namespace {

using Complex = std::complex<double>;
using std::numbers::pi;

/// Roots of a11 m^4 - 2 a16 m^3 + (2 a12 + a66) m^2 - 2 a26 m + a22 = 0 in the
/// upper half plane.
std::array<Complex, 2> characteristic_roots(const Eigen::Matrix3d& a) {
  Eigen::Matrix4d companion = Eigen::Matrix4d::Zero();
  companion.diagonal(-1).setOnes();
  companion.col(3) << -a(1, 1), 2 * a(1, 2), -(2 * a(0, 1) + a(2, 2)), 2 * a(0, 2);
  companion.col(3) /= a(0, 0);
  const Eigen::Vector4cd all = companion.eigenvalues();
  std::array<Complex, 2> upper{};
  std::size_t count = 0;
  for (const Complex& root : all)
    if (root.imag() > 0 && count < 2) upper[count++] = root;
  return upper;
}

/// Power -1/2 or -1 of a point of the plane cut along the negative real axis.
Complex power(NearFields::Kind kind, const Complex& z) {
  return kind == NearFields::line_force ? 1.0 / z : 1.0 / std::sqrt(z);
}

}  // namespace

double interaction(const NearField& a, const NearField& b, const Eigen::Matrix3d& compliance,
                   const Eigen::Vector2d& n) {
  const auto traction = [&](const NearField& f) {
    return Eigen::Vector2d(f.stress[0] * n[0] + f.stress[2] * n[1], f.stress[2] * n[0] + f.stress[1] * n[1]);
  };
  return traction(a).dot(b.slope) + traction(b).dot(a.slope) - a.stress.dot(compliance * b.stress) * n[0];
}

NearFields::NearFields(const Eigen::Matrix3d& compliance) : compliance_(compliance) {
  roots_ = characteristic_roots(compliance_);
  constexpr double isotropic_within = 1e-5;  // equal roots: the anisotropic fields degenerate
  const double largest = compliance_.cwiseAbs().maxCoeff();
  is_isotropic_ =
      std::abs(compliance_(0, 0) - compliance_(1, 1)) < isotropic_within * largest &&
      std::abs(2 * (compliance_(0, 0) - compliance_(0, 1)) - compliance_(2, 2)) < isotropic_within * largest;
  interaction_ = interaction_of_fields();
}

NearField NearFields::at(Kind kind, const Eigen::Vector2d& x) const {
  return is_isotropic_ ? isotropic(kind, x) : anisotropic(kind, x);
}

NearField NearFields::uniform() const {
  return {Eigen::Vector3d::UnitX(), {compliance_(0, 0), compliance_(0, 2) / 2}};
}

NearField NearFields::isotropic(Kind kind, const Eigen::Vector2d& x) const {
  const Complex z(x[0], x[1]);
  const double shear_modulus = 1 / compliance_(2, 2);
  const double poisson = -compliance_(0, 1) / compliance_(0, 0);  // effective in plane strain
  const double kappa = (3 - poisson) / (1 + poisson);
  // Potentials Phi = c z^-s and Psi = d z^-s.
  const double s = kind == line_force ? 1.0 : 0.5;
  Complex c = 1 / (2 * std::sqrt(2 * pi));
  if (kind == mode_two) c *= Complex(0, -1);
  if (kind == line_force) c = -1 / (4 * pi);
  const Complex d = kind == line_force ? Complex(1 / (4 * pi)) : std::conj(c) - c + s * c;
  const Complex phi = c * power(kind, z);
  const Complex psi = d * power(kind, z);
  const Complex slope_phi = -s * phi / z;
  const double sum = 4 * phi.real();
  const Complex difference = 2.0 * (std::conj(z) * slope_phi + psi);  // sigma_22 - sigma_11 + 2 i sigma_12
  const Complex slope =
      (kappa * phi - std::conj(phi) - z * std::conj(slope_phi) - std::conj(psi)) / (2 * shear_modulus);
  return {{(sum - difference.real()) / 2, (sum + difference.real()) / 2, difference.imag() / 2},
          {slope.real(), slope.imag()}};
}

NearField NearFields::anisotropic(Kind kind, const Eigen::Vector2d& x) const {
  const Eigen::Matrix3d& a = compliance_;
  const Complex difference = roots_[0] - roots_[1];
  NearField result{Eigen::Vector3d::Zero(), Eigen::Vector2d::Zero()};
  for (int k = 0; k < 2; ++k) {
    const Complex m = roots_[k];
    const double side = k == 0 ? 1.0 : -1.0;
    Complex factor;
    if (kind == mode_one)
      factor = -side * roots_[1 - k] / difference / (2 * std::sqrt(2 * pi));
    else if (kind == mode_two)
      factor = -side / difference / (2 * std::sqrt(2 * pi));
    else
      factor = side * Complex(0, 1) / (4 * pi * difference);
    Complex z = x[0] + m * x[1];
    if (x[1] == 0.0) z = Complex(x[0], x[1]);  // keeps the sign of zero on the faces
    const Complex phi = factor * power(kind, z);
    const Complex p = a(0, 0) * m * m + a(0, 1) - a(0, 2) * m;
    const Complex q = a(0, 1) * m + a(1, 1) / m - a(1, 2);
    result.stress += 2 * Eigen::Vector3d((m * m * phi).real(), phi.real(), -(m * phi).real());
    result.slope += 2 * Eigen::Vector2d((p * phi).real(), (q * phi).real());
  }
  return result;
}

Eigen::Matrix3d NearFields::interaction_of_fields() const {
  // Contour integral over the unit circle; the fields are smooth on it.
  static const mesh::GaussRule rule = mesh::gauss_legendre(200);
  Eigen::Matrix3d result = Eigen::Matrix3d::Zero();
  for (std::size_t q = 0; q < rule.points.size(); ++q) {
    const double angle = pi * rule.points[q];
    const Eigen::Vector2d n(std::cos(angle), std::sin(angle));
    const std::array<NearField, 3> solution = {at(mode_one, n), at(mode_two, n), uniform()};
    for (int i = 0; i < kinds; ++i)
      for (int j = 0; j < kinds; ++j)
        result(i, j) -= pi * rule.weights[q] *
                        solver::interaction(at(static_cast<Kind>(i), n), solution[j], compliance_, n);
  }
  return result;
}

double NearFields::energy_release(double k_one, double k_two) const {
  const Eigen::Vector2d k(k_one, k_two);
  return k.dot(interaction_.topLeftCorner<2, 2>() * k) / 2;
}

}  // namespace raiser::solver
