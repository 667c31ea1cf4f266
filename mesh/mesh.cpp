#include "mesh/mesh.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <stdexcept>
#include <unordered_map>

#include "mesh/legendre.hpp"

namespace raiser::mesh {
namespace {

/// Derivatives of the barycentric coordinates l0 = 1 - r - s, l1 = r, l2 = s.
constexpr double slope_r[3] = {-1.0, 1.0, 0.0};
constexpr double slope_s[3] = {-1.0, 0.0, 1.0};

double coordinate(const Point& reference, int k) {
  return k == 0 ? 1.0 - reference.x() - reference.y() : reference[k - 1];
}

/// Points of the reference triangle in rows, n + 1 along each side.
std::vector<Point> lattice(int n) {
  std::vector<Point> points;
  for (int i = 0; i <= n; ++i)
    for (int j = 0; i + j <= n; ++j)
      points.emplace_back(static_cast<double>(i) / n, static_cast<double>(j) / n);
  return points;
}

}  // namespace

Mesh::Mesh(std::vector<Point> points, std::vector<Triangle> triangles, std::vector<BoundarySide> boundary,
           int geometry_degree, std::vector<TipFan> fans)
    : points_(std::move(points)),
      triangles_(std::move(triangles)),
      boundary_(std::move(boundary)),
      fans_(std::move(fans)) {
  if (geometry_degree < 0) throw std::invalid_argument("Mesh: the geometry degree must not be negative");
  number_edges();
  std::vector<std::vector<const BoundarySide*>> curved(triangles_.size());
  for (const BoundarySide& side : boundary_)
    if (side.curve.kind == Curve::Kind::arc && geometry_degree != 1) curved[side.triangle].push_back(&side);
  first_bubble_.push_back(0);
  for (const auto& sides : curved) {
    for (const BoundarySide* side : sides) bubbles_.push_back(bubble(*side, geometry_degree));
    first_bubble_.push_back(static_cast<int>(bubbles_.size()));
  }
}

void Mesh::number_edges() {
  std::unordered_map<long long, int> known;
  known.reserve(2 * triangles_.size());
  std::vector<int> uses;
  triangle_edges_.resize(triangles_.size());
  for (std::size_t t = 0; t < triangles_.size(); ++t)
    for (int k = 0; k < 3; ++k) {
      const auto [low, high] = std::minmax(triangles_[t][k], triangles_[t][(k + 1) % 3]);
      const long long key = static_cast<long long>(low) * static_cast<long long>(points_.size()) + high;
      const auto [entry, is_new] = known.try_emplace(key, static_cast<int>(edges_.size()));
      if (is_new) {
        edges_.push_back({low, high});
        uses.push_back(0);
      }
      ++uses[entry->second];
      triangle_edges_[t][k] = entry->second;
    }
  for (const BoundarySide& side : boundary_) ++uses[triangle_edges_[side.triangle][side.side]];
  if (std::any_of(uses.begin(), uses.end(), [](int n) { return n != 2; }))
    throw std::invalid_argument(
        "Mesh: some edge is neither shared by two triangles nor on the boundary once");
}

Mesh::Bubble Mesh::bubble(const BoundarySide& side, int geometry_degree) {
  static const GaussRule full = gauss_legendre(max_terms);
  const bool is_exact = geometry_degree == exact;
  const int terms = is_exact ? max_terms : std::min(geometry_degree - 1, max_terms);
  const GaussRule& rule = is_exact ? full : gauss_legendre(terms);
  const Point a = side.curve.at(side.curve.begin);
  const Point b = side.curve.at(side.curve.end);
  Bubble result{side.side, terms, {}};
  result.coefficients.fill(Point::Zero());
  double size = 0.0;
  for (int q = 0; q < terms; ++q) {
    const double s = rule.points[q];
    const Point chord = (a * (1 - s) + b * (1 + s)) / 2;
    const Point g = (side.curve.at(side.parameter(s)) - chord) / (1 - s * s);
    double value[max_terms], slope[max_terms];
    legendre(terms - 1, s, value, slope);
    for (int j = 0; j < terms; ++j) result.coefficients[j] += (j + 0.5) * rule.weights[q] * value[j] * g;
    size = std::max(size, g.norm());
  }
  if (is_exact)
    while (result.terms > 1 &&
           result.coefficients[result.terms - 1].norm() < 1e-16 * (b - a).norm() + 1e-15 * size)
      --result.terms;
  return result;
}

MapTable::Side::Side(const Point& reference, int a) {
  const int b = (a + 1) % 3;
  const double la = coordinate(reference, a);
  const double lb = coordinate(reference, b);
  weight = 4 * la * lb;
  weight_r = 4 * (slope_r[a] * lb + la * slope_r[b]);
  weight_s = 4 * (slope_s[a] * lb + la * slope_s[b]);
  along_r = slope_r[b] - slope_r[a];
  along_s = slope_s[b] - slope_s[a];
  legendre(Mesh::max_terms - 1, lb - la, value.data(), slope.data());
}

void MapTable::Side::add(std::span<const Point> coefficients, MapPoint& out) const {
  Point g = Point::Zero();
  Point dg = Point::Zero();
  for (std::size_t j = 0; j < coefficients.size(); ++j) {
    g += value[j] * coefficients[j];
    dg += slope[j] * coefficients[j];
  }
  out.x += weight * g;
  out.jacobian.col(0) += weight_r * g + weight * along_r * dg;
  out.jacobian.col(1) += weight_s * g + weight * along_s * dg;
}

MapPoint Mesh::linear_map(int triangle, const Point& reference) const {
  const Triangle& vertices = triangles_[triangle];
  const Point origin = points_[vertices[0]];
  MapPoint result;
  result.jacobian << points_[vertices[1]] - origin, points_[vertices[2]] - origin;
  result.x = origin + result.jacobian * reference;
  return result;
}

MapPoint Mesh::map(int triangle, const Point& reference) const {
  MapPoint result = linear_map(triangle, reference);
  for (int k = first_bubble_[triangle]; k < first_bubble_[triangle + 1]; ++k)
    MapTable::Side(reference, bubbles_[k].side).add(bubbles_[k].series(), result);
  return result;
}

MapTable::MapTable(std::span<const Point> reference) : reference_(reference.begin(), reference.end()) {
  for (const Point& point : reference_) sides_.push_back({Side(point, 0), Side(point, 1), Side(point, 2)});
}

void MapTable::evaluate(const Mesh& mesh, int triangle, std::span<MapPoint> out) const {
  for (std::size_t i = 0; i < reference_.size(); ++i) out[i] = mesh.linear_map(triangle, reference_[i]);
  for (int k = mesh.first_bubble_[triangle]; k < mesh.first_bubble_[triangle + 1]; ++k)
    for (std::size_t i = 0; i < reference_.size(); ++i)
      sides_[i][mesh.bubbles_[k].side].add(mesh.bubbles_[k].series(), out[i]);
}

std::vector<int> inverted_triangles(const Mesh& mesh) {
  static const MapTable table(lattice(8));
  std::vector<MapPoint> values(table.size());
  std::vector<int> bad;
  for (int t = 0; t < static_cast<int>(mesh.triangles().size()); ++t) {
    const auto& corner = mesh.triangles()[t];
    const Point a = mesh.points()[corner[1]] - mesh.points()[corner[0]];
    const Point b = mesh.points()[corner[2]] - mesh.points()[corner[0]];
    const double longest = std::max({a.squaredNorm(), b.squaredNorm(), (b - a).squaredNorm()});
    // A curved triangle must keep a part of its straight area everywhere.
    double least = (a.x() * b.y() - a.y() * b.x()) / longest;
    if (mesh.is_curved(t)) {
      table.evaluate(mesh, t, values);
      for (const MapPoint& value : values) least = std::min(least, value.jacobian.determinant() / longest);
    }
    if (!(least > 0.02)) bad.push_back(t);
  }
  return bad;
}

}  // namespace raiser::mesh
