#pragma once

#include <optional>
#include <string>

#include "solver/solution.hpp"

namespace raiser::solver {

/// The two limits between which K of a crack at the edge of a hole or notch lies:
/// very short, it is an edge crack in the edge stress that the plate without cracks
/// has there; long, notch and crack together act as one crack. N. E. Dowling,
/// Fatigue Eng. Mater. Struct. 2 (1979) 129. Both are of wide plates, and of a crack
/// normal to the edge and to the nominal stress.
struct NotchLimits {
  std::size_t raiser = 0;
  Estimate edge_stress;      ///< MPa, tangential, at the crack's mouth in the plate without cracks
  double nominal = 0.0;      ///< S, MPa
  std::string definition;    ///< of S
  double root_radius = 0.0;  ///< mm, of the edge at the mouth; infinity where it is straight
  double depth = 0.0;        ///< mm, what counts as part of the long crack
  double long_factor = 1.0;  ///< F
  std::string long_definition;

  double kt() const { return edge_stress.value / nominal; }

  /// 1.1215 Kt S sqrt(pi a), MPa sqrt(mm). The factor of an edge crack in a half
  /// plane: W. T. Koiter, discussion of O. L. Bowie, J. Appl. Mech. 32 (1965) 237.
  double short_crack(double a) const;
  /// F S sqrt(pi (depth + a)), MPa sqrt(mm).
  double long_crack(double a) const;
  /// short_crack(a) / sqrt(1 + 4.5 a / root radius) up to half a root radius:
  /// P. Lukas and M. Klesnil, Mater. Sci. Eng. 34 (1978) 61. Nothing beyond.
  std::optional<double> between(double a) const;
  /// Where the limits are equal, mm: depth / ((1.1215 Kt / F)^2 - 1). Nothing where
  /// the short one is always the smaller.
  std::optional<double> transition() const;
};

/// The limits, or why there are none.
struct NotchReading {
  std::optional<NotchLimits> limits;
  std::string why;
};

/// Solves the plate without any crack for the edge stress at the mouth of crack
/// `crack`. depth and F, in wide plates: of a hole with this crack alone its extent
/// along the crack and 1 / sqrt(2), so that hole and crack are one crack of their
/// joint length; of a hole with a second crack opposite to it half the extent and 1;
/// of a notch its depth below the gross outline and 1.1215.
/// Throws std::invalid_argument as settle() does.
NotchReading notch_limits(const Problem& problem, std::size_t crack, double tolerance = 1e-3);

}  // namespace raiser::solver
