#pragma once

#include <array>
#include <optional>
#include <string>
#include <vector>

#include "io/case/parts.hpp"
#include "io/case/table.hpp"
#include "mesh/plate/build.hpp"

namespace raiser::io {

/// How often something stands in the plate, along x and y or along its edge.
struct Repeat {
  std::array<std::size_t, 2> count{1, 1};
  std::array<double, 2> pitch{0.0, 0.0};  ///< mm
  bool is_written = false;
};

/// The keys repeat and pitch, for up to two directions; nothing and a fault when
/// they do not fit together.
std::optional<Repeat> read_repeat(const Table& table, std::size_t directions);

/// The places of a row or grid about its middle, row by row from the lower left.
std::vector<mesh::Point> places(const Repeat& repeat);

/// Whether the case draws or imports its outline, which then gives the plate's sizes.
bool draws_outline(const Table& document);

/// What [import], [[outline]], [[shoulder]] and [[notch]] make of the plate's outline.
struct OutlineReading {
  std::optional<mesh::Outline> outline;      ///< empty for the rectangle, or when faulty
  bool is_sound = true;                      ///< no fault was found
  bool is_known = true;                      ///< sound, and all of its notches and fillets have their names
  mesh::Point origin = mesh::Point::Zero();  ///< where the drawing's origin comes to lie, mm
  PlateSizes sizes;                          ///< of a drawn outline: its bounding box
  std::vector<HoleReading> holes;            ///< imported with it
  std::optional<ImportReport> import;
  /// Names of the edges that other tables can speak of; any_name where the outline
  /// could not be read.
  std::vector<std::string> edges{"right", "top", "left", "bottom"};
};

/// Adds the names of notches, shoulders and drawn raisers to `names`.
OutlineReading read_outline(const Table& document, const PlateSizes& sizes, Names& names);

}  // namespace raiser::io
