#include <algorithm>
#include <array>
#include <cmath>
#include <optional>
#include <stdexcept>

#include "solver/elasticity/load.hpp"

namespace raiser::solver {

namespace {

using Parity = UnitLoad::Parity;

// The plate's boundary and what a mirror makes of it.
struct Reflection {
  const mesh::Region& region;
  mesh::Mirrors mirror;
  std::optional<mesh::MirrorImage> image;

  Point of(const Point& x) const { return {mirror.x ? -x.x() : x.x(), mirror.y ? -x.y() : x.y()}; }
};

// Compares the traction on every curve with that on its mirror image.
Parity parity(const Reflection& reflection, const Traction& traction) {
  if (!reflection.image) return Parity::neither;
  constexpr std::array shares = {0.1, 0.45, 0.8};
  double size = 0.0;
  double off_even = 0.0;
  double off_odd = 0.0;
  std::vector<mesh::Loop> boundary = reflection.region.loops;
  for (const mesh::Slit& slit : reflection.region.slits)
    for (std::size_t k = 1; k < slit.points.size(); ++k)
      boundary.push_back({mesh::line(slit.points[k - 1], slit.points[k], {Owner::Kind::crack, slit.crack})});
  for (const mesh::Loop& loop : boundary)
    for (const mesh::Curve& curve : loop) {
      const Owner image = reflection.image->of(curve.owner);
      for (const double share : shares) {
        const double t = curve.begin + share * (curve.end - curve.begin);
        const Point x = curve.at(t);
        const Point n = mesh::outward(curve, t);
        const Point here = reflection.of(traction(curve.owner, x, n));
        const Point there = traction(image, reflection.of(x), reflection.of(n));
        size = std::max(size, here.norm());
        off_even = std::max(off_even, (here - there).norm());
        off_odd = std::max(off_odd, (here + there).norm());
      }
    }
  constexpr double tolerance = 1e-11;
  if (off_even <= tolerance * size) return Parity::even;
  if (off_odd <= tolerance * size) return Parity::odd;
  return Parity::neither;
}

Traction together(const Plate& plate, const std::vector<Load>& loads, const std::vector<std::size_t>& which) {
  std::vector<Traction> parts;
  for (const std::size_t i : which) parts.push_back(traction(plate, loads[i]));
  return [parts](const Owner& owner, const Point& x, const Point& n) -> Point {
    Point sum = Point::Zero();
    for (const Traction& part : parts) sum += part(owner, x, n);
    return sum;
  };
}

// Compares the places where edges are held with their mirror images.
Parity parity(const Plate& plate, const std::vector<Support>& supports, mesh::Mirrors mirror) {
  if (!have_mirror(plate, supports, mirror)) return Parity::neither;
  const auto image = mesh::mirror_image(plate, mirror);
  bool even = true, odd = true;
  for (const Support& support : supports)
    for (const Support& other : supports) {
      if (other.edge != image->edges[support.edge]) continue;
      const double normal = support.normal.value_or(0.0), normal_there = other.normal.value_or(0.0);
      const double along = support.along.value_or(0.0), along_there = other.along.value_or(0.0);
      even = even && normal == normal_there && along == -along_there;
      odd = odd && normal == -normal_there && along == along_there;
    }
  return even ? Parity::even : odd ? Parity::odd : Parity::neither;
}

std::string joint_name(const std::vector<Load>& loads, const std::vector<std::size_t>& joint) {
  bool edges = false, pins = false;
  for (const std::size_t i : joint) (loads[i].kind == Load::Kind::edge ? edges : pins) = true;
  return edges && pins ? "edges and pins" : edges ? "edges" : "pins";
}

}  // namespace

UnitLoad unit_load(const Plate& plate, std::string name, Traction traction) {
  const mesh::Region region = mesh::trace(plate);
  const auto behaviour = [&](mesh::Mirrors mirror) {
    return parity({region, mirror, mesh::mirror_image(plate, mirror)}, traction);
  };
  const Parity under_x = behaviour({.x = true, .y = false});
  const Parity under_y = behaviour({.x = false, .y = true});
  return {std::move(name), std::move(traction), under_x, under_y};
}

std::vector<UnitLoad> unit_loads(const Plate& plate, const std::vector<Load>& loads,
                                 const std::vector<Support>& supports) {
  if (const auto fault = imbalance(plate, loads, supports)) throw std::invalid_argument(fault->what);
  const double size = 0.5 * std::max(plate.length, plate.width);
  const bool all_held = takes_up(plate, supports, size).size() == 3;
  std::vector<UnitLoad> result;
  std::vector<std::size_t> joint;
  const auto put = [&](std::string name, std::vector<std::size_t> which) {
    result.push_back(unit_load(plate, std::move(name), together(plate, loads, which)));
    result.back().loads = std::move(which);
  };
  for (std::size_t i = 0; i < loads.size(); ++i)
    if (needs_balance(loads[i]) && !all_held)
      joint.push_back(i);
    else
      put(loads[i].name.empty() ? std::string(word(loads[i].kind)) : loads[i].name, {i});
  if (!joint.empty()) put(joint_name(loads, joint), joint);
  if (std::any_of(supports.begin(), supports.end(), displaces)) {
    UnitLoad unit{"supports",
                  [](const Owner&, const Point&, const Point&) -> Point { return Point::Zero(); }};
    unit.under_x = parity(plate, supports, {.x = true, .y = false});
    unit.under_y = parity(plate, supports, {.x = false, .y = true});
    unit.displaces = true;
    result.push_back(std::move(unit));
  }
  return result;
}

}  // namespace raiser::solver
