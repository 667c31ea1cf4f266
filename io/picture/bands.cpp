#include "io/picture/bands.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdint>
#include <unordered_map>
#include <utility>

namespace raiser::io {
namespace {

// Points of neighbouring cells that differ by rounding only are one point.
struct Key {
  std::int64_t x, y;
  bool operator==(const Key&) const = default;
};
struct HashKey {
  std::size_t operator()(const Key& k) const {
    return static_cast<std::size_t>(k.x) * 0x9E3779B97F4A7C15ull +
           static_cast<std::size_t>(k.y) * 0xC2B2AE3D27D4EB4Full;
  }
};

// A set of directed edges in which opposite ones cancel, and their chains.
class EdgeSet {
 public:
  explicit EdgeSet(double grid) : grid_(grid) {}

  void add(const Point& from, const Point& to) {
    const std::size_t a = number(from), b = number(to);
    if (a == b) return;
    auto& back = next_[b];
    const auto twin = std::find(back.begin(), back.end(), a);
    if (twin != back.end())
      back.erase(twin);
    else
      next_[a].push_back(b);
  }

  std::vector<Polyline> chains() {
    std::vector<Polyline> result;
    std::vector<int> balance(points_.size(), 0);
    for (std::size_t a = 0; a < points_.size(); ++a)
      for (const std::size_t b : next_[a]) ++balance[a], --balance[b];
    for (std::size_t a = 0; a < points_.size(); ++a)
      for (; balance[a] > 0; --balance[a]) result.push_back(walk(a));
    for (std::size_t a = 0; a < points_.size(); ++a)
      while (!next_[a].empty()) result.push_back(walk(a));
    return result;
  }

 private:
  std::size_t number(const Point& p) {
    const Key key{std::llround(p.x() / grid_), std::llround(p.y() / grid_)};
    const auto [entry, fresh] = numbers_.try_emplace(key, points_.size());
    if (fresh) {
      points_.push_back(p);
      next_.emplace_back();
    }
    return entry->second;
  }

  Polyline walk(std::size_t a) {
    Polyline line{points_[a]};
    while (!next_[a].empty()) {
      const std::size_t b = next_[a].back();
      next_[a].pop_back();
      line.push_back(points_[b]);
      a = b;
    }
    return line;
  }

  double grid_;
  std::vector<Point> points_;
  std::vector<std::vector<std::size_t>> next_;
  std::unordered_map<Key, std::size_t, HashKey> numbers_;
};

std::size_t index_of(int n, int i, int j) {
  return static_cast<std::size_t>(j * (n + 1) - j * (j - 1) / 2 + i);
}

template <class Visit>
void for_each_triangle(int n, const Visit& visit) {
  for (int j = 0; j < n; ++j)
    for (int i = 0; i + j < n; ++i) {
      visit(std::array{index_of(n, i, j), index_of(n, i + 1, j), index_of(n, i, j + 1)});
      if (i + j + 1 < n)
        visit(std::array{index_of(n, i + 1, j), index_of(n, i + 1, j + 1), index_of(n, i, j + 1)});
    }
}

// Where the level crosses the side a-b; the same whichever end comes first.
Point crossing(const PictureCell& cell, std::size_t a, std::size_t b, double level) {
  if (a > b) std::swap(a, b);
  const double s = (level - cell.values[a]) / (cell.values[b] - cell.values[a]);
  return cell.points[a] + s * (cell.points[b] - cell.points[a]);
}

// Clips one small triangle to value >= level.
void clip(const PictureCell& cell, const std::array<std::size_t, 3>& corner, double level, EdgeSet& region,
          EdgeSet& lines) {
  std::array<Point, 4> part;
  std::size_t count = 0;
  std::array<Point, 2> cut;
  std::size_t cuts = 0;
  for (std::size_t k = 0; k < 3; ++k) {
    const std::size_t a = corner[k], b = corner[(k + 1) % 3];
    const bool a_in = cell.values[a] >= level, b_in = cell.values[b] >= level;
    if (a_in) part[count++] = cell.points[a];
    if (a_in == b_in) continue;
    const Point p = crossing(cell, a, b, level);
    part[count++] = p;
    cut[a_in ? 0 : 1] = p;
    ++cuts;
  }
  for (std::size_t k = 0; k < count; ++k) region.add(part[k], part[(k + 1) % count]);
  if (cuts == 2) lines.add(cut[0], cut[1]);
}

void add_outline(const PictureCell& cell, EdgeSet& region) {
  const int n = cell.subdivisions;
  const auto p = [&](int i, int j) { return cell.points[index_of(n, i, j)]; };
  for (int k = 0; k < n; ++k) {
    region.add(p(k, 0), p(k + 1, 0));
    region.add(p(n - k, k), p(n - k - 1, k + 1));
    region.add(p(0, n - k), p(0, n - k - 1));
  }
}

double extent(const std::vector<PictureCell>& cells) {
  double size = 0.0;
  for (const PictureCell& cell : cells)
    for (const Point& p : cell.points) size = std::max(size, p.cwiseAbs().maxCoeff());
  return size;
}

}  // namespace

std::vector<Point> lattice(int n) {
  std::vector<Point> points;
  for (int j = 0; j <= n; ++j)
    for (int i = 0; i + j <= n; ++i) points.emplace_back(double(i) / n, double(j) / n);
  return points;
}

LevelSet cut_at(const std::vector<PictureCell>& cells, double level, double joining) {
  const double grid = std::max(1e-9 * extent(cells), 1e-300);
  EdgeSet region(grid), lines(std::max(grid, joining));
  for (const PictureCell& cell : cells) {
    const auto [low, high] = std::minmax_element(cell.values.begin(), cell.values.end());
    if (*high < level) continue;
    if (*low >= level)
      add_outline(cell, region);
    else
      for_each_triangle(cell.subdivisions,
                        [&](const auto& corner) { clip(cell, corner, level, region, lines); });
  }
  return {region.chains(), lines.chains()};
}

double area(const std::vector<Polyline>& loops) {
  double twice = 0.0;
  for (const Polyline& loop : loops)
    for (std::size_t i = 0; i < loop.size(); ++i) {
      const Point &p = loop[i], &q = loop[(i + 1) % loop.size()];
      twice += p.x() * q.y() - q.x() * p.y();
    }
  return twice / 2;
}

std::vector<double> band_areas(const std::vector<PictureCell>& cells, const std::vector<double>& limits) {
  std::vector<double> areas;
  double above = area(cut_at(cells, limits.front()).region);
  for (std::size_t i = 1; i < limits.size(); ++i) {
    const double next = area(cut_at(cells, limits[i]).region);
    areas.push_back(above - next);
    above = next;
  }
  return areas;
}

Polyline simplified(const Polyline& line, double tolerance) {
  if (line.size() < 3) return line;
  std::vector<bool> keep(line.size(), false);
  keep.front() = keep.back() = true;
  std::vector<std::pair<std::size_t, std::size_t>> spans{{0, line.size() - 1}};
  while (!spans.empty()) {
    const auto [first, last] = spans.back();
    spans.pop_back();
    const Point chord = line[last] - line[first];
    const double length = chord.norm();
    double worst = tolerance;
    std::size_t at = first;
    for (std::size_t i = first + 1; i < last; ++i) {
      const Point d = line[i] - line[first];
      const double t = length > 0 ? std::clamp(d.dot(chord) / (length * length), 0.0, 1.0) : 0.0;
      const double away = (d - t * chord).norm();
      if (away > worst) worst = away, at = i;
    }
    if (at == first) continue;
    keep[at] = true;
    spans.emplace_back(first, at);
    spans.emplace_back(at, last);
  }
  Polyline result;
  for (std::size_t i = 0; i < line.size(); ++i)
    if (keep[i]) result.push_back(line[i]);
  return result;
}

}  // namespace raiser::io
