#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

/// The material as a set of loops: the outer one runs anticlockwise, the holes
/// clockwise.
struct Region {
  std::vector<Loop> loops;
};

/// Outline and holes of a legal plate as curves. loops[0] is the outline as it
/// stands (a rectangle starts at its lower left corner); loops[1 + i] is hole i.
Region trace(const Plate& plate);

/// Which mirror lines through the origin the plate has:
/// `x`: (x, y) -> (-x, y), `y`: (x, y) -> (x, -y).
struct Mirrors {
  bool x = false;
  bool y = false;
  bool operator==(const Mirrors&) const = default;
};

/// What a mirror maps each raiser and each edge of the plate to.
struct MirrorImage {
  std::vector<std::size_t> raisers;
  std::vector<std::size_t> edges;
  Owner of(const Owner& owner) const;
};

/// The image of the plate in the mirror, if that is the plate itself: holes
/// and outline within 1e-12 and 1e-11 of the plate's size, each raiser and each
/// edge as a whole.
std::optional<MirrorImage> mirror_image(const Plate& plate, Mirrors mirror);

/// The mirror lines that have an image.
Mirrors mirrors(const Plate& plate);

/// Index of the raiser that the mirror maps raiser `raiser` to.
/// Throws std::invalid_argument when the plate does not have that mirror.
std::size_t mirror_image(const Plate& plate, std::size_t raiser, Mirrors mirror);

/// The part of the region with x >= 0 (mirrors.x) and y >= 0 (mirrors.y). The
/// new straight pieces on the mirror lines are owned by mirror_x or mirror_y.
Region cut(const Region& region, Mirrors mirrors);

}  // namespace raiser::mesh
