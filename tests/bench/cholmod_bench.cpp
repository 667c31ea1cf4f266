// The same equations by CHOLMOD's supernodal Cholesky, for a ratio; compiled
// only where CHOLMOD is installed. Elements are condensed before assembly.
#if RAISER_HAS_CHOLMOD
#include <benchmark/benchmark.h>
#include <cblas.h>

#include <Eigen/Cholesky>
#include <Eigen/CholmodSupport>
#include <Eigen/SparseCore>
#include <vector>

#include "solver/elasticity/hooke_law.hpp"
#include "solver/fe/discretisation.hpp"
#include "solver/fe/stiffness.hpp"
#include "tests/bench/square.hpp"

namespace raiser::bench {
namespace {

using Sparse = Eigen::SparseMatrix<double>;

/// What the interior of one triangle leaves on its sides.
Eigen::MatrixXd condensed(const Eigen::MatrixXd& k, int inside) {
  const Eigen::Index n = k.rows() - inside;
  const Eigen::LLT<Eigen::MatrixXd> factor(k.bottomRightCorner(inside, inside));
  const Eigen::MatrixXd half = factor.matrixL().solve(k.bottomLeftCorner(inside, n));
  return k.topLeftCorner(n, n) - half.transpose() * half;
}

/// Condensed stiffness matrix of the square, lower triangle, a little stiffness
/// on the diagonal instead of supports.
Sparse assemble(const mesh::Mesh& mesh, int degree) {
  const solver::Discretisation space(mesh, degree);
  const solver::HookeLaw law{2e5, 0.3, solver::PlaneState::stress};
  solver::Stiffness stiffness(degree, law.stiffness());
  const int inside = 2 * solver::interior_count(degree);
  solver::Discretisation::Local local;
  Eigen::MatrixXd k;
  std::vector<Eigen::Triplet<double>> entries;
  for (int t = 0; t < static_cast<int>(mesh.triangles().size()); ++t) {
    stiffness.element(mesh, t, k);
    space.local(t, local);
    const Eigen::MatrixXd c = condensed(k, inside);
    for (int j = 0; j < c.cols(); ++j)
      for (int i = 0; i < c.rows(); ++i) {
        const int row = 2 * local.function[i / 2] + i % 2, column = 2 * local.function[j / 2] + j % 2;
        if (row >= column) entries.emplace_back(row, column, local.sign[i / 2] * local.sign[j / 2] * c(i, j));
      }
  }
  const int unknowns = 2 * space.first_function(space.triangle_entity(0));
  for (int u = 0; u < unknowns; ++u) entries.emplace_back(u, u, 1e-3 * law.youngs_modulus);
  Sparse matrix(unknowns, unknowns);
  matrix.setFromTriplets(entries.begin(), entries.end());
  return matrix;
}

/// Assembly, factorisation and one solution at degree 6, as in `growth`.
void growth_cholmod(benchmark::State& state) {
  openblas_set_num_threads(1);
  const mesh::Mesh mesh = square(static_cast<int>(state.range(0)));
  for (auto _ : state) {
    const Sparse matrix = assemble(mesh, 6);
    const Eigen::CholmodSupernodalLLT<Sparse, Eigen::Lower> factor(matrix);
    const Eigen::VectorXd solved = factor.solve(Eigen::VectorXd::Ones(matrix.rows()).eval());
    if (factor.info() != Eigen::Success || !solved.allFinite()) state.SkipWithError("CHOLMOD failed");
  }
  state.counters["unknowns"] = solver::Discretisation(mesh, 6).unknowns();
}
BENCHMARK(growth_cholmod)->Arg(12)->Arg(37)->Arg(118)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace raiser::bench
#endif
