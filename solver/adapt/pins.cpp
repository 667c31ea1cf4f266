#include "solver/adapt/pins.hpp"

#include <algorithm>
#include <cmath>

#include "mesh/legendre.hpp"
#include "solver/contact/contact.hpp"

namespace raiser::solver {
namespace {

using Parity = UnitLoad::Parity;

Pin pin_of(const Plate& plate, const Load& load) {
  const mesh::Hole& hole = plate.holes.at(load.hole);
  const double force = load.force / plate.thickness;
  Point vector = force * Point(std::cos(load.direction), std::sin(load.direction));
  // A direction along an axis is meant exactly.
  for (double& component : vector)
    if (std::abs(component) < 1e-12 * force) component = 0.0;
  return {{Owner::Kind::raiser, load.hole}, hole.centre, hole.length / 2, *load.clearance / 2, vector};
}

/// Whether plate, material, supports and loads are all unchanged by a mirror.
bool is_even(const Problem& problem, const UnitLoad& other, const std::vector<Pin>& pins,
             mesh::Mirrors mirror) {
  if (!problem.material.has_mirrors() || (mirror.x ? other.under_x : other.under_y) != Parity::even)
    return false;
  if (!mesh::mirror_image(problem.plate, mirror) || !have_mirror(problem.plate, problem.supports, mirror))
    return false;
  if (std::any_of(problem.supports.begin(), problem.supports.end(), displaces)) return false;
  return std::all_of(pins.begin(), pins.end(), [&](const Pin& pin) {
    return mesh::mirror_image(problem.plate, pin.owner.index, mirror) == pin.owner.index &&
           pin.force[mirror.x ? 0 : 1] == 0.0;
  });
}

/// How far the resultant of the pressures misses the pin's force, over its size or
/// that of the pressures where there is none.
double force_miss(const Pin& pin, const std::vector<ContactArc>& arcs) {
  static const mesh::GaussRule rule = mesh::gauss_legendre(200);
  Point sum = Point::Zero();
  double size = pin.force.norm();
  for (const ContactArc& arc : arcs) {
    const BearingPressure& pressure = arc.pressure;
    const double half = 0.5 * (pressure.end - pressure.begin);
    for (std::size_t q = 0; q < rule.points.size(); ++q) {
      // The substitution by a sine takes the root at the ends away.
      const double phi = 0.5 * std::acos(-1.0) * rule.points[q];
      const double angle = pressure.middle() + half * std::sin(phi);
      const double length = pin.radius * half * std::cos(phi) * 0.5 * std::acos(-1.0) * rule.weights[q];
      sum += length * pressure.at(angle) * Point(std::cos(angle), std::sin(angle));
      if (pin.force.isZero(0.0)) size += length * std::abs(pressure.at(angle));
    }
  }
  return (sum - pin.force).norm() / size;
}

/// What the pressure of the degree before was where it is now: of arcs, at the same
/// share of the arc, carrying the same force. The ends move as well, but what that
/// changes of the stress is only as much as the stress changes over the way.
double before_at(const BearingPressure& now, const BearingPressure& before, double angle) {
  using Form = BearingPressure::Form;
  if (now.form != Form::arc || before.form != Form::arc) return before.at(angle);
  const double way = unwound(angle, now.begin) - now.begin;
  const double ratio = (before.end - before.begin) / (now.end - now.begin);
  return way > now.end - now.begin ? 0.0 : ratio * before.at(before.begin + ratio * way);
}

/// The difference of the pressures one degree before from those now, twice: as
/// far as the bounds of contact reach. It is even under the mirror lines that the
/// pressures were found with, which rounding hides.
UnitLoad doubt_of(const std::vector<Pin>& pins, const std::vector<PinContact>& contacts,
                  const std::vector<std::size_t>& loads, mesh::Mirrors mirrors) {
  UnitLoad doubt{"doubt of contact",
                 [pins, contacts](const Owner& at, const Point& x, const Point& n) -> Point {
                   for (std::size_t p = 0; p < pins.size(); ++p) {
                     if (!(at == pins[p].owner)) continue;
                     const double angle = std::atan2(x.y() - pins[p].centre.y(), x.x() - pins[p].centre.x());
                     double sum = 0.0;
                     for (std::size_t k = 0; k < contacts[p].arcs.size(); ++k) {
                       const BearingPressure& now = contacts[p].arcs[k].pressure;
                       sum += now.at(angle) - before_at(now, contacts[p].before[k], angle);
                     }
                     return 2 * sum * n;
                   }
                   return Point::Zero();
                 }};
  doubt.under_x = mirrors.x ? Parity::even : Parity::neither;
  doubt.under_y = mirrors.y ? Parity::even : Parity::neither;
  doubt.doubt = true;
  doubt.loads = loads;
  return doubt;
}

}  // namespace

PinsInContact with_contact(const Problem& problem, double tolerance) {
  PinsInContact result{problem, {}, std::nullopt, ""};
  const Plate& plate = problem.plate;
  std::vector<std::size_t> which;
  std::vector<Pin> pins;
  std::vector<Traction> parts;
  for (std::size_t i = 0; i < problem.loads.size(); ++i) {
    const Load& load = problem.loads[i];
    if (load.kind != Load::Kind::pin || !load.clearance) {
      parts.push_back(traction(plate, load));
      continue;
    }
    which.push_back(i);
    pins.push_back(pin_of(plate, load));
  }
  if (pins.empty()) return result;
  const UnitLoad other =
      unit_load(plate, "other", [parts](const Owner& owner, const Point& x, const Point& n) {
        Point sum = Point::Zero();
        for (const Traction& part : parts) sum += part(owner, x, n);
        return sum;
      });
  const mesh::Mirrors mirrors{is_even(problem, other, pins, {.x = true, .y = false}),
                              is_even(problem, other, pins, {.x = false, .y = true})};
  const Contact contact = find_contact(plate, problem.material, other.traction, mirrors,
                                       held_edges(plate, problem.supports), pins, tolerance);
  if (!contact.found) result.reason = contact.reason;
  if (contact.pins.empty()) return result;
  for (std::size_t p = 0; p < pins.size(); ++p) {
    const std::vector<ContactArc>& arcs = contact.pins[p].arcs;
    result.problem.loads[which[p]].bearing = pressures(arcs);
    result.pins.push_back({which[p], arcs, force_miss(pins[p], arcs)});
  }
  result.doubt = doubt_of(pins, contact.pins, which, mirrors);
  return result;
}

}  // namespace raiser::solver
