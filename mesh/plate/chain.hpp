#pragma once

#include <optional>
#include <string>
#include <vector>

#include "mesh/plate/build.hpp"

namespace raiser::mesh {

/// How a piece of a free outline runs to the next point. line: straight.
/// inwards, outwards: an arc of `radius` that bulges into the material or out
/// of it, the shorter one or, with `is_longer`, the longer one; with `across`
/// above 0 an elliptical one about `centre` with semi-axes `radius`, at `angle`
/// from x, and `across`.
struct Piece {
  enum class Kind { line, inwards, outwards };
  Kind kind = Kind::line;
  double radius = 0.0;  ///< mm
  bool is_longer = false;
  double across = 0.0;  ///< mm
  Point centre = Point::Zero();
  double angle = 0.0;  ///< rad
};

/// A point of a free outline and the piece that runs from it to the next one.
struct OutlinePoint {
  Point at = Point::Zero();
  double corner_radius = 0.0;  ///< mm, rounds the corner between two straight pieces; 0: sharp
  std::string edge;            ///< name of the piece; equal names are one edge; "edge n" when empty
  std::string corner;          ///< name of the fillet or notch that the corner or piece is; may be empty
  Piece piece;
};

/// A free outline through the points, run either way. Rounded re-entrant
/// corners and arcs that bulge inwards become fillets and notches, each a raiser
/// (tell_notches() has the difference); an inward arc that ends in a sharp re-entrant corner has no peak and
/// stays an edge. The chain is moved so that its bounding box is centred at the origin; `origin` is where the
/// points' origin comes to lie.
struct ChainResult {
  std::optional<Outline> outline;
  Point origin = Point::Zero();
  double length = 0.0, width = 0.0;  ///< mm, of the bounding box
  std::vector<CutFault> faults;      ///< by index of the point
};
ChainResult chain_outline(std::vector<OutlinePoint> points);

}  // namespace raiser::mesh
