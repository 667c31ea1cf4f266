#include "io/import/part_plate.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <numbers>

#include "io/import/curve_tools.hpp"
#include "io/import/shapes.hpp"
#include "mesh/plate/drawn.hpp"

namespace raiser::io {
namespace {

using mesh::Curve;
using mesh::Loop;
using mesh::Owner;
using mesh::Point;

std::string place(const Point& p) { return fmt::format("({:.6g}, {:.6g}) mm", p.x(), p.y()); }

/// Distance from x to a curve, from 64 chords.
double distance(const Curve& curve, const Point& x) {
  constexpr int count = 64;
  double least = std::numeric_limits<double>::infinity();
  Point before = start(curve);
  for (int k = 1; k <= count; ++k) {
    const Point here = curve.at(curve.begin + (curve.end - curve.begin) * k / count);
    const Point chord = here - before;
    const double t = std::clamp((x - before).dot(chord) / std::max(chord.squaredNorm(), 1e-300), 0.0, 1.0);
    least = std::min(least, (before + t * chord - x).norm());
    before = here;
  }
  return least;
}

/// What a place can name: an edge or arc, or a hole with all that lies in it.
struct Thing {
  Loop curves;
  bool is_hole = false;

  double distance_to(const Point& x) const {
    if (is_hole && is_inside(x, flattened(curves))) return 0.0;
    double least = std::numeric_limits<double>::infinity();
    for (const Curve& curve : curves) least = std::min(least, distance(curve, x));
    return least;
  }
};

/// Places farther than this part of the part's size from everything mean nothing.
constexpr double farthest = 0.1;
/// Distances that differ by less than this part of the size are the same.
constexpr double rounding = 1e-6;

/// Which things the places name, with what is wrong with them.
class Naming {
 public:
  Naming(const Part& part, bool is_edge, std::vector<Thing> things, std::vector<PlaceFault>& faults)
      : part_(part), is_edge_(is_edge), things_(std::move(things)), faults_(faults), names_(things_.size()) {}

  /// The names, empty where none is given.
  std::vector<std::string> settle(const std::vector<PlaceName>& given) {
    for (std::size_t i = 0; i < given.size(); ++i)
      if (const auto found = nearest(given[i].near, i)) put(given[i], *found, i);
    return names_;
  }

 private:
  void complain(std::size_t i, std::string what, std::string cure) {
    faults_.push_back({is_edge_, i, std::move(what), std::move(cure)});
  }

  std::optional<std::size_t> nearest(const Point& near, std::size_t i) {
    const std::string noun = is_edge_ ? "edge" : "hole, fillet or notch";
    const std::string all = is_edge_ ? "edges" : "holes, fillets or notches";
    const double size = part_.size.maxCoeff();
    double best = std::numeric_limits<double>::infinity();
    double second = best;
    std::size_t found = 0;
    for (std::size_t k = 0; k < things_.size(); ++k) {
      const double own = things_[k].distance_to(near - part_.centre);
      second = std::min(second, std::max(own, best));
      if (own < best) found = k;
      best = std::min(best, own);
    }
    if (!(best <= farthest * size)) {
      const Point low = part_.centre - part_.size / 2, high = part_.centre + part_.size / 2;
      complain(
          i,
          std::isfinite(best) ? fmt::format("the nearest {} is {:.4g} mm away", noun, best)
                              : fmt::format("the part has no {}", noun),
          fmt::format("give a place in the coordinates of the drawing, where the part reaches from {} to {}",
                      place(low), place(high)));
      return std::nullopt;
    }
    if (second - best <= rounding * size) {
      complain(i, fmt::format("two {} are as near to this place", all),
               is_edge_ ? "give a place near the middle of the edge" : "give a place on its edge or in it");
      return std::nullopt;
    }
    return found;
  }

  void put(const PlaceName& name, std::size_t thing, std::size_t i) {
    if (!names_[thing].empty() && names_[thing] != name.name)
      complain(i, fmt::format("what lies nearest to this place is called '{}' already", names_[thing]),
               "move one of the places nearer to what it means");
    names_[thing] = name.name;
  }

  const Part& part_;
  bool is_edge_;
  std::vector<Thing> things_;
  std::vector<PlaceFault>& faults_;
  std::vector<std::string> names_;
};

/// Names that nothing has yet: "hole 1", "hole 2", ...
class Numbering {
 public:
  explicit Numbering(std::set<std::string, std::less<>> taken) : taken_(std::move(taken)) {}
  void take(const std::vector<std::string>& names) { taken_.insert(names.begin(), names.end()); }
  /// "noun number", with the first number from `number` on that is free.
  std::string next(std::string_view noun, std::size_t number) {
    std::string name = fmt::format("{} {}", noun, number);
    while (!taken_.insert(name).second) name = fmt::format("{} {}", noun, ++number);
    return name;
  }

 private:
  std::set<std::string, std::less<>> taken_;
};

Loop from_lowest(Loop loop) {
  const auto lower = [](const Curve& a, const Curve& b) {
    const Point p = start(a), q = start(b);
    const double slack = 1e-9 * (p.norm() + q.norm());
    return std::abs(p.y() - q.y()) > slack ? p.y() < q.y() : p.x() < q.x();
  };
  std::rotate(loop.begin(), std::min_element(loop.begin(), loop.end(), lower), loop.end());
  return loop;
}

bool is_rectangle(const Loop& loop, double size) {
  if (loop.size() != 4) return false;
  return std::all_of(loop.begin(), loop.end(), [size](const Curve& c) {
    return c.kind == Curve::Kind::line && std::min(std::abs(c.u.x()), std::abs(c.u.y())) <= 1e-9 * size;
  });
}

/// A whole turn in quarters.
Loop quarters(const Loop& loop) {
  if (loop.size() != 1) return loop;
  Loop result;
  for (int k = 0; k < 4; ++k) {
    Curve piece = loop.front();
    const double step = (piece.end - piece.begin) / 4;
    piece.begin += k * step;
    piece.end = piece.begin + step;
    result.push_back(piece);
  }
  return result;
}

/// Whether a curve of the outline cuts into the material.
bool cuts_in(const Curve& curve) { return mesh::turning(curve) < -1e-6; }

mesh::Raiser raiser_of(const Curve& arc) {
  mesh::Raiser raiser;
  raiser.centre = arc.centre;
  raiser.radius = std::min(arc.radius_of_curvature(arc.begin), arc.radius_of_curvature(arc.end));
  raiser.shape =
      fmt::format("arc of {}radius {:.6g} mm, turning by {:.4g} deg", is_circular(arc) ? "" : "smallest ",
                  raiser.radius, -mesh::turning(arc) * 180 / std::numbers::pi);
  return raiser;
}

/// The chain as an outline; `names` are those of its edges and arcs, empty
/// where they have none of their own.
mesh::Outline outline_of(const Part& part, Loop loop, const std::vector<std::string>& names,
                         Numbering& numbering) {
  mesh::Outline outline;
  const bool is_box = is_rectangle(loop, part.size.maxCoeff());
  constexpr std::array<std::string_view, 4> sides{"bottom", "right", "top", "left"};
  Numbering of_edges({names.begin(), names.end()});
  std::vector<std::string> raiser_names;
  std::size_t count = 0;
  for (std::size_t k = 0; k < loop.size(); ++k) {
    if (cuts_in(loop[k])) {
      loop[k].owner = {Owner::Kind::raiser, outline.raisers.size()};
      outline.raisers.push_back(raiser_of(loop[k]));
      raiser_names.push_back(names[k]);
      continue;
    }
    ++count;
    std::string name = names[k];
    if (name.empty()) name = is_box ? std::string(sides[k]) : of_edges.next("edge", count);
    const auto known = std::find(outline.edges.begin(), outline.edges.end(), name);
    loop[k].owner = {Owner::Kind::edge, static_cast<std::size_t>(known - outline.edges.begin())};
    if (known == outline.edges.end()) outline.edges.push_back(name);
  }
  outline.curves = std::move(loop);
  mesh::tell_notches(outline);
  for (std::size_t i = 0; i < outline.raisers.size(); ++i) {
    mesh::Raiser& raiser = outline.raisers[i];
    raiser.name = raiser_names[i].empty() ? numbering.next(mesh::word(raiser.kind), i + 1) : raiser_names[i];
  }
  mesh::place_raisers(outline, part.size.x(), part.size.y());
  return outline;
}

/// Adds what keeps a hole of no common shape from having a peak.
void check_corners(const Part& part, const Loop& edge, const std::string& name,
                   std::vector<ContourFault>& faults) {
  constexpr std::size_t told_in_full = 3;
  const std::vector<Point> corners = mesh::sharp_corners(edge);
  for (std::size_t i = 0; i < std::min(corners.size(), told_in_full); ++i)
    faults.push_back({0, fmt::format("{} has a sharp corner at {}", name, place(corners[i] + part.centre)),
                      "draw the radius that it has: at a sharp corner the stress has no finite peak"});
  if (corners.size() > told_in_full)
    faults.push_back({0, fmt::format("{} has {} sharp corners more", name, corners.size() - told_in_full),
                      "draw their radii, or arcs where these are points of a smooth curve"});
}

std::vector<mesh::Hole> holes_of(const Part& part, const std::vector<std::string>& names,
                                 Numbering& numbering, std::vector<ContourFault>& faults) {
  std::vector<mesh::Hole> holes;
  for (std::size_t k = 0; k < part.inner.size(); ++k) {
    const std::string name = names[k].empty() ? numbering.next("hole", k + 1) : names[k];
    auto hole = hole_of(part.inner[k], 1e-6 * part.size.maxCoeff());
    if (hole) {
      hole->name = name;
      holes.push_back(*hole);
      continue;
    }
    const Loop edge = quarters(part.inner[k]);
    check_corners(part, edge, fmt::format("hole '{}'", name), faults);
    holes.push_back(mesh::drawn_hole(edge));
    holes.back().name = name;
  }
  return holes;
}

}  // namespace

PartPlate plate_of(const Part& part, double thickness, const std::vector<PlaceName>& edges,
                   const std::vector<PlaceName>& raisers, const std::set<std::string, std::less<>>& taken) {
  PartPlate result;
  const Loop outer = from_lowest(quarters(part.outer));
  std::vector<Thing> edge_things, raiser_things;
  for (const Loop& loop : part.inner) raiser_things.push_back({loop, true});
  for (const Curve& curve : outer) (cuts_in(curve) ? raiser_things : edge_things).push_back({{curve}, false});
  const auto edge_names = Naming(part, true, edge_things, result.misplaced).settle(edges);
  const auto raiser_names = Naming(part, false, raiser_things, result.misplaced).settle(raisers);
  Numbering numbering(taken);
  numbering.take(raiser_names);
  mesh::Plate plate{part.size.x(), part.size.y(), thickness, {}, std::nullopt};
  plate.holes = holes_of(part, raiser_names, numbering, result.faults);
  std::vector<std::string> names;  // by curve of the outline
  std::size_t edge = 0, arc = part.inner.size();
  for (const Curve& curve : outer) names.push_back(cuts_in(curve) ? raiser_names[arc++] : edge_names[edge++]);
  if (!edges.empty() || !is_rectangle(outer, part.size.maxCoeff()))
    plate.outline = outline_of(part, outer, names, numbering);
  if (result.faults.empty() && result.misplaced.empty()) result.plate = std::move(plate);
  return result;
}

}  // namespace raiser::io
