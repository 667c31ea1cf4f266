#pragma once

#include "io/picture/chart.hpp"
#include "io/write/growth.hpp"

namespace raiser::io {

/// K_I and K_II of the first growing tip over the crack's length, in MPa sqrt(m),
/// with the limits of a short and a long crack where there are any. Requires two
/// lengths with numbers.
Chart chart_of(const GrowthResult& result);

/// Whether there is enough to draw.
bool has_chart(const GrowthResult& result);

}  // namespace raiser::io
