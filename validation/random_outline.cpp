#include "validation/random_outline.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>
#include <string>
#include <utility>
#include <vector>

#include "mesh/plate/chain.hpp"
#include "mesh/plate/shoulder.hpp"
#include "validation/dice.hpp"
#include "validation/random_parts.hpp"

namespace raiser::validation {

namespace {

using mesh::Fillet;
using mesh::FilletShape;
using mesh::Notch;
using mesh::NotchShape;
using mesh::OutlinePoint;
using mesh::Plate;
using mesh::Point;
using mesh::Shoulder;
using solver::Load;

constexpr double pi = std::numbers::pi;

/// A notch in the upper or lower edge, or now and then in an end.
Notch random_notch(Dice& dice, const Plate& plate) {
  const std::size_t edge = dice.chance(0.1)   ? mesh::rectangle::right
                           : dice.chance(0.5) ? mesh::rectangle::top
                                              : mesh::rectangle::bottom;
  const double along = edge == mesh::rectangle::right ? plate.width : plate.length;
  Notch notch;
  notch.shape = static_cast<NotchShape>(dice.below(5));
  // In a loaded end, flanks that lean leave no uniform stress at the mouth: it has no peak.
  if (edge == mesh::rectangle::right && notch.shape == NotchShape::v) notch.shape = NotchShape::u;
  notch.edge = edge;
  notch.at = dice.uniform(-0.4, 0.4) * along;
  notch.depth = dice.log_uniform(0.02, 0.45) * plate.width;
  notch.root_radius = dice.log_uniform(0.005, 1.0) * notch.depth;
  if (notch.shape == NotchShape::v) notch.opening_angle = dice.uniform(0.2, 2.4);
  if (notch.shape == NotchShape::semi_ellipse) notch.width = notch.depth * dice.log_uniform(0.2, 5.0);
  if (notch.shape == NotchShape::keyhole) {
    notch.root_radius = dice.log_uniform(0.05, 0.4) * notch.depth;
    notch.width = dice.uniform(0.3, 1.6) * notch.root_radius;
  }
  return notch;
}

Plate notched_plate(Dice& dice) {
  Plate plate = random_bare_plate(dice, 1.0);
  const mesh::Outline body = mesh::rectangular(plate.length, plate.width);
  const std::size_t count = 1 + dice.below(4);
  std::vector<Notch> notches;
  for (int attempt = 0; attempt < 200 && notches.size() < count; ++attempt) {
    Notch notch = random_notch(dice, plate);
    notch.name = "notch " + std::to_string(notches.size() + 1);
    const std::size_t before = notches.size();
    notches.push_back(notch);
    // None in the left end, which may be clamped: a notch that runs into a held edge has no peak.
    const auto other = mesh::opposite(body, notch);
    if (other && other->edge != mesh::rectangle::left && dice.chance(0.4)) {
      notch.edge = other->edge;
      notch.at = other->at;
      notch.name += " opposite";
      notches.push_back(notch);
    }
    Plate with = plate;
    with.outline = mesh::with_notches(body, notches).outline;
    if (with.outline && mesh::faults(with).empty())
      plate.outline = with.outline;
    else
      notches.resize(before);
  }
  if (!plate.outline) throw std::runtime_error("random_outlined_plate: no notch fits");
  return plate;
}

Fillet random_fillet(Dice& dice, double step) {
  Fillet fillet;
  fillet.shape = static_cast<FilletShape>(dice.below(4));  // not sharp
  fillet.radius = dice.log_uniform(0.005, 1.0) * step;
  fillet.along = dice.log_uniform(0.05, 3.0) * step;
  fillet.across = dice.log_uniform(0.05, 0.9) * step;
  fillet.second_radius = fillet.radius * dice.uniform(1.2, 4.0);
  fillet.turn = dice.uniform(0.3, 1.2);
  fillet.undercut = dice.uniform(0.05, 0.9) * fillet.radius;
  return fillet;
}

Plate stepped_plate(Dice& dice) {
  Plate plate = random_bare_plate(dice, 1.0);
  const std::size_t count = 1 + dice.below(3);
  std::vector<Shoulder> shoulders;
  for (int attempt = 0; attempt < 300 && (shoulders.empty() || shoulders.size() < count); ++attempt) {
    Shoulder shoulder;
    shoulder.name = "shoulder " + std::to_string(shoulders.size() + 1);
    shoulder.at = dice.uniform(-0.4, 0.4) * plate.length;
    shoulder.width = dice.uniform(0.3, 0.95) * plate.width;
    shoulder.narrow_is_right = shoulders.empty() || dice.chance(0.5);
    shoulder.sides = dice.chance(0.6) ? Shoulder::Sides::both : Shoulder::Sides::top;
    shoulder.fillet = random_fillet(dice, (plate.width - shoulder.width) / 2);
    shoulders.push_back(shoulder);
    Plate with = plate;
    with.outline = mesh::stepped_bar(plate.length, plate.width, shoulders).outline;
    if (with.outline && mesh::faults(with).empty())
      plate.outline = with.outline;
    else
      shoulders.pop_back();
  }
  return plate;
}

/// Points of one side between the ends, from x = -length / 2 to length / 2, at
/// heights of one half to all of the half width; every other piece may be an
/// inward arc.
std::vector<OutlinePoint> side(Dice& dice, double length, double width, double low, double high) {
  const std::size_t count = 2 + dice.below(4);
  const double pitch = length / static_cast<double>(count);
  std::vector<OutlinePoint> points;
  for (std::size_t i = 0; i < count; ++i) {
    OutlinePoint point;
    const double x = i == 0 ? 0.0 : (static_cast<double>(i) + dice.uniform(-0.3, 0.3)) * pitch;
    point.at = {-length / 2 + x, i == 0 ? low : dice.uniform(0.15, 0.5) * width};
    if (i > 0) point.corner_radius = dice.log_uniform(0.01, 0.3) * std::min(width, pitch);
    points.push_back(point);
  }
  if (count > 2 && dice.chance(0.5)) {
    // An arc needs two sharp ends; where those are re-entrant, it is no raiser.
    OutlinePoint& from = points[1];
    OutlinePoint& to = points[2];
    from.corner_radius = to.corner_radius = 0.0;
    from.piece.kind = mesh::Piece::Kind::inwards;
    from.piece.radius = (to.at - from.at).norm() * dice.uniform(0.51, 2.0);
  }
  OutlinePoint last;
  last.at = {length / 2, high};
  points.push_back(last);
  return points;
}

Plate free_plate(Dice& dice) {
  for (int attempt = 0; attempt < 1000; ++attempt) {
    Plate plate = random_bare_plate(dice, 1.0);
    const double left = dice.uniform(0.15, 0.5) * plate.width, right = dice.uniform(0.15, 0.5) * plate.width;
    std::vector<OutlinePoint> points = side(dice, plate.length, plate.width, left, right);
    std::reverse(points.begin(), points.end());
    // Reversed, a piece belongs to its other end.
    for (std::size_t i = 0; i + 1 < points.size(); ++i) std::swap(points[i].piece, points[i + 1].piece);
    for (OutlinePoint& point : side(dice, plate.length, plate.width, left, right)) {
      point.at.y() = -point.at.y();
      points.push_back(point);
    }
    mesh::ChainResult chain = mesh::chain_outline(points);
    if (!chain.outline || chain.outline->raisers.empty()) continue;
    plate.outline = std::move(chain.outline);
    plate.length = chain.length;
    plate.width = chain.width;
    if (mesh::faults(plate).empty()) return plate;
  }
  throw std::runtime_error("random_outlined_plate: no legal free outline found");
}

void add_holes(Dice& dice, Plate& plate) {
  const std::size_t count = dice.below(3);
  for (int attempt = 0; attempt < 40 && plate.holes.size() < count; ++attempt) {
    const double diameter = plate.width * dice.log_uniform(0.04, 0.3);
    const auto hole = random_hole_in(dice, plate, diameter, "hole " + std::to_string(plate.holes.size() + 1));
    if (!hole) continue;
    plate.holes.push_back(*hole);
    if (!mesh::faults(plate).empty()) plate.holes.pop_back();
  }
}

double random_stress(Dice& dice) {
  const double size = dice.log_uniform(10.0, 300.0);
  return dice.chance(0.8) ? size : -size;
}

Load load_of(Dice& dice, Load::Kind kind) {
  Load load;
  load.kind = kind;
  load.name = solver::word(kind);
  load.stress = random_stress(dice);
  return load;
}

/// One kind alone or two to three together, on ends that face each other.
std::vector<Load> loads_on_ends(Dice& dice, const Plate& plate) {
  std::vector<Load::Kind> kinds{Load::Kind::tension, Load::Kind::bending};
  if (!plate.holes.empty()) kinds.push_back(Load::Kind::pressure);
  std::vector<Load> loads;
  const bool is_alone = dice.chance(0.6);
  const std::size_t alone = dice.below(kinds.size());
  for (std::size_t i = 0; i < kinds.size(); ++i)
    if (!is_alone || i == alone) loads.push_back(load_of(dice, kinds[i]));
  return loads;
}

/// The edge whose straight line faces the direction and lies farthest that way.
std::optional<std::size_t> end_edge(const Plate& plate, double direction) {
  for (std::size_t edge = 0; edge < mesh::edge_names(plate).size(); ++edge) {
    const auto line = solver::straight_edge(plate, edge);
    if (line && std::abs(line->normal().x() - direction) < 1e-12 &&
        std::abs(line->start.x() - direction * plate.length / 2) < 1e-9 * plate.length)
      return edge;
  }
  return std::nullopt;
}

/// Clamped at the left end, pulled and sheared at the right one.
bool hold_and_pull(Dice& dice, solver::Problem& problem) {
  const auto left = end_edge(problem.plate, -1.0), right = end_edge(problem.plate, 1.0);
  if (!left || !right) return false;
  problem.supports.push_back({"wall", *left, 0.0, 0.0});
  Load load = load_of(dice, Load::Kind::edge);
  load.edge = *right;
  if (dice.chance(0.5)) load.stress_to = random_stress(dice);
  if (dice.chance(0.5)) load.along = random_stress(dice) / 4;
  problem.loads.push_back(load);
  return true;
}

Plate random_shape(Dice& dice) {
  switch (dice.below(3)) {
    case 0:
      return notched_plate(dice);
    case 1:
      return stepped_plate(dice);
    default:
      return free_plate(dice);
  }
}

}  // namespace

solver::HookeLaw random_material(Dice& dice) {
  solver::HookeLaw law{dice.log_uniform(3e3, 4e5), dice.uniform(0.0, 0.45),
                       dice.chance(0.8) ? solver::PlaneState::stress : solver::PlaneState::strain};
  if (!dice.chance(1.0 / 3)) return law;
  law.state = solver::PlaneState::stress;
  law.poissons_ratio = dice.uniform(0.0, 0.35);
  solver::Orthotropy orthotropy;
  orthotropy.youngs_modulus_2 = law.youngs_modulus / dice.log_uniform(1.0, 20.0);
  orthotropy.shear_modulus = orthotropy.youngs_modulus_2 * dice.uniform(0.3, 0.8);
  orthotropy.angle = dice.chance(0.3) ? 0.0 : dice.uniform(-pi / 2, pi / 2);
  law.orthotropy = orthotropy;
  return law;
}

solver::Problem random_outlined_plate(std::uint64_t seed) {
  Dice dice(seed ^ 0x6f75746c696e65u);  // other numbers than random_plate's
  solver::Problem problem;
  problem.plate = random_shape(dice);
  add_holes(dice, problem.plate);
  problem.material = random_material(dice);
  if (dice.chance(0.25) && hold_and_pull(dice, problem)) return problem;
  problem.loads = loads_on_ends(dice, problem.plate);
  if (solver::imbalance(problem.plate, problem.loads)) {  // an end without a straight part
    problem.loads.clear();
    if (!hold_and_pull(dice, problem))
      throw std::runtime_error("random_outlined_plate: the plate has no straight end");
  }
  return problem;
}

}  // namespace raiser::validation
