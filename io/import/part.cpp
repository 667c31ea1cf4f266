#include "io/import/part.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cctype>
#include <cmath>
#include <fstream>
#include <iterator>
#include <limits>
#include <set>

#include "io/case/quantity.hpp"
#include "io/case/words.hpp"
#include "io/import/curve_tools.hpp"
#include "io/import/dxf.hpp"
#include "io/import/step.hpp"

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Loop;
using mesh::Point;

std::string extension(const std::filesystem::path& path) {
  std::string result = path.extension().string();
  for (char& c : result) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return result;
}

bool is_drawing(const std::filesystem::path& path) { return is_step(path) || extension(path) == ".dxf"; }

Diagnostic fault(const std::string& file, std::string key, std::string what, std::string cure) {
  return {Diagnostic::Kind::input, file, std::nullopt, std::move(key), "", std::move(what), std::move(cure)};
}

/// The drawing in the folder whose name is nearest to one that is not there.
std::string nearest_file(const std::filesystem::path& path) {
  constexpr std::size_t most = 1000;
  std::vector<std::string> names;
  std::error_code error;
  const auto folder = path.has_parent_path() ? path.parent_path() : std::filesystem::path(".");
  for (const auto& entry : std::filesystem::directory_iterator(folder, error))
    if (names.size() < most && is_drawing(entry.path())) names.push_back(entry.path().filename().string());
  std::sort(names.begin(), names.end());
  const std::vector<std::string_view> words(names.begin(), names.end());
  const std::string_view found = nearest(path.filename().string(), words);
  return found.empty() ? "" : fmt::format("; the nearest is \"{}\"", shown(found));
}

DrawingReading read_drawing(const PartRequest& request) {
  const auto refuse = [&](std::string what, std::string cure) {
    return DrawingReading{std::nullopt, {fault(request.file, "file", std::move(what), std::move(cure))}};
  };
  std::error_code error;
  const auto status = std::filesystem::status(request.path, error);
  if (!std::filesystem::exists(status))
    return refuse("there is no such file" + nearest_file(request.path),
                  "the name counts from the folder of the case file");
  if (std::filesystem::is_directory(status)) return refuse("this is a folder", "name a drawing in it");
  if (!std::filesystem::is_regular_file(status))
    return refuse("this is not a regular file", "name a drawing on disk");
  if (!is_drawing(request.path))
    return refuse("this is no kind of file that can be imported", "give a .dxf, .step or .stp file");
  if (std::filesystem::file_size(request.path, error) > most_drawing_bytes)
    return refuse("the drawing is too large", fmt::format("at most {} bytes are read", most_drawing_bytes));
  if (is_step(request.path)) return read_step(request.path, request.file, request.face_at);
  std::ifstream stream(request.path, std::ios::binary);
  const std::string content{std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
  if (!stream.is_open() || stream.bad()) return refuse("the file cannot be read", "check its permissions");
  return read_dxf(content, request.file, request.layer);
}

/// mm in one of the units that the request names, if it does.
std::optional<double> requested_unit(const PartRequest& request) {
  for (const Unit& unit : units())
    if (unit.dimension == Dimension::length && unit.name == request.unit_word)
      return unit.factor / unit.divisor;
  return std::nullopt;
}

/// Says in the report what a unit of the drawing is, or adds a fault.
void settle_unit(const Drawing& drawing, const PartRequest& request, ImportReport& report,
                 std::vector<Diagnostic>& faults) {
  const std::optional<double> asked = requested_unit(request);
  if (!drawing.unit && !asked) {
    faults.push_back(fault(request.file, "file", "the drawing does not say its units ($INSUNITS)",
                           "add units = \"mm\" to [import], or whatever it is drawn in"));
    return;
  }
  if (drawing.unit && asked && std::abs(*drawing.unit / *asked - 1) > 1e-12)
    faults.push_back(fault(request.file, "units",
                           fmt::format("the drawing says that its unit is {}", drawing.unit_word),
                           "remove this key, or set the units of the drawing right"));
  report.unit = drawing.unit ? drawing.unit_word : request.unit_word;
  report.unit_in_mm = drawing.unit ? *drawing.unit : *asked;
  report.unit_source = !drawing.unit ? "the case" : is_step(request.path) ? "the STEP file" : "$INSUNITS";
}

/// How many entities of each kind became strokes: a polyline counts once.
std::vector<Taken> taken(const std::vector<Stroke>& strokes) {
  std::vector<Taken> result;
  std::set<std::pair<std::string, std::size_t>> seen;
  for (const Stroke& stroke : strokes) {
    if (stroke.line > 0 && !seen.emplace(stroke.kind, stroke.line).second) continue;
    const auto same = std::find_if(result.begin(), result.end(),
                                   [&](const Taken& known) { return known.kind == stroke.kind; });
    if (same == result.end())
      result.push_back({stroke.kind, 1});
    else
      ++same->count;
  }
  return result;
}

void scale(Curve& curve, double factor) {
  curve.centre *= factor;
  curve.u *= factor;
  curve.v *= factor;
}

void shift(Loop& loop, const Point& by) {
  for (Curve& curve : loop) curve.centre += by;
}

/// From left to right, then upwards, whatever the order of the drawing.
void sort_inner(std::vector<Loop>& inner, double size) {
  const auto middle = [size](const Loop& loop) {
    const auto box = box_of(loop);
    const Point at = (box[0] + box[1]) / 2;
    return std::pair(std::round(at.x() / (1e-6 * size)), at.y());
  };
  std::stable_sort(inner.begin(), inner.end(),
                   [&](const Loop& a, const Loop& b) { return middle(a) < middle(b); });
}

}  // namespace

bool is_step(const std::filesystem::path& path) {
  const std::string kind = extension(path);
  return kind == ".step" || kind == ".stp";
}

std::array<Point, 2> box_of(const Loop& loop) {
  Point low = Point::Constant(std::numeric_limits<double>::infinity());
  Point high = -low;
  const auto take = [&](const Point& p) {
    low = low.cwiseMin(p);
    high = high.cwiseMax(p);
  };
  for (const Curve& curve : loop) {
    take(start(curve));
    take(finish(curve));
    for (const int axis : {0, 1})
      for (const double t : mesh::extremes(curve, axis)) take(curve.at(t));
  }
  return {low, high};
}

PartReading read_part(const PartRequest& request) {
  DrawingReading reading = read_drawing(request);
  if (!reading.value) return {std::nullopt, std::move(reading.faults)};
  Drawing& drawing = *reading.value;
  ImportReport report;
  report.file = request.file;
  report.layer = request.layer.value_or("");
  report.gap = request.rule.gap;
  settle_unit(drawing, request, report, reading.faults);
  if (!reading.faults.empty()) return {std::nullopt, std::move(reading.faults)};
  report.taken = taken(drawing.strokes);
  report.left_out = std::move(drawing.left_out);
  for (Stroke& stroke : drawing.strokes) scale(stroke.curve, report.unit_in_mm);
  Contours found = contours(std::move(drawing.strokes), request.rule);
  for (const ContourFault& f : found.faults) {
    reading.faults.push_back(fault(request.file, "file", f.what, f.cure));
    if (f.line == 0) continue;
    reading.faults.back().position = Position{f.line, 1};
    reading.faults.back().key.clear();
  }
  if (!reading.faults.empty()) return {std::nullopt, std::move(reading.faults)};
  report.repairs = std::move(found.repairs);
  const auto box = box_of(found.outer);
  Part part{std::move(found.outer), std::move(found.inner), (box[0] + box[1]) / 2, box[1] - box[0],
            std::move(report)};
  shift(part.outer, -part.centre);
  for (Loop& loop : part.inner) shift(loop, -part.centre);
  sort_inner(part.inner, part.size.maxCoeff());
  return {std::move(part), {}};
}

}  // namespace raiser::io
