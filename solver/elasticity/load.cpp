#include "solver/elasticity/load.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "solver/elasticity/outer_edge.hpp"

namespace raiser::solver {

namespace {

void add(Resultant& sum, const Resultant& term) {
  sum.force += term.force;
  sum.moment += term.moment;
}

std::string name_of(const Load& load) { return load.name.empty() ? std::string(word(load.kind)) : load.name; }

bool finite(const Load& load) { return std::isfinite(load.stress) && std::isfinite(load.along); }

// -0 prints as 0.
double plain(double x) { return x + 0.0; }

bool pulls(const std::vector<Load>& loads, std::size_t edge) {
  return std::any_of(loads.begin(), loads.end(), [edge](const Load& load) {
    return load.kind == Load::Kind::edge && load.edge == edge && load.stress != 0.0;
  });
}

/// Moves normal stresses that would only take a load back to the edge across
/// the plate, where the opposite sign gives the same force.
std::vector<Load> across_from(std::vector<Load> cure, const std::vector<Load>& loads) {
  for (Load& load : cure) {
    if (load.stress == 0.0 || !pulls(loads, load.edge)) continue;
    const auto other = load.edge == mesh::rectangle::left ? mesh::rectangle::right : mesh::rectangle::top;
    if (pulls(loads, other)) continue;
    load.edge = other;
    load.stress = -load.stress;
  }
  return cure;
}

std::string describe_cure(const Plate& plate, const std::vector<Load>& cure) {
  const std::vector<std::string> edges = mesh::edge_names(plate);
  std::string text;
  for (const Load& load : cure) {
    const bool normal = load.stress != 0.0;
    text += fmt::format("{}{} {:.12g} MPa on the {} edge", text.empty() ? "" : ", ",
                        normal ? "a normal stress of" : "a stress along the edge of",
                        normal ? load.stress : load.along, edges[load.edge]);
  }
  return "add " + text + ", or change the edge loads so that they balance";
}

std::optional<LoadFault> not_finite(const std::vector<Load>& loads) {
  LoadFault fault;
  for (std::size_t i = 0; i < loads.size(); ++i) {
    if (finite(loads[i])) continue;
    fault.loads.push_back(i);
    const double value = std::isfinite(loads[i].stress) ? loads[i].along : loads[i].stress;
    fault.what += fmt::format("{}load '{}' has a stress of {} MPa", fault.what.empty() ? "" : ", ",
                              name_of(loads[i]), value);
  }
  if (fault.loads.empty()) return std::nullopt;
  fault.cure = "give finite stresses";
  return fault;
}

std::optional<LoadFault> cannot_act(const Plate& plate, const std::vector<Load>& loads) {
  for (std::size_t i = 0; i < loads.size(); ++i) try {
      static_cast<void>(traction(plate, loads[i]));
    } catch (const std::invalid_argument& reason) {
      return LoadFault{
          {},
          {i},
          fmt::format("the load '{}' has nothing to act on: {}", name_of(loads[i]), reason.what()),
          "load an edge by its name with kind \"edge\""};
    }
  return std::nullopt;
}

/// The fault of the loads with the given indices, which must balance together.
std::optional<LoadFault> left_over(const Plate& plate, const std::vector<Load>& loads,
                                   const std::vector<std::size_t>& together) {
  LoadFault fault;
  fault.loads = together;
  double size = 0.0;
  std::string names;
  for (const std::size_t i : together) {
    const Resultant own = resultant(plate, loads[i]);
    const double area = plate.thickness * std::max(plate.length, plate.width);
    const bool at_edge = loads[i].kind == Load::Kind::edge;
    size += at_edge ? own.force.norm() : std::abs(loads[i].stress) * area;
    add(fault.by, own);
    names += fmt::format("{}'{}'", names.empty() ? "" : ", ", name_of(loads[i]));
  }
  constexpr double tolerance = 1e-9;
  const double moment_size = 0.5 * size * std::max(plate.length, plate.width);
  for (double& component : fault.by.force)
    if (std::abs(component) <= tolerance * size) component = 0.0;
  if (std::abs(fault.by.moment) <= tolerance * moment_size) fault.by.moment = 0.0;
  if (fault.by.force.isZero(0.0) && fault.by.moment == 0.0) return std::nullopt;
  const bool at_edges = loads[together.front()].kind == Load::Kind::edge;
  fault.what = fmt::format(
      "the {} {} do{} not balance: {} a force of ({:.6g}, {:.6g}) N and a moment of {:.6g} N mm about the "
      "plate's centre (anticlockwise positive)",
      at_edges ? "edge loads" : "load", names, at_edges ? "" : "es", at_edges ? "they leave" : "it leaves",
      plain(fault.by.force.x()), plain(fault.by.force.y()), plain(fault.by.moment));
  fault.cure = plate.outline ? "change the loads so that they balance"
                             : describe_cure(plate, across_from(balancing(plate, fault.by), loads));
  return fault;
}

}  // namespace

std::string_view word(Load::Kind kind) {
  switch (kind) {
    case Load::Kind::tension:
      return "tension";
    case Load::Kind::transverse:
      return "transverse";
    case Load::Kind::shear:
      return "shear";
    case Load::Kind::bending:
      return "bending";
    case Load::Kind::pressure:
      return "pressure";
    case Load::Kind::face_pressure:
      return "face pressure";
    case Load::Kind::edge:
      return "edge";
  }
  return "";
}

Resultant resultant(const Plate& plate, const Load& load) {
  if (load.kind == Load::Kind::pressure || load.kind == Load::Kind::face_pressure ||
      (!plate.outline && load.kind != Load::Kind::edge))
    return {};
  return integrate(mesh::outline_of(plate).curves, plate.thickness, traction(plate, load), Point::Zero());
}

std::vector<Load> balancing(const Plate& plate, const Resultant& left_over) {
  std::vector<Load> result;
  const auto put = [&](std::size_t edge, double stress, double along) {
    if (stress == 0.0 && along == 0.0) return;
    Load load;
    load.kind = Load::Kind::edge;
    load.edge = edge;
    load.stress = stress;
    load.along = along;
    result.push_back(load);
  };
  const double along = -left_over.moment / (plate.length * plate.width * plate.thickness);
  put(mesh::rectangle::left, left_over.force.x() / (plate.width * plate.thickness), 0.0);
  put(mesh::rectangle::bottom, left_over.force.y() / (plate.length * plate.thickness), 0.0);
  put(mesh::rectangle::right, 0.0, along);
  put(mesh::rectangle::left, 0.0, along);
  return result;
}

std::optional<LoadFault> imbalance(const Plate& plate, const std::vector<Load>& loads) {
  if (auto fault = not_finite(loads)) return fault;
  if (auto fault = cannot_act(plate, loads)) return fault;
  std::vector<std::size_t> edge_loads;
  for (std::size_t i = 0; i < loads.size(); ++i) {
    if (loads[i].kind == Load::Kind::edge) {
      edge_loads.push_back(i);
    } else if (auto fault = left_over(plate, loads, {i})) {
      fault->cure =
          "give edge loads that balance instead: this kind of load needs edges that face each other";
      return fault;
    }
  }
  return left_over(plate, loads, edge_loads);
}

}  // namespace raiser::solver
