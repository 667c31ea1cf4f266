#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "io/case/case.hpp"
#include "io/case/table.hpp"

namespace raiser::io {

/// The plate's own sizes, mm; each empty when it is missing or faulty.
struct PlateSizes {
  std::optional<double> length;
  std::optional<double> width;
  std::optional<double> thickness;
};
PlateSizes read_plate(const Table& table);

/// What [material] says; the law is empty when it is incomplete or faulty.
struct Material {
  std::optional<solver::HookeLaw> law;
  std::optional<double> yield_strength;  ///< MPa
  std::optional<std::string> alloy;      ///< the name of a known one
};
/// The plate's thickness decides whether an alloy's yield strength holds.
Material read_material(const Table& table, const PlateSizes& plate);

/// A hole as far as it could be read. Its name is always there, so that other
/// tables can speak of a hole whose sizes are faulty.
struct HoleReading {
  std::string name;
  std::optional<mesh::Hole> hole;
  Position at;
};
std::vector<HoleReading> read_holes(const Table& document);

/// A load as far as it could be read, and its place.
struct LoadReading {
  std::optional<solver::Load> load;
  Position at;
  std::string path;  ///< of its table among what is written: "load.1", "pin.2"
};
/// Forces and moments become stresses on the plate's own sections; without the
/// sizes they need such loads stay empty.
std::vector<LoadReading> read_loads(const Table& document, const PlateSizes& plate,
                                    const std::vector<std::string_view>& holes);

/// The loads of one [[pin]]: one, or one for each hole of a row. An empty one
/// where it could not be read.
std::vector<std::optional<solver::Load>> read_pin(const Table& table,
                                                  const std::vector<std::string_view>& holes);

/// A support as far as it could be read, and its place.
struct SupportReading {
  std::optional<solver::Support> support;
  Position at;
};
std::vector<SupportReading> read_supports(const Table& document);

/// What is asked for, in the order of [ask], then of [[ask.result]].
struct Question {
  double tolerance = 1e-3;
  std::vector<solver::Ask> asks;
};
Question read_question(const Table& document, const std::vector<std::string_view>& holes);

/// How to write the name of a hole, for messages: the first one's, if any.
std::string sample_of(const std::vector<std::string_view>& holes);

/// The word for a quantity in case files: "largest edge stress", ...
std::string_view word(solver::Quantity quantity);

}  // namespace raiser::io
