#include "mesh/plate/section.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace raiser::mesh {

namespace {

// The line start + t step seen from a hole's centre and axes; |step| = 1.
struct Line {
  Point start;
  Point step;
};

using Piece = std::optional<Chord>;

// Inside x^2/a^2 + y^2/b^2 < 1 about `centre`.
Piece through_ellipse(const Line& line, const Point& centre, double a, double b) {
  const Point s((line.start.x() - centre.x()) / a, (line.start.y() - centre.y()) / b);
  const Point d(line.step.x() / a, line.step.y() / b);
  const double length = d.norm();
  const double offset =
      (d.x() * s.y() - d.y() * s.x()) / length;  // of the line from the unit circle's centre
  const double half_squared = (1.0 - offset) * (1.0 + offset);
  if (!(half_squared > 0.0)) return std::nullopt;
  const double half = std::sqrt(half_squared) / length;
  const double middle = -s.dot(d) / (length * length);
  return Chord{middle - half, middle + half};
}

// Inside |x| < a, |y| < b.
Piece through_box(const Line& line, double a, double b) {
  Chord result{-std::numeric_limits<double>::infinity(), std::numeric_limits<double>::infinity()};
  const Point half(a, b);
  for (int i = 0; i < 2; ++i) {
    if (line.step[i] == 0.0) {
      if (!(std::abs(line.start[i]) < half[i])) return std::nullopt;
      continue;
    }
    const double one = (-half[i] - line.start[i]) / line.step[i];
    const double other = (half[i] - line.start[i]) / line.step[i];
    result.begin = std::max(result.begin, std::min(one, other));
    result.end = std::min(result.end, std::max(one, other));
  }
  return result.begin < result.end ? Piece(result) : std::nullopt;
}

// Two crossed boxes and a disc at each corner of the core |x| <= a, |y| <= b.
// The union is convex, so its chord spans theirs.
Piece through_rounded_box(const Line& line, double a, double b, double radius) {
  std::vector<Piece> pieces = {through_box(line, a + radius, b), through_box(line, a, b + radius)};
  for (const double x : {-a, a})
    for (const double y : {-b, b}) pieces.push_back(through_ellipse(line, Point(x, y), radius, radius));
  Piece whole;
  for (const Piece& piece : pieces) {
    if (!piece) continue;
    if (!whole) whole = piece;
    whole->begin = std::min(whole->begin, piece->begin);
    whole->end = std::max(whole->end, piece->end);
  }
  return whole;
}

Piece through(const Hole& hole, const Line& line) {
  const double a = 0.5 * hole.length;
  const double b = 0.5 * hole.width;
  switch (hole.shape) {
    case HoleShape::circle:
    case HoleShape::ellipse:
      return through_ellipse(line, Point::Zero(), a, b);
    case HoleShape::slot:
      return through_rounded_box(line, std::max(a - b, 0.0), 0.0, b);
    case HoleShape::rounded_rectangle:
      return through_rounded_box(line, std::max(a - hole.corner_radius, 0.0),
                                 std::max(b - hole.corner_radius, 0.0), hole.corner_radius);
  }
  return std::nullopt;
}

}  // namespace

std::optional<Chord> chord(const Hole& hole, Direction direction, double station) {
  const bool across = direction == Direction::across;
  const double c = std::cos(hole.angle);
  const double s = std::sin(hole.angle);
  const double position = across ? hole.centre.y() : hole.centre.x();
  const Point offset = across ? Point(station - hole.centre.x(), 0.0) : Point(0.0, station - hole.centre.y());
  const Point step = across ? Point(0.0, 1.0) : Point(1.0, 0.0);
  const auto in_axes = [&](const Point& v) { return Point(c * v.x() + s * v.y(), c * v.y() - s * v.x()); };
  Piece result = through(hole, {in_axes(offset), in_axes(step)});
  if (result) *result = {result->begin + position, result->end + position};
  return result;
}

std::vector<Interval> material_along(const Plate& plate, Direction direction, double station) {
  const bool across = direction == Direction::across;
  if (!(std::abs(station) <= 0.5 * (across ? plate.length : plate.width))) return {};
  const double half = 0.5 * (across ? plate.width : plate.length);

  struct Gap {
    Chord chord;
    std::size_t hole;
  };
  std::vector<Gap> gaps;
  for (std::size_t i = 0; i < plate.holes.size(); ++i)
    if (const auto piece = chord(plate.holes[i], direction, station)) gaps.push_back({*piece, i});
  std::sort(gaps.begin(), gaps.end(),
            [](const Gap& a, const Gap& b) { return a.chord.begin < b.chord.begin; });

  std::vector<Interval> result;
  Interval open{-half, half, std::nullopt, std::nullopt};
  for (const Gap& next : gaps) {
    result.push_back({open.begin, next.chord.begin, open.hole_at_begin, next.hole});
    open.begin = next.chord.end;
    open.hole_at_begin = next.hole;
  }
  result.push_back(open);
  return result;
}

}  // namespace raiser::mesh
