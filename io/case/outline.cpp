#include "io/case/outline.hpp"

#include <fmt/format.h>

#include "io/case/outline_parts.hpp"
#include "io/case/read_import.hpp"

namespace raiser::io {

namespace {

using mesh::CutFault;

/// The fault of one of several tables, as geometry.
void add(Report& report, std::string_view label, const Position& at, const CutFault& fault) {
  report.faults.push_back(
      {Diagnostic::Kind::geometry, report.file, at, std::string(label), "", fault.what, fault.cure});
}

/// The outline that the tables draw; empty when one of them is faulty.
void read_free(const Table& document, OutlineReading& result, Names& names) {
  const std::vector<Table> tables = tables_at(document, "outline");
  std::vector<mesh::OutlinePoint> points;
  for (const Table& table : tables)
    if (auto point = read_point(table)) {
      if (!point->corner.empty()) point->corner = unique_name(table, point->corner, names);
      points.push_back(*point);
    }
  if (tables.empty() || points.size() != tables.size()) return;
  mesh::ChainResult chain = mesh::chain_outline(points);
  for (const CutFault& fault : chain.faults)
    add(*document.report, "outline", tables[fault.index].node->at, fault);
  result.outline = std::move(chain.outline);
  result.origin = chain.origin;
  if (result.outline) result.sizes = {chain.length, chain.width, std::nullopt};
}

void read_stepped(const Table& document, const PlateSizes& sizes, OutlineReading& result, Names& names) {
  const std::vector<Table> tables = tables_at(document, "shoulder");
  std::vector<mesh::Shoulder> shoulders;
  for (const Table& table : tables) {
    const std::string name =
        unique_name(table, fmt::format("shoulder {}", &table - tables.data() + 1), names);
    if (auto shoulder = read_shoulder(table, name)) shoulders.push_back(*shoulder);
  }
  if (tables.empty() || shoulders.size() != tables.size() || !sizes.length || !sizes.width) return;
  mesh::OutlineResult bar = mesh::stepped_bar(*sizes.length, *sizes.width, shoulders);
  for (const CutFault& fault : bar.faults)
    add(*document.report, "shoulder", tables[fault.index].node->at, fault);
  result.outline = std::move(bar.outline);
}

/// The notches that one table stands for, each with a name of its own.
void expand(const Table& table, const NotchReading& read, const mesh::Outline& body, Names& names,
            std::vector<mesh::Notch>& notches) {
  const std::vector<mesh::Point> row = places(read.repeat);
  const auto put = [&](mesh::Notch notch) {
    const bool fresh = notch.name == read.notch.name || names.insert(notch.name).second;
    if (!fresh)
      complain(table, fmt::format("the name \"{}\" that follows from this one is taken", notch.name),
               "choose another name");
    notches.push_back(std::move(notch));
  };
  for (std::size_t i = 0; i < row.size(); ++i) {
    mesh::Notch notch = read.notch;
    notch.at += row[i].x();
    if (read.repeat.is_written) notch.name += fmt::format(" {}", i + 1);
    if (!read.both_sides) {
      put(notch);
      continue;
    }
    const auto across = mesh::opposite(body, notch);
    if (!across) {
      complain(table, "no straight edge runs parallel on the opposite side",
               "leave out both_sides, or write two notches");
      return;
    }
    mesh::Notch other = notch;
    other.edge = across->edge;
    other.at = across->at;
    notch.name += " " + body.edges[notch.edge];
    other.name += " " + body.edges[other.edge];
    put(notch);
    put(other);
  }
}

void read_notches(const Table& document, const mesh::Outline* body, OutlineReading& result, Names& names) {
  const std::vector<Table> tables = tables_at(document, "notch");
  std::vector<mesh::Notch> notches;
  std::vector<const Table*> from;
  for (const Table& table : tables) {
    const std::string name = unique_name(table, fmt::format("notch {}", &table - tables.data() + 1), names);
    const auto read = read_notch(table, name, body == nullptr ? std::vector<std::string>{} : body->edges);
    if (!read || body == nullptr) continue;
    expand(table, *read, *body, names, notches);
    from.resize(notches.size(), &table);
  }
  if (body == nullptr || tables.empty()) return;
  mesh::OutlineResult cut = mesh::with_notches(*body, notches);
  for (const CutFault& fault : cut.faults) add(*document.report, "notch", from[fault.index]->node->at, fault);
  result.outline = std::move(cut.outline);
}

}  // namespace

std::vector<mesh::Point> places(const Repeat& repeat) {
  std::vector<mesh::Point> result;
  for (std::size_t k = 0; k < repeat.count[1]; ++k)
    for (std::size_t i = 0; i < repeat.count[0]; ++i)
      result.emplace_back(
          repeat.pitch[0] * (static_cast<double>(i) - 0.5 * (static_cast<double>(repeat.count[0]) - 1)),
          repeat.pitch[1] * (static_cast<double>(k) - 0.5 * (static_cast<double>(repeat.count[1]) - 1)));
  return result;
}

bool draws_outline(const Table& document) {
  return find(document, "outline") != nullptr || find(document, "import") != nullptr;
}

OutlineReading read_outline(const Table& document, const PlateSizes& sizes, Names& names) {
  OutlineReading result;
  const std::size_t before = document.report->faults.size();
  const bool is_imported = find(document, "import") != nullptr;
  const bool is_free = find(document, "outline") != nullptr;
  const bool is_stepped = find(document, "shoulder") != nullptr;
  if (is_imported && is_free)
    complain(document, *find(document, "outline"), "the outline is imported already",
             "remove [[outline]] or [import]");
  else if (is_stepped && (is_free || is_imported))
    complain(document, *find(document, "shoulder"), "a drawn outline has no shoulders besides",
             "draw them as part of the outline");
  else if (is_imported)
    read_import(document, result, names);
  else if (is_free)
    read_free(document, result, names);
  else if (is_stepped)
    read_stepped(document, sizes, result, names);
  const PlateSizes& box = is_imported ? result.sizes : sizes;
  std::optional<mesh::Outline> body = result.outline;
  if (!body && !is_free && !is_stepped && box.length && box.width)
    body = mesh::rectangular(*box.length, *box.width);
  read_notches(document, body ? &*body : nullptr, result, names);
  if (body)
    result.edges = body->edges;
  else if (is_imported || is_free || is_stepped)
    result.edges = {std::string(any_name)};
  result.is_sound = document.report->faults.size() == before;
  const bool is_plain = !is_imported && !is_free && !is_stepped && find(document, "notch") == nullptr;
  result.is_known = result.is_sound && (body || is_plain);
  if (!result.is_sound) result.outline.reset();
  return result;
}

std::optional<Repeat> read_repeat(const Table& table, std::size_t directions) {
  const Entry* entry = find(table, "repeat");
  const Entry* pitch = find(table, "pitch");
  Repeat result;
  if (entry == nullptr && pitch == nullptr) return result;
  const std::size_t before = table.report->faults.size();
  if (entry == nullptr || pitch == nullptr) {
    complain(table, entry == nullptr ? *pitch : *entry, "repeat and pitch go together",
             "give both, e.g. repeat = 4 and pitch = \"40 mm\"");
    return std::nullopt;
  }
  const bool is_list = entry->value.kind == Node::Kind::array;
  const std::vector<Node> counts = is_list ? entry->value.items : std::vector<Node>{entry->value};
  const std::vector<Node> steps =
      pitch->value.kind == Node::Kind::array ? pitch->value.items : std::vector<Node>{pitch->value};
  if (counts.empty() || counts.size() > directions || counts.size() != steps.size()) {
    complain(table, *entry, "repeat and pitch have the same number of entries, one for each direction",
             directions == 1 ? "write e.g. repeat = 4 and pitch = \"40 mm\""
                             : "write e.g. repeat = [4, 2] and pitch = [\"40 mm\", \"30 mm\"]");
    return std::nullopt;
  }
  for (std::size_t i = 0; i < counts.size(); ++i) {
    const bool is_count =
        counts[i].kind == Node::Kind::integer && counts[i].number >= 1 && counts[i].number <= 1000;
    if (!is_count)
      complain(table, *entry, "a count is a whole number from 1 to 1000", "write e.g. repeat = 4");
    const auto step = quantity(table, *pitch, steps[i], Dimension::length, Sign::positive);
    if (is_count) result.count[i] = static_cast<std::size_t>(counts[i].number);
    if (step) result.pitch[i] = *step;
  }
  result.is_written = true;
  return table.report->faults.size() == before ? std::optional(result) : std::nullopt;
}

}  // namespace raiser::io
