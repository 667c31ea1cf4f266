#pragma once

#include <vector>

namespace raiser::mesh {

/// Gauss-Legendre points and weights on [-1, 1], exact for polynomials of
/// degree 2 n - 1. Computed by Newton's method on the Legendre polynomial.
struct GaussRule {
  std::vector<double> points;
  std::vector<double> weights;
};
GaussRule gauss_legendre(int n);

/// Legendre polynomials P_0..P_n and their derivatives at s.
/// `values` and `slopes` must hold n + 1 numbers.
void legendre(int n, double s, double* values, double* slopes);

}  // namespace raiser::mesh
