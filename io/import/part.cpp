#include "io/import/part.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cctype>
#include <cmath>
#include <fstream>
#include <iterator>
#include <limits>

#include "io/import/curve_tools.hpp"
#include "io/import/dxf.hpp"
#include "io/import/step.hpp"

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Loop;
using mesh::Point;

Diagnostic fault(const std::string& file, std::string what, std::string cure) {
  return {Diagnostic::Kind::input, file, std::nullopt, "", "", std::move(what), std::move(cure)};
}

std::string extension(const std::filesystem::path& path) {
  std::string result = path.extension().string();
  for (char& c : result) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return result;
}

DrawingReading read_drawing(const PartRequest& request) {
  const auto refuse = [&](std::string what, std::string cure) {
    return DrawingReading{std::nullopt, {fault(request.file, std::move(what), std::move(cure))}};
  };
  std::error_code error;
  if (!std::filesystem::is_regular_file(request.path, error))
    return refuse("there is no such file", "the name counts from the case file's folder");
  const std::string kind = extension(request.path);
  if (kind == ".step" || kind == ".stp") return read_step(request.path, request.file, request.face_at);
  if (kind != ".dxf")
    return refuse("this is no kind of file that can be imported", "give a .dxf, .step or .stp file");
  if (std::filesystem::file_size(request.path, error) > most_drawing_bytes)
    return refuse("the drawing is too large", fmt::format("at most {} bytes are read", most_drawing_bytes));
  std::ifstream stream(request.path, std::ios::binary);
  const std::string content{std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
  if (!stream.is_open() || stream.bad()) return refuse("the file cannot be read", "check its permissions");
  return read_dxf(content, request.file, request.layer);
}

/// mm in one unit of the drawing, or a fault.
std::optional<double> unit_of(const Drawing& drawing, const PartRequest& request,
                              std::vector<Diagnostic>& faults) {
  if (!drawing.unit && !request.unit) {
    faults.push_back(fault(request.file, "the drawing does not say its units ($INSUNITS)",
                           "add units = \"mm\" to [import], or whatever it is drawn in"));
    return std::nullopt;
  }
  if (drawing.unit && request.unit && std::abs(*drawing.unit / *request.unit - 1) > 1e-12) {
    faults.push_back(
        fault(request.file,
              fmt::format("the drawing says that its unit is {}, the case says another", drawing.unit_word),
              "remove `units` from [import], or set the units of the drawing right"));
    return std::nullopt;
  }
  return drawing.unit ? drawing.unit : request.unit;
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
  const auto unit = unit_of(drawing, request, reading.faults);
  if (!unit) return {std::nullopt, std::move(reading.faults)};
  for (Stroke& stroke : drawing.strokes) scale(stroke.curve, *unit);
  Contours found = contours(std::move(drawing.strokes), request.rule);
  for (const ContourFault& f : found.faults) {
    reading.faults.push_back(fault(request.file, f.what, f.cure));
    if (f.line > 0) reading.faults.back().position = Position{f.line, 1};
  }
  if (!reading.faults.empty()) return {std::nullopt, std::move(reading.faults)};
  const auto box = box_of(found.outer);
  Part part{std::move(found.outer),
            std::move(found.inner),
            (box[0] + box[1]) / 2,
            box[1] - box[0],
            drawing.unit ? drawing.unit_word : "",
            std::move(found.repairs),
            std::move(drawing.left_out)};
  shift(part.outer, -part.centre);
  for (Loop& loop : part.inner) shift(loop, -part.centre);
  sort_inner(part.inner, part.size.maxCoeff());
  return {std::move(part), {}};
}

}  // namespace raiser::io
