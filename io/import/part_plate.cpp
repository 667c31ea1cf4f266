#include "io/import/part_plate.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>

#include "io/import/curve_tools.hpp"
#include "io/import/shapes.hpp"
#include "mesh/plate/section.hpp"

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Loop;
using mesh::Owner;
using mesh::Point;

std::string place(const Point& p) { return fmt::format("({:.6g}, {:.6g}) mm", p.x(), p.y()); }

/// Distance from x to a curve, from 64 chords.
double distance(const Curve& curve, const Point& x) {
  constexpr int count = 64;
  double least = std::numeric_limits<double>::infinity();
  Point before = start(curve);
  for (int k = 1; k <= count; ++k) {
    const Point here = curve.at(curve.begin + (curve.end - curve.begin) * k / count);
    const Point chord = here - before;
    const double t = std::clamp((x - before).dot(chord) / std::max(chord.squaredNorm(), 1e-300), 0.0, 1.0);
    least = std::min(least, (before + t * chord - x).norm());
    before = here;
  }
  return least;
}

double distance(const Loop& loop, const Point& x) {
  double least = std::numeric_limits<double>::infinity();
  for (const Curve& curve : loop) least = std::min(least, distance(curve, x));
  return least;
}

/// Names by position: those given go to the nearest thing.
template <class Things, class Default>
std::vector<std::string> names_for(const Things& things, const std::vector<PlaceName>& given,
                                   const Point& centre, std::string_view noun, Default otherwise,
                                   std::vector<ContourFault>& faults) {
  std::vector<std::string> names(things.size());
  for (const PlaceName& name : given) {
    if (things.empty()) {
      faults.push_back(
          {0, fmt::format("there is no {} to be called '{}'", noun, name.name), "remove the name"});
      continue;
    }
    std::size_t best = 0;
    for (std::size_t k = 1; k < things.size(); ++k)
      if (distance(things[k], name.near - centre) < distance(things[best], name.near - centre)) best = k;
    if (!names[best].empty())
      faults.push_back({0,
                        fmt::format("the {} nearest to {} is called both '{}' and '{}'", noun,
                                    place(name.near), names[best], name.name),
                        "move one of the places nearer to what it means"});
    names[best] = name.name;
  }
  for (std::size_t k = 0; k < names.size(); ++k)
    if (names[k].empty()) names[k] = otherwise(k);
  return names;
}

Loop from_lowest(Loop loop) {
  const auto lower = [](const Curve& a, const Curve& b) {
    const Point p = start(a), q = start(b);
    const double slack = 1e-9 * (p.norm() + q.norm());
    return std::abs(p.y() - q.y()) > slack ? p.y() < q.y() : p.x() < q.x();
  };
  std::rotate(loop.begin(), std::min_element(loop.begin(), loop.end(), lower), loop.end());
  return loop;
}

bool is_rectangle(const Loop& loop, double size) {
  if (loop.size() != 4) return false;
  return std::all_of(loop.begin(), loop.end(), [size](const Curve& c) {
    return c.kind == Curve::Kind::line && std::min(std::abs(c.u.x()), std::abs(c.u.y())) <= 1e-9 * size;
  });
}

/// Turning of a curve to the left, rad.
double turning(const Curve& curve) {
  const double sense = curve.u.x() * curve.v.y() - curve.u.y() * curve.v.x() > 0 ? 1.0 : -1.0;
  return curve.kind == Curve::Kind::line ? 0.0 : sense * (curve.end - curve.begin);
}

/// A whole turn in quarters.
Loop quarters(const Loop& loop) {
  if (loop.size() != 1) return loop;
  Loop result;
  for (int k = 0; k < 4; ++k) {
    Curve piece = loop.front();
    const double step = (piece.end - piece.begin) / 4;
    piece.begin += k * step;
    piece.end = piece.begin + step;
    result.push_back(piece);
  }
  return result;
}

/// Material across x a little beyond an end of an arc, away from the arc.
double width_beyond(const mesh::Plate& plate, const Point& end, const Point& other) {
  const double step = 1e-3 * (end - other).norm() * (end.x() >= other.x() ? 1.0 : -1.0);
  return mesh::shape_of(mesh::gross_along(plate, mesh::Direction::across, end.x() + step)).length;
}

mesh::Raiser raiser_of(const Curve& arc, const std::string& number, const mesh::Plate& plate) {
  mesh::Raiser raiser;
  raiser.centre = arc.centre;
  raiser.radius = std::min(arc.radius_of_curvature(arc.begin), arc.radius_of_curvature(arc.end));
  const bool is_notch = turning(arc) < -2.1;
  raiser.kind = is_notch ? mesh::Raiser::Kind::notch : mesh::Raiser::Kind::fillet;
  raiser.name = fmt::format("{} {}", mesh::word(raiser.kind), number);
  raiser.shape = fmt::format("arc of radius {:.6g} mm, turning by {:.4g} deg", raiser.radius,
                             -turning(arc) * 57.29577951308232);
  const Point a = start(arc);
  const Point b = finish(arc);
  if (is_notch) {
    raiser.root = raiser.mouth = arc.at((arc.begin + arc.end) / 2);
  } else {
    const bool is_a_narrow = width_beyond(plate, a, b) < width_beyond(plate, b, a);
    raiser.root = is_a_narrow ? a : b;
    raiser.mouth = is_a_narrow ? b : a;
  }
  return raiser;
}

/// First every curve an edge; then arcs that cut into the material raisers.
mesh::Outline outline_of(Loop loop, const std::vector<std::string>& names, mesh::Plate plate) {
  mesh::Outline outline;
  outline.curves = std::move(loop);
  outline.edges = names;
  for (std::size_t k = 0; k < outline.curves.size(); ++k) outline.curves[k].owner = {Owner::Kind::edge, k};
  plate.outline = outline;
  mesh::Outline result = outline;
  result.edges.clear();
  for (std::size_t k = 0; k < outline.curves.size(); ++k) {
    Curve& curve = result.curves[k];
    if (turning(curve) < -1e-6) {
      curve.owner = {Owner::Kind::raiser, result.raisers.size()};
      result.raisers.push_back(raiser_of(curve, fmt::format("{}", result.raisers.size() + 1), plate));
    } else {
      curve.owner = {Owner::Kind::edge, result.edges.size()};
      result.edges.push_back(names[k]);
    }
  }
  return result;
}

}  // namespace

PartPlate plate_of(const Part& part, double thickness, const std::vector<PlaceName>& edges,
                   const std::vector<PlaceName>& holes) {
  PartPlate result;
  const double size = part.size.maxCoeff();
  mesh::Plate plate{part.size.x(), part.size.y(), thickness, {}, std::nullopt};
  const auto hole_names = names_for(
      part.inner, holes, part.centre, "hole", [](std::size_t k) { return fmt::format("hole {}", k + 1); },
      result.faults);
  for (std::size_t k = 0; k < part.inner.size(); ++k) {
    auto hole = hole_of(part.inner[k], 1e-6 * size);
    if (!hole) {
      const auto box = box_of(part.inner[k]);
      result.faults.push_back({0,
                               fmt::format("the hole about {} of the drawing is no circle, ellipse, slot or "
                                           "rounded rectangle",
                                           place((box[0] + box[1]) / 2 + part.centre)),
                               "only such holes are imported: draw it as one of them"});
      continue;
    }
    hole->name = hole_names[k];
    plate.holes.push_back(*hole);
  }
  const Loop outer = from_lowest(quarters(part.outer));
  const auto edge_names = names_for(
      outer, edges, part.centre, "edge", [](std::size_t k) { return fmt::format("edge {}", k + 1); },
      result.faults);
  if (!edges.empty() || !is_rectangle(outer, size)) plate.outline = outline_of(outer, edge_names, plate);
  if (result.faults.empty()) result.plate = std::move(plate);
  return result;
}

}  // namespace raiser::io
