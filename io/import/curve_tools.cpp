#include "io/import/curve_tools.hpp"

#include <algorithm>
#include <cmath>
#include <complex>

#include "mesh/legendre.hpp"

namespace raiser::io {

using mesh::Curve;
using mesh::Point;

Point start(const Curve& curve) { return curve.at(curve.begin); }
Point finish(const Curve& curve) { return curve.at(curve.end); }

bool is_circular(const Curve& curve) {
  const double r = curve.u.norm();
  return curve.kind == Curve::Kind::arc && std::abs(curve.v.norm() - r) <= 1e-9 * r &&
         std::abs(curve.u.dot(curve.v)) <= 1e-9 * r * r;
}

double length(const Curve& curve) {
  const double span = std::abs(curve.end - curve.begin);
  if (curve.kind == Curve::Kind::line) return curve.u.norm() * span;
  if (is_circular(curve)) return curve.u.norm() * span;
  const mesh::GaussRule rule = mesh::gauss_legendre(40);
  double sum = 0.0;
  for (std::size_t q = 0; q < rule.points.size(); ++q) {
    const double t = (curve.begin + curve.end + rule.points[q] * (curve.end - curve.begin)) / 2;
    sum += rule.weights[q] * curve.derivative(t).norm();
  }
  return sum * span / 2;
}

double length(const mesh::Loop& loop) {
  double sum = 0.0;
  for (const Curve& curve : loop) sum += length(curve);
  return sum;
}

Curve reversed(Curve curve) {
  std::swap(curve.begin, curve.end);
  return curve;
}

Curve between(Curve curve, const Point& from, const Point& to) {
  using Complex = std::complex<double>;
  const auto plane = [](const Point& p) { return Complex(p.x(), p.y()); };
  const auto point = [](Complex z) { return Point(z.real(), z.imag()); };
  if (curve.kind == Curve::Kind::line)
    return {Curve::Kind::line, from, to - from, Point::Zero(), 0.0, 1.0, curve.owner};
  const Complex factor = plane(to - from) / plane(finish(curve) - start(curve));
  const Complex old_start = plane(start(curve));
  curve.centre = point(plane(from) + factor * (plane(curve.centre) - old_start));
  curve.u = point(factor * plane(curve.u));
  curve.v = point(factor * plane(curve.v));
  return curve;
}

double area(const mesh::Loop& loop) {
  const mesh::GaussRule rule = mesh::gauss_legendre(24);
  if (loop.empty()) return 0.0;
  const Point origin = start(loop.front());
  double sum = 0.0;
  for (const Curve& curve : loop) {
    const int parts = curve.kind == Curve::Kind::line ? 1 : 4;
    for (int p = 0; p < parts; ++p) {
      const double step = (curve.end - curve.begin) / parts;
      for (std::size_t q = 0; q < rule.points.size(); ++q) {
        const double t = curve.begin + step * (p + (1 + rule.points[q]) / 2);
        const Point x = curve.at(t) - origin;
        const Point d = curve.derivative(t);
        sum += rule.weights[q] * step / 2 * (x.x() * d.y() - x.y() * d.x()) / 2;
      }
    }
  }
  return sum;
}

std::vector<Point> flattened(const mesh::Loop& loop) {
  constexpr double step = 0.05;
  std::vector<Point> points;
  for (const Curve& curve : loop) {
    const double span = std::abs(curve.end - curve.begin);
    // An ellipse turns faster than its parameter near the ends of its long axis.
    double aspect = 1.0;
    if (curve.kind == Curve::Kind::arc) {
      const double a = curve.u.norm();
      const double b = curve.v.norm();
      aspect = std::min(std::max(a, b) / std::max(std::min(a, b), 1e-300), 100.0);
    }
    const int pieces =
        curve.kind == Curve::Kind::line ? 1 : static_cast<int>(std::ceil(aspect * span / step));
    for (int k = 0; k < pieces; ++k)
      points.push_back(curve.at(curve.begin + (curve.end - curve.begin) * k / pieces));
  }
  return points;
}

bool is_inside(const Point& x, const std::vector<Point>& polygon) {
  bool inside = false;
  for (std::size_t i = 0, j = polygon.size() - 1; i < polygon.size(); j = i++) {
    const Point& a = polygon[i];
    const Point& b = polygon[j];
    if ((a.y() > x.y()) != (b.y() > x.y()) &&
        x.x() < (b.x() - a.x()) * (x.y() - a.y()) / (b.y() - a.y()) + a.x())
      inside = !inside;
  }
  return inside;
}

}  // namespace raiser::io
