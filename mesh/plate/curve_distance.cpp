#include "mesh/plate/curve_distance.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <utility>
#include <vector>

namespace raiser::mesh {

namespace {

/// A part of a curve with its chord, and how far it may lie from that.
struct Span {
  const Curve* curve;
  double begin, end;
  Point from, to;
  double bulge;

  Span(const Curve& c, double t0, double t1) : curve(&c), begin(t0), end(t1), from(c.at(t0)), to(c.at(t1)) {
    const double radius = std::max(c.u.norm(), c.v.norm());
    const double step = t1 - t0;
    bulge = c.kind == Curve::Kind::line ? 0.0 : radius * std::min(step * step / 8, 2.0);
  }
  Point at(double share) const { return curve->at(begin + share * (end - begin)); }
  double size() const { return (to - from).norm() + bulge; }
};

double cross(const Point& a, const Point& b) { return a.x() * b.y() - a.y() * b.x(); }

struct Closest {
  double length;
  double on_a, on_b;  ///< shares of the chords
};

Closest between_chords(const Span& a, const Span& b) {
  const Point p = a.to - a.from;
  const Point q = b.to - b.from;
  const Point offset = b.from - a.from;
  const double area = cross(p, q);
  if (area != 0.0) {
    const double s = cross(offset, q) / area;
    const double t = cross(offset, p) / area;
    if (s >= 0 && s <= 1 && t >= 0 && t <= 1) return {0.0, s, t};
  }
  const auto share = [](const Point& x, const Point& start, const Point& along) {
    const double length = along.squaredNorm();
    return length > 0.0 ? std::clamp((x - start).dot(along) / length, 0.0, 1.0) : 0.0;
  };
  const std::array<std::array<double, 2>, 4> pairs = {{{0.0, share(a.from, b.from, q)},
                                                       {1.0, share(a.to, b.from, q)},
                                                       {share(b.from, a.from, p), 0.0},
                                                       {share(b.to, a.from, p), 1.0}}};
  Closest best{std::numeric_limits<double>::infinity(), 0.0, 0.0};
  for (const auto& [s, t] : pairs) {
    const double length = (a.from + s * p - b.from - t * q).norm();
    if (length < best.length) best = {length, s, t};
  }
  return best;
}

}  // namespace

// Bisects the wider-bulging of two spans and drops pairs whose chords are too
// far apart to beat the nearest pair of points seen.
double distance(const Curve& a, const Curve& b, double enough) {
  constexpr int most_steps = 20000;
  std::vector<std::pair<Span, Span>> open{{Span(a, a.begin, a.end), Span(b, b.begin, b.end)}};
  double best = std::numeric_limits<double>::infinity();
  double far = enough;  // the least lower bound among the pairs dropped for being farther than enough
  for (int step = 0; !open.empty() && step < most_steps; ++step) {
    const auto [one, other] = open.back();
    open.pop_back();
    const Closest near = between_chords(one, other);
    best = std::min(best, (one.at(near.on_a) - other.at(near.on_b)).norm());
    const double least = near.length - one.bulge - other.bulge;
    if (least >= enough || least >= best * (1 - 1e-6) - 1e-14 * (one.size() + other.size())) continue;
    const bool first = one.bulge >= other.bulge;
    const Span& split = first ? one : other;
    const double middle = (split.begin + split.end) / 2;
    const Span left(*split.curve, split.begin, middle);
    const Span right(*split.curve, middle, split.end);
    open.push_back(first ? std::pair(right, other) : std::pair(one, right));
    open.push_back(first ? std::pair(left, other) : std::pair(one, left));
  }
  return best < far ? best : far;
}

}  // namespace raiser::mesh
