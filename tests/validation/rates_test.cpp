// How fast the solution converges to a closed form, asserted from both sides.
#include <gtest/gtest.h>

#include <Eigen/LU>
#include <cmath>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/field/edge.hpp"
#include "solver/field/field.hpp"
#include "tests/validation/refined.hpp"
#include "validation/exact/exact.hpp"

namespace raiser::validation {
namespace {

using solver::Displacements;
using solver::Model;

// Kirsch's field in a square round the hole: nothing singular, so that the
// powers of the mesh size are those of the degree.
const RemoteStress remote{100, 20, -35};
constexpr double radius = 10.0;
const solver::HookeLaw law{70000, 0.33, solver::PlaneState::stress};

mesh::Mesh square() {
  const mesh::Plate plate{
      40, 40, 1, {{"", mesh::HoleShape::circle, 2 * radius, 2 * radius, 0, Point(0, 0), 0}}};
  mesh::SizeRule rule;
  rule.turn = 0.5;
  return mesh::triangulate(mesh::trace(plate), rule);
}

Model model_on(const mesh::Mesh& mesh) {
  return {mesh, {}, law, 1.0, {{"kirsch", traction_of([](const Point& x) {
                                  return kirsch(remote, radius, x);
                                })}}};
}

struct Errors {
  double energy = 0.0;  // strain energy of the difference over that of the field
  double edge = 0.0;    // largest miss of the edge stress over its largest magnitude
};

// Strain energies by quadrature over the cells, against the closed form.
double energy_error(const Model& model, const Displacements& solved) {
  const solver::Field field(model, solved);
  const solver::TriangleRule rule = solver::triangle_rule(solved.degree + 6);
  const Eigen::Matrix3d compliance = law.compliance();
  double apart = 0.0;
  double whole = 0.0;
  for (std::size_t cell = 0; cell < field.cells(); ++cell) {
    const auto values = field.sample(cell, rule.points);
    for (std::size_t q = 0; q < values.size(); ++q) {
      const double weight =
          rule.weights[q] * model.mesh().map(static_cast<int>(cell), rule.points[q]).jacobian.determinant();
      const Stress exact = kirsch(remote, radius, values[q].point);
      const Eigen::Vector3d wanted(exact.xx, exact.yy, exact.xy);
      const Stress& seen = values[q].stress;
      const Eigen::Vector3d miss = Eigen::Vector3d(seen.xx, seen.yy, seen.xy) - wanted;
      apart += weight * miss.dot(compliance * miss);
      whole += weight * wanted.dot(compliance * wanted);
    }
  }
  return apart / whole;
}

double edge_error(const Model& model, const Displacements& solved) {
  std::vector<double> s;
  for (int k = -10; k <= 10; ++k) s.push_back(k / 10.0);
  const solver::SideTables tables(solved.degree, s);
  const solver::EdgeProbe probe(model, solved.degree, s, tables);
  double miss = 0.0;
  for (const mesh::BoundarySide& side : model.mesh().boundary()) {
    if (side.curve.owner.kind != solver::Owner::Kind::raiser) continue;
    const Eigen::MatrixXd seen = probe.at(side, solved).tangential;
    for (std::size_t q = 0; q < s.size(); ++q) {
      const Point x = side.curve.at(side.parameter(s[q]));
      miss = std::max(miss, std::abs(seen(static_cast<Eigen::Index>(q), 0) -
                                     kirsch_edge(remote, std::atan2(x.y(), x.x()))));
    }
  }
  return miss / 300.0;
}

Errors errors(const Model& model, int degree) {
  const Displacements solved = model.solve(degree);
  return {energy_error(model, solved), edge_error(model, solved)};
}

// Halving every triangle divides the error in energy by 2^(2p) and that of the
// edge stress by 2^p. Source: G. Strang and G. J. Fix, An Analysis of the
// Finite Element Method (1973), chapters 1 and 3.
TEST(Rates, HalvingTheTrianglesGivesThePowerOfTheDegree) {
  const mesh::Mesh coarse = refined(square());
  const mesh::Mesh fine = refined(coarse);
  const mesh::Mesh finer = refined(fine);
  for (const int p : {1, 2, 3, 4}) {
    const Errors before = errors(model_on(p < 3 ? fine : coarse), p);
    const Errors after = errors(model_on(p < 3 ? finer : fine), p);
    const double in_energy = std::log2(before.energy / after.energy);
    const double on_edge = std::log2(before.edge / after.edge);
    RecordProperty("p" + std::to_string(p), std::to_string(in_energy) + ", edge " + std::to_string(on_edge));
    EXPECT_NEAR(in_energy, 2 * p, 0.07 * 2 * p) << "degree " << p;
    EXPECT_NEAR(on_edge, p, 0.45) << "degree " << p;
  }
}

// On one mesh the error falls by a steady factor from degree to degree. Source:
// I. Babuska, B. A. Szabo and I. N. Katz, SIAM J. Numer. Anal. 18 (1981) 515-545.
TEST(Rates, RaisingTheDegreeConvergesExponentially) {
  const Model model = model_on(square());
  std::vector<Errors> found;
  for (int p = 2; p <= 10; ++p) found.push_back(errors(model, p));
  for (std::size_t k = 2; k < found.size(); ++k) {
    const double energy = std::sqrt(found[k - 2].energy / found[k].energy);  // norm, over two degrees
    const double edge = found[k - 2].edge / found[k].edge;
    EXPECT_GT(energy, 20.0) << "from degree " << k << " to " << k + 2;
    EXPECT_LT(energy, 80.0) << "from degree " << k << " to " << k + 2;
    EXPECT_GT(edge, 10.0) << "from degree " << k << " to " << k + 2;
    EXPECT_LT(edge, 250.0) << "from degree " << k << " to " << k + 2;
  }
}

// Sides of a fixed degree settle on another hole: its energy stops converging.
TEST(Rates, StopWhereTheSidesAreNotTheDrawings) {
  const mesh::Mesh mesh = square();
  const Model exact = model_on(mesh);
  const Model cubic = model_on(mesh.with_geometry_degree(3));
  const double good = edge_error(exact, exact.solve(8));
  const double stuck = edge_error(cubic, cubic.solve(8));
  EXPECT_LT(good, 1e-5);
  EXPECT_GT(stuck, 20 * good);
}

}  // namespace
}  // namespace raiser::validation
