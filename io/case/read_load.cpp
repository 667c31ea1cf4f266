#include <fmt/format.h>

#include <array>
#include <cmath>

#include "io/case/outline.hpp"
#include "io/case/parts.hpp"
#include "mesh/plate/words.hpp"
#include "solver/elasticity/outer_edge.hpp"

namespace raiser::io {

namespace {

using solver::Load;
using Keys = std::span<const std::string_view>;

constexpr std::array<std::string_view, 17> load_keys{
    "name",     "kind", "direction", "stress",       "force", "moment",      "on",   "hole", "crack",
    "pressure", "edge", "normal",    "normal_force", "shear", "shear_force", "from", "to"};
constexpr std::array<std::string_view, 6> tension_keys{"name", "kind", "direction", "stress", "force", "on"};
constexpr std::array<std::string_view, 4> shear_keys{"name", "kind", "stress", "force"};
constexpr std::array<std::string_view, 5> bending_keys{"name", "kind", "stress", "moment", "on"};
constexpr std::array<std::string_view, 5> pressure_keys{"name", "kind", "hole", "crack", "pressure"};
constexpr std::array<std::string_view, 9> edge_keys{"name",  "kind",        "edge", "normal", "normal_force",
                                                    "shear", "shear_force", "from", "to"};
constexpr std::array kinds{Load::Kind::tension, Load::Kind::shear, Load::Kind::bending, Load::Kind::pressure,
                           Load::Kind::edge};

/// Where and for what the loads are read.
struct Context {
  PlateSizes plate;
  std::optional<mesh::Plate> drawn;  ///< the plate without its holes, when its outline is no rectangle
  bool is_rectangle = true;          ///< known to be one: its sizes are those of its edges
  std::vector<std::string> edges;
  const std::vector<std::string_view>& holes;
  const std::vector<std::string_view>& cracks;
};

/// Area of the section of the given length, mm^2; empty without the sizes.
std::optional<double> section(const PlateSizes& plate, const std::optional<double>& length) {
  if (!length || !plate.thickness) return std::nullopt;
  return *length * *plate.thickness;
}

std::optional<double> over(const std::optional<double>& force, const std::optional<double>& area) {
  if (!force || !area) return std::nullopt;
  return *force / *area;
}

/// A stress, given as such or as a force or moment on a section of the given
/// area or modulus.
std::optional<double> stress_from(const Table& table, Keys keys, Dimension other,
                                  const std::optional<double>& section, std::string_view sample) {
  const Entry* entry = require_one(table, keys, sample);
  if (entry == nullptr) return std::nullopt;
  if (entry->key == keys.front()) return quantity(table, entry, Dimension::stress, Sign::nonzero);
  return over(quantity(table, entry, other, Sign::nonzero), section);
}

constexpr std::array<std::string_view, 2> stress_or_force{"stress", "force"};

/// The ends (axis 0) or sides (1) that a tension or bending acts on.
std::optional<solver::LoadedEnds> ends_of(const Table& table, const Context& context, int axis) {
  if (!context.drawn) return std::nullopt;
  auto ends = solver::loaded_ends(*context.drawn, axis);
  if (!ends)
    complain(table,
             fmt::format("the outline has no straight edge at both of its {}", axis == 0 ? "ends" : "sides"),
             "load edges by name with kind = \"edge\"");
  return ends;
}

/// Which end (axis 0: right or left) or side (1: top or bottom) `on` names.
std::optional<std::size_t> read_on(const Table& table, int axis) {
  constexpr std::array<std::string_view, 4> words{"right", "left", "top", "bottom"};
  return choice(table, find(table, "on"), std::span(words).subspan(axis == 0 ? 0 : 2, 2));
}

/// The factor where both ends are equal, or could not be read: nothing if `on` is faulty.
std::optional<double> on_either(const Table& table, int axis) {
  const bool is_sound = find(table, "on") == nullptr || read_on(table, axis);
  return is_sound ? std::optional(1.0) : std::nullopt;
}

/// The factor from a stress on the end named in `on` to that on the smaller one.
/// Unequal ends must name one where a stress is given.
std::optional<double> on_smaller(const Table& table, const solver::LoadedEnds& ends, int axis,
                                 double (*size)(const solver::LoadedEnd&)) {
  const Entry* entry = find(table, "on");
  const bool equal = std::abs(size(ends.low) - size(ends.high)) <= 1e-9 * size(ends.high);
  if (entry == nullptr) {
    if (equal || find(table, "stress") == nullptr) return 1.0;
    complain(table, fmt::format("the ends differ: {:.6g} and {:.6g} mm^2", ends.low.area, ends.high.area),
             fmt::format("say which one the stress stands on, e.g. on = \"{}\", or give a force or moment",
                         axis == 0 ? "right" : "top"));
    return std::nullopt;
  }
  const auto index = read_on(table, axis);
  if (!index) return std::nullopt;
  if (find(table, "stress") == nullptr) return 1.0;
  return size(*index == 0 ? ends.high : ends.low) / size(ends.reference());
}

double area_of(const solver::LoadedEnd& end) { return end.area; }
double modulus_of(const solver::LoadedEnd& end) { return end.modulus(); }

std::optional<Load> read_tension(const Table& table, const Context& context) {
  constexpr std::array<std::string_view, 2> directions{"along", "across"};
  refuse_unfitting(table, "tension", load_keys, tension_keys);
  const Entry* entry = find(table, "direction");
  const auto direction = entry == nullptr ? std::optional<std::size_t>(0) : choice(table, entry, directions);
  const bool across = direction.value_or(0) == 1;
  const auto ends = ends_of(table, context, across ? 1 : 0);
  const auto factor =
      ends ? on_smaller(table, *ends, across ? 1 : 0, area_of) : on_either(table, across ? 1 : 0);
  const auto area = ends ? std::optional(ends->reference().area)
                         : section(context.plate, across ? context.plate.length : context.plate.width);
  auto stress = stress_from(table, stress_or_force, Dimension::force, area, "\"100 MPa\"");
  if (!direction || !stress || !factor || (context.drawn && !ends)) return std::nullopt;
  *stress *= *factor;
  Load load;
  load.kind = across ? Load::Kind::transverse : Load::Kind::tension;
  load.stress = *stress;
  return load;
}

std::optional<Load> read_shear(const Table& table, const Context& context) {
  refuse_unfitting(table, "shear", load_keys, shear_keys);
  const auto area = section(context.plate, context.plate.width);
  const auto stress = stress_from(table, stress_or_force, Dimension::force, area, "\"50 MPa\"");
  if (!stress) return std::nullopt;
  Load load;
  load.kind = Load::Kind::shear;
  load.stress = *stress;
  return load;
}

std::optional<Load> read_bending(const Table& table, const Context& context) {
  constexpr std::array<std::string_view, 2> keys{"stress", "moment"};
  refuse_unfitting(table, "bending", load_keys, bending_keys);
  auto modulus = section(context.plate, context.plate.width);
  if (modulus) *modulus *= *context.plate.width / 6.0;
  const auto ends = ends_of(table, context, 0);
  if (ends) modulus = ends->reference().modulus();
  const auto factor = ends ? on_smaller(table, *ends, 0, modulus_of) : on_either(table, 0);
  auto stress = stress_from(table, keys, Dimension::moment, modulus, "\"50 MPa\"");
  if (!stress || !factor || (context.drawn && !ends)) return std::nullopt;
  *stress *= *factor;
  Load load;
  load.kind = Load::Kind::bending;
  load.stress = *stress;
  return load;
}

std::optional<Load> read_pressure(const Table& table, const Context& context) {
  refuse_unfitting(table, "pressure", load_keys, pressure_keys);
  constexpr std::array<std::string_view, 2> places{"hole", "crack"};
  const Entry* place = require_one(table, places, sample_of(context.holes));
  const bool on_crack = place != nullptr && place->key == "crack";
  const auto index = choice(table, place, on_crack ? context.cracks : context.holes);
  const auto pressure =
      quantity(table, require(table, "pressure", "\"10 MPa\""), Dimension::stress, Sign::nonzero);
  if (!index || !pressure) return std::nullopt;
  Load load;
  load.kind = on_crack ? Load::Kind::face_pressure : Load::Kind::pressure;
  (on_crack ? load.crack : load.hole) = *index;
  load.stress = *pressure;
  return load;
}

/// One component of an edge load at both ends of the loaded part, MPa; 0 when
/// neither key is there.
struct Component {
  double begin = 0.0;
  std::optional<double> end;  ///< where it differs from that at the beginning
};

/// Two stresses in a list: at the beginning and the end of the loaded part.
std::optional<Component> read_ends(const Table& table, const Entry& entry) {
  const std::vector<Node>& both = entry.value.items;
  if (both.size() != 2) {
    complain(table, entry, fmt::format("a list has the stresses at both ends and this has {}", both.size()),
             "write e.g. [\"0 MPa\", \"40 MPa\"], or one stress for all of it");
    return std::nullopt;
  }
  const auto begin = quantity(table, entry, both.front(), Dimension::stress, Sign::any);
  const auto end = quantity(table, entry, both.back(), Dimension::stress, Sign::any);
  if (!begin || !end) return std::nullopt;
  if (*begin != 0.0 || *end != 0.0) return Component{*begin, *end};
  complain(table, entry, "a load of zero does nothing", "give it a value or leave it out");
  return std::nullopt;
}

std::optional<Component> read_component(const Table& table, Keys keys, const std::optional<double>& area) {
  const Entry* stress = find(table, keys.front());
  if (stress == nullptr && find(table, keys.back()) == nullptr) return Component{};
  if (stress != nullptr && stress->value.kind == Node::Kind::array) {
    static_cast<void>(require_one(table, keys, ""));  // complains of a force beside it
    return read_ends(table, *stress);
  }
  const auto value = stress_from(table, keys, Dimension::force, area, "\"100 MPa\"");
  if (!value) return std::nullopt;
  return Component{*value, std::nullopt};
}

/// Where the loaded part of an edge begins and ends; empty for the edge's own ends.
struct Part {
  std::optional<double> from, to;
};
std::optional<Part> read_part(const Table& table, const std::optional<double>& length) {
  Part part;
  bool sound = true;
  for (const auto& [key, place] : {std::pair{"from", &part.from}, {"to", &part.to}}) {
    const Entry* entry = find(table, key);
    if (entry == nullptr) continue;
    *place = quantity(table, entry, Dimension::length, Sign::any);
    sound = sound && place->has_value();
    if (!*place || !length || (**place >= 0.0 && **place <= *length * (1 + 1e-12))) continue;
    complain(table, *entry,
             fmt::format("the edge runs from 0 to {:g} mm, anticlockwise round the plate", *length),
             "give a place on it");
    sound = false;
  }
  if (!sound) return std::nullopt;
  if (part.from && part.from.value() >= part.to.value_or(length.value_or(1e300))) {
    complain(table, "the loaded part ends where it begins or before", "let \"to\" be larger than \"from\"");
    return std::nullopt;
  }
  return part;
}

std::optional<Load> read_edge(const Table& table, const Context& context) {
  constexpr std::array<std::string_view, 2> normal_keys{"normal", "normal_force"};
  constexpr std::array<std::string_view, 2> shear_keys_of_edge{"shear", "shear_force"};
  refuse_unfitting(table, "an edge load", load_keys, edge_keys);
  const std::vector<std::string_view> words(context.edges.begin(), context.edges.end());
  const auto edge = choice(table, require(table, "edge", sample_of(words, "right")), words);
  const bool end = edge.value_or(0) % 2 == 0;
  std::optional<double> length;
  if (context.drawn && edge) length = mesh::edge_length(*context.drawn->outline, *edge);
  if (!context.drawn && context.is_rectangle) length = end ? context.plate.width : context.plate.length;
  const auto part = read_part(table, edge ? length : std::nullopt);
  auto loaded = length;
  if (part && length) loaded = part->to.value_or(*length) - part->from.value_or(0.0);
  const auto area = section(context.plate, loaded);
  const auto normal = read_component(table, normal_keys, area);
  const auto along = read_component(table, shear_keys_of_edge, area);
  if (normal && along && normal->begin == 0.0 && along->begin == 0.0 && !normal->end && !along->end) {
    complain(table, "neither a normal nor a shear stress is given",
             "add normal, normal_force, shear or shear_force, e.g. normal = \"100 MPa\"");
    return std::nullopt;
  }
  if (!edge || !part || !normal || !along) return std::nullopt;
  Load load;
  load.kind = Load::Kind::edge;
  load.edge = *edge;
  load.stress = normal->begin;
  load.along = along->begin;
  load.stress_to = normal->end;
  load.along_to = along->end;
  load.from = part->from;
  load.to = part->to;
  return load;
}

std::optional<Load> read_kind(const Table& table, const Context& context, Load::Kind kind) {
  switch (kind) {
    case Load::Kind::shear:
      return read_shear(table, context);
    case Load::Kind::bending:
      return read_bending(table, context);
    case Load::Kind::pressure:
    case Load::Kind::face_pressure:
      return read_pressure(table, context);
    case Load::Kind::edge:
      return read_edge(table, context);
    case Load::Kind::tension:
    case Load::Kind::transverse:
    case Load::Kind::pin:
      break;
  }
  return read_tension(table, context);
}

/// Reports what is wrong with the values of a load whose kind is not known.
void check_values(const Table& table) {
  for (const std::string_view key : {"stress", "pressure", "normal", "shear"}) {
    const Entry* entry = find(table, key);
    const bool ends =
        entry != nullptr && entry->value.kind == Node::Kind::array && key != "stress" && key != "pressure";
    if (!ends) quantity(table, entry, Dimension::stress, Sign::nonzero);
  }
  for (const std::string_view key : {"from", "to"})
    quantity(table, find(table, key), Dimension::length, Sign::any);
  for (const std::string_view key : {"force", "normal_force", "shear_force"}) {
    quantity(table, find(table, key), Dimension::force, Sign::nonzero);
  }
  quantity(table, find(table, "moment"), Dimension::moment, Sign::nonzero);
}

/// What a load without a name of its own is called.
std::string default_name(const std::optional<Load>& load, const Context& context) {
  if (!load) return "load";
  switch (load->kind) {
    case Load::Kind::tension:
    case Load::Kind::shear:
    case Load::Kind::bending:
      break;
    case Load::Kind::transverse:
      return "tension across";
    case Load::Kind::pressure:
      return fmt::format("pressure in {}", context.holes[load->hole]);
    case Load::Kind::face_pressure:
      return fmt::format("pressure in {}", context.cracks[load->crack]);
    case Load::Kind::pin:
      return fmt::format("pin in {}", context.holes[load->hole]);
    case Load::Kind::edge:
      return mesh::edge_phrase(context.edges[load->edge]);
  }
  return std::string(solver::word(load->kind));
}

/// The name, or name 2, name 3, ... whichever is first in neither set.
std::string first_free(const std::string& name, const Names& names, const Names& written) {
  std::string candidate = name;
  for (int i = 2; names.contains(candidate) || written.contains(candidate); ++i) {
    candidate = fmt::format("{} {}", name, i);
  }
  return candidate;
}

Names written_names(const std::vector<Table>& tables) {
  Names names;
  for (const Table& table : tables) {
    const Entry* entry = find(table, "name");
    if (entry != nullptr && entry->value.kind == Node::Kind::text) names.insert(entry->value.text);
  }
  return names;
}

std::optional<Load> read_load(const Table& table, const Context& context) {
  std::vector<std::string_view> words;
  for (const Load::Kind kind : kinds) words.push_back(solver::word(kind));
  refuse_unknown(table, load_keys);
  const auto kind = choice(table, require(table, "kind", "\"tension\""), words);
  if (kind) return read_kind(table, context, kinds[*kind]);
  check_values(table);
  return std::nullopt;
}

}  // namespace

std::vector<LoadReading> read_loads(const Table& document, const PlateSizes& plate,
                                    const OutlineReading& outline, const std::vector<std::string_view>& holes,
                                    const std::vector<std::string_view>& cracks) {
  std::vector<LoadReading> loads;
  std::vector<Table> tables = tables_at(document, "load");
  if (tables.size() > most_loads) {
    complain(tables[most_loads], fmt::format("there are {} loads", tables.size()),
             fmt::format("a case has at most {}; put loads of one kind together", most_loads));
    tables.erase(tables.begin() + most_loads, tables.end());
  }
  const bool is_rectangle = outline.is_known && !outline.outline;
  Context context{plate, std::nullopt, is_rectangle, outline.edges, holes, cracks};
  if (outline.outline && plate.length && plate.width && plate.thickness)
    context.drawn = mesh::Plate{*plate.length, *plate.width, *plate.thickness, {}, outline.outline};
  const std::vector<Table> pins = tables_at(document, "pin");
  Names written = written_names(tables);
  written.merge(written_names(pins));
  // The program's own names for sums of loads.
  Names names{"all loads", "edges", "pins", "edges and pins", "supports", "doubt of contact"};
  for (const Table& table : tables) {
    auto load = read_load(table, context);
    const std::string name =
        unique_name(table, first_free(default_name(load, context), names, written), names);
    if (load) load->name = name;
    loads.push_back({std::move(load), table.node->at, table.path});
  }
  for (const Table& table : pins)
    for (auto& load : read_pin(table, holes)) {
      const std::string otherwise = first_free(default_name(load, context), names, written);
      std::string name = otherwise;
      if (find(table, "name") != nullptr && find(table, "holes") == nullptr)
        name = unique_name(table, otherwise, names);
      else if (const Entry* own = find(table, "name"); own != nullptr && load)
        name = first_free(fmt::format("{} in {}", text(table, own).value_or("pin"), holes[load->hole]), names,
                          written);
      names.insert(name);
      if (load) load->name = name;
      loads.push_back({std::move(load), table.node->at, table.path});
    }
  return loads;
}

}  // namespace raiser::io
