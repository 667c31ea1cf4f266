// One hole in a plate, half as wide as the plate, solved through the installed library.
#include <cmath>
#include <filesystem>
#include <iostream>
#include <string>

#include "io/case/case.hpp"
#include "io/picture/from_result.hpp"
#include "solver/solution.hpp"

namespace {

using namespace raiser;

// Kt on the gross section of this plate, uniform tension at both ends: from a
// boundary integral equation and, as a second route, complex potentials with
// boundary collocation; the two agree to 11 digits. No published source.
constexpr double kt_by_other_methods = 4.3476041403;

solver::Problem strip_with_a_hole() {
  mesh::Plate plate;
  plate.length = 400;
  plate.width = 100;
  plate.thickness = 5;
  mesh::Hole hole;
  hole.name = "middle";
  hole.length = hole.width = 50;
  plate.holes.push_back(hole);

  solver::Load pull;
  pull.name = "pull";
  pull.kind = solver::Load::Kind::tension;
  pull.stress = 80;
  return {plate, {200000, 0.3, solver::PlaneState::stress}, {pull}};
}

bool agrees(const solver::Solution& solution) {
  if (solution.status != solver::Solution::Status::settled) {
    std::cerr << "not settled: " << solution.reason << '\n';
    return false;
  }
  const auto& kt = solution.combined.raisers.at(0).gross.kt;
  if (!kt) {
    std::cerr << "no Kt on the gross section\n";
    return false;
  }
  std::cout << "Kt gross = " << solver::digits(*kt) << " +- " << solver::bound_digits(*kt) << '\n';
  const double error = std::abs(kt->value - kt_by_other_methods);
  if (error > kt->bound || error > 1e-3 * kt_by_other_methods) {
    std::cerr << "Kt is off by " << error << " from " << kt_by_other_methods << '\n';
    return false;
  }
  return true;
}

// Read through the installed library as well; a test of linking all of it.
bool reads_solves_and_draws(const std::string& picture) {
  const io::CaseReading reading = io::read_case_text(R"(
raiser = 1
plate = { length = "400 mm", width = "100 mm", thickness = "5 mm" }
material = { youngs_modulus = "200 GPa", poissons_ratio = 0.3 }
hole = [{ name = "middle", shape = "circle", diameter = "50 mm" }]
load = [{ kind = "tension", stress = "80 MPa" }]
)",
                                                     "strip.toml");
  for (const io::Diagnostic& fault : reading.faults) std::cerr << io::text(fault) << '\n';
  if (!reading.value) return false;
  io::Result result{*reading.value, solver::settle(reading.value->problem, reading.value->asks), {}, {}};
  io::draw_png(io::picture_of(result), picture);
  return std::filesystem::file_size(picture) > 0 && agrees(result.solution);
}

}  // namespace

int main() {
  solver::Ask ask;
  ask.tolerance = 1e-4;
  const bool solved = agrees(solver::settle(strip_with_a_hole(), {ask}));
  return solved && reads_solves_and_draws("strip.png") ? 0 : 1;
}
