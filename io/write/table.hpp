#pragma once

#include <string>

#include "io/write/result.hpp"

namespace raiser::io {

/// Holes that a table shows before it refers to the files for the rest.
inline constexpr std::size_t table_holes = 12;

struct TableStyle {
  bool colour = false;    ///< mark the status with terminal colours
  std::string rest = "";  ///< where the holes left out are, e.g. "plate.json"
};

/// The answer for a person: at most 80 columns as long as no single word is
/// longer. Stresses with no digit that their bound makes meaningless; many
/// holes worst first.
std::string table(const Result& result, const TableStyle& style = {});

/// The remark on yield, empty when no yield strength is given.
std::string yield_remark(const Case& input, const solver::LoadFindings& findings);

/// What the numbers do not cover.
std::string_view cautions();

}  // namespace raiser::io
