#pragma once

#include <array>
#include <filesystem>
#include <optional>

#include "io/import/drawing.hpp"

namespace raiser::io {

/// Reads the edges of one planar face of a STEP file, in mm: the only one, or
/// the one at a point (x, y, z in mm as in the file). Lines and arcs of circles
/// and ellipses are taken, any other edge is a fault that names its kind.
///
/// A face across z keeps the file's x and y. On any other, the first axis is
/// the file's x in the plane of the face (y on a face across x).
///
/// Gmsh's OpenCASCADE kernel reads the file: one call at a time in a process,
/// and nothing else may write to standard output meanwhile.
DrawingReading read_step(const std::filesystem::path& path, const std::string& file,
                         const std::optional<std::array<double, 3>>& face_at);

}  // namespace raiser::io
