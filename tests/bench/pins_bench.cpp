// Rigid pins in contact: from nothing to every bound, warm.
#include <benchmark/benchmark.h>
#include <cblas.h>

#include "solver/adapt/pins.hpp"
#include "tests/bench/plates.hpp"

namespace raiser::bench {
namespace {

/// A lug of invented sizes: a pin of 16 mm pulls with 32 kN. Clearance on the diameter, mm.
solver::Problem lug(double clearance) {
  mesh::Hole eye = circle(16.0, {35.0, 0.0}, 1);
  solver::Load pin;
  pin.kind = solver::Load::Kind::pin;
  pin.name = "pin";
  pin.force = 32000;
  pin.clearance = clearance;
  solver::Load end;
  end.kind = solver::Load::Kind::edge;
  end.edge = mesh::rectangle::left;
  end.stress = 100.0;
  return {{120.0, 40.0, 8.0, {eye}}, {2.1e5, 0.3, solver::PlaneState::stress}, {pin, end}};
}

/// In hundredths of a millimetre: interference, neat fit, clearance.
void fits(benchmark::internal::Benchmark* b) {
  b->Arg(-1)->Arg(0)->Arg(2)->Arg(10)->Arg(40)->Unit(benchmark::kMillisecond);
}

void contact_alone(benchmark::State& state) {
  openblas_set_num_threads(1);
  const solver::Problem problem = lug(0.01 * static_cast<double>(state.range(0)));
  for (auto _ : state) benchmark::DoNotOptimize(solver::with_contact(problem, 3e-4).pins.data());
}
BENCHMARK(contact_alone)->Apply(fits);

void settle_contact(benchmark::State& state) {
  openblas_set_num_threads(1);
  const solver::Problem problem = lug(0.01 * static_cast<double>(state.range(0)));
  const auto asks = every_peak(problem, 1e-3);
  solver::Solution solution;
  for (auto _ : state) solution = solver::settle(problem, asks);
  if (solution.status != solver::Solution::Status::settled) state.SkipWithError(solution.reason.c_str());
  state.counters["degree"] = solution.degree;
  state.counters["triangles"] = static_cast<double>(solution.triangles);
  state.counters["unknowns"] = static_cast<double>(solution.unknowns);
}
BENCHMARK(settle_contact)->Apply(fits);

}  // namespace
}  // namespace raiser::bench
