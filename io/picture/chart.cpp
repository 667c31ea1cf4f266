#include "io/picture/chart.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <stdexcept>

#include "io/picture/colours.hpp"
#include "io/picture/levels.hpp"
#include "io/picture/paint.hpp"
#include "io/write/file.hpp"

namespace raiser::io {
namespace {

constexpr double plot_width = 700.0;
constexpr double plot_height = 300.0;

// Told apart by lightness and by dash, not by hue alone.
struct Pen {
  Ink ink;
  double width;
  std::vector<double> dashes;
};
Pen pen(std::size_t curve) {
  switch (curve % 3) {
    case 0:
      return {stress_colour(0.86), 2.0, {}};
    case 1:
      return {stress_colour(0.52), 1.6, {}};
    default:
      return {stress_colour(0.68), 1.4, {7, 3}};
  }
}

void check(const Chart& chart) {
  if (chart.curves.empty()) throw std::invalid_argument("a chart needs at least one curve");
  for (const ChartCurve& curve : chart.curves) {
    if (curve.points.size() < 2)
      throw std::invalid_argument("curve '" + curve.label + "' needs two points or more");
    for (const Point& p : curve.points)
      if (!p.allFinite())
        throw std::invalid_argument("curve '" + curve.label + "' has a value that is not finite");
  }
}

// The plot on the paper and the ranges it shows.
struct Plot {
  Box box;
  Point low, high;

  Spot on_paper(const Point& p) const {
    return {box.x + (p.x() - low.x()) / (high.x() - low.x()) * box.width,
            box.bottom() - (p.y() - low.y()) / (high.y() - low.y()) * box.height};
  }
};

Plot plot_of(const Chart& chart, double top) {
  Point low = chart.curves.front().points.front(), high = low;
  for (const ChartCurve& curve : chart.curves)
    for (const Point& p : curve.points) low = low.cwiseMin(p), high = high.cwiseMax(p);
  for (const ChartLevel& level : chart.levels)
    low.y() = std::min(low.y(), level.value), high.y() = std::max(high.y(), level.value);
  low.y() = std::min(low.y(), 0.0);
  high.y() = std::max(high.y(), 0.0);
  const double air = 0.06 * (high.y() - low.y());
  const std::vector<double> limits = round_levels(low.y() < 0 ? low.y() - air : 0.0, high.y() + air, 10);
  low.y() = limits.front();
  high.y() = limits.back();
  if (!(high.x() > low.x())) high.x() = low.x() + 1;
  return {{page::width - page::margin - plot_width - 24, top, plot_width, plot_height}, low, high};
}

void draw_grid(Canvas& canvas, const Plot& plot) {
  for (const double y : ticks(plot.low.y(), plot.high.y(), 12)) {
    canvas.move_to(plot.on_paper({plot.low.x(), y}));
    canvas.line_to(plot.on_paper({plot.high.x(), y}));
  }
  canvas.stroke({0.90, 0.90, 0.92}, 0.6);
  if (plot.low.y() >= 0) return;
  canvas.move_to(plot.on_paper({plot.low.x(), 0}));
  canvas.line_to(plot.on_paper({plot.high.x(), 0}));
  canvas.stroke(ink::quiet, 0.7);
}

void draw_curve(Canvas& canvas, const Plot& plot, const ChartCurve& curve, const Pen& style, Labels& labels) {
  Polyline line;
  for (const Point& p : curve.points) line.push_back(plot.on_paper(p));
  line = simplified(line, 0.05);
  canvas.move_to(line.front());
  for (std::size_t i = 1; i < line.size(); ++i) {
    canvas.line_to(line[i]);
    const Spot step = line[i] - line[i - 1];
    const int pieces = 1 + static_cast<int>(step.norm() / 5);
    for (int k = 0; k < pieces; ++k) labels.avoid(line[i - 1] + step * k / pieces);
  }
  canvas.stroke(style.ink, style.width, style.dashes);
}

void draw_level(Canvas& canvas, const Plot& plot, const ChartLevel& level, Labels& labels) {
  constexpr std::array<double, 2> dashes{3, 3};
  const Spot from = plot.on_paper({plot.low.x(), level.value}),
             to = plot.on_paper({plot.high.x(), level.value});
  canvas.move_to(from);
  canvas.line_to(to);
  canvas.stroke(ink::text, 0.8, dashes);
  for (double x = from.x(); x < to.x(); x += 5) labels.avoid({x, from.y()});
}

// A word on a line, at the place along it with the most room; no leader.
void draw_name(Canvas& canvas, const Plot& plot, const std::vector<Point>& along, const std::string& name,
               const Ink& ink, Labels& labels) {
  if (name.empty()) return;
  constexpr Font font = page::small;
  const double width = text_width(name, font);
  const auto box = labels.place_along(along, width + 4, font.size + 4, plot.box.grown(-2));
  if (!box) return;
  canvas.rectangle(*box);
  canvas.fill(ink::paper);
  canvas.text(name, {box->x + 2, box->bottom() - 3.5}, font, ink);
}

void draw_names(Canvas& canvas, const Chart& chart, const Plot& plot, Labels& labels) {
  for (const ChartLevel& level : chart.levels) {
    std::vector<Point> along;
    for (int i = 40; i >= 0; --i)
      along.push_back(plot.on_paper({plot.low.x() + (plot.high.x() - plot.low.x()) * i / 40, level.value}));
    draw_name(canvas, plot, along, level.label, ink::text, labels);
  }
  for (std::size_t i = 0; i < chart.curves.size(); ++i) {
    std::vector<Point> along;
    for (const Point& p : chart.curves[i].points) along.push_back(plot.on_paper(p));
    draw_name(canvas, plot, along, chart.curves[i].label, pen(i).ink, labels);
  }
}

std::string drawn(const Chart& chart, PaperKind kind) {
  check(chart);
  const std::vector<std::string> title = wrapped(chart.title, page::title, page::width - 2 * page::margin);
  const std::vector<std::string> note = wrapped(chart.note, page::small, page::width - 2 * page::margin);
  const double top = page::margin + page::title_step * static_cast<double>(title.size()) + 10;
  const Plot plot = plot_of(chart, top);
  const double foot = plot.box.bottom() + 48;
  Canvas canvas(kind, page::width, foot + 12.0 * static_cast<double>(note.size()) + page::margin / 2);
  for (std::size_t i = 0; i < title.size(); ++i)
    canvas.text(title[i],
                {page::margin, page::margin + page::title.size + page::title_step * static_cast<double>(i)},
                page::title, ink::text);
  for (std::size_t i = 0; i < note.size(); ++i)
    canvas.text(note[i], {page::margin, foot + 12.0 * static_cast<double>(i) + 6}, page::small, ink::quiet);
  draw_grid(canvas, plot);
  draw_x_axis(canvas, plot.box, 0, {plot.low.x(), plot.high.x(), chart.x_name, chart.x_step});
  draw_y_axis(canvas, plot.box, 0, {plot.low.y(), plot.high.y(), chart.y_name, {}});
  Labels labels;
  for (const ChartLevel& level : chart.levels) draw_level(canvas, plot, level, labels);
  for (std::size_t i = chart.curves.size(); i-- > 0;)
    draw_curve(canvas, plot, chart.curves[i], pen(i), labels);
  for (const PeakMark& mark : chart.marks) {
    const Spot at = plot.on_paper(mark.point);
    draw_mark(canvas, at, 3.4);
    labels.take({at.x() - 5, at.y() - 5, 10, 10});
  }
  for (const PeakMark& mark : chart.marks)
    draw_call_out(canvas, labels, plot.on_paper(mark.point), 3.4, mark.label, plot.box.grown(-3));
  draw_names(canvas, chart, plot, labels);
  return canvas.finish();
}

}  // namespace

void draw_chart_png(const Chart& chart, const std::filesystem::path& file) {
  write_file(file, drawn(chart, PaperKind::png));
}

void draw_chart_svg(const Chart& chart, const std::filesystem::path& file) {
  write_file(file, drawn(chart, PaperKind::svg));
}

}  // namespace raiser::io
