#pragma once

#include <string>
#include <vector>

#include "io/import/drawing.hpp"

namespace raiser::io {

/// How a drawing's curves become an outline.
struct ContourRule {
  double gap = 0.005;            ///< mm: ends this close are joined
  bool arcs_from_facets = true;  ///< take rows of short lines on one circle as an arc
};

/// Something of a drawing that is no outline: where, what, and what to do.
struct ContourFault {
  std::size_t line = 0;  ///< of the drawing's file, 0 where it has none
  std::string what;
  std::string cure;
};

/// The edges of one part, lengths in mm.
struct Contours {
  mesh::Loop outer;                  ///< anticlockwise
  std::vector<mesh::Loop> inner;     ///< clockwise, the largest first
  std::vector<std::string> repairs;  ///< one line each: what was changed or taken for something else
  std::vector<ContourFault> faults;  ///< the rest is empty when there are any
};

/// Joins strokes (mm) into closed loops, the outer one and those in it.
/// Repairs, and reports: gaps up to the tolerance, curves drawn twice, curves
/// shorter than the tolerance, rows of short lines on a circle, lines and arcs in
/// several pieces. Faults: loose ends, places where more than two curves meet,
/// loops that cross, parts beside or inside one another.
Contours contours(std::vector<Stroke> strokes, const ContourRule& rule);

/// A loop with rows of at least four short lines whose ends lie on one circle
/// replaced by arcs. Such lines turn by at most 23 degrees from one to the next
/// and their ends lie within the larger of 1e-5 of the radius and the gap
/// tolerance (at most 1e-3 of the radius) of the circle. Adds a line for each
/// arc to the repairs.
mesh::Loop with_arcs_for_facets(const mesh::Loop& loop, double gap, std::vector<std::string>& repairs);

/// A loop with successive pieces of one line or one arc made one.
mesh::Loop merged(const mesh::Loop& loop, double tolerance);

/// Two flattened loops, or a loop with itself: a place where they cross.
struct Crossing {
  std::size_t first = 0;
  std::size_t second = 0;
  mesh::Point at = mesh::Point::Zero();
};
std::vector<Crossing> crossings(const std::vector<mesh::Loop>& loops);

}  // namespace raiser::io
