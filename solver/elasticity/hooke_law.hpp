#pragma once

#include <Eigen/Core>
#include <optional>
#include <string>
#include <vector>

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

/// What makes a sheet orthotropic, besides E1 and nu12: its second Young's
/// modulus and its shear modulus in MPa, and the angle in rad from the plate's
/// x axis to the material's first axis, anticlockwise.
struct Orthotropy {
  double youngs_modulus_2 = 0.0;
  double shear_modulus = 0.0;
  double angle = 0.0;
  bool operator==(const Orthotropy&) const = default;
};

/// Linear elasticity in the plane: isotropic, or orthotropic in plane stress.
/// Moduli in MPa. For an orthotropic sheet `youngs_modulus` is E1 along its
/// first axis, and `poissons_ratio` is nu12: minus the strain along axis 2 over
/// that along axis 1 when a stress acts along axis 1 (nu12 / E1 = nu21 / E2).
struct HookeLaw {
  double youngs_modulus = 0.0;
  double poissons_ratio = 0.0;
  PlaneState state = PlaneState::stress;
  std::optional<Orthotropy> orthotropy = std::nullopt;

  /// Maps (eps_xx, eps_yy, gamma_xy) to (sigma_xx, sigma_yy, sigma_xy), MPa.
  Eigen::Matrix3d stiffness() const;
  /// The inverse of stiffness(), 1/MPa.
  Eigen::Matrix3d compliance() const;
  /// sigma_zz that goes with the in-plane normal stresses, MPa.
  double through_thickness(double sigma_xx, double sigma_yy) const;
  /// By how much fields are drawn out along a material axis, beside isotropic ones: the
  /// largest ratio that a root of S. G. Lekhnitskii's characteristic equation
  /// (Anisotropic Plates, 1968, section 6) has to one; 1 when isotropic.
  double stretch() const;
  /// Whether the law is its own image in a mirror line along x or y.
  bool has_mirrors() const;
};

/// The constants of a law, for messages.
enum class ElasticConstant { youngs_modulus, youngs_modulus_2, shear_modulus, poissons_ratio, angle, state };

/// Something that makes a law illegal.
struct MaterialFault {
  ElasticConstant constant = ElasticConstant::youngs_modulus;
  std::string what;
  std::string cure;
};

/// Every reason why the law is not that of a stable elastic solid (its strain
/// energy must be positive for every strain), or is not covered. Empty for a
/// legal law.
std::vector<MaterialFault> faults(const HookeLaw& law);

/// Turns a stress (xx, yy, xy) given in the plate's axes into axes whose first
/// runs along the unit vector `first`, the second a quarter turn anticlockwise
/// from it.
Eigen::Matrix3d stress_turn(const Eigen::Vector2d& first);

/// The same for a strain (xx, yy, engineering shear xy).
Eigen::Matrix3d strain_turn(const Eigen::Vector2d& first);

}  // namespace raiser::solver
