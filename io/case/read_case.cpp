#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <fstream>
#include <iterator>
#include <tuple>

#include "io/case/case.hpp"
#include "io/case/document.hpp"
#include "io/case/outline.hpp"
#include "io/case/parts.hpp"
#include "io/case/screen.hpp"
#include "io/case/table.hpp"

namespace raiser::io {

namespace {

using Kind = Diagnostic::Kind;

/// Everything that the tables say, as far as it could be read.
struct Parts {
  std::string title;
  Table plate_table;
  PlateSizes plate;
  Material material;
  OutlineReading outline;
  std::vector<HoleReading> holes;
  std::vector<CrackReading> cracks;
  std::vector<LoadReading> loads;
  std::vector<SupportReading> supports;
  bool loads_are_sound = false;  ///< no fault was found in any load or support
  Question question;
};

void read_version(const Table& document) {
  const Entry* entry = require(document, "raiser", fmt::format("{} as the first line", case_format));
  if (entry == nullptr) return;
  if (entry->value.kind != Node::Kind::integer) {
    complain(
        document, *entry,
        fmt::format("the version of the format is a whole number and this is {}", word(entry->value.kind)),
        fmt::format("write raiser = {}", case_format));
  } else if (entry->value.number != case_format) {
    complain(document, *entry, fmt::format("this program reads version {} of the format", case_format),
             fmt::format("write raiser = {} if the case is of that version", case_format));
  }
}

/// A fault at the table, under the path of something that is missing in it.
void complain_of_missing(const Table& document, std::string_view key, std::string what, std::string cure) {
  complain({document.node, std::string(key), "", document.report}, std::move(what), std::move(cure));
}

/// Names that other tables can speak of, with any_name at the end where those of an
/// outline or drawing are not known.
struct KnownNames {
  std::vector<std::string_view> holes;
  std::vector<std::string_view> raisers;  ///< the holes, then what the outline has
};
KnownNames known_names(const Table& document, const std::vector<HoleReading>& holes,
                       const OutlineReading& outline) {
  KnownNames names;
  for (const HoleReading& hole : holes) names.holes.push_back(hole.name);
  names.raisers = names.holes;
  if (outline.outline)
    for (const mesh::Raiser& raiser : outline.outline->raisers) names.raisers.push_back(raiser.name);
  if (find(document, "import") != nullptr && !outline.import) names.holes.push_back(any_name);
  if (!outline.is_known) names.raisers.push_back(any_name);
  return names;
}

Parts read_parts(const Table& document, const std::string& default_title) {
  constexpr std::array<std::string_view, 14> keys{"raiser", "title",   "plate",   "material", "import",
                                                  "hole",   "outline", "notch",   "shoulder", "crack",
                                                  "load",   "pin",     "support", "ask"};
  refuse_unknown(document, keys);
  read_version(document);
  const Entry* title = find(document, "title");
  Parts parts;
  parts.title = text(document, title).value_or(default_title);
  parts.plate_table = document;
  const auto need = [&](std::string_view key, std::string_view contents) {
    const auto table = table_at(*document.node, key, *document.report);
    if (!table && find(document, key) == nullptr) {
      complain_of_missing(document, key, "the table is missing",
                          fmt::format("add [{}] with {}", key, contents));
    }
    return table;
  };
  if (const auto table = need("plate", "length, width and thickness")) {
    parts.plate = read_plate(*table, draws_outline(document));
    parts.plate_table = *table;
  }
  if (const auto table = need("material", "youngs_modulus and poissons_ratio, or an alloy"))
    parts.material = read_material(*table, parts.plate);
  Names taken;
  parts.holes = read_holes(document, taken);
  parts.outline = read_outline(document, parts.plate, taken);
  if (parts.outline.sizes.length) {
    parts.plate.length = parts.outline.sizes.length;
    parts.plate.width = parts.outline.sizes.width;
  }
  parts.holes.insert(parts.holes.end(), parts.outline.holes.begin(), parts.outline.holes.end());
  const KnownNames names = known_names(document, parts.holes, parts.outline);
  parts.cracks = read_cracks(document, parts.plate, parts.outline, parts.holes);
  std::vector<std::string_view> cracks;
  std::vector<std::string_view> tips;
  for (const CrackReading& crack : parts.cracks) {
    cracks.push_back(crack.name);
    tips.insert(tips.end(), crack.tips.begin(), crack.tips.end());
  }
  const std::size_t faults_before = document.report->faults.size();
  parts.loads = read_loads(document, parts.plate, parts.outline, names.holes, cracks);
  parts.supports = read_supports(document, parts.outline);
  parts.question = read_question(document, names.holes, names.raisers, tips);
  parts.loads_are_sound = document.report->faults.size() == faults_before;
  const bool is_whole = find(document, "hole") == nullptr && find(document, "crack") == nullptr;
  if (names.raisers.empty() && is_whole) {
    complain_of_missing(document, "hole", "nothing on the plate raises its stress",
                        "add [[hole]], [[notch]], [[shoulder]] or [[crack]] with its sizes");
  }
  const bool moved = std::any_of(
      parts.supports.begin(), parts.supports.end(),
      [](const SupportReading& reading) { return !reading.support || solver::displaces(*reading.support); });
  if (find(document, "load") == nullptr && find(document, "pin") == nullptr && !moved) {
    complain_of_missing(document, "load", "nothing loads the plate",
                        "add [[load]] with a kind and its stress or force");
  }
  return parts;
}

void add_fault(Report& report, Kind kind, const Position& at, std::string key, std::string what,
               std::string cure) {
  report.faults.push_back({kind, report.file, at, std::move(key), "", std::move(what), std::move(cure)});
}

/// The plate with the holes that could be read; `index[i]` is where hole i of
/// the plate stands among all of them. Empty without the plate's sizes.
struct PartialPlate {
  mesh::Plate plate;
  std::vector<std::size_t> index;
  std::vector<std::size_t> crack_index;
};
std::optional<PartialPlate> readable_plate(const Parts& parts) {
  const PlateSizes& sizes = parts.plate;
  if (!sizes.length || !sizes.width || !sizes.thickness) return std::nullopt;
  if (!parts.outline.is_sound) return std::nullopt;
  PartialPlate result{{*sizes.length, *sizes.width, *sizes.thickness, {}, parts.outline.outline}, {}, {}};
  Names names;
  for (std::size_t i = 0; i < parts.holes.size(); ++i) {
    if (!parts.holes[i].hole) continue;
    mesh::Hole hole = *parts.holes[i].hole;
    // A name that is taken has its fault already; here it must only be told apart.
    if (!names.insert(hole.name).second) hole.name = fmt::format("{} (number {})", hole.name, i + 1);
    names.insert(hole.name);
    hole.centre += parts.outline.origin;
    result.plate.holes.push_back(std::move(hole));
    result.index.push_back(i);
  }
  Names crack_names;
  for (std::size_t i = 0; i < parts.cracks.size(); ++i) {
    if (!parts.cracks[i].crack) continue;
    mesh::Crack crack = *parts.cracks[i].crack;
    if (!crack_names.insert(crack.name).second) crack.name = fmt::format("{} (number {})", crack.name, i + 1);
    result.plate.cracks.push_back(std::move(crack));
    result.crack_index.push_back(i);
  }
  return result;
}

void check_geometry(const Parts& parts, const PartialPlate& partial, Report& report) {
  constexpr std::size_t told_in_full = 3;  // conflicts of one hole with others
  std::vector<std::size_t> conflicts(partial.plate.holes.size(), 0);
  for (const mesh::PlateFault& fault : mesh::faults(partial.plate)) {
    if (fault.crack != mesh::PlateFault::none) {
      add_fault(report, Kind::geometry, parts.cracks[partial.crack_index[fault.crack]].at, "crack",
                fault.what, fault.cure);
      continue;
    }
    const bool of_hole = fault.hole != mesh::PlateFault::none;
    const bool of_pair = of_hole && fault.other != mesh::PlateFault::none;
    if (of_pair && ++conflicts[fault.hole] > told_in_full) continue;
    const Position at = of_hole ? parts.holes[partial.index[fault.hole]].at : parts.plate_table.node->at;
    add_fault(report, Kind::geometry, at, of_hole ? "hole" : "plate", fault.what, fault.cure);
  }
  for (std::size_t i = 0; i < conflicts.size(); ++i) {
    if (conflicts[i] <= told_in_full) continue;
    add_fault(report, Kind::geometry, parts.holes[partial.index[i]].at, "hole",
              fmt::format("hole '{}' lies in the way of {} later holes more", partial.plate.holes[i].name,
                          conflicts[i] - told_in_full),
              "move it, or check the positions of all of them");
  }
}

/// Only when every load could be read: a faulty one would unbalance the rest.
void check_balance(const Parts& parts, const mesh::Plate& plate, Report& report) {
  std::vector<solver::Load> loads;
  for (const LoadReading& load : parts.loads) {
    if (!load.load || !parts.loads_are_sound) return;
    loads.push_back(*load.load);
  }
  std::vector<solver::Support> supports;
  for (const SupportReading& reading : parts.supports) {
    if (!reading.support || !parts.loads_are_sound) return;
    supports.push_back(*reading.support);
  }
  const auto wrong = solver::faults(plate, supports);
  for (const solver::SupportFault& fault : wrong)
    add_fault(report, Kind::loads, parts.supports[fault.support].at, "support", fault.what, fault.cure);
  if (!wrong.empty()) return;
  const auto fault = solver::imbalance(plate, loads, supports);
  if (!fault) return;
  const Position at = fault->loads.empty() ? Position{} : parts.loads[fault->loads.front()].at;
  const bool of_pin = !fault->loads.empty() && parts.loads[fault->loads.front()].path.starts_with("pin");
  add_fault(report, Kind::loads, at, of_pin ? "pin" : "load", fault->what, fault->cure);
}

Case assemble(const Parts& parts, mesh::Plate plate, Report& report, const std::string& name) {
  Case result;
  result.title = parts.title;
  result.file = name;
  result.problem.plate = std::move(plate);
  result.problem.material = *parts.material.law;
  for (const LoadReading& load : parts.loads) {
    result.problem.loads.push_back(*load.load);
    result.load_tables.push_back(load.path);
  }
  for (const SupportReading& reading : parts.supports) result.problem.supports.push_back(*reading.support);
  result.asks = parts.question.asks;
  result.tolerance = parts.question.tolerance;
  result.t_stress_tolerance = parts.question.t_stress_tolerance;
  result.yield_strength = parts.material.yield_strength;
  result.alloy = parts.material.alloy;
  result.written = std::move(report.written);
  for (const HoleReading& hole : parts.holes) result.hole_tables.push_back(hole.table);
  result.import = parts.outline.import;
  if (parts.outline.sizes.length) result.drawing_origin = parts.outline.origin;
  return result;
}

CaseReading failure(std::vector<Diagnostic> faults, const std::string& name) {
  // Those of the case itself first, then those of a drawing.
  std::stable_sort(faults.begin(), faults.end(), [&](const Diagnostic& a, const Diagnostic& b) {
    const Position x = a.position.value_or(Position{0, 0});
    const Position y = b.position.value_or(Position{0, 0});
    const bool is_later_a = a.file != name, is_later_b = b.file != name;
    return std::tie(is_later_a, x.line, x.column) < std::tie(is_later_b, y.line, y.column);
  });
  return {std::nullopt, std::move(faults)};
}

Diagnostic file_fault(const std::string& name, std::string what, std::string cure) {
  return {Kind::input, name, std::nullopt, "", "", std::move(what), std::move(cure)};
}

/// Why the file cannot be read as a case at all, or nothing.
std::optional<Diagnostic> unreadable(const std::filesystem::path& file) {
  const std::string name = file.string();
  if (name.empty()) return file_fault("\"\"", "the file's name is empty", "name a case file");
  std::error_code error;
  const auto status = std::filesystem::status(file, error);
  if (status.type() == std::filesystem::file_type::not_found) {
    return file_fault(name, "there is no such file", "check the name and the folder");
  }
  if (std::filesystem::is_directory(status)) {
    return file_fault(name, "this is a folder", "name a case file in it");
  }
  if (error) {
    return file_fault(name, fmt::format("the file cannot be reached: {}", error.message()),
                      "check the name, its links and the permissions of its folders");
  }
  if (!std::filesystem::is_regular_file(status)) {
    return file_fault(name, "this is not a regular file", "name a case file on disk");
  }
  const auto bytes = std::filesystem::file_size(file, error);
  if (!error && bytes > most_bytes) return too_large(bytes, name);
  return std::nullopt;
}

}  // namespace

std::string text(const Diagnostic& diagnostic) {
  std::string result = diagnostic.file;
  if (diagnostic.position)
    result += fmt::format(":{}:{}", diagnostic.position->line, diagnostic.position->column);
  result += ": ";
  // A fault that begins with the name of its thing needs no key before it: "hole 'bolt' lies outside".
  const bool says_key = diagnostic.value.empty() && diagnostic.what.starts_with(diagnostic.key + " '");
  const std::string key = says_key ? "" : diagnostic.key;
  std::string subject = key;
  if (!diagnostic.value.empty())
    subject = key.empty() ? diagnostic.value : fmt::format("{} = {}", key, diagnostic.value);
  if (!subject.empty()) result += subject + ": ";
  return result + fmt::format("{}; {}", diagnostic.what, diagnostic.cure);
}

CaseReading read_case_text(std::string_view content, const std::string& name) {
  content = without_byte_order_mark(content);
  if (auto fault = screen(content, name)) return failure({*fault}, name);
  const auto parsed = parse_document(content, name);
  if (const auto* fault = std::get_if<Diagnostic>(&parsed)) return failure({*fault}, name);
  Report report{name, {}, {}};
  const Table document{&std::get<Node>(parsed), "", "", &report};
  const Parts parts = read_parts(document, std::filesystem::path(name).stem().string());
  const auto partial = readable_plate(parts);
  const bool is_complete = partial && partial->index.size() == parts.holes.size() &&
                           partial->crack_index.size() == parts.cracks.size();
  if (partial) check_geometry(parts, *partial, report);
  if (is_complete) check_balance(parts, partial->plate, report);
  if (!report.faults.empty()) return failure(std::move(report.faults), name);
  return {assemble(parts, partial->plate, report, name), {}};
}

CaseReading read_case(const std::filesystem::path& file) {
  if (auto fault = unreadable(file)) return failure({*fault}, file.string());
  std::ifstream stream(file, std::ios::binary);
  const std::string content{std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
  if (!stream.is_open() || stream.bad()) {
    return failure({file_fault(file.string(), "the file cannot be read", "check its permissions")},
                   file.string());
  }
  return read_case_text(content, file.string());
}

}  // namespace raiser::io
