#include "solver/elasticity/outer_edge.hpp"

#include <algorithm>
#include <cmath>
#include <vector>

#include "mesh/legendre.hpp"

namespace raiser::solver {

namespace {

// Places closer than this part of the plate's size are one.
constexpr double rounding = 1e-11;

double size_of(const Plate& plate) { return std::max(plate.length, plate.width); }

bool faces(const mesh::Curve& curve, int axis, double sign, double position, double tolerance) {
  return curve.owner.kind == Owner::Kind::edge && curve.kind == mesh::Curve::Kind::line &&
         std::abs(curve.start()[axis] - position) <= tolerance &&
         std::abs(curve.finish()[axis] - position) <= tolerance &&
         mesh::outward(curve, curve.begin)[axis] * sign > 0.5;
}

std::optional<LoadedEnd> end_of(const Plate& plate, const mesh::Loop& curves, int axis, double sign) {
  LoadedEnd end;
  end.position = sign * 0.5 * (axis == 0 ? plate.length : plate.width);
  std::vector<mesh::Interval> pieces;
  for (const mesh::Curve& curve : curves) {
    if (!faces(curve, axis, sign, end.position, rounding * size_of(plate))) continue;
    const double a = curve.start()[1 - axis];
    const double b = curve.finish()[1 - axis];
    pieces.push_back({std::min(a, b), std::max(a, b), {}, {}});
  }
  if (pieces.empty()) return std::nullopt;
  std::sort(pieces.begin(), pieces.end(), [](const auto& a, const auto& b) { return a.begin < b.begin; });
  const mesh::SectionShape shape = mesh::shape_of(pieces);
  end.area = plate.thickness * shape.length;
  end.centroid = shape.centroid;
  end.inertia = plate.thickness * shape.inertia;
  end.reach = std::max(shape.high - shape.centroid, shape.centroid - shape.low);
  return end;
}

}  // namespace

Point edge_traction(double stress, double along, const Point& n) {
  return {stress * n.x() - along * n.y(), stress * n.y() + along * n.x()};
}

mesh::Loop beyond(const mesh::Loop& curves, int axis, double station) {
  mesh::Loop result;
  for (const mesh::Curve& curve : curves) {
    std::vector<double> stops = mesh::crossings(curve, axis, station);
    stops.push_back(curve.end);
    double from = curve.begin;
    for (const double to : stops) {
      if (curve.at((from + to) / 2)[axis] >= station) result.push_back(mesh::part(curve, from, to));
      from = to;
    }
  }
  return result;
}

Resultant integrate(const mesh::Loop& curves, double thickness, const Traction& traction,
                    const Point& about) {
  static const mesh::GaussRule on_line = mesh::gauss_legendre(2);
  static const mesh::GaussRule on_arc = mesh::gauss_legendre(24);
  Resultant sum;
  for (const mesh::Curve& curve : curves) {
    const mesh::GaussRule& rule = curve.kind == mesh::Curve::Kind::line ? on_line : on_arc;
    const double half = (curve.end - curve.begin) / 2;
    for (std::size_t q = 0; q < rule.points.size(); ++q) {
      const double t = (curve.begin + curve.end) / 2 + half * rule.points[q];
      const Point x = curve.at(t);
      const double area = thickness * rule.weights[q] * std::abs(half) * curve.derivative(t).norm();
      const Point force = area * traction(curve.owner, x, mesh::outward(curve, t));
      const Point arm = x - about;
      sum.force += force;
      sum.moment += arm.x() * force.y() - arm.y() * force.x();
    }
  }
  return sum;
}

double LoadedEnds::line_of_action() const {
  if (std::abs(high.area - low.area) <= 1e-9 * high.area) return 0.5 * (high.centroid + low.centroid);
  return reference().centroid;
}

std::optional<LoadedEnds> loaded_ends(const Plate& plate, int axis) {
  const mesh::Loop curves = mesh::outline_of(plate).curves;
  const auto low = end_of(plate, curves, axis, -1.0);
  const auto high = end_of(plate, curves, axis, 1.0);
  if (!low || !high) return std::nullopt;
  return LoadedEnds{*low, *high};
}

}  // namespace raiser::solver
