#pragma once

#include <Eigen/Core>
#include <array>
#include <span>
#include <vector>

#include "mesh/region/region.hpp"

namespace raiser::mesh {

/// A side of a triangle on the boundary. Side k joins the triangle's vertices
/// k and k + 1 (modulo 3), which follow the curve from `begin` to `end`.
struct BoundarySide {
  int triangle = 0;
  int side = 0;
  Curve curve;  ///< with begin and end at this side's vertices

  /// The curve's parameter at s in [-1, 1] along the side.
  double parameter(double s) const { return (curve.begin * (1 - s) + curve.end * (1 + s)) / 2; }
};

/// Rings of straight triangles about a crack tip, graded geometrically into it;
/// half a disc where the crack lies on a mirror line.
struct TipFan {
  std::size_t tip = 0;  ///< index into tips(Plate::cracks)
  Point at = Point::Zero();
  Point direction = Point::UnitX();  ///< unit vector out of the crack
  bool is_half = false;
  std::vector<double> radii;            ///< mm, of the rings' outer corners; falling
  std::vector<std::vector<int>> rings;  ///< triangles of each ring; the last holds those at the tip
};

/// Position and Jacobian of the map from the reference triangle
/// (r, s >= 0, r + s <= 1) to the plate at one point.
struct MapPoint {
  Point x = Point::Zero();
  Eigen::Matrix2d jacobian = Eigen::Matrix2d::Zero();  ///< columns dx/dr, dx/ds
};

/// Curved triangles that follow the boundary curves to rounding.
///
/// A triangle's map is linear plus, for each side on a curve, the bubble
/// 4 la lb g(lb - la): la and lb are the barycentric coordinates of the side's
/// ends and g is the Legendre series of (curve - chord) / (1 - s^2). On the
/// side itself the map is the curve. Source: blending functions, B. Szabo and
/// I. Babuska, Finite Element Analysis (1991), section 6.1.
///
/// Immutable. Triangles run anticlockwise.
class Mesh {
 public:
  using Triangle = std::array<int, 3>;
  static constexpr int exact = 0;

  /// A mesh without triangles.
  Mesh() = default;

  /// `geometry_degree` is the polynomial degree of the curved sides (at least
  /// 1, straight), or `exact`. Throws std::invalid_argument when the
  /// triangles are not a conforming mesh bounded by the given sides.
  Mesh(std::vector<Point> points, std::vector<Triangle> triangles, std::vector<BoundarySide> boundary,
       int geometry_degree = exact, std::vector<TipFan> fans = {});

  const std::vector<Point>& points() const { return points_; }
  const std::vector<Triangle>& triangles() const { return triangles_; }
  const std::vector<BoundarySide>& boundary() const { return boundary_; }
  /// One for each crack tip in the meshed part of the plate.
  const std::vector<TipFan>& fans() const { return fans_; }

  /// Edges as pairs of vertices, the smaller first.
  const std::vector<std::array<int, 2>>& edges() const { return edges_; }
  /// Edge on side k of a triangle.
  int edge(int triangle, int side) const { return triangle_edges_[triangle][side]; }

  bool is_curved(int triangle) const { return first_bubble_[triangle] != first_bubble_[triangle + 1]; }

  MapPoint map(int triangle, const Point& reference) const;

  /// The same mesh with other boundary curves' degree.
  Mesh with_geometry_degree(int degree) const { return {points_, triangles_, boundary_, degree, fans_}; }

 private:
  friend class MapTable;
  static constexpr int max_terms = 16;
  struct Bubble {
    int side = 0;
    int terms = 0;
    std::array<Point, max_terms> coefficients;
    std::span<const Point> series() const { return {coefficients.data(), static_cast<std::size_t>(terms)}; }
  };
  MapPoint linear_map(int triangle, const Point& reference) const;
  static Bubble bubble(const BoundarySide& side, int geometry_degree);
  void number_edges();

  std::vector<Point> points_;
  std::vector<Triangle> triangles_;
  std::vector<BoundarySide> boundary_;
  std::vector<TipFan> fans_;
  std::vector<std::array<int, 2>> edges_;
  std::vector<std::array<int, 3>> triangle_edges_;
  std::vector<int> first_bubble_;  ///< by triangle, into bubbles_; one more at the end
  std::vector<Bubble> bubbles_;
};

/// The maps of many triangles at the same reference points.
class MapTable {
 public:
  explicit MapTable(std::span<const Point> reference);
  std::size_t size() const { return reference_.size(); }
  /// Fills `out`, of size size(), for one triangle.
  void evaluate(const Mesh& mesh, int triangle, std::span<MapPoint> out) const;

 private:
  friend class Mesh;
  /// Factors of a side's bubble at one point.
  struct Side {
    Side(const Point& reference, int side);
    void add(std::span<const Point> coefficients, MapPoint& out) const;
    double weight, weight_r, weight_s;  ///< 4 la lb and its derivatives
    double along_r, along_s;            ///< derivatives of lb - la
    std::array<double, Mesh::max_terms> value, slope;
  };
  std::vector<Point> reference_;
  std::vector<std::array<Side, 3>> sides_;
};

/// Indices of the triangles whose Jacobian is not positive at some point of a
/// lattice that includes corners and sides, or that have no area.
std::vector<int> inverted_triangles(const Mesh& mesh);

}  // namespace raiser::mesh
