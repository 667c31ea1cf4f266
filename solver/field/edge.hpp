#pragma once

#include <Eigen/Core>
#include <array>
#include <span>
#include <vector>

#include "solver/fe/model.hpp"
#include "solver/fe/reference.hpp"

namespace raiser::solver {

/// Stresses at points along one boundary side for each unit load: one row a
/// point, one column a load; MPa.
///
/// `tangential` follows from the tangential strain and the known traction:
/// sigma_tt = (eps_tt - S12 sigma_nn - S16 sigma_nt) / S11 with the compliance
/// in the edge's axes, more accurate than the stress straight from the
/// displacement. `normal` and `shear` are the known traction, `raw_normal` and
/// `raw_shear` what the displacement gives for it.
struct SideStress {
  Eigen::MatrixXd tangential, normal, shear, raw_normal, raw_shear;
};

/// Evaluates edge stresses at fixed positions s in [-1, 1] along sides. Holds a
/// reference to the model.
class EdgeProbe {
 public:
  EdgeProbe(const Model& model, int degree, std::span<const double> s)
      : EdgeProbe(model, degree, s, SideTables(degree, s)) {}
  /// With tables for the same degree and positions.
  EdgeProbe(const Model& model, int degree, std::span<const double> s, SideTables tables);

  SideStress at(const mesh::BoundarySide& side, const Displacements& displacements) const;

 private:
  const Model* model_;
  Discretisation space_;
  std::vector<double> s_;
  SideTables tables_;
};

}  // namespace raiser::solver
