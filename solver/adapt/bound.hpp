#pragma once

#include <span>

namespace raiser::solver {

/// Error bound of the last of a sequence of values computed with rising
/// degree on one mesh, in their unit; infinite for fewer than three.
///
/// While the error falls by a steady factor from degree to degree, the last
/// difference is the error of the value before it, several times that of the
/// last value. The bound is that difference, but no less than a share of the
/// earlier ones (two successive values can agree by accident) and more where
/// the differences do not fall. Calibrated on random plates (see
/// validation/calibration.md). `scale`: size of the quantity, for the rounding
/// floor. `slowness`: a factor on the differences, where they fall slowly.
double error_bound(std::span<const double> values, double scale, double slowness = 1.0);

/// Twice what is still to come of a value whose differences fall like a power of
/// the degree, over its last difference; 1.25 to 6. From the last three of the
/// values, which end with degree `degree`. For corners, held edges and jumps of
/// curvature, which leave such a tail behind the fast decay.
double tail_factor(std::span<const double> values, int degree);

/// How the values of one model converge, and what bounds follow from that.
struct Convergence {
  int degree = 0;         ///< of the last value
  bool has_tail = false;  ///< there are corners, held edges or jumps of stiffness beside holes

  double bound(std::span<const double> values, double scale) const {
    return error_bound(values, scale, has_tail ? tail_factor(values, degree) : 1.0);
  }
};

}  // namespace raiser::solver
