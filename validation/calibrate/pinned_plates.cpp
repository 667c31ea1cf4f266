#include <algorithm>
#include <array>
#include <cmath>
#include <exception>
#include <stdexcept>
#include <string>
#include <utility>

#include "validation/calibrate/trial.hpp"
#include "validation/random_pins.hpp"

namespace raiser::validation {

namespace {

using solver::Load;
using solver::Problem;
using solver::Quantity;
using solver::Solution;

std::vector<solver::Ask> ask_holes(const mesh::Plate& plate, double tolerance) {
  std::vector<solver::Ask> asks;
  for (std::size_t h = 0; h < plate.holes.size(); ++h)
    for (std::size_t q = 0; q < solver::quantity_count; ++q)
      asks.push_back({static_cast<Quantity>(q), h, tolerance, ""});
  return asks;
}

/// "cosine pin", "neat pin", "pin with clearance", "pin with interference".
std::string kind_of(const Problem& problem) {
  const Load& pin = problem.loads.front();
  if (!pin.clearance) return "cosine pin";
  return *pin.clearance == 0  ? "neat pin"
         : *pin.clearance > 0 ? "pin with clearance"
                              : "pin with interference";
}

/// Two finer solutions: what they differ by is the doubt of the finest, as for
/// the other random plates. (Its own bounds of contact would not do: they stand
/// on a sequence that a looser tolerance often follows as far.)
struct Truth {
  Solution fine, finest;
};

void hold_holes(const Problem& problem, const Solution& solution, const Truth& truth, PlateTrial& plate) {
  for (std::size_t h = 0; h < problem.plate.holes.size(); ++h) {
    const auto values = [&](const Solution& s) {
      const solver::RaiserFindings& hole = s.combined.raisers[h];
      return std::array{hole.largest.stress, hole.smallest.stress, hole.von_mises.stress};
    };
    const auto found = values(solution), fine = values(truth.fine), finest = values(truth.finest);
    for (std::size_t q = 0; q < found.size(); ++q) {
      Trial trial = trial_at(problem.plate, h, static_cast<Trial::What>(q));
      trial.load = kind_of(problem);
      trial.scale = std::max(std::abs(finest[0].value), std::abs(finest[1].value));
      hold(trial, found[q], {finest[q].value, std::abs(finest[q].value - fine[q].value)});
      plate.trials.push_back(std::move(trial));
    }
  }
}

void hold_arcs(const Problem& problem, const Solution& solution, const Truth& truth, PlateTrial& plate) {
  for (std::size_t p = 0; p < solution.pins.size(); ++p) {
    const auto &arcs = solution.pins[p].arcs, &fine = truth.fine.pins.at(p).arcs,
               &finest = truth.finest.pins.at(p).arcs;
    if (arcs.size() != finest.size() || fine.size() != finest.size())
      throw std::runtime_error("a finer solution has other arcs of contact");
    for (std::size_t k = 0; k < arcs.size(); ++k) {
      const auto put = [&](Trial::What what, solver::Estimate solver::ContactArc::*which) {
        Trial trial = trial_at(problem.plate, problem.loads[solution.pins[p].load].hole, what);
        trial.load = kind_of(problem);
        trial.scale = finest[k].largest.value;
        const double known = (finest[k].*which).value;
        hold(trial, arcs[k].*which, {known, std::abs(known - (fine[k].*which).value)});
        plate.trials.push_back(std::move(trial));
      };
      put(Trial::What::contact_pressure, &solver::ContactArc::largest);
      if (arcs[k].all_round || fine[k].all_round || finest[k].all_round) continue;
      put(Trial::What::contact_end, &solver::ContactArc::begin);
      put(Trial::What::contact_end, &solver::ContactArc::end);
    }
  }
}

}  // namespace

PlateTrial try_pinned_plate(std::uint64_t seed) {
  PlateTrial plate;
  plate.seed = seed;
  plate.truth = PlateTrial::Truth::finer_pinned;
  try {
    const Problem problem = random_pinned_plate(seed);
    const double start = cpu_seconds();
    const Solution solution = solver::settle(problem, ask_holes(problem.plate, calibration_tolerance));
    plate.cpu_seconds = cpu_seconds() - start;
    keep_cost(plate, solution);
    if (!plate.is_settled) return plate;
    const auto finer = [&](double share) {
      return solver::settle(problem, ask_holes(problem.plate, share * calibration_tolerance));
    };
    Truth truth{{}, finer(0.02)};
    for (const double share : {0.004, 0.002}) {
      truth = {std::move(truth.finest), finer(share)};
      plate.truth_unknowns = truth.finest.unknowns;
      plate.trials.clear();
      hold_holes(problem, solution, truth, plate);
      hold_arcs(problem, solution, truth, plate);
      if (std::none_of(plate.trials.begin(), plate.trials.end(),
                       [](const Trial& t) { return verdict(t) == Verdict::undecided; }))
        break;
    }
  } catch (const std::exception& e) {
    plate.is_settled = false;
    plate.reason = std::string("failed: ") + e.what();
  }
  return plate;
}

}  // namespace raiser::validation
