#include "solver/fe/stiffness.hpp"

#include <cblas.h>

#include <Eigen/LU>
#include <cmath>

namespace raiser::solver {

namespace {

/// The entries of an element matrix that belong to components `row`, `column`.
auto block(Eigen::MatrixXd& matrix, int row, int column) {
  using Step = Eigen::Stride<Eigen::Dynamic, 2>;
  const Eigen::Index n = matrix.rows() / 2;
  return Eigen::Map<Eigen::MatrixXd, 0, Step>(matrix.data() + row + 2 * n * column, n, n, Step(4 * n, 2));
}

}  // namespace

Stiffness::Stiffness(int degree, const Eigen::Matrix3d& law)
    : reference_(&reference_element(degree)), points_(reference_->rule.points.size()) {
  constexpr int strain[2][2] = {{0, 2}, {2, 1}};  // that the x or y slope of a component adds to
  for (int row = 0; row < 2; ++row)
    for (int column = 0; column < 2; ++column)
      for (int i = 0; i < 2; ++i)
        for (int j = 0; j < 2; ++j) weights_[row][column](i, j) = law(strain[row][i], strain[column][j]);
}

void Stiffness::straight(const mesh::Mesh& mesh, int t, Eigen::MatrixXd& out) const {
  const ReferenceElement& reference = *reference_;
  const auto& corner = mesh.triangles()[t];
  Eigen::Matrix2d jacobian;
  jacobian << mesh.points()[corner[1]] - mesh.points()[corner[0]],
      mesh.points()[corner[2]] - mesh.points()[corner[0]];
  const double area = jacobian.determinant();
  const Eigen::Matrix2d g = jacobian.inverse();  // rows: gradients of r and s
  for (int row = 0; row < 2; ++row)
    for (int column = 0; column < 2; ++column) {
      const Eigen::Matrix2d factor = area * g * weights_[row][column] * g.transpose();
      block(out, row, column) = factor(0, 0) * reference.rr + factor(0, 1) * reference.rs +
                                factor(1, 0) * reference.sr + factor(1, 1) * reference.ss;
    }
}

void Stiffness::curved(const mesh::Mesh& mesh, int t, Eigen::MatrixXd& out) {
  const ShapeTable& shapes = reference_->shapes;
  reference_->maps.evaluate(mesh, t, points_);
  const Eigen::Index n = shapes.dr.rows();
  const Eigen::Index points = shapes.dr.cols();
  gradients_.resize(2 * n, points);
  for (Eigen::Index q = 0; q < points; ++q) {
    const Eigen::Matrix2d& j = points_[q].jacobian;
    const double area = j.determinant();
    const double scale = std::sqrt(reference_->rule.weights[q] * area) / area;
    gradients_.col(q).head(n) = scale * (j(1, 1) * shapes.dr.col(q) - j(1, 0) * shapes.ds.col(q));
    gradients_.col(q).tail(n) = scale * (j(0, 0) * shapes.ds.col(q) - j(0, 1) * shapes.dr.col(q));
  }
  products_.resize(2 * n, 2 * n);
  const int rows = static_cast<int>(2 * n);
  cblas_dsyrk(CblasColMajor, CblasLower, CblasNoTrans, rows, static_cast<int>(points), 1.0, gradients_.data(),
              rows, 0.0, products_.data(), rows);
  products_.triangularView<Eigen::StrictlyUpper>() = products_.transpose();
  const auto xx = products_.topLeftCorner(n, n);
  const auto xy = products_.topRightCorner(n, n);
  const auto yx = products_.bottomLeftCorner(n, n);
  const auto yy = products_.bottomRightCorner(n, n);
  for (int row = 0; row < 2; ++row)
    for (int column = 0; column < 2; ++column) {
      const Eigen::Matrix2d& factor = weights_[row][column];
      block(out, row, column) = factor(0, 0) * xx + factor(0, 1) * xy + factor(1, 0) * yx + factor(1, 1) * yy;
    }
}

void Stiffness::element(const mesh::Mesh& mesh, int t, Eigen::MatrixXd& out) {
  const Eigen::Index n = reference_->shapes.dr.rows();
  out.resize(2 * n, 2 * n);
  if (mesh.is_curved(t))
    curved(mesh, t, out);
  else
    straight(mesh, t, out);
}

}  // namespace raiser::solver
