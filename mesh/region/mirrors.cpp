#include <cmath>
#include <numbers>
#include <optional>
#include <stdexcept>

#include "mesh/region/region.hpp"

namespace raiser::mesh {
namespace {

Point reflect(Point p, Mirrors mirror) {
  if (mirror.x) p.x() = -p.x();
  if (mirror.y) p.y() = -p.y();
  return p;
}

/// Whether two holes of one centre cover the same material.
bool same_shape(const Hole& a, const Hole& b, double angle_of_a, double tolerance) {
  if (a.shape != b.shape || std::abs(a.length - b.length) > tolerance ||
      std::abs(a.width - b.width) > tolerance || std::abs(a.corner_radius - b.corner_radius) > tolerance)
    return false;
  const bool square = std::abs(a.length - b.width) <= tolerance;
  const bool round = square && a.shape != HoleShape::rounded_rectangle;
  if (round) return true;
  const double period = square ? std::numbers::pi / 2 : std::numbers::pi;
  const double turn = std::remainder(angle_of_a - b.angle, period);
  return std::abs(turn) <= 1e-12;
}

std::optional<std::size_t> find_image(const Plate& plate, std::size_t hole, Mirrors mirror) {
  const double tolerance = 1e-12 * std::max(plate.length, plate.width);
  const Hole& original = plate.holes[hole];
  const Point centre = reflect(original.centre, mirror);
  const double angle = mirror.x != mirror.y ? -original.angle : original.angle;
  for (std::size_t i = 0; i < plate.holes.size(); ++i)
    if ((plate.holes[i].centre - centre).cwiseAbs().maxCoeff() <= tolerance &&
        same_shape(original, plate.holes[i], angle, tolerance))
      return i;
  return std::nullopt;
}

bool has(const Plate& plate, Mirrors mirror) {
  for (std::size_t i = 0; i < plate.holes.size(); ++i)
    if (!find_image(plate, i, mirror)) return false;
  return true;
}

}  // namespace

Mirrors mirrors(const Plate& plate) {
  return {has(plate, {.x = true, .y = false}), has(plate, {.x = false, .y = true})};
}

std::size_t mirror_image(const Plate& plate, std::size_t hole, Mirrors mirror) {
  if (const auto image = find_image(plate, hole, mirror)) return *image;
  throw std::invalid_argument("mirror_image: the plate does not have that mirror line");
}

}  // namespace raiser::mesh
