#include "validation/random_pins.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>
#include <string>

#include "mesh/plate/distance.hpp"
#include "validation/dice.hpp"

namespace raiser::validation {

namespace {

using mesh::Hole;
using mesh::Plate;
using mesh::Point;
using solver::Load;

constexpr double least_ligament = 0.25;  // diameters

bool fits(const Plate& plate, const Hole& hole) {
  const double room = least_ligament * hole.length;
  return mesh::edge_distance(plate, hole) >= room &&
         std::all_of(plate.holes.begin(), plate.holes.end(),
                     [&](const Hole& other) { return mesh::gap(hole, other) >= room; });
}

void add_holes(Dice& dice, Plate& plate) {
  const std::size_t count = 1 + dice.below(3);
  double diameter = std::min(plate.length, plate.width) * dice.log_uniform(0.15, 0.5) /
                    std::sqrt(static_cast<double>(count));
  const bool is_in_line = dice.chance(0.4);
  while (plate.holes.size() < count) {
    Hole hole;
    hole.name = "hole " + std::to_string(plate.holes.size() + 1);
    hole.length = hole.width = diameter;
    const double x = dice.uniform(-0.5, 0.5), y = dice.uniform(-0.5, 0.5);
    hole.centre = {x * plate.length, is_in_line ? 0.0 : y * plate.width};
    if (fits(plate, hole))
      plate.holes.push_back(hole);
    else
      diameter *= 0.97;
  }
}

std::optional<double> random_clearance(Dice& dice, double diameter, double strain) {
  const std::size_t kind = dice.below(8);
  const double size = dice.log_uniform(1e-4, 1e-2), share = dice.uniform(0.1, 1.5);
  if (kind < 4) return std::nullopt;
  if (kind == 4) return 0.0;
  if (kind == 5) return -share * strain * diameter;
  return size * diameter;
}

/// One or two pins, all by the same model.
std::vector<Load> random_pins(Dice& dice, const solver::Problem& problem) {
  const Plate& plate = problem.plate;
  const double strain = dice.log_uniform(1e-4, 2e-3);
  const bool is_along = dice.chance(0.5);
  const double turn = dice.uniform(-std::numbers::pi, std::numbers::pi);
  const auto clearance = random_clearance(dice, plate.holes.front().length, strain);
  const std::size_t count = std::min<std::size_t>(plate.holes.size(), 1 + dice.below(2));
  std::vector<Load> pins;
  for (std::size_t h = 0; h < count; ++h) {
    Load pin;
    pin.kind = Load::Kind::pin;
    pin.name = "pin " + std::to_string(h + 1);
    pin.hole = h;
    pin.force = strain * problem.material.youngs_modulus * plate.holes[h].length * plate.thickness *
                (h == 0 ? 1.0 : dice.uniform(0.3, 1.0));
    pin.direction = is_along ? 0.0 : turn;
    pin.clearance = clearance;
    pins.push_back(pin);
  }
  return pins;
}

/// Holds the plate at its left edge, or loads its edges, so that the pins balance.
void balance(Dice& dice, solver::Problem& problem) {
  if (dice.chance(0.5)) {
    problem.supports = {{"left", mesh::rectangle::left, 0.0, 0.0}};
    return;
  }
  solver::Resultant sum;
  for (const Load& pin : problem.loads) {
    const solver::Resultant own = solver::resultant(problem.plate, pin);
    sum.force += own.force;
    sum.moment += own.moment;
  }
  for (Load& load : solver::balancing(problem.plate, sum)) problem.loads.push_back(std::move(load));
}

}  // namespace

solver::Problem random_pinned_plate(std::uint64_t seed) {
  Dice dice(seed ^ 0x70696e73u);  // other numbers than random_plate's
  solver::Problem problem;
  Plate& plate = problem.plate;
  plate.width = dice.log_uniform(20.0, 300.0);
  plate.length = plate.width * dice.log_uniform(1.0, 5.0);
  plate.thickness = dice.log_uniform(0.5, 20.0);
  add_holes(dice, plate);
  problem.material = {dice.log_uniform(3e3, 4e5), dice.uniform(0.0, 0.45),
                      dice.chance(0.8) ? solver::PlaneState::stress : solver::PlaneState::strain};
  problem.loads = random_pins(dice, problem);
  balance(dice, problem);
  if (dice.chance(0.3)) {
    Load bypass;
    bypass.kind = Load::Kind::tension;
    bypass.name = "bypass";
    bypass.stress = problem.material.youngs_modulus * dice.log_uniform(1e-4, 1e-3);
    if (problem.supports.empty()) problem.loads.push_back(bypass);
  }
  return problem;
}

}  // namespace raiser::validation
