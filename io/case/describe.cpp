#include "io/case/describe.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>

#include "io/case/alloys.hpp"
#include "io/case/describe_cracks.hpp"
#include "io/case/describe_import.hpp"
#include "io/case/layout.hpp"
#include "io/case/parts.hpp"
#include "io/case/words.hpp"
#include "io/import/curve_tools.hpp"
#include "mesh/plate/section.hpp"
#include "mesh/plate/words.hpp"
#include "solver/elasticity/outer_edge.hpp"

namespace raiser::io {

namespace {

using mesh::Hole;
using mesh::HoleShape;
using mesh::Plate;
using solver::Load;
using Phrases = std::vector<std::string>;

constexpr std::size_t most_listed = 12;  // holes or loads that are described one by one
constexpr std::string_view default_mark = " (default)";
constexpr std::string_view imported = "hole.0.";  // path of the keys that an imported hole would have

/// A remark on where a value comes from: nothing when it reads as the author
/// wrote it, what they wrote when it reads otherwise, or that it is a default.
std::string origin(const Case& input, const std::string& key, const std::string& reading) {
  if (key.starts_with(imported)) return "";
  const auto written = input.written.find(key);
  if (written == input.written.end()) return std::string(default_mark);
  return written->second == reading ? "" : fmt::format(" (written {})", shown(written->second));
}

std::string amount(double value, std::string_view unit) {
  return fmt::format("{:.10g}{}{}", value, unit.empty() ? "" : " ", unit);
}

/// A figure that follows from others, to six digits.
std::string derived(double value, std::string_view unit) { return fmt::format("{:.6g} {}", value, unit); }

/// "width 60 mm", with its origin.
std::string item(const Case& input, std::string_view word, const std::string& key, double value,
                 std::string_view unit) {
  const std::string reading = amount(value, unit);
  return fmt::format("{} {}{}", word, reading, origin(input, key, reading));
}

std::string percent(double ratio) { return fmt::format("{:.10g} %", ratio * 100.0); }

std::string describe_plate(const Case& input) {
  const Plate& plate = input.problem.plate;
  if (input.drawing_origin)
    return row("Plate", {fmt::format("{} outline, {} long and {} wide", input.import ? "imported" : "drawn",
                                     derived(plate.length, "mm"), derived(plate.width, "mm")),
                         item(input, "thickness", "plate.thickness", plate.thickness, "mm")}) +
           row("", {"positions count from the middle of its bounding box",
                    fmt::format("the drawing's origin lies at ({:.6g}, {:.6g}) mm",
                                input.drawing_origin->x() + 0.0, input.drawing_origin->y() + 0.0)});
  return row("Plate", {item(input, "length", "plate.length", plate.length, "mm"),
                       item(input, "width", "plate.width", plate.width, "mm"),
                       item(input, "thickness", "plate.thickness", plate.thickness, "mm")}) +
         row("", {fmt::format("gross section {} across", derived(plate.width * plate.thickness, "mm^2")),
                  fmt::format("{} along", derived(plate.length * plate.thickness, "mm^2"))});
}

/// "yield strength 355 MPa", with the alloy as its origin where nothing is written.
std::string constant(const Case& input, std::string_view word, const std::string& key, double value,
                     std::string_view unit) {
  if (!input.alloy || input.written.contains(key)) return item(input, word, key, value, unit);
  return fmt::format("{} {} (of {})", word, amount(value, unit), *input.alloy);
}

Phrases elastic_constants(const Case& input) {
  const solver::HookeLaw& law = input.problem.material;
  if (!law.orthotropy)
    return {constant(input, "Young's modulus", "material.youngs_modulus", law.youngs_modulus, "MPa"),
            constant(input, "Poisson's ratio", "material.poissons_ratio", law.poissons_ratio, "")};
  const solver::Orthotropy& own = *law.orthotropy;
  return {"orthotropic",
          item(input, "E1", "material.E1", law.youngs_modulus, "MPa"),
          item(input, "E2", "material.E2", own.youngs_modulus_2, "MPa"),
          item(input, "G12", "material.G12", own.shear_modulus, "MPa"),
          item(input, "nu12", "material.nu12", law.poissons_ratio, ""),
          item(input, "axis 1 at", "material.angle", own.angle * 180.0 / std::numbers::pi, "deg")};
}

/// The parts of a text between semicolons.
Phrases parts_of(std::string_view text) {
  Phrases parts;
  for (std::size_t end = text.find("; "); end != std::string_view::npos; end = text.find("; ")) {
    parts.emplace_back(text.substr(0, end));
    text.remove_prefix(end + 2);
  }
  parts.emplace_back(text);
  return parts;
}

std::string describe_material(const Case& input) {
  const solver::HookeLaw& law = input.problem.material;
  const std::string state = law.state == solver::PlaneState::stress ? "plane stress" : "plane strain";
  Phrases phrases = elastic_constants(input);
  phrases.push_back(state + origin(input, "material.state", state));
  if (input.yield_strength) {
    phrases.push_back(
        constant(input, "yield strength", "material.yield_strength", *input.yield_strength, "MPa"));
  } else {
    phrases.push_back("no yield strength given");
  }
  std::string text = row("Material", phrases);
  if (const auto alloy = input.alloy ? find_alloy(*input.alloy) : std::nullopt) {
    text += row("", {fmt::format("{}: {}", alloy->name, alloy->condition)}) + row("", parts_of(alloy->range));
    text += row("", {"no design values; sources:"}) + row("", parts_of(alloy->source));
  }
  return text;
}

std::string article_free_word(const Hole& hole) { return std::string(mesh::word(hole.shape)); }

Phrases sizes(const Case& input, const Hole& hole, const std::string& path) {
  if (hole.shape == HoleShape::circle) {
    const bool by_radius = input.written.contains(path + "radius");
    const double half = hole.length / 2.0;
    return {by_radius ? item(input, "radius", path + "radius", half, "mm")
                      : item(input, "diameter", path + "diameter", hole.length, "mm")};
  }
  if (hole.shape == HoleShape::drawn)
    return {fmt::format("{} curves of {} in all", hole.edge.size(), derived(length(hole.edge), "mm")),
            fmt::format("{} by {}", derived(hole.length, "mm"), derived(hole.width, "mm")),
            fmt::format("smallest radius {}", derived(hole.corner_radius, "mm"))};
  Phrases phrases{item(input, "length", path + "length", hole.length, "mm"),
                  item(input, "width", path + "width", hole.width, "mm")};
  if (hole.shape == HoleShape::rounded_rectangle) {
    phrases.push_back(item(input, "corner radius", path + "corner_radius", hole.corner_radius, "mm"));
  }
  phrases.push_back(item(input, "angle", path + "angle", hole.angle * 180.0 / std::numbers::pi, "deg"));
  return phrases;
}

/// The net section through the hole's centre, every hole in its way left out.
std::string net_section(const Plate& plate, const Hole& hole) {
  const double x = hole.centre.x();
  const double net = mesh::shape_of(mesh::material_along(plate, mesh::Direction::across, x)).length;
  const double gross = mesh::shape_of(mesh::gross_along(plate, mesh::Direction::across, x)).length;
  return fmt::format("net section at x = {}: {}, {:.1f} % of gross", amount(x, "mm"),
                     derived(net * plate.thickness, "mm^2"), 100.0 * net / gross);
}

std::string describe_hole(const Case& input, std::size_t index) {
  const Hole& hole = input.problem.plate.holes[index];
  const std::size_t written_as = index < input.hole_tables.size() ? input.hole_tables[index] : index + 1;
  const std::string path = fmt::format("hole.{}.", written_as);
  Phrases phrases{article_free_word(hole)};
  for (std::string& phrase : sizes(input, hole, path)) phrases.push_back(std::move(phrase));
  const std::string x = amount(hole.centre.x(), "mm");
  const std::string y = amount(hole.centre.y(), "mm");
  const std::string place = fmt::format("at x = {}, y = {}", x, y);
  phrases.push_back(place + origin(input, path + "at", fmt::format("{}, {}", x, y)));
  std::string label = "  " + hole.name;
  if (path == imported) phrases.emplace_back("imported");
  if (path != imported && !input.written.contains(path + "name")) label += std::string(default_mark);
  return row(label, phrases) + row("", {net_section(input.problem.plate, hole)});
}

/// "985 circle, 5 slot": how many of each shape from hole `first` on.
std::string count_of_shapes(const Plate& plate, std::size_t first) {
  std::map<std::string_view, std::size_t> counts;
  for (std::size_t i = first; i < plate.holes.size(); ++i) ++counts[mesh::word(plate.holes[i].shape)];
  Phrases phrases;
  for (const auto& [shape, count] : counts) phrases.push_back(fmt::format("{} {}", count, shape));
  return fmt::format("{}", fmt::join(phrases, ", "));
}

/// What the outline is and what it raises the stress with.
std::string describe_outline(const Case& input) {
  const Plate& plate = input.problem.plate;
  if (!plate.outline) return "";
  const auto& raisers = plate.outline->raisers;
  std::string result = row(
      "Outline",
      {fmt::format("edges {}", fmt::join(plate.outline->edges, ", ")),
       raisers.size() == 1 ? "1 notch or fillet" : fmt::format("{} notches and fillets", raisers.size())});
  const std::size_t listed = raisers.size() > most_listed ? most_listed / 2 : raisers.size();
  for (std::size_t i = 0; i < listed; ++i) {
    const mesh::Raiser& at = raisers[i];
    const auto net = mesh::shape_of(mesh::material_along(plate, mesh::Direction::across, at.root.x()));
    const auto gross = mesh::shape_of(mesh::gross_along(plate, mesh::Direction::across, at.mouth.x()));
    result += row("  " + at.name, {at.shape, fmt::format("root at x = {:.6g} mm, y = {:.6g} mm",
                                                         at.root.x() + 0.0, at.root.y() + 0.0)}) +
              row("", {fmt::format("net section {}", derived(net.length * plate.thickness, "mm^2")),
                       fmt::format("{:.1f} % of gross", 100.0 * net.length / gross.length)});
  }
  if (listed < raisers.size())
    result += row("  and more", {fmt::format("{} not listed here", raisers.size() - listed)});
  return plate.holes.empty() ? result : result + "\n";
}

std::string describe_holes(const Case& input) {
  const Plate& plate = input.problem.plate;
  if (plate.holes.empty() && plate.outline) return "";
  const std::size_t listed = plate.holes.size() > most_listed ? most_listed / 2 : plate.holes.size();
  if (plate.holes.empty()) return row("Holes", {"none"});
  std::string result = row("Holes", {fmt::format("{}", plate.holes.size())});
  for (std::size_t i = 0; i < listed; ++i) result += describe_hole(input, i);
  if (listed < plate.holes.size()) {
    result += row("  and more", {fmt::format("{} not listed here", plate.holes.size() - listed),
                                 count_of_shapes(plate, listed)});
  }
  return result;
}

std::string kilonewtons(double newtons) { return derived(newtons / 1e3, "kN"); }

/// A pin's force and how its pressure is found.
Phrases meaning_of_pin(const Plate& plate, const Load& load) {
  Phrases phrases{fmt::format("pin in {}", plate.holes[load.hole].name),
                  fmt::format("{} at {} deg", kilonewtons(load.force),
                              fmt::format("{:.10g}", load.direction * 180.0 / std::numbers::pi))};
  if (!load.clearance) {
    phrases.emplace_back("cosine pressure over the half it presses on");
    return phrases;
  }
  phrases.emplace_back("frictionless contact of a rigid pin");
  const double fit = *load.clearance;
  phrases.push_back(fit == 0.0 ? "neat fit"
                               : fmt::format("{} {} on the diameter", fit > 0 ? "clearance" : "interference",
                                             amount(std::abs(fit), "mm")));
  return phrases;
}

/// A traction that changes along its edge or acts on a part of it.
Phrases meaning_of_part(const Plate& plate, const Load& load) {
  Phrases phrases;
  const auto component = [&](const char* word, double begin, const std::optional<double>& end) {
    if (begin == 0.0 && !end) return;
    phrases.push_back(end ? fmt::format("{} from {:.6g} to {:.6g} MPa", word, begin, *end)
                          : fmt::format("{} {:.6g} MPa", word, begin));
  };
  component("normal", load.stress, load.stress_to);
  component("shear (anticlockwise)", load.along, load.along_to);
  const double length = solver::straight_edge(plate, load.edge)->length;
  phrases.push_back(fmt::format("from {} to {} of its {}", amount(load.from.value_or(0.0), "mm"),
                                amount(load.to.value_or(length), "mm"), amount(length, "mm")));
  const solver::Resultant sum = solver::resultant(plate, load);
  phrases.push_back(
      fmt::format("in all ({:.6g}, {:.6g}) kN", sum.force.x() / 1e3 + 0.0, sum.force.y() / 1e3 + 0.0));
  return phrases;
}

/// What a load is and the force or moment that it stands for.
Phrases meaning(const Plate& plate, const Load& load) {
  const auto ends = plate.outline ? solver::loaded_ends(plate, 0) : std::nullopt;
  const auto sides = plate.outline ? solver::loaded_ends(plate, 1) : std::nullopt;
  const double across = ends ? ends->reference().area : plate.width * plate.thickness;
  const double along = sides ? sides->reference().area : plate.length * plate.thickness;
  const std::string stress = derived(load.stress, "MPa");
  const bool unequal = ends && std::abs(ends->low.area - ends->high.area) > 1e-9 * ends->high.area;
  switch (load.kind) {
    case Load::Kind::tension:
      return {fmt::format("tension along x: {} on the {}", stress, unequal ? "smaller end" : "ends"),
              kilonewtons(load.stress * across)};
    case Load::Kind::transverse:
      return {fmt::format("tension across, along y: {} on the sides", stress),
              kilonewtons(load.stress * along)};
    case Load::Kind::shear:
      return {fmt::format("shear: {} on all four edges", stress),
              fmt::format("{} on each end", kilonewtons(load.stress * across))};
    case Load::Kind::bending:
      if (ends)
        return {fmt::format("bending: {} at the edge of the {}", stress, unequal ? "smaller end" : "ends"),
                fmt::format("moment {}", derived(load.stress * ends->reference().modulus() / 1e3, "N m"))};
      return {fmt::format("bending: {} at y = {}", stress, amount(plate.width / 2.0, "mm")),
              fmt::format("moment {}", derived(load.stress * across * plate.width / 6e3, "N m"))};
    case Load::Kind::pressure:
      return {fmt::format("pressure: {} in {}", stress, plate.holes[load.hole].name)};
    case Load::Kind::face_pressure:
      return {fmt::format("pressure: {} on both faces of {}", stress, plate.cracks[load.crack].name)};
    case Load::Kind::pin:
      return meaning_of_pin(plate, load);
    case Load::Kind::edge:
      break;
  }
  if (load.from || load.to || load.stress_to || load.along_to) return meaning_of_part(plate, load);
  const bool end = load.edge == mesh::rectangle::right || load.edge == mesh::rectangle::left;
  double area = plate.thickness * (end ? plate.width : plate.length);
  if (plate.outline) area = plate.thickness * mesh::edge_length(*plate.outline, load.edge);
  return {fmt::format("normal {} = {}", stress, kilonewtons(load.stress * area)),
          fmt::format("shear {} = {} (positive anticlockwise)", derived(load.along, "MPa"),
                      kilonewtons(load.along * area))};
}

/// What the author wrote for the load's size where the reading does not say it
/// in the same words: "written 450 lbf in".
std::string written_amounts(const Case& input, const std::string& path, std::string_view reading) {
  Phrases amounts;
  for (const auto* key :
       {"stress", "force", "moment", "pressure", "normal", "normal_force", "shear", "shear_force"}) {
    const auto written = input.written.find(path + key);
    if (written == input.written.end() || reading.find(written->second) != std::string_view::npos) continue;
    amounts.push_back(shown(written->second));
  }
  return amounts.empty() ? "" : fmt::format("written {}", fmt::join(amounts, " and "));
}

std::string describe_load(const Case& input, std::size_t index) {
  const Load& load = input.problem.loads[index];
  const std::string path = input.load_tables.at(index) + ".";
  Phrases phrases = meaning(input.problem.plate, load);
  if (load.kind == Load::Kind::edge)
    phrases.insert(phrases.begin(), mesh::edge_phrase(mesh::edge_names(input.problem.plate).at(load.edge)));
  if (load.kind == Load::Kind::tension && !input.written.contains(path + "direction")) {
    phrases.push_back("direction along" + std::string(default_mark));
  }
  const std::string written = written_amounts(input, path, fmt::format("{}", fmt::join(phrases, ", ")));
  if (!written.empty()) phrases.push_back(written);
  std::string label = "  " + load.name;
  if (!input.written.contains(path + "name")) label += std::string(default_mark);
  return row(label, phrases);
}

std::string describe_loads(const Case& input) {
  const std::size_t count = input.problem.loads.size();
  const std::size_t listed = count > most_listed ? most_listed / 2 : count;
  std::string result = row("Loads", {fmt::format("{}", count)});
  for (std::size_t i = 0; i < listed; ++i) result += describe_load(input, i);
  if (listed < count) result += row("  and more", {fmt::format("{} not listed here", count - listed)});
  return result;
}

bool has_raisers(const Plate& plate) { return mesh::raiser_count(plate) > 0; }

std::string usual_results(const Plate& plate) {
  if (!has_raisers(plate)) return "stress intensity";
  return std::string("largest and smallest edge stress, von Mises") + (plate.cracks.empty() ? "" : ", K");
}

std::string describe_supports(const Case& input) {
  if (input.problem.supports.empty()) return "";
  const auto edges = mesh::edge_names(input.problem.plate);
  std::string result = row("Supports", {fmt::format("{}", input.problem.supports.size())});
  for (const solver::Support& support : input.problem.supports) {
    Phrases phrases{mesh::edge_phrase(edges.at(support.edge))};
    const bool still = !solver::displaces(support);
    if (still && support.normal && support.along) phrases.emplace_back("clamped: no displacement");
    if (still && !support.along) phrases.emplace_back("sliding: no displacement across the edge");
    if (!still || !support.normal)
      for (const auto& [word, value] :
           {std::pair{"outward", support.normal}, {"along, anticlockwise", support.along}})
        phrases.push_back(value ? fmt::format("displaced {} {}", amount(*value, "mm"), word)
                                : fmt::format("free {}", word));
    result += row("  " + support.name, phrases);
  }
  return result + '\n';
}

std::string describe_question(const Case& input) {
  const mesh::Plate& plate = input.problem.plate;
  const std::vector<mesh::CrackTip> tips = mesh::tips(plate.cracks);
  std::string of = has_raisers(plate) ? "the largest stress at the hole" : "K";
  if (has_raisers(plate) && !tips.empty()) of = "the largest edge stress or K";
  std::string result =
      row("Asked", {fmt::format("{} results", input.asks.size()),
                    fmt::format("tolerance {} of {}{}", percent(input.tolerance), of,
                                input.written.contains("ask.tolerance") ? "" : default_mark)});
  const auto chosen = [&](const std::string& key, const std::string& otherwise) {
    const auto written = input.written.find(key);
    if (written == input.written.end()) return otherwise + std::string(default_mark);
    return written->second.empty() ? "none" : shown(written->second);
  };
  const bool all =
      std::any_of(input.asks.begin(), input.asks.end(), [](const auto& ask) { return ask.name.empty(); });
  if (all) {
    result += row("  results", {chosen("ask.results", usual_results(plate))});
    if (has_raisers(plate))
      result += row("  at", {chosen(input.written.contains("ask.at") ? "ask.at" : "ask.holes",
                                    plate.outline ? "every hole, notch and fillet" : "every hole")});
    if (!tips.empty()) result += row("  at tips", {chosen("ask.tips", "every crack tip")});
  }
  for (const solver::Ask& ask : input.asks) {
    if (ask.name.empty()) continue;
    const std::string place = solver::is_at_tip(ask.quantity) ? "tip " + tips[ask.raiser].name
                                                              : mesh::raiser(plate, ask.raiser).name;
    result += row("  " + ask.name, {fmt::format("{} at {}", word(ask.quantity), place),
                                    fmt::format("tolerance {}", percent(ask.tolerance))});
  }
  return result;
}

}  // namespace

std::string describe(const Case& input) {
  const std::string title = input.title + (input.written.contains("title") ? "" : std::string(default_mark));
  return title + '\n' + row("File", {input.file.string(), fmt::format("format {}", case_format)}) + '\n' +
         describe_plate(input) + describe_import(input) + describe_material(input) + '\n' +
         describe_outline(input) + describe_holes(input) + describe_cracks(input) + '\n' +
         describe_loads(input) + '\n' + describe_supports(input) + describe_question(input);
}

}  // namespace raiser::io
