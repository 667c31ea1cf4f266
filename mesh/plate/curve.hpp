#pragma once

#include <Eigen/Core>
#include <cstddef>
#include <vector>

namespace raiser::mesh {

/// A position in the plate's plane, in mm. The origin is the middle of the
/// plate's bounding box, x runs along its length and y across it.
using Point = Eigen::Vector2d;

/// Which part of the plate a curve, and later an element edge, belongs to.
struct Owner {
  /// edge: one of edge_names(). raiser: one of raisers(). crack: a crack's
  /// face. mirror_x, mirror_y: no boundary, the line of a mirror. inner: no
  /// boundary, a line through the material.
  enum class Kind { edge, raiser, crack, mirror_x, mirror_y, inner };
  Kind kind = Kind::edge;
  std::size_t index = 0;  ///< into the list of that kind
  bool operator==(const Owner&) const = default;
};

/// A directed smooth piece of boundary with the material on its left.
/// A straight line is centre + u t; an elliptical arc is
/// centre + u cos t + v sin t. The parameter t runs from `begin` to `end`,
/// which may be the smaller of the two.
struct Curve {
  enum class Kind { line, arc };
  Kind kind = Kind::line;
  Point centre = Point::Zero();
  Point u = Point::Zero();
  Point v = Point::Zero();
  double begin = 0.0;
  double end = 1.0;
  Owner owner;

  Point at(double t) const;
  Point derivative(double t) const;            ///< dx/dt, mm
  double radius_of_curvature(double t) const;  ///< mm; infinity for a line
  Point start() const { return at(begin); }
  Point finish() const { return at(end); }
};

/// A closed chain of curves, each starting where the one before ends.
using Loop = std::vector<Curve>;

/// The straight line between two points.
Curve line(const Point& from, const Point& to, const Owner& owner = {});

/// Unit vector along the curve at t, in the curve's direction.
Point direction(const Curve& curve, double t);

/// Unit normal out of the material at t.
Point outward(const Curve& curve, double t);

/// The part of the curve between two of its parameters, in that direction.
Curve part(const Curve& curve, double begin, double end);

/// The curve reflected about x = 0 (flip_x) and y = 0 (flip_y) and, where that
/// turns the material to its right, run the other way.
Curve reflected(const Curve& curve, bool flip_x, bool flip_y);

/// Where a curve comes closest to a point.
struct Nearest {
  double parameter = 0.0;
  double distance = 0.0;  ///< mm
};
Nearest nearest(const Curve& curve, const Point& x);

/// The parameters strictly inside the curve where its coordinate `axis`
/// (0: x, 1: y) is `value`, in the curve's direction.
std::vector<double> crossings(const Curve& curve, int axis, double value);

/// The parameters strictly inside the curve where its coordinate `axis` is
/// largest or smallest, in the curve's direction. None for a line.
std::vector<double> extremes(const Curve& curve, int axis);

}  // namespace raiser::mesh
