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

Traction together(const Plate& plate, const std::vector<Load>& loads) {
  std::vector<Traction> parts;
  for (const Load& load : loads)
    if (load.kind == Load::Kind::edge) parts.push_back(traction(plate, load));
  return [parts](const Owner& owner, const Point& x, const Point& n) -> Point {
    Point sum = Point::Zero();
    for (const Traction& part : parts) sum += part(owner, x, n);
    return sum;
  };
}

}  // namespace

std::vector<UnitLoad> unit_loads(const Plate& plate, const std::vector<Load>& loads) {
  if (const auto fault = imbalance(plate, loads)) throw std::invalid_argument(fault->what);
  const mesh::Region region = mesh::trace(plate);
  const mesh::Mirrors x{.x = true, .y = false};
  const mesh::Mirrors y{.x = false, .y = true};
  const Reflection under_x{region, x, mesh::mirror_image(plate, x)};
  const Reflection under_y{region, y, mesh::mirror_image(plate, y)};
  std::vector<UnitLoad> result;
  const auto put = [&](std::string name, Traction acting) {
    const Parity in_x = parity(under_x, acting);
    const Parity in_y = parity(under_y, acting);
    result.push_back({std::move(name), std::move(acting), in_x, in_y});
  };
  bool edges = false;
  for (const Load& load : loads) {
    edges = edges || load.kind == Load::Kind::edge;
    if (load.kind == Load::Kind::edge) continue;
    put(load.name.empty() ? std::string(word(load.kind)) : load.name, traction(plate, load));
  }
  if (edges) put("edges", together(plate, loads));
  return result;
}

}  // namespace raiser::solver
