#include <algorithm>
#include <array>
#include <cmath>
#include <stdexcept>

#include "solver/elasticity/load.hpp"
#include "solver/elasticity/outer_edge.hpp"

namespace raiser::solver {

namespace {

using Parity = UnitLoad::Parity;

// Uniform tractions on the outer edges, summed over all edge loads, in the
// order right, top, left, bottom.
struct EdgeTractions {
  std::array<double, 4> stress = {};
  std::array<double, 4> along = {};
};

bool is_end(Owner::Kind kind) { return kind == Owner::Kind::right || kind == Owner::Kind::left; }
bool is_side(Owner::Kind kind) { return kind == Owner::Kind::top || kind == Owner::Kind::bottom; }

// A mirror exchanges two opposite edges (`first` and first + 2) and turns the
// direction of every edge round.
Parity parity(const EdgeTractions& t, std::size_t first) {
  double size = 0.0;
  for (std::size_t i = 0; i < 4; ++i) size = std::max({size, std::abs(t.stress[i]), std::abs(t.along[i])});
  double off_even = 0.0;
  double off_odd = 0.0;
  for (std::size_t i = 0; i < 4; ++i) {
    const std::size_t image = i % 2 == first % 2 ? (i + 2) % 4 : i;
    off_even =
        std::max({off_even, std::abs(t.stress[i] - t.stress[image]), std::abs(t.along[i] + t.along[image])});
    off_odd =
        std::max({off_odd, std::abs(t.stress[i] + t.stress[image]), std::abs(t.along[i] - t.along[image])});
  }
  if (off_even <= 1e-12 * size) return Parity::even;
  if (off_odd <= 1e-12 * size) return Parity::odd;
  return Parity::neither;
}

UnitLoad edges_together(const std::vector<Load>& loads) {
  EdgeTractions sum;
  for (const Load& load : loads) {
    if (load.kind != Load::Kind::edge) continue;
    sum.stress[loaded_edge(load)] += load.stress;
    sum.along[loaded_edge(load)] += load.along;
  }
  const auto traction = [sum](const Owner& owner, const Point&, const Point& n) -> Point {
    const auto edge = edge_index(owner.kind);
    if (!edge) return Point::Zero();
    return edge_traction(sum.stress[*edge], sum.along[*edge], n);
  };
  return {"edges", traction, parity(sum, 0), parity(sum, 1)};
}

Traction traction_of(const Plate& plate, const Load& load) {
  const double s = load.stress;
  switch (load.kind) {
    case Load::Kind::tension:
      return [s](const Owner& owner, const Point&, const Point& n) -> Point {
        return (is_end(owner.kind) ? s : 0.0) * n;
      };
    case Load::Kind::transverse:
      return [s](const Owner& owner, const Point&, const Point& n) -> Point {
        return (is_side(owner.kind) ? s : 0.0) * n;
      };
    case Load::Kind::shear:
      return [s](const Owner& owner, const Point&, const Point& n) -> Point {
        const bool outer = is_end(owner.kind) || is_side(owner.kind);
        return (outer ? s : 0.0) * Point(n.y(), n.x());
      };
    case Load::Kind::bending:
      return [slope = 2.0 * s / plate.width](const Owner& owner, const Point& x, const Point& n) -> Point {
        return (is_end(owner.kind) ? slope * x.y() : 0.0) * n;
      };
    case Load::Kind::pressure:
      return [s, hole = load.hole](const Owner& owner, const Point&, const Point& n) -> Point {
        return (owner == Owner{Owner::Kind::hole, hole} ? -s : 0.0) * n;
      };
    case Load::Kind::edge:
      break;
  }
  throw std::invalid_argument("an edge load is no unit load by itself");
}

// Even where the mirror maps the pressurised hole onto itself.
Parity of_pressure(const Plate& plate, std::size_t hole, mesh::Mirrors mirror) {
  const mesh::Mirrors has = mesh::mirrors(plate);
  const bool shared = mirror.x ? has.x : has.y;
  return shared && mesh::mirror_image(plate, hole, mirror) == hole ? Parity::even : Parity::neither;
}

UnitLoad self_balanced(const Plate& plate, const Load& load) {
  UnitLoad unit{load.name.empty() ? std::string(word(load.kind)) : load.name, traction_of(plate, load),
                Parity::even, Parity::even};
  switch (load.kind) {
    case Load::Kind::bending:
      unit.under_y = Parity::odd;
      break;
    case Load::Kind::shear:
      unit.under_x = Parity::odd;
      unit.under_y = Parity::odd;
      break;
    case Load::Kind::pressure:
      unit.under_x = of_pressure(plate, load.hole, {.x = true, .y = false});
      unit.under_y = of_pressure(plate, load.hole, {.x = false, .y = true});
      break;
    default:
      break;
  }
  return unit;
}

}  // namespace

std::vector<UnitLoad> unit_loads(const Plate& plate, const std::vector<Load>& loads) {
  if (const auto fault = imbalance(plate, loads)) throw std::invalid_argument(fault->what);
  std::vector<UnitLoad> result;
  bool edges = false;
  for (const Load& load : loads) {
    edges = edges || load.kind == Load::Kind::edge;
    if (load.kind == Load::Kind::edge) continue;
    if (load.kind == Load::Kind::pressure && load.hole >= plate.holes.size())
      throw std::invalid_argument("a pressure load must name a hole of the plate");
    result.push_back(self_balanced(plate, load));
  }
  if (edges) result.push_back(edges_together(loads));
  return result;
}

}  // namespace raiser::solver
