#pragma once

#include <Eigen/Core>
#include <array>
#include <vector>

#include "solver/crack/near_field.hpp"
#include "solver/fe/model.hpp"

namespace raiser::solver {

/// K_I, K_II in MPa sqrt(mm) and T in MPa of one tip, one column a load.
/// Signs: K_I positive opens the crack; K_II positive moves the face on the
/// left of the outward direction forwards along it, so that sigma_12 ahead of
/// the tip is positive; T is the non-singular sigma_11 at the tip.
using TipValues = Eigen::Matrix3Xd;

/// Stress intensity at the tip in the middle of a fan, by domain interaction
/// integrals over its rings, each a domain of its own.
///
/// I = integral of (sigma_ij u^a_i,1 + sigma^a_ij u_i,1 - sigma^a_ij eps_ij
/// delta_1j) w_,j with a near field `a` and a weight w that falls from 1 to 0
/// across the ring: J. F. Yau, S. S. Wang and H. T. Corten, J. Appl. Mech. 47
/// (1980) 335; domain form of F. Z. Li, C. F. Shih and A. Needleman, Eng. Fract.
/// Mech. 21 (1985) 405. A uniform pressure on the faces is taken out first by
/// superposing its own uniform stress. Holds references to the model.
class TipProbe {
 public:
  TipProbe(const Model& model, std::size_t fan);

  const mesh::TipFan& fan() const { return *fan_; }
  std::size_t domains() const;

  /// From the ring `domain` (0: the outermost).
  TipValues values(const Displacements& displacements, std::size_t domain) const;

  /// Energy release rate in N/mm of the loads combined with the given factors:
  /// the domain J integral over a ring.
  double j_integral(const Displacements& displacements, const Eigen::VectorXd& factors,
                    std::size_t domain) const;

  /// The same by a virtual crack extension: the loss of strain energy at fixed
  /// displacements when everything within the outermost ring moves a little
  /// along the crack (D. M. Parks, Int. J. Fracture 10 (1974) 487; T. K. Hellen,
  /// Int. J. Numer. Meth. Eng. 9 (1975) 187).
  double virtual_extension(const Displacements& displacements, const Eigen::VectorXd& factors) const;

  const NearFields& fields() const { return fields_; }

 private:
  /// Displacement coefficients of one triangle: one row a shape function, the
  /// loads' x components, then their y components; face pressure taken out.
  Eigen::MatrixXd coefficients(const Displacements& displacements, int triangle) const;
  void tabulate_functional();
  double j_on_mesh(const Displacements& displacements, const Eigen::VectorXd& factors,
                   std::size_t domain) const;
  double extension_on_mesh(const Displacements& displacements, const Eigen::VectorXd& factors) const;

  const Model* model_;
  const mesh::TipFan* fan_;
  Eigen::Matrix2d axes_;  ///< columns: the crack's axes
  NearFields fields_;
  Eigen::VectorXd pressure_;  ///< on the faces at the tip, by load
  TriangleRule rule_;
  /// By triangle of the outermost ring: what multiplies du/dr and du/ds at the
  /// rule's points; column 2 k + c for near field k and component c.
  struct Factors {
    Eigen::MatrixXd r, s;
  };
  std::vector<Factors> factors_;
};

}  // namespace raiser::solver
