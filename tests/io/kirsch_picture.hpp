#pragma once

#include <cmath>
#include <numbers>
#include <vector>

#include "io/picture/picture.hpp"
#include "validation/exact/exact.hpp"

// A picture made from a closed form, for the tests of pictures.
namespace raiser::io::test {

inline constexpr double remote = 100.0;  // MPa, along x
inline constexpr double radius = 10.0;   // mm

inline double kirsch(const Point& x) {
  // lattice points on the edge may lie inside it by rounding
  const Point outside = x.norm() < radius ? Point(x.normalized() * radius) : x;
  return solver::von_mises(validation::kirsch({remote, 0.0, 0.0}, radius, outside));
}

// The square plate of side 100 mm with a hole of radius 10 mm in its middle, in
// rings of curved triangles. The values are those of an infinite plate.
inline std::vector<PictureCell> rings(int subdivisions) {
  constexpr int rays = 32, count = 6;
  const auto map = [](double u, double v) {
    const double angle = 2 * std::numbers::pi * u;
    const Point to(std::cos(angle), std::sin(angle));
    const Point outer = 50.0 / to.cwiseAbs().maxCoeff() * to;
    return Point(radius * to + (0.8 * v * v + 0.2 * v) * (outer - radius * to));
  };
  std::vector<PictureCell> cells;
  for (int i = 0; i < rays; ++i)
    for (int j = 0; j < count; ++j)
      for (const bool upper : {false, true}) {
        PictureCell cell{subdivisions, {}, {}};
        for (const Point& r : lattice(subdivisions)) {
          const double s = upper ? 1 - r.x() : r.x(), t = upper ? 1 - r.y() : r.y();
          cell.points.push_back(map((i + t) / rays, (j + s) / count));
          cell.values.push_back(kirsch(cell.points.back()));
        }
        cells.push_back(std::move(cell));
      }
  return cells;
}

inline mesh::Plate plate_with_hole(double length, double width, double diameter) {
  mesh::Plate plate{length, width, 5.0, {}};
  plate.holes.push_back({"bolt", mesh::HoleShape::circle, diameter, diameter, 0.0, Point::Zero(), 0.0});
  return plate;
}

inline Picture kirsch_picture() {
  Picture picture;
  picture.title = "Bracket plate <of a pump> & hole";  // invented demo data
  picture.plate = plate_with_hole(100, 100, 2 * radius);
  picture.quantity = "von Mises stress";
  picture.unit = "MPa";
  picture.cells = rings(8);
  picture.focus = 0;
  picture.peaks.push_back({{0, radius}, 3 * remote, "peak 300 ± 0.1 MPa"});
  for (const double end : {-1.0, 1.0})
    for (const double y : {-30.0, 0.0, 30.0})
      picture.arrows.push_back({{50 * end, y}, {end, 0}, {remote * end, 0}, {}});
  picture.caption = {"Peak edge stress 300 MPa", "Loads: tension 100 MPa"};
  picture.caution = "Not a substitute for an independent check.";
  return picture;
}

}  // namespace raiser::io::test
