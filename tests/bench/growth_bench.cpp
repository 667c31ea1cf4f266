#include <benchmark/benchmark.h>
#include <cblas.h>

#include <fstream>
#include <string>

#include "solver/fe/model.hpp"
#include "tests/bench/plates.hpp"
#include "tests/bench/square.hpp"

namespace raiser::bench {
namespace {

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
