#pragma once

#include <vector>

#include "mesh/plate/plate.hpp"

namespace raiser::io {

using mesh::Point;

/// One triangle of the plate, sampled on a triangular lattice: `subdivisions`
/// intervals a side, points and values row by row, row j = 0..n holding the
/// reference points (i/n, j/n), i = 0..n-j, corners in anticlockwise order.
struct PictureCell {
  int subdivisions = 1;
  std::vector<Point> points;   ///< mm
  std::vector<double> values;  ///< in the picture's unit
};

/// The lattice's reference points in the order of PictureCell.
std::vector<Point> lattice(int subdivisions);

using Polyline = std::vector<Point>;

/// What a level cuts out of the sampled cells. Values are linear between the
/// lattice points.
struct LevelSet {
  std::vector<Polyline> region;  ///< closed loops round all parts >= level, parts on their left
  std::vector<Polyline> lines;   ///< the curves on which the value equals the level
};

/// Cuts the cells at `level`. Edges that two neighbouring parts share cancel,
/// so that the loops are the outline of the union. The field jumps a little
/// from cell to cell: ends of lines within about `joining` mm become one point.
LevelSet cut_at(const std::vector<PictureCell>& cells, double level, double joining = 0.0);

/// Area enclosed by loops, mm^2: anticlockwise loops count positive.
double area(const std::vector<Polyline>& loops);

/// The area covered by the cells in each band [limits[i], limits[i+1]), mm^2.
std::vector<double> band_areas(const std::vector<PictureCell>& cells, const std::vector<double>& limits);

/// The same curve with fewer points: none moves by more than `tolerance` mm
/// (Douglas and Peucker, Cartographica 10(2), 1973). End points stay.
Polyline simplified(const Polyline& line, double tolerance);

}  // namespace raiser::io
