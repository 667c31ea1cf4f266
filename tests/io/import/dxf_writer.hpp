#pragma once

#include <fmt/format.h>

#include <string>
#include <vector>

namespace raiser::io {

/// Builds the text of an ASCII DXF drawing, entity by entity.
class DxfWriter {
 public:
  /// `units`: the value of $INSUNITS; 4 is mm, negative leaves it out.
  explicit DxfWriter(int units = 4) : units_(units) {}

  DxfWriter& layer(std::string name) {
    layer_ = std::move(name);
    return *this;
  }
  DxfWriter& raw(const std::string& groups) {
    entities_ += groups;
    return *this;
  }
  DxfWriter& head(const std::string& kind) { return raw(fmt::format("0\n{}\n8\n{}\n", kind, layer_)); }
  DxfWriter& group(int code, double value) { return raw(fmt::format("{}\n{:.12g}\n", code, value)); }

  DxfWriter& line(double x0, double y0, double x1, double y1) {
    return head("LINE").group(10, x0).group(20, y0).group(11, x1).group(21, y1);
  }
  DxfWriter& circle(double x, double y, double r) {
    return head("CIRCLE").group(10, x).group(20, y).group(40, r);
  }
  /// Anticlockwise, degrees.
  DxfWriter& arc(double x, double y, double r, double from, double to) {
    return head("ARC").group(10, x).group(20, y).group(40, r).group(50, from).group(51, to);
  }
  DxfWriter& ellipse(double x, double y, double ux, double uy, double ratio) {
    head("ELLIPSE").group(10, x).group(20, y).group(11, ux).group(21, uy);
    return group(40, ratio).group(41, 0).group(42, 6.283185307179586);
  }
  struct Vertex {
    double x, y, bulge = 0.0;
  };
  DxfWriter& polyline(const std::vector<Vertex>& vertices, bool closed = true) {
    head("LWPOLYLINE").raw(fmt::format("90\n{}\n70\n{}\n", vertices.size(), closed ? 1 : 0));
    for (const Vertex& v : vertices) {
      group(10, v.x).group(20, v.y);
      if (v.bulge != 0) group(42, v.bulge);
    }
    return *this;
  }
  DxfWriter& old_polyline(const std::vector<Vertex>& vertices) {
    head("POLYLINE").raw("66\n1\n70\n1\n");
    for (const Vertex& v : vertices) head("VERTEX").group(10, v.x).group(20, v.y).group(42, v.bulge);
    return head("SEQEND");
  }
  DxfWriter& rectangle(double length, double width) {
    const double x = length / 2;
    const double y = width / 2;
    return line(-x, -y, x, -y).line(x, -y, x, y).line(x, y, -x, y).line(-x, y, -x, -y);
  }
  /// Sections put before the entities, e.g. TABLES.
  DxfWriter& before(const std::string& sections) {
    before_ += sections;
    return *this;
  }

  std::string text() const {
    std::string header;
    if (units_ >= 0) header = fmt::format("0\nSECTION\n2\nHEADER\n9\n$INSUNITS\n70\n{}\n0\nENDSEC\n", units_);
    return header + before_ + "0\nSECTION\n2\nENTITIES\n" + entities_ + "0\nENDSEC\n0\nEOF\n";
  }

 private:
  int units_;
  std::string layer_ = "0";
  std::string before_;
  std::string entities_;
};

}  // namespace raiser::io
