#pragma once

#include <optional>

#include "mesh/plate/plate.hpp"

/// Outlines of the bars that published factors of notches and fillets are for.
namespace raiser::validation {

/// A notch in an edge at x = 0: flanks at half the opening angle (rad) to the
/// edge's normal, tangent to the root's arc; where the depth is too small for
/// flanks, the arc alone.
struct NotchForm {
  double depth = 0.0;       ///< mm
  double radius = 0.0;      ///< mm, of the root
  double opening = 0.0;     ///< rad; 0 for a U
  bool is_ellipse = false;  ///< half an ellipse of that depth and root radius instead
};

/// A bar with its notches in the upper edge and, where `both`, opposite ones below.
mesh::Plate notched_bar(double length, double width, const NotchForm& notch, bool both);

/// A bar `wide` for half of the length and `narrow` for the other half (x > 0),
/// with circular fillets of the radius on both sides.
mesh::Plate stepped_bar(double length, double wide, double narrow, double radius);

/// An ellipse with a concentric elliptical hole: full sizes along x and y, mm.
mesh::Plate elliptic_ring(const mesh::Point& outer, const mesh::Point& inner);

}  // namespace raiser::validation
