#include "mesh/triangulate/triangulate.hpp"

#include <gmsh.h>

#include <Eigen/LU>
#include <algorithm>
#include <array>
#include <map>
#include <optional>
#include <stdexcept>
#include <string>

#include "mesh/triangulate/fan.hpp"
#include "mesh/triangulate/size_field.hpp"

namespace raiser::mesh {
namespace {

/// Starts Gmsh once in the process, without user configuration, and silent.
void start_gmsh() {
  static const bool started = [] {
    gmsh::initialize(0, nullptr, false);
    gmsh::option::setNumber("General.Terminal", 0);
    gmsh::option::setNumber("General.Verbosity", 0);
    gmsh::option::setNumber("General.NumThreads", 1);
    gmsh::option::setNumber("Mesh.MeshSizeExtendFromBoundary", 0);
    gmsh::option::setNumber("Mesh.MeshSizeFromPoints", 0);
    gmsh::option::setNumber("Mesh.LcIntegrationPrecision", 1e-4);
    return true;
  }();
  static_cast<void>(started);
}

/// The divided boundary as Gmsh is given it: a straight line a piece. Point i
/// of the model has the tag i + 1; the loops' points come first, in order.
struct Polygon {
  std::vector<Point> points;
  std::vector<std::vector<int>> slits;  ///< points along each slit
  std::vector<std::vector<int>> fans;   ///< points at each fan's outer corners

  explicit Polygon(const Division& division) {
    std::map<std::pair<double, double>, int> known;
    const auto number = [&](const Point& p) {
      const auto [at, is_new] = known.try_emplace({p.x(), p.y()}, static_cast<int>(points.size()));
      if (is_new) points.push_back(p);
      return at->second;
    };
    for (const DividedLoop& loop : division.loops)
      for (const Curve& piece : loop) {
        const Point from = piece.at(piece.begin);
        known[{from.x(), from.y()}] = static_cast<int>(points.size());
        points.push_back(from);
      }
    const std::size_t on_loops = points.size();
    const auto place = [&](const Point& p) {  // rounding apart, an end lies on a loop's point
      int best = 0;
      for (std::size_t i = 0; i < on_loops; ++i)
        if ((points[i] - p).squaredNorm() < (points[best] - p).squaredNorm()) best = static_cast<int>(i);
      return best;
    };
    for (const auto& slit : division.slits) {
      std::vector<int> along = {place(slit.front().at(slit.front().begin))};
      for (std::size_t k = 1; k < slit.size(); ++k) along.push_back(number(slit[k].at(slit[k].begin)));
      along.push_back(place(slit.back().at(slit.back().end)));
      slits.push_back(std::move(along));
    }
    for (const Fan& fan : division.fans) {
      fans.emplace_back();
      for (const Point& corner : fan.outer) fans.back().push_back(place(corner));
    }
  }
};

void build_model(const Division& division, const Polygon& polygon) {
  gmsh::model::add("plate");
  for (std::size_t i = 0; i < polygon.points.size(); ++i)
    gmsh::model::geo::addPoint(polygon.points[i].x(), polygon.points[i].y(), 0.0, 0.0,
                               static_cast<int>(i) + 1);
  const auto add_line = [](int from, int to) {
    const int line = gmsh::model::geo::addLine(from + 1, to + 1);
    gmsh::model::geo::mesh::setTransfiniteCurve(line, 2);
    return line;
  };
  std::vector<int> loop_tags;
  int first = 0;
  for (const DividedLoop& loop : division.loops) {
    const int count = static_cast<int>(loop.size());
    std::vector<int> lines;
    for (int k = 0; k < count; ++k) lines.push_back(add_line(first + k, first + (k + 1) % count));
    loop_tags.push_back(gmsh::model::geo::addCurveLoop(lines));
    first += count;
  }
  gmsh::model::geo::addPlaneSurface(loop_tags, 1);
  std::vector<int> inside;
  for (const auto& slit : polygon.slits)
    for (std::size_t k = 1; k < slit.size(); ++k) inside.push_back(add_line(slit[k - 1], slit[k]));
  gmsh::model::geo::synchronize();
  if (!inside.empty()) gmsh::model::mesh::embed(1, inside, 2, 1);
}

struct Triangles {
  std::vector<Point> points;
  std::vector<Mesh::Triangle> triangles;
};

/// Reads the triangulation back; the first points are those of `boundary`.
Triangles read_triangles(const std::vector<Point>& boundary) {
  std::vector<std::size_t> tags;
  std::vector<double> xyz, parameters;
  gmsh::model::mesh::getNodes(tags, xyz, parameters);
  std::vector<int> index(*std::max_element(tags.begin(), tags.end()) + 1, -1);
  Triangles result{boundary, {}};
  for (std::size_t i = 0; i < boundary.size(); ++i) {
    std::vector<std::size_t> node;
    std::vector<double> at, none;
    gmsh::model::mesh::getNodes(node, at, none, 0, static_cast<int>(i) + 1);
    if (node.size() != 1) throw std::runtime_error("triangulate: a boundary point has no node");
    index[node[0]] = static_cast<int>(i);
  }
  for (std::size_t k = 0; k < tags.size(); ++k) {
    if (index[tags[k]] >= 0) continue;
    index[tags[k]] = static_cast<int>(result.points.size());
    result.points.emplace_back(xyz[3 * k], xyz[3 * k + 1]);
  }
  std::vector<std::size_t> elements, nodes;
  gmsh::model::mesh::getElementsByType(2, elements, nodes, 1);
  // All run the same way. The sign of one alone would not do: Gmsh sometimes
  // returns a triangle of no area.
  double area = 0.0;
  for (std::size_t k = 0; k + 2 < nodes.size(); k += 3) {
    const Mesh::Triangle t{index[nodes[k]], index[nodes[k + 1]], index[nodes[k + 2]]};
    const Point a = result.points[t[1]] - result.points[t[0]];
    const Point b = result.points[t[2]] - result.points[t[0]];
    area += a.x() * b.y() - a.y() * b.x();
    result.triangles.push_back(t);
  }
  if (area < 0)
    for (Mesh::Triangle& t : result.triangles) std::swap(t[1], t[2]);
  return result;
}

/// What Gmsh is told beside the sizes.
struct Manner {
  double growth, crack_growth;
  /// Of points at random, against the size of the plate, so that no four lie on one circle.
  double shift = 1e-9;
  /// By Delaunay's criterion instead of by a front, which finds no place for
  /// points before a few small sides among large ones.
  bool by_delaunay = false;
};

/// Whether sides shrink towards some place of a loop faster than Gmsh's front
/// follows without many small triangles.
bool is_graded(const DividedLoop& loop) {
  constexpr double fast = 4.0;
  const auto length = [](const Curve& piece) { return (piece.at(piece.end) - piece.at(piece.begin)).norm(); };
  double before = length(loop.back());
  for (const Curve& piece : loop) {
    const double own = length(piece);
    if (std::max(own, before) > fast * std::min(own, before)) return true;
    before = own;
  }
  return false;
}

/// Beside a place on a smooth edge that the sides shrink towards, Gmsh's usual
/// shift is more than the edge bends.
Manner manner(const SizeRule& rule, const Division& division, double growth, int attempt) {
  Manner result{growth, rule.crack_growth * growth / rule.growth};
  // About a corner the front's triangles are the better ones.
  const bool is_smooth = !division.has_corner;
  result.by_delaunay = !division.fans.empty() || !rule.singular.empty() ||
                       (is_smooth && std::any_of(division.loops.begin(), division.loops.end(), is_graded));
  constexpr std::array shifts = {1e-13, 1e-12, 1e-14};
  if (!rule.singular.empty()) result.shift = shifts[attempt % shifts.size()];
  return result;
}

Triangles run_gmsh(const Division& division, const Polygon& polygon, const Manner& manner) {
  start_gmsh();
  SizeField sizes(division, manner.growth, manner.crack_growth);
  try {
    constexpr int delaunay = 5;
    constexpr int frontal = 6;
    gmsh::option::setNumber("Mesh.Algorithm", manner.by_delaunay ? delaunay : frontal);
    gmsh::option::setNumber("Mesh.RandomFactor", manner.shift);
    build_model(division, polygon);
    gmsh::model::mesh::setSizeCallback(
        [&sizes](int, int, double x, double y, double) { return sizes.at(Point(x, y)); });
    gmsh::model::mesh::generate(2);
    gmsh::model::mesh::removeSizeCallback();
    Triangles result = read_triangles(polygon.points);
    gmsh::clear();
    return result;
  } catch (const std::string& message) {
    gmsh::clear();
    throw std::runtime_error("triangulate: Gmsh failed: " + message);
  }
}

/// The point after each one on the divided boundary.
std::vector<int> successors(const std::vector<DividedLoop>& loops) {
  std::vector<int> next;
  for (const DividedLoop& loop : loops) {
    const int first = static_cast<int>(next.size());
    for (int k = 1; k <= static_cast<int>(loop.size()); ++k)
      next.push_back(first + k % static_cast<int>(loop.size()));
  }
  return next;
}

/// The triangle's corners in the order of the boundary, if it lies along three
/// successive points of it without area or with area on the wrong side.
std::optional<Mesh::Triangle> flat_along_boundary(const Triangles& raw, const Mesh::Triangle& triangle,
                                                  const std::vector<int>& next) {
  const auto bounds = static_cast<int>(next.size());
  if (*std::max_element(triangle.begin(), triangle.end()) >= bounds) return std::nullopt;
  const int sum = triangle[0] + triangle[1] + triangle[2];
  for (const int b : triangle) {
    const int c = next[b];
    const int a = sum - b - c;
    if (std::find(triangle.begin(), triangle.end(), c) == triangle.end() || next[a] != b) continue;
    const Point ab = raw.points[b] - raw.points[a];
    const Point ac = raw.points[c] - raw.points[a];
    if (ab.x() * ac.y() - ab.y() * ac.x() < 1e-3 * ac.squaredNorm()) return Mesh::Triangle{a, b, c};
  }
  return std::nullopt;
}

/// Gmsh sometimes lays a flat triangle along the boundary, even one that runs
/// the wrong way. Exchanges the diagonal of it and of its neighbour across the
/// longest side.
void flip_flat_triangles(const std::vector<DividedLoop>& loops, Triangles& raw) {
  const std::vector<int> next = successors(loops);
  for (Mesh::Triangle& triangle : raw.triangles) {
    const auto flat = flat_along_boundary(raw, triangle, next);
    if (!flat) continue;
    const auto [a, b, c] = *flat;
    for (Mesh::Triangle& other : raw.triangles) {
      const auto has = [&other](int v) { return std::find(other.begin(), other.end(), v) != other.end(); };
      if (!has(a) || !has(c) || has(b)) continue;
      const int d = other[0] + other[1] + other[2] - a - c;
      other = {a, b, d};
      triangle = {b, c, d};
      break;
    }
  }
}

/// Finds each boundary piece's triangle side and each slit piece's edge.
/// Returns false when some piece has none: Gmsh sometimes puts a triangle of no
/// area on a straight run of boundary.
bool attach(const Division& division, const Polygon& polygon, Draft& draft) {
  std::map<std::pair<int, int>, const Curve*> pieces;
  std::map<std::pair<int, int>, const Curve*> slits;
  std::size_t missing = 0;
  int first = 0;
  for (const DividedLoop& loop : division.loops) {
    const int count = static_cast<int>(loop.size());
    for (int k = 0; k < count; ++k)
      if (loop[k].owner.kind != Owner::Kind::inner) pieces[{first + k, first + (k + 1) % count}] = &loop[k];
    first += count;
  }
  for (std::size_t s = 0; s < polygon.slits.size(); ++s)
    for (std::size_t k = 1; k < polygon.slits[s].size(); ++k)
      slits[{polygon.slits[s][k - 1], polygon.slits[s][k]}] = &division.slits[s][k - 1];
  missing = pieces.size() + slits.size();
  for (int t = 0; t < static_cast<int>(draft.triangles.size()); ++t)
    for (int k = 0; k < 3; ++k) {
      const std::pair<int, int> edge{draft.triangles[t][k], draft.triangles[t][(k + 1) % 3]};
      if (const auto found = pieces.find(edge); found != pieces.end()) {
        draft.sides.push_back({t, k, *found->second});
        --missing;
      } else if (const auto slit = slits.find(edge); slit != slits.end()) {
        draft.seams.push_back({edge.first, edge.second, *slit->second});
        --missing;
      }
    }
  return missing == 0;
}

/// The mesh of a triangulated polygon with its fans filled and its slits open;
/// nothing when some boundary piece has no triangle.
std::optional<Mesh> assemble(const Division& division, const Polygon& polygon, Triangles raw) {
  Draft draft{std::move(raw.points), std::move(raw.triangles), {}, {}, {}};
  if (!attach(division, polygon, draft)) return std::nullopt;
  for (std::size_t i = 0; i < division.fans.size(); ++i) fill(division.fans[i], polygon.fans[i], draft);
  open_seams(draft);
  return Mesh(std::move(draft.points), std::move(draft.triangles), std::move(draft.sides), Mesh::exact,
              std::move(draft.fans));
}

/// Splits in halves the pieces of boundary of the given triangles.
std::vector<DividedLoop> split_sides(const std::vector<DividedLoop>& loops, const Mesh& mesh,
                                     const std::vector<int>& triangles) {
  // Neighbours of a bad triangle give it room, too.
  std::vector<bool> near(mesh.points().size(), false);
  for (const int t : triangles)
    for (const int v : mesh.triangles()[t]) near[v] = true;
  std::vector<DividedLoop> result;
  int vertex = 0;
  for (const DividedLoop& loop : loops) {
    DividedLoop refined;
    const int first = vertex;
    const int count = static_cast<int>(loop.size());
    for (int k = 0; k < count; ++k, ++vertex) {
      const bool split = near[vertex] && near[first + (vertex - first + 1) % count] &&
                         loop[k].owner.kind != Owner::Kind::inner;
      if (!split) {
        refined.push_back(loop[k]);
        continue;
      }
      Curve half = loop[k];
      half.end = (loop[k].begin + loop[k].end) / 2;
      refined.push_back(half);
      half.begin = half.end;
      half.end = loop[k].end;
      refined.push_back(half);
    }
    result.push_back(std::move(refined));
  }
  return result;
}

/// Whether the triangle's corners lie on one line, to a thousandth of its size.
bool is_flat(const Mesh& mesh, int triangle) {
  const auto& [a, b, c] = mesh.triangles()[triangle];
  const Point ab = mesh.points()[b] - mesh.points()[a], ac = mesh.points()[c] - mesh.points()[a];
  return std::abs(ab.x() * ac.y() - ab.y() * ac.x()) < 1e-3 * std::max(ab.squaredNorm(), ac.squaredNorm());
}

/// Whether the triangle's map folds somewhere; a merely thin one does not.
bool is_folded(const Mesh& mesh, int triangle) {
  constexpr int n = 8;
  const auto& corner = mesh.triangles()[triangle];
  const Point a = mesh.points()[corner[1]] - mesh.points()[corner[0]];
  const Point b = mesh.points()[corner[2]] - mesh.points()[corner[0]];
  const double area = a.x() * b.y() - a.y() * b.x();
  if (!(area > 1e-4 * std::max(a.squaredNorm(), b.squaredNorm()))) return true;
  for (int i = 0; i <= n; ++i)
    for (int j = 0; i + j <= n; ++j) {
      const Point place(static_cast<double>(i) / n, static_cast<double>(j) / n);
      if (!(mesh.map(triangle, place).jacobian.determinant() > 0.1 * area)) return true;
    }
  return false;
}

}  // namespace

Mesh triangulate(const Region& region, const SizeRule& rule) {
  constexpr int most_attempts = 10;
  constexpr int attempts_against_thin = 5;
  Division division = divide(region, rule);
  double growth = rule.growth;
  std::optional<Mesh> thin;  // sound, but for triangles that shorter sides only make thinner
  for (int attempt = 0; attempt < most_attempts; ++attempt) {
    if (thin && attempt >= attempts_against_thin) break;
    const Polygon polygon(division);
    Triangles raw = run_gmsh(division, polygon, manner(rule, division, growth, attempt));
    flip_flat_triangles(division.loops, raw);
    if (std::optional<Mesh> mesh = assemble(division, polygon, std::move(raw))) {
      std::vector<int> bad = inverted_triangles(*mesh);
      if (bad.empty()) return *std::move(mesh);
      const auto folded = [&mesh](int t) { return is_folded(*mesh, t); };
      if (!thin && std::none_of(bad.begin(), bad.end(), folded)) thin = mesh;
      // A curved triangle needs shorter sides; a flat one a different mesh.
      std::erase_if(bad, [&](int t) { return !mesh->is_curved(t) || is_flat(*mesh, t); });
      division.loops = split_sides(division.loops, *mesh, bad);
    }
    growth *= 0.85;
  }
  if (thin) return *std::move(thin);
  // Where asked for, grading may stop earlier: what that leaves out shows in the bounds.
  constexpr double coarsest = 5e-3;
  if (!rule.singular.empty() && rule.corner < coarsest) {
    SizeRule coarser = rule;
    coarser.corner *= 10;
    return triangulate(region, coarser);
  }
  throw std::runtime_error(
      "triangulate: some triangles stay inverted or without area; change the smallest radius, corner or "
      "ligament "
      "a little and try again");
}

}  // namespace raiser::mesh
