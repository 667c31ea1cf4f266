#pragma once

#include <vector>

#include "mesh/region/region.hpp"

namespace raiser::mesh {

/// How fine the triangles are, known from the region alone.
struct SizeRule {
  double turn = 0.25;           ///< rad: largest change of direction along one side on an arc
  double ligament = 0.7;        ///< largest side length over the distance to the boundary across the material
  double joint = 0.05;          ///< side length at a jump of curvature over the smaller radius there
  double joint_growth = 5.0;    ///< ratio of successive side lengths away from such a joint
  double neighbour = 3.0;       ///< largest ratio of adjacent side lengths elsewhere
  double growth = 1.0;          ///< increase of triangle size with distance from a finer side
  double corner = 1e-4;         ///< side length at a re-entrant corner over the shorter side before grading
  std::vector<Point> singular;  ///< places on the boundary that are graded as re-entrant corners are
  std::vector<double> refine;   ///< by raiser: factor on the side lengths there; 1 where absent

  double factor(const Owner& owner) const {
    return owner.kind == Owner::Kind::raiser && owner.index < refine.size() ? refine[owner.index] : 1.0;
  }
};

/// A loop's curves divided into the pieces that become triangle sides, in order.
using DividedLoop = std::vector<Curve>;

/// Divides every curve of the region by the rule.
std::vector<DividedLoop> divide(const Region& region, const SizeRule& rule);

}  // namespace raiser::mesh
