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

Traction on_edge(const Plate& plate, const Load& load) {
  if (load.edge >= mesh::edge_names(plate).size())
    throw std::invalid_argument("an edge load must name an edge of the plate");
  return [stress = load.stress, along = load.along, edge = Owner{Owner::Kind::edge, load.edge}](
             const Owner& owner, const Point&, const Point& n) -> Point {
    return owner == edge ? edge_traction(stress, along, n) : Point::Zero();
  };
}

}  // namespace

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
    case Load::Kind::edge:
      break;
  }
  return on_edge(plate, load);
}

}  // namespace raiser::solver
