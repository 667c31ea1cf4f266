#pragma once

#include "validation/families/question.hpp"

namespace raiser::validation {

/// The largest stress on the upper fillet of a stepped bar, sizes in mm, over that
/// of its narrow part.
Question step_question(double wide, double narrow, double radius, solver::Load::Kind load);

inline constexpr auto step_reading =
    "a bar of three wide widths either side of the step, uniform or linear traction on its ends; largest "
    "stress on the fillet over that of the narrow part";

}  // namespace raiser::validation
