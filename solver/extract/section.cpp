#include "solver/extract/section.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "solver/elasticity/nominal_state.hpp"

namespace raiser::solver {

namespace {

using mesh::Direction;

// Below this part of the largest load stress a nominal stress is rounding.
constexpr double negligible = 1e-12;

double largest_principal(double xx, double yy, double xy) {
  return principal({.xx = xx, .yy = yy, .xy = xy}).cwiseAbs().maxCoeff();
}

double largest_load(const Plate& plate, const std::vector<Load>& loads) {
  double size = 0.0;
  for (const Load& load : loads) size = std::max(size, largest_stress(plate, load));
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

Symbols gross_symbols(const Plate& plate, const mesh::SectionShape& across, const mesh::SectionShape& along) {
  const auto whole = [](double length, double size) { return std::abs(length - size) <= 1e-12 * size; };
  const bool is_width = whole(across.length, plate.width);
  return {"gross", is_width ? "(W t)" : "A_gross", whole(along.length, plate.length) ? "(L t)" : "A_gross",
          is_width ? "6 M / (W^2 t) at the plate's edge" : "M c / I_gross at the plate's edge"};
}

Basis gross_basis(const Plate& plate, const mesh::Raiser& at, const NominalState& state, const Present& has) {
  if (has.count() == 0 && state.pressure != 0.0)
    return {std::abs(state.pressure), "p, the pressure in the hole", ""};
  if (has.count() == 0)
    return {
        0.0, "",
        fmt::format("the loads leave the plate without holes unstressed at x = {:.6g} mm, y = {:.6g} mm: use "
                    "the edge stress itself",
                    at.mouth.x() + 0.0, at.mouth.y() + 0.0)};
  const Symbols symbols =
      gross_symbols(plate, mesh::shape_of(mesh::gross_along(plate, Direction::across, at.mouth.x())),
                    mesh::shape_of(mesh::gross_along(plate, Direction::along, at.mouth.y())));
  const char* part = at.kind == mesh::Raiser::Kind::fillet ? ", in the wide part" : "";
  return {std::max(largest_principal(state.xx + state.bending, state.yy, state.xy),
                   largest_principal(state.xx - state.bending, state.yy, state.xy)),
          definition(symbols, has, state, at.mouth) + part, ""};
}

// Distances from the net centroid of the places where the section ends at the
// raiser; of the section's ends where it does not.
std::vector<double> arms(const Plate& plate, std::size_t raiser, const Section& across) {
  std::vector<double> result;
  const auto pieces = mesh::material_along(plate, Direction::across, across.station);
  for (const mesh::Interval& piece : pieces) {
    if (piece.raiser_at_begin() == raiser) result.push_back(piece.begin - across.net_centroid);
    if (piece.raiser_at_end() == raiser) result.push_back(piece.end - across.net_centroid);
  }
  if (result.empty() && !pieces.empty())
    result = {pieces.front().begin - across.net_centroid, pieces.back().end - across.net_centroid};
  return result;
}

Basis net_basis(const Plate& plate, std::size_t raiser, const mesh::Raiser& at, const NominalState& state,
                const Present& has, const Section& across, const Section& along) {
  if (has.count() == 0 && state.pressure != 0.0)
    return {
        0.0, "",
        "a pressure in the hole puts no outer force on the net section: use Kt gross, which stands on the "
        "pressure"};
  if (has.count() == 0) return {0.0, "", gross_basis(plate, at, state, has).why};
  const double xx = has.xx ? across.normal_force / across.net_area : 0.0;
  const double yy = has.yy ? along.normal_force / along.net_area : 0.0;
  const double xy = has.xy ? across.shear_force / across.net_area : 0.0;
  Basis basis;
  double lever = 0.0;
  for (const double arm : arms(plate, raiser, across)) {
    const double bending = has.bending ? across.moment * arm / across.net_inertia : 0.0;
    basis.stress = std::max(basis.stress, largest_principal(xx + bending, yy, xy));
    lever = std::max(lever, std::abs(arm));
  }
  const Symbols symbols{"net", "A_net", "A_net",
                        fmt::format("M c / I_net at the {}'s edge (c = {:.6g} mm from the net centroid)",
                                    word(at.kind), lever)};
  const char* part = at.kind == mesh::Raiser::Kind::fillet ? ", in the narrow part" : "";
  const char* taken =
      plate.outline ? ", all holes and notches on it taken out" : ", all holes on it taken out";
  basis.definition = definition(symbols, has, state, at.root) + part + taken;
  return basis;
}

}  // namespace

Section section_at(const Plate& plate, const std::vector<Load>& loads, mesh::Direction direction,
                   double station) {
  const auto gross = mesh::shape_of(mesh::gross_along(plate, direction, station));
  const auto net = mesh::shape_of(mesh::material_along(plate, direction, station));
  const SectionForces forces = section_forces(plate, loads, direction, station);
  Section section;
  section.direction = direction;
  section.station = station;
  section.gross_area = plate.thickness * gross.length;
  section.net_area = plate.thickness * net.length;
  section.net_centroid = net.centroid;
  section.net_inertia = plate.thickness * net.inertia;
  section.normal_force = forces.normal;
  section.shear_force = forces.shear;
  section.moment = forces.moment;
  return section;
}

Basis gross_nominal(const Plate& plate, const std::vector<Load>& loads, const Point& place) {
  mesh::Raiser at;
  at.mouth = at.root = place;
  const NominalState state = nominal_state_at(plate, loads, place);
  return gross_basis(plate, at, state, present(state, largest_load(plate, loads)));
}

Nominal nominal(const Plate& plate, const std::vector<Load>& loads, std::size_t raiser) {
  const mesh::Raiser at = mesh::raiser(plate, raiser);
  const NominalState state = nominal_state(plate, loads, raiser);
  const Present has = present(state, largest_load(plate, loads));
  Section across = section_at(plate, loads, Direction::across, at.root.x());
  Section along = section_at(plate, loads, Direction::along, at.root.y());
  const bool only_transverse = has.yy && has.count() == 1;
  const Basis net = net_basis(plate, raiser, at, state, has, across, along);
  if (at.kind == mesh::Raiser::Kind::fillet) {
    across.gross_area = section_at(plate, loads, Direction::across, at.mouth.x()).gross_area;
    along.gross_area = section_at(plate, loads, Direction::along, at.mouth.y()).gross_area;
  }
  return {only_transverse ? along : across, gross_basis(plate, at, state, has), net};
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
