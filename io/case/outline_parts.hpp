#pragma once

#include <optional>
#include <string>
#include <vector>

#include "io/case/outline.hpp"
#include "mesh/plate/chain.hpp"
#include "mesh/plate/shoulder.hpp"

namespace raiser::io {

/// One table [[shoulder]], [[outline]] or [[notch]]; nothing and faults where it
/// is wrong.
std::optional<mesh::Shoulder> read_shoulder(const Table& table, const std::string& name);
std::optional<mesh::OutlinePoint> read_point(const Table& table);

/// A notch as written; `notch` is the one on its own edge at the row's middle.
struct NotchReading {
  mesh::Notch notch;
  bool both_sides = false;
  Repeat repeat;
};
/// `edges` are the outline's edges, empty where it could not be read.
std::optional<NotchReading> read_notch(const Table& table, const std::string& name,
                                       const std::vector<std::string>& edges);

}  // namespace raiser::io
