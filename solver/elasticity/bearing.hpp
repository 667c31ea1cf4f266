#pragma once

#include <vector>

namespace raiser::solver {

/// The pressure of a round pin on the edge of a round hole, without friction:
/// MPa, by the angle in rad of the place seen from the hole's centre, from +x
/// anticlockwise. It acts from `begin` anticlockwise to `end`.
///
/// cosine: terms[0] cos(angle - middle).
/// arc: sqrt(1 - s^2) sum of terms[k] U_k(s), s from -1 to 1 along the arc, U_k
///   Chebyshev polynomials of the second kind: it vanishes at the ends as a
///   contact pressure does.
/// ring: terms[0] + sum over k of terms[2k-1] cos k t + terms[2k] sin k t, where
///   t is the angle from `begin`; all round.
struct BearingPressure {
  enum class Form { cosine, arc, ring };
  Form form = Form::cosine;
  double begin = 0.0;
  double end = 0.0;
  std::vector<double> terms;

  double middle() const { return 0.5 * (begin + end); }
  /// The pressure; 0 outside the arc.
  double at(double angle) const;
};

/// Where `angle` lies from `begin` anticlockwise, in [begin, begin + 2 pi).
double unwound(double angle, double begin);

/// Cosine pressure over the half of the edge that the force presses on:
/// p = p0 cos(angle - direction), p0 = 2 F / (pi a t), from
/// F = t * integral of p cos(angle - direction) a d(angle). `force` in N,
/// radius a and thickness t in mm. Common practice for close-fitting pins; among
/// those who use it W. G. Bickley, Phil. Trans. R. Soc. A 227 (1928) 383-415.
BearingPressure cosine_pressure(double force, double direction, double radius, double thickness);

}  // namespace raiser::solver
