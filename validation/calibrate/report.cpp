#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <functional>
#include <map>

#include "validation/calibrate.hpp"

namespace raiser::validation {

namespace {

using Trials = std::vector<const Trial*>;

bool is_peak(const Trial& trial) { return trial.what <= Trial::What::von_mises; }
bool is_at_tip(const Trial& trial) {
  return trial.what >= Trial::What::k_one && trial.what <= Trial::What::t_stress;
}
bool is_of_contact(const Trial& trial) { return trial.what >= Trial::What::contact_pressure; }
bool is_on_path(const Trial& trial) { return !is_peak(trial) && !is_at_tip(trial) && !is_of_contact(trial); }

/// The value below which `share` of them lie; 0 for none.
double quantile(std::vector<double> values, double share) {
  if (values.empty()) return 0.0;
  const auto last = static_cast<double>(values.size() - 1);
  const auto at = values.begin() + std::lround(share * last);
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
    case Trial::What::k_one:
      return "K_I";
    case Trial::What::k_two:
      return "K_II";
    case Trial::What::t_stress:
      return "T";
    case Trial::What::contact_pressure:
      return "largest contact pressure";
    case Trial::What::contact_end:
      return "end of an arc of contact";
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

constexpr const char* heading =
    "| numbers | count | within | outside | undecided | median bound / error | 95 % |\n"
    "|---|---|---|---|---|---|---|\n";

std::string stop_of(const PlateTrial& plate) {
  return fmt::format("stopped at degree {}, {} refinement{}", plate.degree, plate.refinements,
                     plate.refinements == 1 ? "" : "s");
}

std::string asked_or_not(const Trial& t) {
  return t.is_asked ? "asked (all loads together)" : "each unit load by itself";
}

std::string coverage_table(const std::vector<PlateTrial>& plates) {
  std::string text = heading;
  const Trials all = peaks(plates);
  if (all.empty()) return "";
  text += row("**all**", all);
  Trials random, closed;
  std::map<std::string, Trials> by_stop;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials) {
      if (!is_peak(trial) || plate.truth == PlateTrial::Truth::finer_pinned) continue;
      (plate.truth == PlateTrial::Truth::closed_form ? closed : random).push_back(&trial);
      by_stop[stop_of(plate)].push_back(&trial);
    }
  if (!random.empty() && !closed.empty())
    text += row("truth: finer solution", random) + row("truth: closed form", closed);
  text += rows_by(all, asked_or_not);
  text += rows_by(all, [](const Trial& t) { return std::string(words(t.what)); });
  text += rows_by(all, [](const Trial& t) { return "shape: " + t.shape; });
  text += rows_by(all, [](const Trial& t) { return "load: " + t.load; });
  text += rows_by(all, [](const Trial& t) { return ligament_class(t.ligament); });
  for (const auto& [stop, members] : by_stop) text += row(stop, members);
  return text;
}

std::string ligament_of_tip(double ligament) {
  if (ligament < 0.1) return "next edge nearer than 0.1 a";
  if (ligament < 0.5) return "next edge 0.1 to 0.5 a away";
  return "next edge 0.5 a away or more";
}

/// K and T at crack tips.
std::string tip_table(const std::vector<PlateTrial>& plates) {
  const Trials all = tip_values(plates);
  if (all.empty()) return "";
  std::string text = "\nK and T at crack tips:\n\n" + std::string(heading) + row("**all**", all);
  std::map<std::string, Trials> by_stop;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials)
      if (is_at_tip(trial)) by_stop[stop_of(plate)].push_back(&trial);
  text += rows_by(all, asked_or_not);
  text += rows_by(all, [](const Trial& t) { return std::string(words(t.what)); });
  text += rows_by(all, [](const Trial& t) { return t.shape; });
  text += rows_by(all, [](const Trial& t) { return "load: " + t.load; });
  text += rows_by(all, [](const Trial& t) { return ligament_of_tip(t.ligament); });
  for (const auto& [stop, members] : by_stop) text += row(stop, members);
  return text;
}

/// Plates with pins.
std::string pin_table(const std::vector<PlateTrial>& plates) {
  const Trials all = pin_values(plates);
  if (all.empty()) return "";
  std::string text = "\nPlates with pins:\n\n" + std::string(heading) + row("**all**", all);
  text += rows_by(all, [](const Trial& t) { return std::string(words(t.what)); });
  text += rows_by(all, [](const Trial& t) { return t.load; });
  text += rows_by(all, [](const Trial& t) { return ligament_class(t.ligament); });
  return text;
}

std::string along_paths(const std::vector<PlateTrial>& plates) {
  Trials paths;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials)
      if (is_on_path(trial)) paths.push_back(&trial);
  if (paths.empty()) return "";
  return "\nStresses along edges and ligaments, whose bounds no tolerance is asked for:\n\n" +
         std::string(heading) + rows_by(paths, [](const Trial& t) { return std::string(words(t.what)); });
}

/// What the plates of one truth are called: a single one in front of its seed, and all of them.
struct Naming {
  PlateTrial::Truth truth;
  const char* seed;
  const char* plural;
};
constexpr std::array namings{
    Naming{PlateTrial::Truth::finer_solution, "seed", "random plates"},
    Naming{PlateTrial::Truth::closed_form, "closed form", "plates with a closed form"},
    Naming{PlateTrial::Truth::finer_cracked, "cracked seed", "random plates with cracks"},
    Naming{PlateTrial::Truth::finer_outlined, "outlined seed", "random plates with notches and fillets"},
    Naming{PlateTrial::Truth::finer_drawn, "drawn seed", "random plates with drawn holes"},
    Naming{PlateTrial::Truth::finer_pinned, "pinned seed", "random plates with pins"},
};

const char* name_of(PlateTrial::Truth truth) {
  for (const Naming& naming : namings)
    if (naming.truth == truth) return naming.seed;
  return "";
}

const char* unit_of(Trial::What what) {
  if (what == Trial::What::contact_end) return "rad";
  return what == Trial::What::k_one || what == Trial::What::k_two ? "MPa sqrt(mm)" : "MPa";
}

std::string misses(const std::vector<PlateTrial>& plates) {
  std::string text;
  for (const PlateTrial& plate : plates)
    for (const Trial& t : plate.trials) {
      const Verdict found = verdict(t);
      if (is_on_path(t) || found == Verdict::within) continue;
      text += fmt::format(
          "- {}, {} {}, {} {} ({}, ligament {:.3g}), {}, {}{}: value {:.6g}, error {:.2g}, bound {:.2g}, "
          "truth +- {:.1g} {}\n",
          found == Verdict::outside ? "outside" : "undecided", name_of(plate.truth), plate.seed,
          is_at_tip(t) ? "tip" : "raiser", t.hole + 1, t.shape, t.ligament, words(t.what), t.load,
          t.is_asked ? "" : " alone", t.value, t.error, t.bound, t.doubt, unit_of(t.what));
    }
  return "\nNumbers not surely within their bound:\n\n" + (text.empty() ? "none\n" : text);
}

std::string not_settled(const std::vector<PlateTrial>& plates) {
  std::string text;
  for (const PlateTrial& plate : plates)
    if (!plate.is_settled || plate.trials.empty())
      text += fmt::format("- {} {}: {}\n", name_of(plate.truth), plate.seed, plate.reason);
  return "\nPlates not settled or not compared:\n\n" + (text.empty() ? "none\n" : text);
}

std::string spread_row(const char* name, const std::vector<double>& values, double scale) {
  const auto at = [&](double share) { return quantile(values, share) * scale; };
  return fmt::format("| {} | {:.4g} | {:.4g} | {:.4g} | {:.4g} |\n", name, at(0.05), at(0.5), at(0.95),
                     at(1.0));
}

std::string costs(const std::vector<PlateTrial>& plates, PlateTrial::Truth kind, const char* name) {
  std::vector<double> seconds, unknowns, triangles, truth;
  for (const PlateTrial& plate : plates) {
    if (plate.truth != kind || plate.triangles == 0) continue;
    seconds.push_back(plate.cpu_seconds);
    unknowns.push_back(static_cast<double>(plate.unknowns));
    triangles.push_back(static_cast<double>(plate.triangles));
    truth.push_back(static_cast<double>(plate.truth_unknowns));
  }
  if (seconds.empty()) return "";
  return fmt::format("\nCost of the {}:\n\n", name) +
         "| | 5 % | median | 95 % | largest |\n|---|---|---|---|---|\n" +
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
  constexpr double most_ratio = 1e6;
  Tally result;
  std::vector<double> ratios;
  for (const Trial* trial : trials) {
    ++result.numbers;
    const Verdict found = verdict(*trial);
    result.within += found == Verdict::within;
    result.undecided += found == Verdict::undecided;
    ratios.push_back(std::min(trial->bound / trial->error, most_ratio));  // the error may be 0
  }
  result.median_ratio = quantile(ratios, 0.5);
  result.ratio_95 = quantile(ratios, 0.95);
  return result;
}

Trials peaks(const std::vector<PlateTrial>& plates) {
  Trials result;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials)
      if (is_peak(trial) && plate.truth != PlateTrial::Truth::finer_pinned) result.push_back(&trial);
  return result;
}

Trials pin_values(const std::vector<PlateTrial>& plates) {
  Trials result;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials)
      if (plate.truth == PlateTrial::Truth::finer_pinned) result.push_back(&trial);
  return result;
}

Trials tip_values(const std::vector<PlateTrial>& plates) {
  Trials result;
  for (const PlateTrial& plate : plates)
    for (const Trial& trial : plate.trials)
      if (is_at_tip(trial)) result.push_back(&trial);
  return result;
}

std::string calibration_report(const std::vector<PlateTrial>& plates) {
  std::string counts, cost;
  for (const Naming& naming : namings) {
    const auto count = std::count_if(plates.begin(), plates.end(),
                                     [&](const PlateTrial& p) { return p.truth == naming.truth; });
    if (count == 0) continue;
    counts += fmt::format("{}{} {}", counts.empty() ? "" : ", ", count, naming.plural);
    if (naming.truth != PlateTrial::Truth::closed_form) cost += costs(plates, naming.truth, naming.plural);
  }
  const auto settled =
      std::count_if(plates.begin(), plates.end(), [](const PlateTrial& p) { return p.is_settled; });
  return fmt::format("{}; {} of {} settled.\n\n", counts, settled, plates.size()) + coverage_table(plates) +
         tip_table(plates) + pin_table(plates) + along_paths(plates) + misses(plates) + not_settled(plates) +
         cost;
}

}  // namespace raiser::validation
