#pragma once

#include "mesh/plate/plate.hpp"

/// Outlines of the bars that published factors of notches and fillets are for.
namespace raiser::validation {

/// A notch in the middle of an edge: U, or V where it opens, or half an ellipse.
struct NotchForm {
  double depth = 0.0;       ///< mm
  double radius = 0.0;      ///< mm, of the root
  double opening = 0.0;     ///< rad; 0 for a U
  bool is_ellipse = false;  ///< half an ellipse of that depth and root radius instead
};

/// A bar with a notch in the upper edge and, where `both`, one opposite. Throws
/// std::invalid_argument where the sizes do not fit.
mesh::Plate notched_bar(double length, double width, const NotchForm& notch, bool both);

/// A bar `wide` for half of the length and `narrow` for the other half (x > 0),
/// with circular fillets of the radius on both sides.
mesh::Plate stepped_bar(double length, double wide, double narrow, double radius);

/// The raiser of the plate that lies uppermost, which positive bending pulls.
std::size_t upper_raiser(const mesh::Plate& plate);

/// The plate with one of its straight edges as a raiser behind all others, so that
/// the largest stress on that edge can be asked for.
mesh::Plate watched(mesh::Plate plate, std::size_t edge);

/// An ellipse with a concentric elliptical hole: full sizes along x and y, mm.
mesh::Plate elliptic_ring(const mesh::Point& outer, const mesh::Point& inner);

}  // namespace raiser::validation
