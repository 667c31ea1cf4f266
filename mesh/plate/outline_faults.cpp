#include "mesh/plate/outline_faults.hpp"

#include <fmt/format.h>

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <numbers>
#include <string>

#include "mesh/plate/curve_distance.hpp"
#include "mesh/plate/distance.hpp"
#include "mesh/plate/section.hpp"
#include "mesh/region/region.hpp"
#include "mesh/region/vertex.hpp"

namespace raiser::mesh {

namespace {

using Faults = std::vector<PlateFault>;

constexpr double rounding = 1e-9;           // of the plate's size: places that are one
constexpr double thinnest_neck = 1e-6;      // of the plate's size
constexpr double thinnest_ligament = 1e-4;  // of a hole's smaller size
constexpr double sharpest = 0.02;           // rad: of the material, and of the room, at a corner

double size_of(const Plate& plate) { return std::max(plate.length, plate.width); }

void report(Faults& faults, std::string what, std::string cure) {
  faults.push_back({PlateFault::none, PlateFault::none, std::move(what), std::move(cure)});
}

std::string name_of(const Outline& outline, const Curve& curve) {
  if (curve.owner.kind == Owner::Kind::raiser) {
    const Raiser& raiser = outline.raisers[curve.owner.index];
    return fmt::format("{} '{}'", word(raiser.kind), raiser.name);
  }
  return fmt::format("edge '{}'", outline.edges[curve.owner.index]);
}

bool owners_exist(const Outline& outline) {
  return std::all_of(outline.curves.begin(), outline.curves.end(), [&](const Curve& curve) {
    return (curve.owner.kind == Owner::Kind::edge && curve.owner.index < outline.edges.size()) ||
           (curve.owner.kind == Owner::Kind::raiser && curve.owner.index < outline.raisers.size());
  });
}

double length_of(const Curve& curve) {
  double sum = 0.0;
  constexpr int steps = 16;
  for (int i = 0; i < steps; ++i) {
    const double step = (curve.end - curve.begin) / steps;
    sum += (curve.at(curve.begin + (i + 1) * step) - curve.at(curve.begin + i * step)).norm();
  }
  return sum;
}

bool is_finite(const Curve& curve) {
  return curve.centre.allFinite() && curve.u.allFinite() && curve.v.allFinite() &&
         std::isfinite(curve.begin) && std::isfinite(curve.end);
}

/// Closed, of finite pieces, anticlockwise.
bool is_chain(const Plate& plate, Faults& faults) {
  const Loop& loop = plate.outline->curves;
  if (loop.size() < 2 || !owners_exist(*plate.outline) || !std::all_of(loop.begin(), loop.end(), is_finite)) {
    report(faults, "the outline is not a chain of finite pieces that belong to its edges and raisers",
           "build it anew");
    return false;
  }
  const std::size_t before = faults.size();
  double area = 0.0;
  for (std::size_t i = 0; i < loop.size(); ++i) {
    const Curve& next = loop[(i + 1) % loop.size()];
    const double gap = (next.start() - loop[i].finish()).norm();
    if (gap > rounding * size_of(plate))
      report(faults,
             fmt::format("the outline has a gap of {:.4g} mm between {} and {}", gap,
                         name_of(*plate.outline, loop[i]), name_of(*plate.outline, next)),
             "let each piece start where the one before ends");
    if (!(length_of(loop[i]) > rounding * size_of(plate)))
      report(faults, fmt::format("a piece of {} has no length", name_of(*plate.outline, loop[i])),
             "leave it out");
    for (int k = 0; k < 8; ++k) {
      const double step = (loop[i].end - loop[i].begin) / 8;
      const Point a = loop[i].at(loop[i].begin + k * step);
      const Point b = loop[i].at(loop[i].begin + (k + 1) * step);
      area += a.x() * b.y() - a.y() * b.x();
    }
  }
  if (faults.size() == before && !(area > 0.0))
    report(faults, "the outline runs clockwise or encloses nothing",
           "run it anticlockwise, without crossing itself");
  return faults.size() == before;
}

void check_box(const Plate& plate, Faults& faults) {
  Eigen::AlignedBox2d box;
  for (const Curve& curve : plate.outline->curves) {
    box.extend(curve.start());
    for (int axis = 0; axis < 2; ++axis)
      for (const double t : extremes(curve, axis)) box.extend(curve.at(t));
  }
  const Point half(plate.length / 2, plate.width / 2);
  if ((box.max() - half).cwiseAbs().maxCoeff() > rounding * size_of(plate) ||
      (box.min() + half).cwiseAbs().maxCoeff() > rounding * size_of(plate))
    report(faults,
           fmt::format("the outline reaches from ({:.6g}, {:.6g}) to ({:.6g}, {:.6g}) mm, not over the "
                       "plate's length and width about the origin",
                       box.min().x(), box.min().y(), box.max().x(), box.max().y()),
           "give the size of its bounding box, centred");
}

/// Two pieces that follow each other: the corner between them, and whether they
/// meet a second time. In a chain of two they do, at its other joint.
void check_corner(const Plate& plate, const Curve& a, const Curve& b, Faults& faults) {
  const Outline& outline = *plate.outline;
  const double angle = angle_between(a, b);
  const Point at = b.start();
  if (angle < sharpest || angle > 2 * std::numbers::pi - sharpest) {
    report(faults,
           fmt::format("the corner of {} and {} at ({:.6g}, {:.6g}) mm is too pointed to resolve",
                       name_of(outline, a), name_of(outline, b), at.x(), at.y()),
           "open it by a few degrees");
    return;
  }
  if (a.kind == Curve::Kind::line && b.kind == Curve::Kind::line) return;
  const double at_other = outline.curves.size() == 2 ? 0.1 : 0.0;
  const double step_a = a.end - a.begin, step_b = b.end - b.begin;
  const Curve first = part(a, a.begin + at_other * step_a, a.end - 0.1 * step_a);
  const Curve second = part(b, b.begin + 0.1 * step_b, b.end - at_other * step_b);
  const double touch = rounding * size_of(plate);
  if (distance(first, b, 2 * touch) < touch || distance(a, second, 2 * touch) < touch)
    report(faults, fmt::format("{} and {} cross", name_of(outline, a), name_of(outline, b)),
           "draw the outline so that it does not cross itself");
}

/// Length of the shorter way along the chain between two of its pieces.
double way_between(const std::vector<double>& reached, std::size_t i, std::size_t k) {
  const double inner = reached[k] - reached[i + 1];
  const double outer = reached.back() - reached[k + 1] + reached[i];
  return std::min(inner, outer);
}

void check_pair(const Plate& plate, const Curve& a, const Curve& b, double thin, Faults& faults) {
  const double gap = distance(a, b, thin);
  if (gap >= thin) return;
  const std::string one = name_of(*plate.outline, a);
  const std::string other = name_of(*plate.outline, b);
  if (gap < rounding * size_of(plate))
    report(faults, fmt::format("{} and {} touch or cross", one, other),
           "move them apart or make one smaller");
  else
    report(faults, fmt::format("{} and {} leave a neck of {:.4g} mm: too thin to resolve", one, other, gap),
           fmt::format("leave at least {:.4g} mm", thin));
}

void check_crossings(const Plate& plate, Faults& faults) {
  constexpr std::size_t most = 20;
  const Loop& loop = plate.outline->curves;
  const std::size_t n = loop.size();
  std::vector<double> reached{0.0};
  for (const Curve& curve : loop) reached.push_back(reached.back() + length_of(curve));
  for (std::size_t i = 0; i < n && faults.size() < most; ++i) {
    check_corner(plate, loop[i], loop[(i + 1) % n], faults);
    for (std::size_t k = i + 2; k < n && faults.size() < most; ++k) {
      if (i == 0 && k == n - 1) continue;
      const double way = way_between(reached, i, k);
      check_pair(plate, loop[i], loop[k], std::min(thinnest_neck * size_of(plate), 0.1 * way), faults);
    }
  }
}

bool holds(const Plate& plate, const Point& x) {
  Plate bare = plate;
  bare.holes.clear();
  for (const Interval& piece : material_along(bare, Direction::across, x.x()))
    if (piece.begin < x.y() && x.y() < piece.end) return true;
  return false;
}

}  // namespace

Faults outline_faults(const Plate& plate) {
  Faults faults;
  if (!plate.outline || !is_chain(plate, faults)) return faults;
  check_crossings(plate, faults);
  const auto same = [](const PlateFault& a, const PlateFault& b) { return a.what == b.what; };
  faults.erase(std::unique(faults.begin(), faults.end(), same), faults.end());
  if (faults.empty()) check_box(plate, faults);
  return faults;
}

Faults faults_at_outline(const Plate& plate, std::size_t hole) {
  Plate own = plate;
  own.holes = {plate.holes[hole]};
  const Hole& shape = own.holes.front();
  const double smaller = std::min(shape.length, shape.width);
  const double thin = thinnest_ligament * smaller;
  const Region region = trace(own);
  const std::string who =
      shape.name.empty() ? fmt::format("hole {}", hole + 1) : fmt::format("hole '{}'", shape.name);
  double nearest = thin;
  const Curve* at = nullptr;
  for (const Curve& edge : region.loops[0])
    for (const Curve& curve : region.loops[1]) {
      const double gap = distance(curve, edge, nearest);
      if (gap >= nearest) continue;
      nearest = gap;
      at = &edge;
    }
  const auto fault = [hole](std::string what, std::string cure) {
    return PlateFault{hole, PlateFault::none, std::move(what), std::move(cure)};
  };
  if (at != nullptr) {
    Curve named = *at;  // trace() counts the holes first
    if (named.owner.kind == Owner::Kind::raiser) named.owner.index -= 1;
    const std::string other = name_of(*plate.outline, named);
    if (nearest < rounding * size_of(plate))
      return {
          fault(fmt::format("{} touches or crosses {}", who, other), "move it inwards, or make it smaller")};
    return {fault(
        fmt::format("{} leaves a ligament of {:.4g} mm to {}: too thin to resolve", who, nearest, other),
        fmt::format("leave at least {:.4g} mm", thin))};
  }
  // The middle of a drawn hole need not lie in it, its edge does.
  if (!holds(plate, region.loops[1].front().start()))
    return {fault(fmt::format("{} lies outside the plate", who), "move its centre inside the outline")};
  return {};
}

}  // namespace raiser::mesh
