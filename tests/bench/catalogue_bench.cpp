// Every kind of detail at 0.1 %, mesh and report included.
#include <benchmark/benchmark.h>
#include <cblas.h>

#include <functional>
#include <stdexcept>
#include <string>
#include <utility>
#include <vector>

#include "mesh/plate/build.hpp"
#include "solver/solution.hpp"
#include "validation/families/bars.hpp"
#include "validation/families/specimens.hpp"
#include "validation/independent.hpp"

namespace raiser::bench {
namespace {

using mesh::Point;
using solver::Load;

Load load_of(Load::Kind kind) {
  Load load;
  load.name = solver::word(kind);
  load.kind = kind;
  load.stress = 100.0;
  return load;
}

solver::Problem on(mesh::Plate plate, Load::Kind kind) {
  return {std::move(plate), {2e5, 0.3, solver::PlaneState::stress}, {load_of(kind)}};
}

mesh::Crack crack(Point from, Point to, bool has_mouth) {
  mesh::Crack result;
  result.points = {std::move(from), std::move(to)};
  result.has_mouth = has_mouth;
  return result;
}

solver::Problem cracked(std::vector<mesh::Crack> cracks, Load::Kind kind,
                        std::vector<mesh::Hole> holes = {}) {
  mesh::Plate plate{400.0, 100.0, 1.0, std::move(holes)};
  for (mesh::Crack& each : cracks) {
    each.name = "crack " + std::to_string(plate.cracks.size() + 1);
    plate.cracks.push_back(std::move(each));
  }
  return on(std::move(plate), kind);
}

mesh::Hole hole(double diameter) {
  mesh::Hole result;
  result.name = "hole";
  result.length = result.width = diameter;
  return result;
}

std::vector<solver::Ask> everything(const solver::Problem& problem) {
  std::vector<solver::Ask> asks;
  for (std::size_t t = 0; t < mesh::tips(problem.plate.cracks).size(); ++t)
    asks.push_back({solver::Quantity::stress_intensity, t, 1e-3, ""});
  if (asks.empty())
    for (std::size_t r = 0; r < mesh::raiser_count(problem.plate); ++r)
      asks.push_back({solver::Quantity::largest_edge_stress, r, 1e-3, ""});
  return asks;
}

void settle(benchmark::State& state, const solver::Problem& problem) {
  openblas_set_num_threads(1);
  const std::vector<solver::Ask> asks = everything(problem);
  solver::Solution solution;
  for (auto _ : state) solution = solver::settle(problem, asks);
  if (solution.status != solver::Solution::Status::settled) state.SkipWithError(solution.reason.c_str());
  state.counters["degree"] = solution.degree;
  state.counters["unknowns"] = static_cast<double>(solution.unknowns);
}

/// Names and plates of the catalogue.
std::vector<std::pair<std::string, solver::Problem>> catalogue() {
  using Kind = Load::Kind;
  std::vector<std::pair<std::string, solver::Problem>> all;
  for (const validation::Independent& known : validation::independent_values())
    all.emplace_back(known.name, known.problem);
  const double deep = 20.0;
  all.emplace_back("V notch, r/t 0.005, bending",
                   on(validation::notched_bar(400, 100, {deep, 0.005 * deep, 1.0}, false), Kind::bending));
  all.emplace_back("U notches, r/t 0.005, tension",
                   on(validation::notched_bar(400, 100, {deep, 0.005 * deep}, true), Kind::tension));
  all.emplace_back("fillets, r/d 0.005, bending",
                   on(validation::stepped_bar(400, 100, 50, 0.25), Kind::bending));
  all.emplace_back("U notches, ligament 0.01 W, tension",
                   on(validation::notched_bar(400, 100, {49.5, 5.0}, true), Kind::tension));
  all.emplace_back("centre crack", cracked({crack({0, -25}, {0, 25}, false)}, Kind::tension));
  all.emplace_back("edge crack, tension", cracked({crack({0, -50}, {0, -20}, true)}, Kind::tension));
  all.emplace_back("edge crack, bending", cracked({crack({0, -50}, {0, -20}, true)}, Kind::bending));
  all.emplace_back("two edge cracks",
                   cracked({crack({0, -50}, {0, -25}, true), crack({0, 50}, {0, 25}, true)}, Kind::tension));
  all.emplace_back("inclined crack, 45 deg", cracked({crack({-18, -18}, {18, 18}, false)}, Kind::tension));
  all.emplace_back(
      "two cracks from a hole",
      cracked({crack({0, 10}, {0, 20}, true), crack({0, -10}, {0, -20}, true)}, Kind::tension, {hole(20.0)}));
  all.emplace_back("two collinear cracks",
                   cracked({crack({0, -30}, {0, -6}, false), crack({0, 6}, {0, 30}, false)}, Kind::tension));
  all.emplace_back("three-point bend, a/W 0.5", validation::bend_specimen_plate(0.5, 0.02));
  all.emplace_back("compact tension, a/W 0.5", validation::compact_specimen_plate(0.5, false));
  return all;
}

const bool is_registered = [] {
  for (auto& [name, problem] : catalogue())
    benchmark::RegisterBenchmark(("catalogue/" + name).c_str(), settle, problem)
        ->Unit(benchmark::kMillisecond);
  return true;
}();

}  // namespace
}  // namespace raiser::bench
