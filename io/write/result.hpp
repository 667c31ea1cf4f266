#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "io/case/case.hpp"
#include "io/write/provenance.hpp"
#include "solver/solution.hpp"
#include "validation/compare.hpp"

namespace raiser::io {

/// A solved case with everything that its files and tables say.
struct Result {
  Case input;
  solver::Solution solution;
  std::vector<validation::Comparison> published;
  Provenance provenance;
};

/// What one ask came to.
struct Answer {
  solver::Ask ask;
  solver::EdgeValue value;
  double allowed = 0.0;  ///< MPa: the largest bound that meets the ask's tolerance
  bool met = false;
};

/// The answers in the order of the asks.
std::vector<Answer> answers(const Case& input, const solver::Solution& solution);

/// What one ask at a crack tip came to: K_I and K_II, or T.
struct TipAnswer {
  solver::Ask ask;
  std::vector<solver::Estimate> values;
  double allowed = 0.0;  ///< MPa sqrt(mm) or MPa: the largest bound that meets the ask's tolerance
  bool met = false;
};
std::vector<TipAnswer> tip_answers(const Case& input, const solver::Solution& solution);

/// The loads that findings are of.
std::vector<solver::Load> loads_of(const Case& input, const solver::LoadFindings& findings);

/// The words for a quantity, e.g. "largest edge stress".
std::string_view words(solver::Quantity quantity);

/// The words for a status: "settled", "not met".
std::string_view words(solver::Solution::Status status);

/// Positions in findings.raisers, the largest magnitude
/// of edge stress first.
std::vector<std::size_t> worst_first(const solver::LoadFindings& findings);

/// The largest magnitude of edge stress at a raiser, MPa.
double peak(const solver::RaiserFindings& findings);

/// Positions in findings.tips, the largest sqrt(K_I^2 + K_II^2) first.
std::vector<std::size_t> worst_tips_first(const solver::LoadFindings& findings);

/// The part of the plate that was solved: "whole plate", "half of the plate"…
std::string_view solved_part(const mesh::Mirrors& mirrors);

/// How one of several cases ended: what a summary keeps of it.
struct Outcome {
  std::string case_file;
  std::string title;
  int exit_code = 0;
  std::string status;   ///< "settled", "not met", "not read", …
  std::string message;  ///< the first fault or the reason; empty when settled
  double seconds = 0.0;
  std::vector<std::string> raiser_names;        ///< of `raisers`, in the same order
  std::vector<solver::RaiserFindings> raisers;  ///< under all loads; empty when not solved
  std::vector<std::string> tip_names = {};      ///< of `tips`, in the same order
  std::vector<solver::TipFindings> tips = {};   ///< under all loads; empty when not solved
};

}  // namespace raiser::io
