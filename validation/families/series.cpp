#include "validation/families/series.hpp"

#include <algorithm>

namespace raiser::validation {

void add_series(Family& family, const Series& series) {
  for (const double x : series.at) {
    FamilyPoint point{series.name, {{series.parameter, x}}, {}, series.question(x), false};
    point.parameters.insert(point.parameters.end(), series.others.begin(), series.others.end());
    for (const Source& source : series.sources)
      if (const auto value = source.at(x)) point.cited.push_back({source.reference, *value});
    point.is_quick = std::find(series.quick.begin(), series.quick.end(), x) != series.quick.end();
    point.scale = series.scale;
    family.points.push_back(std::move(point));
  }
  for (const Source& source : series.sources)
    family.curves.push_back({source.reference, series.name, source.at, series.from, series.to,
                             !source.entries.empty(), source.entries});
}

}  // namespace raiser::validation
