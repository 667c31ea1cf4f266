#include "solver/elasticity/load.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <stdexcept>
#include <string>

#include "solver/elasticity/outer_edge.hpp"

namespace raiser::solver {

namespace {

void add(Resultant& sum, const Resultant& term) {
  sum.force += term.force;
  sum.moment += term.moment;
}

std::string name_of(const Load& load) { return load.name.empty() ? std::string(word(load.kind)) : load.name; }

std::vector<double> values(const Load& load) {
  return {load.stress, load.along,     load.stress_to.value_or(0.0), load.along_to.value_or(0.0),
          load.force,  load.direction, load.clearance.value_or(0.0)};
}

const double* not_finite_in(const std::vector<double>& all) {
  const auto found = std::find_if_not(all.begin(), all.end(), [](double x) { return std::isfinite(x); });
  return found == all.end() ? nullptr : &*found;
}

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
    const std::vector<double> all = values(loads[i]);
    const double* value = not_finite_in(all);
    if (value == nullptr) continue;
    fault.loads.push_back(i);
    fault.what += fmt::format("{}load '{}' has a {} of {}", fault.what.empty() ? "" : ", ", name_of(loads[i]),
                              value < &all[4] ? "stress" : "force, direction or clearance", *value);
  }
  if (fault.loads.empty()) return std::nullopt;
  fault.cure = "give finite values";
  return fault;
}

/// What makes a pin illegal beside its hole.
std::optional<LoadFault> pin_fault(const Plate& plate, const Load& load) {
  if (load.kind != Load::Kind::pin) return std::nullopt;
  if (load.hole >= plate.holes.size() || plate.holes[load.hole].shape != mesh::HoleShape::circle)
    return LoadFault{{},
                     {},
                     fmt::format("the pin '{}' does not sit in a round hole", name_of(load)),
                     "name a hole of shape \"circle\""};
  const double diameter = plate.holes[load.hole].length;
  if (load.force < 0 || (load.force == 0 && load.clearance.value_or(0.0) >= 0))
    return LoadFault{{},
                     {},
                     fmt::format("the pin '{}' presses with a force of {:.6g} N", name_of(load), load.force),
                     "give a force greater than zero; its direction says where it points"};
  constexpr double most = 0.3, deepest = 0.02;
  const double share = load.clearance.value_or(0.0) / diameter;
  if (share <= most && share >= -deepest) return std::nullopt;
  return LoadFault{
      {},
      {},
      fmt::format("the pin '{}' has a {} of {:.6g} mm in a hole of {:.6g} mm", name_of(load),
                  share > 0 ? "clearance" : "interference", std::abs(load.clearance.value()), diameter),
      fmt::format("small displacements cover a clearance of up to {:.6g} mm and an interference of up to "
                  "{:.6g} mm there",
                  most * diameter, deepest * diameter)};
}

std::optional<LoadFault> cannot_act(const Plate& plate, const std::vector<Load>& loads) {
  for (std::size_t i = 0; i < loads.size(); ++i) try {
      if (auto fault = pin_fault(plate, loads[i])) {
        fault->loads = {i};
        return fault;
      }
      static_cast<void>(traction(plate, loads[i]));
    } catch (const std::invalid_argument& reason) {
      return LoadFault{
          {},
          {i},
          fmt::format("the load '{}' has nothing to act on: {}", name_of(loads[i]), reason.what()),
          needs_balance(loads[i]) ? "name a straight edge, or a part that lies on it"
                                  : "load an edge by its name with kind \"edge\""};
    }
  return std::nullopt;
}

/// Takes from a resultant what supports can take up.
void take_up(Resultant& sum, const Plate& plate, const std::vector<Support>& supports) {
  const double size = 0.5 * std::max(plate.length, plate.width);
  Eigen::Vector3d rest(sum.force.x(), sum.force.y(), sum.moment / size);
  for (const Eigen::Vector3d& b : takes_up(plate, supports, size)) rest -= rest.dot(b) * b;
  sum = {Point(rest[0], rest[1]), rest[2] * size};
}

/// "edge loads", "pins" or both.
std::string group_words(const std::vector<Load>& loads, const std::vector<std::size_t>& together) {
  bool edges = false, pins = false;
  for (const std::size_t i : together) (loads[i].kind == Load::Kind::edge ? edges : pins) = true;
  return edges && pins ? "edge loads and pins" : edges ? "edge loads" : "pins";
}

/// The fault of the loads with the given indices, which must balance together.
std::optional<LoadFault> left_over(const Plate& plate, const std::vector<Load>& loads,
                                   const std::vector<std::size_t>& together,
                                   const std::vector<Support>& supports) {
  LoadFault fault;
  fault.loads = together;
  double size = 0.0;
  std::string names;
  for (const std::size_t i : together) {
    const Resultant own = resultant(plate, loads[i]);
    const double area = plate.thickness * std::max(plate.length, plate.width);
    size += loads[i].kind == Load::Kind::pin ? loads[i].force : largest_stress(plate, loads[i]) * area;
    add(fault.by, own);
    names += fmt::format("{}'{}'", names.empty() ? "" : ", ", name_of(loads[i]));
  }
  constexpr double tolerance = 1e-9;
  take_up(fault.by, plate, supports);
  const double moment_size = 0.5 * size * std::max(plate.length, plate.width);
  for (double& component : fault.by.force)
    if (std::abs(component) <= tolerance * size) component = 0.0;
  if (std::abs(fault.by.moment) <= tolerance * moment_size) fault.by.moment = 0.0;
  if (fault.by.force.isZero(0.0) && fault.by.moment == 0.0) return std::nullopt;
  const bool several = needs_balance(loads[together.front()]);
  fault.what = fmt::format(
      "the {} {} do{} not balance{}: {} a force of ({:.6g}, {:.6g}) N and a moment of {:.6g} N mm about the "
      "plate's centre (anticlockwise positive)",
      several ? group_words(loads, together) : "load", names, several ? "" : "es",
      supports.empty() ? "" : " where the supports leave the plate free",
      several ? "they leave" : "it leaves", plain(fault.by.force.x()), plain(fault.by.force.y()),
      plain(fault.by.moment));
  if (!supports.empty()) {
    fault.cure = "hold another edge, or change the loads so that they balance";
    return fault;
  }
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
    case Load::Kind::pin:
      return "pin";
  }
  return "";
}

Resultant resultant(const Plate& plate, const Load& load) {
  if (load.kind == Load::Kind::pin) {
    const Point force = load.force * Point(std::cos(load.direction), std::sin(load.direction));
    const Point& at = plate.holes.at(load.hole).centre;
    return {force, at.x() * force.y() - at.y() * force.x()};
  }
  if (load.kind == Load::Kind::pressure || load.kind == Load::Kind::face_pressure ||
      (!plate.outline && load.kind != Load::Kind::edge))
    return {};
  const mesh::Region outline = mesh::broken({{mesh::outline_of(plate).curves}}, breaks(plate, load));
  return integrate(outline.loops.front(), plate.thickness, traction(plate, load), Point::Zero());
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

std::optional<LoadFault> imbalance(const Plate& plate, const std::vector<Load>& loads,
                                   const std::vector<Support>& supports) {
  if (auto fault = not_finite(loads)) return fault;
  if (auto fault = cannot_act(plate, loads)) return fault;
  std::vector<std::size_t> joint;
  for (std::size_t i = 0; i < loads.size(); ++i) {
    if (needs_balance(loads[i])) {
      joint.push_back(i);
    } else if (auto fault = left_over(plate, loads, {i}, supports)) {
      fault->cure =
          "give edge loads that balance instead: this kind of load needs edges that face each other";
      return fault;
    }
  }
  return left_over(plate, loads, joint, supports);
}

}  // namespace raiser::solver
