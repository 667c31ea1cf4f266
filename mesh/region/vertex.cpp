#include "mesh/region/vertex.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

namespace raiser::mesh {
namespace {

constexpr double pi = std::numbers::pi;

/// Unit tangent in the curve's own direction.
Point tangent(const Curve& curve, double t) {
  return (curve.derivative(t) * (curve.end > curve.begin ? 1.0 : -1.0)).normalized();
}

/// Least distance from x to a curve, taken as 64 chords.
double distance(const Curve& curve, const Point& x) {
  constexpr int count = 64;
  double least = std::numeric_limits<double>::infinity();
  Point before = curve.at(curve.begin);
  for (int k = 1; k <= count; ++k) {
    const Point here = curve.at(curve.begin + (curve.end - curve.begin) * k / count);
    const Point chord = here - before;
    const double t = std::clamp((x - before).dot(chord) / std::max(chord.squaredNorm(), 1e-300), 0.0, 1.0);
    least = std::min(least, (before + t * chord - x).norm());
    before = here;
  }
  return least;
}

/// Distance from the vertex to where a curve that starts there ends, or where
/// it begins to come back.
double straight_reach(const Curve& curve, const Point& x, bool starts) {
  constexpr int count = 64;
  double farthest = 0.0;
  for (int k = 1; k <= count; ++k) {
    const double share = static_cast<double>(starts ? k : count - k) / count;
    const double here = (curve.at(curve.begin + share * (curve.end - curve.begin)) - x).norm();
    if (here < farthest) break;
    farthest = here;
  }
  return farthest;
}

}  // namespace

double angle_between(const Curve& before, const Curve& after) {
  const Point a = tangent(before, before.end);
  const Point b = tangent(after, after.begin);
  return pi - std::atan2(a.x() * b.y() - a.y() * b.x(), a.dot(b));
}

bool is_blunt(double angle) { return angle > pi / 2 + least_corner && angle < pi - least_corner; }

std::vector<Vertex> vertices(const Region& region) {
  std::vector<Vertex> result;
  for (std::size_t l = 0; l < region.loops.size(); ++l) {
    const Loop& loop = region.loops[l];
    for (std::size_t k = 0; k < loop.size(); ++k) {
      Vertex vertex;
      vertex.before = loop[k];
      vertex.after = loop[(k + 1) % loop.size()];
      vertex.loop = l;
      vertex.curve = k;
      vertex.at = vertex.after.at(vertex.after.begin);
      vertex.angle = angle_between(vertex.before, vertex.after);
      const Point along = tangent(vertex.after, vertex.after.begin);
      vertex.direction = std::atan2(along.y(), along.x());
      result.push_back(vertex);
    }
  }
  return result;
}

double reach(const Region& region, const Vertex& vertex) {
  double result = std::min(straight_reach(vertex.after, vertex.at, true),
                           straight_reach(vertex.before, vertex.at, false));
  for (std::size_t l = 0; l < region.loops.size(); ++l) {
    const Loop& loop = region.loops[l];
    for (std::size_t k = 0; k < loop.size(); ++k) {
      const bool is_own = l == vertex.loop && (k == vertex.curve || k == (vertex.curve + 1) % loop.size());
      if (!is_own) result = std::min(result, distance(loop[k], vertex.at));
    }
  }
  for (const Slit& slit : region.slits)
    for (std::size_t k = 1; k < slit.points.size(); ++k)
      result = std::min(result, distance(line(slit.points[k - 1], slit.points[k]), vertex.at));
  return result;
}

}  // namespace raiser::mesh
