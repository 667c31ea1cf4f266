#include "validation/random_drawn.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>
#include <string>
#include <utility>
#include <vector>

#include "mesh/plate/chain.hpp"
#include "mesh/plate/drawn.hpp"
#include "validation/random_parts.hpp"

namespace raiser::validation {

namespace {

using mesh::Hole;
using mesh::OutlinePoint;
using mesh::Plate;
using mesh::Point;

std::vector<OutlinePoint> random_star(Dice& dice, double diameter) {
  const std::size_t count = 3 + dice.below(6);
  std::vector<OutlinePoint> points;
  for (std::size_t i = 0; i < count; ++i) {
    OutlinePoint point;
    const double angle = 2 * std::numbers::pi * (static_cast<double>(i) + dice.uniform(-0.3, 0.3)) /
                         static_cast<double>(count);
    const double reach = 0.5 * diameter * dice.uniform(0.5, 1.2);
    point.at = reach * Point(std::cos(angle), std::sin(angle));
    point.corner_radius = dice.log_uniform(0.01, 0.15) * diameter;
    points.push_back(point);
  }
  return points;
}

/// The same edge with the material on the other side of it.
mesh::Loop turned_over(mesh::Loop edge) {
  std::reverse(edge.begin(), edge.end());
  for (mesh::Curve& curve : edge) std::swap(curve.begin, curve.end);
  return edge;
}

Hole random_drawn_hole(Dice& dice, double diameter, std::string name) {
  for (int attempt = 0; attempt < 1000; ++attempt) {
    const mesh::ChainResult chain = mesh::chain_outline(random_star(dice, diameter));
    if (!chain.outline) continue;
    const mesh::Loop edge = turned_over(chain.outline->curves);
    if (!mesh::sharp_corners(edge).empty()) continue;
    Hole hole = mesh::drawn_hole(edge);
    hole.name = std::move(name);
    return hole;
  }
  throw std::runtime_error("random_drawn_plate: no legal edge found");
}

Plate random_holes(Dice& dice) {
  Plate plate = random_bare_plate(dice, 0.7);
  const std::size_t count = 1 + dice.below(4);
  const double smaller = std::min(plate.length, plate.width);
  while (plate.holes.size() < count) {
    const double diameter = smaller * dice.log_uniform(0.1, 0.6) / std::sqrt(static_cast<double>(count));
    const bool is_drawn = plate.holes.empty() || dice.chance(0.5);
    const auto hole = random_hole_in(dice, plate, diameter, "hole " + std::to_string(plate.holes.size() + 1),
                                     is_drawn ? random_drawn_hole : random_hole);
    if (!hole) continue;
    plate.holes.push_back(*hole);
    if (!mesh::faults(plate).empty()) plate.holes.pop_back();
  }
  return plate;
}

}  // namespace

solver::Problem random_drawn_plate(std::uint64_t seed) {
  Dice dice(seed ^ 0x647261776eu);  // other numbers than random_plate's
  solver::Problem problem;
  problem.plate = random_holes(dice);
  problem.material = random_material(dice);
  problem.loads = random_loads(dice, problem.plate);
  return problem;
}

}  // namespace raiser::validation
