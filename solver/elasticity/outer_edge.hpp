#pragma once

#include <array>
#include <cstddef>
#include <optional>

#include "solver/elasticity/load.hpp"

namespace raiser::solver {

/// The words for the outer edges in the order used for arrays over them.
inline constexpr std::array<const char*, 4> edge_words = {"right", "top", "left", "bottom"};

/// Position of an outer edge in that order; nothing for any other owner.
std::optional<std::size_t> edge_index(Owner::Kind kind);

/// The edge of a load of kind edge. Throws std::invalid_argument when the load
/// names no outer edge.
std::size_t loaded_edge(const Load& load);

/// Traction in MPa from a normal stress and one along the edge (anticlockwise
/// round the plate) where the outward unit normal is n.
Point edge_traction(double stress, double along, const Point& n);

/// A straight piece of one outer edge, anticlockwise.
struct EdgePiece {
  std::size_t edge = 0;
  Point from = Point::Zero();
  Point to = Point::Zero();
};
EdgePiece whole_edge(const Plate& plate, std::size_t edge);

/// The part of a piece whose coordinate `axis` is at least `station`; of no
/// length when there is none.
EdgePiece beyond(EdgePiece piece, int axis, double station);

/// Resultant of uniform tractions on a piece, about a point.
Resultant resultant(const Plate& plate, const EdgePiece& piece, double stress, double along,
                    const Point& about);

}  // namespace raiser::solver
