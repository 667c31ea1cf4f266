#include "io/case/describe_import.hpp"

#include <fmt/format.h>

#include <cmath>

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

/// "arc of 12.6 mm about (10, 0) mm", in the coordinates of the drawing.
std::string in_words(const mesh::Curve& curve, const mesh::Point& origin) {
  mesh::Point middle = curve.at((curve.begin + curve.end) / 2) - origin;
  for (double& x : middle)
    if (std::abs(x) < 1e-9 * (1 + origin.norm())) x = 0.0;  // what rounding leaves
  double length = 0.0;
  constexpr int steps = 64;
  for (int k = 0; k < steps; ++k) {
    const auto at = [&](int i) { return curve.at(curve.begin + (curve.end - curve.begin) * i / steps); };
    length += (at(k + 1) - at(k)).norm();
  }
  return fmt::format("{}, {:.4g} mm, its middle at ({:.6g}, {:.6g}) mm",
                     curve.kind == mesh::Curve::Kind::line ? "straight" : "arc", length, middle.x(),
                     middle.y());
}

std::string edges_of(const Case& input) {
  const mesh::Outline outline = mesh::outline_of(input.problem.plate);
  const mesh::Point origin = input.drawing_origin.value_or(mesh::Point::Zero());
  std::string result = row("  edges", {"in the drawing's coordinates"});
  std::size_t listed = 0;
  for (const mesh::Curve& curve : outline.gross()) {
    if (curve.owner.kind != mesh::Owner::Kind::edge) continue;
    if (++listed > most_listed) return result + row("    and more", {"not listed here"});
    result += row("    " + outline.edges.at(curve.owner.index), {in_words(curve, origin)});
  }
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
  return result + edges_of(input) + '\n';
}

}  // namespace raiser::io
