#include "mesh/plate/plate.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <iterator>
#include <map>
#include <numbers>

#include "mesh/plate/crack_faults.hpp"
#include "mesh/plate/distance.hpp"
#include "mesh/plate/drawn.hpp"
#include "mesh/plate/outline_faults.hpp"

namespace raiser::mesh {

namespace {

using Faults = std::vector<PlateFault>;

// A ligament below this part of the smaller full size of the holes beside it
// is too thin to resolve. Common practice: no drawing tolerance reaches it.
constexpr double thinnest_ligament = 1e-4;

// Distances below this part of the sizes involved are rounding: a touch.
constexpr double rounding = 1e-12;
// What the mesh can resolve: smallest radius on a hole's edge over the plate's
// longer side, corner radius and straight run over a side, and the plate's
// longer over its shorter side.
constexpr double smallest_radius = 1e-8;
constexpr double smallest_corner = 1e-3;
constexpr double shortest_straight = 1e-6;
constexpr double longest_plate = 2000.0;

bool positive(double x) { return std::isfinite(x) && x > 0.0; }

std::string label(const Plate& plate, std::size_t hole) {
  const std::string& name = plate.holes[hole].name;
  return name.empty() ? fmt::format("hole {}", hole + 1) : fmt::format("hole '{}'", name);
}

double smaller_size(const Hole& hole) { return std::min(hole.length, hole.width); }

void check_plate_sizes(const Plate& plate, Faults& faults) {
  const std::array<std::pair<const char*, double>, 3> sizes = {
      {{"length", plate.length}, {"width", plate.width}, {"thickness", plate.thickness}}};
  for (const auto& [name, size] : sizes)
    if (!positive(size))
      faults.push_back({PlateFault::none, PlateFault::none,
                        fmt::format("the plate's {} is {:.10g} mm", name, size),
                        "give a finite size greater than 0"});
}

void check_slenderness(const Plate& plate, Faults& faults) {
  const double ratio = std::max(plate.length / plate.width, plate.width / plate.length);
  if (positive(plate.length) && positive(plate.width) && ratio > longest_plate)
    faults.push_back(
        {PlateFault::none, PlateFault::none,
         fmt::format("the plate's longer side is {:.4g} times its shorter one, more than {:.4g}", ratio,
                     longest_plate),
         "shorten it: a few widths beyond the holes the stress no longer depends on the length"});
}

/// Sizes that are legal one by one, but too far apart to mesh together.
void check_resolution(const Plate& plate, std::size_t i, Faults& faults) {
  const Hole& hole = plate.holes[i];
  const std::string who = label(plate, i);
  const auto report = [&](std::string what, std::string cure) {
    faults.push_back({i, PlateFault::none, std::move(what), std::move(cure)});
  };
  double radius = smaller_size(hole) / 2;
  double straight = 0.0;  // the shorter of its straight runs that are there
  if (hole.shape == HoleShape::ellipse) {
    const double larger = std::max(hole.length, hole.width) / 2;
    radius *= radius / larger;
  } else if (hole.shape == HoleShape::slot) {
    straight = hole.length - hole.width;
  } else if (hole.shape == HoleShape::drawn) {
    radius = hole.corner_radius;
  } else if (hole.shape == HoleShape::rounded_rectangle) {
    radius = hole.corner_radius;
    if (radius < smallest_corner * smaller_size(hole))
      report(fmt::format("{}: its corner radius {:.10g} mm is less than {:g} of its smaller side", who,
                         radius, smallest_corner),
             fmt::format("give at least {:.4g} mm; a sharper corner has no peak worth the name",
                         smallest_corner * smaller_size(hole)));
    const double shorter = smaller_size(hole) - 2 * radius;
    straight = shorter > rounding * hole.length ? shorter : std::max(hole.length, hole.width) - 2 * radius;
  }
  if (straight > rounding * hole.length && straight < shortest_straight * hole.length)
    report(fmt::format("{}: a straight run of {:.3g} mm is too short to resolve", who, straight),
           fmt::format("make it 0 by equal sizes, or at least {:.3g} mm", shortest_straight * hole.length));
  const double side = std::max(plate.length, plate.width);
  if (std::isfinite(side) && radius < smallest_radius * side)
    report(fmt::format("{}: the smallest radius on its edge, {:.3g} mm, is less than {:g} of the plate's "
                       "longer side",
                       who, radius, smallest_radius),
           "give a larger radius or a smaller plate");
}

void check_shape(const Plate& plate, std::size_t i, Faults& faults) {
  const Hole& hole = plate.holes[i];
  const std::string who = label(plate, i);
  const double smaller = smaller_size(hole);
  if (hole.shape == HoleShape::circle && std::abs(hole.length - hole.width) > rounding * hole.length)
    faults.push_back({i, PlateFault::none,
                      fmt::format("{} is a circle of two diameters, {:.10g} mm and {:.10g} mm", who,
                                  hole.length, hole.width),
                      "give one diameter, or make it an ellipse"});
  if (hole.shape == HoleShape::slot && hole.length < hole.width * (1.0 - rounding))
    faults.push_back(
        {i, PlateFault::none,
         fmt::format("{} is a slot of length {:.10g} mm, less than its width {:.10g} mm", who, hole.length,
                     hole.width),
         "give the overall length, ends included, or exchange the two and turn the angle by 90 deg"});
  if (hole.shape == HoleShape::drawn) {
    for (const Point& at : sharp_corners(hole.edge))
      faults.push_back({i, PlateFault::none,
                        fmt::format("{} has a sharp corner at ({:.6g}, {:.6g}) mm", who,
                                    at.x() + hole.centre.x(), at.y() + hole.centre.y()),
                        "draw the radius that it has: at a sharp corner the stress has no finite value"});
    if (hole.edge.empty())
      faults.push_back({i, PlateFault::none, fmt::format("{} is drawn without an edge", who), "draw it"});
  }
  if (hole.shape != HoleShape::rounded_rectangle) return;
  if (!positive(hole.corner_radius))
    faults.push_back({i, PlateFault::none,
                      fmt::format("{} has a corner radius of {:.10g} mm", who, hole.corner_radius),
                      "give a radius greater than 0: at a sharp corner the stress has no finite value"});
  else if (hole.corner_radius > 0.5 * smaller * (1.0 + rounding))
    faults.push_back(
        {i, PlateFault::none,
         fmt::format("{} has a corner radius of {:.10g} mm, more than half its smaller side {:.10g} mm", who,
                     hole.corner_radius, smaller),
         fmt::format("give a radius of at most {:.10g} mm", 0.5 * smaller)});
}

// True when the hole's own figures are sound, so that distances mean something.
bool check_hole(const Plate& plate, std::size_t i, Faults& faults) {
  const Hole& hole = plate.holes[i];
  const std::size_t before = faults.size();
  const std::string who = label(plate, i);
  const bool round = hole.shape == HoleShape::circle;
  const bool same_fault_twice = round && (hole.length == hole.width || std::isnan(hole.length));
  if (!positive(hole.length))
    faults.push_back(
        {i, PlateFault::none,
         fmt::format("{}: its {} is {:.10g} mm", who, round ? "diameter" : "length", hole.length),
         "give a finite size greater than 0"});
  if (!positive(hole.width) && !same_fault_twice)
    faults.push_back({i, PlateFault::none,
                      fmt::format("{}: its {} is {:.10g} mm", who, round ? "diameter" : "width", hole.width),
                      "give a finite size greater than 0"});
  if (faults.size() == before) check_shape(plate, i, faults);
  if (!hole.centre.allFinite())
    faults.push_back(
        {i, PlateFault::none,
         fmt::format("{}: its centre is ({:.10g}, {:.10g}) mm", who, hole.centre.x(), hole.centre.y()),
         "give two finite coordinates from the plate's centre"});
  if (!std::isfinite(hole.angle))
    faults.push_back({i, PlateFault::none, fmt::format("{}: its angle is {:.10g} rad", who, hole.angle),
                      "give a finite angle"});
  return faults.size() == before;
}

void check_names(const Plate& plate, Faults& faults) {
  std::map<std::string_view, std::size_t> first;
  for (std::size_t i = 0; i < plate.holes.size(); ++i) {
    if (plate.holes[i].name.empty()) continue;
    const auto [found, fresh] = first.emplace(plate.holes[i].name, i);
    if (!fresh)
      faults.push_back(
          {i, found->second,
           fmt::format("holes {} and {} are both named '{}'", found->second + 1, i + 1, plate.holes[i].name),
           "give each hole a name of its own"});
  }
}

void check_edges(const Plate& plate, std::size_t i, Faults& faults) {
  static constexpr std::array<const char*, 4> names = {"right", "top", "left", "bottom"};
  const Hole& hole = plate.holes[i];
  const std::string who = label(plate, i);
  const std::array<double, 4> distances = edge_distances(plate, hole);
  const double touch = rounding * (plate.length + plate.width + hole.centre.norm());
  const double thin = thinnest_ligament * smaller_size(hole);
  const double along = 2.0 * half_extent(hole, Point::UnitX());
  const double across = 2.0 * half_extent(hole, Point::UnitY());
  for (std::size_t k = 0; k < 4; ++k) {
    const double extent = k % 2 == 0 ? along : across;
    const double distance = distances[k];
    const auto report = [&](std::string what, std::string cure) {
      faults.push_back({i, PlateFault::none, std::move(what), std::move(cure)});
    };
    if (distance + extent <= touch)
      report(
          fmt::format("{} lies outside the plate, beyond its {} edge", who, names[k]),
          fmt::format("move its centre at least {:.6g} mm inwards; positions count from the plate's centre",
                      -distance));
    else if (distance < -touch)
      report(fmt::format("{} crosses the {} edge by {:.6g} mm", who, names[k], -distance),
             fmt::format("move it more than {:.6g} mm inwards, or make it smaller", -distance));
    else if (distance <= touch)
      report(fmt::format("{} touches the {} edge", who, names[k]), "move it inwards, or make it smaller");
    else if (distance < thin)
      report(
          fmt::format("{} leaves a ligament of {:.4g} mm to the {} edge: too thin to resolve", who, distance,
                      names[k]),
          fmt::format("leave at least {:.4g} mm ({:g} of the hole's smaller size)", thin, thinnest_ligament));
  }
}

// Whether hole `inner` lies inside `outer`. Only chooses the word for a pair
// already known to overlap: seen in 360 directions.
bool inside(const Hole& inner, const Hole& outer) {
  const Point offset = inner.centre - outer.centre;
  for (int k = 0; k < 360; ++k) {
    const double angle = k * std::numbers::pi / 180.0;
    const Point n(std::cos(angle), std::sin(angle));
    if (offset.dot(n) + half_extent(inner, n) > half_extent(outer, n) * (1.0 + rounding)) return false;
  }
  return true;
}

// `faults` are those of pairs only. Whether one lies inside the other takes long
// to find, and is left out where a thousand conflicts are known already.
void check_pair(const Plate& plate, std::size_t i, std::size_t j, Faults& faults) {
  const bool is_told = faults.size() < 1000;
  const Hole& a = plate.holes[i];
  const Hole& b = plate.holes[j];
  const double reach = 0.5 * (std::hypot(a.length, a.width) + std::hypot(b.length, b.width));
  const double thin = thinnest_ligament * std::min(smaller_size(a), smaller_size(b));
  if ((a.centre - b.centre).norm() > reach + thin) return;
  const double distance = gap(a, b);
  if (distance >= thin) return;
  const double touch = rounding * (reach + std::max(a.centre.norm(), b.centre.norm()));
  const std::string one = label(plate, i);
  const std::string other = label(plate, j);
  const std::string apart = fmt::format("move them at least {:.4g} mm further apart", thin - distance);
  std::string what;
  std::string cure = apart + ", or make one smaller";
  if (distance > touch) {
    what = fmt::format(
        "{} and {} leave a ligament of {:.4g} mm: too thin to resolve, {:.4g} mm is the least ({:g} "
        "of the smaller size)",
        one, other, distance, thin, thinnest_ligament);
  } else if (distance >= -touch) {
    what = fmt::format("{} and {} touch", one, other);
  } else if (const bool is_second = is_told && inside(b, a); is_second || (is_told && inside(a, b))) {
    what = fmt::format("{} lies inside {}", is_second ? other : one, is_second ? one : other);
    cure = "leave out one of the two, or " + apart;
  } else {
    what = fmt::format("{} and {} overlap by {:.4g} mm", one, other, -distance);
  }
  faults.push_back({i, j, std::move(what), std::move(cure)});
}

// Sweeps along x over the holes' extents, so that far pairs are never looked at.
void check_pairs(const Plate& plate, const std::vector<std::size_t>& sound, Faults& faults) {
  struct Span {
    double begin;
    double end;
    std::size_t hole;
  };
  std::vector<Span> spans;
  for (const std::size_t i : sound) {
    const Hole& hole = plate.holes[i];
    const double half = half_extent(hole, Point::UnitX()) + thinnest_ligament * smaller_size(hole);
    spans.push_back({hole.centre.x() - half, hole.centre.x() + half, i});
  }
  std::sort(spans.begin(), spans.end(), [](const Span& a, const Span& b) { return a.begin < b.begin; });
  Faults found;
  for (std::size_t k = 0; k < spans.size(); ++k)
    for (std::size_t m = k + 1; m < spans.size() && spans[m].begin <= spans[k].end; ++m)
      check_pair(plate, std::min(spans[k].hole, spans[m].hole), std::max(spans[k].hole, spans[m].hole),
                 found);
  std::sort(found.begin(), found.end(), [](const PlateFault& a, const PlateFault& b) {
    return std::pair(a.hole, a.other) < std::pair(b.hole, b.other);
  });
  faults.insert(faults.end(), std::make_move_iterator(found.begin()), std::make_move_iterator(found.end()));
}

}  // namespace

std::string_view word(HoleShape shape) {
  switch (shape) {
    case HoleShape::circle:
      return "circle";
    case HoleShape::ellipse:
      return "ellipse";
    case HoleShape::slot:
      return "slot";
    case HoleShape::rounded_rectangle:
      return "rounded rectangle";
    case HoleShape::drawn:
      return "drawn";
  }
  return "";
}

std::vector<PlateFault> faults(const Plate& plate) {
  Faults result;
  check_plate_sizes(plate, result);
  check_slenderness(plate, result);
  const bool outline = positive(plate.length) && positive(plate.width);
  const std::vector<PlateFault> of_outline =
      plate.outline && outline ? outline_faults(plate) : std::vector<PlateFault>{};
  result.insert(result.end(), of_outline.begin(), of_outline.end());
  std::vector<std::size_t> sound;
  for (std::size_t i = 0; i < plate.holes.size(); ++i) {
    if (!check_hole(plate, i, result)) continue;
    sound.push_back(i);
    check_resolution(plate, i, result);
    if (outline && !plate.outline) check_edges(plate, i, result);
    if (outline && plate.outline && of_outline.empty())
      for (PlateFault& fault : faults_at_outline(plate, i)) result.push_back(std::move(fault));
  }
  check_names(plate, result);
  check_pairs(plate, sound, result);
  if (result.empty()) result = crack_faults(plate);
  return result;
}

}  // namespace raiser::mesh
