#include <array>
#include <cmath>
#include <exception>
#include <string>

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

Known known(const solver::Estimate& estimate) { return {estimate.value, estimate.bound}; }

void hold_holes(const Problem& problem, const Solution& solution, const Solution& truth, PlateTrial& plate) {
  for (std::size_t h = 0; h < problem.plate.holes.size(); ++h) {
    const auto values = [&](const Solution& s) {
      const solver::RaiserFindings& hole = s.combined.raisers[h];
      return std::array{hole.largest.stress, hole.smallest.stress, hole.von_mises.stress};
    };
    const auto found = values(solution), exact = values(truth);
    for (std::size_t q = 0; q < found.size(); ++q) {
      Trial trial = trial_at(problem.plate, h, static_cast<Trial::What>(q));
      trial.load = kind_of(problem);
      trial.scale = std::max(std::abs(exact[0].value), std::abs(exact[1].value));
      hold(trial, found[q], known(exact[q]));
      plate.trials.push_back(std::move(trial));
    }
  }
}

void hold_pins(const Problem& problem, const Solution& solution, const Solution& truth, PlateTrial& plate) {
  for (std::size_t p = 0; p < solution.pins.size(); ++p) {
    const solver::PinFindings &found = solution.pins[p], &exact = truth.pins.at(p);
    const auto put = [&](Trial::What what, const solver::Estimate& value,
                         const solver::Estimate& known_value) {
      Trial trial = trial_at(problem.plate, problem.loads[found.load].hole, what);
      trial.load = kind_of(problem);
      trial.scale = exact.arcs.front().largest.value;
      hold(trial, value, known(known_value));
      plate.trials.push_back(std::move(trial));
    };
    for (std::size_t k = 0; k < found.arcs.size(); ++k) {
      const solver::ContactArc &arc = found.arcs[k], &known_arc = exact.arcs.at(k);
      put(Trial::What::contact_pressure, arc.largest, known_arc.largest);
      if (arc.all_round || known_arc.all_round) continue;
      put(Trial::What::contact_end, arc.begin, known_arc.begin);
      put(Trial::What::contact_end, arc.end, known_arc.end);
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
    // Not beyond what the pressure of contact can be found to.
    const double finer = problem.loads.front().clearance ? 0.02 : 0.005;
    const Solution truth = solver::settle(problem, ask_holes(problem.plate, finer * calibration_tolerance));
    plate.truth_unknowns = truth.unknowns;
    hold_holes(problem, solution, truth, plate);
    hold_pins(problem, solution, truth, plate);
  } catch (const std::exception& e) {
    plate.is_settled = false;
    plate.reason = std::string("failed: ") + e.what();
  }
  return plate;
}

}  // namespace raiser::validation
