#pragma once

#include <filesystem>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "io/picture/picture.hpp"

namespace raiser::io {

/// A published solution over the abscissa: a curve, or the entries of a table.
struct SourceTrace {
  std::size_t source = 0;  ///< index into FamilyChart::sources
  std::vector<Point> points;
  bool is_table = false;
  double valid_from = 0.0;  ///< where its source covers it; drawn thin and dotted elsewhere
  double valid_to = 0.0;
};

/// Our number at one place with its bound, in the unit of the ordinate.
struct OurMark {
  Point point = Point::Zero();
  double bound = 0.0;
};

/// How far sources are off ours along one series, in per cent.
struct OffTrace {
  std::size_t source = 0;
  std::vector<OurMark> marks;  ///< y and bound in per cent
  std::string label;           ///< of the series; may be empty
};

/// Marks of one series and what they are called; the label may be empty.
struct OurSeries {
  std::string label;
  std::vector<OurMark> marks;
};

/// Published curves with our points, and below how far the sources are off. Plain data.
struct FamilyChart {
  std::string title;
  std::string x_name;
  std::string y_name;
  std::string note;
  std::vector<std::string> sources;
  std::vector<SourceTrace> traces;
  std::vector<OurSeries> ours;
  std::vector<OffTrace> off;
  std::optional<std::pair<double, double>> covered;  ///< the range that every source covers, shaded
  std::optional<double> claim;                       ///< per cent, the largest that a source claims; shaded
};

/// Draws the chart into a file, complete or not at all. Throws WriteError,
/// std::system_error, or std::invalid_argument for a chart without our points
/// or with values that are not finite.
void draw_family_chart_png(const FamilyChart& chart, const std::filesystem::path& file);
void draw_family_chart_svg(const FamilyChart& chart, const std::filesystem::path& file);

}  // namespace raiser::io
