#pragma once

#include <string>
#include <string_view>

#include "io/import/drawing.hpp"

namespace raiser::io {

/// Limits of a drawing, checked on reading.
inline constexpr std::size_t most_drawing_bytes = 32 * 1024 * 1024;
inline constexpr std::size_t most_strokes = 50'000;

/// Reads the curves of an ASCII DXF drawing: LINE, ARC, CIRCLE, ELLIPSE,
/// LWPOLYLINE and POLYLINE with bulges, from all layers or one. `file` stands for
/// the drawing in the faults.
///
/// Text, dimensions, hatches and whatever else is no edge of a part are left
/// out and listed, and so is what is invisible, on a layer that is off, or in
/// paper space. A curve that may be an edge but is none of the six kinds
/// (splines, blocks with curves in them, solids) is a fault, and so is anything
/// out of one plane. Units come from $INSUNITS.
DrawingReading read_dxf(std::string_view content, const std::string& file,
                        const std::optional<std::string>& layer);

}  // namespace raiser::io
