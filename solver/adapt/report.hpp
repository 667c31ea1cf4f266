#pragma once

#include "solver/adapt/sequence.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {

/// What a solution says to the given extent, from a sequence of at least one
/// degree and the plate's singular places. Status, reason, levels and seconds
/// are left to the caller.
Solution report(const Problem& problem, const DegreeSequence& sequence,
                const std::vector<SingularPlace>& places, Report extent);

}  // namespace raiser::solver
