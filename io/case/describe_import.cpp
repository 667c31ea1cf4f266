#include "io/case/describe_import.hpp"

#include <fmt/format.h>

#include "io/case/layout.hpp"
#include "io/write/layout.hpp"

namespace raiser::io {

namespace {

using Phrases = std::vector<std::string>;

constexpr std::size_t most_listed = 40;  // repairs, edges

Phrases taken_of(const ImportReport& report) {
  Phrases phrases;
  for (const Taken& taken : report.taken) phrases.push_back(fmt::format("{} {}", taken.count, taken.kind));
  return phrases;
}

Phrases left_out_of(const ImportReport& report) {
  Phrases phrases;
  for (const LeftOut& out : report.left_out)
    phrases.push_back(fmt::format("{} {} ({}{})", out.count, out.kind, out.why,
                                  out.line > 0 ? fmt::format("; line {}", out.line) : ""));
  if (phrases.empty()) phrases.emplace_back("nothing");
  return phrases;
}

std::string edges_of(const ImportReport& report) {
  std::string result = row("  edges", {"in the drawing's coordinates"});
  for (std::size_t k = 0; k < report.edges.size() && k < most_listed; ++k) {
    const ImportedEdge& edge = report.edges[k];
    result +=
        row("    " + edge.name, {edge.is_straight ? "straight" : "arc", fmt::format("{:.4g} mm", edge.length),
                                 fmt::format("its middle at ({:.6g}, {:.6g}) mm", edge.x, edge.y)});
  }
  if (report.edges.size() > most_listed)
    result += row("    and more", {fmt::format("{} not listed here", report.edges.size() - most_listed)});
  return result;
}

}  // namespace

std::string describe_import(const Case& input) {
  if (!input.import) return "";
  const ImportReport& report = *input.import;
  Phrases head{report.file,
               report.layer.empty() ? std::string("all layers") : fmt::format("layer {}", report.layer)};
  const std::string factor = report.unit == "mm" ? "" : fmt::format(" = {:.10g} mm", report.unit_in_mm);
  head.push_back(fmt::format("1 {}{} a unit, says {}", report.unit, factor, report.unit_source));
  head.push_back(fmt::format("ends joined within {:.4g} mm{}", report.gap,
                             input.written.contains("import.gap") ? "" : " (default)"));
  std::string result =
      row("Import", head) + row("  taken", taken_of(report)) + row("  left out", left_out_of(report));
  if (report.repairs.empty()) result += row("  repaired", {"nothing"});
  for (std::size_t k = 0; k < report.repairs.size() && k < most_listed; ++k)
    result += wrapped(report.repairs[k], fmt::format("{:16}", k == 0 ? "  repaired" : ""), 16);
  if (report.repairs.size() > most_listed)
    result += row("", {fmt::format("and {} more", report.repairs.size() - most_listed)});
  return result + edges_of(report) + '\n';
}

}  // namespace raiser::io
