#include "io/import/dxf_entity.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Point;
constexpr double pi = std::numbers::pi;

EntityCurves broken(std::string what) {
  return {{}, std::move(what), "mend it in the drawing, or put it on a layer that is not imported", {}};
}

EntityCurves missing(std::string_view kind, int code) {
  return broken(fmt::format("the {} has no number, or none that is finite, in group {}", kind, code));
}

Curve line(const Point& from, const Point& to) {
  return {Curve::Kind::line, from, to - from, Point::Zero(), 0.0, 1.0, {}};
}

/// An arc that starts at centre + u and turns by `sweep`.
Curve arc(const Point& centre, const Point& u, const Point& v, double begin, double end) {
  return {Curve::Kind::arc, centre, u, v, begin, end, {}};
}

Point left_of(const Point& p) { return {-p.y(), p.x()}; }

/// A point in the groups code and code + 10.
std::optional<Point> point(const Record& entity, int code) {
  const auto x = number_of(entity, code);
  const auto y = number_of(entity, code + 10);
  if (!x || !y) return std::nullopt;
  return Point(*x, *y);
}

enum class Facing { up, down, aslant };
Facing facing(const Record& entity) {
  const double x = number_of(entity, 210).value_or(0.0);
  const double y = number_of(entity, 220).value_or(0.0);
  const double z = number_of(entity, 230).value_or(1.0);
  if (std::hypot(x, y) > 1e-9 * std::abs(z)) return Facing::aslant;
  return z > 0 ? Facing::up : Facing::down;
}

/// Curves given in axes that look down: x runs the other way.
void turn_over(std::vector<Curve>& curves) {
  for (Curve& c : curves)
    for (Point* p : {&c.centre, &c.u, &c.v}) p->x() = -p->x();
}

EntityCurves of_line(const Record& entity) {
  const auto from = point(entity, 10);
  const auto to = point(entity, 11);
  if (!from) return missing("LINE", 10);
  if (!to) return missing("LINE", 11);
  return {
      {line(*from, *to)}, "", "", {number_of(entity, 30).value_or(0.0), number_of(entity, 31).value_or(0.0)}};
}

EntityCurves of_circle(const Record& entity, bool is_arc) {
  const std::string_view kind = is_arc ? "ARC" : "CIRCLE";
  const auto centre = point(entity, 10);
  const auto radius = number_of(entity, 40);
  if (!centre) return missing(kind, 10);
  if (!radius) return missing(kind, 40);
  if (!(*radius > 0)) return broken(fmt::format("the {} has a radius of {}", kind, *radius));
  double begin = 0.0;
  double end = 2 * pi;
  if (is_arc) {
    const auto first = number_of(entity, 50);
    const auto last = number_of(entity, 51);
    if (!first) return missing(kind, 50);
    if (!last) return missing(kind, 51);
    begin = std::remainder(*first, 360.0) * pi / 180;
    end = std::remainder(*last, 360.0) * pi / 180;
    if (end <= begin + 1e-12) end += 2 * pi;
  }
  const Point u = *radius * Point(std::cos(begin), std::sin(begin));
  return {{arc(*centre, u, left_of(u), 0.0, end - begin)}, "", "", {number_of(entity, 30).value_or(0.0)}};
}

EntityCurves of_ellipse(const Record& entity) {
  const auto centre = point(entity, 10);
  const auto major = point(entity, 11);
  const auto ratio = number_of(entity, 40);
  if (!centre) return missing("ELLIPSE", 10);
  if (!major) return missing("ELLIPSE", 11);
  if (!ratio) return missing("ELLIPSE", 40);
  if (!(major->norm() > 0) || !(*ratio > 1e-6) || *ratio > 1e6)
    return broken(fmt::format("the ELLIPSE has a major axis of {} and a ratio of {}", major->norm(), *ratio));
  const double begin = std::remainder(number_of(entity, 41).value_or(0.0), 2 * pi);
  const double raw_end = number_of(entity, 42).value_or(2 * pi);
  double end = std::remainder(raw_end, 2 * pi);
  if (end <= begin + 1e-9) end += 2 * pi;
  const double side = facing(entity) == Facing::down ? -1.0 : 1.0;
  return {{arc(*centre, *major, side * *ratio * left_of(*major), begin, end)},
          "",
          "",
          {number_of(entity, 30).value_or(0.0),
           number_of(entity, 31).value_or(0.0) + number_of(entity, 30).value_or(0.0)}};
}

struct Vertex {
  Point at;
  double bulge = 0.0;
};

std::vector<Curve> chain(const std::vector<Vertex>& vertices, bool is_closed) {
  std::vector<Curve> curves;
  const std::size_t count = vertices.size();
  for (std::size_t k = 0; k + 1 < count || (is_closed && k < count); ++k) {
    const Vertex& from = vertices[k];
    const Vertex& to = vertices[(k + 1) % count];
    if (from.at != to.at) curves.push_back(bulge(from.at, to.at, from.bulge));
  }
  return curves;
}

EntityCurves of_light_polyline(const Record& entity) {
  std::vector<Vertex> vertices;
  for (const Tag& tag : entity.tags) {
    if (tag.code != 10 && tag.code != 20 && tag.code != 42) continue;
    const auto value = number(tag.value);
    if (!value) return missing("LWPOLYLINE", tag.code);
    if (tag.code == 10) vertices.push_back({Point(*value, 0.0), 0.0});
    if (vertices.empty()) return broken("the LWPOLYLINE has a y or a bulge before its first x");
    if (tag.code == 20) vertices.back().at.y() = *value;
    if (tag.code == 42) vertices.back().bulge = *value;
  }
  return {chain(vertices, (flags_of(entity, 70) & 1U) != 0), "", "", {number_of(entity, 38).value_or(0.0)}};
}

}  // namespace

mesh::Curve bulge(const Point& a, const Point& b, double bulge) {
  if (std::abs(bulge) < 1e-9) return line(a, b);
  const Point chord = b - a;
  const Point centre = 0.5 * (a + b) + (1 - bulge * bulge) / (4 * bulge) * left_of(chord);
  const Point u = a - centre;
  return arc(centre, u, left_of(u), 0.0, 4 * std::atan(bulge));
}

EntityCurves curves_of(const Record& entity) {
  if (facing(entity) == Facing::aslant)
    return {{},
            fmt::format("the {} lies in a plane that is not x-y", entity.kind),
            "only planar drawings are imported: project the part onto x-y in the drawing",
            {}};
  EntityCurves result;
  if (entity.kind == "LINE") return of_line(entity);
  if (entity.kind == "ELLIPSE") return of_ellipse(entity);
  if (entity.kind == "LWPOLYLINE")
    result = of_light_polyline(entity);
  else
    result = of_circle(entity, entity.kind == "ARC");
  if (facing(entity) == Facing::down) turn_over(result.curves);
  return result;
}

EntityCurves curves_of_polyline(const Record& head, std::span<const Record> vertices) {
  const unsigned flags = flags_of(head, 70);
  if ((flags & (8U | 16U | 64U)) != 0 || facing(head) == Facing::aslant)
    return {{},
            "the POLYLINE is one in space, or a mesh",
            "only planar drawings are imported: draw the outline of the part in x-y",
            {}};
  if ((flags & (2U | 4U)) != 0)
    return {{},
            "the POLYLINE is fitted by a spline or smoothed",
            "turn it into lines and arcs in the drawing: its edge would be a row of small corners",
            {}};
  std::vector<Vertex> chain_of;
  for (const Record& vertex : vertices) {
    const auto at = point(vertex, 10);
    if (!at) return missing("VERTEX", 10);
    chain_of.push_back({*at, number_of(vertex, 42).value_or(0.0)});
  }
  EntityCurves result{chain(chain_of, (flags & 1U) != 0), "", "", {number_of(head, 30).value_or(0.0)}};
  if (facing(head) == Facing::down) turn_over(result.curves);
  return result;
}

}  // namespace raiser::io
