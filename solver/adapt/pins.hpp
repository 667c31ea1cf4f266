#pragma once

#include <string>
#include <vector>

#include "solver/solution.hpp"

namespace raiser::solver {

/// A problem whose pins in contact press with the pressure that was found.
struct PinsInContact {
  Problem problem;                ///< Load::bearing filled in
  std::vector<PinFindings> pins;  ///< one for each pin in contact
  /// What the pressures of the last degree differ by from those of the one
  /// before: the stress they make counts towards the bounds.
  std::vector<UnitLoad> doubts;
  std::string reason;  ///< why contact was not found; empty when it was, or when there is none
};

/// Finds the contact of all pins that have a clearance. `tolerance`: of the
/// pressures, over the largest.
PinsInContact with_contact(const Problem& problem, double tolerance);

}  // namespace raiser::solver
