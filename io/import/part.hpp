#pragma once

#include <array>
#include <filesystem>
#include <optional>
#include <string>
#include <vector>

#include "io/import/contour.hpp"

namespace raiser::io {

/// What is to be imported, and how.
struct PartRequest {
  std::filesystem::path path;
  std::string file;                  ///< as messages name it
  std::optional<std::string> layer;  ///< of a DXF drawing; all by default
  std::optional<double> unit;        ///< mm in one unit of a DXF drawing that does not say
  ContourRule rule;
  std::optional<std::array<double, 3>> face_at;  ///< mm, of a STEP file
};

/// A part as drawn, in mm, its bounding box centred at the origin.
struct Part {
  mesh::Loop outer;  ///< anticlockwise
  std::vector<mesh::Loop>
      inner;  ///< clockwise, by the middle of their boxes: from left to right, then upwards
  mesh::Point centre = mesh::Point::Zero();  ///< where the origin lies in the drawing, mm
  mesh::Point size = mesh::Point::Zero();    ///< of the bounding box, mm
  std::string unit_word;                     ///< of the drawing, "" where the case says it
  std::vector<std::string> repairs;
  std::vector<LeftOut> left_out;
};

/// The outcome of an import: a part, or every fault found.
struct PartReading {
  std::optional<Part> value;
  std::vector<Diagnostic> faults;
};

/// Reads the outline of a part from a .dxf, .step or .stp file.
PartReading read_part(const PartRequest& request);

/// The box that holds a loop: lowest and highest coordinates.
std::array<mesh::Point, 2> box_of(const mesh::Loop& loop);

}  // namespace raiser::io
