#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>

#include "io/import/contour.hpp"
#include "io/import/curve_tools.hpp"

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Loop;
using mesh::Point;

constexpr double most_turn = 23.0 * std::numbers::pi / 180;
constexpr std::size_t least_lines = 4;

double turn(const Curve& a, const Curve& b) {
  return std::atan2(a.u.x() * b.u.y() - a.u.y() * b.u.x(), a.u.dot(b.u));
}

/// Whether b may follow a in a row of facets.
bool is_facet_joint(const Curve& a, const Curve& b) {
  if (a.kind != Curve::Kind::line || b.kind != Curve::Kind::line) return false;
  const double angle = std::abs(turn(a, b));
  const double ratio = a.u.norm() / b.u.norm();
  return angle > 1e-4 && angle < most_turn && ratio > 0.2 && ratio < 5.0;
}

struct Circle {
  Point centre = Point::Zero();
  double radius = 0.0;
};
std::optional<Circle> through(const Point& a, const Point& b, const Point& c) {
  const Point p = b - a;
  const Point q = c - a;
  const double twice = 2 * (p.x() * q.y() - p.y() * q.x());
  if (std::abs(twice) < 1e-12 * p.norm() * q.norm()) return std::nullopt;
  const Point centre = a + Point(q.y() * p.squaredNorm() - p.y() * q.squaredNorm(),
                                 p.x() * q.squaredNorm() - q.x() * p.squaredNorm()) /
                               twice;
  return Circle{centre, (a - centre).norm()};
}

/// The corners of a row of lines: count + 1 points, the last the first again
/// where the row closes.
std::vector<Point> corners(const Loop& loop, std::size_t first, std::size_t count) {
  std::vector<Point> points;
  for (std::size_t k = 0; k < count; ++k) points.push_back(start(loop[first + k]));
  points.push_back(finish(loop[first + count - 1]));
  return points;
}

/// The circle on which all corners of a row lie, and how far the worst is off it.
struct Fit {
  Circle circle;
  double miss = 0.0;
};
std::optional<Fit> fit(const std::vector<Point>& points, double gap) {
  // Three corners well apart, also where the row closes on itself.
  const std::size_t n = points.size() - 1;
  const bool is_closed = (points.front() - points.back()).norm() <= 1e-9 * (points[0] - points[1]).norm();
  const auto circle = is_closed ? through(points[0], points[n / 3], points[2 * n / 3])
                                : through(points[0], points[n / 2], points[n]);
  if (!circle) return std::nullopt;
  Fit result{*circle, 0.0};
  for (const Point& p : points)
    result.miss = std::max(result.miss, std::abs((p - circle->centre).norm() - circle->radius));
  const double allowed = std::max(1e-5 * circle->radius, std::min(gap, 1e-3 * circle->radius));
  if (result.miss > allowed) return std::nullopt;
  return result;
}

/// The number of lines from `first` on that lie on one circle, all turning one
/// way; the row is lengthened while it does.
struct Row {
  std::size_t count = 0;
  Fit fit;
};
Row row_from(const Loop& loop, std::size_t first, double gap) {
  std::size_t most = 1;
  double sense = 0.0;
  double total = 0.0;
  while (first + most < loop.size() && is_facet_joint(loop[first + most - 1], loop[first + most])) {
    const double angle = turn(loop[first + most - 1], loop[first + most]);
    if (sense * angle < 0 || std::abs(total + angle) > 2 * std::numbers::pi) break;
    sense = angle;
    total += angle;
    ++most;
  }
  Row best;
  for (std::size_t count = least_lines; count <= most; ++count) {
    const auto found = fit(corners(loop, first, count), gap);
    if (!found) break;
    best = {count, *found};
  }
  return best;
}

Curve arc_of(const Loop& loop, std::size_t first, const Row& row) {
  const Point from = start(loop[first]);
  const Point to = finish(loop[first + row.count - 1]);
  const Point u = from - row.fit.circle.centre;
  const Point w = to - row.fit.circle.centre;
  const double side = turn(loop[first], loop[first + 1]) > 0 ? 1.0 : -1.0;
  double sweep = side * std::atan2(u.x() * w.y() - u.y() * w.x(), u.dot(w));
  if (sweep <= 1e-9) sweep += 2 * std::numbers::pi;
  const Curve arc{Curve::Kind::arc, row.fit.circle.centre, u, Point(-u.y(), u.x()), 0.0,
                  side * sweep,     loop[first].owner};
  const bool is_closed = (from - to).norm() <= 1e-9 * u.norm();
  return is_closed ? arc : between(arc, from, to);
}

void report(const Row& row, const Loop& loop, std::size_t first, std::vector<std::string>& repairs) {
  double sagitta = 0.0;
  for (std::size_t k = 0; k < row.count; ++k) {
    const Point middle = (start(loop[first + k]) + finish(loop[first + k])) / 2;
    sagitta = std::max(sagitta, row.fit.circle.radius - (middle - row.fit.circle.centre).norm());
  }
  repairs.push_back(fmt::format(
      "{} short lines taken as an arc of radius {:.6g} mm about ({:.6g}, {:.6g}) mm: their ends lie "
      "within {:.2g} mm of it, their middles up to {:.2g} mm inside",
      row.count, row.fit.circle.radius, row.fit.circle.centre.x(), row.fit.circle.centre.y(), row.fit.miss,
      sagitta));
}

/// The loop begun where no row of facets runs on, if there is such a place.
Loop rotated(Loop loop) {
  for (std::size_t k = 0; k < loop.size(); ++k)
    if (!is_facet_joint(loop[(k + loop.size() - 1) % loop.size()], loop[k])) {
      std::rotate(loop.begin(), loop.begin() + static_cast<std::ptrdiff_t>(k), loop.end());
      break;
    }
  return loop;
}

/// Both as one curve if they are pieces of one line or of one circular arc.
std::optional<Curve> as_one(const Curve& a, const Curve& b, double tolerance) {
  if (a.kind != b.kind || a.owner != b.owner) return std::nullopt;
  if (a.kind == Curve::Kind::line) {
    const Point whole = finish(b) - start(a);
    const Point first = finish(a) - start(a);
    const double off = std::abs(whole.x() * first.y() - whole.y() * first.x()) / whole.norm();
    if (!(off <= tolerance) || first.dot(finish(b) - start(b)) <= 0) return std::nullopt;
    return Curve{Curve::Kind::line, start(a), whole, Point::Zero(), 0.0, 1.0, a.owner};
  }
  if (!is_circular(a) || !is_circular(b)) return std::nullopt;
  const auto winds = [](const Curve& c) {
    return (c.u.x() * c.v.y() - c.u.y() * c.v.x()) * (c.end - c.begin) > 0;
  };
  const double span = std::abs(a.end - a.begin) + std::abs(b.end - b.begin);
  if ((a.centre - b.centre).norm() > tolerance || std::abs(a.u.norm() - b.u.norm()) > tolerance ||
      winds(a) != winds(b) || span > 2 * std::numbers::pi * (1 + 1e-9))
    return std::nullopt;
  Curve whole = a;
  whole.end = whole.begin + (a.end > a.begin ? span : -span);
  const bool is_closed = span > 2 * std::numbers::pi * (1 - 1e-7);
  if (is_closed) whole.end = whole.begin + (a.end > a.begin ? 2 : -2) * std::numbers::pi;
  return is_closed ? whole : between(whole, start(a), finish(b));
}

}  // namespace

Loop with_arcs_for_facets(const Loop& loop, double gap, std::vector<std::string>& repairs) {
  const Loop turned = rotated(loop);
  Loop result;
  for (std::size_t k = 0; k < turned.size();) {
    const Row row = row_from(turned, k, gap);
    if (row.count < least_lines) {
      result.push_back(turned[k++]);
      continue;
    }
    report(row, turned, k, repairs);
    result.push_back(arc_of(turned, k, row));
    k += row.count;
  }
  return result;
}

Loop merged(const Loop& loop, double tolerance) {
  Loop result;
  for (const Curve& curve : loop) {
    const auto one = result.empty() ? std::nullopt : as_one(result.back(), curve, tolerance);
    if (one)
      result.back() = *one;
    else
      result.push_back(curve);
  }
  while (result.size() > 1) {
    const auto one = as_one(result.back(), result.front(), tolerance);
    if (!one) break;
    result.front() = *one;
    result.pop_back();
  }
  return result;
}

}  // namespace raiser::io
