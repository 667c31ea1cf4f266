#pragma once

#include <string_view>

namespace raiser::mesh {

/// How a shoulder runs into the narrow part. circle: an arc that touches the
/// shoulder's face and the narrow edge; larger than the step is high, it meets
/// the corner of the wide part. ellipse: the same with two semi-axes. two_radii:
/// an arc of `radius` from the narrow edge that turns by `turn`, then one of
/// `second_radius` to the face. undercut: an arc that goes `undercut` deeper
/// than the narrow edge. sharp: none, a re-entrant corner.
enum class FilletShape { circle, ellipse, two_radii, undercut, sharp };
std::string_view word(FilletShape shape);

struct Fillet {
  FilletShape shape = FilletShape::circle;
  double radius = 0.0;         ///< mm; circle, two_radii, undercut
  double along = 0.0;          ///< mm, semi-axis along the bar; ellipse
  double across = 0.0;         ///< mm, semi-axis across it; ellipse
  double second_radius = 0.0;  ///< mm; two_radii
  double turn = 0.0;           ///< rad; two_radii
  double undercut = 0.0;       ///< mm; undercut
};

}  // namespace raiser::mesh
