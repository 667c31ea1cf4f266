#include "mesh/plate/distance.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/plate/curve_distance.hpp"
#include "mesh/plate/section.hpp"
#include "mesh/region/region.hpp"

namespace raiser::mesh {

namespace {

// A hole as the Minkowski sum of a disc and a convex core that is its own
// mirror image through the centre: a point, a segment, a rectangle, or an
// ellipse less its smallest radius of curvature.
struct Body {
  Point axis = Point::UnitX();  // the hole's first axis
  bool ellipse = false;
  double a = 0.0;  // half sizes of the core's rectangle, or semi-axes of the whole ellipse
  double b = 0.0;
  double disc = 0.0;

  // The point of the core farthest in direction n, from the centre.
  Point farthest(const Point& n) const {
    const Point second(-axis.y(), axis.x());
    const double c = n.dot(axis);
    const double s = n.dot(second);
    if (!ellipse) return std::copysign(a, c) * axis + std::copysign(b, s) * second;
    const double extent = std::hypot(a * c, b * s);
    return (a * a / extent - disc) * c * axis + (b * b / extent - disc) * s * second;
  }
};

Body body(const Hole& hole) {
  Body result;
  result.axis = Point(std::cos(hole.angle), std::sin(hole.angle));
  const double a = 0.5 * hole.length;
  const double b = 0.5 * hole.width;
  switch (hole.shape) {
    case HoleShape::circle:
      result.disc = a;
      break;
    case HoleShape::ellipse:
      result.ellipse = true;
      result.a = a;
      result.b = b;
      result.disc = std::min(a, b) * (std::min(a, b) / std::max(a, b));
      break;
    case HoleShape::slot:
      result.disc = b;
      result.a = std::max(a - b, 0.0);
      break;
    case HoleShape::rounded_rectangle:
      result.disc = hole.corner_radius;
      result.a = std::max(a - hole.corner_radius, 0.0);
      result.b = std::max(b - hole.corner_radius, 0.0);
      break;
    case HoleShape::drawn:  // no such sum: see drawn_half_extent() and drawn_gap()
      break;
  }
  return result;
}

Point towards(double angle) { return {std::cos(angle), std::sin(angle)}; }

// The separation of two cores along a direction n is q(n).n with
// q = (vector between centres) - farthest point of either. It is a concave
// homogeneous function of n, so that q(n).m bounds it from above at every
// other direction m: the ends of a range of directions give an upper bound on
// all of it.
struct Cut {
  double angle = 0.0;
  Point q = Point::Zero();
  double separation = 0.0;  // along this direction
};

struct Range {
  Cut from;
  Cut to;
};

struct Upper {
  double angle = 0.0;
  double separation = 0.0;
};

double wrapped_after(double angle, double start) {
  const double turn = 2.0 * std::numbers::pi;
  double rest = std::fmod(angle - start, turn);
  if (rest < 0.0) rest += turn;
  return start + rest;
}

// The largest value of min(from.q . n, to.q . n) strictly inside the range.
Upper upper_bound(const Range& range) {
  const Point& p = range.from.q;
  const Point& q = range.to.q;
  const Point difference = p - q;
  const double crossing = std::atan2(difference.x(), -difference.y());
  const std::array<double, 4> candidates = {std::atan2(p.y(), p.x()), std::atan2(q.y(), q.x()), crossing,
                                            crossing + std::numbers::pi};
  Upper best{range.from.angle, std::max(range.from.separation, range.to.separation)};
  for (const double candidate : candidates) {
    const double angle = wrapped_after(candidate, range.from.angle);
    if (!(angle > range.from.angle && angle < range.to.angle)) continue;
    const Point n = towards(angle);
    const double value = std::min(p.dot(n), q.dot(n));
    if (value > best.separation) best = {angle, value};
  }
  return best;
}

// The farthest that a curve about the hole's centre reaches either way along n.
double drawn_half_extent(const Hole& hole, const Point& n) {
  double most = 0.0;
  const auto take = [&](const Point& x) { most = std::max(most, std::abs(x.dot(n))); };
  for (const Curve& curve : hole.edge) {
    take(curve.start());
    take(curve.finish());
    if (curve.kind == Curve::Kind::line) continue;
    const double first = std::atan2(n.dot(curve.v), n.dot(curve.u));
    const auto [low, high] = std::minmax(curve.begin, curve.end);
    for (double t = first + std::numbers::pi * std::ceil((low - first) / std::numbers::pi); t <= high;
         t += std::numbers::pi)
      take(curve.at(t));
  }
  return most;
}

bool covers(const Hole& hole, const Point& x) {
  for (const Chord& chord : chords(hole, Direction::across, x.x()))
    if (chord.begin < x.y() && x.y() < chord.end) return true;
  return false;
}

// Of holes that overlap, minus the shift that parts their bounding boxes.
double drawn_gap(const Hole& a, const Hole& b) {
  const Loop one = trace(a, {});
  const Loop other = trace(b, {});
  double least = (one.front().start() - other.front().start()).norm();
  for (const Curve& p : one)
    for (const Curve& q : other) least = std::min(least, distance(p, q, least));
  const double touch = 1e-12 * (a.length + a.width + b.length + b.width);
  const bool crosses = least <= touch;
  if (!crosses && !covers(a, other.front().start()) && !covers(b, one.front().start())) return least;
  const double in_x = half_extent(a, Point::UnitX()) + half_extent(b, Point::UnitX());
  const double in_y = half_extent(a, Point::UnitY()) + half_extent(b, Point::UnitY());
  const Point between = (b.centre - a.centre).cwiseAbs();
  return -std::max(std::min(in_x - between.x(), in_y - between.y()), 0.0);
}

}  // namespace

double half_extent(const Hole& hole, const Point& direction) {
  if (hole.shape == HoleShape::drawn) return drawn_half_extent(hole, direction);
  const Body shape = body(hole);
  return shape.farthest(direction).dot(direction) + shape.disc;
}

// The distance of convex bodies is the largest separation over all directions
// (and the overlap is minus it); found by bisecting ranges of directions and
// dropping those whose upper bound cannot beat the best separation seen.
double gap(const Hole& a, const Hole& b) {
  if (a.shape == HoleShape::drawn || b.shape == HoleShape::drawn) return drawn_gap(a, b);
  const Body one = body(a);
  const Body other = body(b);
  const Point between = b.centre - a.centre;
  const double scale = between.norm() + a.length + a.width + b.length + b.width;
  const double discs = one.disc + other.disc;
  const auto cut = [&](double angle) {
    const Point n = towards(angle);
    const Point q = between - one.farthest(n) - other.farthest(n);
    return Cut{angle, q, q.dot(n)};
  };

  std::vector<Range> open;
  const double quarter = 0.5 * std::numbers::pi;
  const double first = std::atan2(between.y(), between.x());
  for (int i = 0; i < 4; ++i) open.push_back({cut(first + i * quarter), cut(first + (i + 1) * quarter)});
  double best = open.front().from.separation;
  for (const Range& range : open) best = std::max(best, range.from.separation);
  while (!open.empty()) {
    const Range range = open.back();
    open.pop_back();
    const Upper upper = upper_bound(range);
    const double overlap = std::max(discs - best, 0.0);
    if (!(upper.separation > best + std::max(1e-14 * scale, 1e-4 * overlap))) continue;
    const Cut middle = cut(upper.angle);
    best = std::max(best, middle.separation);
    open.push_back({range.from, middle});
    open.push_back({middle, range.to});
  }
  return best - discs;
}

std::array<double, 4> edge_distances(const Plate& plate, const Hole& hole) {
  const double along = half_extent(hole, Point::UnitX());
  const double across = half_extent(hole, Point::UnitY());
  return {0.5 * plate.length - hole.centre.x() - along, 0.5 * plate.width - hole.centre.y() - across,
          0.5 * plate.length + hole.centre.x() - along, 0.5 * plate.width + hole.centre.y() - across};
}

double edge_distance(const Plate& plate, const Hole& hole) {
  const std::array<double, 4> distances = edge_distances(plate, hole);
  return *std::min_element(distances.begin(), distances.end());
}

}  // namespace raiser::mesh
