#include <cmath>
#include <numbers>

#include "mesh/region/region.hpp"

namespace raiser::mesh {
namespace {

constexpr double quarter = std::numbers::pi / 2;

/// Builds one hole's loop in the hole's own axes and places it in the plate.
class HoleLoop {
 public:
  HoleLoop(const Hole& hole, Owner owner)
      : centre_(hole.centre),
        first_(std::cos(hole.angle), std::sin(hole.angle)),
        second_(-first_.y(), first_.x()),
        owner_(owner) {}

  void line(double x0, double y0, double x1, double y1) {
    if (x0 == x1 && y0 == y1) return;
    loop_.push_back(mesh::line(place(x0, y0), place(x1, y1), owner_));
  }
  /// A quarter of an ellipse about (x, y), run clockwise from `begin`.
  void arc(double x, double y, double a, double b, double begin) {
    loop_.push_back({Curve::Kind::arc, place(x, y), a * first_, b * second_, begin, begin - quarter, owner_});
  }
  Loop take() { return std::move(loop_); }

 private:
  Point place(double x, double y) const { return centre_ + x * first_ + y * second_; }
  Point centre_, first_, second_;
  Owner owner_;
  Loop loop_;
};

Loop trace_hole(const Hole& hole, std::size_t index) {
  HoleLoop loop(hole, {Owner::Kind::raiser, index});
  const double a = hole.length / 2;
  const double b = hole.width / 2;
  if (hole.shape == HoleShape::circle || hole.shape == HoleShape::ellipse) {
    for (int k = 0; k < 4; ++k) loop.arc(0, 0, a, b, -k * quarter);
    return loop.take();
  }
  const double r = hole.shape == HoleShape::slot ? b : hole.corner_radius;
  const double x = a - r;
  const double y = hole.shape == HoleShape::slot ? 0.0 : b - r;
  loop.line(-x, b, x, b);
  loop.arc(x, y, r, r, quarter);
  loop.line(a, y, a, -y);
  loop.arc(x, -y, r, r, 0);
  loop.line(x, -b, -x, -b);
  loop.arc(-x, -y, r, r, -quarter);
  loop.line(-a, -y, -a, y);
  loop.arc(-x, y, r, r, -2 * quarter);
  return loop.take();
}

Loop trace_outline(const Plate& plate) {
  Loop loop = outline_of(plate).curves;
  for (Curve& curve : loop)
    if (curve.owner.kind == Owner::Kind::raiser) curve.owner.index += plate.holes.size();
  return loop;
}

}  // namespace

Region trace(const Plate& plate) {
  Region region;
  region.loops.push_back(trace_outline(plate));
  for (std::size_t i = 0; i < plate.holes.size(); ++i) region.loops.push_back(trace_hole(plate.holes[i], i));
  return region;
}

}  // namespace raiser::mesh
