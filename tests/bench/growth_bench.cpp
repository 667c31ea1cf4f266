#include <benchmark/benchmark.h>
#include <cblas.h>

#include <fstream>
#include <string>

#include "solver/fe/model.hpp"
#include "tests/bench/plates.hpp"

namespace raiser::bench {
namespace {

/// A square of 2 n^2 straight triangles.
mesh::Mesh square(int n) {
  using Kind = mesh::Owner::Kind;
  std::vector<mesh::Point> points;
  const double half = 50.0;
  for (int j = 0; j <= n; ++j)
    for (int i = 0; i <= n; ++i) points.emplace_back(2 * half * i / n - half, 2 * half * j / n - half);
  std::vector<mesh::Mesh::Triangle> triangles;
  std::vector<mesh::BoundarySide> boundary;
  const auto add_side = [&](int side, Kind kind) {
    const int t = static_cast<int>(triangles.size()) - 1;
    const mesh::Point from = points[triangles[t][side]], to = points[triangles[t][(side + 1) % 3]];
    boundary.push_back({t, side, {mesh::Curve::Kind::line, from, to - from, {0, 0}, 0.0, 1.0, {kind}}});
  };
  for (int j = 0; j < n; ++j)
    for (int i = 0; i < n; ++i) {
      const int a = j * (n + 1) + i, b = a + 1, c = b + n + 1, d = a + n + 1;
      triangles.push_back({a, b, c});
      if (j == 0) add_side(0, Kind::bottom);
      if (i == n - 1) add_side(1, Kind::right);
      triangles.push_back({a, c, d});
      if (j == n - 1) add_side(1, Kind::top);
      if (i == 0) add_side(2, Kind::left);
    }
  return {std::move(points), std::move(triangles), std::move(boundary)};
}

/// Largest memory of this process since the last reset, MB; both are Linux only.
void reset_peak_memory() { std::ofstream("/proc/self/clear_refs") << 5; }
double peak_memory() {
  std::ifstream status("/proc/self/status");
  for (std::string word; status >> word;)
    if (word == "VmHWM:") {
      double kilobytes = 0.0;
      status >> kilobytes;
      return kilobytes / 1024;
    }
  return 0.0;
}

/// Assembly, factorisation and solution at degree 6, the mesh given.
void growth(benchmark::State& state) {
  openblas_set_num_threads(1);
  const mesh::Mesh mesh = square(static_cast<int>(state.range(0)));
  const solver::Problem problem = in_tension({100.0, 100.0, 5.0, {}});
  const double unknowns = solver::Discretisation(mesh, 6).unknowns();
  reset_peak_memory();
  for (auto _ : state) {
    const solver::Model model(mesh, {}, problem.material, problem.plate.thickness,
                              solver::unit_loads(problem.plate, problem.loads));
    const solver::Displacements solved = model.solve(6);
    const double stretch = solved.values.maxCoeff() - solved.values.minCoeff();
    if (!(stretch > 0.0)) state.SkipWithError("nothing moved");
  }
  state.counters["unknowns"] = unknowns;
  state.counters["unknowns/s"] = benchmark::Counter(unknowns, benchmark::Counter::kIsIterationInvariantRate);
  state.counters["MB"] = peak_memory();
}
BENCHMARK(growth)->Arg(12)->Arg(21)->Arg(37)->Arg(66)->Arg(118)->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace raiser::bench
