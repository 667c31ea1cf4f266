#include "io/command/validate.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <ostream>

#include "io/case/words.hpp"
#include "io/picture/from_family.hpp"
#include "io/write/file.hpp"
#include "io/write/layout.hpp"
#include "io/write/validation.hpp"

namespace raiser::io {
namespace {

using validation::Family;
using validation::FamilyResult;

// Every id that names no family, with the nearest that does.
std::vector<std::string> unknown_ids(const std::vector<std::string>& ids, const std::vector<Family>& all) {
  std::vector<std::string_view> known;
  for (const Family& family : all) known.push_back(family.id);
  std::vector<std::string> faults;
  for (const std::string& id : ids) {
    if (std::find(known.begin(), known.end(), id) != known.end()) continue;
    const std::string_view near = nearest(id, known);
    faults.push_back(fmt::format("\"{}\" is no family{}; raiser validate --list names them all", shown(id),
                                 is_near(id, near) ? fmt::format("; did you mean {}?", near) : ""));
  }
  return faults;
}

std::vector<Family> chosen(std::vector<Family> all, const std::vector<std::string>& ids) {
  if (ids.empty()) return all;
  std::vector<Family> list;
  for (Family& family : all)
    if (std::find(ids.begin(), ids.end(), family.id) != ids.end()) list.push_back(std::move(family));
  return list;
}

std::string list_of(const std::vector<Family>& all) {
  std::string text;
  for (const Family& family : all)
    text += wrapped(fmt::format("{} ({})", family.title, family.records), left(family.id, 27) + " ", 28);
  return text;
}

bool has_value(const FamilyResult& result) {
  return std::any_of(result.points.begin(), result.points.end(),
                     [](const auto& point) { return point.ours.value.has_value(); });
}

void write_all(const std::filesystem::path& folder, const std::vector<FamilyResult>& results,
               const std::string& document, std::ostream& err, const Options& options) {
  Staging staging(folder);
  staging.add("validation.md", validation_page(results, options.charts));
  staging.add("validation.json", document);
  for (const FamilyResult& result : results)
    if (options.charts && has_value(result))
      staging.add(result.family->id + ".svg", [&result](const std::filesystem::path& file) {
        draw_family_chart_svg(chart_of(result), file);
      });
  const auto files = staging.publish();
  if (!options.quiet)
    err << "Wrote " << files.size() << " files in " << plain(folder.string())
        << ", validation.md the first of them\n";
}

}  // namespace

Exit validate(const Options& options, Output& output, std::ostream& err, Progress& progress,
              const std::function<bool()>& stopped) {
  std::vector<Family> all = validation::families();
  const auto faults = unknown_ids(options.families, all);
  for (const std::string& fault : faults) err << "raiser validate: " << fault << "\n";
  if (!faults.empty()) return Exit::usage;
  if (options.list) {
    output.say(list_of(all));
    return output.ended(Exit::settled, err);
  }
  const std::vector<Family> families = chosen(std::move(all), options.families);
  const bool has_tables = !options.json && !options.quiet;
  std::vector<FamilyResult> results;
  for (const Family& family : families) {
    progress.show(fmt::format("[{}/{}] {}", results.size() + 1, families.size(), family.id));
    FamilyResult result = run(family, options.quick, stopped);
    progress.wipe();
    if (stopped()) break;
    if (has_tables) output.say(family_table(result) + "\n");
    results.push_back(std::move(result));
  }
  const bool is_interrupted = results.size() < families.size();
  const std::string document = validation_json(results, options.quick);
  if (options.json) output.say(document);
  if (has_tables) output.say(validation_summary(results) + "\n" + family_legend());
  const bool all_sound = std::all_of(results.begin(), results.end(), validation::is_sound);
  Exit code = all_sound ? Exit::settled : Exit::not_met;
  try {
    if (options.folder) write_all(*options.folder, results, document, err, options);
  } catch (const WriteError& error) {
    err << error.what() << "\n";
    code = Exit::not_written;
  }
  code = output.ended(code, err);
  if (!is_interrupted) return code;
  err << "raiser: interrupted; " << results.size() << " of " << families.size() << " families are done\n";
  return Exit::interrupted;
}

}  // namespace raiser::io
