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
/// misses or only touches it. Exact for every shape at any angle; a drawn hole is
/// taken from its first to its last edge there.
std::optional<Chord> chord(const Hole& hole, Direction direction, double station);

/// The same for a hole of any shape: where it turns back there are several.
std::vector<Chord> chords(const Hole& hole, Direction direction, double station);

/// A piece of material on a section: positions in mm, begin < end, and what
/// bounds it there.
struct Interval {
  double begin = 0.0;
  double end = 0.0;
  Owner at_begin;
  Owner at_end;

  std::optional<std::size_t> raiser_at_begin() const { return raiser(at_begin); }
  std::optional<std::size_t> raiser_at_end() const { return raiser(at_end); }

 private:
  static std::optional<std::size_t> raiser(const Owner& owner) {
    return owner.kind == Owner::Kind::raiser ? std::optional(owner.index) : std::nullopt;
  }
};

/// The pieces of material along a section of a legal plate, in rising order.
/// Empty when the station lies outside the plate. Where the outline jumps at
/// the station, the narrower side counts.
std::vector<Interval> material_along(const Plate& plate, Direction direction, double station);

/// The same for the plate without its holes and notches, on which gross
/// sections stand. Where the outline jumps, the wider side counts.
std::vector<Interval> gross_along(const Plate& plate, Direction direction, double station);

/// Figures of a section, for a thickness of 1 mm.
struct SectionShape {
  double length = 0.0;    ///< mm, of all pieces together
  double centroid = 0.0;  ///< mm
  double inertia = 0.0;   ///< mm^3, second moment about the centroid
  double low = 0.0;       ///< mm, where the first piece begins
  double high = 0.0;      ///< mm, where the last piece ends
};
SectionShape shape_of(const std::vector<Interval>& pieces);

}  // namespace raiser::mesh
