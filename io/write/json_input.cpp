#include <fmt/format.h>

#include "io/case/alloys.hpp"
#include "io/import/curve_tools.hpp"
#include "io/write/json_parts.hpp"
#include "io/write/layout.hpp"

namespace raiser::io::json_part {
namespace {

Json crack(const mesh::Crack& own) {
  Json points = Json::array(), names = Json::array();
  for (const mesh::Point& point : own.points) points.push_back(position(point));
  for (const mesh::CrackTip& tip : mesh::tips({own})) names.push_back(tip.name);
  return {{"name", own.name}, {"points", points}, {"has_mouth", own.has_mouth}, {"tips", names}};
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

}  // namespace

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

}  // namespace raiser::io::json_part
