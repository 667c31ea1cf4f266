#include "io/import/dxf.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cctype>
#include <cmath>
#include <map>
#include <set>

#include "io/import/dxf_entity.hpp"
#include "io/import/dxf_tags.hpp"

namespace raiser::io {
namespace {

constexpr std::array<std::string_view, 6> edges{"LINE", "ARC", "CIRCLE", "ELLIPSE", "LWPOLYLINE", "POLYLINE"};
constexpr std::array<std::string_view, 3> curves_of_other_kind{"SPLINE", "HELIX", "MLINE"};
constexpr std::array<std::string_view, 8> bodies{"3DFACE", "3DSOLID", "BODY",    "MESH",
                                                 "REGION", "SURFACE", "SOLID3D", "PLANESURFACE"};

template <std::size_t N>
bool is_among(std::string_view kind, const std::array<std::string_view, N>& kinds) {
  return std::find(kinds.begin(), kinds.end(), kind) != kinds.end();
}

std::string plain(std::string_view text) {
  std::string result;
  for (const char c : text.substr(0, 60)) result += c >= ' ' && c < 127 ? c : '?';
  return result;
}

/// Layer names do not depend on case.
std::string lower(std::string_view text) {
  std::string result(text);
  for (char& c : result) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return result;
}

struct Unit {
  int code;
  double mm;
  std::string_view word;
};
/// The values of $INSUNITS for lengths that a drawing of a part may have.
constexpr std::array<Unit, 10> units{{{1, 25.4, "in"},
                                      {2, 304.8, "ft"},
                                      {4, 1.0, "mm"},
                                      {5, 10.0, "cm"},
                                      {6, 1000.0, "m"},
                                      {8, 25.4e-6, "microinch"},
                                      {9, 0.0254, "mil"},
                                      {10, 914.4, "yd"},
                                      {13, 1e-3, "um"},
                                      {14, 100.0, "dm"}}};

/// Reads the records of a drawing one by one into a Drawing and faults.
class DxfReader {
 public:
  DxfReader(const std::string& file, const std::optional<std::string>& layer) : file_(file), layer_(layer) {}

  DrawingReading read(const DxfSections& sections) {
    read_header(sections);
    read_layers(sections.tables);
    read_blocks(sections.blocks);
    const std::vector<Record>& all = sections.entities;
    for (std::size_t i = 0; i < all.size(); ++i) {
      std::size_t last = i;
      if (all[i].kind == "POLYLINE" || all[i].kind == "INSERT")
        while (last + 1 < all.size() && (all[last + 1].kind == "VERTEX" || all[last + 1].kind == "ATTRIB"))
          ++last;
      read_entity(all[i], {all.data() + i + 1, last - i});
      if (last + 1 < all.size() && all[last + 1].kind == "SEQEND") ++last;
      i = last;
    }
    finish(sections);
    if (!faults_.empty()) return {std::nullopt, std::move(faults_)};
    return {std::move(drawing_), {}};
  }

 private:
  void complain(std::size_t line, std::string_view value, std::string what, std::string cure) {
    constexpr std::size_t most = 100;
    if (faults_.size() < most)
      faults_.push_back({Diagnostic::Kind::input, file_, Position{std::max<std::size_t>(line, 1), 1}, "",
                         plain(value), std::move(what), std::move(cure)});
  }

  void leave_out(const Record& entity, const std::string& why) {
    auto& all = drawing_.left_out;
    const auto same = std::find_if(all.begin(), all.end(), [&](const LeftOut& known) {
      return known.kind == plain(entity.kind) && known.why == why;
    });
    if (same != all.end())
      ++same->count;
    else if (all.size() < 100)
      all.push_back({plain(entity.kind), why, 1, entity.line});
  }

  void read_header(const DxfSections& sections) {
    const auto& header = sections.header;
    for (std::size_t i = 0; i + 1 < header.size(); ++i) {
      if (header[i].code != 9 || header[i].value != "$INSUNITS") continue;
      const auto code = number(header[i + 1].value);
      for (const Unit& unit : units)
        if (code && *code == unit.code) {
          drawing_.unit = unit.mm;
          drawing_.unit_word = unit.word;
        }
      if (!drawing_.unit && !(code && *code == 0))
        complain(header[i + 1].line, header[i + 1].value, "$INSUNITS names no unit that a part is drawn in",
                 "set the units of the drawing, e.g. to 4 for mm");
    }
  }

  void read_layers(const std::vector<Record>& tables) {
    for (const Record& entry : tables) {
      if (entry.kind != "LAYER") continue;
      const auto name = value_of(entry, 2);
      if (!name) continue;
      const bool is_off = number_of(entry, 62).value_or(7.0) < 0;
      const bool is_frozen = (flags_of(entry, 70) & 1U) != 0;
      if (is_off || is_frozen) off_.insert(lower(*name));
    }
  }

  void read_blocks(const std::vector<Record>& blocks) {
    std::string inside;
    for (const Record& record : blocks) {
      if (record.kind == "BLOCK") inside = lower(value_of(record, 2).value_or(""));
      if (is_among(record.kind, edges) || is_among(record.kind, curves_of_other_kind) ||
          is_among(record.kind, bodies) || record.kind == "INSERT")
        with_curves_.insert(inside);
    }
  }

  void read_entity(const Record& entity, std::span<const Record> parts) {
    const std::string_view layer = value_of(entity, 8).value_or("0");
    if (layer_ && lower(*layer_) != lower(layer)) {
      note_layer(entity, layer);
      return leave_out(entity, "on another layer");
    }
    if (number_of(entity, 67).value_or(0.0) == 1.0) return leave_out(entity, "in paper space");
    if (number_of(entity, 60).value_or(0.0) == 1.0) return leave_out(entity, "invisible");
    if (off_.contains(lower(layer))) return leave_out(entity, "on a layer that is off");
    if (is_among(entity.kind, bodies))
      return complain(entity.line, entity.kind, fmt::format("a {} is no planar outline", plain(entity.kind)),
                      "draw the outline of the part as lines and arcs in x-y, or import one face from STEP");
    if (is_among(entity.kind, curves_of_other_kind))
      return complain(
          entity.line, entity.kind,
          fmt::format("a {} may be an edge of the part and cannot be read", plain(entity.kind)),
          "turn it into lines, arcs or polylines in the drawing, or put it on a layer that is not "
          "imported");
    if (entity.kind == "INSERT") return read_insert(entity);
    if (!is_among(entity.kind, edges)) return leave_out(entity, "no curve");
    note_layer(entity, layer);
    take(entity,
         entity.kind == "POLYLINE" ? curves_of_polyline(entity, vertices_among(parts)) : curves_of(entity));
  }

  static std::vector<Record> vertices_among(std::span<const Record> parts) {
    std::vector<Record> result;
    for (const Record& part : parts)
      if (part.kind == "VERTEX") result.push_back(part);
    return result;
  }

  void note_layer(const Record& entity, std::string_view layer) {
    if (!is_among(entity.kind, edges)) return;
    const std::string name = plain(layer);
    auto& all = drawing_.layers;
    if (all.size() < 100 && std::find(all.begin(), all.end(), name) == all.end()) all.push_back(name);
  }

  void read_insert(const Record& entity) {
    const std::string_view name = value_of(entity, 2).value_or("");
    if (!with_curves_.contains(lower(name))) return leave_out(entity, "a block without curves");
    complain(entity.line, name, fmt::format("the block \"{}\" has curves in it", plain(name)),
             "explode it in the drawing, or put it on a layer that is not imported");
  }

  void take(const Record& entity, const EntityCurves& read) {
    if (!read.what.empty()) return complain(entity.line, entity.kind, read.what, read.cure);
    constexpr double largest = 1e9;
    for (const mesh::Curve& curve : read.curves) {
      const bool is_sane = curve.centre.cwiseAbs().maxCoeff() < largest &&
                           curve.u.cwiseAbs().maxCoeff() < largest && curve.v.cwiseAbs().maxCoeff() < largest;
      if (!is_sane)
        return complain(entity.line, entity.kind, "its sizes or places are beyond any drawing",
                        "mend it in the drawing, or put it on a layer that is not imported");
      drawing_.strokes.push_back(
          {curve, plain(entity.kind), plain(value_of(entity, 8).value_or("0")), entity.line});
    }
    if (read.curves.empty()) return leave_out(entity, "without length");
    for (const double z : read.elevations) {
      if (elevations_.empty()) elevations_.push_back(z);
      if (std::abs(z - elevations_.front()) > 1e-6 * (1 + std::abs(z)) && !is_in_space_) {
        is_in_space_ = true;
        complain(entity.line, entity.kind,
                 fmt::format("the drawing is not flat: z is {} here and {} before", z, elevations_.front()),
                 "only planar drawings are imported: project the part onto x-y in the drawing");
      }
    }
  }

  void finish(const DxfSections& sections) {
    if (!sections.has_entities)
      return complain(1, "", "there is no ENTITIES section, so no drawing",
                      "save the drawing as an ASCII DXF file once more");
    if (!sections.is_complete)
      complain(1, "", "the file ends before its end mark EOF", "it is cut off: save or copy it once more");
    if (drawing_.strokes.size() > most_strokes)
      complain(1, "", fmt::format("the drawing has {} curves", drawing_.strokes.size()),
               fmt::format("at most {} are imported: choose the layer of the part", most_strokes));
    if (!drawing_.strokes.empty() || !faults_.empty()) return;
    complain(1, layer_.value_or(""),
             layer_ ? "there are no lines, arcs, circles, ellipses or polylines on this layer"
                    : "there are no lines, arcs, circles, ellipses or polylines in the drawing",
             layer_ && !drawing_.layers.empty()
                 ? fmt::format("the layers with curves are: {}", fmt::join(drawing_.layers, ", "))
                 : "check that the part is drawn in model space and visible");
  }

  std::string file_;
  std::optional<std::string> layer_;
  Drawing drawing_;
  std::vector<Diagnostic> faults_;
  std::set<std::string> off_;
  std::set<std::string> with_curves_;
  std::vector<double> elevations_;
  bool is_in_space_ = false;
};

DrawingReading whole_file_fault(const std::string& file, std::string what, std::string cure) {
  return {std::nullopt,
          {{Diagnostic::Kind::input, file, std::nullopt, "file", "", std::move(what), std::move(cure)}}};
}

}  // namespace

DrawingReading read_dxf(std::string_view content, const std::string& file,
                        const std::optional<std::string>& layer) {
  if (content.size() > most_drawing_bytes)
    return whole_file_fault(file, fmt::format("the drawing has {} bytes", content.size()),
                            fmt::format("at most {} are read: export the part alone", most_drawing_bytes));
  if (content.substr(0, 64).find("Binary DXF") != std::string_view::npos ||
      content.find('\0') != std::string_view::npos)
    return whole_file_fault(file, "this is a binary file", "save the drawing as ASCII DXF");
  if (content.find_first_not_of(" \t\r\n") == std::string_view::npos)
    return whole_file_fault(file, "the file is empty", "save the drawing as ASCII DXF");
  constexpr std::string_view mark = "\xEF\xBB\xBF";
  if (content.starts_with(mark)) content.remove_prefix(mark.size());
  const auto tags = split_dxf(content, file);
  if (const auto* fault = std::get_if<Diagnostic>(&tags)) return {std::nullopt, {*fault}};
  return DxfReader(file, layer).read(sections_of(std::get<std::vector<Tag>>(tags)));
}

}  // namespace raiser::io
