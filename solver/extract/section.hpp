#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "solver/solution.hpp"

namespace raiser::solver {

/// The stress that a Kt stands on, as a magnitude in MPa. `why` is empty when
/// it is defined; otherwise it says why not and what to use instead.
struct Basis {
  double stress = 0.0;
  std::string definition;
  std::string why;
};

/// Both nominal stresses at one hole and the section they stand on.
///
/// gross: the principal stress of largest magnitude in the plate without holes
///   at the sections through the hole's centre, bending counted at the plate's
///   edges. Where the loads leave that at zero, the pressure in the hole.
/// net: the same with every component on its own net section through the
///   hole's centre, all holes on it taken out: N / A_net (the offset of N from
///   the net centroid is not counted), M c / I_net at the hole's edge, V / A_net.
struct Nominal {
  Section section;
  Basis gross;
  Basis net;
};

/// Areas and inertia of a section of a legal plate and what it carries under
/// balanced loads (pressures in holes apart).
Section section_at(const Plate& plate, const std::vector<Load>& loads, mesh::Direction direction,
                   double station);

/// Nominal stresses at hole `hole` under the loads together. Throws
/// std::out_of_range when there is no such hole.
Nominal nominal(const Plate& plate, const std::vector<Load>& loads, std::size_t hole);

/// Kt from the edge stress of largest magnitude (its sign does not matter).
Concentration concentration(const Estimate& peak, const Basis& basis);

}  // namespace raiser::solver
