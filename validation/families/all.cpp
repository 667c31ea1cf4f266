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
          elliptic_membrane(),
          orthotropic_infinite(),
          orthotropic_strip_tension(),
          corner_exponents(),
          textbook_holes()};
}

}  // namespace raiser::validation
