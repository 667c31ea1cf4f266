#include <gtest/gtest.h>

#include <Eigen/Dense>
#include <cmath>
#include <numbers>

#include "solver/elasticity/hooke_law.hpp"

namespace raiser::solver {
namespace {

// Three-dimensional isotropic law, written with Lame's constants: the plane
// laws follow from it by their defining conditions.
struct Solid {
  double lambda;
  double mu;
  explicit Solid(const HookeLaw& law)
      : lambda(law.youngs_modulus * law.poissons_ratio /
               ((1 + law.poissons_ratio) * (1 - 2 * law.poissons_ratio))),
        mu(law.youngs_modulus / (2 * (1 + law.poissons_ratio))) {}
};

TEST(HookeLaw, PlaneStrainIsTheSolidHeldThroughTheThickness) {
  const HookeLaw law{210000.0, 0.3, PlaneState::strain};
  const Solid solid(law);
  const Eigen::Vector3d strain(1e-3, -4e-4, 7e-4);
  const Eigen::Vector3d stress = law.stiffness() * strain;
  const double volume = strain[0] + strain[1];
  EXPECT_NEAR(stress[0], solid.lambda * volume + 2 * solid.mu * strain[0], 1e-10);
  EXPECT_NEAR(stress[1], solid.lambda * volume + 2 * solid.mu * strain[1], 1e-10);
  EXPECT_NEAR(stress[2], solid.mu * strain[2], 1e-10);
  EXPECT_NEAR(law.through_thickness(stress[0], stress[1]), solid.lambda * volume, 1e-10);
}

TEST(HookeLaw, PlaneStressIsTheSolidFreeThroughTheThickness) {
  const HookeLaw law{70000.0, 0.33, PlaneState::stress};
  const Solid solid(law);
  const Eigen::Vector3d strain(1e-3, -4e-4, 7e-4);
  const Eigen::Vector3d stress = law.stiffness() * strain;
  const double zz = -solid.lambda * (strain[0] + strain[1]) / (solid.lambda + 2 * solid.mu);
  const double volume = strain[0] + strain[1] + zz;
  EXPECT_NEAR(stress[0], solid.lambda * volume + 2 * solid.mu * strain[0], 1e-10);
  EXPECT_NEAR(stress[1], solid.lambda * volume + 2 * solid.mu * strain[1], 1e-10);
  EXPECT_NEAR(stress[2], solid.mu * strain[2], 1e-10);
  EXPECT_EQ(law.through_thickness(stress[0], stress[1]), 0.0);
}

TEST(HookeLaw, ComplianceInvertsStiffness) {
  for (const PlaneState state : {PlaneState::stress, PlaneState::strain})
    for (const double nu : {0.0, 0.3, 0.49}) {
      const HookeLaw law{1234.5, nu, state};
      EXPECT_TRUE((law.stiffness() * law.compliance()).isIdentity(1e-12)) << nu;
    }
}

const HookeLaw unidirectional{138000.0, 0.3, PlaneState::stress, Orthotropy{9000.0, 6900.0, 0.0}};

HookeLaw at_angle(double angle) {
  HookeLaw law = unidirectional;
  law.orthotropy->angle = angle;
  return law;
}

TEST(Orthotropic, OwnAxesGiveTheConstantsBack) {
  const Eigen::Matrix3d s = unidirectional.compliance();
  EXPECT_DOUBLE_EQ(1 / s(0, 0), 138000.0);
  EXPECT_DOUBLE_EQ(1 / s(1, 1), 9000.0);
  EXPECT_DOUBLE_EQ(1 / s(2, 2), 6900.0);
  EXPECT_DOUBLE_EQ(-s(1, 0) / s(0, 0), 0.3);
  EXPECT_DOUBLE_EQ(s(0, 1), s(1, 0));
}

// E and eta of a sheet pulled at an angle to its fibres: R. M. Jones, Mechanics of Composite Materials, 2nd
// ed. (1999), equations (2.97), from memory.
TEST(Orthotropic, ApparentModulusAtAnAngleIsThatOfTheTextbooks) {
  for (const double angle : {0.2, 0.7, 1.3, -0.9}) {
    const double c = std::cos(angle), n = std::sin(angle);
    const double by_formula =
        std::pow(c, 4) / 138000 + (1 / 6900.0 - 2 * 0.3 / 138000) * c * c * n * n + std::pow(n, 4) / 9000;
    EXPECT_NEAR(at_angle(angle).compliance()(0, 0), by_formula, 1e-15) << angle;
  }
}

TEST(Orthotropic, ComplianceInvertsStiffnessAndIsSymmetricAtEveryAngle) {
  for (const double angle : {0.0, 0.3, 1.2, 2.5}) {
    const HookeLaw law = at_angle(angle);
    EXPECT_TRUE((law.stiffness() * law.compliance()).isIdentity(1e-12)) << angle;
    EXPECT_TRUE(law.stiffness().isApprox(law.stiffness().transpose(), 1e-13)) << angle;
  }
}

TEST(Orthotropic, IsotropicConstantsGiveTheIsotropicLawAtEveryAngle) {
  const HookeLaw isotropic{70000.0, 0.33, PlaneState::stress};
  for (const double angle : {0.0, 0.4, 2.0}) {
    const HookeLaw law{70000.0, 0.33, PlaneState::stress, Orthotropy{70000.0, 70000.0 / 2.66, angle}};
    EXPECT_TRUE(law.stiffness().isApprox(isotropic.stiffness(), 1e-13)) << angle;
  }
}

TEST(Orthotropic, MirrorsAreLostOffTheAxes) {
  EXPECT_TRUE(at_angle(0.0).has_mirrors());
  EXPECT_TRUE(at_angle(std::numbers::pi / 2).has_mirrors());
  EXPECT_TRUE(at_angle(-std::numbers::pi).has_mirrors());
  EXPECT_FALSE(at_angle(0.3).has_mirrors());
  EXPECT_FALSE(at_angle(std::numbers::pi / 4).has_mirrors());
}

TEST(Orthotropic, StretchIsTheLargestRatioOfARootToOne) {
  EXPECT_EQ((HookeLaw{200e3, 0.3}.stretch()), 1.0);
  // Isotropic constants: both roots are i.
  EXPECT_NEAR((HookeLaw{200e3, 0.25, PlaneState::stress, Orthotropy{200e3, 80e3}}.stretch()), 1.0, 1e-6);
  // x^4 - 5 x^2 + 4 = 0: roots 2 and 1; the turned sheet has the roots 1/2 and 1.
  const Orthotropy half{50e3, 200e3 / 5.5};
  EXPECT_NEAR((HookeLaw{200e3, 0.25, PlaneState::stress, half}.stretch()), 2.0, 1e-9);
  const Orthotropy turned{200e3, 200e3 / 5.5};
  EXPECT_NEAR((HookeLaw{50e3, 0.0625, PlaneState::stress, turned}.stretch()), 2.0, 1e-9);
}

TEST(Turns, StressAndStrainDoTheSameWork) {
  const Eigen::Vector2d first(std::cos(0.7), std::sin(0.7));
  EXPECT_TRUE((strain_turn(first).transpose() * stress_turn(first)).isIdentity(1e-15));
}

TEST(MaterialFaults, LegalLawsHaveNone) {
  EXPECT_TRUE(faults(unidirectional).empty());
  EXPECT_TRUE(faults(HookeLaw{210000.0, 0.3, PlaneState::strain}).empty());
  HookeLaw large = unidirectional;
  large.poissons_ratio = 0.999 * std::sqrt(138.0 / 9.0);
  EXPECT_TRUE(faults(large).empty());
}

TEST(MaterialFaults, EveryOneIsNamedAtOnce) {
  EXPECT_EQ(faults(HookeLaw{-1.0, 0.5, PlaneState::stress}).size(), 2U);
  const HookeLaw law{0.0, 0.3, PlaneState::strain, Orthotropy{-5.0, std::nan(""), 0.0}};
  const auto found = faults(law);
  ASSERT_EQ(found.size(), 4U);
  EXPECT_EQ(found[2].constant, ElasticConstant::shear_modulus);
  EXPECT_EQ(found[3].constant, ElasticConstant::state);
}

TEST(MaterialFaults, ARatioThatLosesTheStrainEnergyIsRefusedWithTheOtherOne) {
  HookeLaw law{9000.0, 0.3, PlaneState::stress, Orthotropy{138000.0, 6900.0, 0.0}};
  const auto found = faults(law);
  ASSERT_EQ(found.size(), 1U);
  EXPECT_EQ(found[0].constant, ElasticConstant::poissons_ratio);
  EXPECT_NE(found[0].cure.find("0.0195652"), std::string::npos) << found[0].cure;
  law.poissons_ratio = 0.0195652;
  EXPECT_TRUE(faults(law).empty());
}

TEST(Principal, AgreesWithEigenvaluesLargerFirst) {
  const Stress stress{.xx = 30.0, .yy = -50.0, .xy = 25.0, .zz = 5.0};
  Eigen::Matrix2d matrix;
  matrix << stress.xx, stress.xy, stress.xy, stress.yy;
  const Eigen::SelfAdjointEigenSolver<Eigen::Matrix2d> solver(matrix);
  EXPECT_NEAR(principal(stress)[0], solver.eigenvalues()[1], 1e-12);
  EXPECT_NEAR(principal(stress)[1], solver.eigenvalues()[0], 1e-12);
}

TEST(VonMises, CountsEveryComponent) {
  EXPECT_DOUBLE_EQ(von_mises({.xx = -7.0}), 7.0);
  EXPECT_DOUBLE_EQ(von_mises({.xy = 2.0}), 2.0 * std::sqrt(3.0));
  EXPECT_DOUBLE_EQ(von_mises({.xx = 4.0, .yy = 4.0, .zz = 4.0}), 0.0);
  Eigen::Matrix3d tensor;
  tensor << 30, 25, 0, 25, -50, 0, 0, 0, 5;
  const Eigen::Matrix3d deviator = tensor - tensor.trace() / 3.0 * Eigen::Matrix3d::Identity();
  EXPECT_NEAR(von_mises({.xx = 30, .yy = -50, .xy = 25, .zz = 5}), std::sqrt(1.5 * deviator.squaredNorm()),
              1e-12);
}

}  // namespace
}  // namespace raiser::solver
