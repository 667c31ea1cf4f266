#include <fmt/format.h>

#include <algorithm>
#include <functional>
#include <limits>
#include <map>

#include "validation/calibrate.hpp"

namespace raiser::validation {

namespace {

using Trials = std::vector<const Trial*>;

bool is_peak(const Trial& trial) {
  return trial.what != Trial::What::edge_sample && trial.what != Trial::What::ligament_point;
}

/// The value below which `share` of them lie; 0 for none.
double quantile(std::vector<double> values, double share) {
  if (values.empty()) return 0.0;
  const auto last = static_cast<double>(values.size() - 1);
  const auto at = values.begin() + static_cast<std::ptrdiff_t>(share * last + 0.5);
  std::nth_element(values.begin(), at, values.end());
  return *at;
}

const char* words(Trial::What what) {
  switch (what) {
    case Trial::What::largest:
      return "largest edge stress";
    case Trial::What::smallest:
      return "smallest edge stress";
    case Trial::What::von_mises:
      return "largest von Mises stress";
    case Trial::What::edge_sample:
      return "edge samples";
    case Trial::What::ligament_point:
      return "ligament points";
  }
  return "";
}

std::string ligament_class(double ligament) {
  if (ligament < 0.05) return "ligament below 0.05 diameters";
  if (ligament < 0.2) return "ligament 0.05 to 0.2 diameters";
  if (ligament < 1.0) return "ligament 0.2 to 1 diameters";
  return "ligament of 1 diameter or more";
}

std::string row(const std::string& name, const Trials& trials) {
  const Tally t = tally(trials);
  return fmt::format("| {} | {} | {:.2f} % | {} | {} | {:.1f} | {:.0f} |\n", name, t.numbers,
                     100 * t.coverage(), t.numbers - t.within - t.undecided, t.undecided, t.median_ratio,
                     t.ratio_95);
}

std::string rows_by(const Trials& trials, const std::function<std::string(const Trial&)>& name) {
  std::map<std::string, Trials> groups;
  for (const Trial* trial : trials) groups[name(*trial)].push_back(trial);
  std::string text;
  for (const auto& [group, members] : groups) text += row(group, members);
  return text;
}

std::string coverage_table(const std::vector<PlateTrial>& plates) {
  std::string text =
      "| numbers | count | within | outside | undecided | median bound / error | 95 % |\n"
      "|---|---|---|---|---|---|---|\n";
  const Trials all = peaks(plates);
  text += row("**all**", all);
  Trials random, closed;
  std::map<std::string, Trials> by_stop;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials) {
      if (!is_peak(trial)) continue;
      (plate.truth == PlateTrial::Truth::closed_form ? closed : random).push_back(&trial);
      by_stop[fmt::format("stopped at degree {}, {} refinement{}", plate.degree, plate.refinements,
                          plate.refinements == 1 ? "" : "s")]
          .push_back(&trial);
    }
  text += row("truth: finer solution", random) + row("truth: closed form", closed);
  text += rows_by(all, [](const Trial& t) {
    return std::string(t.is_asked ? "asked (all loads together)" : "each unit load by itself");
  });
  text += rows_by(all, [](const Trial& t) { return std::string(words(t.what)); });
  text += rows_by(all, [](const Trial& t) { return "shape: " + t.shape; });
  text += rows_by(all, [](const Trial& t) { return "load: " + t.load; });
  text += rows_by(all, [](const Trial& t) { return ligament_class(t.ligament); });
  for (const auto& [stop, members] : by_stop) text += row(stop, members);
  return text;
}

std::string along_paths(const std::vector<PlateTrial>& plates) {
  Trials paths;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials)
      if (!is_peak(trial)) paths.push_back(&trial);
  return "\nStresses along edges and ligaments, whose bounds no tolerance is asked for:\n\n"
         "| numbers | count | within | outside | undecided | median bound / error | 95 % |\n"
         "|---|---|---|---|---|---|---|\n" +
         rows_by(paths, [](const Trial& t) { return std::string(words(t.what)); });
}

std::string misses(const std::vector<PlateTrial>& plates) {
  std::string text;
  for (const PlateTrial& plate : plates)
    for (const Trial& t : plate.trials) {
      const Verdict found = verdict(t);
      if (!is_peak(t) || found == Verdict::within) continue;
      text += fmt::format(
          "- {}, {} {}, hole {} ({}, ligament {:.3g}), {}, {}{}: value {:.6g}, error {:.2g}, bound {:.2g}, "
          "truth +- {:.1g} MPa\n",
          found == Verdict::outside ? "outside" : "undecided",
          plate.truth == PlateTrial::Truth::closed_form ? "closed form" : "seed", plate.seed, t.hole + 1,
          t.shape, t.ligament, words(t.what), t.load, t.is_asked ? "" : " alone", t.value, t.error, t.bound,
          t.doubt);
    }
  return "\nNumbers not surely within their bound:\n\n" + (text.empty() ? "none\n" : text);
}

std::string not_settled(const std::vector<PlateTrial>& plates) {
  std::string text;
  for (const PlateTrial& plate : plates)
    if (!plate.is_settled || plate.trials.empty())
      text += fmt::format("- seed {}: {}\n", plate.seed, plate.reason);
  return "\nPlates not settled or not compared:\n\n" + (text.empty() ? "none\n" : text);
}

std::string spread_row(const char* name, const std::vector<double>& values, double scale) {
  const auto at = [&](double share) { return quantile(values, share) * scale; };
  return fmt::format("| {} | {:.4g} | {:.4g} | {:.4g} | {:.4g} |\n", name, at(0.05), at(0.5), at(0.95),
                     at(1.0));
}

std::string costs(const std::vector<PlateTrial>& plates) {
  std::vector<double> seconds, unknowns, triangles, truth;
  for (const PlateTrial& plate : plates) {
    if (plate.truth == PlateTrial::Truth::closed_form || plate.triangles == 0) continue;
    seconds.push_back(plate.cpu_seconds);
    unknowns.push_back(static_cast<double>(plate.unknowns));
    triangles.push_back(static_cast<double>(plate.triangles));
    truth.push_back(static_cast<double>(plate.truth_unknowns));
  }
  return "\nCost of the random plates:\n\n| | 5 % | median | 95 % | largest |\n|---|---|---|---|---|\n" +
         spread_row("CPU time of a plate, mesh and report included, ms", seconds, 1e3) +
         spread_row("triangles", triangles, 1.0) +
         spread_row("unknowns at the stop (before condensation)", unknowns, 1.0) +
         spread_row("unknowns of the truth", truth, 1.0);
}

}  // namespace

double Tally::coverage() const {
  return numbers == 0 ? 1.0 : static_cast<double>(within) / static_cast<double>(numbers);
}

Tally tally(const Trials& trials) {
  Tally result;
  std::vector<double> ratios;
  for (const Trial* trial : trials) {
    ++result.numbers;
    const Verdict found = verdict(*trial);
    result.within += found == Verdict::within;
    result.undecided += found == Verdict::undecided;
    ratios.push_back(trial->bound / std::max(trial->error, std::numeric_limits<double>::min()));
  }
  result.median_ratio = quantile(ratios, 0.5);
  result.ratio_95 = quantile(ratios, 0.95);
  return result;
}

Trials peaks(const std::vector<PlateTrial>& plates) {
  Trials result;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials)
      if (is_peak(trial)) result.push_back(&trial);
  return result;
}

std::string calibration_report(const std::vector<PlateTrial>& plates) {
  const auto closed = std::count_if(plates.begin(), plates.end(), [](const PlateTrial& p) {
    return p.truth == PlateTrial::Truth::closed_form;
  });
  std::size_t settled = 0;
  for (const PlateTrial& plate : plates) settled += plate.is_settled;
  return fmt::format("{} random plates and {} plates with a closed form; {} of {} settled.\n\n",
                     plates.size() - static_cast<std::size_t>(closed), closed, settled, plates.size()) +
         coverage_table(plates) + along_paths(plates) + misses(plates) + not_settled(plates) + costs(plates);
}

}  // namespace raiser::validation
