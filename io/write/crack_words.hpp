#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "io/write/result.hpp"

namespace raiser::io {

/// One MPa sqrt(m) in MPa sqrt(mm).
inline constexpr double root_metre = 31.622776601683793;

/// "tip A"; names that begin with "tip" or "crack" stay as they are.
std::string tip_phrase(std::string_view name);

/// Why there is no Kt of a crack.
std::string_view no_kt();

/// What K and its companions do not cover.
std::string_view crack_cautions();

/// The angle in degrees at which the crack turns off, with its bound, or why
/// there is none.
struct Kink {
  std::optional<solver::Estimate> angle;
  std::string why;
};
Kink kink(const Case& input, const solver::TipFindings& found);

/// The criterion of the kink angle with its source, and what its sign means.
std::string_view kink_criterion();
std::string_view kink_sign();

/// What it means that the faces of a crack press on each other; empty when
/// they do not.
std::string closed_warning(const Case& input, const solver::CrackOpening& opening);

/// (value - reference) / |reference|; nothing when the reference is zero.
std::optional<double> relative_difference(double value, double reference);

}  // namespace raiser::io
