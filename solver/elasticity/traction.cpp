#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "solver/elasticity/load.hpp"
#include "solver/elasticity/outer_edge.hpp"

namespace raiser::solver {

namespace {

// A stress on one end, linear along it.
struct OnEnd {
  LoadedEnd end;
  int axis = 0;
  double sign = 1.0;       // of the end's outward normal
  double tolerance = 0.0;  // mm
  double mean = 0.0;       // MPa
  double outer = 0.0;      // MPa more at end.reach from the centroid, towards larger coordinates

  bool holds(const Owner& owner, const Point& x, const Point& n) const {
    return owner.kind == Owner::Kind::edge && n[axis] * sign > 0.5 &&
           std::abs(x[axis] - end.position) <= tolerance;
  }
  double stress(const Point& x) const { return mean + outer * ((x[1 - axis] - end.centroid) / end.reach); }
};

LoadedEnds ends_of(const Plate& plate, int axis) {
  if (const auto ends = loaded_ends(plate, axis)) return *ends;
  throw std::invalid_argument(axis == 0 ? "the outline has no straight edge across x at both of its ends"
                                        : "the outline has no straight edge along x at both of its sides");
}

// A tension along the ends' common line, or a bending moment.
Traction on_ends(const Plate& plate, int axis, double stress, bool bends) {
  const LoadedEnds ends = ends_of(plate, axis);
  const LoadedEnd& reference = ends.reference();
  const double tolerance = 1e-9 * (plate.length + plate.width);
  const auto on = [&](const LoadedEnd& end, double sign) {
    OnEnd result{end, axis, sign, tolerance, 0.0, 0.0};
    if (bends) {
      result.outer = stress * (reference.modulus() / end.modulus());
      return result;
    }
    result.mean = stress * (reference.area / end.area);
    const double offset = ends.line_of_action() - end.centroid;
    if (std::abs(offset) > tolerance) result.outer = stress * reference.area * offset / end.modulus();
    return result;
  };
  return [low = on(ends.low, -1.0), high = on(ends.high, 1.0)](const Owner& owner, const Point& x,
                                                               const Point& n) -> Point {
    for (const OnEnd* end : {&low, &high})
      if (end->holds(owner, x, n)) return end->stress(x) * n;
    return Point::Zero();
  };
}

/// A traction that is linear along a straight edge, on a part of it.
Traction along_line(const Plate& plate, const Load& load) {
  const auto line = straight_edge(plate, load.edge);
  if (!line) throw std::invalid_argument("only a straight edge can be loaded in part or linearly");
  const double from = load.from.value_or(0.0);
  const double to = load.to.value_or(line->length);
  const double slack = 1e-9 * line->length;
  if (!(from >= -slack && to <= line->length + slack && to - from > slack))
    throw std::invalid_argument("the loaded part of an edge must have a length and lie on it");
  const double slope = (load.stress_to.value_or(load.stress) - load.stress) / (to - from);
  const double along_slope = (load.along_to.value_or(load.along) - load.along) / (to - from);
  return
      [=, line = *line, stress = load.stress, along = load.along, edge = Owner{Owner::Kind::edge, load.edge}](
          const Owner& owner, const Point& x, const Point& n) -> Point {
        const double s = line.distance(x) - from;
        if (!(owner == edge) || s < 0.0 || s > to - from) return Point::Zero();
        return edge_traction(stress + slope * s, along + along_slope * s, n);
      };
}

/// What a pin presses with, by arc: a cosine as long as nothing was found.
std::vector<BearingPressure> bearing(const Plate& plate, const Load& load) {
  if (!load.bearing.empty()) return load.bearing;
  const double radius = plate.holes[load.hole].length / 2;
  return {cosine_pressure(load.force, load.direction, radius, plate.thickness)};
}

Traction of_pin(const Plate& plate, const Load& load) {
  if (load.hole >= plate.holes.size()) throw std::invalid_argument("a pin must name a hole of the plate");
  const mesh::Hole& hole = plate.holes[load.hole];
  if (hole.shape != mesh::HoleShape::circle) throw std::invalid_argument("a pin sits in a round hole");
  return
      [pressures = bearing(plate, load), centre = hole.centre, edge = Owner{Owner::Kind::raiser, load.hole}](
          const Owner& owner, const Point& x, const Point& n) -> Point {
        if (!(owner == edge)) return Point::Zero();
        const double angle = std::atan2(x.y() - centre.y(), x.x() - centre.x());
        double sum = 0.0;
        for (const BearingPressure& pressure : pressures) sum += pressure.at(angle);
        return -sum * n;
      };
}

Traction on_edge(const Plate& plate, const Load& load) {
  if (load.edge >= mesh::edge_names(plate).size())
    throw std::invalid_argument("an edge load must name an edge of the plate");
  if (load.from || load.to || load.stress_to || load.along_to) return along_line(plate, load);
  return [stress = load.stress, along = load.along, edge = Owner{Owner::Kind::edge, load.edge}](
             const Owner& owner, const Point&, const Point& n) -> Point {
    return owner == edge ? edge_traction(stress, along, n) : Point::Zero();
  };
}

}  // namespace

bool needs_balance(const Load& load) { return load.kind == Load::Kind::edge || load.kind == Load::Kind::pin; }

double largest_stress(const Plate& plate, const Load& load) {
  if (load.kind == Load::Kind::pin) return load.force / (plate.holes.at(load.hole).length * plate.thickness);
  return std::max({std::abs(load.stress), std::abs(load.along), std::abs(load.stress_to.value_or(0.0)),
                   std::abs(load.along_to.value_or(0.0))});
}

std::vector<mesh::Break> breaks(const Owner& hole, const Point& centre, double radius,
                                const BearingPressure& pressure) {
  if (pressure.form == BearingPressure::Form::ring) return {};
  constexpr double share = 0.04;  // of half the arc: the length of the sides at its ends
  const double size = share * 0.5 * (pressure.end - pressure.begin) * radius;
  std::vector<mesh::Break> result;
  for (const double angle : {pressure.begin, pressure.end})
    result.push_back({hole, centre + radius * Point(std::cos(angle), std::sin(angle)), size});
  return result;
}

std::vector<mesh::Break> breaks(const Plate& plate, const Load& load) {
  if (load.kind == Load::Kind::pin) {
    const mesh::Hole& hole = plate.holes.at(load.hole);
    std::vector<mesh::Break> result;
    for (const BearingPressure& pressure : bearing(plate, load))
      for (const mesh::Break& at :
           breaks({Owner::Kind::raiser, load.hole}, hole.centre, hole.length / 2, pressure))
        result.push_back(at);
    return result;
  }
  const auto line = load.kind == Load::Kind::edge ? straight_edge(plate, load.edge) : std::nullopt;
  if (!line) return {};
  constexpr double share = 0.02;  // of the loaded part: the length of the sides at its ends
  const double size = share * (load.to.value_or(line->length) - load.from.value_or(0.0));
  std::vector<mesh::Break> result;
  for (const auto& end : {load.from, load.to})
    if (end && *end > 0.0 && *end < line->length)
      result.push_back({{Owner::Kind::edge, load.edge}, line->at(*end), size});
  return result;
}

Traction traction(const Plate& plate, const Load& load) {
  const double s = load.stress;
  switch (load.kind) {
    case Load::Kind::tension:
      return on_ends(plate, 0, s, false);
    case Load::Kind::transverse:
      return on_ends(plate, 1, s, false);
    case Load::Kind::bending:
      return on_ends(plate, 0, s, true);
    case Load::Kind::shear:
      return [s](const Owner& owner, const Point&, const Point& n) -> Point {
        return (owner.kind == Owner::Kind::edge ? s : 0.0) * Point(n.y(), n.x());
      };
    case Load::Kind::pressure:
      if (load.hole >= plate.holes.size())
        throw std::invalid_argument("a pressure load must name a hole of the plate");
      return [s, hole = Owner{Owner::Kind::raiser, load.hole}](const Owner& owner, const Point&,
                                                               const Point& n) -> Point {
        return (owner == hole ? -s : 0.0) * n;
      };
    case Load::Kind::face_pressure:
      if (load.crack >= plate.cracks.size())
        throw std::invalid_argument("a face pressure must name a crack of the plate");
      return [s, crack = Owner{Owner::Kind::crack, load.crack}](const Owner& owner, const Point&,
                                                                const Point& n) -> Point {
        return (owner == crack ? -s : 0.0) * n;
      };
    case Load::Kind::pin:
      return of_pin(plate, load);
    case Load::Kind::edge:
      break;
  }
  return on_edge(plate, load);
}

}  // namespace raiser::solver
