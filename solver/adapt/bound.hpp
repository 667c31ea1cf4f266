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
/// floor.
double error_bound(std::span<const double> values, double scale);

}  // namespace raiser::solver
