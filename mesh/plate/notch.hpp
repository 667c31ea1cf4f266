#pragma once

#include <cstddef>
#include <string>
#include <string_view>

namespace raiser::mesh {

enum class NotchShape { u, v, semicircle, semi_ellipse, keyhole };

/// The word used for a shape in case files, tables and messages.
std::string_view word(NotchShape shape);

/// A notch cut into a straight edge, symmetric about its axis, which stands on
/// the edge at a right angle. Lengths in mm.
/// u: parallel flanks and a semicircular root; less deep than its radius, the
///   segment of a circle.
/// v: flanks that open by `opening_angle` and touch the root's arc.
/// semicircle: depth and root radius are equal.
/// semi_ellipse: semi-axes `depth` and width / 2.
/// keyhole: a channel of `width` that ends in a circle of `root_radius`.
struct Notch {
  std::string name;
  NotchShape shape = NotchShape::u;
  std::size_t edge = 0;      ///< index into the outline's edges
  double at = 0.0;           ///< of its axis from the middle of the edge, towards larger x (y where upright)
  double depth = 0.0;        ///< from the edge to the deepest point
  double root_radius = 0.0;  ///< u, v and keyhole
  double opening_angle = 0.0;  ///< rad, v only
  double width = 0.0;          ///< at the mouth: semi_ellipse and keyhole
};

/// Smallest radius of curvature at the notch's root.
double root_radius(const Notch& notch);

}  // namespace raiser::mesh
