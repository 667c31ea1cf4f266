#pragma once

#include <string>
#include <vector>

#include "validation/families.hpp"

namespace raiser::io {

/// "d/W 0.5" or "r/c 0.2, c/W 0.3".
std::string parameters_text(const std::vector<validation::Parameter>& parameters);

/// "−0.64 %", with enough digits to say something; "0 %" below a billionth.
std::string off_text(double off);

/// Ours with its bound; "none: reason" where there is no value.
std::string ours_text(const validation::Ours& ours);

/// The records that a family cites, in the order of citing.
std::vector<validation::Reference> cited_by(const validation::Family& family);

/// A published value that its source does not keep: it claims more accuracy than it has.
struct Breach {
  const validation::FamilyResult* result = nullptr;
  validation::Reference reference;
  std::size_t points = 0;
  double worst = 0.0;  ///< off, the largest in magnitude
  std::string where;   ///< parameters of the worst
  validation::Agreement kind = validation::Agreement::beyond_claim;
};
/// One for each family and source that breaks its claim or what was known of it.
std::vector<Breach> breaches(const std::vector<validation::FamilyResult>& results);

/// Largest magnitude of `off` among what the sources cover; 0 for nothing.
double worst_off(const validation::FamilyResult& result);

}  // namespace raiser::io
