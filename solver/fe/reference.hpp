#pragma once

#include <Eigen/Core>
#include <array>
#include <span>
#include <vector>

#include "mesh/legendre.hpp"
#include "mesh/mesh.hpp"
#include "solver/fe/shape.hpp"

namespace raiser::solver {

/// What every triangle of one degree shares: shape functions and map factors
/// at the points of a rule that serves curved triangles too, and the integrals
/// of products of reference derivatives that serve straight ones exactly.
struct ReferenceElement {
  explicit ReferenceElement(int degree);
  TriangleRule rule;
  mesh::MapTable maps;
  ShapeTable shapes;
  Eigen::MatrixXd rr, rs, sr, ss;  ///< integrals of da/dr db/dr, da/dr db/ds, da/ds db/dr, da/ds db/ds
};

/// Shape functions and map factors at positions s along each of the three sides.
struct SideTables {
  SideTables(int degree, std::span<const double> s);
  std::array<ShapeTable, 3> shapes;
  std::vector<mesh::MapTable> maps;
};

/// Tables computed once in a process, when first asked for. Immutable, and
/// safe to ask for from several threads.
const ReferenceElement& reference_element(int degree);
const SideTables& sides_at_gauss_points(int degree);
const SideTables& sides_at_search_points(int degree);

/// Positions along a side: for integrals of tractions with a space of the
/// degree, and for the search of extremes (Chebyshev-Lobatto points).
const mesh::GaussRule& traction_rule(int degree);
const std::vector<double>& search_points();

}  // namespace raiser::solver
