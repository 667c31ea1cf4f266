#include <gtest/gtest.h>

#include <Eigen/Dense>
#include <cmath>

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
