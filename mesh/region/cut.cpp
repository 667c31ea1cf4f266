#include <algorithm>
#include <stdexcept>

#include "mesh/region/region.hpp"

namespace raiser::mesh {
namespace {

struct Chain {
  Loop curves;
  Point start() const { return curves.front().at(curves.front().begin); }
  Point finish() const { return curves.back().at(curves.back().end); }
};

/// Splits a loop where it crosses the axis. Whole loops on the positive side
/// go to `whole`; what remains of the others, as chains from axis to axis.
void split(const Loop& loop, int axis, std::vector<Loop>& whole, std::vector<Chain>& chains) {
  std::vector<Curve> pieces;
  std::vector<bool> inside;
  for (const Curve& curve : loop) {
    std::vector<double> stops = crossings(curve, axis, 0.0);
    stops.push_back(curve.end);
    double from = curve.begin;
    for (double to : stops) {
      Curve piece = curve;
      piece.begin = from;
      piece.end = to;
      inside.push_back(piece.at((from + to) / 2)[axis] > 0.0);
      pieces.push_back(piece);
      from = to;
    }
  }
  if (std::find(inside.begin(), inside.end(), false) == inside.end()) {
    whole.push_back(loop);
    return;
  }
  const std::size_t n = pieces.size();
  for (std::size_t i = 0; i < n; ++i) {
    if (!inside[i] || inside[(i + n - 1) % n]) continue;
    Chain chain;
    for (std::size_t k = i; inside[k % n]; ++k) chain.curves.push_back(pieces[k % n]);
    chains.push_back(std::move(chain));
  }
}

/// A crack that lies along the mirror line, from `low` to `high` on it.
struct OnAxis {
  std::size_t crack;
  double low, high;
};

/// Appends the straight line along the axis between two points, divided where
/// cracks begin and end on it.
void append_line(const Point& from, const Point& to, int axis, Owner owner, const std::vector<OnAxis>& cracks,
                 Loop& loop) {
  const double a = from[1 - axis];
  const double b = to[1 - axis];
  std::vector<double> stops = {a, b};
  const double margin = 1e-9 * std::abs(b - a);
  for (const OnAxis& crack : cracks)
    for (const double end : {crack.low, crack.high})
      if (end > std::min(a, b) + margin && end < std::max(a, b) - margin) stops.push_back(end);
  std::sort(stops.begin(), stops.end());
  if (b < a) std::reverse(stops.begin(), stops.end());
  Point begin = from;
  for (std::size_t k = 1; k < stops.size(); ++k) {
    Point end = to;
    if (k + 1 < stops.size()) {
      end[axis] = 0.0;
      end[1 - axis] = stops[k];
    }
    const double middle = (stops[k - 1] + stops[k]) / 2;
    Owner own = owner;
    for (const OnAxis& crack : cracks)
      if (middle > crack.low && middle < crack.high) own = {Owner::Kind::crack, crack.crack};
    loop.push_back({Curve::Kind::line, begin, end - begin, Point::Zero(), 0.0, 1.0, own});
    begin = end;
  }
}

/// Joins chains into loops by straight lines along the axis: between the
/// sorted ends, every other interval is material.
std::vector<Loop> join(const std::vector<Chain>& chains, int axis, Owner owner,
                       const std::vector<OnAxis>& cracks) {
  struct End {
    double position;
    std::size_t chain;
    bool is_start;
  };
  std::vector<End> ends;
  for (std::size_t i = 0; i < chains.size(); ++i) {
    ends.push_back({chains[i].start()[1 - axis], i, true});
    ends.push_back({chains[i].finish()[1 - axis], i, false});
  }
  std::sort(ends.begin(), ends.end(), [](const End& a, const End& b) { return a.position < b.position; });
  std::vector<std::size_t> next(chains.size());
  for (std::size_t k = 0; k + 1 < ends.size(); k += 2) {
    if (ends[k].is_start == ends[k + 1].is_start)
      throw std::logic_error("cut: the pieces of a loop do not alternate along the mirror line");
    const std::size_t a = ends[k].is_start ? k + 1 : k;
    next[ends[a].chain] = ends[2 * k + 1 - a].chain;
  }
  std::vector<Loop> loops;
  std::vector<bool> used(chains.size(), false);
  for (std::size_t first = 0; first < chains.size(); ++first) {
    if (used[first]) continue;
    Loop loop;
    for (std::size_t i = first; !used[i]; i = next[i]) {
      used[i] = true;
      loop.insert(loop.end(), chains[i].curves.begin(), chains[i].curves.end());
      append_line(chains[i].finish(), chains[next[i]].start(), axis, owner, cracks, loop);
    }
    loops.push_back(std::move(loop));
  }
  return loops;
}

/// The part of a slit on the positive side: chains whose cut ends lie on the axis.
void clip(const Slit& slit, int axis, double touch, std::vector<Slit>& out) {
  Slit part{slit.crack, {}};
  const auto finish = [&] {
    if (part.points.size() > 1) out.push_back(part);
    part.points.clear();
  };
  for (std::size_t k = 0; k < slit.points.size(); ++k) {
    const Point& p = slit.points[k];
    if (k > 0) {
      const Point& before = slit.points[k - 1];
      if ((before[axis] > touch && p[axis] < -touch) || (before[axis] < -touch && p[axis] > touch)) {
        Point crossing = before + before[axis] / (before[axis] - p[axis]) * (p - before);
        crossing[axis] = 0.0;
        part.points.push_back(crossing);
        if (p[axis] < 0.0) finish();
      }
    }
    if (p[axis] >= -touch) part.points.push_back(p);
    const bool leaves = p[axis] <= touch && k > 0;
    if (leaves) finish();
    if (leaves && p[axis] >= -touch) part.points.push_back(p);
  }
  finish();
}

/// Cuts slits and tips, and gives the cracks that lie on the axis.
std::vector<OnAxis> cut_cracks(const Region& region, int axis, double touch, Region& result) {
  std::vector<OnAxis> on_axis;
  for (const Slit& slit : region.slits) {
    const auto is_on = [&](const Point& p) { return std::abs(p[axis]) <= touch; };
    if (std::all_of(slit.points.begin(), slit.points.end(), is_on)) {
      const auto [low, high] = std::minmax(slit.points.front()[1 - axis], slit.points.back()[1 - axis]);
      on_axis.push_back({slit.crack, low, high});
    } else {
      clip(slit, axis, touch, result.slits);
    }
  }
  for (RegionTip tip : region.tips) {
    if (tip.at[axis] < -touch) continue;
    if (std::abs(tip.at[axis]) <= touch) {
      tip.on_mirror = true;
      tip.at[axis] = 0.0;
      tip.direction[axis] = 0.0;
    }
    result.tips.push_back(tip);
  }
  return on_axis;
}

Region cut_at_zero(const Region& region, int axis, Owner owner) {
  std::vector<Loop> whole;
  std::vector<Chain> chains;
  for (const Loop& loop : region.loops) split(loop, axis, whole, chains);
  // Loops wholly on the negative side leave no chain; those on the positive
  // side are holes, since the outline always crosses the mirror line.
  Region result;
  double size = 0.0;
  for (const Chain& chain : chains) size = std::max(size, chain.start().cwiseAbs().maxCoeff());
  const double touch = 1e-11 * size;
  const std::vector<OnAxis> on_axis = cut_cracks(region, axis, touch, result);
  result.loops = join(chains, axis, owner, on_axis);
  result.loops.insert(result.loops.end(), whole.begin(), whole.end());
  for (Slit& slit : result.slits)
    for (Point* end : {&slit.points.front(), &slit.points.back()})
      if (std::abs((*end)[axis]) <= touch) divide_at(result.loops, *end);
  return result;
}

}  // namespace

Region cut(const Region& region, Mirrors mirrors) {
  Region result = region;
  if (mirrors.x) result = cut_at_zero(result, 0, {Owner::Kind::mirror_x, 0});
  if (mirrors.y) result = cut_at_zero(result, 1, {Owner::Kind::mirror_y, 0});
  return result;
}

}  // namespace raiser::mesh
