#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <exception>
#include <numbers>
#include <stdexcept>

#include "mesh/region/region.hpp"
#include "mesh/triangulate/triangulate.hpp"
#include "validation/calibrate/trial.hpp"
#include "validation/random_cracks.hpp"

namespace raiser::validation {

namespace {

using solver::Problem;
using solver::Solution;
using What = Trial::What;

/// What the truth's mesh has beyond the standard one, from cheap to dear.
mesh::Mesh finer_mesh(const mesh::Plate& plate, int level) {
  mesh::SizeRule rule;
  rule.turn *= level == 0 ? 0.6 : 0.45;
  rule.growth *= level == 0 ? 0.7 : 0.55;
  rule.joint *= level == 0 ? 0.2 : 0.05;
  rule.ligament *= level == 0 ? 0.8 : 0.6;
  rule.tip_reach *= level == 0 ? 0.85 : 0.7;
  rule.tip_ratio = 0.15;
  rule.tip_rings = level == 0 ? 7 : 9;
  rule.tip_sectors = 12;
  return mesh::triangulate(mesh::trace(plate), rule);
}

std::vector<solver::Ask> ask_tips(const mesh::Plate& plate) {
  std::vector<solver::Ask> asks;
  for (std::size_t t = 0; t < mesh::tips(plate.cracks).size(); ++t)
    for (const auto q : {solver::Quantity::stress_intensity, solver::Quantity::t_stress})
      asks.push_back({q, t, calibration_tolerance, ""});
  return asks;
}

/// "crack inside", "crack from an edge", "crack from a hole", "kinked crack from a hole", …
std::string kind_of(const mesh::Plate& plate, const mesh::Crack& crack) {
  const char* from = "inside";
  if (crack.has_mouth) {
    const mesh::Point& p = crack.points.front();
    const double room = std::min(plate.length / 2 - std::abs(p.x()), plate.width / 2 - std::abs(p.y()));
    from = room < 1e-6 * plate.width ? "from an edge" : "from a hole";
  }
  return fmt::format("{} {}", crack.points.size() > 2 ? "kinked crack" : "crack", from);
}

/// By tip: the distance in mm to the next edge or crack, or to the crack's own next kink or end.
std::vector<double> room_at_tips(const mesh::Plate& plate) {
  std::vector<double> rooms(mesh::tips(plate.cracks).size());
  for (const mesh::RegionTip& tip : mesh::trace(plate).tips) rooms[tip.tip] = tip.reach;
  return rooms;
}

void hold_tips(const Problem& problem, const solver::LoadFindings& findings, std::size_t load_case,
               const std::string& load, const FinerSolution& truth, std::vector<Trial>& out) {
  const std::vector<mesh::CrackTip> tips = mesh::tips(problem.plate.cracks);
  const std::vector<double> rooms = room_at_tips(problem.plate);
  for (const solver::TipFindings& tip : findings.tips) {
    const mesh::Crack& crack = problem.plate.cracks[tips[tip.tip].crack];
    const double size = std::hypot(tip.k_one.value, tip.k_two.value);
    const double a = crack.length() * (crack.has_mouth ? 1.0 : 0.5);
    const std::array estimates{tip.k_one, tip.k_two, tip.t_stress};
    constexpr std::array what{What::k_one, What::k_two, What::t_stress};
    for (int q = 0; q < 3; ++q) {
      Trial trial;
      trial.what = what[q];
      trial.hole = tip.tip;
      trial.shape = kind_of(problem.plate, crack);
      trial.ligament = rooms[tip.tip] / a;
      trial.load = load;
      trial.is_asked = load_case == 0;
      trial.scale = q < 2 ? size : size / std::sqrt(std::numbers::pi * a);
      hold(trial, estimates[q], truth.tip(load_case, tip.tip, q));
      // Zero by symmetry, to rounding: there is nothing to hold a truth of some digits against.
      const bool is_zero = std::abs(trial.value) < 1e-11 * trial.scale && trial.error < 1e-6 * trial.scale;
      if (!is_zero) out.push_back(std::move(trial));
    }
  }
}

std::vector<Trial> hold_all(const Problem& problem, const Solution& solution, const FinerSolution& truth) {
  std::vector<Trial> trials;
  const std::vector<std::string> kind = kinds(problem);
  hold_tips(problem, solution.combined, 0, kind.size() == 1 ? kind.front() : "together", truth, trials);
  if (kind.size() > 1)
    for (std::size_t l = 0; l < kind.size(); ++l)
      hold_tips(problem, solution.units[l], l + 1, kind[l], truth, trials);
  return trials;
}

void hold_against_truth(const Problem& problem, const Solution& solution, PlateTrial& plate) {
  std::string failure;
  for (const int level : {0, 1}) {
    try {
      const FinerSolution truth(problem, finer_mesh(problem.plate, level));
      plate.truth_unknowns = truth.unknowns();
      plate.trials = hold_all(problem, solution, truth);
      const bool is_clear = std::all_of(plate.trials.begin(), plate.trials.end(),
                                        [](const Trial& t) { return t.doubt <= 0.1 * t.bound; });
      if (is_clear) return;
    } catch (const std::runtime_error& e) {
      failure = e.what();
    }
  }
  if (plate.trials.empty()) plate.reason = "not compared, no truth: " + failure;
}

}  // namespace

PlateTrial try_cracked_plate(std::uint64_t seed) {
  PlateTrial plate;
  plate.seed = seed;
  plate.truth = PlateTrial::Truth::finer_cracked;
  try {
    const Problem problem = random_cracked_plate(seed);
    const double start = cpu_seconds();
    const Solution solution = solver::settle(problem, ask_tips(problem.plate));
    plate.cpu_seconds = cpu_seconds() - start;
    keep_cost(plate, solution);
    hold_against_truth(problem, solution, plate);
  } catch (const std::exception& e) {
    plate.is_settled = false;
    plate.reason = std::string("failed: ") + e.what();
  }
  return plate;
}

}  // namespace raiser::validation
