#pragma once

#include <functional>
#include <vector>

#include "solver/fe/model.hpp"
#include "solver/solution.hpp"
#include "validation/exact/exact.hpp"
#include "validation/families.hpp"

/// How the plates of the families are put together and our number is read off.
namespace raiser::validation {

using Question = std::function<Ours(double tolerance)>;
using Measure = std::function<std::optional<solver::Estimate>(const solver::Solution&)>;

/// E 200 GPa, nu 0.3, plane stress: what the families are solved with. With
/// given tractions the stresses do not depend on it.
inline const solver::HookeLaw family_material{200e3, 0.3, solver::PlaneState::stress};

/// Nominal stress of the families' loads, MPa.
inline constexpr double unit_stress = 100.0;

mesh::Hole circle(double diameter, const Point& centre = Point::Zero());
/// A hole with sizes along x and along y.
mesh::Hole sized_hole(mesh::HoleShape shape, double along_x, double along_y, double corner_radius = 0.0);

/// A load of unit_stress.
solver::Load unit_load(solver::Load::Kind kind);
/// A plate of unit thickness under loads of unit_stress each.
solver::Problem plate_under(double length, double width, std::vector<mesh::Hole> holes,
                            const std::vector<solver::Load::Kind>& loads);

/// Solves with settle(), asking the largest edge stress at `hole`; our number is
/// what `measure` reads. `model` as in Ours.
Question settled(solver::Problem problem, Measure measure, double model = 0.0, std::size_t hole = 0);

/// The same for a crack tip, asking its stress intensity or its T stress.
Question settled_tip(solver::Problem problem, Measure measure, double model = 0.0,
                     solver::Quantity quantity = solver::Quantity::stress_intensity, std::size_t tip = 0);

/// The same question at a tolerance of its own: T converges later than K.
Question no_finer_than(double least, Question question);

/// K_I and the magnitude of K_II at a tip over a nominal one, MPa sqrt(mm), and
/// T over a nominal stress, MPa.
Measure k_one_over(double nominal, std::size_t tip = 0);
Measure k_two_size_over(double nominal, std::size_t tip = 0);
Measure t_over(double nominal, std::size_t tip = 0);

/// The largest edge stress at a hole over a nominal stress, MPa.
Measure largest_over(double nominal, std::size_t hole = 0);
/// The edge stress at the end of an axis of the hole that is free of traction
/// there, parallel to an axis of the plate.
Measure stress_at(const Point& point, double nominal, std::size_t hole = 0);

/// A plate on whose outline acts the traction of a field that is known: our number
/// is the largest or smallest edge stress at a raiser over `nominal`.
Question exact_field(mesh::Plate plate, StressField field, solver::Quantity quantity, double nominal,
                     const solver::HookeLaw& material = family_material, std::size_t raiser = 0);

/// Raises the degree on a model's mesh until the asked number meets its tolerance;
/// the model must have one load. Ours is the number over `nominal`; of a stress
/// intensity that is K_I.
Ours with_rising_degree(const solver::Model& model, const mesh::Plate& plate, const solver::Ask& ask,
                        double nominal);

}  // namespace raiser::validation
