#pragma once

#include <array>
#include <cstddef>
#include <string>
#include <vector>

#include "mesh/plate/curve.hpp"

namespace raiser::mesh {

/// A crack: a chain of straight segments of no width. Lengths in mm.
///
/// With a mouth it opens at an edge of the plate or of a hole, where its first
/// point lies, and has one tip at its last point; without one both ends are tips.
struct Crack {
  std::string name;
  std::vector<Point> points;  ///< at least two
  bool has_mouth = false;
  std::array<std::string, 2> tip_names;  ///< of the first and the last point; may be empty

  double length() const;
};

/// One tip of a crack.
struct CrackTip {
  std::size_t crack = 0;
  bool at_end = true;  ///< at the crack's last point, else at its first
  Point at = Point::Zero();
  Point direction = Point::UnitX();  ///< unit vector of straight growth, out of the crack
  std::string name;
};

/// The tips of all cracks in order: of one crack the first point's before the
/// last point's. A tip without a name of its own is called after its crack.
std::vector<CrackTip> tips(const std::vector<Crack>& cracks);

/// How a crack is named in messages: "crack 'a'", or "crack 2" for the second
/// one when it has no name.
std::string label(const std::vector<Crack>& cracks, std::size_t crack);

}  // namespace raiser::mesh
