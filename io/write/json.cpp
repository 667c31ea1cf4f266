#include "io/write/json.hpp"

#include <fmt/format.h>

#include <cmath>
#include <nlohmann/json.hpp>
#include <numbers>

#include "io/case/alloys.hpp"
#include "io/import/curve_tools.hpp"
#include "io/write/crack_words.hpp"
#include "io/write/layout.hpp"
#include "solver/crack/factors.hpp"

namespace raiser::io {
namespace {

using Json = nlohmann::ordered_json;

constexpr double degrees_per_radian = 180.0 / std::numbers::pi;

// A number without a bound.
Json quantity(double value, std::string_view unit) {
  Json object{{"value", nullptr}, {"unit", unit}};
  if (std::isfinite(value)) {
    object["value"] = value == 0.0 ? 0.0 : value;  // no negative zero
  } else {
    object["why"] = "not a finite number";
  }
  return object;
}

Json quantity(const solver::Estimate& estimate, std::string_view unit) {
  Json object{{"value", nullptr}, {"bound", nullptr}, {"unit", unit}};
  const bool bounded = std::isfinite(estimate.bound);
  if (std::isfinite(estimate.value)) object["value"] = estimate.value == 0.0 ? 0.0 : estimate.value;
  if (bounded) object["bound"] = estimate.bound;
  if (!std::isfinite(estimate.value)) {
    object["why"] = "not a finite number";
  } else if (!bounded) {
    object["why"] = "no bound can be given";
  }
  return object;
}

Json position(const mesh::Point& point) {
  return {{"x", quantity(point.x(), "mm")}, {"y", quantity(point.y(), "mm")}};
}

Json edge_value(const solver::EdgeValue& value) {
  Json object = quantity(value.stress, "MPa");
  object["at"] = position(value.point);
  object["edge_angle"] = quantity(value.angle * degrees_per_radian, "deg");
  return object;
}

Json section(const solver::Section& s) {
  const bool across = s.direction == solver::Section::Direction::across;
  return {{"direction", across ? "across" : "along"},
          {"line", across ? "x = station" : "y = station"},
          {"station", quantity(s.station, "mm")},
          {"gross_area", quantity(s.gross_area, "mm^2")},
          {"net_area", quantity(s.net_area, "mm^2")},
          {"net_centroid", quantity(s.net_centroid, "mm")},
          {"net_second_moment_of_area", quantity(s.net_inertia, "mm^4")},
          {"normal_force", quantity(s.normal_force, "N")},
          {"shear_force", quantity(s.shear_force, "N")},
          {"moment", quantity(s.moment, "N mm")}};
}

Json concentration(const solver::Concentration& kt) {
  Json object{{"value", nullptr}, {"bound", nullptr}, {"unit", "1"}};
  if (kt.kt) {
    object = quantity(*kt.kt, "1");
  } else {
    object["why"] = kt.why.empty() ? "not defined" : kt.why;
  }
  object["nominal_stress"] = quantity(kt.nominal, "MPa");
  object["definition"] = kt.definition;
  return object;
}

Json without_value(std::string_view unit, std::string_view why) {
  return {{"value", nullptr}, {"bound", nullptr}, {"unit", unit}, {"why", why}};
}

Json energies(const solver::TipFindings& found) {
  const double g = found.energy_release.value;
  const auto beside = [&](double value) {
    Json object = quantity(value, "N/mm");
    const auto off = relative_difference(value, g);
    object["relative_difference"] = off ? Json(*off) : Json(nullptr);
    return object;
  };
  Json domains = Json::array();
  for (const Eigen::Vector3d& domain : found.domains)
    domains.push_back({{"K_I", domain[0]}, {"K_II", domain[1]}, {"T", domain[2]}});
  return {{"j_integral", beside(found.j_integral)},
          {"virtual_extension", beside(found.extension)},
          {"domains", domains}};
}

Json factors(const solver::CrackFactors& own) {
  const auto factor = [&](const std::optional<solver::Estimate>& y) {
    return y ? quantity(*y, "1") : without_value("1", own.why);
  };
  return {{"Y_I", factor(own.mode_one)},
          {"Y_II", factor(own.mode_two)},
          {"nominal_stress", quantity(own.nominal, "MPa")},
          {"definition", own.definition},
          {"a", quantity(own.size, "mm")},
          {"a_definition", own.size_definition}};
}

Json tip(const Case& input, const std::vector<solver::Load>& loads, const solver::TipFindings& found) {
  const mesh::Plate& plate = input.problem.plate;
  const mesh::CrackTip at = mesh::tips(plate.cracks).at(found.tip);
  const Kink turn = kink(input, found);
  Json angle = turn.angle ? quantity(*turn.angle, "deg") : without_value("deg", turn.why);
  angle["criterion"] = kink_criterion();
  angle["sign"] = kink_sign();
  return {{"tip", at.name},
          {"crack", plate.cracks[at.crack].name},
          {"at", position(at.at)},
          {"direction", quantity(std::atan2(at.direction.y(), at.direction.x()) * degrees_per_radian, "deg")},
          {"K_I", quantity(found.k_one, "MPa sqrt(mm)")},
          {"K_II", quantity(found.k_two, "MPa sqrt(mm)")},
          {"K_I_per_metre", quantity(found.k_one.scaled(1 / root_metre), "MPa sqrt(m)")},
          {"K_II_per_metre", quantity(found.k_two.scaled(1 / root_metre), "MPa sqrt(m)")},
          {"T_stress", quantity(found.t_stress, "MPa")},
          {"energy_release_rate", quantity(found.energy_release, "N/mm")},
          {"beside_it", energies(found)},
          {"kink_angle", angle},
          {"factors", factors(solver::crack_factors(plate, loads, found))},
          {"kt", without_value("1", no_kt())}};
}

Json faces(const Case& input, const std::vector<solver::CrackOpening>& openings) {
  Json list = Json::array();
  for (const solver::CrackOpening& own : openings) {
    const std::string warning = closed_warning(input, own);
    list.push_back({{"crack", input.problem.plate.cracks.at(own.crack).name},
                    {"least_opening", quantity(own.least, "mm")},
                    {"at", position(own.where)},
                    {"largest_distance", quantity(own.largest, "mm")},
                    {"closed", own.is_closed()},
                    {"warning", warning.empty() ? Json(nullptr) : Json(warning)}});
  }
  return list;
}

Json crack(const mesh::Crack& own) {
  Json points = Json::array(), names = Json::array();
  for (const mesh::Point& point : own.points) points.push_back(position(point));
  for (const mesh::CrackTip& tip : mesh::tips({own})) names.push_back(tip.name);
  return {{"name", own.name}, {"points", points}, {"has_mouth", own.has_mouth}, {"tips", names}};
}

// One list for each kind of raiser; that of the holes is always there.
Json findings(const solver::LoadFindings& load, const Case& input) {
  const mesh::Plate& plate = input.problem.plate;
  Json object{{"load", load.name}, {"holes", Json::array()}};
  for (const solver::RaiserFindings& found : load.raisers) {
    const mesh::Raiser at = mesh::raiser(plate, found.raiser);
    object[plural(at.kind)].push_back({{std::string(mesh::word(at.kind)), at.name},
                                       {"largest_edge_stress", edge_value(found.largest)},
                                       {"smallest_edge_stress", edge_value(found.smallest)},
                                       {"largest_von_mises_stress", edge_value(found.von_mises)},
                                       {"kt_gross", concentration(found.gross)},
                                       {"kt_net", concentration(found.net)},
                                       {"section", section(found.section)}});
  }
  for (const solver::TipFindings& found : load.tips)
    object["tips"].push_back(tip(input, loads_of(input, load), found));
  return object;
}

Json hole(const mesh::Hole& h) {
  Json object{{"name", h.name},
              {"shape", mesh::word(h.shape)},
              {"length", quantity(h.length, "mm")},
              {"width", quantity(h.width, "mm")},
              {"corner_radius", quantity(h.corner_radius, "mm")},
              {"centre", position(h.centre)},
              {"angle", quantity(h.angle * degrees_per_radian, "deg")}};
  if (h.shape == mesh::HoleShape::drawn) object["perimeter"] = quantity(length(h.edge), "mm");
  return object;
}

Json load(const solver::Load& l, const mesh::Plate& plate) {
  Json object{{"name", l.name}, {"kind", solver::word(l.kind)}, {"stress", quantity(l.stress, "MPa")}};
  if (l.kind == solver::Load::Kind::pressure) object["hole"] = plate.holes.at(l.hole).name;
  if (l.kind == solver::Load::Kind::face_pressure) object["crack"] = plate.cracks.at(l.crack).name;
  if (l.kind == solver::Load::Kind::edge) {
    object["edge"] = mesh::edge_names(plate).at(l.edge);
    object["along"] = quantity(l.along, "MPa");
    if (l.stress_to) object["stress_to"] = quantity(*l.stress_to, "MPa");
    if (l.along_to) object["along_to"] = quantity(*l.along_to, "MPa");
    if (l.from) object["from"] = quantity(*l.from, "mm");
    if (l.to) object["to"] = quantity(*l.to, "mm");
  }
  if (l.kind == solver::Load::Kind::pin) {
    object["hole"] = plate.holes.at(l.hole).name;
    object["force"] = quantity(l.force, "N");
    object["direction"] = quantity(l.direction * degrees_per_radian, "deg");
    if (l.clearance) object["clearance"] = quantity(*l.clearance, "mm");
  }
  const solver::Resultant sum = solver::resultant(plate, l);
  object["resultant"] = {{"force_x", quantity(sum.force.x(), "N")},
                         {"force_y", quantity(sum.force.y(), "N")},
                         {"moment", quantity(sum.moment, "N mm")}};
  return object;
}

Json material(const Case& c) {
  const solver::HookeLaw& law = c.problem.material;
  const char* state = law.state == solver::PlaneState::stress ? "plane stress" : "plane strain";
  Json object;
  if (law.orthotropy)
    object = {{"E1", quantity(law.youngs_modulus, "MPa")},
              {"E2", quantity(law.orthotropy->youngs_modulus_2, "MPa")},
              {"G12", quantity(law.orthotropy->shear_modulus, "MPa")},
              {"nu12", quantity(law.poissons_ratio, "1")},
              {"angle", quantity(law.orthotropy->angle, "rad")}};
  else
    object = {{"youngs_modulus", quantity(law.youngs_modulus, "MPa")},
              {"poissons_ratio", quantity(law.poissons_ratio, "1")}};
  object["state"] = state;
  object["yield_strength"] = c.yield_strength ? quantity(*c.yield_strength, "MPa") : Json(nullptr);
  if (const auto alloy = c.alloy ? find_alloy(*c.alloy) : std::nullopt)
    object["alloy"] = {{"name", alloy->name},
                       {"condition", alloy->condition},
                       {"range", alloy->range},
                       {"source", alloy->source}};
  return object;
}

Json outline(const mesh::Outline& o) {
  Json raisers = Json::array();
  for (const mesh::Raiser& raiser : o.raisers)
    raisers.push_back({{"name", raiser.name},
                       {"kind", mesh::word(raiser.kind)},
                       {"shape", raiser.shape},
                       {"root", position(raiser.root)},
                       {"radius", quantity(raiser.radius, "mm")}});
  return {{"edges", o.edges}, {"raisers", raisers}};
}

Json import(const ImportReport& report) {
  Json taken = Json::array(), left_out = Json::array(), edges = Json::array();
  for (const ImportedEdge& edge : report.edges)
    edges.push_back({{"name", edge.name},
                     {"straight", edge.is_straight},
                     {"length", quantity(edge.length, "mm")},
                     {"middle", position({edge.x, edge.y})}});
  for (const Taken& one : report.taken) taken.push_back({{"kind", one.kind}, {"count", one.count}});
  for (const LeftOut& one : report.left_out)
    left_out.push_back({{"kind", one.kind}, {"count", one.count}, {"why", one.why}, {"line", one.line}});
  return {{"file", report.file},
          {"layer", report.layer.empty() ? Json(nullptr) : Json(report.layer)},
          {"unit", {{"word", report.unit}, {"in_mm", report.unit_in_mm}, {"source", report.unit_source}}},
          {"gap", quantity(report.gap, "mm")},
          {"taken", taken},
          {"left_out", left_out},
          {"repairs", report.repairs},
          {"edges", edges}};
}

Json supports(const Case& c) {
  const auto edges = mesh::edge_names(c.problem.plate);
  const auto length = [](const std::optional<double>& value) {
    return value ? quantity(*value, "mm") : Json(nullptr);
  };
  Json list = Json::array();
  for (const solver::Support& s : c.problem.supports)
    list.push_back({{"name", s.name},
                    {"edge", edges.at(s.edge)},
                    {"normal", length(s.normal)},
                    {"along", length(s.along)}});
  return list;
}

Json input(const Case& c) {
  const mesh::Plate& plate = c.problem.plate;
  Json holes = Json::array(), cracks = Json::array(), loads = Json::array();
  for (const mesh::Crack& own : plate.cracks) cracks.push_back(crack(own));
  for (const mesh::Hole& h : plate.holes) holes.push_back(hole(h));
  for (const solver::Load& l : c.problem.loads) loads.push_back(load(l, plate));
  Json object{{"plate",
               {{"length", quantity(plate.length, "mm")},
                {"width", quantity(plate.width, "mm")},
                {"thickness", quantity(plate.thickness, "mm")}}}};
  if (plate.outline) object["outline"] = outline(*plate.outline);
  if (c.import) object["import"] = import(*c.import);
  if (c.drawing_origin) object["drawing_origin"] = position(*c.drawing_origin);
  object["material"] = material(c);
  object["holes"] = holes;
  object["cracks"] = cracks;
  object["loads"] = loads;
  object["supports"] = supports(c);
  object["written"] = c.written;
  return object;
}

Json asked(const Result& result) {
  Json list = Json::array();
  for (const Answer& answer : answers(result.input, result.solution)) {
    const std::string& name = answer.ask.name;
    const mesh::Raiser at = mesh::raiser(result.input.problem.plate, answer.ask.raiser);
    list.push_back({{"name", name.empty() ? Json(nullptr) : Json(name)},
                    {"quantity", words(answer.ask.quantity)},
                    {std::string(mesh::word(at.kind)), at.name},
                    {"result", edge_value(answer.value)},
                    {"tolerance", quantity(answer.ask.tolerance, "1")},
                    {"largest_bound_allowed", quantity(answer.allowed, "MPa")},
                    {"met", answer.met}});
  }
  const std::vector<mesh::CrackTip> tips = mesh::tips(result.input.problem.plate.cracks);
  for (const TipAnswer& answer : tip_answers(result.input, result.solution)) {
    const std::string& name = answer.ask.name;
    const std::string_view unit = answer.values.size() > 1 ? "MPa sqrt(mm)" : "MPa";
    Json values = Json::array();
    for (const solver::Estimate& value : answer.values) values.push_back(quantity(value, unit));
    list.push_back({{"name", name.empty() ? Json(nullptr) : Json(name)},
                    {"quantity", words(answer.ask.quantity)},
                    {"tip", tips.at(answer.ask.raiser).name},
                    {"results", values},
                    {"tolerance", quantity(answer.ask.tolerance, "1")},
                    {"largest_bound_allowed", quantity(answer.allowed, unit)},
                    {"met", answer.met}});
  }
  return list;
}

Json published(const Result& result) {
  const mesh::Plate& plate = result.input.problem.plate;
  Json list = Json::array();
  for (const validation::Comparison& line : result.published) {
    const std::string_view unit = line.quantity.find("MPa") == std::string::npos ? "1" : "MPa";
    const bool at_hole = line.hole < plate.holes.size();
    list.push_back({{"hole", at_hole ? Json(plate.holes[line.hole].name) : Json(nullptr)},
                    {"place", line.place},
                    {"load", line.load},
                    {"quantity", line.quantity},
                    {"published", quantity(line.published, unit)},
                    {"here", quantity(solver::Estimate{line.ours, line.bound}, unit)},
                    {"relative_difference", quantity(line.difference, "1")},
                    {"solution", line.solution},
                    {"source", line.source},
                    {"definition", line.definition},
                    {"accuracy", line.accuracy},
                    {"from_memory", line.from_memory},
                    {"in_range", line.in_range},
                    {"range_note", line.range_note}});
  }
  return list;
}

Json owner(const mesh::Owner& o, const mesh::Plate& plate) {
  if (o.kind == mesh::Owner::Kind::edge) return {{"edge", mesh::edge_names(plate).at(o.index)}};
  const mesh::Raiser at = mesh::raiser(plate, o.index);
  return {{std::string(mesh::word(at.kind)), at.name}};
}

std::string_view name_of(solver::WedgeMode::Symmetry symmetry) {
  if (symmetry == solver::WedgeMode::Symmetry::none) return "none";
  return symmetry == solver::WedgeMode::Symmetry::symmetric ? "symmetric" : "antisymmetric";
}

std::string_view name_of(solver::SingularPlace::Kind kind) {
  if (kind == solver::SingularPlace::Kind::jump) return "jump of traction";
  return kind == solver::SingularPlace::Kind::corner ? "corner" : "end of a held edge";
}

Json places(const Result& result) {
  Json list = Json::array();
  for (const solver::PlaceFindings& place : result.solution.places) {
    Json fields = Json::array();
    for (const solver::SingularField& field : place.fields) {
      const double e = field.exponent.real();
      fields.push_back(
          {{"symmetry", name_of(field.symmetry)},
           {"exponent", quantity(e, "1")},
           {"exponent_imaginary", quantity(field.exponent.imag(), "1")},
           {"exponent_measured", field.measured ? quantity(*field.measured, "1") : Json(nullptr)},
           {"intensity", quantity(field.intensity, fmt::format("MPa mm^{:.6g}", 1 - e))},
           {"phase", quantity(field.phase, "rad")}});
    }
    list.push_back({{"kind", name_of(place.kind)},
                    {"at", position(place.point)},
                    {"angle", quantity(place.angle * degrees_per_radian, "deg")},
                    {"before", owner(place.arrives, result.input.problem.plate)},
                    {"after", owner(place.leaves, result.input.problem.plate)},
                    {"fields", fields},
                    {"what", place.what},
                    {"why", place.why},
                    {"what_to_do", place.cure}});
  }
  return list;
}

Json checks(const solver::PlateChecks& c) {
  return {{"equilibrium_residual", quantity(c.equilibrium_residual, "1")},
          {"reaction", quantity(c.reaction, "1")},
          {"far_section",
           {{"station", quantity(c.far_station, "mm")},
            {"applied_mean_stress", quantity(c.far_applied, "MPa")},
            {"recovered_mean_stress", quantity(c.far_recovered, "MPa")},
            {"scatter", quantity(c.far_scatter, "1")}}},
          {"outer_edges",
           {{"largest_von_mises", quantity(c.outer_von_mises, "MPa")}, {"at", position(c.outer_point)}}},
          {"strain_energy", quantity(c.strain_energy, "N mm")},
          {"external_work", quantity(c.external_work, "N mm")}};
}

Json pins(const Result& result) {
  Json list = Json::array();
  for (const solver::PinFindings& pin : result.solution.pins) {
    Json arcs = Json::array();
    for (const solver::ContactArc& arc : pin.arcs)
      arcs.push_back({{"all_round", arc.all_round},
                      {"begin", quantity(arc.begin.scaled(degrees_per_radian), "deg")},
                      {"end", quantity(arc.end.scaled(degrees_per_radian), "deg")},
                      {"largest_pressure", quantity(arc.largest, "MPa")},
                      {"at", quantity(arc.largest_at * degrees_per_radian, "deg")}});
    list.push_back({{"load", result.input.problem.loads.at(pin.load).name},
                    {"arcs", std::move(arcs)},
                    {"force_miss", quantity(pin.force_miss, "1")}});
  }
  return list;
}

Json reactions(const Result& result) {
  Json list = Json::array();
  for (const solver::SupportReaction& at : result.solution.reactions)
    list.push_back({{"support", result.input.problem.supports.at(at.support).name},
                    {"force_x", quantity(at.reaction.force.x(), "N")},
                    {"force_y", quantity(at.reaction.force.y(), "N")},
                    {"moment", quantity(at.reaction.moment, "N mm")}});
  return list;
}

Json levels(const std::vector<solver::Level>& all) {
  Json list = Json::array();
  for (const solver::Level& level : all) {
    list.push_back({{"refinement", level.refinement},
                    {"degree", level.degree},
                    {"triangles", level.triangles},
                    {"unknowns", level.unknowns},
                    {"peak", quantity(level.peak, "MPa")},
                    {"bound_over_tolerance", quantity(level.worst, "1")},
                    {"time", quantity(level.seconds, "s")}});
  }
  return list;
}

Json document(const Result& result) {
  const solver::Solution& solution = result.solution;
  const Provenance& from = result.provenance;
  const bool settled = solution.status == solver::Solution::Status::settled;
  Json loads = Json::array();
  loads.push_back(findings(solution.combined, result.input));
  for (const solver::LoadFindings& unit : solution.units) {
    loads.push_back(findings(unit, result.input));
  }
  return {{"format", "raiser result"},
          {"format_version", json_format},
          {"provenance",
           {{"program", "raiser"},
            {"version", from.version},
            {"compiler", from.compiler},
            {"case_file", from.case_file},
            {"case_sha256", from.case_sha256.empty() ? Json(nullptr) : Json(from.case_sha256)}}},
          {"title", result.input.title},
          {"status", words(solution.status)},
          {"reason", settled ? Json(nullptr) : Json(solution.reason)},
          {"asked", asked(result)},
          {"results", loads},
          {"crack_faces", faces(result.input, solution.openings)},
          {"published", published(result)},
          {"places_without_peak", places(result)},
          {"pins", pins(result)},
          {"reactions", reactions(result)},
          {"checks", checks(solution.checks)},
          {"discretisation",
           {{"degree", solution.degree},
            {"unknowns", solution.unknowns},
            {"triangles", solution.triangles},
            {"mirror_x", solution.mirrors_used.x},
            {"mirror_y", solution.mirrors_used.y},
            {"time", quantity(solution.seconds, "s")}}},
          {"levels", levels(solution.levels)},
          {"input", input(result.input)}};
}

// Bytes that are no UTF-8 (a file name may hold any) become U+FFFD.
std::string text(const Json& object) { return object.dump(1, ' ', false, Json::error_handler_t::replace); }

}  // namespace

std::string json(const Result& result) { return text(document(result)) + "\n"; }

namespace {

/// Each line but the first moved to the right.
std::string indented(std::string_view text, std::size_t blanks) {
  std::string result;
  for (const char c : text) {
    result += c;
    if (c == '\n') result.append(blanks, ' ');
  }
  return result;
}

}  // namespace

std::string json_entry(const Outcome& outcome, const std::vector<std::string>& faults,
                       std::string_view result) {
  const Json head{{"case_file", outcome.case_file},
                  {"exit_code", outcome.exit_code},
                  {"status", outcome.status},
                  {"faults", faults}};
  std::string entry = text(head);
  entry.erase(entry.rfind('}'));
  while (entry.back() == '\n') entry.pop_back();
  while (!result.empty() && result.back() == '\n') result.remove_suffix(1);
  entry += ",\n \"result\": ";
  entry += result.empty() ? "null" : indented(result, 1);
  return "  " + indented(entry + "\n}", 2);
}

std::string json_begin() {
  std::string head =
      text({{"format", "raiser results"}, {"format_version", json_format}, {"version", version()}});
  head.erase(head.rfind('}'));
  while (head.back() == '\n') head.pop_back();
  return head + ",\n \"cases\": [\n";
}

std::string_view json_between() { return ",\n"; }

std::string_view json_end() { return "\n ]\n}\n"; }

std::string json_text(std::string_view content) { return text(Json(std::string(content))); }

}  // namespace raiser::io
