#include "solver/corner/singular_place.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace raiser::solver {
namespace {

constexpr double pi = std::numbers::pi;

/// Outward normal of an edge at the vertex, from the angle at which it leaves it.
Point outward(double angle, double side) { return side * Point(-std::sin(angle), std::cos(angle)); }

/// What a pair of tractions at a vertex does.
enum class Fit { uniform, bounded, logarithmic };

/// Whether a uniform stress, or one that depends on the direction alone, has the
/// tractions `one` on the leaving and `other` on the arriving edge. The latter
/// has F = a cos 2t + b sin 2t + c + d t: its equations lose their solution for
/// unlike shear on a straight edge or a slit, and where tan w = w.
Fit fit(const mesh::Vertex& vertex, const Point& one, const Point& other) {
  const Point n1 = outward(vertex.direction, -1.0);
  const Point n2 = outward(vertex.direction + vertex.angle, 1.0);
  const double size = one.norm() + other.norm();
  const double slack = 1e-9 * size;
  const bool is_straight = std::abs(vertex.angle - pi) < mesh::least_corner;
  const bool is_uniform =
      is_straight ? (one - other).norm() <= slack : std::abs(n1.dot(other) - n2.dot(one)) <= slack;
  if (size == 0.0 || is_uniform) return Fit::uniform;
  // Shear sigma_rt on each edge, r outward from the vertex.
  const Point r1(std::cos(vertex.direction), std::sin(vertex.direction));
  const Point r2(std::cos(vertex.direction + vertex.angle), std::sin(vertex.direction + vertex.angle));
  const double shear_1 = -one.dot(r1);
  const double shear_2 = other.dot(r2);
  const double w = vertex.angle;
  const bool loses_a = std::abs(std::sin(w)) < 1e-3 && std::abs(shear_2 - shear_1) > slack;
  const bool loses_b = std::abs(std::sin(w) - w * std::cos(w)) < 1e-3;
  return loses_a || loses_b ? Fit::logarithmic : Fit::bounded;
}

/// The singular fields of a wedge; none where both edges are alike and as good as
/// straight, or free and convex.
std::vector<WedgeMode> modes_of(const Wedge& wedge, const HookeLaw& material) {
  const bool is_alike = wedge.first == wedge.second;
  if (is_alike && std::abs(wedge.angle - pi) < mesh::least_corner) return {};
  if (is_alike && wedge.first == WedgeEdge::free && wedge.angle <= pi) return {};
  return singular_modes(wedge, plane_constants(material));
}

}  // namespace

Traction sum_of(const std::vector<UnitLoad>& loads) {
  return [loads](const mesh::Owner& owner, const Point& x, const Point& n) -> Point {
    Point sum = Point::Zero();
    for (const UnitLoad& load : loads) sum += load.traction(owner, x, n);
    return sum;
  };
}

bool is_near_growth(const std::vector<SingularPlace>& places, const Point& x) {
  constexpr double share = 0.2;
  return std::any_of(places.begin(), places.end(), [&](const SingularPlace& place) {
    return place.kind != SingularPlace::Kind::jump &&
           (x - place.site.vertex.at).norm() < share * place.site.reach;
  });
}

std::vector<SingularPlace> singular_places(const mesh::Region& region, const Hold& hold,
                                           const Traction& traction, const HookeLaw& material) {
  std::vector<SingularPlace> places;
  for (const mesh::Vertex& vertex : mesh::vertices(region)) {
    const Wedge wedge{vertex.angle, hold(vertex.after.owner), hold(vertex.before.owner)};
    SingularPlace place;
    place.modes = modes_of(wedge, material);
    const bool is_alike = wedge.first == wedge.second;
    place.kind = is_alike ? SingularPlace::Kind::corner : SingularPlace::Kind::held_end;
    if (place.modes.empty()) {
      if (!is_alike || wedge.first != WedgeEdge::free) continue;
      const Point out = outward(vertex.direction, -1.0);
      const Point in = outward(vertex.direction + vertex.angle, 1.0);
      const Fit found = fit(vertex, traction(vertex.after.owner, vertex.at, out),
                            traction(vertex.before.owner, vertex.at, in));
      if (found == Fit::uniform) continue;
      place.kind = SingularPlace::Kind::jump;
      place.is_logarithmic = found == Fit::logarithmic;
    }
    if (material.orthotropy) place.modes.clear();
    place.site = {vertex, mesh::reach(region, vertex), wedge,
                  [traction, leaves = vertex.after.owner, arrives = vertex.before.owner](
                      int edge, const Point& x, const Point& n) {
                    return traction(edge == 0 ? leaves : arrives, x, n);
                  }};
    places.push_back(std::move(place));
  }
  return places;
}

}  // namespace raiser::solver
