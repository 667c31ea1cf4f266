#pragma once

#include <optional>
#include <string>

#include "io/case/case.hpp"
#include "io/write/provenance.hpp"
#include "solver/growth/factor.hpp"
#include "solver/growth/growth.hpp"
#include "solver/growth/notch_limits.hpp"

namespace raiser::io {

/// What `raiser grow` found.
struct GrowthResult {
  Case input;
  solver::GrowthPlan plan;
  solver::Growth growth;
  solver::GeometryFactor factor;  ///< of the first growing tip
  solver::NotchReading notch;     ///< limits of the crack of the first growing tip
  Provenance provenance;
};

/// For a person: every length with K, T and Y, the fitted factor, the limits of a
/// short and a long crack at a notch, and cautions; at most 80 columns wide.
std::string growth_table(const GrowthResult& result);

/// The fitted factor in words, ready to be copied; or why there is none.
std::string factor_text(const GrowthResult& result);

/// One row for each length and growing tip, under a head of lines that begin with
/// "#": what Y stands on and its fit.
std::string growth_csv(const GrowthResult& result);

/// Everything as a JSON document.
std::string growth_json(const GrowthResult& result);

/// "settled", "not met", "not solved".
std::string_view words(solver::GrowthStep::Status status);

}  // namespace raiser::io
