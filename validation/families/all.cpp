#include "validation/families/list.hpp"

namespace raiser::validation {

std::vector<Family> families() {
  return {circle_infinite(),
          circle_strip_tension(),
          circle_strip_bending(),
          ellipse_infinite(),
          ellipse_inclined(),
          circle_eccentric(),
          circle_eccentric_chart(),
          circle_half_plane(),
          two_circles(),
          two_circles_along(),
          row_across(),
          row_along(),
          ellipse_strip(),
          slot_infinite(),
          rounded_rectangle_infinite(),
          rounded_square_infinite(),
          pressure_infinite(),
          pressure_half_plane(),
          pressure_ring_family(),
          deep_notches(),
          notch_pair_tension(),
          notch_pair_bending(),
          notch_single_tension(),
          notch_single_bending(),
          notch_half_plane(),
          notch_v_pair(),
          fillet_step_tension(),
          fillet_step_bending(),
          fillet_chart(),
          fillet_power(),
          textbook_fillets(),
          lug_pin(),
          elliptic_membrane(),
          orthotropic_infinite(),
          orthotropic_strip_tension(),
          crack_inclined(),
          crack_kink(),
          crack_centre_strip(),
          crack_edge_strip(),
          crack_edge_bending(),
          specimen_bend(),
          specimen_compact(),
          crack_two_edges(),
          crack_hole_one(),
          crack_hole_two(),
          crack_hole_one_biaxial(),
          crack_hole_two_biaxial(),
          crack_hole_strip(),
          cracks_collinear(),
          crack_row(),
          crack_half_plane(),
          crack_notch(),
          crack_hole_pressure(),
          t_stress_strip(),
          corner_exponents(),
          crack_point_forces(),
          textbook_holes(),
          textbook_cracks()};
}

std::vector<LeftOut> left_out() {
  return {
      {"A30", "hole reinforced by a ring of the same material",
       "the ring is a second thickness, and a plate has one: with the ring as a line force it would be our "
       "own "
       "edge stress of A01 and A29 put into the formula that is to be checked"},
      {"D13, D20", "fatigue factors of round shafts",
       "the shafts are round, and what is worked is the notch sensitivity of a given factor"},
      {"D14", "strengths by A. A. Griffith's formula",
       "a strength from surface energy and a flaw's length in an infinite plate: no plate is given"},
      {"D15", "a bolt by EN 1993-1-8", "resistances by a code's formulas, in which no stress is worked out"}};
}

}  // namespace raiser::validation
