#include "mesh/region/mouth.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

namespace raiser::mesh {
namespace {

Mouth mouth_at(const Curve& curve, double t) { return {curve.at(t), -outward(curve, t)}; }

/// The uncracked plate's curves that belong to one part of it.
Loop curves_of(const Plate& plate, const Owner& owner) {
  Plate whole = plate;
  whole.cracks.clear();
  Loop result;
  for (const Loop& loop : trace(whole).loops)
    std::copy_if(loop.begin(), loop.end(), std::back_inserter(result),
                 [&](const Curve& curve) { return curve.owner == owner; });
  return result;
}

double cross(const Point& a, const Point& b) { return a.x() * b.y() - a.y() * b.x(); }

/// Parameters of the curve where it meets the line through `from` along `direction`.
std::vector<double> crossings(const Curve& curve, const Point& from, const Point& direction) {
  const double offset = cross(direction, curve.centre - from);
  const double u = cross(direction, curve.u);
  if (curve.kind == Curve::Kind::line) return u == 0.0 ? std::vector<double>{} : std::vector{-offset / u};
  const double v = cross(direction, curve.v);
  const double size = std::hypot(u, v);
  if (size < std::abs(offset)) return {};
  const double phase = std::atan2(v, u);
  const double half = std::acos(-offset / size);
  const double low = std::min(curve.begin, curve.end);
  std::vector<double> found;
  for (double t : {phase - half, phase + half}) {
    constexpr double turn = 2 * std::numbers::pi;
    t -= turn * std::floor((t - low) / turn + 1e-12);
    found.push_back(t);
  }
  return found;
}

Mouth nearest_on(const Loop& curves, const Point& x) {
  Mouth best;
  double least = std::numeric_limits<double>::infinity();
  for (const Curve& curve : curves) {
    const Nearest found = nearest(curve, x);
    if (found.distance >= least) continue;
    least = found.distance;
    best = mouth_at(curve, found.parameter);
  }
  return best;
}

}  // namespace

std::optional<Mouth> mouth_on_edge(const Plate& plate, std::size_t edge, double position) {
  const Loop curves = curves_of(plate, {Owner::Kind::edge, edge});
  if (curves.empty()) return std::nullopt;
  const Point first = curves.front().at(curves.front().begin);
  const Point last = curves.back().at(curves.back().end);
  Point along = (last - first).normalized();
  const bool is_upright = std::abs(along.y()) > std::abs(along.x());
  if ((is_upright ? along.y() : along.x()) < 0.0) along = -along;
  const Point at = (first + last) / 2 + position * along;
  const Mouth found = nearest_on(curves, at);
  if ((found.at - at).norm() > 1e-9 * (last - first).norm()) return std::nullopt;
  return found;
}

std::vector<Mouth> mouths_on_raiser(const Plate& plate, std::size_t raiser, double angle) {
  const Point centre = mesh::raiser(plate, raiser).centre;
  const Point direction(std::cos(angle), std::sin(angle));
  std::vector<Mouth> found;
  for (const Curve& curve : curves_of(plate, {Owner::Kind::raiser, raiser})) {
    const auto [low, high] = std::minmax(curve.begin, curve.end);
    const double slack = 1e-9 * (high - low);
    for (const double t : crossings(curve, centre, direction))
      if (t >= low - slack && t <= high + slack && (curve.at(t) - centre).dot(direction) > 0.0)
        found.push_back(mouth_at(curve, std::clamp(t, low, high)));
  }
  const auto way = [&](const Mouth& mouth) { return (mouth.at - centre).dot(direction); };
  std::stable_sort(found.begin(), found.end(),
                   [&](const Mouth& a, const Mouth& b) { return way(a) < way(b); });
  // A joint of two curves is one place.
  const auto same = [&](const Mouth& a, const Mouth& b) { return way(b) - way(a) <= 1e-6 * way(b); };
  found.erase(std::unique(found.begin(), found.end(), same), found.end());
  return found;
}

Mouth nearest_mouth(const Plate& plate, const Owner& owner, const Point& x) {
  return nearest_on(curves_of(plate, owner), x);
}

}  // namespace raiser::mesh
