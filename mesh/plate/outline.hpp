#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "mesh/plate/curve.hpp"
#include "mesh/plate/fillet.hpp"
#include "mesh/plate/notch.hpp"

namespace raiser::mesh {

/// Something that raises the stress in a plate: a part of its boundary that is
/// searched for peaks, and the sections that its nominal stresses stand on.
struct Raiser {
  enum class Kind { hole, notch, fillet };
  Kind kind = Kind::hole;
  std::string name;
  Point centre = Point::Zero();  ///< from where the angles of places on its edge are measured
  /// The net section goes through this place: a hole's centre, the deepest
  /// point of a notch, the end of a fillet in the narrow part.
  Point root = Point::Zero();
  /// The gross section goes through this place: as `root`, but the end of a
  /// fillet in the wide part.
  Point mouth = Point::Zero();
  double radius = 0.0;                        ///< mm, smallest radius of curvature of its edge; 0 for a hole
  std::string shape;                          ///< in words with its sizes, for people; empty for a hole
  std::optional<Notch> notch = std::nullopt;  ///< what it was cut as, where it was
  std::optional<Fillet> fillet = std::nullopt;  ///< the shoulder's or corner's, where it is one
};

/// "hole", "notch", "fillet".
std::string_view word(Raiser::Kind kind);

/// The outline of a plate: a closed chain, anticlockwise. Each curve belongs to
/// one of `edges` or to one of `raisers` (Owner::index counts those of the
/// outline alone, without the plate's holes).
struct Outline {
  Loop curves;
  std::vector<std::string> edges;
  std::vector<Raiser> raisers;
  /// The chain without its notches, on which gross sections stand; empty where
  /// it is the same.
  Loop body;

  const Loop& gross() const { return body.empty() ? curves : body; }
};

/// Positions of the rectangle's edges among its names.
namespace rectangle {
inline constexpr std::size_t right = 0, top = 1, left = 2, bottom = 3;
}

/// Length of all curves of an edge, mm.
double edge_length(const Outline& outline, std::size_t edge);

/// A rectangle centred at the origin, starting at its lower left corner.
Outline rectangular(double length, double width);

}  // namespace raiser::mesh
