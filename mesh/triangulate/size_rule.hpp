#pragma once

#include <vector>

#include "mesh/region/region.hpp"

namespace raiser::mesh {

/// How fine the triangles are, known from the region alone.
struct SizeRule {
  double turn = 0.25;     ///< rad: largest change of direction along one side on an arc
  double ligament = 0.7;  ///< largest side length over the distance to the boundary across the material
  double joint = 0.05;    ///< side length at a jump of curvature over the smaller radius there
  /// The same where a notch or fillet begins, ends or changes its radius: the smallest
  /// stress on its edge is often there.
  double end = 0.005;
  double joint_growth = 5.0;  ///< ratio of successive side lengths away from such a joint
  double neighbour = 3.0;     ///< largest ratio of adjacent side lengths elsewhere
  double growth = 1.0;        ///< increase of triangle size with distance from a finer side
  double corner = 1e-4;       ///< side length at a re-entrant corner over the shorter side before grading
  /// The same at a corner between a right and a straight angle: stress is finite there,
  /// but as rough as a small power of the distance.
  double blunt = 1e-3;
  std::vector<Point> singular;  ///< places on the boundary that are graded as re-entrant corners are
  std::vector<double> refine;   ///< by raiser: factor on the side lengths there; 1 where absent

  double crack_growth = 1.0;       ///< the same from the sides along cracks and round fans
  double tip_reach = 0.5;          ///< radius of the fan of triangles about a crack tip over RegionTip::reach
  double tip_ratio = 0.25;         ///< radius of each of its rings over that of the next larger one
  int tip_rings = 4;               ///< rings of a fan, without the triangles at the tip itself
  int tip_sectors = 6;             ///< sectors of a whole fan, even
  std::vector<double> refine_tip;  ///< by tip: factor on the fan's radius; 1 where absent

  double factor(const Owner& owner) const {
    return owner.kind == Owner::Kind::raiser && owner.index < refine.size() ? refine[owner.index] : 1.0;
  }
  double tip_factor(std::size_t tip) const { return tip < refine_tip.size() ? refine_tip[tip] : 1.0; }
};

/// A loop's curves divided into the pieces that become triangle sides, in order.
using DividedLoop = std::vector<Curve>;

/// A disc of triangles about a crack tip, or half of one where the crack lies
/// on a mirror line. The outer corners run anticlockwise about the tip, from one
/// face of the crack to the other (or to the mirror line, or from it); a whole
/// fan's first and last are the same point.
struct Fan {
  std::size_t tip = 0;
  Point at = Point::Zero();
  Point direction = Point::UnitX();
  std::vector<Point> outer;
  Owner first, last;  ///< of the straight sides from the tip to the first and the last outer corner
  double ratio = 0.15;
  int rings = 6;
};

/// A region's boundary in pieces. Around crack tips the loops leave out the
/// fans: there, pieces owned by `inner` run along the fan's outer corners, in
/// loops of their own for whole fans. A slit's pieces run from corner to corner.
struct Division {
  std::vector<DividedLoop> loops;
  std::vector<std::vector<Curve>> slits;
  std::vector<Fan> fans;
  bool has_corner = false;  ///< a re-entrant one
};

/// Divides every curve of the region by the rule.
Division divide(const Region& region, const SizeRule& rule);

}  // namespace raiser::mesh
