#include "solver/fe/shape.hpp"

#include <array>

#include "mesh/legendre.hpp"

namespace raiser::solver {
namespace {

/// A number with its derivatives along r and s.
struct Dual {
  double value = 0.0, r = 0.0, s = 0.0;
};
Dual operator+(const Dual& a, const Dual& b) { return {a.value + b.value, a.r + b.r, a.s + b.s}; }
Dual operator-(const Dual& a, const Dual& b) { return {a.value - b.value, a.r - b.r, a.s - b.s}; }
Dual operator*(const Dual& a, const Dual& b) {
  return {a.value * b.value, a.r * b.value + a.value * b.r, a.s * b.value + a.value * b.s};
}
Dual operator*(double a, const Dual& b) { return {a * b.value, a * b.r, a * b.s}; }

using Sequence = std::array<Dual, max_degree + 1>;

/// Scaled integrated Legendre polynomials l_2..l_p of x and t; l_n(x, 1) is the
/// integral of P_(n-1) from -1 to x.
void integrated_legendre(int p, const Dual& x, const Dual& t, Sequence& l) {
  const Dual t2 = t * t;
  l[1] = x;
  if (p < 2) return;
  l[2] = 0.5 * (x * x - t2);
  for (int n = 2; n < p; ++n)
    l[n + 1] = (1.0 / (n + 1)) * ((2.0 * n - 1.0) * (x * l[n]) - (n > 2 ? n - 2.0 : 0.0) * (t2 * l[n - 1]));
}

/// Jacobi polynomials P_0..P_n^(alpha, 0) of x.
void jacobi(int n, double alpha, const Dual& x, Sequence& values) {
  values[0] = {1.0, 0.0, 0.0};
  if (n < 1) return;
  values[1] = 0.5 * ((alpha + 2.0) * x + Dual{alpha, 0.0, 0.0});
  for (int k = 1; k < n; ++k) {
    const double c = 2.0 * k + alpha;
    const double a1 = 2.0 * (k + 1) * (k + alpha + 1) * c;
    const double a2 = (c + 1) * alpha * alpha;
    const double a3 = c * (c + 1) * (c + 2);
    const double a4 = 2.0 * (k + alpha) * k * (c + 2);
    values[k + 1] = (1.0 / a1) * ((a3 * x + Dual{a2, 0.0, 0.0}) * values[k] - a4 * values[k - 1]);
  }
}

template <class Store>
void shapes_at(int p, const Point& reference, Store store) {
  const std::array<Dual, 3> l = {Dual{1.0 - reference.x() - reference.y(), -1.0, -1.0},
                                 Dual{reference.x(), 1.0, 0.0}, Dual{reference.y(), 0.0, 1.0}};
  for (const Dual& corner : l) store(corner);
  Sequence side;
  for (int a = 0; a < 3; ++a) {
    const Dual& la = l[a];
    const Dual& lb = l[(a + 1) % 3];
    integrated_legendre(p, lb - la, la + lb, side);
    for (int k = 2; k <= p; ++k) store(side[k]);
  }
  integrated_legendre(p, l[1] - l[0], l[0] + l[1], side);
  Sequence across;
  for (int i = 2; i < p; ++i) {
    jacobi(p - 1 - i, 2.0 * i - 1.0, 2.0 * l[2] - Dual{1.0, 0.0, 0.0}, across);
    for (int j = 0; i + j < p; ++j) store(side[i] * l[2] * across[j]);
  }
}

}  // namespace

ShapeTable tabulate(int degree, std::span<const Point> reference) {
  const int n = shape_count(degree);
  const auto points = static_cast<Eigen::Index>(reference.size());
  ShapeTable table{degree, Eigen::MatrixXd(n, points), Eigen::MatrixXd(n, points),
                   Eigen::MatrixXd(n, points)};
  for (Eigen::Index q = 0; q < points; ++q) {
    Eigen::Index row = 0;
    shapes_at(degree, reference[q], [&](const Dual& function) {
      table.value(row, q) = function.value;
      table.dr(row, q) = function.r;
      table.ds(row, q) = function.s;
      ++row;
    });
  }
  return table;
}

TriangleRule triangle_rule(int n) {
  const mesh::GaussRule rule = mesh::gauss_legendre(n);
  TriangleRule result;
  for (int i = 0; i < n; ++i)
    for (int j = 0; j < n; ++j) {
      const double s = (1 + rule.points[j]) / 2;
      const double r = (1 + rule.points[i]) / 2 * (1 - s);
      result.points.emplace_back(r, s);
      result.weights.push_back(rule.weights[i] * rule.weights[j] * (1 - s) / 4);
    }
  return result;
}

Point on_side(int side, double s) {
  const double la = (1 - s) / 2;
  const double lb = (1 + s) / 2;
  switch (side) {
    case 0:
      return {lb, 0.0};
    case 1:
      return {la, lb};
    default:
      return {0.0, la};
  }
}

}  // namespace raiser::solver
