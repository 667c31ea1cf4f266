#include "solver/elasticity/hooke_law.hpp"

#include <fmt/format.h>

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <numbers>

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

Eigen::Matrix3d stress_turn(const Eigen::Vector2d& first) {
  const double c = first.x();
  const double s = first.y();
  Eigen::Matrix3d m;
  m << c * c, s * s, 2 * c * s,  //
      s * s, c * c, -2 * c * s,  //
      -c * s, c * s, c * c - s * s;
  return m;
}

Eigen::Matrix3d strain_turn(const Eigen::Vector2d& first) {
  const double c = first.x();
  const double s = first.y();
  Eigen::Matrix3d m;
  m << c * c, s * s, c * s,  //
      s * s, c * c, -c * s,  //
      -2 * c * s, 2 * c * s, c * c - s * s;
  return m;
}

namespace {

Eigen::Vector2d direction(double angle) { return {std::cos(angle), std::sin(angle)}; }

/// In the plane, in the material's own axes.
Eigen::Matrix3d own_compliance(const HookeLaw& law) {
  const double e = law.youngs_modulus;
  const double nu = law.poissons_ratio;
  Eigen::Matrix3d result = Eigen::Matrix3d::Zero();
  if (law.orthotropy) {
    result.diagonal() << 1.0 / e, 1.0 / law.orthotropy->youngs_modulus_2, 1.0 / law.orthotropy->shear_modulus;
    result(0, 1) = result(1, 0) = -nu / e;
    return result;
  }
  const bool strain = law.state == PlaneState::strain;
  const double diagonal = (strain ? (1.0 - nu) * (1.0 + nu) : 1.0) / e;
  result.diagonal() << diagonal, diagonal, 2.0 * (1.0 + nu) / e;
  result(0, 1) = result(1, 0) = -nu * (strain ? 1.0 + nu : 1.0) / e;
  return result;
}

void require_positive(std::vector<MaterialFault>& all, ElasticConstant constant, const char* name,
                      double value) {
  if (value > 0.0 && std::isfinite(value)) return;
  all.push_back({constant, fmt::format("{} = {:.6g} MPa is not a modulus greater than zero", name, value),
                 fmt::format("give {} a value greater than zero", name)});
}

void check_isotropic(std::vector<MaterialFault>& all, const HookeLaw& law) {
  require_positive(all, ElasticConstant::youngs_modulus, "Young's modulus", law.youngs_modulus);
  if (law.poissons_ratio > -1.0 && law.poissons_ratio < 0.5) return;
  all.push_back({ElasticConstant::poissons_ratio, "Poisson's ratio lies between -1 and 0.5, both excluded",
                 "write e.g. 0.3"});
}

void check_orthotropic(std::vector<MaterialFault>& all, const HookeLaw& law) {
  const Orthotropy& own = *law.orthotropy;
  require_positive(all, ElasticConstant::youngs_modulus, "E1", law.youngs_modulus);
  require_positive(all, ElasticConstant::youngs_modulus_2, "E2", own.youngs_modulus_2);
  require_positive(all, ElasticConstant::shear_modulus, "G12", own.shear_modulus);
  const bool moduli = all.empty();
  const double most = std::sqrt(law.youngs_modulus / own.youngs_modulus_2);
  if (moduli && !(std::abs(law.poissons_ratio) < most))
    all.push_back({ElasticConstant::poissons_ratio,
                   fmt::format("nu12 = {:.6g} is too large: strain energy is positive only for |nu12| < "
                               "sqrt(E1 / E2) = {:.6g}",
                               law.poissons_ratio, most),
                   fmt::format("check which axis is the first; if this is nu21, then nu12 = nu21 E1 / E2 = "
                               "{:.6g}, or exchange E1 and E2",
                               law.poissons_ratio * most * most)});
  if (!std::isfinite(own.angle))
    all.push_back({ElasticConstant::angle, "the angle of the first axis is not finite", "give it a value"});
  if (law.state == PlaneState::strain)
    all.push_back({ElasticConstant::state,
                   "plane strain of an orthotropic plate also takes E3, nu13 and nu23, which the law has not",
                   "use plane stress"});
}

}  // namespace

Eigen::Matrix3d HookeLaw::stiffness() const {
  if (orthotropy) return compliance().inverse();
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
  const Eigen::Matrix3d own = own_compliance(*this);
  if (!orthotropy || orthotropy->angle == 0.0) return own;
  const Eigen::Matrix3d turn = stress_turn(direction(orthotropy->angle));
  return turn.transpose() * own * turn;
}

double HookeLaw::through_thickness(double sigma_xx, double sigma_yy) const {
  return state == PlaneState::strain ? poissons_ratio * (sigma_xx + sigma_yy) : 0.0;
}

double HookeLaw::stretch() const {
  if (!orthotropy) return 1.0;
  // The squares of the roots over i solve x^2 - sum x + product = 0.
  const double sum = youngs_modulus / orthotropy->shear_modulus - 2 * poissons_ratio;
  const double product = youngs_modulus / orthotropy->youngs_modulus_2;
  const double split = sum * sum / 4 - product;
  const double large = split > 0 ? sum / 2 + std::sqrt(split) : std::sqrt(product);
  const double small = product / large;
  return std::sqrt(std::max(large, 1 / small));
}

bool HookeLaw::has_mirrors() const {
  if (!orthotropy) return true;
  const double off_axis = std::remainder(orthotropy->angle, std::numbers::pi / 2);
  return std::abs(off_axis) < 1e-12;
}

std::vector<MaterialFault> faults(const HookeLaw& law) {
  std::vector<MaterialFault> all;
  if (law.orthotropy)
    check_orthotropic(all, law);
  else
    check_isotropic(all, law);
  return all;
}

}  // namespace raiser::solver
