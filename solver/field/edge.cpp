#include "solver/field/edge.hpp"

#include <Eigen/LU>

namespace raiser::solver {
EdgeProbe::EdgeProbe(const Model& model, int degree, std::span<const double> s, SideTables tables)
    : model_(&model), space_(model.mesh(), degree), s_(s.begin(), s.end()), tables_(std::move(tables)) {}

SideStress EdgeProbe::at(const mesh::BoundarySide& side, const Displacements& displacements) const {
  const auto points = static_cast<Eigen::Index>(s_.size());
  const Eigen::Index loads = displacements.values.cols();
  const ShapeTable& shapes = tables_.shapes[side.side];
  Discretisation::Local local;
  space_.local(side.triangle, local);
  Eigen::MatrixXd own(static_cast<Eigen::Index>(local.function.size()), 2 * loads);
  for (Eigen::Index i = 0; i < own.rows(); ++i)
    for (int c = 0; c < 2; ++c)
      own.row(i).segment(c * loads, loads) =
          local.sign[i] * displacements.values.row(2 * local.function[i] + c);
  const Eigen::MatrixXd dr = shapes.dr.transpose() * own;
  const Eigen::MatrixXd ds = shapes.ds.transpose() * own;
  std::vector<mesh::MapPoint> maps(s_.size());
  tables_.maps[side.side].evaluate(model_->mesh(), side.triangle, maps);

  const Eigen::Matrix3d stiffness = model_->material().stiffness();
  const Eigen::Matrix3d compliance = model_->material().compliance();
  SideStress result;
  for (auto* field :
       {&result.tangential, &result.normal, &result.shear, &result.raw_normal, &result.raw_shear})
    field->resize(points, loads);
  for (Eigen::Index q = 0; q < points; ++q) {
    const double parameter = side.parameter(s_[q]);
    const Point tangent =
        (side.curve.derivative(parameter) * (side.curve.end > side.curve.begin ? 1.0 : -1.0)).normalized();
    const Point outward(tangent.y(), -tangent.x());
    const Eigen::Matrix3d to_strain = strain_turn(tangent);
    const Eigen::Matrix3d to_stress = stress_turn(tangent);
    const Eigen::Matrix3d edge_compliance = to_strain * compliance * to_stress.inverse();
    const Eigen::Matrix2d inverse = maps[q].jacobian.inverse();
    const Point x = side.curve.at(parameter);
    for (Eigen::Index l = 0; l < loads; ++l) {
      Eigen::Matrix2d by_reference;
      by_reference << dr(q, l), ds(q, l), dr(q, loads + l), ds(q, loads + l);
      const Eigen::Matrix2d gradient = by_reference * inverse;
      const Eigen::Vector3d strain(gradient(0, 0), gradient(1, 1), gradient(0, 1) + gradient(1, 0));
      const Point traction = model_->loads()[l].traction(side.curve.owner, x, outward);
      const double normal = traction.dot(outward);
      const double shear = -traction.dot(tangent);  // (t, n) with n inward: sigma_tn = -t . traction
      const double along = (to_strain * strain)[0];
      const Eigen::Vector3d raw = to_stress * (stiffness * strain);
      result.tangential(q, l) =
          (along - edge_compliance(0, 1) * normal - edge_compliance(0, 2) * shear) / edge_compliance(0, 0);
      result.normal(q, l) = normal;
      result.shear(q, l) = shear;
      result.raw_normal(q, l) = raw[1];
      result.raw_shear(q, l) = raw[2];
    }
  }
  return result;
}

}  // namespace raiser::solver
