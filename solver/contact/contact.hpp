#pragma once

#include <string>
#include <vector>

#include "mesh/region/breaks.hpp"
#include "solver/contact/contact_arc.hpp"
#include "solver/contact/pin_system.hpp"

namespace raiser::solver {

/// The contact of one pin with its hole: on one arc, all round, or on several
/// arcs, as where a load that passes the pin by draws the hole long.
struct PinContact {
  std::vector<ContactArc> arcs;
  std::vector<BearingPressure> before;  ///< by arc, of the degree before: the difference is what is not known
};

/// The contact of all pins, found together.
struct Contact {
  bool found = false;    ///< the conditions of contact hold, with the bounds given
  bool settled = false;  ///< found, and the bounds are within the tolerance
  std::string reason;    ///< why not settled; empty when settled
  std::vector<PinContact> pins;
  int degree = 0;
  std::size_t unknowns = 0;
};

/// Finds where rigid, frictionless round pins touch their holes and with what
/// pressure: the gap between them is nowhere negative, the pressure neither, and
/// the pressure vanishes at the ends of each arc. The pins' forces and `other`
/// (whatever else loads the plate) must balance together or be held by supports.
/// Displacements are small beside the hole. `tolerance` is relative, of the
/// largest pressure. `held`: edges that supports hold, displaced as they say.
///
/// Source of the conditions: A. Signorini, Rend. Mat. Appl. 18 (1959) 95-139;
/// the ends are moved until the square-root singularity there vanishes, as for
/// smooth contact in K. L. Johnson, Contact Mechanics (1985), section 5.2.
Contact find_contact(const Plate& plate, const HookeLaw& material, const Traction& other,
                     mesh::Mirrors mirrors, const std::vector<HeldEdge>& held, const std::vector<Pin>& pins,
                     double tolerance);

}  // namespace raiser::solver
