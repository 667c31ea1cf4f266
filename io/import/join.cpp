#include "io/import/join.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>
#include <numeric>

#include "io/import/curve_tools.hpp"

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Loop;
using mesh::Point;

constexpr std::size_t most_reported = 20;

std::string place(const Point& p) { return fmt::format("({:.6g}, {:.6g}) mm", p.x(), p.y()); }

std::string name(const Stroke& stroke) {
  return stroke.layer.empty() ? stroke.kind : fmt::format("{} on layer {}", stroke.kind, stroke.layer);
}

bool is_whole_turn(const Curve& curve) {
  return curve.kind == Curve::Kind::arc &&
         std::abs(curve.end - curve.begin) > 2 * std::numbers::pi * (1 - 1e-9);
}

Point middle(const Curve& curve) { return curve.at((curve.begin + curve.end) / 2); }

bool is_same(const Curve& a, const Curve& b, double gap) {
  const auto close = [gap](const Point& p, const Point& q) { return (p - q).norm() <= gap; };
  if (is_whole_turn(a) && is_whole_turn(b))
    return close(a.centre, b.centre) && std::abs(a.u.norm() - b.u.norm()) <= gap &&
           std::abs(a.v.norm() - b.v.norm()) <= gap && std::abs(length(a) - length(b)) <= gap;
  if (!close(middle(a), middle(b))) return false;
  return (close(start(a), start(b)) && close(finish(a), finish(b))) ||
         (close(start(a), finish(b)) && close(finish(a), start(b)));
}

/// A coordinate by which curves that are the same lie close together.
double sort_key(const Curve& curve) { return is_whole_turn(curve) ? curve.centre.x() : middle(curve).x(); }

void drop_doubles(std::vector<Stroke>& strokes, double gap, std::vector<std::string>& repairs) {
  std::vector<std::size_t> order(strokes.size());
  std::iota(order.begin(), order.end(), 0U);
  std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
    return sort_key(strokes[a].curve) < sort_key(strokes[b].curve);
  });
  std::vector<bool> drop(strokes.size(), false);
  std::size_t count = 0;
  std::size_t first = 0;
  for (std::size_t i = 0; i < order.size(); ++i)
    for (std::size_t j = i + 1; j < order.size() && !drop[order[i]]; ++j) {
      if (sort_key(strokes[order[j]].curve) - sort_key(strokes[order[i]].curve) > gap) break;
      if (drop[order[j]] || !is_same(strokes[order[i]].curve, strokes[order[j]].curve, gap)) continue;
      drop[order[j]] = true;
      if (count++ == 0) first = order[j];
    }
  if (count == 0) return;
  repairs.push_back(fmt::format("{} drawn twice left out once; the first is a {} near {}",
                                count == 1 ? "1 curve" : fmt::format("{} curves", count),
                                name(strokes[first]), place(middle(strokes[first].curve))));
  std::size_t k = 0;
  std::erase_if(strokes, [&](const Stroke&) { return drop[k++]; });
}

void drop_short(std::vector<Stroke>& strokes, double gap, std::vector<std::string>& repairs) {
  const std::size_t before = strokes.size();
  std::erase_if(strokes, [gap](const Stroke& s) { return !(length(s.curve) > gap); });
  const std::size_t count = before - strokes.size();
  if (count > 0)
    repairs.push_back(fmt::format("{} no longer than the gap tolerance of {:.3g} mm left out",
                                  count == 1 ? "1 curve" : fmt::format("{} curves", count), gap));
}

/// An end of a stroke: 2 stroke + (0 start, 1 finish).
using End = std::size_t;

/// Ends that lie together, found by sorting along x.
class Ends {
 public:
  Ends(const std::vector<Stroke>& strokes, double gap) : strokes_(strokes), parent_(2 * strokes.size()) {
    std::iota(parent_.begin(), parent_.end(), 0U);
    for (End e = 0; e < parent_.size(); ++e)
      if (!is_whole_turn(strokes[e / 2].curve)) order_.push_back(e);
    std::sort(order_.begin(), order_.end(), [&](End a, End b) { return at(a).x() < at(b).x(); });
    for (std::size_t i = 0; i < order_.size(); ++i)
      for (std::size_t j = i + 1; j < order_.size() && at(order_[j]).x() - at(order_[i]).x() <= gap; ++j)
        if ((at(order_[j]) - at(order_[i])).norm() <= gap) parent_[root(order_[j])] = root(order_[i]);
  }

  Point at(End e) const {
    const Curve& curve = strokes_[e / 2].curve;
    return e % 2 == 0 ? start(curve) : finish(curve);
  }

  /// The ends in groups, in the order of the drawing.
  std::vector<std::vector<End>> groups() {
    std::vector<std::size_t> index(parent_.size(), none);
    std::vector<std::vector<End>> result;
    std::vector<End> ends = order_;
    std::sort(ends.begin(), ends.end());
    for (const End e : ends) {
      std::size_t& own = index[root(e)];
      if (own == none) {
        own = result.size();
        result.emplace_back();
      }
      result[own].push_back(e);
    }
    return result;
  }

  /// The end of another stroke nearest to this one, and how far it is.
  std::pair<End, double> nearest(End e) const {
    std::pair<End, double> best{e, std::numeric_limits<double>::infinity()};
    for (const End other : order_) {
      if (other == e) continue;
      const double distance = (at(other) - at(e)).norm();
      if (distance < best.second) best = {other, distance};
    }
    return best;
  }

 private:
  static constexpr std::size_t none = static_cast<std::size_t>(-1);
  std::size_t root(std::size_t e) {
    while (parent_[e] != e) e = parent_[e] = parent_[parent_[e]];
    return e;
  }
  const std::vector<Stroke>& strokes_;
  std::vector<std::size_t> parent_;
  std::vector<End> order_;
};

ContourFault loose(const std::vector<Stroke>& strokes, const Ends& ends, End e, double gap) {
  const auto [other, distance] = ends.nearest(e);
  std::string cure =
      "close the outline there in the drawing, or choose the layer that holds the outline alone";
  if (std::isfinite(distance))
    cure = fmt::format(
        "the nearest other end, of a {}, is {:.3g} mm away at {}: close the gap in the drawing, or choose "
        "the "
        "layer that holds the outline alone",
        name(strokes[other / 2]), distance, place(ends.at(other)));
  return {strokes[e / 2].line,
          fmt::format("the {} ends at {} and nothing joins it within {:.3g} mm", name(strokes[e / 2]),
                      place(ends.at(e)), gap),
          std::move(cure)};
}

ContourFault branch(const std::vector<Stroke>& strokes, const Ends& ends, const std::vector<End>& group) {
  return {
      strokes[group.back() / 2].line,
      fmt::format("{} ends of curves meet at {}", group.size(), place(ends.at(group.front()))),
      "an outline has two there: leave construction lines out, or choose the layer that holds the outline "
      "alone; lower the gap tolerance if the curves are shorter than it"};
}

/// Where the two ends of a joint are brought together: at that of an arc rather
/// than of a line, so that arcs stay what was drawn; else half way.
Point meeting(const std::vector<Stroke>& strokes, const Ends& ends, End a, End b) {
  const bool is_line_a = strokes[a / 2].curve.kind == Curve::Kind::line;
  const bool is_line_b = strokes[b / 2].curve.kind == Curve::Kind::line;
  if (is_line_a != is_line_b) return ends.at(is_line_a ? b : a);
  return (ends.at(a) + ends.at(b)) / 2;
}

void report_gaps(const std::vector<std::pair<double, Point>>& gaps, std::vector<std::string>& repairs) {
  std::size_t shown = 0;
  for (const auto& [width, at] : gaps)
    if (shown++ < most_reported)
      repairs.push_back(fmt::format("a gap of {:.3g} mm closed at {}", width, place(at)));
  if (shown > most_reported) repairs.push_back(fmt::format("{} more gaps closed", shown - most_reported));
}

/// An arc whose ends meet as a whole turn.
Curve closed(Curve curve) {
  curve.end = curve.begin + (curve.end > curve.begin ? 2 : -2) * std::numbers::pi;
  return curve;
}

/// Walks from joint to joint, each stroke once.
void walk(const std::vector<Stroke>& strokes, const std::vector<End>& mate, const std::vector<Point>& vertex,
          Joined& out) {
  std::vector<bool> used(strokes.size(), false);
  for (std::size_t first = 0; first < strokes.size(); ++first) {
    if (used[first]) continue;
    Loop loop;
    End e = 2 * first;
    while (!used[e / 2]) {
      used[e / 2] = true;
      const Curve& curve = strokes[e / 2].curve;
      if (is_whole_turn(curve)) {
        loop.push_back(curve);
        break;
      }
      const End far = e ^ 1U;
      if (mate[far] == e) {
        loop.push_back(closed(curve));
        break;
      }
      loop.push_back(between(e % 2 == 0 ? curve : reversed(curve), vertex[e], vertex[far]));
      e = mate[far];
    }
    out.loops.push_back(std::move(loop));
    out.lines.push_back(strokes[first].line);
  }
}

}  // namespace

Joined join(std::vector<Stroke> strokes, double gap) {
  Joined result;
  drop_short(strokes, gap, result.repairs);
  drop_doubles(strokes, gap, result.repairs);
  double extent = 0.0;
  for (const Stroke& s : strokes) extent = std::max(extent, start(s.curve).cwiseAbs().maxCoeff());
  Ends ends(strokes, gap);
  std::vector<End> mate(2 * strokes.size());
  std::vector<Point> vertex(2 * strokes.size(), Point::Zero());
  std::vector<std::pair<double, Point>> gaps;
  for (const std::vector<End>& group : ends.groups()) {
    if (group.size() != 2) {
      if (result.faults.size() < most_reported)
        result.faults.push_back(group.size() == 1 ? loose(strokes, ends, group[0], gap)
                                                  : branch(strokes, ends, group));
      continue;
    }
    const auto [a, b] = std::pair(group[0], group[1]);
    mate[a] = b;
    mate[b] = a;
    vertex[a] = vertex[b] = meeting(strokes, ends, a, b);
    const double width = (ends.at(a) - ends.at(b)).norm();
    if (width > 1e-7 * extent) gaps.emplace_back(width, vertex[a]);
  }
  if (!result.faults.empty()) return result;
  report_gaps(gaps, result.repairs);
  walk(strokes, mate, vertex, result);
  return result;
}

}  // namespace raiser::io
