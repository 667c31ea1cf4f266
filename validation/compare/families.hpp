#pragma once

#include <vector>

#include "validation/compare/situation.hpp"

namespace raiser::validation {

/// Solutions for one hole by itself, by shape: what covers the situation.
std::vector<Comparison> compare_circle(const Situation& situation);
std::vector<Comparison> compare_ellipse(const Situation& situation);
std::vector<Comparison> compare_slot(const Situation& situation);
std::vector<Comparison> compare_rounded_rectangle(const Situation& situation);

/// Two equal circular holes, or a row of five and more at one pitch.
std::vector<Comparison> compare_group(const Situation& situation);

/// A notch in a straight edge of a rectangle, by itself or with its like opposite.
std::vector<Comparison> compare_notch(const Situation& situation);

/// The circular fillet of a bar with one step on both sides.
std::vector<Comparison> compare_fillet(const Situation& situation);

/// One crack tip under one load or combination.
struct TipSituation {
  const solver::Problem& problem;
  const solver::TipFindings& found;
  std::string load;
  RemoteStress remote;   ///< MPa, in plate axes
  double bending = 0.0;  ///< MPa, outer fibre
};
/// Straight cracks in a rectangle, by themselves or at a central circular hole.
std::vector<Comparison> compare_tip(const TipSituation& situation);

}  // namespace raiser::validation
