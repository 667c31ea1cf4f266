#pragma once

#include <string>
#include <vector>

namespace raiser::io {

/// Equally spaced round limits (1, 2, 2.5 or 5 times a power of ten apart)
/// that reach from at or below `smallest` to at or above `largest`, with about
/// `wanted` intervals. At least one interval, also when both are equal.
std::vector<double> round_levels(double smallest, double largest, int wanted);

/// A value and the area that has it.
struct Spread {
  double value = 0.0;
  double area = 0.0;
};

/// Limits of the stress bands for a field with these values, from at or below
/// the smallest to at or above `largest`. Equal round steps as a rule, chosen
/// so that no limit runs through a wide plateau, where rounding alone would
/// decide the colour. Where the largest is more than eight times the mean and
/// nothing is negative, preferred numbers in a geometric row (ISO 3, R5 or R10)
/// after a first limit 0, since equal steps would put nearly the whole plate
/// into one band. `values` must not be empty.
std::vector<double> band_limits(const std::vector<Spread>& values, double largest);

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
