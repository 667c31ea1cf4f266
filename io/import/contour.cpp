#include "io/import/contour.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "io/import/curve_tools.hpp"
#include "io/import/join.hpp"

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Loop;
using mesh::Point;

std::string place(const Point& p) { return fmt::format("({:.6g}, {:.6g}) mm", p.x(), p.y()); }

Loop turned_round(const Loop& loop) {
  Loop result;
  for (auto curve = loop.rbegin(); curve != loop.rend(); ++curve) result.push_back(reversed(*curve));
  return result;
}

/// A loop with what is needed to tell which lies in which.
struct Ring {
  Loop loop;
  double area = 0.0;
  std::size_t line = 0;
  std::vector<Point> polygon;
  std::string where() const { return place(polygon.front()); }
};

std::vector<ContourFault> crossing_faults(const std::vector<Loop>& loops,
                                          const std::vector<std::size_t>& lines) {
  std::vector<ContourFault> faults;
  for (const Crossing& c : crossings(loops))
    faults.push_back({lines[c.first],
                      c.first == c.second ? fmt::format("the outline crosses itself at {}", place(c.at))
                                          : fmt::format("two outlines cross at {}", place(c.at)),
                      "mend the drawing there, or choose the layer that holds the outline alone"});
  return faults;
}

/// Rings, the largest first, each orientated as the outer or an inner one.
std::vector<Ring> rings_of(const Joined& joined, const std::vector<Loop>& loops) {
  std::vector<Ring> rings;
  for (std::size_t l = 0; l < loops.size(); ++l)
    rings.push_back({loops[l], area(loops[l]), joined.lines[l], flattened(loops[l])});
  std::stable_sort(rings.begin(), rings.end(),
                   [](const Ring& a, const Ring& b) { return std::abs(a.area) > std::abs(b.area); });
  for (std::size_t k = 0; k < rings.size(); ++k)
    if ((rings[k].area < 0) == (k == 0)) rings[k].loop = turned_round(rings[k].loop);
  return rings;
}

std::vector<ContourFault> nesting_faults(const std::vector<Ring>& rings) {
  std::vector<ContourFault> faults;
  const std::string cure = "import one part: put the others on a layer that is not imported";
  for (const Ring& ring : rings)
    if (std::abs(ring.area) < 1e-9 * std::pow(length(ring.loop.front()), 2))
      faults.push_back({ring.line, fmt::format("the closed curve at {} encloses no area", ring.where()),
                        "remove it from the drawing"});
  for (std::size_t k = 1; k < rings.size(); ++k) {
    const Point& x = rings[k].polygon.front();
    if (!is_inside(x, rings[0].polygon)) {
      faults.push_back({rings[k].line,
                        fmt::format("the closed curve at {} lies outside the largest one", rings[k].where()),
                        cure});
      continue;
    }
    for (std::size_t h = 1; h < k; ++h)
      if (is_inside(x, rings[h].polygon)) {
        faults.push_back({rings[k].line,
                          fmt::format("the closed curve at {} lies inside a hole", rings[k].where()), cure});
        break;
      }
  }
  return faults;
}

/// Size of the drawing in mm, for tolerances.
double extent_of(const std::vector<Loop>& loops) {
  double extent = 0.0;
  for (const Loop& loop : loops)
    for (const Curve& curve : loop) extent = std::max(extent, start(curve).cwiseAbs().maxCoeff());
  return extent;
}

}  // namespace

Contours contours(std::vector<Stroke> strokes, const ContourRule& rule) {
  Joined joined = join(std::move(strokes), rule.gap);
  Contours result{{}, {}, std::move(joined.repairs), std::move(joined.faults)};
  if (result.faults.empty() && joined.loops.empty())
    result.faults.push_back({0, "no closed curve is left", "check the drawing and the gap tolerance"});
  if (!result.faults.empty()) return result;
  result.faults = crossing_faults(joined.loops, joined.lines);
  if (!result.faults.empty()) return result;
  const double rounding = 1e-7 * extent_of(joined.loops);
  std::vector<Loop> loops;
  for (const Loop& loop : joined.loops)
    loops.push_back(merged(
        rule.arcs_from_facets ? with_arcs_for_facets(loop, rule.gap, result.repairs) : loop, rounding));
  const std::vector<Ring> rings = rings_of(joined, loops);
  result.faults = nesting_faults(rings);
  if (!result.faults.empty()) return result;
  result.outer = rings.front().loop;
  for (std::size_t k = 1; k < rings.size(); ++k) result.inner.push_back(rings[k].loop);
  return result;
}

}  // namespace raiser::io
