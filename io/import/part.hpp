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
  std::string unit_word;             ///< a unit of length for a drawing that does not say its own; or empty
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
  ImportReport report;
};

/// The outcome of an import: a part, or every fault found. A fault without a
/// position lies in the request; its key is "file", "units" or "face_at".
struct PartReading {
  std::optional<Part> value;
  std::vector<Diagnostic> faults;
};

/// Whether a file is a STEP file by its name.
bool is_step(const std::filesystem::path& path);

/// Reads the outline of a part from a .dxf, .step or .stp file.
PartReading read_part(const PartRequest& request);

/// The box that holds a loop: lowest and highest coordinates.
std::array<mesh::Point, 2> box_of(const mesh::Loop& loop);

}  // namespace raiser::io
