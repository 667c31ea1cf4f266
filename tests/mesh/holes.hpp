#pragma once

#include "mesh/region/region.hpp"

namespace raiser::mesh {

/// One hole of every shape that differs for the tracer, at the origin: round,
/// oval, slot, rounded rectangle and square, and the two limits of rounding.
inline std::vector<Hole> holes_of_every_shape() {
  return {{"circle", HoleShape::circle, 8, 8, 0, Point(0, 0), 0},
          {"ellipse", HoleShape::ellipse, 9, 4, 0, Point(0, 0), 0},
          {"upright ellipse", HoleShape::ellipse, 3, 9, 0, Point(0, 0), 0},
          {"slot", HoleShape::slot, 10, 4, 0, Point(0, 0), 0},
          {"round slot", HoleShape::slot, 5, 5, 0, Point(0, 0), 0},
          {"rectangle", HoleShape::rounded_rectangle, 9, 6, 1.2, Point(0, 0), 0},
          {"square", HoleShape::rounded_rectangle, 7, 7, 0.9, Point(0, 0), 0},
          {"stadium", HoleShape::rounded_rectangle, 9, 5, 2.5, Point(0, 0), 0}};
}

/// Area of a hole in mm^2 from the formula of its shape.
inline double area(const Hole& hole) {
  constexpr double pi = 3.14159265358979323846;
  switch (hole.shape) {
    case HoleShape::slot:
      return (hole.length - hole.width) * hole.width + pi * hole.width * hole.width / 4;
    case HoleShape::rounded_rectangle:
      return hole.length * hole.width - (4 - pi) * hole.corner_radius * hole.corner_radius;
    default:
      return pi * hole.length * hole.width / 4;
  }
}

/// Area of the plate's material in mm^2.
inline double area(const Plate& plate) {
  double sum = plate.length * plate.width;
  for (const Hole& hole : plate.holes) sum -= area(hole);
  return sum;
}

}  // namespace raiser::mesh
