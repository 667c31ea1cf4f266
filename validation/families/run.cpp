#include <algorithm>
#include <cmath>
#include <exception>

#include "validation/families.hpp"

namespace raiser::validation {

namespace {

Agreement agreement(const Published& from, const std::vector<Parameter>& parameters, double off,
                    double slack) {
  const double size = std::abs(off);
  if (!covers(from, parameters)) return Agreement::outside_range;
  if (from.claim && *from.claim == 0) return size <= slack ? Agreement::exact : Agreement::not_exact;
  if (from.claim) return size <= *from.claim + slack ? Agreement::within_claim : Agreement::beyond_claim;
  return size <= from.accuracy + slack ? Agreement::as_found : Agreement::not_as_found;
}

Ours solve(const FamilyPoint& point, double tolerance) {
  Ours failed;
  failed.is_settled = false;
  try {
    return point.solve(tolerance);
  } catch (const std::exception& e) {
    failed.reason = e.what();
  } catch (...) {  // a library may throw anything
    failed.reason = "a library failed without a reason";
  }
  return failed;
}

}  // namespace

HeldValue hold(const Cited& cited, const std::vector<Parameter>& parameters, const Ours& ours, double scale) {
  const Published& from = record(cited.reference);
  HeldValue held;
  held.reference = cited.reference;
  held.published = cited.value;
  held.scale = std::max(std::abs(ours.value->value), scale);
  held.off = (cited.value - ours.value->value) / held.scale;
  // Rounding alone leaves a trillionth.
  const double slack = ours.value->bound / held.scale + ours.model + 1e-12;
  held.agreement = agreement(from, parameters, held.off, slack);
  if (from.claim && *from.claim == 0) held.digits = -std::log10(std::max(std::abs(held.off), 1e-16));
  return held;
}

FamilyResult run(const Family& family, bool quick, const std::function<bool()>& stopped) {
  FamilyResult result;
  result.family = &family;
  const bool counts_digits = family.tolerance < 1e-6;  // exact sources: the digits are the point
  result.tolerance = quick && !counts_digits ? std::max(family.tolerance, 1e-4) : family.tolerance;
  for (const FamilyPoint& point : family.points) {
    if (stopped && stopped()) break;
    if (quick && !point.is_quick) continue;
    PointResult row{point.series, point.parameters, solve(point, result.tolerance), {}};
    if (row.ours.value)
      for (const Cited& cited : point.cited)
        row.held.push_back(hold(cited, point.parameters, row.ours, point.scale));
    result.points.push_back(std::move(row));
  }
  return result;
}

bool is_sound(const FamilyResult& result) {
  return std::all_of(result.points.begin(), result.points.end(), [](const PointResult& point) {
    const bool is_met = std::none_of(point.held.begin(), point.held.end(), [](const HeldValue& held) {
      return held.agreement == Agreement::not_exact;
    });
    return point.ours.value && point.ours.is_settled && is_met;
  });
}

}  // namespace raiser::validation
