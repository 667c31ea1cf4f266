#include <benchmark/benchmark.h>
#include <cblas.h>

#include <cmath>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/report.hpp"
#include "solver/adapt/sequence.hpp"
#include "tests/bench/plates.hpp"

namespace raiser::bench {
namespace {

constexpr mesh::Mirrors quarter{true, true};

solver::Model reference_model() {
  const solver::Problem problem = reference_case();
  return {mesh::triangulate(mesh::cut(mesh::trace(problem.plate), quarter), {}), quarter, problem.material,
          problem.plate.thickness, solver::unit_loads(problem.plate, problem.loads)};
}

/// Stages of the reference case, each by itself.
void trace_cut_triangulate(benchmark::State& state) {
  const solver::Problem problem = reference_case();
  std::size_t triangles = 0;
  for (auto _ : state)
    triangles = mesh::triangulate(mesh::cut(mesh::trace(problem.plate), quarter), {}).triangles().size();
  state.counters["triangles"] = static_cast<double>(triangles);
}
BENCHMARK(trace_cut_triangulate)->Unit(benchmark::kMillisecond);

void assemble_factorise_solve(benchmark::State& state) {
  openblas_set_num_threads(1);
  const solver::Model model = reference_model();
  const int degree = static_cast<int>(state.range(0));
  for (auto _ : state) benchmark::DoNotOptimize(model.solve(degree).values.data());
  state.counters["unknowns"] = solver::Discretisation(model.mesh(), degree).unknowns();
}
BENCHMARK(assemble_factorise_solve)->DenseRange(3, 8)->Unit(benchmark::kMillisecond);

void edge_scan(benchmark::State& state) {
  const solver::Problem problem = reference_case();
  const solver::Model model = reference_model();
  const solver::EdgeScanner scanner(model, problem.plate);
  const solver::Displacements solved = model.solve(static_cast<int>(state.range(0)));
  for (auto _ : state) benchmark::DoNotOptimize(scanner.scan(solved).extremes.data());
}
BENCHMARK(edge_scan)->DenseRange(3, 8)->Unit(benchmark::kMillisecond);

void report_everything(benchmark::State& state) {
  const solver::Problem problem = reference_case();
  const solver::Model model = reference_model();
  solver::DegreeSequence sequence(model, problem.plate);
  for (int degree = 3; degree <= 6; ++degree) sequence.solve(degree);
  for (auto _ : state)
    benchmark::DoNotOptimize(solver::report(problem, sequence, {}, solver::Report::full).degree);
}
BENCHMARK(report_everything)->Unit(benchmark::kMillisecond);

/// The whole solution, mesh and report included; what it gives is checked.
void settle(benchmark::State& state, const solver::Problem& problem, double tolerance) {
  openblas_set_num_threads(1);
  const auto asks = every_peak(problem, tolerance);
  solver::Solution solution;
  for (auto _ : state) solution = solver::settle(problem, asks);
  if (solution.status != solver::Solution::Status::settled) state.SkipWithError(solution.reason.c_str());
  state.counters["degree"] = solution.degree;
  state.counters["refinements"] = solution.levels.back().refinement;
  state.counters["triangles"] = static_cast<double>(solution.triangles);
  state.counters["unknowns"] = static_cast<double>(solution.unknowns);
}

void settle_reference(benchmark::State& state) {
  const solver::Problem problem = reference_case();
  settle(state, problem, 1e-4);
  const auto found = solver::settle(problem, every_peak(problem, 1e-4)).combined.raisers[0].gross.kt;
  if (!found || found->bound > 1e-4 * reference_kt || std::abs(found->value - reference_kt) > found->bound)
    state.SkipWithError("Kt is not within its bound");
}
BENCHMARK(settle_reference)->Unit(benchmark::kMillisecond);

void settle_grid(benchmark::State& state) { settle(state, grid_of_holes(0.0), 1e-3); }
void settle_shifted_grid(benchmark::State& state) { settle(state, grid_of_holes(3.0), 1e-3); }
void settle_scattered(benchmark::State& state) { settle(state, scattered_holes(), 1e-3); }
BENCHMARK(settle_grid)->Unit(benchmark::kMillisecond);
BENCHMARK(settle_shifted_grid)->Unit(benchmark::kMillisecond);
BENCHMARK(settle_scattered)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace raiser::bench
