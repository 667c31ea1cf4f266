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

/// Where breaks divide one curve: parameters in no order. First the places
/// themselves, then the ends of the short sides beside them, which keep away from
/// whatever is there already.
std::vector<double> stops_on(const Curve& curve, const std::vector<const Break*>& breaks) {
  const double low = std::min(curve.begin, curve.end);
  const double high = std::max(curve.begin, curve.end);
  std::vector<double> stops;
  const auto add = [&](double stop, double from_ends, double from_stops) {
    const auto close = [&](double other) { return std::abs(stop - other) < from_stops; };
    if (stop < low + from_ends || stop > high - from_ends) return;
    if (std::none_of(stops.begin(), stops.end(), close)) stops.push_back(stop);
  };
  const double least = 1e-9 * (high - low);
  for (const bool beside : {false, true})
    for (const Break* at : breaks) {
      const double t = nearest_parameter(curve, at->at);
      const double step = at->size / curve.derivative(t).norm();
      const double margin = std::max(step / 3, least);
      if (!beside) add(t, margin, least);
      if (beside && step > 0)
        for (const double stop : {t - step, t + step}) add(stop, margin, margin);
    }
  return stops;
}

double distance(const Curve& curve, const Point& x) {
  return (curve.at(nearest_parameter(curve, x)) - x).norm();
}

/// Whether one arc goes on where another of the same circle or ellipse ends.
bool goes_on(const Curve& before, const Curve& after) {
  return before.kind == Curve::Kind::arc && after.kind == Curve::Kind::arc && before.owner == after.owner &&
         before.centre == after.centre && before.u == after.u && before.v == after.v;
}

/// Moves joints of a circle or ellipse to breaks beside them: they are places like
/// any other.
void move_joints(Loop& loop, const std::vector<Break>& breaks) {
  for (std::size_t k = 0; k < loop.size() && loop.size() > 1; ++k) {
    Curve& before = loop[k];
    Curve& after = loop[(k + 1) % loop.size()];
    if (!goes_on(before, after)) continue;
    const Point travel = before.derivative(before.end) * (before.end > before.begin ? 1.0 : -1.0);
    for (const Break& at : breaks) {
      const Point way = at.at - before.at(before.end);
      if (!(at.owner == before.owner) || way.norm() >= at.size / 3) continue;
      const bool is_past = way.dot(travel) > 0;
      const double shift =
          nearest_parameter(is_past ? after : before, at.at) - (is_past ? after.begin : before.end);
      before.end += shift;
      after.begin += shift;
      break;
    }
  }
}

}  // namespace

Region broken(Region region, const std::vector<Break>& breaks) {
  for (Loop& loop : region.loops) move_joints(loop, breaks);
  // The curves a break belongs to: the nearest of its owner's, and both at a joint.
  std::vector<double> nearest(breaks.size(), std::numeric_limits<double>::infinity());
  for (std::size_t b = 0; b < breaks.size(); ++b)
    for (const Loop& loop : region.loops)
      for (const Curve& curve : loop)
        if (curve.owner == breaks[b].owner) nearest[b] = std::min(nearest[b], distance(curve, breaks[b].at));
  for (Loop& loop : region.loops) {
    Loop divided;
    for (const Curve& curve : loop) {
      std::vector<const Break*> own;
      for (std::size_t b = 0; b < breaks.size(); ++b) {
        const double reach = nearest[b] + 1e-9 * (curve.at(curve.end) - curve.at(curve.begin)).norm();
        if (curve.owner == breaks[b].owner && distance(curve, breaks[b].at) <= reach)
          own.push_back(&breaks[b]);
      }
      std::vector<double> stops = stops_on(curve, own);
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
