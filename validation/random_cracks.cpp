#include "validation/random_cracks.hpp"

#include <array>
#include <cmath>
#include <numbers>
#include <optional>
#include <string>

#include "mesh/region/region.hpp"
#include "validation/dice.hpp"
#include "validation/random_parts.hpp"
#include "validation/random_plate.hpp"

namespace raiser::validation {

namespace {

using mesh::Crack;
using mesh::Plate;
using mesh::Point;
using solver::Load;

Point turned(const Point& p, double angle) {
  return {std::cos(angle) * p.x() - std::sin(angle) * p.y(),
          std::sin(angle) * p.x() + std::cos(angle) * p.y()};
}

/// A chain of the given length: straight, or with one or two kinks.
std::vector<Point> chain(Dice& dice, const Point& from, Point direction, double length) {
  std::vector<Point> points = {from};
  const std::size_t segments = dice.chance(0.3) ? 2 + dice.below(2) : 1;
  for (std::size_t i = 0; i < segments; ++i) {
    const double share = dice.uniform(0.5, 1.5) / static_cast<double>(segments);
    points.push_back(points.back() + (segments == 1 ? 1.0 : share) * length * direction);
    direction = turned(direction, dice.uniform(-1.0, 1.0));
  }
  return points;
}

Crack inner_crack(Dice& dice, const Plate& plate, double length) {
  Crack crack;
  const bool is_central = dice.chance(0.2);
  const double angle = is_central ? 0.5 * std::numbers::pi * static_cast<double>(dice.below(2))
                                  : dice.uniform(0.0, std::numbers::pi);
  const double x = dice.uniform(-0.45, 0.45), y = dice.uniform(-0.45, 0.45);
  const Point along(std::cos(angle), std::sin(angle));
  if (is_central)
    crack.points = {-length / 2 * along, length / 2 * along};
  else
    crack.points = chain(dice, {x * plate.length, y * plate.width}, along, length);
  return crack;
}

/// Out of a point of a curve with the material on its left.
Crack from_curve(Dice& dice, const mesh::Curve& curve, double share, double length) {
  const double t = curve.begin + share * (curve.end - curve.begin);
  const Point along = (curve.end > curve.begin ? 1.0 : -1.0) * curve.derivative(t).normalized();
  const Point normal(-along.y(), along.x());
  Crack crack;
  crack.has_mouth = true;
  crack.points =
      chain(dice, curve.at(t), turned(normal, dice.chance(0.4) ? 0.0 : dice.uniform(-0.8, 0.8)), length);
  return crack;
}

Crack random_crack(Dice& dice, const Plate& plate) {
  const double size = dice.log_uniform(0.01, 0.5) * std::min(plate.length, plate.width);
  const std::size_t kind = dice.below(plate.holes.empty() ? 2 : 4);
  if (kind == 0) return inner_crack(dice, plate, size);
  Plate bare = plate;
  bare.cracks.clear();
  const mesh::Region region = mesh::trace(bare);
  const std::size_t loop = kind == 1 ? 0 : 1 + dice.below(plate.holes.size());
  const mesh::Loop& curves = region.loops[loop];
  const mesh::Curve& curve = curves[dice.below(curves.size())];
  const double share = dice.chance(0.3) ? 0.5 : dice.uniform(0.05, 0.95);
  if (kind == 1) return from_curve(dice, curve, share, size);
  return from_curve(dice, curve, share, dice.log_uniform(0.03, 2.0) * mean_diameter(plate.holes[loop - 1]));
}

void add_cracks(Dice& dice, Plate& plate) {
  const std::size_t count = 1 + dice.below(4);
  while (plate.cracks.size() < count) {
    Crack crack = random_crack(dice, plate);
    crack.name = "crack " + std::to_string(plate.cracks.size() + 1);
    plate.cracks.push_back(std::move(crack));
    if (!mesh::faults(plate).empty()) plate.cracks.pop_back();
  }
}

Plate outline_and_holes(Dice& dice) {
  Plate plate;
  plate.width = dice.log_uniform(20.0, 500.0);
  plate.length = plate.width * dice.log_uniform(0.7, 4.0);
  plate.thickness = dice.log_uniform(0.5, 20.0);
  const std::size_t holes = dice.chance(0.45) ? 0 : 1 + dice.below(3);
  while (plate.holes.size() < holes) {
    const double diameter = std::min(plate.length, plate.width) * dice.log_uniform(0.05, 0.4);
    if (auto hole = random_hole_in(dice, plate, diameter, "hole " + std::to_string(plate.holes.size() + 1)))
      plate.holes.push_back(std::move(*hole));
  }
  return plate;
}

/// Pressures in holes become pressures on faces: all of them where there is no
/// hole, half of them elsewhere.
std::vector<Load> loads_on(Dice& dice, const Plate& plate) {
  std::vector<Load> loads = random_loads(dice, plate);
  for (Load& load : loads)
    if (load.kind == Load::Kind::pressure && (plate.holes.empty() || dice.chance(0.5))) {
      load.kind = Load::Kind::face_pressure;
      load.name = "face pressure";
      load.hole = 0;
      load.crack = dice.below(plate.cracks.size());
    }
  return loads;
}

}  // namespace

solver::Problem random_cracked_plate(std::uint64_t seed) {
  Dice dice(seed ^ 0x637261636b73u);  // other numbers than random_plate's
  solver::Problem problem;
  problem.plate = outline_and_holes(dice);
  add_cracks(dice, problem.plate);
  problem.material = {dice.log_uniform(3e3, 4e5), dice.uniform(0.0, 0.45),
                      dice.chance(0.8) ? solver::PlaneState::stress : solver::PlaneState::strain};
  problem.loads = loads_on(dice, problem.plate);
  return problem;
}

}  // namespace raiser::validation
