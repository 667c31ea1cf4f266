#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "io/case/case.hpp"
#include "io/import/report.hpp"
#include "mesh/region/region.hpp"

namespace raiser::io {

/// One curve of a drawing and where it was read.
struct Stroke {
  mesh::Curve curve;
  std::string kind;      ///< as the file calls it: "LINE", "ARC", ...
  std::string layer;     ///< may be empty
  std::size_t line = 0;  ///< of the file, from 1; 0 where the format has no lines
};

/// A planar drawing as read, in its own units.
struct Drawing {
  std::vector<Stroke> strokes;
  std::optional<double> unit;       ///< mm in one of its units, if the file says so
  std::string unit_word;            ///< e.g. "in"; empty when the file does not say
  std::vector<LeftOut> left_out;    ///< in the order of the file
  std::vector<std::string> layers;  ///< that hold curves, in the order of the file
};

/// The outcome of reading a drawing: it, or every fault found.
struct DrawingReading {
  std::optional<Drawing> value;
  std::vector<Diagnostic> faults;
};

}  // namespace raiser::io
