#include "io/import/shapes.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "io/import/curve_tools.hpp"

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Hole;
using mesh::HoleShape;
using mesh::Loop;
using mesh::Point;

constexpr double pi = std::numbers::pi;

/// An angle of an axis, in (-pi/2, pi/2], and 0 where it is that within rounding.
double axis_angle(const Point& along) {
  double angle = std::remainder(std::atan2(along.y(), along.x()), pi);
  if (angle <= -pi / 2 + 1e-12) angle += pi;
  return std::abs(angle) < 1e-12 ? 0.0 : angle;
}

std::optional<Hole> round_hole(const Curve& curve, double tolerance) {
  if (curve.kind != Curve::Kind::arc || std::abs(std::abs(curve.end - curve.begin) - 2 * pi) > 1e-6)
    return std::nullopt;
  const double a = curve.u.norm();
  const double b = curve.v.norm();
  if (std::abs(curve.u.dot(curve.v)) > tolerance * std::min(a, b)) return std::nullopt;
  if (std::abs(a - b) <= tolerance) return Hole{"", HoleShape::circle, 2 * a, 2 * a, 0.0, curve.centre, 0.0};
  const Point major = a >= b ? curve.u : curve.v;
  return Hole{"",  HoleShape::ellipse, 2 * std::max(a, b), 2 * std::min(a, b),
              0.0, curve.centre,       axis_angle(major)};
}

/// The loop begun at a line, if lines and circular arcs of one radius and sweep
/// alternate in it and join smoothly.
std::optional<Loop> alternating(Loop loop, double tolerance) {
  if (loop.front().kind != Curve::Kind::line) std::rotate(loop.begin(), loop.begin() + 1, loop.end());
  for (std::size_t k = 0; k < loop.size(); ++k) {
    const Curve& curve = loop[k];
    const Curve& next = loop[(k + 1) % loop.size()];
    const bool is_line = k % 2 == 0;
    if ((curve.kind == Curve::Kind::line) != is_line) return std::nullopt;
    if (!is_line && (!is_circular(curve) || std::abs(curve.u.norm() - loop[1].u.norm()) > tolerance))
      return std::nullopt;
    const auto along = [](const Curve& c, double t) {
      return Point((c.derivative(t) * (c.end > c.begin ? 1.0 : -1.0)).normalized());
    };
    const Point a = along(curve, curve.end);
    const Point b = along(next, next.begin);
    const double allowed = tolerance / std::min(length(curve), length(next));
    if (std::abs(a.x() * b.y() - a.y() * b.x()) > allowed + 1e-9 || a.dot(b) < 0) return std::nullopt;
  }
  return loop;
}

std::optional<Hole> slot(const Loop& loop, double tolerance) {
  if (loop.size() != 4) return std::nullopt;
  const auto chain = alternating(loop, tolerance);
  if (!chain) return std::nullopt;
  const Curve& one = (*chain)[1];
  const Curve& other = (*chain)[3];
  const double r = one.u.norm();
  const Point along = one.centre - other.centre;
  if (std::abs(length(one) - pi * r) > 2 * tolerance || std::abs(length(other) - pi * r) > 2 * tolerance)
    return std::nullopt;
  return Hole{"",
              HoleShape::slot,
              along.norm() + 2 * r,
              2 * r,
              0.0,
              (one.centre + other.centre) / 2,
              axis_angle(along)};
}

std::optional<Hole> rounded_rectangle(const Loop& loop, double tolerance) {
  if (loop.size() != 8) return std::nullopt;
  const auto chain = alternating(loop, tolerance);
  if (!chain) return std::nullopt;
  const double r = (*chain)[1].u.norm();
  for (std::size_t k = 1; k < 8; k += 2)
    if (std::abs(length((*chain)[k]) - r * pi / 2) > 2 * tolerance) return std::nullopt;
  const double first = length((*chain)[0]);
  const double second = length((*chain)[2]);
  if (std::abs(length((*chain)[4]) - first) > 2 * tolerance ||
      std::abs(length((*chain)[6]) - second) > 2 * tolerance)
    return std::nullopt;
  Point centre = Point::Zero();
  for (std::size_t k = 1; k < 8; k += 2) centre += (*chain)[k].centre / 4;
  const bool is_first = first >= second;
  return Hole{"",
              HoleShape::rounded_rectangle,
              std::max(first, second) + 2 * r,
              std::min(first, second) + 2 * r,
              r,
              centre,
              axis_angle((*chain)[is_first ? 0 : 2].u)};
}

}  // namespace

std::optional<Hole> hole_of(const Loop& loop, double tolerance) {
  if (loop.size() == 1) return round_hole(loop.front(), tolerance);
  if (auto found = slot(loop, tolerance)) return found;
  return rounded_rectangle(loop, tolerance);
}

}  // namespace raiser::io
