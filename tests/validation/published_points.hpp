#pragma once

#include <gtest/gtest.h>

#include <cmath>
#include <span>

#include "validation/published.hpp"

namespace raiser::validation {

/// Parameters, what converged finite elements give, and the formula's printed value.
struct Point1 {
  double x, finite_elements, formula;
};
struct Point2 {
  double q, x, finite_elements, formula;
};

/// Holds a formula to its printed values (to half a unit of their fifth digit)
/// and, where its record covers the parameters, to the accuracy known of it.
template <class Formula>
void hold_to(Reference reference, std::string_view name, Formula f, std::span<const Point1> points) {
  const Published& r = record(reference);
  for (const auto& [x, truth, printed] : points) {
    EXPECT_NEAR(f(x), printed, 6e-5 * std::abs(printed)) << r.name << " at " << x;
    if (covers(r, {{name, x}})) {
      EXPECT_LE(std::abs(f(x) / truth - 1), r.accuracy) << r.name << " at " << x;
    }
  }
}
template <class Formula>
void hold_to(Reference reference, std::string_view name, Formula f, std::span<const Point2> points) {
  const Published& r = record(reference);
  for (const auto& [q, x, truth, printed] : points) {
    EXPECT_NEAR(f(q, x), printed, 6e-5 * std::abs(printed)) << r.name << " at " << q << ", " << x;
    if (covers(r, {{name, q}})) {
      EXPECT_LE(std::abs(f(q, x) / truth - 1), r.accuracy) << r.name << " at " << q << ", " << x;
    }
  }
}

}  // namespace raiser::validation
