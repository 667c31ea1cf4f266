#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "solver/solution.hpp"

namespace raiser::validation {

/// A published value beside ours, for one hole, notch, fillet or crack tip under one load.
struct Comparison {
  static constexpr std::size_t none = static_cast<std::size_t>(-1);
  std::size_t hole = 0;     ///< index into mesh::raisers(plate), the holes first; `none` at a crack tip
  std::string place;        ///< name of the raiser or of the tip
  std::string load;         ///< the load's name, or that of the combination
  std::string quantity;     ///< e.g. "Kt net"
  double published = 0.0;   ///< dimensionless; MPa when the quantity says so
  double ours = 0.0;        ///< in the published definition
  double bound = 0.0;       ///< on ours
  double difference = 0.0;  ///< (ours - published) / |published|
  std::string solution;     ///< short name, e.g. "Howland 1930"
  std::string source;       ///< the primary source
  std::string definition;   ///< of parameters and factor
  bool in_range = false;    ///< the plate meets what the solution stands on
  std::string range_note;   ///< why not, and by how much; empty when in range
  std::string accuracy;     ///< what the solution can promise
  bool from_memory = false;
};

/// The published solutions that cover each hole, notch, fillet and crack tip, load by load, and the uniform
/// loads together where a solution covers the combination. A solution whose
/// family applies but whose conditions are not met is returned with in_range
/// false and a note. Empty when nothing published covers the plate.
std::vector<Comparison> compare(const solver::Problem& problem, const solver::Solution& solution);

/// The same from the findings alone: all loads together, and one entry for each
/// unit load.
std::vector<Comparison> compare(const solver::Problem& problem, const solver::LoadFindings& combined,
                                const std::vector<solver::LoadFindings>& units);

}  // namespace raiser::validation
