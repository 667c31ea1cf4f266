#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "io/write/result.hpp"

namespace raiser::io {

/// Where the results of one case go: folder / (stem + suffix).
struct Target {
  std::filesystem::path folder;
  std::string stem;
};

/// The target of a case: its own name in `folder`, or beside it when that is
/// empty.
Target target_of(const std::filesystem::path& case_file, const std::filesystem::path& folder);

/// What is added to the stem: ".vtu", ".json", "-edge.csv", …
const std::vector<std::string>& result_suffixes();

/// The table of several cases: in `folder`, or beside the first case when that
/// is empty. Requires at least one case.
std::filesystem::path summary_file(const std::vector<std::filesystem::path>& cases,
                                   const std::filesystem::path& folder);

/// Why the results of these cases would overwrite each other or a case file;
/// one line for each clash, empty when none would.
std::vector<std::string> clashes(const std::vector<std::filesystem::path>& cases,
                                 const std::filesystem::path& folder);

/// Writes every result file of one case, all of them or none; `json_text` is
/// json(result); with `charts` also those of edges and ligaments. Returns their
/// paths. Throws WriteError.
std::vector<std::filesystem::path> write_results(const Result& result, const std::string& json_text,
                                                 const Target& target, bool charts);

}  // namespace raiser::io
