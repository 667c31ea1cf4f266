#pragma once

#include <string>
#include <vector>

#include "solver/solution.hpp"

namespace raiser::validation {

/// A value computed by methods that are not this program's finite elements, and
/// confirmed by a second one. No published source: named as what it is.
struct Independent {
  std::string name;
  solver::Problem problem;
  std::size_t raiser = 0;    ///< whose largest edge stress is meant
  double factor = 0.0;       ///< largest edge stress over the nominal stress
  double uncertainty = 0.0;  ///< half-width on the factor
  double nominal = 0.0;      ///< MPa
  mesh::Point where;         ///< of the peak, one of its mirror images, mm
  std::string method;
};

/// Eight plates with holes under tension, shear, bending and pressure, two with U
/// notches and a stepped bar. Width 100 mm, nominal stress 100 MPa (of the bar: in
/// its narrow part), E 200 GPa, nu 0.3, plane stress.
std::vector<Independent> independent_values();

}  // namespace raiser::validation
