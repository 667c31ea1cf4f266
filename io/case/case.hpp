#pragma once

#include <cstddef>
#include <filesystem>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "io/import/report.hpp"
#include "solver/solution.hpp"

namespace raiser::io {

/// The version of the case format that this program reads.
inline constexpr int case_format = 1;

/// Limits of the format, checked on reading.
inline constexpr std::size_t most_holes = 1000;
inline constexpr std::size_t most_cracks = 100;
inline constexpr std::size_t most_crack_points = 50;  ///< of one crack
inline constexpr std::size_t most_loads = 2000;
inline constexpr std::size_t most_bytes = 4 * 1024 * 1024;
inline constexpr double finest_tolerance = 1e-9;  ///< what double precision can give

/// A place in a text file; line and column count from 1, columns in characters.
struct Position {
  std::size_t line = 1;
  std::size_t column = 1;
  bool operator==(const Position&) const = default;
};

/// A case as read: legal, complete and balanced, every default filled in and
/// every quantity in mm, N, MPa or rad.
struct Case {
  std::string title;
  std::filesystem::path file;
  solver::Problem problem;
  std::vector<std::string> load_tables;  ///< by load, the path of its table: "load.1", "pin.1"
  std::vector<solver::Ask> asks;
  double tolerance = 1e-3;               ///< relative; of the asks that give none of their own
  double t_stress_tolerance = 1e-2;      ///< the same of those for a T-stress
  std::optional<double> yield_strength;  ///< MPa
  std::optional<std::string> alloy;      ///< find_alloy() has where its values come from
  /// What the author wrote for each value, by key path: "plate.width",
  /// "hole.2.diameter" (tables count from 1), "load.1.stress". A key that is
  /// absent was left to its default.
  std::map<std::string, std::string, std::less<>> written;
  /// By hole: which table [[hole]] it comes from, from 1; a row has one table. 0: it was imported.
  std::vector<std::size_t> hole_tables;
  std::optional<ImportReport> import;  ///< of a plate that comes from a drawing
  /// Where the origin of a drawn or imported outline came to lie, mm; all positions count
  /// from the middle of the bounding box.
  std::optional<mesh::Point> drawing_origin;
};

/// One fault of a case file: where, which value, what is wrong, what to do.
struct Diagnostic {
  /// input: the text breaks the format. geometry: the plate it describes is
  /// not legal. loads: the loads it describes do not balance.
  enum class Kind { input, geometry, loads };
  Kind kind = Kind::input;
  std::string file;
  std::optional<Position> position;  ///< none when the file as a whole is at fault
  std::string key;                   ///< path such as "hole.diameter"; may be empty
  std::string value;                 ///< as written, shortened; may be empty
  std::string what;
  std::string cure;
};

/// One line: "hanger.toml:12:9: hole.diameter = "18": a length needs a unit;
/// write e.g. "18 mm"".
std::string text(const Diagnostic& diagnostic);

/// The outcome of reading: a case, or every fault found, in the order of the
/// file. Exactly one of the two is filled.
struct CaseReading {
  std::optional<Case> value;
  std::vector<Diagnostic> faults;
};

/// Reads a case file. A file that is missing, unreadable, empty, binary or
/// larger than `most_bytes` is one fault and is not parsed.
CaseReading read_case(const std::filesystem::path& file);

/// Reads a case from text; `name` stands for the file in the faults.
CaseReading read_case_text(std::string_view content, const std::string& name);

}  // namespace raiser::io
