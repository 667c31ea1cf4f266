#pragma once

#include "io/import/contour.hpp"

namespace raiser::io {

/// Curves joined end to end into closed loops.
struct Joined {
  std::vector<mesh::Loop> loops;
  std::vector<std::size_t> lines;  ///< by loop: where its first curve was read
  std::vector<std::string> repairs;
  std::vector<ContourFault> faults;
};

/// Drops curves drawn twice and curves shorter than the gap, then joins ends
/// that lie within the gap of one another.
Joined join(std::vector<Stroke> strokes, double gap);

}  // namespace raiser::io
