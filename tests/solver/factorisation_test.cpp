#include <gtest/gtest.h>

#include <Eigen/Sparse>
#include <Eigen/SparseCholesky>
#include <algorithm>
#include <cmath>
#include <limits>
#include <random>
#include <stdexcept>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/elasticity/hooke_law.hpp"
#include "solver/fe/stiffness.hpp"
#include "solver/linear/elimination.hpp"

namespace raiser::solver {
namespace {

mesh::Mesh plate_mesh() {
  const mesh::Plate plate{60,
                          40,
                          3,
                          {{"", mesh::HoleShape::circle, 12, 12, 0, Point(-9, 4), 0},
                           {"", mesh::HoleShape::ellipse, 14, 6, 0, Point(12, -5), 0.5}}};
  mesh::SizeRule rule;
  rule.turn = 0.6;
  return mesh::triangulate(mesh::trace(plate), rule);
}

Factorisation::ElementMatrix element_of(const mesh::Mesh& mesh, const Discretisation& space) {
  const HookeLaw law{2.0, 0.3, PlaneState::stress};
  return [&mesh, &space, stiffness = Stiffness(space.degree(), law.stiffness())](
             int t, Eigen::MatrixXd& out) mutable {
    stiffness.element(mesh, t, out);
    Discretisation::Local local;
    space.local(t, local);
    for (Eigen::Index i = 0; i < out.rows(); ++i)
      for (Eigen::Index j = 0; j < out.cols(); ++j) out(i, j) *= local.sign[i / 2] * local.sign[j / 2];
  };
}

Eigen::SparseMatrix<double> assembled(const Discretisation& space,
                                      const Factorisation::ElementMatrix& element) {
  std::vector<Eigen::Triplet<double>> entries;
  Eigen::MatrixXd matrix;
  Discretisation::Local local;
  for (int t = 0; t < static_cast<int>(space.mesh().triangles().size()); ++t) {
    element(t, matrix);
    space.local(t, local);
    for (Eigen::Index i = 0; i < matrix.rows(); ++i)
      for (Eigen::Index j = 0; j < matrix.cols(); ++j)
        entries.emplace_back(2 * local.function[i / 2] + i % 2, 2 * local.function[j / 2] + j % 2,
                             matrix(i, j));
  }
  Eigen::SparseMatrix<double> result(space.unknowns(), space.unknowns());
  result.setFromTriplets(entries.begin(), entries.end());
  return result;
}

// Three unknowns of the first two corners that stop rigid motion, and a few
// more anywhere.
std::vector<bool> held_in(const Discretisation& space, int more) {
  std::vector<bool> held(space.unknowns(), false);
  held[0] = held[1] = held[2] = held[3] = true;
  std::mt19937 random(3);
  for (int k = 0; k < more; ++k) held[random() % held.size()] = true;
  return held;
}

TEST(Factorisation, SolvesAsEigensSparseCholeskyDoes) {
  const mesh::Mesh mesh = plate_mesh();
  const EliminationTree tree(mesh);
  for (const int degree : {1, 2, 4, 7})
    for (const int more : {0, 40}) {
      SCOPED_TRACE("degree " + std::to_string(degree));
      const Discretisation space(mesh, degree);
      const auto element = element_of(mesh, space);
      const std::vector<bool> held = held_in(space, more);
      Eigen::SparseMatrix<double> matrix = assembled(space, element);
      const Eigen::SparseMatrix<double> whole = matrix;
      // Rows and columns of held unknowns become those of the unit matrix.
      matrix.prune([&](Eigen::Index i, Eigen::Index j, double) { return i == j || (!held[i] && !held[j]); });
      std::mt19937 random(11);
      std::normal_distribution<double> normal;
      Eigen::MatrixXd loads(space.unknowns(), 3);
      for (double& value : loads.reshaped()) value = normal(random);
      Eigen::MatrixXd free_loads = loads;
      for (Eigen::Index u = 0; u < loads.rows(); ++u)
        if (held[u]) free_loads.row(u).setZero();

      Room room;
      const Factorisation factors(tree, space, held, element, room);
      const Eigen::MatrixXd ours = factors.solve(loads);
      const Eigen::SimplicialLDLT<Eigen::SparseMatrix<double>> eigen(matrix);
      ASSERT_EQ(eigen.info(), Eigen::Success);
      const Eigen::MatrixXd theirs = eigen.solve(free_loads);
      EXPECT_LT((ours - theirs).norm() / theirs.norm(), 1e-10);
      EXPECT_GT(factors.entries(), static_cast<std::size_t>(space.unknowns()));
      Eigen::MatrixXd residual = whole * ours - loads;
      for (Eigen::Index u = 0; u < residual.rows(); ++u)
        if (held[u]) {
          EXPECT_TRUE(ours.row(u).isZero(0.0));
          residual.row(u).setZero();
        }
      EXPECT_LT(residual.norm() / loads.norm(), 1e-11);
    }
}

// Loads at a few unknowns, so that most of the elimination has nothing to do.
TEST(Factorisation, HalfwayLoadsHaveTheWorkOfOneInTheDisplacementsOfAnother) {
  const mesh::Mesh mesh = plate_mesh();
  const EliminationTree tree(mesh);
  const Discretisation space(mesh, 4);
  const std::vector<bool> held = held_in(space, 20);
  Room room;
  const Factorisation factors(tree, space, held, element_of(mesh, space), room);
  std::mt19937 random(7);
  Eigen::MatrixXd loads = Eigen::MatrixXd::Zero(space.unknowns(), 3);
  for (int column = 0; column < 3; ++column)
    for (int k = 0; k < 5; ++k) loads(random() % held.size(), column) = std::sin(k + 2.0 * column);
  for (std::size_t u = 0; u < held.size(); ++u)
    if (held[u]) loads.row(static_cast<Eigen::Index>(u)).setZero();
  const Eigen::MatrixXd half = factors.halfway(loads);
  const Eigen::MatrixXd work = loads.transpose() * factors.solve(loads);
  ASSERT_GT(work.norm(), 0.0);
  EXPECT_LT((half.transpose() * half - work).norm(), 1e-12 * work.norm());
}

TEST(Factorisation, RefusesAMatrixThatIsNotPositive) {
  const mesh::Mesh mesh = plate_mesh();
  const EliminationTree tree(mesh);
  const Discretisation space(mesh, 3);
  const auto element = element_of(mesh, space);
  const std::vector<bool> held = held_in(space, 0);
  const auto changed = [&](double factor) -> Factorisation::ElementMatrix {
    return [element, factor](int t, Eigen::MatrixXd& out) mutable {
      element(t, out);
      if (t == 5) out *= factor;
    };
  };
  Room room;
  EXPECT_NO_THROW(Factorisation(tree, space, held, changed(1.0), room));
  EXPECT_THROW(Factorisation(tree, space, held, changed(-100.0), room), std::runtime_error);
  EXPECT_THROW(Factorisation(tree, space, held, changed(std::numeric_limits<double>::quiet_NaN()), room),
               std::runtime_error);
  EXPECT_THROW(Factorisation(
                   tree, space, held,
                   [&](int, Eigen::MatrixXd& out) {
                     out = Eigen::MatrixXd::Zero(2 * shape_count(3), 2 * shape_count(3));
                   },
                   room),
               std::runtime_error);
}

TEST(Factorisation, IsTheSameInARoomThatHasServedBefore) {
  const mesh::Mesh mesh = plate_mesh();
  const EliminationTree tree(mesh);
  Room room;
  for (const int degree : {5, 2, 6}) {
    const Discretisation space(mesh, degree);
    const Eigen::MatrixXd loads = Eigen::MatrixXd::Ones(space.unknowns(), 1);
    Room fresh;
    const auto solved = [&](Room& in) {
      return Factorisation(tree, space, held_in(space, 0), element_of(mesh, space), in).solve(loads);
    };
    EXPECT_EQ(solved(room), solved(fresh)) << "degree " << degree;
  }
}

// Median cuts, straight through holes or not, list 61 entities a triangle here.
TEST(EliminationTree, CutsWhereFewSidesAre) {
  mesh::Plate plate{300, 200, 3, {}};
  for (const double x : {-100.0, 0.0, 100.0})
    for (const double y : {-60.0, 0.0, 60.0})
      plate.holes.push_back({"", mesh::HoleShape::circle, 40, 40, 0, Point(x, y), 0});
  const mesh::Mesh mesh = mesh::triangulate(mesh::trace(plate), {});
  const EliminationTree tree(mesh);
  std::size_t listed = 0;
  for (const auto& group : tree.groups()) listed += group.entities.size() * group.eliminated;
  EXPECT_LT(listed, 52 * mesh.triangles().size());
}

TEST(EliminationTree, EliminatesEveryEntityOnceAfterItsTriangles) {
  const mesh::Mesh mesh = plate_mesh();
  const EliminationTree tree(mesh);
  const Discretisation space(mesh, 3);
  std::vector<int> order = tree.order();
  std::sort(order.begin(), order.end());
  ASSERT_EQ(static_cast<int>(order.size()), space.entities());
  for (int e = 0; e < space.entities(); ++e) EXPECT_EQ(order[e], e);
  // An eliminated entity appears in no later group.
  std::vector<bool> gone(space.entities(), false);
  std::vector<bool> met(mesh.triangles().size(), false);
  for (std::size_t g = 0; g < tree.groups().size(); ++g) {
    const auto& group = tree.groups()[g];
    if (group.triangle >= 0)
      met[group.triangle] = true;
    else
      for (const int child : group.children) EXPECT_LT(child, static_cast<int>(g));
    for (const int entity : group.entities) EXPECT_FALSE(gone[entity]);
    for (int k = 0; k < group.eliminated; ++k) gone[group.entities[k]] = true;
  }
  EXPECT_EQ(std::count(met.begin(), met.end(), true), static_cast<std::ptrdiff_t>(met.size()));
  EXPECT_TRUE(std::all_of(gone.begin(), gone.end(), [](bool g) { return g; }));
}

}  // namespace
}  // namespace raiser::solver
