#include "mesh/region/breaks.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

namespace raiser::mesh {
namespace {

/// Parameter of the curve's point nearest to x, for points close to the curve.
double nearest_parameter(const Curve& curve, const Point& x) {
  const double low = std::min(curve.begin, curve.end);
  const double high = std::max(curve.begin, curve.end);
  if (curve.kind == Curve::Kind::line)
    return std::clamp((x - curve.centre).dot(curve.u) / curve.u.squaredNorm(), low, high);
  const Point arm = x - curve.centre;
  const double area = curve.u.x() * curve.v.y() - curve.u.y() * curve.v.x();
  const double c = (arm.x() * curve.v.y() - arm.y() * curve.v.x()) / area;
  const double s = (curve.u.x() * arm.y() - curve.u.y() * arm.x()) / area;
  constexpr double turn = 2 * std::numbers::pi;
  double t = std::atan2(s, c);
  t += turn * std::ceil((low - t) / turn - 1e-12);
  if (t <= high) return t;
  return (curve.at(low) - x).norm() < (curve.at(high) - x).norm() ? low : high;
}

/// Where one break divides one curve: parameters, not yet in order.
void add_stops(const Curve& curve, const Break& at, std::vector<double>& stops) {
  const double t = nearest_parameter(curve, at.at);
  const double step = at.size / curve.derivative(t).norm();
  const double low = std::min(curve.begin, curve.end);
  const double high = std::max(curve.begin, curve.end);
  const double margin = std::max(step / 3, 1e-9 * (high - low));
  for (const double stop : {t - step, t, t + step}) {
    const auto close = [&](double other) { return std::abs(stop - other) < margin; };
    if (stop < low + margin || stop > high - margin) continue;
    if (std::none_of(stops.begin(), stops.end(), close)) stops.push_back(stop);
  }
}

double distance(const Curve& curve, const Point& x) {
  return (curve.at(nearest_parameter(curve, x)) - x).norm();
}

}  // namespace

Region broken(Region region, const std::vector<Break>& breaks) {
  // The curves a break belongs to: the nearest of its owner's, and both at a joint.
  std::vector<double> nearest(breaks.size(), std::numeric_limits<double>::infinity());
  for (std::size_t b = 0; b < breaks.size(); ++b)
    for (const Loop& loop : region.loops)
      for (const Curve& curve : loop)
        if (curve.owner == breaks[b].owner) nearest[b] = std::min(nearest[b], distance(curve, breaks[b].at));
  for (Loop& loop : region.loops) {
    Loop divided;
    for (const Curve& curve : loop) {
      std::vector<double> stops;
      for (std::size_t b = 0; b < breaks.size(); ++b) {
        const double reach = nearest[b] + 1e-9 * (curve.at(curve.end) - curve.at(curve.begin)).norm();
        if (curve.owner == breaks[b].owner && distance(curve, breaks[b].at) <= reach)
          add_stops(curve, breaks[b], stops);
      }
      std::sort(stops.begin(), stops.end());
      if (curve.end < curve.begin) std::reverse(stops.begin(), stops.end());
      stops.push_back(curve.end);
      Curve piece = curve;
      for (const double stop : stops) {
        piece.end = stop;
        divided.push_back(piece);
        piece.begin = stop;
      }
    }
    loop = std::move(divided);
  }
  return region;
}

}  // namespace raiser::mesh
