#include <algorithm>
#include <cmath>

#include "solver/elasticity/nominal_state.hpp"
#include "solver/elasticity/outer_edge.hpp"

namespace raiser::solver {

namespace {

// Stress times area for the loads that act on the whole of a rectangle.
SectionForces of_uniform(const Plate& plate, const Load& load, bool across) {
  const double area = plate.thickness * (across ? plate.width : plate.length);
  switch (load.kind) {
    case Load::Kind::tension:
      return {across ? load.stress * area : 0.0, 0.0, 0.0};
    case Load::Kind::transverse:
      return {across ? 0.0 : load.stress * area, 0.0, 0.0};
    case Load::Kind::shear:
      return {0.0, load.stress * area, 0.0};
    case Load::Kind::bending:
      return {0.0, 0.0, across ? load.stress * area * plate.width / 6.0 : 0.0};
    default:
      return {};
  }
}

// What the load's traction on the part of the plate beyond the section adds up to.
SectionForces of_traction(const Plate& plate, const Load& load, const mesh::Loop& outside,
                          const Point& middle, bool across) {
  const Resultant sum = integrate(outside, plate.thickness, traction(plate, load), middle);
  return {across ? sum.force.x() : sum.force.y(), across ? sum.force.y() : sum.force.x(),
          across ? -sum.moment : sum.moment};
}

// The plate's boundary with the holes that pins press on, divided where tractions change.
mesh::Loop curves_of(const Plate& plate, const std::vector<Load>& loads) {
  std::vector<mesh::Break> places;
  std::vector<std::size_t> holes;
  for (const Load& load : loads) {
    for (const mesh::Break& at : breaks(plate, load)) places.push_back(at);
    if (load.kind == Load::Kind::pin) holes.push_back(load.hole);
  }
  mesh::Region region{{mesh::outline_of(plate).curves}};
  std::sort(holes.begin(), holes.end());
  holes.erase(std::unique(holes.begin(), holes.end()), holes.end());
  for (const std::size_t hole : holes)
    if (hole < plate.holes.size())
      region.loops.push_back(mesh::trace(plate.holes[hole], {Owner::Kind::raiser, hole}));
  mesh::Loop all;
  for (const mesh::Loop& loop : mesh::broken(region, places).loops)
    all.insert(all.end(), loop.begin(), loop.end());
  return all;
}

}  // namespace

SectionForces section_forces(const Plate& plate, const std::vector<Load>& loads, mesh::Direction direction,
                             double station) {
  const bool across = direction == mesh::Direction::across;
  const int axis = across ? 0 : 1;
  const mesh::Loop outside = beyond(curves_of(plate, loads), axis, station);
  Point middle;
  middle[axis] = station;
  middle[1 - axis] = mesh::shape_of(mesh::gross_along(plate, direction, station)).centroid;
  SectionForces sum;
  for (const Load& load : loads) {
    if (load.kind == Load::Kind::pressure || load.kind == Load::Kind::face_pressure) continue;
    const bool integrated = needs_balance(load) || plate.outline;
    const SectionForces own =
        integrated ? of_traction(plate, load, outside, middle, across) : of_uniform(plate, load, across);
    sum.normal += own.normal;
    sum.shear += own.shear;
    sum.moment += own.moment;
  }
  return sum;
}

NominalState nominal_state_at(const Plate& plate, const std::vector<Load>& loads, const Point& at) {
  const SectionForces across = section_forces(plate, loads, mesh::Direction::across, at.x());
  const SectionForces along = section_forces(plate, loads, mesh::Direction::along, at.y());
  const auto shape = mesh::shape_of(mesh::gross_along(plate, mesh::Direction::across, at.x()));
  const double area = shape.length * plate.thickness;
  const double reach = std::max(shape.high - shape.centroid, shape.centroid - shape.low);
  const double length = mesh::shape_of(mesh::gross_along(plate, mesh::Direction::along, at.y())).length;
  NominalState state;
  state.xx = across.normal / area;
  state.bending = across.moment * reach / (shape.inertia * plate.thickness);
  state.yy = along.normal / (length * plate.thickness);
  state.xy = across.shear / area;
  return state;
}

NominalState nominal_state(const Plate& plate, const std::vector<Load>& loads, std::size_t raiser) {
  NominalState state = nominal_state_at(plate, loads, mesh::raiser(plate, raiser).mouth);
  for (const Load& load : loads)
    if (load.kind == Load::Kind::pressure && load.hole == raiser) state.pressure += load.stress;
  return state;
}

}  // namespace raiser::solver
