#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

/// A crack inside the material: a chain of straight segments with a face on
/// either side. An end that is not a tip lies where two curves of a loop meet.
struct Slit {
  std::size_t crack = 0;  ///< index into Plate::cracks
  std::vector<Point> points;
};

/// A crack tip in the region.
struct RegionTip {
  std::size_t tip = 0;  ///< index into tips(Plate::cracks)
  Point at = Point::Zero();
  Point direction = Point::UnitX();  ///< unit vector out of the crack
  bool on_mirror = false;            ///< the crack runs along a mirror line: one face only is in the region
  double reach = 0.0;                ///< mm: nothing but the crack's own straight end lies nearer to the tip
};

/// The material as a set of loops: the outer one runs anticlockwise, the holes
/// clockwise. Cracks are slits in it, or parts of loops along mirror lines.
struct Region {
  std::vector<Loop> loops;
  std::vector<Slit> slits = {};
  std::vector<RegionTip> tips = {};
};

/// The edge of a hole, clockwise.
Loop trace(const Hole& hole, const Owner& owner);

/// Outline, holes and cracks of a legal plate as curves. loops[0] is the outline
/// as it stands (a rectangle starts at its lower left corner); loops[1 + i] is
/// hole i.
Region trace(const Plate& plate);

/// Divides the curve nearest to a slit's end there, unless it lies at a joint,
/// and moves the end exactly onto it.
void divide_at(std::vector<Loop>& loops, Point& end);

/// Which mirror lines through the origin the plate has:
/// `x`: (x, y) -> (-x, y), `y`: (x, y) -> (x, -y).
struct Mirrors {
  bool x = false;
  bool y = false;
  bool operator==(const Mirrors&) const = default;
};

/// What a mirror maps each raiser, edge and crack of the plate to.
struct MirrorImage {
  std::vector<std::size_t> raisers;
  std::vector<std::size_t> edges;
  std::vector<std::size_t> cracks;
  Owner of(const Owner& owner) const;
};

/// The image of the plate in the mirror, if that is the plate itself: holes, cracks
/// and outline within 1e-12 and 1e-11 of the plate's size, each raiser and each
/// edge as a whole.
std::optional<MirrorImage> mirror_image(const Plate& plate, Mirrors mirror);

/// The mirror lines that have an image.
Mirrors mirrors(const Plate& plate);

/// Index of the raiser that the mirror maps raiser `raiser` to.
/// Throws std::invalid_argument when the plate does not have that mirror.
std::size_t mirror_image(const Plate& plate, std::size_t raiser, Mirrors mirror);

/// The tip that the mirror maps tip `tip` of tips(Plate::cracks) to, and the
/// crack that it maps crack `crack` to. Throw std::invalid_argument when the
/// plate does not have that mirror.
std::size_t mirror_image_of_tip(const Plate& plate, std::size_t tip, Mirrors mirror);
std::size_t mirror_image_of_crack(const Plate& plate, std::size_t crack, Mirrors mirror);

/// The part of the region with x >= 0 (mirrors.x) and y >= 0 (mirrors.y). The
/// new straight pieces on the mirror lines are owned by mirror_x or mirror_y, or
/// by the crack that lies there.
Region cut(const Region& region, Mirrors mirrors);

}  // namespace raiser::mesh
