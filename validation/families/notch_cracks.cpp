// Cracks at the root of a notch, from a small part of its radius to deep ones.
#include <algorithm>
#include <cmath>
#include <numbers>

#include "validation/families/bars.hpp"
#include "validation/families/list.hpp"
#include "validation/families/series.hpp"
#include "validation/published/cracks.hpp"
#include "validation/published/edge_raisers.hpp"

namespace raiser::validation {

namespace {

constexpr double rho = 10.0;  // mm, radius and depth of the notch

Question cracked_notch(double l_over_rho) {
  const double l = l_over_rho * rho, size = 3000 * (rho + l);
  solver::Problem problem{notched_bar(size, size, {rho, rho, 0.0, true}, false),
                          family_material,
                          {unit_load(solver::Load::Kind::tension)}};
  const Point root(0, size / 2 - rho);
  problem.plate.cracks = {{"crack", {root, root - Point(0, l)}, true, {}}};
  // Together they are an edge crack, which feels the width as (1 + 7 (depth/width)^2), nearly.
  return settled_tip(std::move(problem), k_one_over(unit_stress * std::sqrt(std::numbers::pi * l)), 1e-6);
}

double lukas(double x) { return notch_crack_lukas(semicircle_half_plane, x); }

/// The smaller of the limits: an edge crack in the notch's peak stress, and one
/// as long as notch and crack together.
double limits(double x) {
  return std::min(notch_crack_short(semicircle_half_plane), half_plane_crack * std::sqrt((1 + x) / x));
}

}  // namespace

Family crack_notch() {
  Family f{
      "crack-notch",
      "B15",
      "Crack of length l at the root of a semicircular notch of radius rho in the edge of a half plane, "
      "tension along the edge",
      "l/rho: crack length over root radius",
      "K_I/(S sqrt(pi l))",
      "a square plate 3000 times as wide as notch and crack are deep; interaction integral over rings about "
      "the tip",
      "the limits know nothing of the fall of the notch's stress, which the form of Lukas and Klesnil "
      "takes up for small cracks; the computed table is that of a plate some 50 radii wide: ours of 40 and "
      "60 radii "
      "lie either side of it",
      1e-5,
      {},
      {}};
  const std::vector<double> entries{0.02, 0.05, 0.1, 0.2, 0.5, 1.0, 2.0};
  add_series(f, {"",
                 "l/rho",
                 {0.005, 0.02, 0.05, 0.1, 0.2, 0.5, 1.0, 2.0},
                 {0.1},
                 cracked_notch,
                 {{Reference::notch_crack_limits, limits},
                  {Reference::notch_crack_lukas, lukas},
                  {Reference::notch_crack_table, notch_crack_table, entries}},
                 0.005,
                 2.0});
  return f;
}

}  // namespace raiser::validation
