#include "solver/growth/growth.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <optional>
#include <stdexcept>

#include "mesh/plate/grown.hpp"

namespace raiser::solver {
namespace {

/// Growing tips of the crack that the first tip belongs to.
double tips_of_first_crack(const std::vector<mesh::CrackTip>& tips, const GrowthPlan& plan) {
  const auto own = [&](std::size_t tip) { return tips[tip].crack == tips[plan.tips.front()].crack; };
  return static_cast<double>(std::count_if(plan.tips.begin(), plan.tips.end(), own));
}

/// Moves every growing tip by `advance`, turned by its angle.
void move_tips(std::vector<mesh::Crack>& cracks, const GrowthPlan& plan, double advance,
               const std::vector<double>& angles) {
  const std::vector<mesh::CrackTip> tips = mesh::tips(cracks);
  for (std::size_t i = 0; i < plan.tips.size(); ++i) {
    const mesh::CrackTip& tip = tips[plan.tips[i]];
    mesh::Crack& crack = cracks[tip.crack];
    crack = angles.empty() ? mesh::extended(std::move(crack), tip.at_end, advance)
                           : mesh::kinked(std::move(crack), tip.at_end, advance, angles[i]);
  }
}

void keep(GrowthStep& step, const Solution& solution, const GrowthPlan& plan,
          const std::vector<mesh::CrackTip>& tips) {
  const bool is_settled = solution.status == Solution::Status::settled;
  step.status = is_settled ? GrowthStep::Status::settled : GrowthStep::Status::not_met;
  step.reason = solution.reason;
  step.degree = solution.degree;
  step.triangles = solution.triangles;
  step.unknowns = solution.unknowns;
  step.seconds = solution.seconds;
  for (const std::size_t tip : plan.tips) {
    step.tips.push_back(solution.combined.tips[tip]);
    step.is_closed = step.is_closed || solution.openings[tips[tip].crack].is_closed();
  }
}

GrowthStep solve(const Problem& problem, const GrowthPlan& plan, double length) {
  GrowthStep step;
  step.length = length;
  const std::vector<mesh::CrackTip> tips = mesh::tips(problem.plate.cracks);
  for (const std::size_t tip : plan.tips) step.at.push_back(tips[tip].at);
  if (const auto found = mesh::faults(problem.plate); !found.empty()) {
    step.reason = found.front().what;
    return step;
  }
  std::vector<Ask> asks;
  for (const std::size_t tip : plan.tips)
    asks.push_back({Quantity::stress_intensity, tip, plan.tolerance, ""});
  try {
    keep(step, settle(problem, asks, Report::brief), plan, tips);
  } catch (const std::exception& error) {
    step.reason = error.what();
  }
  return step;
}

/// The turn of each tip after a step, or why there is none.
std::optional<std::vector<double>> turns(const GrowthStep& step, std::string& why) {
  std::vector<double> result;
  for (const TipFindings& tip : step.tips) {
    if (!tip.kink_angle) {
      why = "the loads do not open the crack at the step before, and give it no direction";
      return std::nullopt;
    }
    const bool is_straight = std::abs(tip.k_two.value) <= tip.k_two.bound;
    result.push_back(is_straight ? 0.0 : *tip.kink_angle);
  }
  if (result.empty()) {
    why = fmt::format("the path ends at the step before, of {:.6g} mm, which was not solved", step.length);
    return std::nullopt;
  }
  return result;
}

GrowthStep not_solved(double length, std::string reason) {
  GrowthStep step;
  step.length = length;
  step.reason = std::move(reason);
  return step;
}

void require_legal(const Problem& problem, const GrowthPlan& plan) {
  if (const auto found = faults(plan, problem.plate); !found.empty())
    throw std::invalid_argument("grow: " + found.front());
  if (const auto found = mesh::faults(problem.plate); !found.empty())
    throw std::invalid_argument("grow: the plate is not legal: " + found.front().what);
}

}  // namespace

std::vector<std::string> faults(const GrowthPlan& plan, const Plate& plate) {
  std::vector<std::string> found;
  const std::size_t tips = mesh::tips(plate.cracks).size();
  if (plan.tips.empty()) found.emplace_back("no tip is to grow");
  for (std::size_t i = 0; i < plan.tips.size(); ++i) {
    if (plan.tips[i] >= tips)
      found.push_back(fmt::format("there is no tip {}: the plate has {}", plan.tips[i] + 1, tips));
    if (std::count(plan.tips.begin(), plan.tips.begin() + static_cast<std::ptrdiff_t>(i), plan.tips[i]) > 0)
      found.push_back(fmt::format("tip {} is named twice", plan.tips[i] + 1));
  }
  if (plan.lengths.empty()) found.emplace_back("there is no length to grow to");
  for (std::size_t i = 0; i < plan.lengths.size(); ++i) {
    if (!(plan.lengths[i] > 0.0) || !std::isfinite(plan.lengths[i]))
      found.push_back(fmt::format("length {} is {} mm: it must be positive", i + 1, plan.lengths[i]));
    if (i > 0 && !(plan.lengths[i] > plan.lengths[i - 1]))
      found.push_back(
          fmt::format("length {} is {:.6g} mm, which is not longer than the one before, {:.6g} mm", i + 1,
                      plan.lengths[i], plan.lengths[i - 1]));
  }
  if (!(plan.tolerance > 0.0)) found.push_back(fmt::format("the tolerance is {}", plan.tolerance));
  return found;
}

std::vector<double> spaced(double from, double to, std::size_t count) {
  if (count < 2) throw std::invalid_argument("spaced: two lengths are the least");
  std::vector<double> result;
  const auto last = static_cast<double>(count - 1);
  for (std::size_t i = 0; i < count; ++i)
    result.push_back(i + 1 == count ? to : from + (to - from) * static_cast<double>(i) / last);
  return result;
}

Growth grow(const Problem& problem, const GrowthPlan& plan,
            const std::function<bool(const GrowthStep&)>& go_on) {
  require_legal(problem, plan);
  const std::vector<mesh::CrackTip> tips = mesh::tips(problem.plate.cracks);
  const double share = tips_of_first_crack(tips, plan);
  const double start = problem.plate.cracks[tips[plan.tips.front()].crack].length();
  Problem now = problem;
  Growth growth;
  for (std::size_t i = 0; i < plan.lengths.size(); ++i) {
    const double length = plan.lengths[i];
    std::string why;
    std::optional<std::vector<double>> angles = std::vector<double>();
    const bool is_turning = plan.path == GrowthPlan::Path::kinked && i > 0;
    if (is_turning) angles = turns(growth.steps.back(), why);
    if (!angles) {
      growth.steps.push_back(growth.steps.back().tips.empty() ? not_solved(length, growth.steps.back().reason)
                                                              : not_solved(length, std::move(why)));
    } else {
      try {
        if (!is_turning) now.plate.cracks = problem.plate.cracks;
        const double before = is_turning ? plan.lengths[i - 1] : start;
        move_tips(now.plate.cracks, plan, (length - before) / share, *angles);
        growth.steps.push_back(solve(now, plan, length));
        growth.cracks = now.plate.cracks;
      } catch (const std::invalid_argument& error) {
        growth.steps.push_back(not_solved(length, error.what()));
      }
    }
    if (go_on && !go_on(growth.steps.back())) break;
  }
  return growth;
}

}  // namespace raiser::solver
