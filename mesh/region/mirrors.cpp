#include <cmath>
#include <numbers>
#include <optional>
#include <stdexcept>

#include "mesh/region/region.hpp"

namespace raiser::mesh {
namespace {

constexpr auto unmapped = static_cast<std::size_t>(-1);

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

/// Whether a curve is the same as another within a tolerance in mm.
bool same(const Curve& a, const Curve& b, double tolerance) {
  const auto near = [tolerance](const Point& p, const Point& q) {
    return (p - q).cwiseAbs().maxCoeff() <= tolerance;
  };
  return a.kind == b.kind && near(a.start(), b.start()) && near(a.finish(), b.finish()) &&
         near(a.at((a.begin + a.end) / 2), b.at((b.begin + b.end) / 2));
}

/// The curve of the chain that each one's image is; nothing when one has none.
/// The images of a chain follow each other the other way round.
std::optional<std::vector<std::size_t>> curve_images(const Loop& loop, Mirrors mirror, double tolerance) {
  const std::size_t n = loop.size();
  const bool turned = mirror.x != mirror.y;
  for (std::size_t first = 0; first < n; ++first) {
    std::vector<std::size_t> images;
    for (std::size_t i = 0; i < n; ++i) {
      const std::size_t k = turned ? (first + n - i) % n : (first + i) % n;
      if (!same(reflected(loop[i], mirror.x, mirror.y), loop[k], tolerance)) break;
      images.push_back(k);
    }
    if (images.size() == n) return images;
  }
  return std::nullopt;
}

/// Notes that `from` maps to `to`; false when it already maps to another.
bool put(std::vector<std::size_t>& map, std::size_t from, std::size_t to) {
  if (map[from] != unmapped && map[from] != to) return false;
  map[from] = to;
  return true;
}

bool map_outline(const Outline& outline, std::size_t holes, Mirrors mirror, double tolerance,
                 MirrorImage& image) {
  const auto curves = curve_images(outline.curves, mirror, tolerance);
  if (!curves) return false;
  image.edges.assign(outline.edges.size(), unmapped);
  image.raisers.resize(holes + outline.raisers.size(), unmapped);
  for (std::size_t i = 0; i < curves->size(); ++i) {
    const Owner& from = outline.curves[i].owner;
    const Owner& to = outline.curves[(*curves)[i]].owner;
    if (from.kind != to.kind) return false;
    const std::size_t shift = from.kind == Owner::Kind::raiser ? holes : 0;
    std::vector<std::size_t>& map = from.kind == Owner::Kind::raiser ? image.raisers : image.edges;
    if (!put(map, from.index + shift, to.index + shift)) return false;
  }
  return true;
}

}  // namespace

Owner MirrorImage::of(const Owner& owner) const {
  if (owner.kind == Owner::Kind::raiser) return {owner.kind, raisers.at(owner.index)};
  if (owner.kind == Owner::Kind::edge) return {owner.kind, edges.at(owner.index)};
  return owner;
}

std::optional<MirrorImage> mirror_image(const Plate& plate, Mirrors mirror) {
  MirrorImage image;
  for (std::size_t i = 0; i < plate.holes.size(); ++i) {
    const auto hole = find_image(plate, i, mirror);
    if (!hole) return std::nullopt;
    image.raisers.push_back(*hole);
  }
  const double tolerance = 1e-11 * std::max(plate.length, plate.width);
  if (!map_outline(outline_of(plate), plate.holes.size(), mirror, tolerance, image)) return std::nullopt;
  return image;
}

Mirrors mirrors(const Plate& plate) {
  return {mirror_image(plate, {.x = true, .y = false}).has_value(),
          mirror_image(plate, {.x = false, .y = true}).has_value()};
}

std::size_t mirror_image(const Plate& plate, std::size_t raiser, Mirrors mirror) {
  if (const auto image = mirror_image(plate, mirror)) return image->raisers.at(raiser);
  throw std::invalid_argument("mirror_image: the plate does not have that mirror line");
}

}  // namespace raiser::mesh
