#include "solver/growth/notch_limits.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

#include "mesh/plate/distance.hpp"
#include "mesh/region/region.hpp"
#include "solver/extract/section.hpp"

namespace raiser::solver {
namespace {

constexpr double edge_crack = 1.1215;

/// The curve of the plate without cracks that a point lies on.
struct Place {
  const mesh::Curve* curve = nullptr;
  mesh::Nearest at;
};

Place place_of(const mesh::Region& bare, const Point& x) {
  Place best{&bare.loops.front().front(), {0.0, std::numeric_limits<double>::infinity()}};
  for (const mesh::Loop& loop : bare.loops)
    for (const mesh::Curve& curve : loop)
      if (const mesh::Nearest found = mesh::nearest(curve, x); found.distance < best.at.distance)
        best = {&curve, found};
  return best;
}

/// The edge stress at a point between the samples: the cubic through the nearest
/// four. Where two of them stand at one place (on a mirror line) one counts.
Estimate stress_at(std::vector<EdgeSample> samples, const Point& x) {
  std::sort(samples.begin(), samples.end(), [&x](const EdgeSample& a, const EdgeSample& b) {
    return (a.point - x).squaredNorm() < (b.point - x).squaredNorm();
  });
  std::vector<EdgeSample> near;
  const double apart = 1e-6 * (samples.back().point - samples.front().point).norm();
  for (const EdgeSample& sample : samples) {
    const auto same = [&](const EdgeSample& other) { return (other.point - sample.point).norm() < apart; };
    if (near.size() < 4 && std::none_of(near.begin(), near.end(), same)) near.push_back(sample);
  }
  const Point along = (near.at(1).point - near.at(0).point).normalized();
  Estimate sum{0.0, 0.0};
  for (std::size_t i = 0; i < near.size(); ++i) {
    double weight = 1.0;
    for (std::size_t k = 0; k < near.size(); ++k)
      if (k != i) weight *= (x - near[k].point).dot(along) / (near[i].point - near[k].point).dot(along);
    sum.value += weight * near[i].tangential;
    sum.bound = std::max(sum.bound, near[i].bound);
  }
  return sum;
}

/// Another crack from the same raiser in the opposite direction.
bool has_opposite(const Plate& plate, const mesh::Region& bare, std::size_t crack, std::size_t raiser) {
  const auto direction = [&](std::size_t c) -> Point {
    return (plate.cracks[c].points[1] - plate.cracks[c].points[0]).normalized();
  };
  for (std::size_t c = 0; c < plate.cracks.size(); ++c) {
    if (c == crack || !plate.cracks[c].has_mouth) continue;
    const Owner owner = place_of(bare, plate.cracks[c].points.front()).curve->owner;
    if (owner == Owner{Owner::Kind::raiser, raiser} && direction(c).dot(direction(crack)) < -0.99)
      return true;
  }
  return false;
}

void set_long_crack(const Plate& plate, const mesh::Region& bare, std::size_t crack, NotchLimits& limits) {
  const std::vector<Point>& points = plate.cracks[crack].points;
  if (limits.raiser < plate.holes.size()) {
    const double half = mesh::half_extent(plate.holes[limits.raiser], (points[1] - points[0]).normalized());
    const bool is_pair = has_opposite(plate, bare, crack, limits.raiser);
    limits.depth = is_pair ? half : 2 * half;
    limits.long_factor = is_pair ? 1.0 : 1.0 / std::numbers::sqrt2;
    limits.long_definition = is_pair ? "hole and both cracks as one crack in an infinite plate"
                                     : "hole and crack as one crack in an infinite plate";
    return;
  }
  limits.depth = std::numeric_limits<double>::infinity();
  const mesh::Outline outline = mesh::outline_of(plate);
  for (const mesh::Curve& curve : outline.gross())
    limits.depth = std::min(limits.depth, mesh::nearest(curve, points.front()).distance);
  limits.long_factor = edge_crack;
  limits.long_definition = "notch and crack as one edge crack in a half plane";
}

/// The problem without cracks and what acts on them.
Problem without_cracks(const Problem& problem) {
  Problem result = problem;
  result.plate.cracks.clear();
  std::erase_if(result.loads, [](const Load& load) { return load.kind == Load::Kind::face_pressure; });
  return result;
}

}  // namespace

double NotchLimits::short_crack(double a) const {
  return edge_crack * edge_stress.value * std::sqrt(std::numbers::pi * a);
}

double NotchLimits::long_crack(double a) const {
  return long_factor * nominal * std::sqrt(std::numbers::pi * (depth + a));
}

std::optional<double> NotchLimits::between(double a) const {
  if (!(a <= 0.5 * root_radius)) return std::nullopt;
  return short_crack(a) / std::sqrt(1.0 + 4.5 * a / root_radius);
}

std::optional<double> NotchLimits::transition() const {
  const double ratio = edge_crack * kt() / long_factor;
  if (!(ratio > 1.0)) return std::nullopt;
  return depth / (ratio * ratio - 1.0);
}

NotchReading notch_limits(const Problem& problem, std::size_t crack, double tolerance) {
  const mesh::Crack& own = problem.plate.cracks.at(crack);
  if (!own.has_mouth) return {std::nullopt, "the crack opens at no edge"};
  const Problem bare = without_cracks(problem);
  const mesh::Region region = mesh::trace(bare.plate);
  const Place place = place_of(region, own.points.front());
  if (place.curve->owner.kind != Owner::Kind::raiser)
    return {std::nullopt, "the crack's mouth lies on a plain edge, not on a hole or notch"};
  if (bare.loads.empty()) return {std::nullopt, "nothing but pressure on crack faces acts on the plate"};
  const Basis gross = gross_nominal(bare.plate, bare.loads, own.points.front());
  if (!gross.why.empty()) return {std::nullopt, gross.why};

  NotchLimits limits;
  limits.raiser = place.curve->owner.index;
  limits.nominal = gross.stress;
  limits.definition = gross.definition;
  limits.root_radius = place.curve->radius_of_curvature(place.at.parameter);
  set_long_crack(problem.plate, region, crack, limits);
  const Solution solution = settle(bare, {{Quantity::largest_edge_stress, limits.raiser, tolerance, ""}});
  if (solution.status != Solution::Status::settled)
    return {std::nullopt, "the plate without cracks was not settled: " + solution.reason};
  limits.edge_stress = stress_at(solution.edges.at(limits.raiser), own.points.front());
  return {limits, ""};
}

}  // namespace raiser::solver
