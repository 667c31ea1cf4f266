#include "validation/calibrate/trial.hpp"

#include <algorithm>
#include <cmath>
#include <ctime>

#include "mesh/plate/distance.hpp"
#include "mesh/plate/section.hpp"
#include "validation/random_plate.hpp"

namespace raiser::validation {

namespace {

/// Of a hole, in diameters of the smaller hole beside it.
double smallest_ligament(const mesh::Plate& plate, std::size_t i) {
  const mesh::Hole& hole = plate.holes[i];
  double least = mesh::edge_distance(plate, hole) / mean_diameter(hole);
  for (std::size_t j = 0; j < plate.holes.size(); ++j)
    if (j != i) {
      const double unit = std::min(mean_diameter(hole), mean_diameter(plate.holes[j]));
      least = std::min(least, mesh::gap(hole, plate.holes[j]) / unit);
    }
  return least;
}

/// The shorter piece of material that begins or ends at the raiser on its net
/// section, over twice its smallest radius.
double net_ligament(const mesh::Plate& plate, std::size_t i) {
  const mesh::Raiser raiser = mesh::raiser(plate, i);
  double least = plate.width;
  for (const mesh::Interval& piece : mesh::material_along(plate, mesh::Direction::across, raiser.root.x()))
    if (piece.raiser_at_begin() == i || piece.raiser_at_end() == i)
      least = std::min(least, piece.end - piece.begin);
  return least / (2 * raiser.radius);
}

/// "notch U", "fillet undercut", "fillet of a free outline", ...
std::string shape_of(const mesh::Raiser& raiser) {
  const std::string kind(mesh::word(raiser.kind));
  if (raiser.notch) return kind + " " + std::string(mesh::word(raiser.notch->shape));
  if (raiser.fillet) return kind + " " + std::string(mesh::word(raiser.fillet->shape));
  return kind + " of a free outline";
}

}  // namespace

Trial trial_at(const mesh::Plate& plate, std::size_t raiser, Trial::What what) {
  Trial trial;
  trial.what = what;
  trial.hole = raiser;
  const bool is_hole = raiser < plate.holes.size();
  trial.shape = is_hole ? mesh::word(plate.holes[raiser].shape) : shape_of(mesh::raiser(plate, raiser));
  trial.ligament = is_hole ? smallest_ligament(plate, raiser) : net_ligament(plate, raiser);
  return trial;
}

void hold(Trial& trial, const solver::Estimate& estimate, const Known& truth) {
  trial.value = estimate.value;
  trial.bound = estimate.bound;
  trial.error = std::abs(estimate.value - truth.value);
  trial.doubt = truth.doubt;
}

std::vector<std::string> kinds(const solver::Problem& problem) {
  std::vector<std::string> result;
  bool has_edges = false;
  for (const solver::Load& load : problem.loads) {
    const bool is_edge = load.kind == solver::Load::Kind::edge;
    if (!is_edge || !has_edges) result.emplace_back(solver::word(load.kind));
    has_edges = has_edges || is_edge;
  }
  return result;
}

void keep_cost(PlateTrial& plate, const solver::Solution& solution) {
  plate.is_settled = solution.status == solver::Solution::Status::settled;
  plate.reason = solution.reason;
  plate.degree = solution.degree;
  plate.refinements = solution.levels.back().refinement;
  plate.triangles = solution.triangles;
  plate.unknowns = solution.unknowns;
}

double cpu_seconds() {
  timespec now{};
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &now);
  return static_cast<double>(now.tv_sec) + 1e-9 * static_cast<double>(now.tv_nsec);
}

Verdict verdict(const Trial& trial) {
  if (trial.error + trial.doubt <= trial.bound) return Verdict::within;
  return trial.error - trial.doubt > trial.bound ? Verdict::outside : Verdict::undecided;
}

}  // namespace raiser::validation
