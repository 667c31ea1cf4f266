#include "io/picture/from_growth.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "io/write/crack_words.hpp"
#include "io/write/layout.hpp"

namespace raiser::io {
namespace {

void add_limits(const solver::NotchLimits& limits, const ChartCurve& k, Chart& chart) {
  const auto highest = std::max_element(k.points.begin(), k.points.end(),
                                        [](const Point& a, const Point& b) { return a.y() < b.y(); });
  ChartCurve brief{"short crack", {}}, extended{"long crack", {}};
  for (const Point& p : k.points) {
    // Far beyond K the limits say nothing and would flatten the curve.
    const double low = limits.short_crack(p.x()) / root_metre, high = limits.long_crack(p.x()) / root_metre;
    if (low <= 1.3 * highest->y()) brief.points.emplace_back(p.x(), low);
    if (high <= 1.3 * highest->y()) extended.points.emplace_back(p.x(), high);
  }
  for (ChartCurve* curve : {&brief, &extended})
    if (curve->points.size() >= 2) chart.curves.push_back(std::move(*curve));
}

}  // namespace

bool has_chart(const GrowthResult& result) {
  return std::count_if(result.growth.steps.begin(), result.growth.steps.end(),
                       [](const solver::GrowthStep& step) { return !step.tips.empty(); }) >= 2;
}

Chart chart_of(const GrowthResult& result) {
  const mesh::Plate& plate = result.input.problem.plate;
  const mesh::CrackTip tip = mesh::tips(plate.cracks).at(result.plan.tips.at(0));
  Chart chart;
  chart.title = fmt::format("{}: stress intensity at {}", plain(result.input.title), tip_phrase(tip.name));
  chart.x_name = fmt::format("length of {}, mm", plain(mesh::label(plate.cracks, tip.crack)));
  chart.y_name = "K, MPa sqrt(m)";
  ChartCurve one{"K_I", {}}, two{"K_II", {}};
  bool has_sliding = false;
  for (const solver::GrowthStep& step : result.growth.steps) {
    if (step.tips.empty()) continue;
    one.points.emplace_back(step.length, step.tips.front().k_one.value / root_metre);
    const solver::Estimate& sliding = step.tips.front().k_two;
    two.points.emplace_back(step.length, sliding.value / root_metre);
    has_sliding = has_sliding || std::abs(sliding.value) > sliding.bound;
  }
  chart.curves = {one};
  if (has_sliding) chart.curves.push_back(two);  // else it is zero within its bound everywhere
  if (result.notch.limits) add_limits(*result.notch.limits, one, chart);
  chart.note = std::string("Linear elastic, two-dimensional; bounds are thinner than the lines unless the ") +
               "table says otherwise. The path is assumed, not predicted.";
  return chart;
}

}  // namespace raiser::io
