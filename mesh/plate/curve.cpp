#include "mesh/plate/curve.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

namespace raiser::mesh {

namespace {

/// Keeps the angles of `wanted`, plus any turns, that lie inside the curve.
std::vector<double> inside(const Curve& curve, const std::vector<double>& wanted, bool angles) {
  const double low = std::min(curve.begin, curve.end);
  const double high = std::max(curve.begin, curve.end);
  const double margin = 1e-9 * (high - low);
  constexpr double turn = 2 * std::numbers::pi;
  std::vector<double> found;
  for (double t : wanted) {
    if (angles) t -= turn * std::floor((t - low) / turn);
    for (; t < high - margin; t += turn) {
      if (t > low + margin) found.push_back(t);
      if (!angles) break;
    }
  }
  std::sort(found.begin(), found.end());
  if (curve.end < curve.begin) std::reverse(found.begin(), found.end());
  return found;
}

}  // namespace

Point Curve::at(double t) const {
  if (kind == Kind::line) return centre + t * u;
  return centre + std::cos(t) * u + std::sin(t) * v;
}

Point Curve::derivative(double t) const {
  if (kind == Kind::line) return u;
  return std::cos(t) * v - std::sin(t) * u;
}

double Curve::radius_of_curvature(double t) const {
  if (kind == Kind::line) return std::numeric_limits<double>::infinity();
  const double area = std::abs(u.x() * v.y() - u.y() * v.x());
  return std::pow(derivative(t).norm(), 3) / area;
}

Curve line(const Point& from, const Point& to, const Owner& owner) {
  return {Curve::Kind::line, from, to - from, Point::Zero(), 0.0, 1.0, owner};
}

Point direction(const Curve& curve, double t) {
  return curve.derivative(t).normalized() * (curve.end > curve.begin ? 1.0 : -1.0);
}

Point outward(const Curve& curve, double t) {
  const Point along = direction(curve, t);
  return {along.y(), -along.x()};
}

Curve part(const Curve& curve, double begin, double end) {
  Curve result = curve;
  result.begin = begin;
  result.end = end;
  return result;
}

Curve reflected(const Curve& curve, bool flip_x, bool flip_y) {
  const Point sign(flip_x ? -1.0 : 1.0, flip_y ? -1.0 : 1.0);
  Curve result = curve;
  result.centre = curve.centre.cwiseProduct(sign);
  result.u = curve.u.cwiseProduct(sign);
  result.v = curve.v.cwiseProduct(sign);
  if (flip_x != flip_y) std::swap(result.begin, result.end);
  return result;
}

std::vector<double> crossings(const Curve& curve, int axis, double value) {
  const double offset = value - curve.centre[axis];
  if (curve.kind == Curve::Kind::line) {
    if (curve.u[axis] == 0.0) return {};
    return inside(curve, {offset / curve.u[axis]}, false);
  }
  const double amplitude = std::hypot(curve.u[axis], curve.v[axis]);
  const double cosine = offset / amplitude;
  if (!(std::abs(cosine) < 1.0)) return {};
  const double phase = std::atan2(curve.v[axis], curve.u[axis]);
  return inside(curve, {phase - std::acos(cosine), phase + std::acos(cosine)}, true);
}

std::vector<double> extremes(const Curve& curve, int axis) {
  if (curve.kind == Curve::Kind::line) return {};
  const double phase = std::atan2(curve.v[axis], curve.u[axis]);
  return inside(curve, {phase, phase + std::numbers::pi}, true);
}

Nearest nearest(const Curve& curve, const Point& x) {
  const double low = std::min(curve.begin, curve.end);
  const double high = std::max(curve.begin, curve.end);
  if (curve.kind == Curve::Kind::line) {
    const double t = std::clamp((x - curve.centre).dot(curve.u) / curve.u.squaredNorm(), low, high);
    return {t, (curve.at(t) - x).norm()};
  }
  const int samples = 8 + static_cast<int>(16 * (high - low));
  double best = low;
  for (int k = 1; k <= samples; ++k) {
    const double t = low + k * (high - low) / samples;
    if ((curve.at(t) - x).squaredNorm() < (curve.at(best) - x).squaredNorm()) best = t;
  }
  for (int step = 0; step < 8; ++step) {  // Newton on half the squared distance
    const Point away = curve.at(best) - x;
    const Point slope = curve.derivative(best);
    const double curvature = slope.squaredNorm() + away.dot(curve.centre - curve.at(best));
    if (curvature <= 0.0) break;
    best = std::clamp(best - away.dot(slope) / curvature, low, high);
  }
  return {best, (curve.at(best) - x).norm()};
}

}  // namespace raiser::mesh
