#pragma once

#include <string>
#include <vector>

#include "validation/calibrate.hpp"
#include "validation/calibrate/truth.hpp"

namespace raiser::validation {

/// A trial with everything that follows from the plate and the raiser.
Trial trial_at(const mesh::Plate& plate, std::size_t raiser, Trial::What what);

/// Holds a value with its bound against what is known of it.
void hold(Trial& trial, const solver::Estimate& estimate, const Known& truth);

/// The kinds of the unit loads: one each, or all edge loads together.
std::vector<std::string> kinds(const solver::Problem& problem);

/// What the solution has cost, and whether it is settled.
void keep_cost(PlateTrial& plate, const solver::Solution& solution);

/// CPU seconds of this process so far.
double cpu_seconds();

}  // namespace raiser::validation
