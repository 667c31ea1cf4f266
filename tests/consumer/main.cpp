// One hole in a plate, half as wide as the plate, solved through the installed library.
#include <cmath>
#include <iostream>

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

}  // namespace

int main() {
  solver::Ask ask;
  ask.tolerance = 1e-4;
  const solver::Solution solution = solver::settle(strip_with_a_hole(), {ask});
  if (solution.status != solver::Solution::Status::settled) {
    std::cerr << "not settled: " << solution.reason << '\n';
    return 1;
  }
  const auto& kt = solution.combined.raisers.at(0).gross.kt;
  if (!kt) {
    std::cerr << "no Kt on the gross section\n";
    return 1;
  }
  std::cout << "Kt gross = " << solver::digits(*kt) << " +- " << solver::bound_digits(*kt) << '\n';
  const double error = std::abs(kt->value - kt_by_other_methods);
  if (error > kt->bound || error > 1e-4 * kt_by_other_methods) {
    std::cerr << "Kt is off by " << error << " from " << kt_by_other_methods << '\n';
    return 1;
  }
  return 0;
}
