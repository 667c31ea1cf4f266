#include "mesh/plate/chain.hpp"

#include <fmt/format.h>

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/plate/drawn.hpp"

namespace raiser::mesh {

namespace {

constexpr double pi = std::numbers::pi;
constexpr double rounding = 1e-9;

double cross(const Point& a, const Point& b) { return a.x() * b.y() - a.y() * b.x(); }

/// Twice the signed area of the polygon through the points.
double polygon(const std::vector<OutlinePoint>& points) {
  double sum = 0.0;
  for (std::size_t i = 0; i < points.size(); ++i)
    sum += cross(points[i].at, points[(i + 1) % points.size()].at);
  return sum;
}

/// The same outline run the other way.
std::vector<OutlinePoint> reversed(const std::vector<OutlinePoint>& points) {
  std::vector<OutlinePoint> result(points.rbegin(), points.rend());
  const std::size_t n = result.size();
  for (std::size_t i = 0; i < n; ++i) {
    const OutlinePoint& from = points[(2 * n - 2 - i) % n];  // whose piece now starts here
    result[i].edge = from.edge;
    result[i].piece = from.piece;
  }
  return result;
}

/// An arc about `centre` from a to b; `is_left` when it turns left.
Curve arc_between(const Point& centre, const Point& u, const Point& v, const Point& a, const Point& b,
                  bool is_left) {
  Eigen::Matrix2d axes;
  axes << u, v;
  const Eigen::Matrix2d inverse = axes.inverse();
  const auto angle = [&](const Point& x) {
    const Point own = inverse * (x - centre);
    return std::atan2(own.y(), own.x());
  };
  double begin = angle(a);
  double end = angle(b);
  if (is_left && end <= begin) end += 2 * pi;
  if (!is_left && end >= begin) end -= 2 * pi;
  return {Curve::Kind::arc, centre, u, v, begin, end, {}};
}

/// The piece as a curve, or what is wrong with it.
struct Traced {
  std::optional<Curve> curve;
  std::string what;
};
Traced traced(const Piece& piece, const Point& a, const Point& b) {
  const Point chord = b - a;
  const double length = chord.norm();
  if (!(length > 0.0)) return {std::nullopt, "it lies at the same place as the next one"};
  if (piece.kind == Piece::Kind::line) return {line(a, b), ""};
  const bool left = piece.kind == Piece::Kind::outwards;
  const Point normal = Point(-chord.y(), chord.x()) / length;
  if (piece.across > 0.0) {
    const Point u = piece.radius * Point(std::cos(piece.angle), std::sin(piece.angle));
    const Point v = piece.across * Point(-std::sin(piece.angle), std::cos(piece.angle));
    Curve curve = arc_between(piece.centre, u, v, a, b, left);
    const double miss = std::max((curve.start() - a).norm(), (curve.finish() - b).norm());
    if (miss > 1e-6 * std::max(piece.radius, piece.across))
      return {std::nullopt, fmt::format("its ellipse misses an end of the piece by {:.4g} mm", miss)};
    return {curve, ""};
  }
  const double rest = piece.radius * piece.radius - length * length / 4;
  if (!(rest >= -rounding * length * length))
    return {std::nullopt,
            fmt::format("its radius of {:.6g} mm is less than half the distance {:.6g} mm to the next point",
                        piece.radius, length)};
  const double offset = std::sqrt(std::max(rest, 0.0)) * (left == piece.is_longer ? -1.0 : 1.0);
  const Point centre = (a + b) / 2 + offset * normal;
  return {arc_between(centre, {piece.radius, 0}, {0, piece.radius}, a, b, left), ""};
}

/// A corner between straight pieces: how far its rounding reaches along both.
struct Rounding {
  double reach = 0.0;
  double turn = 0.0;  ///< rad, to the left positive
};
Rounding rounding_of(const Point& before, const Point& after, double radius) {
  const double turn = std::atan2(cross(before, after), before.dot(after));
  return {radius * std::tan(std::abs(turn) / 2), turn};
}

Curve corner_arc(const Point& corner, const Point& before, const Point& after, double radius,
                 const Rounding& r) {
  const double side = r.turn > 0 ? 1.0 : -1.0;
  const Point from = corner - r.reach * before.normalized();
  const Point to = corner + r.reach * after.normalized();
  const Point normal = side * Point(-before.y(), before.x()).normalized();
  return arc_between(from + radius * normal, {radius, 0}, {0, radius}, from, to, r.turn > 0);
}

/// Builds the chain piece by piece.
struct Builder {
  const std::vector<OutlinePoint>& points;
  ChainResult& result;
  Outline outline = {};
  std::vector<Curve> pieces = {};
  std::vector<Rounding> roundings = {};
  std::vector<std::size_t> arcs = {};  ///< points whose corner or piece is the raiser of that index

  void complain(std::size_t i, std::string what, std::string cure) {
    result.faults.push_back({i, fmt::format("point {}: {}", i + 1, what), std::move(cure)});
  }
  std::size_t next(std::size_t i) const { return (i + 1) % points.size(); }
  std::size_t last(std::size_t i) const { return (i + points.size() - 1) % points.size(); }

  bool trace_pieces() {
    for (std::size_t i = 0; i < points.size(); ++i) {
      const Traced found = traced(points[i].piece, points[i].at, points[next(i)].at);
      if (!found.curve) complain(i, found.what, "correct its position or its sizes");
      pieces.push_back(found.curve.value_or(Curve{}));
    }
    return result.faults.empty();
  }
  bool measure_corners() {
    roundings.resize(points.size());
    for (std::size_t i = 0; i < points.size(); ++i) {
      if (points[i].corner_radius == 0.0) continue;
      if (pieces[i].kind != Curve::Kind::line || pieces[last(i)].kind != Curve::Kind::line)
        complain(i, "a corner radius stands between two straight pieces only", "draw the rounding as an arc");
      else
        roundings[i] = rounding_of(pieces[last(i)].u, pieces[i].u, points[i].corner_radius);
    }
    for (std::size_t i = 0; i < points.size(); ++i) {
      const double room = pieces[i].u.norm() * (1 + rounding);
      if (pieces[i].kind == Curve::Kind::line && roundings[i].reach + roundings[next(i)].reach > room)
        complain(i,
                 fmt::format("the roundings at its ends take {:.6g} mm of the {:.6g} mm to the next point",
                             roundings[i].reach + roundings[next(i)].reach, room),
                 "make a corner radius smaller");
    }
    return result.faults.empty();
  }
  std::size_t edge_named(const std::string& written, std::size_t i) {
    const std::string name = written.empty() ? fmt::format("edge {}", i + 1) : written;
    const auto found = std::find(outline.edges.begin(), outline.edges.end(), name);
    if (found != outline.edges.end()) return static_cast<std::size_t>(found - outline.edges.begin());
    outline.edges.push_back(name);
    return outline.edges.size() - 1;
  }
  /// Corner i as an arc: part of the piece before it where it is convex.
  void add_corner(std::size_t i) {
    const OutlinePoint& v = points[i];
    if (v.corner_radius == 0.0 || roundings[i].turn == 0.0) return;
    Curve arc = corner_arc(v.at, pieces[last(i)].u, pieces[i].u, v.corner_radius, roundings[i]);
    arc.owner = {Owner::Kind::edge, edge_named(points[last(i)].edge, last(i))};
    if (roundings[i].turn < 0.0) {
      arc.owner = {Owner::Kind::raiser, outline.raisers.size()};
      Raiser raiser;
      raiser.kind = Raiser::Kind::fillet;
      raiser.name = v.corner;
      raiser.centre = arc.centre;
      raiser.radius = v.corner_radius;
      raiser.shape = fmt::format("fillet, radius {:.6g} mm", v.corner_radius);
      raiser.fillet = Fillet{FilletShape::circle, v.corner_radius};
      outline.raisers.push_back(raiser);
      arcs.push_back(i);
    }
    outline.curves.push_back(arc);
  }
  void add_piece(std::size_t i) {
    Curve curve = pieces[i];
    curve.owner = {Owner::Kind::edge, edge_named(points[i].edge, i)};
    if (curve.kind == Curve::Kind::line) {
      const Point along = curve.u.normalized();
      const Point from = curve.start() + roundings[i].reach * along;
      const Point to = curve.finish() - roundings[next(i)].reach * along;
      if ((to - from).dot(along) > rounding * curve.u.norm())
        outline.curves.push_back(line(from, to, curve.owner));
      return;
    }
    if (points[i].piece.kind == Piece::Kind::inwards) {
      curve.owner = {Owner::Kind::raiser, outline.raisers.size()};
      Raiser raiser;
      raiser.kind = Raiser::Kind::notch;
      raiser.name = points[i].corner;
      raiser.centre = curve.centre;
      const double small = std::min(curve.u.norm(), curve.v.norm());
      raiser.radius = small * small / std::max(curve.u.norm(), curve.v.norm());
      raiser.shape = fmt::format("inward arc, smallest radius {:.6g} mm", raiser.radius);
      outline.raisers.push_back(raiser);
      arcs.push_back(i);
    }
    outline.curves.push_back(curve);
  }
};

/// Moves the chain so that its bounding box is centred.
void centre(ChainResult& result, Outline& outline) {
  Eigen::AlignedBox2d box;
  for (const Curve& curve : outline.curves) {
    box.extend(curve.start());
    for (int axis = 0; axis < 2; ++axis)
      for (const double t : extremes(curve, axis)) box.extend(curve.at(t));
  }
  result.origin = -box.center();
  result.length = box.sizes().x();
  result.width = box.sizes().y();
  for (Curve& curve : outline.curves) curve.centre += result.origin;
  for (Raiser& raiser : outline.raisers) raiser.centre += result.origin;
}

}  // namespace

ChainResult chain_outline(std::vector<OutlinePoint> points) {
  ChainResult result;
  if (points.size() < 2) {
    result.faults.push_back({0, "an outline needs at least two points", "add [[outline]] tables"});
    return result;
  }
  const bool is_clockwise = points.size() > 2 && polygon(points) < 0.0;
  if (is_clockwise) points = reversed(points);
  Builder builder{points, result};
  const bool sound = builder.trace_pieces() && builder.measure_corners();
  if (is_clockwise)
    for (CutFault& fault : result.faults) fault.index = points.size() - 1 - fault.index;
  if (!sound) return result;
  for (std::size_t i = 0; i < points.size(); ++i) {
    builder.add_corner(i);
    builder.add_piece(i);
  }
  Outline& outline = builder.outline;
  tell_notches(outline);
  for (std::size_t i = 0; i < outline.raisers.size(); ++i)
    if (outline.raisers[i].name.empty())
      outline.raisers[i].name = fmt::format("{} {}", word(outline.raisers[i].kind), builder.arcs[i] + 1);
  centre(result, outline);
  place_raisers(outline, result.length, result.width);
  result.outline = std::move(outline);
  return result;
}

}  // namespace raiser::mesh
