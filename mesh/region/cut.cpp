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

/// Joins chains into loops by straight lines along the axis: between the
/// sorted ends, every other interval is material.
std::vector<Loop> join(const std::vector<Chain>& chains, int axis, Owner owner) {
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
      loop.push_back(line(chains[i].finish(), chains[next[i]].start(), owner));
    }
    loops.push_back(std::move(loop));
  }
  return loops;
}

Region cut_at_zero(const Region& region, int axis, Owner owner) {
  std::vector<Loop> whole;
  std::vector<Chain> chains;
  for (const Loop& loop : region.loops) split(loop, axis, whole, chains);
  // Loops wholly on the negative side leave no chain; those on the positive
  // side are holes, since the outline always crosses the mirror line.
  Region result{join(chains, axis, owner)};
  result.loops.insert(result.loops.end(), whole.begin(), whole.end());
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
