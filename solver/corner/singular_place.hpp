#pragma once

#include <functional>
#include <vector>

#include "mesh/region/vertex.hpp"
#include "solver/corner/intensity.hpp"
#include "solver/elasticity/load.hpp"

namespace raiser::solver {

/// A place on the plate's boundary where no peak stress exists.
struct SingularPlace {
  /// corner: the material turns by more than half a turn between two edges
  /// treated alike. held_end: a held edge meets another. jump: the loads on
  /// both sides do not fit together; the stress there depends on the direction
  /// (`is_logarithmic`: it grows with the logarithm of the distance).
  enum class Kind { corner, held_end, jump };
  Kind kind = Kind::corner;
  CornerSite site;
  std::vector<WedgeMode> modes;  ///< singular fields; none for a jump or an orthotropic sheet
  bool is_logarithmic = false;   ///< a jump only
};

/// How each edge is held.
using Hold = std::function<WedgeEdge(const mesh::Owner&)>;

/// The sum of all loads.
Traction sum_of(const std::vector<UnitLoad>& loads);

/// Whether x lies so near to a corner or a held edge's end that the stress there
/// is that place's growth more than anything else.
bool is_near_growth(const std::vector<SingularPlace>& places, const Point& x);

/// Every place of a region's boundary where the stress has no single value, from
/// geometry, supports and the sum of all tractions: corners whose wedge has a
/// singular field (those within mesh::least_corner of straight do not count),
/// and jumps of traction that no uniform stress fits.
std::vector<SingularPlace> singular_places(const mesh::Region& region, const Hold& hold,
                                           const Traction& traction, const HookeLaw& material);

}  // namespace raiser::solver
