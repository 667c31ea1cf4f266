#pragma once

#include <cstddef>
#include <string>
#include <vector>

namespace raiser::io {

/// Entities of a drawing that were left out, all of one kind and reason.
struct LeftOut {
  std::string kind;
  std::string why;  ///< e.g. "it is no curve", "in paper space"
  std::size_t count = 0;
  std::size_t line = 0;  ///< of the first one
};

/// Entities of a drawing that were taken, all of one kind.
struct Taken {
  std::string kind;  ///< as the file calls it
  std::size_t count = 0;
};

/// One piece of an edge of the part, so that a place near it can be given.
struct ImportedEdge {
  std::string name;
  bool is_straight = true;
  double length = 0.0;      ///< mm
  double x = 0.0, y = 0.0;  ///< mm, of its middle in the drawing
};

/// What was made of a drawing, for people.
struct ImportReport {
  std::string file;   ///< as messages name it
  std::string layer;  ///< empty: all
  std::string unit;   ///< the word for a unit of the drawing
  double unit_in_mm = 1.0;
  std::string unit_source;  ///< where the unit is said
  double gap = 0.0;         ///< mm: ends this close were joined
  std::vector<Taken> taken;
  std::vector<LeftOut> left_out;
  std::vector<ImportedEdge> edges;
  std::vector<std::string> repairs;  ///< one line each: what was changed or taken for something else
};

}  // namespace raiser::io
