#include <algorithm>
#include <cmath>

#include "validation/compare/families.hpp"

namespace raiser::validation {

namespace {

/// Whether the hole's axes lie along the plate's.
bool aligned(const mesh::Hole& hole) { return std::abs(std::sin(2 * hole.angle)) < 1e-6; }

/// Inglis with the hole at its angle, any uniform remote stress.
std::vector<Comparison> inglis_rows(const Situation& s) {
  const auto& hole = s.shape();
  const auto [low, high] = inglis_extremes(turned(s.remote, hole.angle), {hole.length / 2, hole.width / 2});
  const double value = std::abs(high) >= std::abs(low) ? high : low;
  if (value == 0) return {};
  const std::vector<Effect> effects{edges(s), neighbours(s)};
  const bool shear_only = s.remote.xx == 0 && s.remote.yy == 0;
  if (!s.uniaxial() && !shear_only) {
    return {row(s, Reference::inglis, "peak edge stress, MPa", std::abs(value), std::copysign(1.0, value), {},
                effects)};
  }
  const double stress = shear_only ? s.remote.xy : strip(s).stress;
  const double nominal = std::copysign(stress, value);
  return {row(s, Reference::inglis, "Kt gross", value / nominal, nominal, {}, effects)};
}

std::vector<Comparison> ellipse_pressure(const Situation& s) {
  const auto& hole = s.shape();
  const double ratio = std::max(hole.length, hole.width) / std::min(hole.length, hole.width);
  return {row(s, Reference::pressure_ellipse, "edge stress / p", 2 * ratio - 1, s.pressure, {},
              {edges(s), neighbours(s)})};
}

std::vector<Comparison> square_biaxial(const Situation& s) {
  const auto& hole = s.shape();
  const bool square = std::abs(hole.length - hole.width) <= 1e-9 * hole.length;
  const double stress = s.remote.xx;
  const bool biaxial = s.uniform() && s.remote.xy == 0 && stress != 0 &&
                       std::abs(s.remote.yy - stress) <= 1e-9 * std::abs(stress);
  if (!square || !biaxial) return {};
  const auto factor = rounded_square_biaxial(hole.corner_radius / hole.length);
  if (!factor) return {};
  return {row(s, Reference::rounded_square_biaxial, "Kt gross", *factor, stress,
              {{"r/s", hole.corner_radius / hole.length}}, {edges(s), neighbours(s)})};
}

}  // namespace

std::vector<Comparison> compare_ellipse(const Situation& s) {
  if (neighbours(s).size > 0.1 || s.bending != 0) return {};
  if (s.pressure != 0) {
    const bool alone = s.remote.xx == 0 && s.remote.yy == 0 && s.remote.xy == 0;
    return alone ? ellipse_pressure(s) : std::vector<Comparison>{};
  }
  if (!s.uniaxial() || !aligned(s.shape()) || !strip(s).central()) return inglis_rows(s);
  const Strip t = strip(s);
  const double ratio = t.half_across / t.half_along, x = 2 * t.half_across / t.width;
  std::vector<Comparison> rows{row(s, Reference::roark_ellipse, "Kt net", roark_ellipse(ratio, x),
                                   t.stress / (1 - x), {{"a/b", ratio}, {"2a/W", x}},
                                   {ends(t), neighbours(s)})};
  const auto infinite = inglis_rows(s);
  const bool effectively_infinite = !infinite.empty() && infinite.front().in_range;
  if (effectively_infinite || !rows.front().in_range) {
    rows.insert(rows.end(), infinite.begin(), infinite.end());
  }
  return rows;
}

std::vector<Comparison> compare_slot(const Situation& s) {
  if (neighbours(s).size > 0.1 || !s.uniaxial() || !aligned(s.shape())) return {};
  const Strip t = strip(s);
  if (t.half_across <= t.half_along) return {};  // the estimate is for a slot across the load
  const double ratio = t.half_across / t.half_along;
  return {row(s, Reference::slot_estimate, "Kt gross", slot_estimate(ratio), t.stress, {{"a/r", ratio}},
              {edges(s), neighbours(s)})};
}

std::vector<Comparison> compare_rounded_rectangle(const Situation& s) {
  if (neighbours(s).size > 0.1) return {};
  if (!s.uniaxial()) return square_biaxial(s);
  const Strip t = strip(s);
  const double a = t.half_across, b = t.half_along;
  if (!aligned(s.shape()) || b > a * (1 + 1e-9)) return {};  // the fit is for b <= a
  const double r = s.shape().corner_radius;
  return {row(s, Reference::rounded_rectangle, "Kt gross", rounded_rectangle(b / a, r / b), t.stress,
              {{"r/b", r / b}, {"b/a", b / a}}, {edges(s), neighbours(s)})};
}

}  // namespace raiser::validation
