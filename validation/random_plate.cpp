#include "validation/random_plate.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <optional>
#include <string>

#include "mesh/plate/distance.hpp"
#include "validation/random_parts.hpp"

namespace raiser::validation {

namespace {

using mesh::Hole;
using mesh::HoleShape;
using mesh::Plate;
using mesh::Point;
using solver::Load;

constexpr double least_ligament = 0.02, largest_ligament = 10.0;  // diameters

}  // namespace

Plate random_bare_plate(Dice& dice, double least_ratio) {
  Plate plate;
  plate.width = dice.log_uniform(20.0, 500.0);
  plate.length = plate.width * dice.log_uniform(least_ratio, 5.0);
  plate.thickness = dice.log_uniform(0.5, 20.0);
  return plate;
}

Hole random_hole(Dice& dice, double diameter, std::string name) {
  Hole hole;
  hole.name = std::move(name);
  hole.shape = static_cast<HoleShape>(dice.below(4));
  double ratio = 1.0;
  if (hole.shape == HoleShape::ellipse) ratio = dice.log_uniform(0.1, 10.0);
  if (hole.shape == HoleShape::slot) ratio = dice.log_uniform(1.05, 8.0);
  if (hole.shape == HoleShape::rounded_rectangle) ratio = dice.log_uniform(0.25, 4.0);
  hole.length = diameter * std::sqrt(ratio);
  hole.width = diameter / std::sqrt(ratio);
  if (hole.shape == HoleShape::rounded_rectangle)
    hole.corner_radius = dice.log_uniform(0.01, 0.5) * std::min(hole.length, hole.width);
  if (hole.shape != HoleShape::circle && dice.chance(0.7))
    hole.angle = dice.uniform(-std::numbers::pi / 2, std::numbers::pi / 2);
  return hole;
}

namespace {

Point anywhere(Dice& dice, const Plate& plate, const Hole& hole) {
  const double room_x = plate.length / 2 - mesh::half_extent(hole, Point::UnitX());
  const double room_y = plate.width / 2 - mesh::half_extent(hole, Point::UnitY());
  const double x = dice.uniform(-1, 1), y = dice.uniform(-1, 1);
  return {x * room_x, y * room_y};
}

Point beside_edge(Dice& dice, const Plate& plate, const Hole& hole, double ligament) {
  Point at = anywhere(dice, plate, hole);
  const double sign = dice.chance(0.5) ? 1.0 : -1.0;
  if (dice.chance(0.5))
    at.x() = sign * (plate.length / 2 - ligament - mesh::half_extent(hole, Point::UnitX()));
  else
    at.y() = sign * (plate.width / 2 - ligament - mesh::half_extent(hole, Point::UnitY()));
  return at;
}

/// Moves the hole out from `other` in a random direction until the ligament
/// between them is right: bisection, since it grows with the distance.
Point beside_hole(Dice& dice, Hole hole, const Hole& other, double ligament) {
  const double angle = dice.uniform(-std::numbers::pi, std::numbers::pi);
  const Point direction(std::cos(angle), std::sin(angle));
  double low = 0.0, high = hole.length + hole.width + other.length + other.width + ligament;
  for (int i = 0; i < 50; ++i) {
    const double middle = 0.5 * (low + high);
    hole.centre = other.centre + middle * direction;
    (mesh::gap(hole, other) < ligament ? low : high) = middle;
  }
  return other.centre + high * direction;
}

bool fits(const Plate& plate, const Hole& hole) {
  constexpr double margin = 1 - 1e-9;  // a ligament chosen at the limit is one
  if (mesh::edge_distance(plate, hole) < margin * least_ligament * mean_diameter(hole)) return false;
  return std::all_of(plate.holes.begin(), plate.holes.end(), [&](const Hole& other) {
    const double smaller = std::min(mean_diameter(hole), mean_diameter(other));
    return mesh::gap(hole, other) >= margin * least_ligament * smaller;
  });
}

}  // namespace

std::optional<Hole> random_hole_in(Dice& dice, const Plate& plate, double diameter, const std::string& name,
                                   HoleMaker make) {
  for (int attempt = 0; attempt < 60; ++attempt) {
    Hole hole = make(dice, diameter, name);
    const double ligament = dice.log_uniform(least_ligament, largest_ligament);
    const bool beside = !plate.holes.empty() && dice.chance(0.6);
    if (beside) {
      const Hole& other = plate.holes[dice.below(plate.holes.size())];
      const double unit = std::min(mean_diameter(hole), mean_diameter(other));
      hole.centre = beside_hole(dice, hole, other, ligament * unit);
    } else if (dice.chance(0.5)) {
      hole.centre = beside_edge(dice, plate, hole, ligament * diameter);
    } else {
      hole.centre = anywhere(dice, plate, hole);
    }
    if (fits(plate, hole)) return hole;
    diameter *= 0.96;
  }
  return std::nullopt;
}

namespace {

Plate random_outline_and_holes(Dice& dice) {
  Plate plate = random_bare_plate(dice, 0.7);
  const std::size_t count = 1 + dice.below(12);
  const double smaller = std::min(plate.length, plate.width);
  while (plate.holes.size() < count) {
    const double diameter = smaller * dice.log_uniform(0.04, 0.6) / std::sqrt(static_cast<double>(count));
    if (auto hole = random_hole_in(dice, plate, diameter, "hole " + std::to_string(plate.holes.size() + 1)))
      plate.holes.push_back(std::move(*hole));
  }
  return plate;
}

double random_stress(Dice& dice) {
  const double size = dice.log_uniform(10.0, 300.0);
  return dice.chance(0.8) ? size : -size;
}

Load random_load(Dice& dice, Load::Kind kind, std::size_t holes) {
  Load load;
  load.kind = kind;
  load.name = solver::word(kind);
  load.stress = random_stress(dice);
  if (kind == Load::Kind::pressure) load.hole = dice.below(std::max<std::size_t>(1, holes));
  return load;
}

Load edge_load(const char* name, std::size_t edge, double stress, double along) {
  Load load;
  load.kind = Load::Kind::edge;
  load.name = name;
  load.edge = edge;
  load.stress = stress;
  load.along = along;
  return load;
}

/// Tractions on all four edges, those on the left and at the bottom such that
/// forces and moment vanish together.
std::vector<Load> balanced_edges(Dice& dice, const Plate& plate) {
  const double ratio = plate.length / plate.width;
  const double right = random_stress(dice), top = random_stress(dice);
  const double right_along = random_stress(dice), top_along = random_stress(dice);
  // Zero moment: the four shear tractions add up to nothing.
  const double left_along = right_along * dice.uniform(0.5, 1.5);
  const double bottom_along = -(right_along + left_along + top_along);
  const double left = right + (bottom_along - top_along) * ratio;
  const double bottom = top + (right_along - left_along) / ratio;
  return {edge_load("right", mesh::rectangle::right, right, right_along),
          edge_load("top", mesh::rectangle::top, top, top_along),
          edge_load("left", mesh::rectangle::left, left, left_along),
          edge_load("bottom", mesh::rectangle::bottom, bottom, bottom_along)};
}

}  // namespace

std::vector<Load> random_loads(Dice& dice, const Plate& plate) {
  std::array<Load::Kind, 5> kinds{Load::Kind::tension, Load::Kind::transverse, Load::Kind::shear,
                                  Load::Kind::bending, Load::Kind::pressure};
  const std::size_t choice = dice.below(8);
  if (choice == 7) return balanced_edges(dice, plate);
  if (choice < kinds.size()) return {random_load(dice, kinds[choice], plate.holes.size())};
  for (std::size_t i = kinds.size() - 1; i > 0; --i) std::swap(kinds[i], kinds[dice.below(i + 1)]);
  std::vector<Load> loads;
  const std::size_t count = 2 + dice.below(3);
  for (std::size_t i = 0; i < count; ++i) loads.push_back(random_load(dice, kinds[i], plate.holes.size()));
  return loads;
}

double mean_diameter(const mesh::Hole& hole) { return std::sqrt(hole.length * hole.width); }

solver::Problem random_plate(std::uint64_t seed) {
  Dice dice(seed);
  solver::Problem problem;
  problem.plate = random_outline_and_holes(dice);
  problem.material = {dice.log_uniform(3e3, 4e5), dice.uniform(0.0, 0.45),
                      dice.chance(0.8) ? solver::PlaneState::stress : solver::PlaneState::strain};
  problem.loads = random_loads(dice, problem.plate);
  return problem;
}

}  // namespace raiser::validation
