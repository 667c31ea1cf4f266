#pragma once

#include <optional>
#include <span>
#include <string>
#include <vector>

#include "solver/growth/growth.hpp"

namespace raiser::solver {

/// A number over another.
struct XY {
  double x = 0.0;
  double y = 0.0;
};

/// y = c[0] + c[1] s + … + c[n] s^n with s = (2 x - low - high) / (high - low),
/// for low <= x <= high.
struct FittedPolynomial {
  double low = 0.0;
  double high = 1.0;
  std::vector<double> coefficients;  ///< of powers of s, rounded to `digits` decimals
  static constexpr int digits = 8;

  double error = 0.0;          ///< largest |fit - y| / |y| over all points
  double error_between = 0.0;  ///< the same over every second point, left out of the fit
  double worst_at = 0.0;       ///< x of the point with the largest error
  double tolerance = 0.0;      ///< that was aimed at
  bool is_within() const { return error <= tolerance; }

  double at(double x) const;
};

/// Fits points of rising x by least squares of relative errors, in Chebyshev
/// polynomials, on the first, every second from there and the last point; the
/// others are left out to see the error between. The lowest degree that keeps the
/// tolerance over all points is taken, or the best one; none is higher than twice
/// the square root of the number of points fitted, beyond which least squares on
/// points at equal distances are ill-conditioned (common practice).
/// Nothing for fewer than five points, a y of zero or of changing sign.
std::optional<FittedPolynomial> fit(std::span<const XY> points, double tolerance);

/// The dimensionless factor of the first growing tip: Y = K_I / (S sqrt(pi a)) over
/// a / W, with S and a as in CrackFactors.
struct GeometryFactor {
  double nominal = 0.0;         ///< S, MPa
  std::string definition;       ///< of S
  std::string size_definition;  ///< of a
  double width = 0.0;           ///< W, mm: the gross section that the crack lies in
  std::string width_definition;
  std::vector<XY> points;  ///< (a / W, Y) of every step that has numbers
  std::optional<FittedPolynomial> fit;
  std::string why;  ///< there is no factor, or no fit
};

/// The factor of what was grown from `problem` by `plan`. W is the extent of the
/// gross section through the first point of the crack, across the plate or along
/// it, whichever the line from its first to its last point is closer to.
GeometryFactor geometry_factor(const Problem& problem, const GrowthPlan& plan, const Growth& growth,
                               double tolerance = 1e-3);

}  // namespace raiser::solver
