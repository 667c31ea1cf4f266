#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "mesh/plate/outline.hpp"

namespace raiser::mesh {

/// What makes a notch, a shoulder or a vertex impossible: its index in the list
/// given.
struct CutFault {
  std::size_t index = 0;
  std::string what;
  std::string cure;
};

/// An outline, or why there is none.
struct OutlineResult {
  std::optional<Outline> outline;
  std::vector<CutFault> faults;
};

/// The outline with the notches cut into its edges, each a raiser of its own
/// behind those of `body`, which must be without notches. Faults: sizes that
/// are not positive or do not fit together, an edge that is not one straight
/// line, a mouth that reaches beyond its edge or into another notch's.
OutlineResult with_notches(const Outline& body, const std::vector<Notch>& notches);

/// The edge across the material from a notch and the place `at` on it, for a
/// notch on the opposite side; nothing where no straight edge runs parallel
/// there.
struct Opposite {
  std::size_t edge = 0;
  double at = 0.0;
};
std::optional<Opposite> opposite(const Outline& body, const Notch& notch);

}  // namespace raiser::mesh
