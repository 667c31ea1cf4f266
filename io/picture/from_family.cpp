#include "io/picture/from_family.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

namespace raiser::io {
namespace {

using validation::Family;
using validation::FamilyCurve;
using validation::FamilyResult;
using validation::PointResult;
using validation::Reference;

constexpr int curve_steps = 160;

// The sources in the order in which the family's points cite them.
std::vector<Reference> sources_of(const Family& family) {
  std::vector<Reference> list;
  const auto add = [&list](Reference r) {
    if (std::find(list.begin(), list.end(), r) == list.end()) list.push_back(r);
  };
  for (const FamilyCurve& curve : family.curves) add(curve.reference);
  for (const auto& point : family.points)
    for (const auto& cited : point.cited) add(cited.reference);
  return list;
}

std::size_t index_of(const std::vector<Reference>& list, Reference reference) {
  return static_cast<std::size_t>(std::find(list.begin(), list.end(), reference) - list.begin());
}

// The limits that a source sets to the abscissa, if any.
std::optional<std::pair<double, double>> limits_on(const Family& family, Reference reference) {
  const auto& abscissa = family.points.front().parameters.front().name;
  for (const validation::Limit& limit : validation::record(reference).limits)
    if (limit.parameter == abscissa) return std::pair(limit.low, limit.high);
  return std::nullopt;
}

SourceTrace trace_of(const Family& family, const FamilyCurve& curve, std::size_t source) {
  const auto limits = limits_on(family, curve.reference).value_or(std::pair(curve.from, curve.to));
  SourceTrace trace{source, {}, curve.is_table, limits.first, limits.second};
  const auto add = [&](double x) {
    const auto y = curve.at(x);
    if (y && std::isfinite(*y)) trace.points.emplace_back(x, *y);
  };
  if (curve.is_table) {
    for (const double x : curve.points) add(x);
    return trace;
  }
  for (int k = 0; k <= curve_steps; ++k) add(curve.from + (curve.to - curve.from) * k / curve_steps);
  for (const double x : {limits.first, limits.second})
    if (x > curve.from && x < curve.to) add(x);
  std::sort(trace.points.begin(), trace.points.end(),
            [](const Point& a, const Point& b) { return a.x() < b.x(); });
  return trace;
}

std::optional<std::pair<double, double>> covered_by_all(const Family& family,
                                                        const std::vector<Reference>& sources) {
  std::optional<std::pair<double, double>> range;
  for (const Reference reference : sources)
    if (const auto limits = limits_on(family, reference))
      range = range
                  ? std::pair(std::max(range->first, limits->first), std::min(range->second, limits->second))
                  : *limits;
  if (range && !(range->second > range->first)) range.reset();
  return range;
}

std::optional<double> largest_claim(const std::vector<Reference>& sources) {
  std::optional<double> claim;
  for (const Reference reference : sources)
    if (const auto own = validation::record(reference).claim; own && *own > 0)
      claim = std::max(claim.value_or(0.0), 100 * *own);
  return claim;
}

void add_ours(FamilyChart& chart, const PointResult& point) {
  const auto is_same = [&](const OurSeries& s) { return s.label == point.series; };
  auto series = std::find_if(chart.ours.begin(), chart.ours.end(), is_same);
  if (series == chart.ours.end()) series = chart.ours.insert(chart.ours.end(), {point.series, {}});
  const double bound = std::isfinite(point.ours.value->bound) ? point.ours.value->bound : 0.0;
  series->marks.push_back({{point.parameters.front().value, point.ours.value->value}, bound});
}

void add_off(FamilyChart& chart, const PointResult& point, const std::vector<Reference>& sources) {
  for (const auto& held : point.held) {
    const std::size_t source = index_of(sources, held.reference);
    const auto is_same = [&](const OffTrace& t) { return t.source == source && t.label == point.series; };
    auto trace = std::find_if(chart.off.begin(), chart.off.end(), is_same);
    if (trace == chart.off.end()) trace = chart.off.insert(chart.off.end(), {source, {}, point.series});
    const double bound = 100 * point.ours.value->bound / held.scale;
    trace->marks.push_back(
        {{point.parameters.front().value, 100 * held.off}, std::isfinite(bound) ? bound : 0.0});
  }
}

}  // namespace

FamilyChart chart_of(const FamilyResult& result) {
  const Family& family = *result.family;
  const std::vector<Reference> sources = sources_of(family);
  FamilyChart chart;
  chart.title = family.title;
  chart.x_name = family.abscissa;
  chart.y_name = family.ordinate;
  chart.note = fmt::format("Computed on {}. Why sources differ: {}", family.reading, family.deviation);
  for (const Reference reference : sources) {
    const validation::Published& record = validation::record(reference);
    std::string name(record.name);
    if (record.from_memory) name += " (digits from memory)";
    chart.sources.push_back(std::move(name));
  }
  for (const FamilyCurve& curve : family.curves)
    chart.traces.push_back(trace_of(family, curve, index_of(sources, curve.reference)));
  for (const PointResult& point : result.points) {
    if (!point.ours.value) continue;
    add_ours(chart, point);
    add_off(chart, point, sources);
  }
  chart.covered = covered_by_all(family, sources);
  chart.claim = largest_claim(sources);
  return chart;
}

}  // namespace raiser::io
