#include "io/case/read_import.hpp"

#include <fmt/format.h>

#include <array>
#include <cmath>
#include <filesystem>

#include "io/import/curve_tools.hpp"
#include "io/import/part_plate.hpp"

namespace raiser::io {

namespace {

constexpr std::array<std::string_view, 8> import_keys{"file",   "layer",   "units", "gap",
                                                      "facets", "face_at", "edge",  "hole"};
constexpr std::array<std::string_view, 7> dxf_keys{"file", "layer", "units", "gap", "facets", "edge", "hole"};
constexpr std::array<std::string_view, 5> step_keys{"file", "gap", "face_at", "edge", "hole"};
constexpr std::array<std::string_view, 2> place_keys{"name", "near"};

/// As many lengths as `sample` shows.
template <std::size_t N>
std::optional<std::array<double, N>> lengths(const Table& table, const Entry* entry,
                                             std::string_view sample) {
  const std::vector<Node>* values = items(table, entry, sample);
  if (values == nullptr) return std::nullopt;
  if (values->size() != N) {
    complain(table, *entry, fmt::format("a place needs {} coordinates and this has {}", N, values->size()),
             fmt::format("write e.g. {}", sample));
    return std::nullopt;
  }
  std::array<double, N> result{};
  bool sound = true;
  for (std::size_t k = 0; k < N; ++k) {
    const auto value = quantity(table, *entry, (*values)[k], Dimension::length, Sign::any);
    result[k] = value.value_or(0.0);
    sound = sound && value;
  }
  return sound ? std::optional(result) : std::nullopt;
}

/// A name with its table, for faults.
struct Named {
  Table table;
  PlaceName place;
};

/// The tables [[import.edge]] or [[import.hole]]. Several edges may share a name.
std::vector<Named> read_places(const Table& import, std::string_view key, Names* names) {
  std::vector<Named> result;
  for (const Table& table : tables_at(import, key)) {
    refuse_unknown(table, place_keys);
    const Entry* entry = require(table, "name", key == "edge" ? "\"base\"" : "\"bolt\"");
    const auto name = text(table, entry);
    constexpr std::string_view sample = "[\"20 mm\", \"0 mm\"]";
    const auto near = lengths<2>(table, require(table, "near", sample), sample);
    if (name && names != nullptr) unique_name(table, *name, *names);
    if (name && near) result.push_back({table, {*name, mesh::Point((*near)[0], (*near)[1])}});
  }
  return result;
}

std::vector<std::string_view> length_units() {
  std::vector<std::string_view> words;
  for (const Unit& unit : units())
    if (unit.dimension == Dimension::length && !unit.alias) words.push_back(unit.name);
  return words;
}

/// What is to be imported; nothing and faults where the keys are wrong.
std::optional<PartRequest> read_request(const Table& table) {
  const std::size_t before = table.report->faults.size();
  refuse_unknown(table, import_keys);
  PartRequest request;
  if (const auto file = text(table, require(table, "file", "\"bracket.dxf\""))) {
    request.path = (std::filesystem::path(table.report->file).parent_path() / *file).lexically_normal();
    request.file = request.path.string();
    if (is_step(*file))
      refuse_unfitting(table, "a STEP file", import_keys, step_keys);
    else
      refuse_unfitting(table, "a drawing", import_keys, dxf_keys);
  }
  request.layer = text(table, find(table, "layer"));
  const std::vector<std::string_view> words = length_units();
  if (const auto unit = choice(table, find(table, "units"), words)) request.unit_word = words[*unit];
  if (const auto gap = quantity(table, find(table, "gap"), Dimension::length, Sign::positive))
    request.rule.gap = *gap;
  constexpr std::array<std::string_view, 2> facets{"arcs", "lines"};
  if (const auto as = choice(table, find(table, "facets"), facets)) request.rule.arcs_from_facets = *as == 0;
  constexpr std::string_view sample = "[\"0 mm\", \"0 mm\", \"8 mm\"]";
  request.face_at = lengths<3>(table, find(table, "face_at"), sample);
  return table.report->faults.size() == before ? std::optional(request) : std::nullopt;
}

/// Faults of the request stand at its key, those of the drawing at their own line.
void add_faults(const Table& table, std::vector<Diagnostic> faults) {
  for (Diagnostic& fault : faults) {
    const Entry* entry = fault.position ? nullptr : find(table, fault.key);
    if (entry == nullptr && !fault.position) entry = find(table, "file");
    if (entry != nullptr)
      complain(table, *entry, fault.what, fault.cure);
    else
      table.report->faults.push_back(std::move(fault));
  }
}

/// The faults of a part that is no plate.
void add_faults(const Table& table, const PartPlate& plate, const std::vector<Named>& edges,
                const std::vector<Named>& raisers) {
  for (const ContourFault& fault : plate.faults)
    complain(table, *find(table, "file"), fault.what, fault.cure);
  for (const PlaceFault& fault : plate.misplaced) {
    const Table& own = (fault.is_edge ? edges : raisers).at(fault.index).table;
    complain(own, *find(own, "near"), fault.what, fault.cure);
  }
}

std::vector<PlaceName> places_of(const std::vector<Named>& named) {
  std::vector<PlaceName> result;
  for (const Named& one : named) result.push_back(one.place);
  return result;
}

/// The table that names a hole, else [import]: where its faults stand.
Position place_of(const Table& import, const std::vector<Named>& raisers, const std::string& name) {
  for (const Named& one : raisers)
    if (one.place.name == name) return one.table.node->at;
  return import.node->at;
}

/// The edges of the plate in the coordinates of the drawing.
std::vector<ImportedEdge> edges_of(const mesh::Plate& plate, const mesh::Point& centre) {
  const mesh::Outline outline = mesh::outline_of(plate);
  std::vector<ImportedEdge> edges;
  for (const mesh::Curve& curve : outline.curves) {
    if (curve.owner.kind != mesh::Owner::Kind::edge) continue;
    mesh::Point middle = curve.at((curve.begin + curve.end) / 2) + centre;
    for (double& x : middle)
      if (std::abs(x) < 1e-9 * plate.length) x = 0.0;  // what rounding leaves
    edges.push_back({outline.edges.at(curve.owner.index), curve.kind == mesh::Curve::Kind::line,
                     length(curve), middle.x(), middle.y()});
  }
  return edges;
}

}  // namespace

void read_import(const Table& document, OutlineReading& result, Names& names) {
  const auto table = table_at(*document.node, "import", *document.report);
  if (!table) return;
  const std::size_t before = document.report->faults.size();
  const auto request = read_request(*table);
  const Names taken = names;
  const std::vector<Named> edges = read_places(*table, "edge", nullptr);
  const std::vector<Named> raisers = read_places(*table, "hole", &names);
  if (!request || document.report->faults.size() != before) return;
  PartReading part = read_part(*request);
  if (!part.value) return add_faults(*table, std::move(part.faults));
  const PartPlate plate = plate_of(*part.value, 1.0, places_of(edges), places_of(raisers), taken);
  if (!plate.plate) return add_faults(*table, plate, edges, raisers);
  if (plate.plate->holes.size() > most_holes)
    return complain(*table, *find(*table, "file"),
                    fmt::format("the part has {} holes", plate.plate->holes.size()),
                    fmt::format("a case has at most {}; leave the others out of the drawing", most_holes));
  result.outline = plate.plate->outline;
  result.origin = -part.value->centre;
  result.sizes = {plate.plate->length, plate.plate->width, std::nullopt};
  result.import = std::move(part.value->report);
  result.import->edges = edges_of(*plate.plate, part.value->centre);
  for (mesh::Hole hole : plate.plate->holes) {
    hole.centre += part.value->centre;
    names.insert(hole.name);
    result.holes.push_back({hole.name, hole, place_of(*table, raisers, hole.name), 0});
  }
  if (result.outline)
    for (const mesh::Raiser& raiser : result.outline->raisers) names.insert(raiser.name);
}

}  // namespace raiser::io
