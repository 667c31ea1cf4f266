#include "solver/crack/tip_probe.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>

#include "solver/fe/shape.hpp"

namespace raiser::solver {
namespace {

constexpr int points_per_direction = 16;  // the near fields of isotropic plates to 1e-12 over a ring

Eigen::Matrix2d axes_of(const Point& direction) {
  Eigen::Matrix2d axes;
  axes << direction.x(), -direction.y(), direction.y(), direction.x();
  return axes;
}

/// The compliance in axes turned by the crack's direction.
Eigen::Matrix3d turned(const Eigen::Matrix3d& compliance, const Point& direction) {
  const double c = direction.x();
  const double s = direction.y();
  Eigen::Matrix3d stress_back;  // from the crack's axes to the plate's
  stress_back << c * c, s * s, -2 * c * s, s * s, c * c, 2 * c * s, c * s, -c * s, c * c - s * s;
  return stress_back.transpose() * compliance * stress_back;
}

Owner face_owner(const Model& model, const mesh::TipFan& fan) {
  for (const mesh::BoundarySide& side : model.mesh().boundary())
    if (side.curve.owner.kind == Owner::Kind::crack)
      for (const auto& ring : fan.rings)
        if (std::find(ring.begin(), ring.end(), side.triangle) != ring.end()) return side.curve.owner;
  return {Owner::Kind::crack, 0};
}

/// The mirror image across the line that a half fan's crack runs along.
Image across(const mesh::TipFan& fan) {
  const bool along_x = std::abs(fan.direction.x()) > 0.5;
  return {{along_x ? 1.0 : -1.0, along_x ? -1.0 : 1.0}};
}

/// Jacobian of a straight triangle and its first corner.
struct Straight {
  Point origin;
  Eigen::Matrix2d jacobian;
  Straight(const std::vector<Point>& points, const mesh::Mesh::Triangle& corners)
      : origin(points[corners[0]]) {
    jacobian << points[corners[1]] - origin, points[corners[2]] - origin;
  }
};

/// Value at the corners of the weight that falls from 1 on the inner corners of
/// a ring to 0 on its outer ones; its constant gradient in the reference triangle.
Eigen::Vector2d weight_slope(const mesh::Mesh& mesh, const mesh::TipFan& fan, std::size_t domain,
                             int triangle) {
  Eigen::Vector3d w;
  const double middle = fan.radii[domain] * 0.5 * (1 + fan.radii[1] / fan.radii[0]);
  for (int k = 0; k < 3; ++k)
    w[k] = (mesh.points()[mesh.triangles()[triangle][k]] - fan.at).norm() < middle ? 1.0 : 0.0;
  return {w[1] - w[0], w[2] - w[0]};
}

}  // namespace

TipProbe::TipProbe(const Model& model, std::size_t fan)
    : model_(&model),
      fan_(&model.mesh().fans().at(fan)),
      axes_(axes_of(fan_->direction)),
      fields_(turned(model.material().compliance(), fan_->direction)),
      pressure_(static_cast<Eigen::Index>(model.loads().size())),
      rule_(triangle_rule(points_per_direction)) {
  const Owner owner = face_owner(model, *fan_);
  const Point n = axes_.col(1);
  for (std::size_t l = 0; l < model.loads().size(); ++l)
    pressure_[l] = -model.loads()[l].traction(owner, fan_->at, n).dot(n);
  tabulate_functional();
}

std::size_t TipProbe::domains() const { return std::min<std::size_t>(4, fan_->rings.size() - 1); }

void TipProbe::tabulate_functional() {
  const mesh::Mesh& mesh = model_->mesh();
  const Eigen::Matrix3d stiffness = fields_.compliance().inverse();
  for (const int t : fan_->rings[0]) {
    const Straight map(mesh.points(), mesh.triangles()[t]);
    const Eigen::Matrix2d inverse = map.jacobian.inverse();
    const double area = map.jacobian.determinant();
    const Eigen::Vector2d g = axes_.transpose() * inverse.transpose() * weight_slope(mesh, *fan_, 0, t);
    const auto points = static_cast<Eigen::Index>(rule_.points.size());
    Factors out{Eigen::MatrixXd(points, 2 * NearFields::kinds),
                Eigen::MatrixXd(points, 2 * NearFields::kinds)};
    for (Eigen::Index q = 0; q < points; ++q) {
      const Point x = axes_.transpose() * (map.origin + map.jacobian * rule_.points[q] - fan_->at);
      for (int k = 0; k < NearFields::kinds; ++k) {
        const NearField a = fields_.at(static_cast<NearFields::Kind>(k), x);
        const Eigen::Vector3d against(a.slope[0] * g[0], a.slope[1] * g[1],
                                      a.slope[0] * g[1] + a.slope[1] * g[0]);
        const Eigen::Vector3d by_strain = stiffness * against - g[0] * a.stress;
        const Point traction(a.stress[0] * g[0] + a.stress[2] * g[1],
                             a.stress[2] * g[0] + a.stress[1] * g[1]);
        Eigen::Matrix2d by_gradient;  // of du_i/dx_j in the crack's axes
        by_gradient << by_strain[0] + traction[0], by_strain[2], by_strain[2] + traction[1], by_strain[1];
        const Eigen::Matrix2d by_reference =
            rule_.weights[q] * area * axes_ * by_gradient * axes_.transpose() * inverse.transpose();
        out.r.row(q).segment<2>(2 * k) = by_reference.col(0);
        out.s.row(q).segment<2>(2 * k) = by_reference.col(1);
      }
    }
    factors_.push_back(std::move(out));
  }
}

Eigen::MatrixXd TipProbe::coefficients(const Displacements& displacements, int triangle) const {
  const Discretisation space(model_->mesh(), displacements.degree);
  Discretisation::Local local;
  space.local(triangle, local);
  const Eigen::Index loads = displacements.values.cols();
  Eigen::MatrixXd own(static_cast<Eigen::Index>(local.function.size()), 2 * loads);
  for (Eigen::Index i = 0; i < own.rows(); ++i)
    for (int c = 0; c < 2; ++c)
      own.row(i).segment(c * loads, loads) =
          local.sign[i] * displacements.values.row(2 * local.function[i] + c);
  if (pressure_.isZero(0.0)) return own;
  // The uniform stress -p has the displacement -p S (1, 1, 0) x.
  const Eigen::Vector3d strain = model_->material().compliance() * Eigen::Vector3d(1, 1, 0);
  Eigen::Matrix2d gradient;
  gradient << strain[0], strain[2] / 2, strain[2] / 2, strain[1];
  for (int k = 0; k < 3; ++k) {
    const Point u = gradient * (model_->mesh().points()[model_->mesh().triangles()[triangle][k]] - fan_->at);
    for (int c = 0; c < 2; ++c) own.row(k).segment(c * loads, loads) += u[c] * pressure_.transpose();
  }
  return own;
}

TipValues TipProbe::values(const Displacements& displacements, std::size_t domain) const {
  const ShapeTable shapes = tabulate(displacements.degree, rule_.points);
  const Eigen::Index loads = displacements.values.cols();
  Eigen::Matrix3Xd integral = Eigen::Matrix3Xd::Zero(3, loads);
  for (std::size_t i = 0; i < factors_.size(); ++i) {
    const Eigen::MatrixXd functional = shapes.dr * factors_[i].r + shapes.ds * factors_[i].s;
    const Eigen::MatrixXd u = coefficients(displacements, fan_->rings[domain][i]);
    for (int k = 0; k < NearFields::kinds; ++k)
      integral.row(k) += functional.col(2 * k).transpose() * u.leftCols(loads) +
                         functional.col(2 * k + 1).transpose() * u.rightCols(loads);
  }
  // Rings are similar: the near fields go with r^-1/2 and r^-1.
  const double scale = fan_->radii[domain] / fan_->radii[0];
  integral.topRows(2) /= std::sqrt(scale);
  integral.row(2) /= scale;
  if (fan_->is_half) {
    integral *= 2;
    for (Eigen::Index l = 0; l < loads; ++l)
      if (model_->parity(static_cast<std::size_t>(l), across(*fan_)) > 0)
        integral(1, l) = 0.0;
      else
        integral(0, l) = integral(2, l) = 0.0;
  }
  TipValues result = fields_.interaction().partialPivLu().solve(integral);
  result.row(2) -= pressure_.transpose();
  return result;
}

namespace {

/// Loads that open a crack on a mirror line and those that shear it do not mix
/// in an energy over the whole plate: half of it must count them apart.
template <class Energy>
double over_both_faces(const Model& model, const mesh::TipFan& fan, const Eigen::VectorXd& factors,
                       const Energy& energy) {
  if (!fan.is_half) return energy(factors);
  Eigen::VectorXd even = factors;
  for (Eigen::Index l = 0; l < factors.size(); ++l)
    if (model.parity(static_cast<std::size_t>(l), across(fan)) < 0) even[l] = 0.0;
  return 2 * (energy(even) + energy(factors - even));
}

}  // namespace

double TipProbe::j_integral(const Displacements& displacements, const Eigen::VectorXd& factors,
                            std::size_t domain) const {
  return over_both_faces(*model_, *fan_, factors,
                         [&](const Eigen::VectorXd& f) { return j_on_mesh(displacements, f, domain); });
}

double TipProbe::virtual_extension(const Displacements& displacements, const Eigen::VectorXd& factors) const {
  return over_both_faces(*model_, *fan_, factors,
                         [&](const Eigen::VectorXd& f) { return extension_on_mesh(displacements, f); });
}

double TipProbe::j_on_mesh(const Displacements& displacements, const Eigen::VectorXd& factors,
                           std::size_t domain) const {
  const mesh::Mesh& mesh = model_->mesh();
  const ShapeTable shapes = tabulate(displacements.degree, rule_.points);
  const Eigen::Matrix3d stiffness = fields_.compliance().inverse();
  const Eigen::Index loads = displacements.values.cols();
  double sum = 0.0;
  for (const int t : fan_->rings[domain]) {
    const Straight map(mesh.points(), mesh.triangles()[t]);
    const Eigen::Matrix2d inverse = map.jacobian.inverse();
    const Eigen::Vector2d g = axes_.transpose() * inverse.transpose() * weight_slope(mesh, *fan_, domain, t);
    const Eigen::MatrixXd u = coefficients(displacements, t);
    Eigen::MatrixX2d together(u.rows(), 2);
    together << u.leftCols(loads) * factors, u.rightCols(loads) * factors;
    const Eigen::MatrixX2d dr = shapes.dr.transpose() * together;
    const Eigen::MatrixX2d ds = shapes.ds.transpose() * together;
    for (Eigen::Index q = 0; q < dr.rows(); ++q) {
      Eigen::Matrix2d by_reference;
      by_reference << dr.row(q).transpose(), ds.row(q).transpose();
      const Eigen::Matrix2d gradient = axes_.transpose() * by_reference * inverse * axes_;
      const Eigen::Vector3d strain(gradient(0, 0), gradient(1, 1), gradient(0, 1) + gradient(1, 0));
      const Eigen::Vector3d stress = stiffness * strain;
      const Point traction(stress[0] * g[0] + stress[2] * g[1], stress[2] * g[0] + stress[1] * g[1]);
      sum += rule_.weights[q] * map.jacobian.determinant() *
             (traction.dot(gradient.col(0)) - 0.5 * stress.dot(strain) * g[0]);
    }
  }
  return sum;
}

double TipProbe::extension_on_mesh(const Displacements& displacements, const Eigen::VectorXd& factors) const {
  const mesh::Mesh& mesh = model_->mesh();
  const TriangleRule rule = triangle_rule(displacements.degree + 1);
  const ShapeTable shapes = tabulate(displacements.degree, rule.points);
  const Eigen::Matrix3d stiffness = model_->material().stiffness();
  const Eigen::Index loads = displacements.values.cols();
  const double shift = 1e-4 * fan_->radii[1];
  const double within = 0.5 * (fan_->radii[0] + fan_->radii[1]);
  double change = 0.0;
  for (const int t : fan_->rings[0]) {
    const Eigen::MatrixXd u = coefficients(displacements, t);
    Eigen::MatrixX2d together(u.rows(), 2);
    together << u.leftCols(loads) * factors, u.rightCols(loads) * factors;
    const Eigen::MatrixX2d dr = shapes.dr.transpose() * together;
    const Eigen::MatrixX2d ds = shapes.ds.transpose() * together;
    for (const double sign : {1.0, -1.0}) {
      std::array<Point, 3> x;
      for (int k = 0; k < 3; ++k) {
        x[k] = mesh.points()[mesh.triangles()[t][k]];
        if ((x[k] - fan_->at).norm() < within) x[k] += sign * shift * fan_->direction;
      }
      Eigen::Matrix2d jacobian;
      jacobian << x[1] - x[0], x[2] - x[0];
      const Eigen::Matrix2d inverse = jacobian.inverse();
      for (Eigen::Index q = 0; q < dr.rows(); ++q) {
        Eigen::Matrix2d by_reference;
        by_reference << dr.row(q).transpose(), ds.row(q).transpose();
        const Eigen::Matrix2d gradient = by_reference * inverse;
        const Eigen::Vector3d strain(gradient(0, 0), gradient(1, 1), gradient(0, 1) + gradient(1, 0));
        change += sign * rule.weights[q] * jacobian.determinant() * 0.5 * strain.dot(stiffness * strain);
      }
    }
  }
  return -change / (2 * shift);
}

}  // namespace raiser::solver
