#include "io/command/files.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <map>
#include <set>

#include "io/picture/from_result.hpp"
#include "io/write/csv.hpp"
#include "io/write/file.hpp"
#include "io/write/vtu.hpp"

namespace raiser::io {
namespace {

// One name for one place, whatever way it is written.
std::string place(const std::filesystem::path& path) {
  std::error_code error;
  std::filesystem::path found = std::filesystem::absolute(path, error);
  if (!error) found = std::filesystem::weakly_canonical(found, error);
  return error ? path.lexically_normal().string() : found.string();
}

void add_charts(const Result& result, const std::string& stem, Staging& staging) {
  constexpr std::size_t most = 20;
  const auto add = [&](const std::string& kind, std::size_t count, auto chart_of) {
    for (std::size_t i = 0; i < std::min(count, most); ++i)
      staging.add(fmt::format("{}-{}-{}.svg", stem, kind, i + 1),
                  [&result, chart_of, i](const std::filesystem::path& file) {
                    draw_chart_svg(chart_of(result, i), file);
                  });
  };
  add("edge", result.solution.edges.size(), edge_chart);
  add("ligament", result.solution.ligaments.size(), ligament_chart);
}

}  // namespace

Target target_of(const std::filesystem::path& case_file, const std::filesystem::path& folder) {
  return {folder.empty() ? case_file.parent_path() : folder, case_file.stem().string()};
}

const std::vector<std::string>& result_suffixes() {
  static const std::vector<std::string> suffixes{".vtu",      ".json",         ".png",     ".svg",
                                                 "-edge.csv", "-ligament.csv", "-tips.csv"};
  return suffixes;
}

std::filesystem::path summary_file(const std::vector<std::filesystem::path>& cases,
                                   const std::filesystem::path& folder) {
  return (folder.empty() ? cases.front().parent_path() : folder) / "summary.csv";
}

std::vector<std::string> clashes(const std::vector<std::filesystem::path>& cases,
                                 const std::filesystem::path& folder) {
  std::vector<std::string> found;
  std::map<std::string, std::filesystem::path> owners;
  std::set<std::string> inputs;
  for (const auto& file : cases) inputs.insert(place(file));
  if (cases.size() > 1 && inputs.count(place(summary_file(cases, folder))) != 0) {
    found.push_back(
        fmt::format("the summary would overwrite the case file {}; rename that case to end in .toml",
                    summary_file(cases, folder).string()));
  }
  for (const auto& file : cases) {
    const Target target = target_of(file, folder);
    const std::string base = place(target.folder / target.stem);
    const auto [owner, is_new] = owners.emplace(base, file);
    if (!is_new) {
      found.push_back(
          fmt::format("{} and {} would both write {}.json and the like; rename one, or solve them apart "
                      "with a different --out",
                      owner->second.string(), file.string(), (target.folder / target.stem).string()));
    }
    for (const std::string& suffix : result_suffixes()) {
      if (inputs.count(base + suffix) == 0) continue;
      found.push_back(fmt::format("{} would overwrite the case file {}; rename that case to end in .toml",
                                  file.string(), (target.folder / (target.stem + suffix)).string()));
    }
  }
  return found;
}

std::vector<std::filesystem::path> write_results(const Result& result, const std::string& json_text,
                                                 const Target& target, bool charts) {
  Staging staging(target.folder);
  const std::string& stem = target.stem;
  staging.add(stem + ".vtu", vtu(cells_of(result.solution.field), result.provenance));
  staging.add(stem + ".json", json_text);
  const Picture picture = picture_of(result);
  staging.add(stem + ".png", [&](const std::filesystem::path& file) { draw_png(picture, file); });
  staging.add(stem + ".svg", [&](const std::filesystem::path& file) { draw_svg(picture, file); });
  staging.add(stem + "-edge.csv", edge_csv(result.input, result.solution));
  staging.add(stem + "-ligament.csv", ligament_csv(result.input, result.solution));
  if (charts) add_charts(result, stem, staging);
  if (!result.input.problem.plate.cracks.empty()) staging.add(stem + "-tips.csv", tips_csv(result));
  return staging.publish();
}

}  // namespace raiser::io
