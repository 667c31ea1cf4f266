#pragma once

#include "mesh/plate/curve.hpp"

namespace raiser::mesh {

/// Smallest distance between two curves in mm, to 1e-6 of itself; 0 where they
/// cross. Where they are farther apart than `enough`, anything between that and
/// the distance. Both curves with perpendicular axes u and v.
double distance(const Curve& a, const Curve& b, double enough);

}  // namespace raiser::mesh
