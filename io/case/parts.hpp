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
/// A drawn outline gives length and width itself: then neither is read.
PlateSizes read_plate(const Table& table, bool is_drawn);

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
  std::size_t table = 0;  ///< which [[hole]] it comes from, from 1
};
/// A row or grid becomes one hole for each place. Adds their names to `names`.
std::vector<HoleReading> read_holes(const Table& document, Names& names);

struct OutlineReading;

/// A crack as far as it could be read. Its name and those of its tips are always
/// there; they are also those of the crack itself.
struct CrackReading {
  std::string name;
  std::vector<std::string> tips;  ///< one for a crack that opens at an edge, else two
  std::optional<mesh::Crack> crack;
  Position at;
};
/// Without the plate's sizes, cracks that open at an edge or a hole stay empty.
/// They may open at the outline's notches and fillets, too. Their points are
/// those of the plate, not of the drawing.
std::vector<CrackReading> read_cracks(const Table& document, const PlateSizes& plate,
                                      const OutlineReading& outline, const std::vector<HoleReading>& holes);

/// A load as far as it could be read, and its place.
struct LoadReading {
  std::optional<solver::Load> load;
  Position at;
  std::string path;  ///< of its table among what is written: "load.1", "pin.2"
};
/// Forces and moments become stresses on the plate's own sections; without the
/// sizes they need such loads stay empty, and so do loads on an outline that could
/// not be read.
std::vector<LoadReading> read_loads(const Table& document, const PlateSizes& plate,
                                    const OutlineReading& outline, const std::vector<std::string_view>& holes,
                                    const std::vector<std::string_view>& cracks);

/// The loads of one [[pin]]: one, or one for each hole of a row. An empty one
/// where it could not be read.
std::vector<std::optional<solver::Load>> read_pin(const Table& table,
                                                  const std::vector<std::string_view>& holes);

/// A support as far as it could be read, and its place.
struct SupportReading {
  std::optional<solver::Support> support;
  Position at;
};
std::vector<SupportReading> read_supports(const Table& document, const OutlineReading& outline);

/// What is asked for, in the order of [ask], then of [[ask.result]].
struct Question {
  double tolerance = 1e-3;
  double t_stress_tolerance = 1e-2;
  std::vector<solver::Ask> asks;
};
/// `raisers` are the names of the holes, then of what the outline has.
Question read_question(const Table& document, const std::vector<std::string_view>& holes,
                       const std::vector<std::string_view>& raisers,
                       const std::vector<std::string_view>& tips);

/// How to write a name, for messages: the first one's, if any.
std::string sample_of(const std::vector<std::string_view>& names, std::string_view otherwise = "hole 1");

/// The word for a quantity in case files: "largest edge stress", ...
std::string_view word(solver::Quantity quantity);

}  // namespace raiser::io
