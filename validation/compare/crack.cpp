// Straight cracks in rectangles, by themselves and at a central hole.
#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>

#include "validation/compare/families.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::validation {

namespace {

/// The plate as a strip along its only tension, or bent along x.
struct Strip {
  bool along_x = true;
  bool bends = false;
  double stress = 0.0;  ///< MPa
  double width = 0.0, length = 0.0;

  double across(const Point& p) const { return along_x ? p.y() : p.x(); }
  double along(const Point& p) const { return along_x ? p.x() : p.y(); }
};

std::optional<Strip> strip_of(const TipSituation& s) {
  const bool is_bent = s.bending != 0 && s.remote.xx == 0 && s.remote.yy == 0 && s.remote.xy == 0;
  const bool is_pulled = s.bending == 0 && s.remote.xy == 0 && (s.remote.xx == 0) != (s.remote.yy == 0);
  if (!is_bent && !is_pulled) return std::nullopt;
  const mesh::Plate& plate = s.problem.plate;
  const bool along_x = is_bent || s.remote.xx != 0;
  return Strip{along_x, is_bent,
               is_bent   ? s.bending
               : along_x ? s.remote.xx
                         : s.remote.yy,
               along_x ? plate.width : plate.length, along_x ? plate.length : plate.width};
}

/// What all forms for a strip share.
struct View {
  const TipSituation& s;
  const Strip& strip;
  const mesh::Crack& crack;
  double a = 0.0;      ///< mm, half the length of a crack inside, the length of another
  double end = 0.0;    ///< mm, from the crack to the nearer loaded end
  double slack = 0.0;  ///< mm, places that are one

  Comparison row(Reference reference, double factor, double stress, const std::vector<Parameter>& parameters,
                 std::vector<Effect> effects = {}) const {
    const mesh::CrackTip tip = mesh::tips(s.problem.plate.cracks).at(s.found.tip);
    // The forms are for strips twice as long as wide where an edge crack bends them.
    const bool is_at_edge = crack.has_mouth && s.problem.plate.holes.empty();
    effects.push_back(ends(end, strip.width, "crack", is_at_edge ? 1.0 : 0.75));
    Comparison c =
        beside(reference, "F = K_I/(S sqrt(pi a))", factor,
               s.found.k_one.scaled(1 / (stress * std::sqrt(std::numbers::pi * a))), parameters, effects);
    c.hole = Comparison::none;
    c.place = tip.name;
    c.load = s.load;
    return c;
  }
};

bool is_normal(const View& v) {
  const Point d = v.crack.points.back() - v.crack.points.front();
  return v.crack.points.size() == 2 && std::abs(v.strip.along(d)) <= v.slack;
}

std::vector<Comparison> inside(const View& v) {
  const Point middle = (v.crack.points.front() + v.crack.points.back()) / 2;
  if (v.strip.bends || std::abs(v.strip.across(middle)) > v.slack) return {};
  const double x = 2 * v.a / v.strip.width;
  const std::vector<Parameter> at{{"2a/W", x}};
  std::vector<Comparison> rows;
  const auto add = [&](Reference reference, double factor) {
    rows.push_back(v.row(reference, factor, v.strip.stress, at));
  };
  add(Reference::centre_tada, centre_tada(x));
  add(Reference::centre_secant, centre_secant(x));
  if (const auto series = centre_isida(x)) add(Reference::centre_isida, *series);
  return rows;
}

/// From which edge across the strip the crack starts: +1 or -1, or 0 for none.
double edge_side(const View& v, const mesh::Crack& crack) {
  const double at = v.strip.across(crack.points.front());
  if (!crack.has_mouth || std::abs(std::abs(at) - v.strip.width / 2) > v.slack) return 0.0;
  return at > 0 ? 1.0 : -1.0;
}

std::vector<Comparison> from_edge(const View& v) {
  const double x = v.a / v.strip.width;
  const std::vector<Parameter> at{{"a/W", x}};
  const double stress = v.strip.bends ? edge_side(v, v.crack) * v.strip.stress : v.strip.stress;
  std::vector<Comparison> rows;
  const auto add = [&](Reference reference, double factor) {
    rows.push_back(v.row(reference, factor, stress, at));
  };
  if (v.strip.bends) {
    add(Reference::edge_bending_polynomial, edge_bending_polynomial(x));
    add(Reference::edge_bending_tada, edge_bending_tada(x));
    return rows;
  }
  add(Reference::edge_tada, edge_tada(x));
  add(Reference::edge_polynomial, edge_polynomial(x));
  return rows;
}

std::vector<Comparison> from_both_edges(const View& v, const mesh::Crack& other) {
  const bool is_like = edge_side(v, other) == -edge_side(v, v.crack) && other.points.size() == 2 &&
                       std::abs(other.length() - v.crack.length()) <= v.slack &&
                       (other.points.back() - v.crack.points.back()).cwiseAbs().minCoeff() <= v.slack &&
                       std::abs(v.strip.along(other.points.back() - v.crack.points.back())) <= v.slack;
  if (!is_like || v.strip.bends) return {};
  const double x = 2 * v.a / v.strip.width;
  const std::vector<Parameter> at{{"2a/W", x}};
  return {v.row(Reference::two_edges_tada, two_edges_tada(x), v.strip.stress, at),
          v.row(Reference::two_edges_benthem, two_edges_benthem(x), v.strip.stress, at)};
}

/// Whether a crack starts at the side of the hole, on the diameter across the strip.
bool starts_at(const View& v, const mesh::Crack& crack, const mesh::Hole& hole) {
  const Point arm = crack.points.front() - hole.centre;
  return crack.has_mouth && crack.points.size() == 2 && std::abs(v.strip.along(arm)) <= v.slack &&
         std::abs(v.strip.along(crack.points.back() - hole.centre)) <= v.slack &&
         std::abs(arm.norm() - hole.length / 2) <= v.slack;
}

std::vector<Comparison> at_hole(const View& v) {
  const mesh::Plate& plate = v.s.problem.plate;
  const mesh::Hole& hole = plate.holes.front();
  const bool is_covered = hole.shape == mesh::HoleShape::circle && !v.strip.bends &&
                          std::abs(v.strip.across(hole.centre)) <= v.slack && starts_at(v, v.crack, hole);
  if (!is_covered) return {};
  const bool is_one = plate.cracks.size() == 1;
  if (!is_one) {
    const mesh::Crack& other = plate.cracks[&v.crack == &plate.cracks[0] ? 1 : 0];
    if (!starts_at(v, other, hole) || std::abs(other.length() - v.a) > v.slack) return {};
  }
  const HoleCracks cracks = is_one ? HoleCracks::one : HoleCracks::two;
  const double radius = hole.length / 2, q = v.a / radius, extent = (radius + v.a) / v.strip.width;
  const double width = newman_width(cracks, radius / v.strip.width, v.a / v.strip.width);
  std::vector<Comparison> rows{v.row(is_one ? Reference::newman_strip_one : Reference::newman_strip_two,
                                     newman_hole(cracks, q) * width, v.strip.stress, {{"(R+a)/W", extent}})};
  const Effect finite{"the plate is not infinite", width - 1};
  rows.push_back(v.row(is_one ? Reference::one_crack_fit : Reference::two_cracks_fit,
                       is_one ? one_crack_fit(q) : two_cracks_fit(q), v.strip.stress, {{"a/R", q}},
                       {finite}));
  if (const auto table = bowie(cracks, Tension::uniaxial, q))
    rows.push_back(v.row(is_one ? Reference::bowie_one : Reference::bowie_two, *table, v.strip.stress,
                         {{"a/R", q}}, {finite}));
  return rows;
}

}  // namespace

std::vector<Comparison> compare_tip(const TipSituation& s) {
  const mesh::Plate& plate = s.problem.plate;
  const auto strip = strip_of(s);
  if (!strip || plate.holes.size() > 1 || plate.cracks.size() > 2) return {};
  const std::size_t own = mesh::tips(plate.cracks).at(s.found.tip).crack;
  const mesh::Crack& crack = plate.cracks[own];
  const double off =
      std::max(std::abs(strip->along(crack.points.front())), std::abs(strip->along(crack.points.back())));
  const View v{s,
               *strip,
               crack,
               crack.length() * (crack.has_mouth ? 1.0 : 0.5),
               strip->length / 2 - off,
               1e-6 * (plate.length + plate.width)};
  if (!is_normal(v)) return {};
  if (!plate.holes.empty()) return at_hole(v);
  const bool is_alone = plate.cracks.size() == 1;
  if (!crack.has_mouth) return is_alone ? inside(v) : std::vector<Comparison>{};
  if (edge_side(v, crack) == 0) return {};
  return is_alone ? from_edge(v) : from_both_edges(v, plate.cracks[1 - own]);
}

}  // namespace raiser::validation
