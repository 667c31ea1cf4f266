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

}  // namespace raiser::validation
