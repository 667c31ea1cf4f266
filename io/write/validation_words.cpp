#include "io/write/validation_words.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "io/write/layout.hpp"

namespace raiser::io {

using validation::Agreement;
using validation::FamilyResult;
using validation::Reference;

std::string parameters_text(const std::vector<validation::Parameter>& parameters) {
  std::string text;
  for (const validation::Parameter& p : parameters)
    text += fmt::format("{}{} {}", text.empty() ? "" : ", ", p.name, brief(p.value, 4));
  return text;
}

std::string off_text(double off) {
  const double size = 100 * std::abs(off);
  if (size < 1e-9) return "0 %";
  const char* sign = off < 0 ? "-" : "+";
  if (size >= 0.095) return fmt::format("{}{:.{}f} %", sign, size, size < 9.95 ? 2 : 1);
  if (size >= 0.00095) return fmt::format("{}{:.{}f} %", sign, size, size < 0.0095 ? 3 : 2);
  return fmt::format("{}{:.0e} %", sign, size);
}

std::string ours_text(const validation::Ours& ours) {
  return ours.value ? with_bound(*ours.value) : "none: " + ours.reason;
}

std::vector<Reference> cited_by(const validation::Family& family) {
  std::vector<Reference> list;
  for (const auto& point : family.points)
    for (const auto& cited : point.cited)
      if (std::find(list.begin(), list.end(), cited.reference) == list.end()) list.push_back(cited.reference);
  return list;
}

std::vector<Breach> breaches(const std::vector<FamilyResult>& results) {
  std::vector<Breach> list;
  for (const FamilyResult& result : results)
    for (const Reference reference : cited_by(*result.family)) {
      Breach breach{&result, reference, 0, 0.0, "", Agreement::beyond_claim};
      for (const auto& point : result.points)
        for (const auto& held : point.held) {
          const bool is_broken =
              held.agreement == Agreement::beyond_claim || held.agreement == Agreement::not_as_found;
          if (held.reference != reference || !is_broken) continue;
          ++breach.points;
          breach.kind = held.agreement;
          if (std::abs(held.off) <= std::abs(breach.worst)) continue;
          breach.worst = held.off;
          breach.where = parameters_text(point.parameters);
        }
      if (breach.points > 0) list.push_back(std::move(breach));
    }
  return list;
}

double worst_off(const FamilyResult& result) {
  double worst = 0.0;
  for (const auto& point : result.points)
    for (const auto& held : point.held)
      if (held.agreement != Agreement::outside_range && std::abs(held.off) > std::abs(worst))
        worst = held.off;
  return worst;
}

}  // namespace raiser::io
