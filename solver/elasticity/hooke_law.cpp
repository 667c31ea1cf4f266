#include "solver/elasticity/hooke_law.hpp"

#include <cmath>

namespace raiser::solver {

Eigen::Vector2d principal(const Stress& stress) {
  const double mean = 0.5 * (stress.xx + stress.yy);
  const double radius = std::hypot(0.5 * (stress.xx - stress.yy), stress.xy);
  return {mean + radius, mean - radius};
}

double von_mises(const Stress& stress) {
  const double a = stress.xx - stress.yy;
  const double b = stress.yy - stress.zz;
  const double c = stress.zz - stress.xx;
  return std::sqrt(0.5 * (a * a + b * b + c * c) + 3.0 * stress.xy * stress.xy);
}

Eigen::Matrix3d HookeLaw::stiffness() const {
  const double e = youngs_modulus;
  const double nu = poissons_ratio;
  const bool strain = state == PlaneState::strain;
  const double factor = strain ? e / ((1.0 + nu) * (1.0 - 2.0 * nu)) : e / ((1.0 - nu) * (1.0 + nu));
  const double diagonal = factor * (strain ? 1.0 - nu : 1.0);
  const double coupling = factor * nu;
  Eigen::Matrix3d result;
  result << diagonal, coupling, 0.0, coupling, diagonal, 0.0, 0.0, 0.0, 0.5 * e / (1.0 + nu);
  return result;
}

Eigen::Matrix3d HookeLaw::compliance() const {
  const double e = youngs_modulus;
  const double nu = poissons_ratio;
  const bool strain = state == PlaneState::strain;
  const double diagonal = (strain ? (1.0 - nu) * (1.0 + nu) : 1.0) / e;
  const double coupling = -nu * (strain ? 1.0 + nu : 1.0) / e;
  Eigen::Matrix3d result;
  result << diagonal, coupling, 0.0, coupling, diagonal, 0.0, 0.0, 0.0, 2.0 * (1.0 + nu) / e;
  return result;
}

double HookeLaw::through_thickness(double sigma_xx, double sigma_yy) const {
  return state == PlaneState::strain ? poissons_ratio * (sigma_xx + sigma_yy) : 0.0;
}

}  // namespace raiser::solver
