#pragma once

#include <optional>
#include <string>

#include "mesh/plate/plate.hpp"
#include "mesh/region/region.hpp"

namespace raiser::io {

/// The hole that a closed loop is: a circle, an ellipse, a slot or a rounded
/// rectangle, to within the tolerance in mm. Nothing for any other shape.
std::optional<mesh::Hole> hole_of(const mesh::Loop& loop, double tolerance);

}  // namespace raiser::io
