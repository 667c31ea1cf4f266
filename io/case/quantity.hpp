#pragma once

#include <span>
#include <string>
#include <string_view>
#include <variant>

namespace raiser::io {

enum class Dimension { length, force, stress, moment, angle, ratio };

/// The word for a dimension with its article: "a length", "an angle".
std::string_view word(Dimension dimension);

/// An example of how to write a quantity of this dimension, e.g. "18 mm".
std::string_view example(Dimension dimension);

/// A unit of measure. One of it is factor / divisor in raiser's own unit of
/// the dimension: mm, N, MPa, N mm, rad, 1. Two numbers, because a power of
/// ten below one is exact only as a divisor.
struct Unit {
  std::string_view name;
  Dimension dimension = Dimension::length;
  double factor = 1.0;
  double divisor = 1.0;
  bool alias = false;  ///< another spelling of a unit listed before
};

/// Every unit that is understood. Factors after NIST Special Publication 811,
/// "Guide for the Use of the International System of Units (SI)", 2008,
/// Appendix B, from its exact definitions: 1 in = 25.4 mm,
/// 1 lbf = 4.448 221 615 260 5 N.
std::span<const Unit> units();

/// Why a text is not the quantity that is expected, and what to write.
struct QuantityFault {
  std::string what;
  std::string cure;
};

/// The value of a text such as "60 mm", "1.5e-3 m" or "0.1 %" in raiser's own
/// unit of the expected dimension. The decimal sign is a point whatever the
/// locale. Plain numbers are ratios and nothing else. Refused: no or an
/// unknown unit, a unit of another dimension, a number that is not finite or
/// that double precision cannot hold.
std::variant<double, QuantityFault> parse_quantity(std::string_view content, Dimension expected);

}  // namespace raiser::io
