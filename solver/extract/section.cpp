#include "solver/extract/section.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

namespace raiser::solver {

namespace {

using mesh::Direction;

// Below this part of the largest load stress a nominal stress is rounding.
constexpr double negligible = 1e-12;

double largest_principal(double xx, double yy, double xy) {
  return principal({.xx = xx, .yy = yy, .xy = xy}).cwiseAbs().maxCoeff();
}

double largest_load(const std::vector<Load>& loads) {
  double size = 0.0;
  for (const Load& load : loads) size = std::max({size, std::abs(load.stress), std::abs(load.along)});
  return size;
}

// Which components of the undisturbed state are there at all.
struct Present {
  bool xx = false;
  bool bending = false;
  bool yy = false;
  bool xy = false;

  int count() const { return int(xx) + int(bending) + int(yy) + int(xy); }
};

Present present(const NominalState& state, double size) {
  const auto counts = [&](double stress) { return std::abs(stress) > negligible * size; };
  return {counts(state.xx), counts(state.bending), counts(state.yy), counts(state.xy)};
}

// One component of the nominal stress in symbols.
struct Symbols {
  const char* kind;  // "gross" or "net"
  std::string area_across;
  std::string area_along;
  std::string bending;
};

std::string sections(const Symbols& symbols, const Present& has, const Point& centre) {
  const bool across = has.xx || has.bending || has.xy;
  std::string text = fmt::format("{} section{}", symbols.kind, across && has.yy ? "s" : "");
  if (across) text += fmt::format(" x = {:.6g} mm", centre.x() + 0.0);
  if (across && has.yy) text += " and";
  if (has.yy) text += fmt::format(" y = {:.6g} mm", centre.y() + 0.0);
  return text;
}

std::string definition(const Symbols& symbols, const Present& has, const NominalState& state,
                       const Point& centre) {
  const std::string tail = ", " + sections(symbols, has, centre);
  const std::string pressure =
      state.pressure != 0.0 ? "; the pressure in the hole does not count" : std::string();
  if (has.count() == 1) {
    if (has.xx) return "F / " + symbols.area_across + tail + pressure;
    if (has.bending) return symbols.bending + tail + pressure;
    if (has.yy) return "F / " + symbols.area_along + tail + pressure;
    return "V / " + symbols.area_across + tail + pressure;
  }
  std::string text = "principal stress of largest magnitude of";
  if (has.xx || has.bending) text += " sigma_xx =";
  if (has.xx) text += " F / " + symbols.area_across;
  if (has.bending) text += (has.xx ? " +- " : " ") + symbols.bending;
  if (has.yy)
    text += std::string(has.xx || has.bending ? "," : "") + " sigma_yy = F_y / " + symbols.area_along;
  if (has.xy) text += ", sigma_xy = V / " + symbols.area_across;
  return text + tail + pressure;
}

Basis gross_basis(const NominalState& state, const Present& has, const Point& centre) {
  if (has.count() == 0 && state.pressure != 0.0)
    return {std::abs(state.pressure), "p, the pressure in the hole", ""};
  if (has.count() == 0)
    return {
        0.0, "",
        fmt::format("the loads leave the plate without holes unstressed at x = {:.6g} mm, y = {:.6g} mm: use "
                    "the edge stress itself",
                    centre.x() + 0.0, centre.y() + 0.0)};
  const Symbols symbols{"gross", "(W t)", "(L t)", "6 M / (W^2 t) at the plate's edge"};
  return {std::max(largest_principal(state.xx + state.bending, state.yy, state.xy),
                   largest_principal(state.xx - state.bending, state.yy, state.xy)),
          definition(symbols, has, state, centre), ""};
}

Basis net_basis(const mesh::Hole& hole, const NominalState& state, const Present& has, const Section& across,
                const Section& along) {
  if (has.count() == 0 && state.pressure != 0.0)
    return {
        0.0, "",
        "a pressure in the hole puts no outer force on the net section: use Kt gross, which stands on the "
        "pressure"};
  if (has.count() == 0) return {0.0, "", gross_basis(state, has, hole.centre).why};
  const double xx = across.normal_force / across.net_area;
  const double yy = along.normal_force / along.net_area;
  const double xy = across.shear_force / across.net_area;
  Basis basis;
  double lever = 0.0;
  if (const auto cut = mesh::chord(hole, Direction::across, across.station))
    for (const double y : {cut->begin, cut->end}) {
      const double arm = y - across.net_centroid;
      const double bending = has.bending ? across.moment * arm / across.net_inertia : 0.0;
      basis.stress = std::max(basis.stress, largest_principal(xx + bending, yy, xy));
      lever = std::max(lever, std::abs(arm));
    }
  const Symbols symbols{
      "net", "A_net", "A_net",
      fmt::format("M c / I_net at the hole's edge (c = {:.6g} mm from the net centroid)", lever)};
  basis.definition = definition(symbols, has, state, hole.centre) + ", all holes on it taken out";
  return basis;
}

}  // namespace

Section section_at(const Plate& plate, const std::vector<Load>& loads, mesh::Direction direction,
                   double station) {
  const bool across = direction == Direction::across;
  Section section;
  section.direction = direction;
  section.station = station;
  section.gross_area = plate.thickness * (across ? plate.width : plate.length);
  const auto pieces = mesh::material_along(plate, direction, station);
  double first_moment = 0.0;
  for (const mesh::Interval& piece : pieces) {
    const double area = plate.thickness * (piece.end - piece.begin);
    section.net_area += area;
    first_moment += area * 0.5 * (piece.begin + piece.end);
  }
  section.net_centroid = section.net_area > 0.0 ? first_moment / section.net_area : 0.0;
  for (const mesh::Interval& piece : pieces) {
    const double size = piece.end - piece.begin;
    const double arm = 0.5 * (piece.begin + piece.end) - section.net_centroid;
    section.net_inertia += plate.thickness * size * (size * size / 12.0 + arm * arm);
  }
  const SectionForces forces = section_forces(plate, loads, direction, station);
  section.normal_force = forces.normal;
  section.shear_force = forces.shear;
  section.moment = forces.moment;
  return section;
}

Nominal nominal(const Plate& plate, const std::vector<Load>& loads, std::size_t hole) {
  const mesh::Hole& at = plate.holes.at(hole);
  const NominalState state = nominal_state(plate, loads, hole);
  const Present has = present(state, largest_load(loads));
  const Section across = section_at(plate, loads, Direction::across, at.centre.x());
  const Section along = section_at(plate, loads, Direction::along, at.centre.y());
  const bool only_transverse = has.yy && has.count() == 1;
  return {only_transverse ? along : across, gross_basis(state, has, at.centre),
          net_basis(at, state, has, across, along)};
}

Concentration concentration(const Estimate& peak, const Basis& basis) {
  Concentration result;
  result.nominal = basis.stress;
  result.definition = basis.definition;
  result.why = basis.why;
  if (!basis.why.empty()) return result;
  result.kt = Estimate{std::abs(peak.value), peak.bound}.scaled(1.0 / basis.stress);
  return result;
}

}  // namespace raiser::solver
