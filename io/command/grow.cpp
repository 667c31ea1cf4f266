#include "io/command/grow.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <ostream>

#include "io/case/quantity.hpp"
#include "io/case/words.hpp"
#include "io/command/files.hpp"
#include "io/picture/from_growth.hpp"
#include "io/write/file.hpp"
#include "io/write/growth.hpp"
#include "io/write/layout.hpp"

namespace raiser::io {
namespace {

using solver::GrowthPlan;
using solver::GrowthStep;
using Faults = std::vector<std::string>;

constexpr std::size_t most_steps = 10000;

/// A name's place in a list; a fault that lists the names when it is none.
std::optional<std::size_t> find_name(const std::string& name, const std::vector<std::string>& names,
                                     std::string_view option, Faults& faults) {
  const auto at = std::find(names.begin(), names.end(), name);
  if (at != names.end()) return static_cast<std::size_t>(at - names.begin());
  const std::vector<std::string_view> known(names.begin(), names.end());
  const std::string_view near = nearest(name, known);
  faults.push_back(fmt::format("{} = \"{}\": the case has no such {}; {}", option, shown(name),
                               option == "--tip" ? "tip on the cracks that grow" : "crack",
                               is_near(name, near) ? fmt::format("did you mean \"{}\"?", shown(near))
                                                   : "it has " + shown(list(known), 200)));
  return std::nullopt;
}

std::optional<double> length(const std::string& option, const std::string& text, Faults& faults) {
  const auto parsed = parse_quantity(text, Dimension::length);
  if (const auto* fault = std::get_if<QuantityFault>(&parsed)) {
    faults.push_back(fmt::format("{} = \"{}\": {}; {}", option, shown(text), fault->what, fault->cure));
    return std::nullopt;
  }
  const double value = std::get<double>(parsed);
  if (value > 0.0) return value;
  faults.push_back(fmt::format("{} = \"{}\": a crack's length is positive; write e.g. {} \"20 mm\"", option,
                               shown(text), option));
  return std::nullopt;
}

/// The tips that grow: all those of the named cracks (the first crack of the case
/// when none is named), or only those that --tip names.
std::vector<std::size_t> chosen_tips(const GrowOptions& options, const mesh::Plate& plate, Faults& faults) {
  std::vector<std::string> names;
  for (const mesh::Crack& crack : plate.cracks) names.push_back(crack.name);
  std::vector<std::size_t> cracks;
  if (options.cracks.empty() && names.size() > 1)
    faults.emplace_back("the case has several cracks; name the one that grows with --crack NAME");
  if (options.cracks.empty()) cracks.push_back(0);
  for (const std::string& name : options.cracks)
    if (const auto at = find_name(name, names, "--crack", faults)) cracks.push_back(*at);
  const std::vector<mesh::CrackTip> all = mesh::tips(plate.cracks);
  std::vector<std::size_t> tips;
  std::vector<std::string> tip_names;
  for (const std::size_t crack : cracks)
    for (std::size_t t = 0; t < all.size(); ++t)
      if (all[t].crack == crack) {
        tips.push_back(t);
        tip_names.push_back(all[t].name);
      }
  if (options.tips.empty()) return tips;
  std::vector<std::size_t> named;
  for (const std::string& name : options.tips)
    if (const auto at = find_name(name, tip_names, "--tip", faults)) named.push_back(tips[*at]);
  return named;
}

std::optional<GrowthPlan> read_plan(const GrowOptions& options, const Case& input, Faults& faults) {
  const mesh::Plate& plate = input.problem.plate;
  if (plate.cracks.empty()) {
    faults.emplace_back("the case has no crack; write one as [[crack]]");
    return std::nullopt;
  }
  GrowthPlan plan;
  plan.tips = chosen_tips(options, plate, faults);
  plan.tolerance = input.tolerance;
  plan.path = options.kinked ? GrowthPlan::Path::kinked : GrowthPlan::Path::straight;
  const auto to = length("--to", options.to, faults);
  std::optional<double> from;
  if (!options.from.empty())
    from = length("--from", options.from, faults);
  else if (!plan.tips.empty())
    from = plate.cracks[mesh::tips(plate.cracks)[plan.tips.front()].crack].length();
  if (options.steps < 2 || options.steps > most_steps)
    faults.push_back(
        fmt::format("--steps {}: write a number of lengths from 2 to {}", options.steps, most_steps));
  if (from && to && *from >= *to)
    faults.push_back(
        fmt::format("--to = \"{}\": not longer than the first length, {:.6g} mm; write a longer one",
                    shown(options.to), *from));
  if (options.kinked && input.problem.material.orthotropy)
    faults.emplace_back(
        "--kinked: the criterion is one for isotropic plates and this one is orthotropic; grow it straight");
  if (!faults.empty()) return std::nullopt;
  plan.lengths = solver::spaced(*from, *to, options.steps);
  for (std::string& fault : solver::faults(plan, plate)) faults.push_back(std::move(fault));
  return faults.empty() ? std::optional(plan) : std::nullopt;
}

std::vector<std::filesystem::path> write_all(const GrowthResult& result, const std::string& document,
                                             const Target& target) {
  Staging staging(target.folder);
  const std::string stem = target.stem + "-grow";
  staging.add(stem + ".csv", growth_csv(result));
  staging.add(stem + ".json", document);
  if (has_chart(result)) {
    const Chart chart = chart_of(result);
    staging.add(stem + ".svg", [&chart](const std::filesystem::path& file) { draw_chart_svg(chart, file); });
    staging.add(stem + ".png", [&chart](const std::filesystem::path& file) { draw_chart_png(chart, file); });
  }
  return staging.publish();
}

/// The case and the plan, or how it ends.
std::optional<GrowthResult> prepare(const Options& options, std::ostream& err, Exit& code) {
  CaseReading reading = read_case(options.cases.front());
  code = Exit::illegal;
  for (const Diagnostic& fault : reading.faults) {
    if (fault.kind == Diagnostic::Kind::input) code = Exit::input;
    err << plain(text(fault)) << "\n";
  }
  if (!reading.value) return std::nullopt;
  Faults faults;
  std::optional<GrowthPlan> plan = read_plan(options.grow, *reading.value, faults);
  for (const std::string& fault : faults) err << "raiser grow: " << plain(fault) << "\n";
  code = Exit::usage;
  if (!plan) return std::nullopt;
  return GrowthResult{*std::move(reading.value),        *std::move(plan), {}, {}, {},
                      provenance(options.cases.front())};
}

/// Solves every length, then the factor and the limits.
void solve(GrowthResult& result, Progress& progress, const std::function<bool()>& stopped) {
  std::size_t done = 0;
  result.growth = solver::grow(result.input.problem, result.plan, [&](const GrowthStep& step) {
    progress.show(fmt::format("[{}/{}] {:.4g} mm", ++done, result.plan.lengths.size(), step.length));
    return !stopped();
  });
  progress.wipe();
  result.factor = solver::geometry_factor(result.input.problem, result.plan, result.growth);
  const std::size_t crack = mesh::tips(result.input.problem.plate.cracks)[result.plan.tips.front()].crack;
  result.notch = solver::notch_limits(result.input.problem, crack, result.plan.tolerance);
}

}  // namespace

Exit grow(const Options& options, Output& output, std::ostream& err, Progress& progress,
          const std::function<bool()>& stopped) {
  Exit code = Exit::settled;
  std::optional<GrowthResult> result = prepare(options, err, code);
  if (!result) return code;
  solve(*result, progress, stopped);
  const std::string document = growth_json(*result);
  if (options.json) output.say(document);
  if (!options.json && !options.quiet) output.say(growth_table(*result));
  code = Exit::settled;
  for (const GrowthStep& step : result->growth.steps)
    if (step.status != GrowthStep::Status::settled) code = Exit::not_met;
  try {
    if (options.files) {
      const auto files =
          write_all(*result, document, target_of(options.cases.front(), options.folder.value_or("")));
      if (!options.quiet)
        err << "Wrote " << files.size() << " files, " << plain(files.front().string())
            << " the first of them\n";
    }
  } catch (const WriteError& error) {
    err << error.what() << "\n";
    code = Exit::not_written;
  }
  code = output.ended(code, err);
  if (result->growth.steps.size() == result->plan.lengths.size()) return code;
  err << "raiser: interrupted; " << result->growth.steps.size() << " of " << result->plan.lengths.size()
      << " lengths are done and kept\n";
  return Exit::interrupted;
}

}  // namespace raiser::io
