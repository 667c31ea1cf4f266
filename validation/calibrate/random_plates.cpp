#include <algorithm>
#include <array>
#include <cmath>
#include <exception>
#include <stdexcept>

#include "mesh/triangulate/triangulate.hpp"
#include "validation/calibrate/trial.hpp"
#include "validation/random_drawn.hpp"
#include "validation/random_outline.hpp"
#include "validation/random_plate.hpp"

namespace raiser::validation {

namespace {

using solver::Problem;
using solver::Quantity;
using solver::Solution;

constexpr double far_below = 0.1;  // the truth's doubt over the bound

/// Meshes for the truth, from cheap to dear: factors on the sizes of the
/// standard rule, and whether every triangle is divided into four as well.
struct Finer {
  double turn;
  double growth;
  double joint;
  bool is_divided;
};
constexpr std::array finer{Finer{0.5, 0.75, 0.4, false}, Finer{0.42, 0.6, 0.3, false},
                           Finer{0.5, 0.75, 0.1, true}, Finer{0.35, 0.5, 0.05, true}};

mesh::Mesh finer_mesh(const Problem& problem, const Finer& factors) {
  mesh::SizeRule rule;
  rule.singular = solver::clamped_ends(problem.plate, problem.supports);
  rule.turn *= factors.turn / std::sqrt(problem.material.stretch());
  rule.growth *= factors.growth;
  rule.joint *= factors.joint;
  rule.end *= factors.joint;
  mesh::Mesh mesh = mesh::triangulate(mesh::trace(problem.plate), rule);
  return factors.is_divided ? divided(mesh) : mesh;
}

std::vector<solver::Ask> ask_everything(const mesh::Plate& plate) {
  std::vector<solver::Ask> asks;
  for (std::size_t h = 0; h < mesh::raiser_count(plate); ++h)
    for (std::size_t q = 0; q < solver::quantity_count; ++q)
      asks.push_back({static_cast<Quantity>(q), h, calibration_tolerance, ""});
  return asks;
}

void hold_peaks(const Problem& problem, const solver::LoadFindings& findings, std::size_t load_case,
                const std::string& load, const FinerSolution& truth, std::vector<Trial>& out) {
  for (const solver::RaiserFindings& hole : findings.raisers) {
    const std::array estimates{hole.largest.stress, hole.smallest.stress, hole.von_mises.stress};
    for (std::size_t q = 0; q < solver::quantity_count; ++q) {
      Trial trial = trial_at(problem.plate, hole.raiser, static_cast<Trial::What>(q));
      trial.load = load;
      trial.is_asked = load_case == 0;
      trial.scale = std::max(std::abs(estimates[0].value), std::abs(estimates[1].value));
      hold(trial, estimates[q], truth.extreme(load_case, hole.raiser, static_cast<Quantity>(q)));
      out.push_back(std::move(trial));
    }
  }
}

double edge_scale(const Solution& solution, std::size_t hole) {
  const solver::RaiserFindings& found = solution.combined.raisers[hole];
  return std::max(std::abs(found.largest.stress.value), std::abs(found.smallest.stress.value));
}

void hold_edges(const Problem& problem, const Solution& solution, const std::string& load,
                const FinerSolution& truth, std::vector<Trial>& out) {
  constexpr std::size_t every = 7;  // shares no factor with the ten samples a side
  for (std::size_t h = 0; h < solution.edges.size(); ++h)
    for (std::size_t i = 0; i < solution.edges[h].size(); i += every) {
      const solver::EdgeSample& sample = solution.edges[h][i];
      const auto known = truth.tangential(h, sample.point);
      if (!known) continue;
      Trial trial = trial_at(problem.plate, h, Trial::What::edge_sample);
      trial.load = load;
      trial.scale = edge_scale(solution, h);
      hold(trial, {sample.tangential, sample.bound}, *known);
      out.push_back(std::move(trial));
    }
}

/// The component that uses most of the bound stands for the point.
void hold_ligaments(const Problem& problem, const Solution& solution, const std::string& load,
                    const FinerSolution& truth, std::vector<Trial>& out) {
  for (const solver::Ligament& ligament : solution.ligaments)
    for (const solver::LigamentPoint& point : ligament.points) {
      const auto known = truth.stress(point.point);
      if (!known) continue;
      const std::array values{point.stress.xx, point.stress.yy, point.stress.xy};
      Trial worst;
      for (std::size_t c = 0; c < 3; ++c) {
        Trial trial = trial_at(problem.plate, ligament.raiser, Trial::What::ligament_point);
        hold(trial, {values[c], point.bound}, (*known)[c]);
        if (c == 0 || trial.error > worst.error) worst = trial;
      }
      worst.load = load;
      worst.scale = edge_scale(solution, ligament.raiser);
      out.push_back(std::move(worst));
    }
}

std::vector<Trial> hold_all(const Problem& problem, const Solution& solution, const FinerSolution& truth) {
  std::vector<Trial> trials;
  const std::vector<std::string> kind = kinds(problem);
  const std::string all = kind.size() == 1 ? kind.front() : "together";
  hold_peaks(problem, solution.combined, 0, all, truth, trials);
  if (kind.size() > 1)
    for (std::size_t l = 0; l < kind.size(); ++l)
      hold_peaks(problem, solution.units[l], l + 1, kind[l], truth, trials);
  hold_edges(problem, solution, all, truth, trials);
  hold_ligaments(problem, solution, all, truth, trials);
  return trials;
}

bool is_clear(const std::vector<Trial>& trials) {
  return std::all_of(trials.begin(), trials.end(), [](const Trial& t) {
    const bool is_peak = t.what != Trial::What::edge_sample && t.what != Trial::What::ligament_point;
    return !is_peak || t.doubt <= far_below * t.bound;
  });
}

/// Fills the trials. A mesh that cannot be made is left out; the reason says
/// so when that goes for all of them.
void hold_against_truth(const Problem& problem, const Solution& solution, PlateTrial& plate) {
  std::string failure;
  for (const Finer& factors : finer) {
    try {
      const FinerSolution truth(problem, finer_mesh(problem, factors));
      plate.truth_unknowns = truth.unknowns();
      plate.trials = hold_all(problem, solution, truth);
      if (is_clear(plate.trials)) return;
    } catch (const std::runtime_error& e) {
      failure = e.what();
    }
  }
  if (plate.trials.empty()) plate.reason = "not compared, no truth: " + failure;
}

PlateTrial try_plate(PlateTrial::Truth truth, std::uint64_t seed, Problem (*make)(std::uint64_t)) {
  PlateTrial plate;
  plate.seed = seed;
  plate.truth = truth;
  try {
    const Problem problem = make(seed);
    const double start = cpu_seconds();
    const Solution solution = solver::settle(problem, ask_everything(problem.plate));
    plate.cpu_seconds = cpu_seconds() - start;
    keep_cost(plate, solution);
    hold_against_truth(problem, solution, plate);
  } catch (const std::exception& e) {
    plate.is_settled = false;
    plate.reason = std::string("failed: ") + e.what();
  }
  return plate;
}

}  // namespace

PlateTrial try_random_plate(std::uint64_t seed) {
  return try_plate(PlateTrial::Truth::finer_solution, seed, random_plate);
}

PlateTrial try_outlined_plate(std::uint64_t seed) {
  return try_plate(PlateTrial::Truth::finer_outlined, seed, random_outlined_plate);
}

PlateTrial try_drawn_plate(std::uint64_t seed) {
  return try_plate(PlateTrial::Truth::finer_drawn, seed, random_drawn_plate);
}

std::vector<std::uint64_t> seeds_with_few_holes(std::size_t count, std::size_t most_holes) {
  std::vector<std::uint64_t> seeds;
  for (std::uint64_t seed = 0; seeds.size() < count; ++seed)
    if (random_plate(seed).plate.holes.size() <= most_holes) seeds.push_back(seed);
  return seeds;
}

}  // namespace raiser::validation
