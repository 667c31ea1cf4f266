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

/// Both nominal stresses at one raiser and the section they stand on.
///
/// gross: the principal stress of largest magnitude in the plate without holes
///   and notches at the sections through the raiser's mouth (of a fillet: in the
///   wide part), bending counted at the plate's edges. Where the loads leave that
///   at zero, the pressure in the hole.
/// net: the same with every component on its own net section through the
///   raiser's root (a hole's centre; of a fillet: its end in the narrow part),
///   all holes and notches on it taken out: N / A_net (the offset of N from the
///   net centroid is not counted), M c / I_net at the raiser's edge, V / A_net.
struct Nominal {
  Section section;
  Basis gross;
  Basis net;
};

/// Areas and inertia of a section of a legal plate and what it carries under
/// balanced loads (pressures in holes apart).
Section section_at(const Plate& plate, const std::vector<Load>& loads, mesh::Direction direction,
                   double station);

/// The gross nominal stress of a raiser whose mouth is at `place`.
Basis gross_nominal(const Plate& plate, const std::vector<Load>& loads, const Point& place);

/// Nominal stresses at a raiser under the loads together. Throws
/// std::out_of_range when there is no such raiser.
Nominal nominal(const Plate& plate, const std::vector<Load>& loads, std::size_t raiser);

/// Kt from the edge stress of largest magnitude (its sign does not matter).
Concentration concentration(const Estimate& peak, const Basis& basis);

}  // namespace raiser::solver
