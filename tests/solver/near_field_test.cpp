#include "solver/crack/near_field.hpp"

#include <gtest/gtest.h>

#include <Eigen/LU>
#include <cmath>
#include <numbers>
#include <string>

#include "solver/crack/tip_scan.hpp"
#include "solver/elasticity/hooke_law.hpp"

namespace raiser::solver {
namespace {

HookeLaw isotropic(PlaneState state) {
  HookeLaw law;
  law.youngs_modulus = 210e3;
  law.poissons_ratio = 0.3;
  law.state = state;
  return law;
}

HookeLaw orthotropic(double angle) {
  HookeLaw law;
  law.youngs_modulus = 140e3;
  law.poissons_ratio = 0.3;
  law.orthotropy = Orthotropy{10e3, 5e3, angle};
  return law;
}

struct Law {
  const char* name;
  Eigen::Matrix3d compliance;
};
const Law laws[] = {{"plane stress", isotropic(PlaneState::stress).compliance()},
                    {"plane strain", isotropic(PlaneState::strain).compliance()},
                    {"orthotropic", orthotropic(0.0).compliance()},
                    {"orthotropic, turned", orthotropic(0.5).compliance()}};
constexpr NearFields::Kind kinds[] = {NearFields::mode_one, NearFields::mode_two, NearFields::line_force};

TEST(NearField, StressAheadAndOnTheFaces) {
  for (const Law& law : laws) {
    SCOPED_TRACE(law.name);
    const NearFields fields(law.compliance);
    const double r = 0.37;
    const double unit = 1 / std::sqrt(2 * std::numbers::pi * r);
    EXPECT_NEAR(fields.at(NearFields::mode_one, {r, 0.0}).stress[1], unit, 1e-12);
    EXPECT_NEAR(fields.at(NearFields::mode_one, {r, 0.0}).stress[2], 0.0, 1e-12);
    EXPECT_NEAR(fields.at(NearFields::mode_two, {r, 0.0}).stress[2], unit, 1e-12);
    EXPECT_NEAR(fields.at(NearFields::mode_two, {r, 0.0}).stress[1], 0.0, 1e-12);
    for (const NearFields::Kind kind : kinds)
      for (const double face : {0.0, -0.0}) {
        const Eigen::Vector3d stress = fields.at(kind, {-r, face}).stress;
        EXPECT_NEAR(stress[1], 0.0, 1e-12);
        EXPECT_NEAR(stress[2], 0.0, 1e-12);
      }
  }
}

/// Central differences of the field: equilibrium, and compatibility of the slope
/// with the strain.
TEST(NearField, IsInEquilibriumAndCompatible) {
  for (const Law& law : laws)
    for (const NearFields::Kind kind : kinds) {
      SCOPED_TRACE(std::string(law.name) + ", field " + std::to_string(kind));
      const NearFields fields(law.compliance);
      const double h = 1e-5;
      for (const Eigen::Vector2d& x :
           {Eigen::Vector2d(0.3, 0.4), Eigen::Vector2d(-0.5, 0.2), Eigen::Vector2d(0.1, -0.6)}) {
        const auto slope = [&](int axis) {
          const Eigen::Vector2d d = h * Eigen::Vector2d::Unit(axis);
          const NearField a = fields.at(kind, x + d);
          const NearField b = fields.at(kind, x - d);
          return NearField{(a.stress - b.stress) / (2 * h), (a.slope - b.slope) / (2 * h)};
        };
        const NearField along = slope(0);
        const NearField across = slope(1);
        const double size = fields.at(kind, x).stress.norm();
        EXPECT_NEAR(along.stress[0] + across.stress[2], 0.0, 1e-7 * size);
        EXPECT_NEAR(along.stress[2] + across.stress[1], 0.0, 1e-7 * size);
        // eps_11 = u1,1; gamma_12,1 = u1,12 + u2,11; eps_22,1 = u2,12
        const NearField here = fields.at(kind, x);
        const Eigen::Vector3d strain = law.compliance * here.stress;
        const Eigen::Vector3d strain_along = law.compliance * along.stress;
        const double strain_size = strain.norm();
        EXPECT_NEAR(strain[0], here.slope[0], 1e-10 * strain_size);
        EXPECT_NEAR(strain_along[2], across.slope[0] + along.slope[1], 1e-6 * strain_size);
        EXPECT_NEAR(strain_along[1], across.slope[1], 1e-6 * strain_size);
      }
    }
}

TEST(NearField, InteractionIsThatOfIrwinForIsotropicPlates) {
  // G = (K_I^2 + K_II^2) / E'; T against a unit line force gives T / E'.
  // G. R. Irwin, J. Appl. Mech. 24 (1957) 361.
  for (const PlaneState state : {PlaneState::stress, PlaneState::strain}) {
    const HookeLaw law = isotropic(state);
    const double modulus = state == PlaneState::stress ? 210e3 : 210e3 / (1 - 0.3 * 0.3);
    const NearFields fields(law.compliance());
    EXPECT_NEAR(fields.energy_release(3.0, 4.0) * modulus, 25.0, 1e-10);
    Eigen::Matrix3d expected = Eigen::Vector3d(2, 2, 1).asDiagonal();
    EXPECT_LT((fields.interaction() * modulus - expected).cwiseAbs().maxCoeff(), 1e-10);
  }
}

TEST(NearField, EnergyReleaseOfAnOrthotropicPlate) {
  // Crack along the first axis: G = K_I^2 sqrt(a11 a22 / 2) sqrt(sqrt(a22 / a11) +
  // (2 a12 + a66) / (2 a11)). G. C. Sih, P. C. Paris and G. R. Irwin, Int. J.
  // Fracture Mech. 1 (1965) 189.
  const Eigen::Matrix3d a = orthotropic(0.0).compliance();
  const NearFields fields(a);
  const double root = std::sqrt(std::sqrt(a(1, 1) / a(0, 0)) + (2 * a(0, 1) + a(2, 2)) / (2 * a(0, 0)));
  EXPECT_NEAR(fields.energy_release(1.0, 0.0) / (std::sqrt(a(0, 0) * a(1, 1) / 2) * root), 1.0, 1e-9);
  EXPECT_NEAR(fields.energy_release(0.0, 1.0) / (a(0, 0) / std::sqrt(2.0) * root), 1.0, 1e-9);
}

TEST(KinkAngle, OfTheLargestHoopStress) {
  // F. Erdogan and G. C. Sih, J. Basic Eng. 85 (1963) 519: pure shear -70.53 deg.
  const double degree = std::numbers::pi / 180;
  EXPECT_NEAR(kink_angle(1e-9, 1.0).value(), -70.5288 * degree, 1e-5);
  EXPECT_NEAR(kink_angle(1.0, -0.3).value(), -kink_angle(1.0, 0.3).value(), 1e-14);
  EXPECT_EQ(kink_angle(1.0, 0.0).value(), 0.0);
  EXPECT_FALSE(kink_angle(-1.0, 0.2).has_value());
  // K_I sin t + K_II (3 cos t - 1) = 0 there.
  const double t = kink_angle(2.0, 0.7).value();
  EXPECT_NEAR(2.0 * std::sin(t) + 0.7 * (3 * std::cos(t) - 1), 0.0, 1e-12);
}

}  // namespace
}  // namespace raiser::solver
