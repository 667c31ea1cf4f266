#include "io/write/result.hpp"

#include <algorithm>
#include <cmath>
#include <iterator>
#include <numeric>

#include "solver/crack/factors.hpp"

namespace raiser::io {
namespace {

const solver::EdgeValue& value_of(const solver::RaiserFindings& found, solver::Quantity quantity) {
  switch (quantity) {
    case solver::Quantity::smallest_edge_stress:
      return found.smallest;
    case solver::Quantity::von_mises:
      return found.von_mises;
    case solver::Quantity::largest_edge_stress:
    case solver::Quantity::stress_intensity:
    case solver::Quantity::t_stress:
      break;
  }
  return found.largest;
}

double intensity(const solver::TipFindings& found) {
  return std::hypot(found.k_one.value, found.k_two.value);
}

/// Positions of values, the largest first; equal ones, as of mirror images,
/// keep their order.
std::vector<std::size_t> largest_first(const std::vector<double>& values) {
  std::vector<std::size_t> order(values.size());
  std::iota(order.begin(), order.end(), std::size_t{0});
  std::stable_sort(order.begin(), order.end(),
                   [&](std::size_t a, std::size_t b) { return values[a] > values[b] * (1 + 1e-9); });
  return order;
}

}  // namespace

double peak(const solver::RaiserFindings& findings) {
  return std::max(std::abs(findings.largest.stress.value), std::abs(findings.smallest.stress.value));
}

std::vector<Answer> answers(const Case& input, const solver::Solution& solution) {
  std::vector<Answer> all;
  for (const solver::Ask& ask : input.asks) {
    if (solver::is_at_tip(ask.quantity)) continue;
    const auto& raisers = solution.combined.raisers;
    const auto found = std::find_if(raisers.begin(), raisers.end(),
                                    [&](const auto& findings) { return findings.raiser == ask.raiser; });
    if (found == raisers.end()) continue;
    Answer answer{ask, value_of(*found, ask.quantity), ask.tolerance * peak(*found), false};
    answer.met = answer.value.stress.bound <= answer.allowed;
    all.push_back(answer);
  }
  return all;
}

std::vector<TipAnswer> tip_answers(const Case& input, const solver::Solution& solution) {
  const auto& tips = solution.combined.tips;
  std::vector<Eigen::Vector3d> k(tips.size());
  for (const solver::TipFindings& tip : tips)
    k.at(tip.tip) = {tip.k_one.value, tip.k_two.value, tip.t_stress.value};
  std::vector<TipAnswer> all;
  for (const solver::Ask& ask : input.asks) {
    if (!solver::is_at_tip(ask.quantity)) continue;
    const auto found =
        std::find_if(tips.begin(), tips.end(), [&](const auto& tip) { return tip.tip == ask.raiser; });
    if (found == tips.end()) continue;
    TipAnswer answer{ask, {found->k_one, found->k_two}, 0.0, false};
    if (ask.quantity == solver::Quantity::t_stress) answer.values = {found->t_stress};
    answer.allowed = solver::allowed_at_tip(input.problem.plate.cracks, k, ask);
    answer.met = std::all_of(answer.values.begin(), answer.values.end(),
                             [&](const auto& value) { return value.bound <= answer.allowed; });
    all.push_back(answer);
  }
  return all;
}

std::vector<solver::Load> loads_of(const Case& input, const solver::LoadFindings& findings) {
  const auto& loads = input.problem.loads;
  if (findings.name == "all loads") return loads;
  const bool edges = findings.name == "edges";
  std::vector<solver::Load> own;
  std::copy_if(loads.begin(), loads.end(), std::back_inserter(own), [&](const solver::Load& load) {
    return edges ? load.kind == solver::Load::Kind::edge : load.name == findings.name;
  });
  return own;
}

std::string_view words(solver::Quantity quantity) {
  switch (quantity) {
    case solver::Quantity::stress_intensity:
      return "stress intensity";
    case solver::Quantity::t_stress:
      return "T-stress";
    case solver::Quantity::smallest_edge_stress:
      return "smallest edge stress";
    case solver::Quantity::von_mises:
      return "largest von Mises stress";
    case solver::Quantity::largest_edge_stress:
      break;
  }
  return "largest edge stress";
}

std::string_view words(solver::Solution::Status status) {
  return status == solver::Solution::Status::settled ? "settled" : "not met";
}

std::vector<std::size_t> worst_first(const solver::LoadFindings& findings) {
  std::vector<double> peaks;
  for (const solver::RaiserFindings& found : findings.raisers) peaks.push_back(peak(found));
  return largest_first(peaks);
}

std::vector<std::size_t> worst_tips_first(const solver::LoadFindings& findings) {
  std::vector<double> sizes;
  for (const solver::TipFindings& found : findings.tips) sizes.push_back(intensity(found));
  return largest_first(sizes);
}

std::string_view solved_part(const mesh::Mirrors& mirrors) {
  if (mirrors.x && mirrors.y) return "a quarter of the plate";
  return mirrors.x || mirrors.y ? "half of the plate" : "the whole plate";
}

}  // namespace raiser::io
