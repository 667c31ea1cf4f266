#pragma once

#include <string>
#include <vector>

#include "io/import/dxf_tags.hpp"
#include "mesh/region/region.hpp"

namespace raiser::io {

/// What one entity of a drawing comes to: curves in the drawing's units, or
/// why not. Both empty for curves of no length.
struct EntityCurves {
  std::vector<mesh::Curve> curves;
  std::string what;  ///< the fault, empty when there is none
  std::string cure;
  std::vector<double> elevations;  ///< every z of it
};

/// LINE, ARC, CIRCLE, ELLIPSE or LWPOLYLINE. Angles and directions follow the
/// entity's extrusion (only plus and minus z lie in the plane).
EntityCurves curves_of(const Record& entity);

/// A POLYLINE with the VERTEX records that follow it.
EntityCurves curves_of_polyline(const Record& head, std::span<const Record> vertices);

/// The arc from a to b whose bulge is the tangent of a quarter of its angle,
/// positive anticlockwise; a line when it is 0.
mesh::Curve bulge(const mesh::Point& a, const mesh::Point& b, double bulge);

}  // namespace raiser::io
