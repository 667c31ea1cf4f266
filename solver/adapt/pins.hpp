#pragma once

#include <optional>
#include <string>
#include <vector>

#include "solver/solution.hpp"

namespace raiser::solver {

/// A problem whose pins in contact press with the pressure that was found.
struct PinsInContact {
  Problem problem;                ///< Load::bearing filled in
  std::vector<PinFindings> pins;  ///< one for each pin in contact
  /// Twice what the pressures of the degree before the last differ by from the
  /// last: what that changes of a number counts towards its bound.
  std::optional<UnitLoad> doubt;
  std::string reason;  ///< why contact was not found; empty when it was, or when there is none
};

/// Finds the contact of all pins that have a clearance. `tolerance`: of the
/// pressures, over the largest; where it is missed, the doubt says by how much.
PinsInContact with_contact(const Problem& problem, double tolerance);

}  // namespace raiser::solver
