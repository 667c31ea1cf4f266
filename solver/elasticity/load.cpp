#include "solver/elasticity/load.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

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

bool pulls(const std::vector<Load>& loads, Owner::Kind edge) {
  return std::any_of(loads.begin(), loads.end(), [edge](const Load& load) {
    return load.kind == Load::Kind::edge && load.edge == edge && load.stress != 0.0;
  });
}

/// Moves normal stresses that would only take a load back to the edge across
/// the plate, where the opposite sign gives the same force.
std::vector<Load> across_from(std::vector<Load> cure, const std::vector<Load>& loads) {
  for (Load& load : cure) {
    if (load.stress == 0.0 || !pulls(loads, load.edge)) continue;
    const auto other = load.edge == Owner::Kind::left ? Owner::Kind::right : Owner::Kind::top;
    if (pulls(loads, other)) continue;
    load.edge = other;
    load.stress = -load.stress;
  }
  return cure;
}

std::string describe_cure(const std::vector<Load>& cure) {
  std::string text;
  for (const Load& load : cure) {
    const bool normal = load.stress != 0.0;
    text += fmt::format("{}{} {:.12g} MPa on the {} edge", text.empty() ? "" : ", ",
                        normal ? "a normal stress of" : "a stress along the edge of",
                        normal ? load.stress : load.along, edge_words[loaded_edge(load)]);
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
    case Load::Kind::edge:
      return "edge";
  }
  return "";
}

Resultant resultant(const Plate& plate, const Load& load) {
  if (load.kind != Load::Kind::edge) return {};
  return resultant(plate, whole_edge(plate, loaded_edge(load)), load.stress, load.along, Point::Zero());
}

std::vector<Load> balancing(const Plate& plate, const Resultant& left_over) {
  std::vector<Load> result;
  const auto put = [&](Owner::Kind edge, double stress, double along) {
    if (stress == 0.0 && along == 0.0) return;
    Load load;
    load.kind = Load::Kind::edge;
    load.edge = edge;
    load.stress = stress;
    load.along = along;
    result.push_back(load);
  };
  const double along = -left_over.moment / (plate.length * plate.width * plate.thickness);
  put(Owner::Kind::left, left_over.force.x() / (plate.width * plate.thickness), 0.0);
  put(Owner::Kind::bottom, left_over.force.y() / (plate.length * plate.thickness), 0.0);
  put(Owner::Kind::right, 0.0, along);
  put(Owner::Kind::left, 0.0, along);
  return result;
}

std::optional<LoadFault> imbalance(const Plate& plate, const std::vector<Load>& loads) {
  if (auto fault = not_finite(loads)) return fault;
  LoadFault fault;
  double size = 0.0;
  std::string names;
  for (std::size_t i = 0; i < loads.size(); ++i) {
    if (loads[i].kind != Load::Kind::edge) continue;
    const Resultant own = resultant(plate, loads[i]);
    size += own.force.norm();
    add(fault.by, own);
    fault.loads.push_back(i);
    names += fmt::format("{}'{}'", names.empty() ? "" : ", ", name_of(loads[i]));
  }
  constexpr double tolerance = 1e-9;
  const double moment_size = 0.5 * size * std::max(plate.length, plate.width);
  for (double& component : fault.by.force)
    if (std::abs(component) <= tolerance * size) component = 0.0;
  if (std::abs(fault.by.moment) <= tolerance * moment_size) fault.by.moment = 0.0;
  if (fault.by.force.isZero(0.0) && fault.by.moment == 0.0) return std::nullopt;

  fault.what = fmt::format(
      "the edge loads {} do not balance: they leave a force of ({:.6g}, {:.6g}) N and a moment of {:.6g} N "
      "mm "
      "about the plate's centre (anticlockwise positive)",
      names, plain(fault.by.force.x()), plain(fault.by.force.y()), plain(fault.by.moment));
  fault.cure = describe_cure(across_from(balancing(plate, fault.by), loads));
  return fault;
}

}  // namespace raiser::solver
