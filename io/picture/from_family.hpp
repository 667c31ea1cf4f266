#pragma once

#include "io/picture/family_chart.hpp"
#include "validation/families.hpp"

namespace raiser::io {

/// The chart of a family: every published curve over the abscissa, what was
/// computed, and how far the sources are off. Requires a point with a value.
FamilyChart chart_of(const validation::FamilyResult& result);

}  // namespace raiser::io
