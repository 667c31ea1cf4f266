#pragma once

#include <Eigen/Core>

namespace raiser::solver {

enum class PlaneState { stress, strain };

/// A stress tensor of a plane state, MPa, tension positive. `zz` is the
/// through-thickness stress: 0 in plane stress.
struct Stress {
  double xx = 0.0;
  double yy = 0.0;
  double xy = 0.0;
  double zz = 0.0;
};

/// In-plane principal stresses, MPa, larger first.
Eigen::Vector2d principal(const Stress& stress);

/// Von Mises equivalent stress of all components, MPa.
double von_mises(const Stress& stress);

/// Isotropic linear elasticity in the plane. Moduli in MPa.
struct HookeLaw {
  double youngs_modulus = 0.0;
  double poissons_ratio = 0.0;
  PlaneState state = PlaneState::stress;

  /// Maps (eps_xx, eps_yy, gamma_xy) to (sigma_xx, sigma_yy, sigma_xy), MPa.
  Eigen::Matrix3d stiffness() const;
  /// The inverse of stiffness(), 1/MPa.
  Eigen::Matrix3d compliance() const;
  /// sigma_zz that goes with the in-plane normal stresses, MPa.
  double through_thickness(double sigma_xx, double sigma_yy) const;
};

}  // namespace raiser::solver
