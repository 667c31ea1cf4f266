#pragma once

#include <filesystem>
#include <optional>
#include <string>
#include <vector>

#include "io/picture/bands.hpp"
#include "io/picture/picture.hpp"

namespace raiser::io {

/// A curve of a chart: x and y in the units that the axes name.
struct ChartCurve {
  std::string label;
  std::vector<Point> points;
};

/// A constant to compare with, e.g. the nominal stress on the net section.
struct ChartLevel {
  std::string label;
  double value = 0.0;
};

/// Everything a line chart shows. Plain data.
struct Chart {
  std::string title;
  std::string x_name;            ///< e.g. "edge angle, degrees"
  std::string y_name;            ///< e.g. "stress, MPa"
  std::optional<double> x_step;  ///< distance of ticks, e.g. 45 for angles; a round one when empty
  std::vector<ChartCurve> curves;
  std::vector<ChartLevel> levels;
  std::vector<PeakMark> marks;  ///< point in chart coordinates
  std::string note;             ///< a line at the foot, may be empty
};

/// Draws the chart into a file, complete or not at all. Throws WriteError,
/// std::system_error, or std::invalid_argument for a chart without a curve of
/// two points or with values that are not finite.
void draw_chart_png(const Chart& chart, const std::filesystem::path& file);
void draw_chart_svg(const Chart& chart, const std::filesystem::path& file);

}  // namespace raiser::io
