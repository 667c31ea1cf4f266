#include <algorithm>
#include <cmath>
#include <optional>

#include "validation/compare/families.hpp"

namespace raiser::validation {

namespace {

bool equal_circles(const mesh::Hole& a, const mesh::Hole& b) {
  return a.shape == mesh::HoleShape::circle && b.shape == mesh::HoleShape::circle &&
         std::abs(a.length - b.length) <= 1e-9 * a.length;
}

/// The nearest other hole, if it is an equal circle.
std::optional<std::size_t> partner(const Situation& s) {
  std::optional<std::size_t> best;
  double distance = 0.0;
  for (std::size_t i = 0; i < s.plate.holes.size(); ++i) {
    const double d = (s.plate.holes[i].centre - s.shape().centre).norm();
    if (i == s.hole || (best && d >= distance)) continue;
    best = i;
    distance = d;
  }
  if (best && !equal_circles(s.shape(), s.plate.holes[*best])) best.reset();
  return best;
}

/// How the line of centres lies to the only load: across, along, or neither;
/// biaxial when both directions carry the same.
std::optional<Pair> arrangement(const Situation& s, const Point& line) {
  const double xx = s.remote.xx, yy = s.remote.yy;
  if (!s.uniform() || s.remote.xy != 0) return std::nullopt;
  if (xx != 0 && std::abs(xx - yy) <= 1e-9 * std::abs(xx)) return Pair::biaxial;
  if (!s.uniaxial()) return std::nullopt;
  const double on_load = std::abs(xx != 0 ? line.x() : line.y()) / line.norm();
  if (on_load < 1e-6) return Pair::across;
  if (on_load > 1 - 1e-12) return Pair::along;
  return std::nullopt;
}

/// The edges' effect on a pair: that on one hole, twice where the pair lies
/// across the load (common practice; 5 % found for d/W 0.15, L/d 1.5).
Effect pair_edges(const Situation& s, Pair pair) {
  Effect effect = edges(s);
  if (pair != Pair::along) effect.size *= 2;
  return effect;
}

std::vector<Comparison> two_holes(const Situation& s, std::size_t other) {
  const Point line = s.plate.holes[other].centre - s.shape().centre;
  const auto pair = arrangement(s, line);
  if (!pair) return {};
  const double ratio = line.norm() / s.shape().length;
  const double stress = s.remote.xx != 0 ? s.remote.xx : s.remote.yy;
  const std::vector<Effect> effects{pair_edges(s, *pair), neighbours(s, other)};
  std::vector<Comparison> rows;
  if (const auto factor = ling(*pair, ratio)) {
    rows.push_back(row(s, Reference::ling, "Kt gross", *factor, stress, {{"L/d", ratio}}, effects));
  }
  if (*pair == Pair::along) {
    rows.push_back(row(s, Reference::two_along_fit, "Kt gross", two_along_fit(1 / ratio), stress,
                       {{"d/L", 1 / ratio}}, effects));
  }
  return rows;
}

/// Whether all holes are equal circles at one pitch on one line, in any order;
/// the step from one to the next.
std::optional<Point> pitch(const mesh::Plate& plate) {
  std::vector<mesh::Hole> holes = plate.holes;
  for (const auto& hole : holes) {
    if (!equal_circles(hole, holes.front())) return std::nullopt;
  }
  std::sort(holes.begin(), holes.end(), [](const auto& a, const auto& b) {
    return std::pair(a.centre.x(), a.centre.y()) < std::pair(b.centre.x(), b.centre.y());
  });
  const Point span = holes.back().centre - holes.front().centre;
  const Point step = span / static_cast<double>(holes.size() - 1);
  for (std::size_t i = 0; i < holes.size(); ++i) {
    const Point expected = holes.front().centre + static_cast<double>(i) * step;
    if ((holes[i].centre - expected).norm() > 1e-6 * step.norm()) return std::nullopt;
  }
  return step;
}

/// An infinite row stands for the middle hole of a long one.
std::vector<Comparison> row_of_holes(const Situation& s) {
  const auto step = pitch(s.plate);
  if (!step) return {};
  Point middle = Point::Zero();
  for (const auto& hole : s.plate.holes) middle += hole.centre;
  middle /= static_cast<double>(s.plate.holes.size());
  const double apart = (s.shape().centre - middle).norm() / step->norm();
  const auto pair = arrangement(s, *step);
  if (apart > 0.6 || !pair || *pair == Pair::biaxial) return {};
  const double x = s.shape().length / step->norm(), n = static_cast<double>(s.plate.holes.size());
  const double stress = s.remote.xx != 0 ? s.remote.xx : s.remote.yy;
  const Effect finite{"the row is not infinite",
                      2.6 * x * x / n};  // of the holes that an infinite row has more
  if (*pair == Pair::across) {
    return {row(s, Reference::row_across_fit, "Kt on S/(1-d/L)", row_across_fit(x), stress / (1 - x),
                {{"d/L", x}}, {finite, edges(s)})};
  }
  return {row(s, Reference::row_along_fit, "Kt gross", row_along_fit(x), stress, {{"d/L", x}},
              {finite, edges(s)})};
}

}  // namespace

std::vector<Comparison> compare_group(const Situation& s) {
  if (s.shape().shape != mesh::HoleShape::circle) return {};
  const auto other = partner(s);
  if (!other) return {};
  if (s.plate.holes.size() >= 5) {
    if (auto rows = row_of_holes(s); !rows.empty()) return rows;
  }
  if (neighbours(s, *other).size > 0.1) return {};
  return two_holes(s, *other);
}

}  // namespace raiser::validation
