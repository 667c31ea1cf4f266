#include <cmath>

#include "solver/elasticity/load.hpp"
#include "solver/elasticity/outer_edge.hpp"

namespace raiser::solver {

namespace {

// The edge load's resultant on the part of the plate beyond the section, about
// the middle of the section. What lies on the section itself (an edge whose
// every point has coordinate `station`) counts as beyond.
Resultant beyond_section(const Plate& plate, const Load& load, int axis, double station) {
  Point middle = Point::Zero();
  middle[axis] = station;
  const EdgePiece whole = whole_edge(plate, loaded_edge(load));
  if (whole.from[axis] < station && whole.to[axis] < station) return {};
  return resultant(plate, beyond(whole, axis, station), load.stress, load.along, middle);
}

// Stress times area for the loads that act on the whole plate.
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

}  // namespace

SectionForces section_forces(const Plate& plate, const std::vector<Load>& loads, mesh::Direction direction,
                             double station) {
  const bool across = direction == mesh::Direction::across;
  SectionForces sum;
  for (const Load& load : loads) {
    SectionForces own = of_uniform(plate, load, across);
    if (load.kind == Load::Kind::edge) {
      const Resultant outside = beyond_section(plate, load, across ? 0 : 1, station);
      own.normal = across ? outside.force.x() : outside.force.y();
      own.shear = across ? outside.force.y() : outside.force.x();
      own.moment = across ? -outside.moment : outside.moment;
    }
    sum.normal += own.normal;
    sum.shear += own.shear;
    sum.moment += own.moment;
  }
  return sum;
}

NominalState nominal_state(const Plate& plate, const std::vector<Load>& loads, std::size_t hole) {
  const Point centre = plate.holes.at(hole).centre;
  const SectionForces across = section_forces(plate, loads, mesh::Direction::across, centre.x());
  const SectionForces along = section_forces(plate, loads, mesh::Direction::along, centre.y());
  const double area = plate.width * plate.thickness;
  NominalState state;
  state.xx = across.normal / area;
  state.bending = 6.0 * across.moment / (area * plate.width);
  state.yy = along.normal / (plate.length * plate.thickness);
  state.xy = across.shear / area;
  for (const Load& load : loads)
    if (load.kind == Load::Kind::pressure && load.hole == hole) state.pressure += load.stress;
  return state;
}

}  // namespace raiser::solver
