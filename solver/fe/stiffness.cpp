#include "solver/fe/stiffness.hpp"

#include <Eigen/LU>
#include <cmath>

namespace raiser::solver {

Stiffness::Stiffness(int degree, const Eigen::Matrix3d& law)
    : law_(law), reference_(&reference_element(degree)), points_(reference_->rule.points.size()) {}

void Stiffness::straight(const mesh::Mesh& mesh, int t) {
  const ReferenceElement& reference = *reference_;
  const auto& corner = mesh.triangles()[t];
  Eigen::Matrix2d jacobian;
  jacobian << mesh.points()[corner[1]] - mesh.points()[corner[0]],
      mesh.points()[corner[2]] - mesh.points()[corner[0]];
  const double area = jacobian.determinant();
  const Eigen::Matrix2d g = jacobian.inverse();  // rows: gradients of r and s
  const auto combine = [&](int i, int j) -> Eigen::MatrixXd {
    return area * (g(0, i) * g(0, j) * reference.rr + g(0, i) * g(1, j) * reference.rs +
                   g(1, i) * g(0, j) * reference.rs.transpose() + g(1, i) * g(1, j) * reference.ss);
  };
  xx_ = combine(0, 0);
  xy_ = combine(0, 1);
  yy_ = combine(1, 1);
}

void Stiffness::curved(const mesh::Mesh& mesh, int t) {
  const ShapeTable& shapes = reference_->shapes;
  reference_->maps.evaluate(mesh, t, points_);
  gx_.resize(shapes.dr.rows(), shapes.dr.cols());
  gy_.resize(shapes.dr.rows(), shapes.dr.cols());
  for (Eigen::Index q = 0; q < gx_.cols(); ++q) {
    const Eigen::Matrix2d& j = points_[q].jacobian;
    const double area = j.determinant();
    const double scale = std::sqrt(reference_->rule.weights[q] * area) / area;
    gx_.col(q) = scale * (j(1, 1) * shapes.dr.col(q) - j(1, 0) * shapes.ds.col(q));
    gy_.col(q) = scale * (j(0, 0) * shapes.ds.col(q) - j(0, 1) * shapes.dr.col(q));
  }
  xx_.noalias() = gx_ * gx_.transpose();
  xy_.noalias() = gx_ * gy_.transpose();
  yy_.noalias() = gy_ * gy_.transpose();
}

void Stiffness::element(const mesh::Mesh& mesh, int t, Eigen::MatrixXd& out) {
  if (mesh.is_curved(t))
    curved(mesh, t);
  else
    straight(mesh, t);
  const Eigen::Index n = xx_.rows();
  out.resize(2 * n, 2 * n);
  const auto block = [&](int row, int column) {
    return Eigen::Map<Eigen::MatrixXd, 0, Eigen::Stride<Eigen::Dynamic, 2>>(
        out.data() + row + 2 * n * column, n, n, Eigen::Stride<Eigen::Dynamic, 2>(4 * n, 2));
  };
  const Eigen::Matrix3d& d = law_;
  block(0, 0) = d(0, 0) * xx_ + d(2, 2) * yy_ + d(0, 2) * (xy_ + xy_.transpose());
  block(1, 1) = d(2, 2) * xx_ + d(1, 1) * yy_ + d(1, 2) * (xy_ + xy_.transpose());
  block(0, 1) = d(0, 1) * xy_ + d(2, 2) * xy_.transpose() + d(0, 2) * xx_ + d(1, 2) * yy_;
  block(1, 0) = block(0, 1).transpose();
}

}  // namespace raiser::solver
