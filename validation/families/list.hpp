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
Family pressure_ring_family();
Family deep_notches();
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
Family lug_pin();
Family elliptic_membrane();
Family orthotropic_infinite();
Family orthotropic_strip_tension();
Family crack_inclined();
Family crack_kink();
Family crack_centre_strip();
Family crack_edge_strip();
Family crack_edge_bending();
Family crack_two_edges();
Family crack_hole_one();
Family crack_hole_two();
Family crack_hole_one_biaxial();
Family crack_hole_two_biaxial();
Family cracks_collinear();
Family crack_half_plane();
Family crack_hole_pressure();
Family specimen_bend();
Family specimen_compact();
Family crack_point_forces();
Family crack_notch();
Family t_stress_strip();
Family corner_exponents();
Family textbook_holes();
Family textbook_cracks();
Family crack_row();
Family crack_hole_strip();

}  // namespace raiser::validation
