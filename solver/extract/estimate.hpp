#pragma once

#include <limits>
#include <string>

namespace raiser::solver {

/// A number with its error bound: the true value of the mathematical model
/// lies within value +- bound. `bound` is infinite when none can be given.
/// Both in the unit of the quantity.
struct Estimate {
  double value = 0.0;
  double bound = std::numeric_limits<double>::infinity();

  /// The same estimate in another unit or on another basis.
  Estimate scaled(double factor) const { return {value * factor, bound * (factor < 0 ? -factor : factor)}; }
};

/// The value with no digit that its bound makes meaningless, e.g. "313.42"
/// for 313.4187 +- 0.03: the last digit printed is at or above the bound's
/// leading digit. "0" with the digits of the bound for values below it. Three
/// significant digits where no bound is known, ten where it is exactly zero.
std::string digits(const Estimate& estimate);

/// The bound with one significant digit, rounded up far enough to cover what
/// digits() rounds off the value, e.g. "0.04" for the estimate above: the
/// interval printed holds the interval given. "unknown" when there is none.
std::string bound_digits(const Estimate& estimate);

}  // namespace raiser::solver
