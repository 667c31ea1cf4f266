#pragma once

#include <Eigen/Core>
#include <array>
#include <complex>

namespace raiser::solver {

/// Stress and displacement slope at a point near a crack tip, in the crack's
/// axes: x1 out of the crack along its line, x2 anticlockwise from it, the
/// crack along x1 < 0.
struct NearField {
  Eigen::Vector3d stress;  ///< sigma_11, sigma_22, sigma_12
  Eigen::Vector2d slope;   ///< du_1/dx_1, du_2/dx_1
};

/// The elastic fields of a straight traction-free crack in an infinite plate of
/// one material, for K_I = 1, K_II = 1 and a unit line force at the tip along
/// x1 (out of the crack), per unit thickness.
///
/// Isotropic: complex potentials of N. I. Muskhelishvili, Some Basic Problems of
/// the Mathematical Theory of Elasticity (1953); fields of M. L. Williams,
/// J. Appl. Mech. 24 (1957) 109. Anisotropic: S. G. Lekhnitskii, Theory of
/// Elasticity of an Anisotropic Body (1963); G. C. Sih, P. C. Paris and
/// G. R. Irwin, Int. J. Fracture Mech. 1 (1965) 189. Line force as an auxiliary
/// field for T: A. P. Kfouri, Int. J. Fracture 30 (1986) 301.
class NearFields {
 public:
  enum Kind { mode_one, mode_two, line_force };
  static constexpr int kinds = 3;

  /// `compliance` maps (sigma_11, sigma_22, sigma_12) to (eps_11, eps_22,
  /// gamma_12) in the crack's axes, 1/MPa, reduced for plane strain.
  explicit NearFields(const Eigen::Matrix3d& compliance);

  /// The field at a point (x1, x2) other than the tip; x2 of either sign of
  /// zero tells the faces apart.
  NearField at(Kind kind, const Eigen::Vector2d& x) const;

  /// A uniform stress sigma_11 = 1.
  NearField uniform() const;

  /// The interaction integral of a solution with (K_I, K_II, T) = (k[0], k[1],
  /// k[2]) and each of the fields above is interaction() * k.
  const Eigen::Matrix3d& interaction() const { return interaction_; }

  /// Energy release rate of K_I, K_II: N/mm.
  double energy_release(double k_one, double k_two) const;

  const Eigen::Matrix3d& compliance() const { return compliance_; }

 private:
  NearField isotropic(Kind kind, const Eigen::Vector2d& x) const;
  NearField anisotropic(Kind kind, const Eigen::Vector2d& x) const;
  Eigen::Matrix3d interaction_of_fields() const;

  Eigen::Matrix3d compliance_;
  bool is_isotropic_ = true;
  std::array<std::complex<double>, 2> roots_;
  Eigen::Matrix3d interaction_;
};

/// Integrand of the interaction integral of two fields against a direction: of
/// (sigma_ij u'_i,1 + sigma'_ij u_i,1 - sigma_ij eps'_ij delta_1j) n_j.
double interaction(const NearField& a, const NearField& b, const Eigen::Matrix3d& compliance,
                   const Eigen::Vector2d& n);

}  // namespace raiser::solver
