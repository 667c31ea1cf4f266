#pragma once

#include "solver/solution.hpp"

/// The standard specimens of fracture mechanics, 100 mm wide and of unit
/// thickness under a force of 1 kN.
namespace raiser::validation {

/// Three-point bend, span four widths, crack of length a from the middle of the
/// lower edge. Each of the three forces is spread over a patch `patch` widths long.
solver::Problem bend_specimen_plate(double a_over_w, double patch);

/// Compact tension: 1.25 W by 1.2 W, holes of W/4 in the load line 0.275 W either
/// side of the crack, which runs from the front edge to a beyond the load line.
/// The pins press with a cosine pressure or, with `has_contact`, as rigid ones of
/// the holes' size without friction.
solver::Problem compact_specimen_plate(double a_over_w, bool has_contact);

}  // namespace raiser::validation
