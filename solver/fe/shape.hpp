#pragma once

#include <Eigen/Core>
#include <span>
#include <vector>

#include "mesh/plate/plate.hpp"

namespace raiser::solver {

using mesh::Point;

/// Number of scalar shape functions of a triangle of degree p, and of those
/// inside it (zero on its sides).
constexpr int shape_count(int p) { return (p + 1) * (p + 2) / 2; }
constexpr int interior_count(int p) { return (p - 1) * (p - 2) / 2; }

inline constexpr int min_degree = 1;
inline constexpr int max_degree = 12;

/// Hierarchic shape functions of degree p and their derivatives at points of
/// the reference triangle, one row a function, one column a point.
///
/// Order: the three corners; then for side 0, 1, 2 (from corner k to k + 1) the
/// degrees 2..p; then the interior ones. Side functions are scaled integrated
/// Legendre polynomials l_k(lb - la, la + lb): with the side run the other way
/// those of odd degree change sign. Interior functions are
/// l_i(l1 - l0, l0 + l1) l2 P_j^(2i-1,0)(2 l2 - 1), i >= 2, i + j < p.
/// A space of lower degree is contained in each of higher degree.
/// Source: S. Zaglmayr, High Order Finite Element Methods for Electromagnetic
/// Field Computation (2006), section 5.2.
struct ShapeTable {
  int degree = 0;
  Eigen::MatrixXd value;
  Eigen::MatrixXd dr;
  Eigen::MatrixXd ds;
};
ShapeTable tabulate(int degree, std::span<const Point> reference);

/// Points and weights on the reference triangle (weights sum to 1/2), exact
/// for polynomials of degree 2 n - 2: Gauss-Legendre rules in collapsed
/// coordinates, n x n points.
struct TriangleRule {
  std::vector<Point> points;
  std::vector<double> weights;
};
TriangleRule triangle_rule(int n);

/// The reference point at s in [-1, 1] along side `side`.
Point on_side(int side, double s);

}  // namespace raiser::solver
