#pragma once

#include <string>
#include <vector>

#include "mesh/plate/build.hpp"

namespace raiser::mesh {

/// A step in the width of a flat bar. The face stands at x = `at`; the part of
/// `width` lies on its narrow side.
struct Shoulder {
  enum class Sides { both, top, bottom };
  std::string name;
  double at = 0.0;     ///< mm, from the middle of the bar's length
  double width = 0.0;  ///< mm, of the narrow part
  bool narrow_is_right = true;
  Sides sides = Sides::both;  ///< which edges step; the other one runs through
  Fillet fillet;
};

/// A bar of the given length and largest width with shoulders. Each fillet is a
/// raiser named after its shoulder and, where both edges step, its side. Edges:
/// right, top, left, bottom where they do not step; pieces and faces of a
/// stepped edge are named top 1, top 2, ... from the left.
OutlineResult stepped_bar(double length, double width, const std::vector<Shoulder>& shoulders);

}  // namespace raiser::mesh
