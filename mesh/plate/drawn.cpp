#include "mesh/plate/drawn.hpp"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>
#include <optional>

#include "mesh/plate/section.hpp"
#include "mesh/region/vertex.hpp"

namespace raiser::mesh {

namespace {

constexpr double pi = std::numbers::pi;
constexpr double most_fillet_turn = 2.1;  // rad, a little more than 120 deg
constexpr double rounding = 1e-9;         // of the lengths involved: places that are one

double cross(const Point& a, const Point& b) { return a.x() * b.y() - a.y() * b.x(); }

/// Whether `after` goes on along the line that `before` lies on.
bool is_one_line(const Curve& before, const Curve& after) {
  if (before.kind != Curve::Kind::line || after.kind != Curve::Kind::line) return false;
  const Point along = direction(before, before.end);
  const Point way = after.finish() - before.start();
  return std::abs(cross(along, direction(after, after.begin))) < rounding &&
         along.dot(direction(after, after.begin)) > 0 &&
         std::abs(cross(along, way)) < rounding * way.norm() &&
         along.dot(after.start() - before.finish()) > 0;
}

/// How many flanks, 0 or 1 on each side, lie between curve k and the straight
/// edge that it is cut into; nothing where there is no such edge.
std::optional<std::size_t> flanks(const Loop& loop, std::size_t k) {
  const std::size_t n = loop.size();
  const auto at = [&](std::size_t steps, bool forward) -> const Curve& {
    return loop[(k + (forward ? steps : n - steps)) % n];
  };
  if (n >= 4 && is_one_line(at(1, false), at(1, true))) return 0;
  const bool has_flanks =
      n >= 6 && at(1, false).kind == Curve::Kind::line && at(1, true).kind == Curve::Kind::line;
  if (has_flanks && is_one_line(at(2, false), at(2, true))) return 1;
  return std::nullopt;
}

bool is_smooth(const Curve& before, const Curve& after) {
  return std::abs(angle_between(before, after) - pi) < least_corner;
}

/// The point of an arc that is farthest along `inward`.
Point deepest(const Curve& curve, const Point& inward) {
  // d/dt (inward . x) = 0 on an arc
  const double t0 = std::atan2(inward.dot(curve.v), inward.dot(curve.u));
  const double low = std::min(curve.begin, curve.end);
  const double high = std::max(curve.begin, curve.end);
  const double t = t0 + 2 * pi * std::round(((low + high) / 2 - t0) / (2 * pi));
  return curve.at(std::clamp(t, low, high));
}

void place_sections(Outline& outline, double length, double width) {
  Plate plate;
  plate.length = length;
  plate.width = width;
  plate.outline = outline;
  const auto size = [&](const Point& x) {
    return shape_of(gross_along(plate, Direction::across, x.x())).length;
  };
  for (const Curve& curve : outline.curves) {
    if (curve.owner.kind != Owner::Kind::raiser) continue;
    Raiser& raiser = outline.raisers[curve.owner.index];
    if (raiser.kind == Raiser::Kind::notch) {
      const Point chord = curve.finish() - curve.start();
      raiser.root = raiser.mouth = deepest(curve, Point(-chord.y(), chord.x()).normalized());
      continue;
    }
    raiser.root = curve.start();
    raiser.mouth = curve.finish();
    if (size(raiser.root) > size(raiser.mouth)) std::swap(raiser.root, raiser.mouth);
  }
}

void drop_singular(Outline& outline) {
  std::vector<bool> singular(outline.raisers.size(), false);
  const std::size_t n = outline.curves.size();
  for (std::size_t i = 0; i < n; ++i) {
    if (angle_between(outline.curves[i], outline.curves[(i + 1) % n]) < pi + least_corner) continue;
    for (const std::size_t k : {i, (i + 1) % n})
      if (const Owner& owner = outline.curves[k].owner; owner.kind == Owner::Kind::raiser)
        singular[owner.index] = true;
  }
  std::vector<std::size_t> moved(outline.raisers.size());
  std::vector<Raiser> kept;
  for (std::size_t i = 0; i < singular.size(); ++i) {
    moved[i] = kept.size();
    if (!singular[i]) kept.push_back(outline.raisers[i]);
  }
  for (Curve& curve : outline.curves) {
    if (curve.owner.kind != Owner::Kind::raiser) continue;
    if (!singular[curve.owner.index]) {
      curve.owner.index = moved[curve.owner.index];
      continue;
    }
    outline.edges.push_back("arc " + outline.raisers[curve.owner.index].name);
    curve.owner = {Owner::Kind::edge, outline.edges.size() - 1};
  }
  outline.raisers = std::move(kept);
}

/// The chain with a line across the mouth of each notch in a straight edge;
/// empty where there is none.
Loop without_notches(const Outline& outline) {
  const Loop& loop = outline.curves;
  const std::size_t n = loop.size();
  std::vector<bool> is_cut(n, false);
  for (std::size_t k = 0; k < n; ++k) {
    const Owner& owner = loop[k].owner;
    if (owner.kind != Owner::Kind::raiser || outline.raisers[owner.index].kind != Raiser::Kind::notch)
      continue;
    if (const auto count = flanks(loop, k))
      for (std::size_t j = 0; j <= 2 * *count; ++j) is_cut[(k + n - *count + j) % n] = true;
  }
  Loop body;
  if (std::find(is_cut.begin(), is_cut.end(), true) == is_cut.end()) return body;
  for (std::size_t k = 0; k < n; ++k) {
    if (is_cut[k]) continue;
    body.push_back(loop[k]);
    std::size_t next = (k + 1) % n;
    while (is_cut[next]) next = (next + 1) % n;
    if (next != (k + 1) % n) body.push_back(line(loop[k].finish(), loop[next].start(), loop[k].owner));
  }
  return body;
}

}  // namespace

double turning(const Curve& curve) {
  if (curve.kind == Curve::Kind::line) return 0.0;
  return (cross(curve.u, curve.v) > 0 ? 1.0 : -1.0) * (curve.end - curve.begin);
}

void tell_notches(Outline& outline) {
  const Loop& loop = outline.curves;
  const std::size_t n = loop.size();
  for (std::size_t k = 0; k < n; ++k) {
    if (loop[k].owner.kind != Owner::Kind::raiser) continue;
    const bool rounds_corner = is_smooth(loop[(k + n - 1) % n], loop[k]) &&
                               is_smooth(loop[k], loop[(k + 1) % n]) && -turning(loop[k]) <= most_fillet_turn;
    outline.raisers[loop[k].owner.index].kind =
        rounds_corner && !flanks(loop, k) ? Raiser::Kind::fillet : Raiser::Kind::notch;
  }
}

namespace {

/// The smallest radius of curvature on a curve: at its ends or where an axis of its
/// ellipse meets it.
double smallest_radius(const Curve& curve) {
  double least = std::min(curve.radius_of_curvature(curve.begin), curve.radius_of_curvature(curve.end));
  if (curve.kind == Curve::Kind::line) return least;
  const auto [low, high] = std::minmax(curve.begin, curve.end);
  for (double t = pi / 2 * std::ceil(low / (pi / 2)); t <= high; t += pi / 2)
    least = std::min(least, curve.radius_of_curvature(t));
  return least;
}

}  // namespace

std::vector<Point> sharp_corners(const Loop& edge) {
  std::vector<Point> corners;
  for (std::size_t k = 0; k < edge.size(); ++k) {
    const Curve& next = edge[(k + 1) % edge.size()];
    if (angle_between(edge[k], next) > pi + least_corner) corners.push_back(next.start());
  }
  return corners;
}

Hole drawn_hole(Loop edge) {
  Eigen::AlignedBox2d box;
  Hole hole;
  hole.shape = HoleShape::drawn;
  hole.corner_radius = std::numeric_limits<double>::infinity();
  for (const Curve& curve : edge) {
    box.extend(curve.start());
    for (int axis = 0; axis < 2; ++axis)
      for (const double t : extremes(curve, axis)) box.extend(curve.at(t));
    hole.corner_radius = std::min(hole.corner_radius, smallest_radius(curve));
  }
  hole.centre = box.center();
  hole.length = box.sizes().x();
  hole.width = box.sizes().y();
  hole.corner_radius = std::min(hole.corner_radius, std::min(hole.length, hole.width) / 2);
  for (Curve& curve : edge) curve.centre -= hole.centre;
  hole.edge = std::move(edge);
  return hole;
}

void place_raisers(Outline& outline, double length, double width) {
  drop_singular(outline);
  outline.body = without_notches(outline);
  place_sections(outline, length, width);
}

}  // namespace raiser::mesh
