#include <algorithm>
#include <cmath>

#include "io/import/contour.hpp"
#include "io/import/curve_tools.hpp"

namespace raiser::io {
namespace {

using mesh::Point;

struct Segment {
  Point from, to;
  std::size_t loop, index, count;
  double low() const { return std::min(from.x(), to.x()); }
  double high() const { return std::max(from.x(), to.x()); }
};

double side(const Point& a, const Point& b, const Point& c) {
  return (b.x() - a.x()) * (c.y() - a.y()) - (b.y() - a.y()) * (c.x() - a.x());
}

bool are_neighbours(const Segment& a, const Segment& b) {
  if (a.loop != b.loop) return false;
  const std::size_t apart = a.index > b.index ? a.index - b.index : b.index - a.index;
  return apart <= 1 || apart == a.count - 1;
}

bool cross(const Segment& a, const Segment& b) {
  if (std::max(a.from.y(), a.to.y()) < std::min(b.from.y(), b.to.y()) ||
      std::max(b.from.y(), b.to.y()) < std::min(a.from.y(), a.to.y()))
    return false;
  const double s1 = side(a.from, a.to, b.from);
  const double s2 = side(a.from, a.to, b.to);
  const double s3 = side(b.from, b.to, a.from);
  const double s4 = side(b.from, b.to, a.to);
  return s1 * s2 < 0 && s3 * s4 < 0;
}

}  // namespace

std::vector<Crossing> crossings(const std::vector<mesh::Loop>& loops) {
  constexpr std::size_t most = 20;
  std::vector<Segment> all;
  for (std::size_t l = 0; l < loops.size(); ++l) {
    const std::vector<Point> points = flattened(loops[l]);
    for (std::size_t k = 0; k < points.size(); ++k)
      all.push_back({points[k], points[(k + 1) % points.size()], l, k, points.size()});
  }
  std::sort(all.begin(), all.end(), [](const Segment& a, const Segment& b) { return a.low() < b.low(); });
  std::vector<Crossing> found;
  for (std::size_t i = 0; i < all.size() && found.size() < most; ++i)
    for (std::size_t j = i + 1; j < all.size() && all[j].low() <= all[i].high() && found.size() < most; ++j) {
      const Segment& a = all[i];
      const Segment& b = all[j];
      if (are_neighbours(a, b) || !cross(a, b)) continue;
      const double share =
          side(b.from, b.to, a.from) / (side(b.from, b.to, a.from) - side(b.from, b.to, a.to));
      found.push_back({std::min(a.loop, b.loop), std::max(a.loop, b.loop), a.from + share * (a.to - a.from)});
    }
  return found;
}

}  // namespace raiser::io
