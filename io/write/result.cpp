#include "io/write/result.hpp"

#include <algorithm>
#include <cmath>
#include <numeric>

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

}  // namespace

double peak(const solver::RaiserFindings& findings) {
  return std::max(std::abs(findings.largest.stress.value), std::abs(findings.smallest.stress.value));
}

std::vector<Answer> answers(const Case& input, const solver::Solution& solution) {
  std::vector<Answer> all;
  for (const solver::Ask& ask : input.asks) {
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

std::string_view words(solver::Quantity quantity) {
  switch (quantity) {
    case solver::Quantity::smallest_edge_stress:
      return "smallest edge stress";
    case solver::Quantity::von_mises:
      return "largest von Mises stress";
    case solver::Quantity::stress_intensity:
      return "stress intensity";
    case solver::Quantity::t_stress:
      return "T-stress";
    case solver::Quantity::largest_edge_stress:
      break;
  }
  return "largest edge stress";
}

std::string_view words(solver::Solution::Status status) {
  return status == solver::Solution::Status::settled ? "settled" : "not met";
}

std::vector<std::size_t> worst_first(const solver::LoadFindings& findings) {
  std::vector<std::size_t> order(findings.raisers.size());
  std::iota(order.begin(), order.end(), std::size_t{0});
  // Equal peaks, as of mirror images, keep the order of the case file.
  std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
    const double pa = peak(findings.raisers[a]), pb = peak(findings.raisers[b]);
    return pa > pb * (1 + 1e-9);
  });
  return order;
}

std::string_view solved_part(const mesh::Mirrors& mirrors) {
  if (mirrors.x && mirrors.y) return "a quarter of the plate";
  return mirrors.x || mirrors.y ? "half of the plate" : "the whole plate";
}

}  // namespace raiser::io
