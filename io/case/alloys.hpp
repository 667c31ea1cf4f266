#pragma once

#include <optional>
#include <span>
#include <string_view>

namespace raiser::io {

/// Room-temperature constants of one grade of metal, as its sources give them:
/// a help to begin with, not design values.
struct Alloy {
  std::string_view name;        ///< of the grade, as standards and trade write it
  std::string_view condition;   ///< product and temper that the values stand for
  double youngs_modulus = 0.0;  ///< MPa
  double poissons_ratio = 0.0;
  double yield_strength = 0.0;           ///< MPa; the least of a range
  std::optional<double> most_thickness;  ///< mm, for which the yield strength holds
  std::string_view range;                ///< how far real values lie from these
  std::string_view source;
};

/// Every alloy that is known by name.
std::span<const Alloy> alloys();

/// The alloy of a name, or nothing.
std::optional<Alloy> find_alloy(std::string_view name);

}  // namespace raiser::io
