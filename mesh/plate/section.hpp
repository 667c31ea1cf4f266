#pragma once

#include <optional>
#include <vector>

#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

/// Of a straight section through the plate. across: the line x = station,
/// positions on it are y; along: the line y = station, positions are x.
enum class Direction { across, along };

/// The part of a section that lies inside a hole: positions in mm, begin < end.
struct Chord {
  double begin = 0.0;
  double end = 0.0;
};

/// Where the line at `station` (mm) passes through the hole; nothing when it
/// misses or only touches it. Exact for every shape at any angle.
std::optional<Chord> chord(const Hole& hole, Direction direction, double station);

/// A piece of material on a section: positions in mm, begin < end. A side that
/// ends at a hole names it (index into Plate::holes), one that ends at the
/// plate's own edge names nothing.
struct Interval {
  double begin = 0.0;
  double end = 0.0;
  std::optional<std::size_t> hole_at_begin;
  std::optional<std::size_t> hole_at_end;
};

/// The pieces of material along a section of a legal plate, in rising order.
/// Empty when the station lies outside the plate.
std::vector<Interval> material_along(const Plate& plate, Direction direction, double station);

}  // namespace raiser::mesh
