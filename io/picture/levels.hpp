#pragma once

#include <string>
#include <vector>

namespace raiser::io {

/// Equally spaced round limits (1, 2, 2.5 or 5 times a power of ten apart)
/// that reach from at or below `smallest` to at or above `largest`, with about
/// `wanted` intervals. At least one interval, also when both are equal.
std::vector<double> round_levels(double smallest, double largest, int wanted);

/// Limits of the stress bands for values from `smallest` to `largest`, most of
/// which lie near `typical`. Equal steps as a rule; where the largest is more
/// than eight times the typical value and nothing is negative, preferred
/// numbers in a geometric row (ISO 3, R5 or R10), since equal steps would put
/// nearly the whole plate into one band. The first limit is then 0.
std::vector<double> band_limits(double smallest, double typical, double largest);

/// Where `value` lies among the limits: 0 at the first, 1 at the last,
/// every band the same share, linear inside a band; clamped.
double position_on_bar(const std::vector<double>& limits, double value);

/// Round positions inside [smallest, largest] for the ticks of an axis, not
/// more than `at_most`.
std::vector<double> ticks(double smallest, double largest, int at_most);

/// A tick's number without needless digits: "0", "1250", "−12.5" with
/// a proper minus sign.
std::string tick_text(double value);

}  // namespace raiser::io
