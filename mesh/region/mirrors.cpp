#include <cmath>
#include <numbers>
#include <optional>
#include <stdexcept>

#include "mesh/region/region.hpp"

namespace raiser::mesh {
namespace {

constexpr auto unmapped = static_cast<std::size_t>(-1);

double coincidence(const Plate& plate) { return 1e-12 * std::max(plate.length, plate.width); }

Point reflect(Point p, Mirrors mirror) {
  if (mirror.x) p.x() = -p.x();
  if (mirror.y) p.y() = -p.y();
  return p;
}

std::optional<std::vector<std::size_t>> curve_images(const Loop& loop, const Loop& among, Mirrors mirror,
                                                     double tolerance);

/// Whether hole a in the mirror covers the same material as hole b where the centres agree.
bool same_shape(const Hole& a, const Hole& b, Mirrors mirror, double tolerance) {
  if (a.shape == HoleShape::drawn && b.shape == a.shape)
    return curve_images(a.edge, b.edge, mirror, tolerance).has_value();
  const double angle_of_a = mirror.x != mirror.y ? -a.angle : a.angle;
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
  const double tolerance = coincidence(plate);
  const Hole& original = plate.holes[hole];
  const Point centre = reflect(original.centre, mirror);
  for (std::size_t i = 0; i < plate.holes.size(); ++i)
    if ((plate.holes[i].centre - centre).cwiseAbs().maxCoeff() <= tolerance &&
        same_shape(original, plate.holes[i], mirror, tolerance))
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

/// The curve of another chain that each one's image is; nothing when one has none.
/// The images of a chain follow each other the other way round.
std::optional<std::vector<std::size_t>> curve_images(const Loop& loop, const Loop& among, Mirrors mirror,
                                                     double tolerance) {
  const std::size_t n = loop.size();
  if (among.size() != n) return std::nullopt;
  const bool turned = mirror.x != mirror.y;
  for (std::size_t first = 0; first < n; ++first) {
    std::vector<std::size_t> images;
    for (std::size_t i = 0; i < n; ++i) {
      const std::size_t k = turned ? (first + n - i) % n : (first + i) % n;
      if (!same(reflected(loop[i], mirror.x, mirror.y), among[k], tolerance)) break;
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
  const auto curves = curve_images(outline.curves, outline.curves, mirror, tolerance);
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

/// Whether the chains are the same, both run from their first point or, for
/// cracks without a mouth, one of them backwards.
std::optional<bool> is_image(const Plate& plate, const Crack& a, const Crack& b, Mirrors mirror) {
  if (a.points.size() != b.points.size() || a.has_mouth != b.has_mouth) return std::nullopt;
  const std::size_t n = a.points.size();
  bool same = true;
  bool reversed = !a.has_mouth;
  for (std::size_t k = 0; k < n; ++k) {
    const Point image = reflect(a.points[k], mirror);
    const auto fits = [&](const Point& p) { return (p - image).norm() <= coincidence(plate); };
    same = same && fits(b.points[k]);
    reversed = reversed && fits(b.points[n - 1 - k]);
  }
  if (!same && !reversed) return std::nullopt;
  return !same;
}

struct CrackImage {
  std::size_t crack;
  bool is_reversed;
};
std::optional<CrackImage> find_crack_image(const Plate& plate, std::size_t crack, Mirrors mirror) {
  for (std::size_t i = 0; i < plate.cracks.size(); ++i)
    if (const auto reversed = is_image(plate, plate.cracks[crack], plate.cracks[i], mirror))
      return CrackImage{i, *reversed};
  return std::nullopt;
}

}  // namespace

Owner MirrorImage::of(const Owner& owner) const {
  if (owner.kind == Owner::Kind::raiser) return {owner.kind, raisers.at(owner.index)};
  if (owner.kind == Owner::Kind::edge) return {owner.kind, edges.at(owner.index)};
  if (owner.kind == Owner::Kind::crack) return {owner.kind, cracks.at(owner.index)};
  return owner;
}

std::optional<MirrorImage> mirror_image(const Plate& plate, Mirrors mirror) {
  MirrorImage image;
  for (std::size_t i = 0; i < plate.holes.size(); ++i) {
    const auto hole = find_image(plate, i, mirror);
    if (!hole) return std::nullopt;
    image.raisers.push_back(*hole);
  }
  for (std::size_t i = 0; i < plate.cracks.size(); ++i) {
    const auto crack = find_crack_image(plate, i, mirror);
    if (!crack) return std::nullopt;
    image.cracks.push_back(crack->crack);
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

std::size_t mirror_image_of_crack(const Plate& plate, std::size_t crack, Mirrors mirror) {
  if (const auto image = find_crack_image(plate, crack, mirror)) return image->crack;
  throw std::invalid_argument("mirror_image_of_crack: the plate does not have that mirror line");
}

std::size_t mirror_image_of_tip(const Plate& plate, std::size_t tip, Mirrors mirror) {
  const std::vector<CrackTip> all = tips(plate.cracks);
  const auto image = find_crack_image(plate, all.at(tip).crack, mirror);
  if (!image) throw std::invalid_argument("mirror_image_of_tip: the plate does not have that mirror line");
  for (std::size_t t = 0; t < all.size(); ++t)
    if (all[t].crack == image->crack && all[t].at_end == (all[tip].at_end != image->is_reversed)) return t;
  throw std::logic_error("mirror_image_of_tip: the image crack lacks that tip");
}

}  // namespace raiser::mesh
