#pragma once

#include <optional>
#include <span>
#include <vector>

#include "mesh/mesh.hpp"
#include "mesh/region/region.hpp"
#include "solver/elasticity/hooke_law.hpp"

namespace raiser::solver {

using mesh::Point;

/// Displacement and stress at one point.
struct FieldValue {
  Point point = Point::Zero();         ///< mm
  Point displacement = Point::Zero();  ///< mm
  Stress stress;                       ///< MPa, straight from the displacement, not smoothed
};

/// The solved field of one load combination over the whole plate, mirror
/// images included. A cell is one curved triangle; its reference coordinates
/// (r, s) lie in r, s >= 0, r + s <= 1, corners (0,0), (1,0), (0,1) in
/// anticlockwise order. Immutable; safe to read from several threads.
class Field {
 public:
  std::size_t cells() const;
  int degree() const;

  /// Values at the same reference points of cell `cell`, in order.
  std::vector<FieldValue> sample(std::size_t cell, std::span<const Point> reference) const;

  /// Value at a point of the plate; nothing outside the material.
  std::optional<FieldValue> at(const Point& x) const;
};

}  // namespace raiser::solver
