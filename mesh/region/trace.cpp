#include <algorithm>
#include <cmath>
#include <limits>
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

Loop trace_outline(const Plate& plate) {
  Loop loop = outline_of(plate).curves;
  for (Curve& curve : loop)
    if (curve.owner.kind == Owner::Kind::raiser) curve.owner.index += plate.holes.size();
  return loop;
}

/// Nothing but the tip's own end segment lies nearer to it than this.
double reach(const Region& region, const std::vector<Crack>& cracks, const CrackTip& tip) {
  const auto& own = cracks[tip.crack].points;
  const std::size_t segment = tip.at_end ? own.size() - 2 : 0;
  const bool is_whole = own.size() == 2 && !cracks[tip.crack].has_mouth;
  double least = (own[segment + 1] - own[segment]).norm() * (is_whole ? 0.5 : 1.0);
  for (const Loop& loop : region.loops)
    for (const Curve& curve : loop) least = std::min(least, nearest(curve, tip.at).distance);
  for (std::size_t c = 0; c < cracks.size(); ++c)
    for (std::size_t k = 0; k + 1 < cracks[c].points.size(); ++k) {
      if (c == tip.crack && k == segment) continue;
      const Point from = cracks[c].points[k];
      const Curve line{Curve::Kind::line, from, cracks[c].points[k + 1] - from, Point::Zero(), 0.0, 1.0, {}};
      // A facing tip needs as much room as this one.
      const bool has_tip = (k == 0 && !cracks[c].has_mouth) || k + 2 == cracks[c].points.size();
      least = std::min(least, nearest(line, tip.at).distance * (has_tip && c != tip.crack ? 0.5 : 1.0));
    }
  return least;
}

void insert_cracks(Region& region, std::vector<Crack> cracks) {
  for (std::size_t c = 0; c < cracks.size(); ++c) {
    if (cracks[c].has_mouth) divide_at(region.loops, cracks[c].points.front());
    region.slits.push_back({c, cracks[c].points});
  }
  const std::vector<CrackTip> all = tips(cracks);
  for (std::size_t t = 0; t < all.size(); ++t)
    region.tips.push_back({t, all[t].at, all[t].direction, false, reach(region, cracks, all[t])});
}

}  // namespace

Loop trace(const Hole& hole, const Owner& owner) {
  if (hole.shape == HoleShape::drawn) {
    Loop edge = hole.edge;
    for (Curve& curve : edge) {
      curve.centre += hole.centre;
      curve.owner = owner;
    }
    return edge;
  }
  HoleLoop loop(hole, owner);
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

void divide_at(std::vector<Loop>& loops, Point& end) {
  std::size_t best_loop = 0;
  std::size_t best_curve = 0;
  Nearest best{0.0, std::numeric_limits<double>::infinity()};
  for (std::size_t l = 0; l < loops.size(); ++l)
    for (std::size_t k = 0; k < loops[l].size(); ++k)
      if (const Nearest found = nearest(loops[l][k], end); found.distance < best.distance) {
        best = found;
        best_loop = l;
        best_curve = k;
      }
  Loop& loop = loops[best_loop];
  Curve& curve = loop[best_curve];
  const double share = (best.parameter - curve.begin) / (curve.end - curve.begin);
  constexpr double joint = 1e-9;
  if (share < joint) {
    end = curve.at(curve.begin);
  } else if (share > 1 - joint) {
    const Curve& next = loop[(best_curve + 1) % loop.size()];
    end = next.at(next.begin);
  } else {
    end = curve.at(best.parameter);
    Curve rest = curve;
    curve.end = rest.begin = best.parameter;
    loop.insert(loop.begin() + static_cast<std::ptrdiff_t>(best_curve) + 1, rest);
  }
}

Region trace(const Plate& plate) {
  Region region;
  region.loops.push_back(trace_outline(plate));
  for (std::size_t i = 0; i < plate.holes.size(); ++i)
    region.loops.push_back(trace(plate.holes[i], {Owner::Kind::raiser, i}));
  insert_cracks(region, plate.cracks);
  return region;
}

}  // namespace raiser::mesh
