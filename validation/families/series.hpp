#pragma once

#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "validation/families/question.hpp"

/// Families are made of series: plates at several values of the abscissa, each
/// beside the same sources.
namespace raiser::validation {

/// A source over the abscissa; `entries` where it is a table known at these only.
struct Source {
  Reference reference;
  std::function<std::optional<double>(double)> at;
  std::vector<double> entries = {};
};

/// One line of a family's chart.
struct Series {
  std::string name;                          ///< as FamilyPoint::series
  std::string_view parameter;                ///< the abscissa's name
  std::vector<double> at;                    ///< where plates are solved
  std::vector<double> quick;                 ///< those of them that the short run solves
  std::function<Question(double)> question;  ///< the plate at a value of the abscissa
  std::vector<Source> sources;               ///< each is cited where it has a value
  double from = 0.0, to = 1.0;               ///< the curves' range
  std::vector<Parameter> others = {};        ///< what else the sources' limits speak of
  double scale = 0.0;                        ///< as FamilyPoint::scale
};

/// Adds the points and the sources' curves of a series to a family.
void add_series(Family& family, const Series& series);

}  // namespace raiser::validation
