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
    case HoleShape::drawn:
      break;
  }
  return std::nullopt;
}

// Below this part of the plate's size two places are one.
constexpr double rounding = 1e-12;

struct Crossing {
  double position = 0.0;
  Owner owner;
};

// The parameter where a piece of curve, monotone in `axis`, passes the station.
// `from` and `to` are its ends' distances beyond it, 0 within rounding.
double passing(const Curve& piece, int axis, double station, double from, double to) {
  if (from == 0.0) return piece.begin;
  if (to == 0.0) return piece.end;
  const auto found = crossings(piece, axis, station);
  if (!found.empty()) return found.front();
  return std::abs(from) < std::abs(to) ? piece.begin : piece.end;
}

// Where a chain passes from one side of the line to the other. `touching_is_before`
// says on which side what lies on the line itself counts.
std::vector<Crossing> passages(const Loop& loop, int axis, double station, double tolerance,
                               bool touching_is_before) {
  const auto beyond = [&](const Point& x) {
    const double distance = x[axis] - station;
    return std::abs(distance) <= tolerance ? 0.0 : distance;
  };
  const auto is_before = [&](double distance) {
    return touching_is_before ? distance <= 0.0 : distance < 0.0;
  };
  std::vector<Crossing> result;
  for (std::size_t i = 0; i < loop.size(); ++i) {
    std::vector<double> stops = extremes(loop[i], axis);
    stops.push_back(loop[i].end);
    double from = loop[i].begin;
    for (const double to : stops) {
      const Curve piece = part(loop[i], from, to);
      from = to;
      const double a = beyond(piece.start());
      const double b = beyond(piece.finish());
      if (is_before(a) == is_before(b)) continue;
      const double t = passing(piece, axis, station, a, b);
      Owner owner = loop[i].owner;
      // At a joint with a raiser, the raiser bounds the section.
      const auto& next = loop[(i + (t == loop[i].end ? 1 : loop.size() - 1)) % loop.size()];
      if ((t == loop[i].end || t == loop[i].begin) && next.owner.kind == Owner::Kind::raiser)
        owner = next.owner;
      result.push_back({piece.at(t)[1 - axis], owner});
    }
  }
  std::sort(result.begin(), result.end(),
            [](const Crossing& a, const Crossing& b) { return a.position < b.position; });
  return result;
}

double length_of(const std::vector<Crossing>& crossings) {
  double sum = 0.0;
  for (std::size_t i = 0; i + 1 < crossings.size(); i += 2)
    sum += crossings[i + 1].position - crossings[i].position;
  return sum;
}

// The pieces of the line inside a chain of the plate's outline; where the chain
// jumps at the line, of its wider or its narrower side.
std::vector<Interval> inside(const Loop& loop, const Plate& plate, Direction direction, double station,
                             bool wider) {
  const int axis = direction == Direction::across ? 0 : 1;
  const double tolerance = rounding * (plate.length + plate.width);
  auto found = passages(loop, axis, station, tolerance, false);
  auto other = passages(loop, axis, station, tolerance, true);
  const bool is_wider = length_of(other) > length_of(found);
  if (found.empty() || (!other.empty() && is_wider == wider)) std::swap(found, other);
  std::vector<Interval> result;
  for (std::size_t i = 0; i + 1 < found.size(); i += 2) {
    for (const std::size_t k : {i, i + 1})
      if (found[k].owner.kind == Owner::Kind::raiser) found[k].owner.index += plate.holes.size();
    result.push_back({found[i].position, found[i + 1].position, found[i].owner, found[i + 1].owner});
  }
  return result;
}

std::vector<Interval> whole(const Plate& plate, bool across) {
  const double half = 0.5 * (across ? plate.width : plate.length);
  const auto edge = [](std::size_t index) { return Owner{Owner::Kind::edge, index}; };
  return {{-half, half, edge(across ? rectangle::bottom : rectangle::left),
           edge(across ? rectangle::top : rectangle::right)}};
}

}  // namespace

std::vector<Chord> chords(const Hole& hole, Direction direction, double station) {
  if (hole.shape != HoleShape::drawn) {
    const auto one = chord(hole, direction, station);
    return one ? std::vector<Chord>{*one} : std::vector<Chord>{};
  }
  const int axis = direction == Direction::across ? 0 : 1;
  const double tolerance = rounding * (hole.length + hole.width);
  const auto found = passages(hole.edge, axis, station - hole.centre[axis], tolerance, false);
  std::vector<Chord> result;
  for (std::size_t i = 0; i + 1 < found.size(); i += 2)
    result.push_back(
        {found[i].position + hole.centre[1 - axis], found[i + 1].position + hole.centre[1 - axis]});
  return result;
}

std::optional<Chord> chord(const Hole& hole, Direction direction, double station) {
  if (hole.shape == HoleShape::drawn) {
    const auto all = chords(hole, direction, station);
    return all.empty() ? std::nullopt : std::optional(Chord{all.front().begin, all.back().end});
  }
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

std::vector<Interval> gross_along(const Plate& plate, Direction direction, double station) {
  const bool across = direction == Direction::across;
  if (!(std::abs(station) <= 0.5 * (across ? plate.length : plate.width) * (1.0 + rounding))) return {};
  if (plate.outline) return inside(plate.outline->gross(), plate, direction, station, true);
  return whole(plate, across);
}

std::vector<Interval> material_along(const Plate& plate, Direction direction, double station) {
  const bool across = direction == Direction::across;
  if (!(std::abs(station) <= 0.5 * (across ? plate.length : plate.width) * (1.0 + rounding))) return {};
  const auto pieces =
      plate.outline ? inside(plate.outline->curves, plate, direction, station, false) : whole(plate, across);

  struct Gap {
    Chord chord;
    std::size_t hole;
  };
  std::vector<Gap> gaps;
  for (std::size_t i = 0; i < plate.holes.size(); ++i)
    for (const Chord& piece : chords(plate.holes[i], direction, station)) gaps.push_back({piece, i});
  std::sort(gaps.begin(), gaps.end(),
            [](const Gap& a, const Gap& b) { return a.chord.begin < b.chord.begin; });

  std::vector<Interval> result;
  for (Interval open : pieces) {
    const Interval piece = open;
    for (const Gap& next : gaps) {
      if (next.chord.begin < piece.begin || next.chord.end > piece.end) continue;
      const Owner hole{Owner::Kind::raiser, next.hole};
      result.push_back({open.begin, next.chord.begin, open.at_begin, hole});
      open.begin = next.chord.end;
      open.at_begin = hole;
    }
    result.push_back(open);
  }
  return result;
}

SectionShape shape_of(const std::vector<Interval>& pieces) {
  SectionShape result;
  if (pieces.empty()) return result;
  double first_moment = 0.0;
  for (const Interval& piece : pieces) {
    const double length = piece.end - piece.begin;
    result.length += length;
    first_moment += length * 0.5 * (piece.begin + piece.end);
  }
  result.centroid = result.length > 0.0 ? first_moment / result.length : 0.0;
  for (const Interval& piece : pieces) {
    const double length = piece.end - piece.begin;
    const double arm = 0.5 * (piece.begin + piece.end) - result.centroid;
    result.inertia += length * (length * length / 12.0 + arm * arm);
  }
  result.low = pieces.front().begin;
  result.high = pieces.back().end;
  return result;
}

}  // namespace raiser::mesh
