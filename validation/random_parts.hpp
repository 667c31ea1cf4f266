#pragma once

#include <optional>
#include <string>
#include <vector>

#include "solver/solution.hpp"
#include "validation/dice.hpp"

namespace raiser::validation {

/// A rectangle without holes: 20 to 500 mm wide, `least_ratio` to 5 times as long, 0.5 to 20 mm thick.
mesh::Plate random_bare_plate(Dice& dice, double least_ratio);

/// A circle, ellipse, slot or rounded rectangle of about the given mean diameter at the origin.
mesh::Hole random_hole(Dice& dice, double diameter, std::string name);

/// A hole of the given mean diameter, or a little less, that the plate has room
/// for: beside another, beside an edge or anywhere; nothing after many attempts.
using HoleMaker = mesh::Hole (*)(Dice& dice, double diameter, std::string name);
std::optional<mesh::Hole> random_hole_in(Dice& dice, const mesh::Plate& plate, double diameter,
                                         const std::string& name, HoleMaker make = random_hole);

/// Isotropic in two of three cases, else orthotropic with E1 / E2 from 1 to 20 at any angle.
solver::HookeLaw random_material(Dice& dice);

/// One kind alone, two to four kinds together, or a group of edge loads that
/// balance jointly. Pressure in a hole of a plate without holes names hole 0: the
/// caller turns it into something else.
std::vector<solver::Load> random_loads(Dice& dice, const mesh::Plate& plate);

}  // namespace raiser::validation
