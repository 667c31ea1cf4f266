#pragma once

#include <cstddef>
#include <vector>

#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

/// Which part of the plate a curve, and later an element edge, belongs to.
struct Owner {
  enum class Kind { right, top, left, bottom, hole, mirror_x, mirror_y };
  Kind kind = Kind::right;
  std::size_t hole = 0;  ///< index into Plate::holes when kind is hole
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
};

/// A closed chain of curves, each starting where the one before ends.
using Loop = std::vector<Curve>;

/// The material as a set of loops: the outer one runs anticlockwise, the holes
/// clockwise.
struct Region {
  std::vector<Loop> loops;
};

/// Outline and holes of a legal plate as curves. loops[0] is the outline,
/// starting at its lower left corner; loops[1 + i] is hole i.
Region trace(const Plate& plate);

/// Which mirror lines of the rectangle the plate with its holes shares:
/// `x`: (x, y) -> (-x, y), `y`: (x, y) -> (x, -y).
struct Mirrors {
  bool x = false;
  bool y = false;
  bool operator==(const Mirrors&) const = default;
};

/// The mirror lines under which the set of holes maps onto itself, within
/// 1e-12 of the plate's size.
Mirrors mirrors(const Plate& plate);

/// Index of the hole that the mirror maps hole `hole` to.
/// Throws std::invalid_argument when the plate does not have that mirror.
std::size_t mirror_image(const Plate& plate, std::size_t hole, Mirrors mirror);

/// The part of the region with x >= 0 (mirrors.x) and y >= 0 (mirrors.y). The
/// new straight pieces on the mirror lines are owned by mirror_x or mirror_y.
Region cut(const Region& region, Mirrors mirrors);

}  // namespace raiser::mesh
