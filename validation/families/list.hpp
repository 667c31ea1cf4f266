#pragma once

#include "validation/families.hpp"

/// The families, a file a group; families() puts them in order.
namespace raiser::validation {

Family circle_infinite();
Family circle_strip_tension();
Family circle_strip_bending();
Family ellipse_infinite();
Family ellipse_inclined();
Family circle_eccentric();
Family circle_eccentric_chart();
Family circle_half_plane();
Family two_circles();
Family two_circles_along();
Family row_across();
Family row_along();
Family ellipse_strip();
Family slot_infinite();
Family rounded_rectangle_infinite();
Family rounded_square_infinite();
Family pressure_infinite();
Family pressure_half_plane();
Family notch_pair_tension();
Family notch_pair_bending();
Family notch_single_tension();
Family notch_single_bending();
Family notch_half_plane();
Family notch_v_pair();
Family fillet_step_tension();
Family fillet_step_bending();
Family fillet_chart();
Family fillet_power();
Family textbook_fillets();
Family elliptic_membrane();
Family orthotropic_infinite();
Family orthotropic_strip_tension();
Family corner_exponents();
Family textbook_holes();

}  // namespace raiser::validation
