#pragma once

#include <string>
#include <vector>

#include "validation/families.hpp"

namespace raiser::io {

/// One family as a table for a terminal, at most 80 columns wide.
std::string family_table(const validation::FamilyResult& result);

/// What the columns and words of those tables mean, once for all.
std::string family_legend();

/// One line a family, and every source that does not keep what it claims.
std::string validation_summary(const std::vector<validation::FamilyResult>& results);

/// The whole run as Markdown; `charts` says whether the charts stand beside it.
std::string validation_page(const std::vector<validation::FamilyResult>& results, bool charts);

/// The whole run as a JSON document.
std::string validation_json(const std::vector<validation::FamilyResult>& results, bool is_quick);

}  // namespace raiser::io
