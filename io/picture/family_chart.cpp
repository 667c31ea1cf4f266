#include "io/picture/family_chart.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <span>
#include <stdexcept>

#include "io/picture/colours.hpp"
#include "io/picture/levels.hpp"
#include "io/picture/paint.hpp"
#include "io/write/file.hpp"

namespace raiser::io {
namespace {

constexpr double plot_height = 300.0;
constexpr double off_height = 130.0;
constexpr Ink covered_ink{0.945, 0.95, 0.93};
constexpr Ink claim_ink{0.80, 0.87, 0.87, 0.75};
constexpr Ink our_ink{0.05, 0.30, 0.33};

// Told apart by lightness, width and dash, not by hue alone.
struct Pen {
  Ink ink;
  double width;
  std::vector<double> dashes;
};
Pen pen(std::size_t source) {
  switch (source % 4) {
    case 0:
      return {stress_colour(0.45), 2.2, {}};
    case 1:
      return {stress_colour(0.70), 1.6, {8, 3}};
    case 2:
      return {stress_colour(0.90), 1.3, {3, 2}};
    default:
      return {ink::quiet, 1.3, {10, 3, 2, 3}};
  }
}

struct Panel {
  Box box;
  Point low, high;

  Spot on_paper(const Point& p) const {
    return {box.x + (p.x() - low.x()) / (high.x() - low.x()) * box.width,
            box.bottom() - (p.y() - low.y()) / (high.y() - low.y()) * box.height};
  }
};

void check(const FamilyChart& chart) {
  std::size_t marks = 0;
  const auto finite = [](const Point& p) {
    if (!p.allFinite()) throw std::invalid_argument("a chart's value is not finite");
  };
  for (const OurSeries& series : chart.ours)
    for (const OurMark& mark : series.marks) finite(mark.point), ++marks;
  for (const SourceTrace& trace : chart.traces)
    for (const Point& p : trace.points) finite(p);
  for (const OffTrace& trace : chart.off)
    for (const OurMark& mark : trace.marks) finite(mark.point);
  if (marks == 0) throw std::invalid_argument("a chart of a family needs points of ours");
}

struct Range {
  double low = 0.0, high = 0.0;
  bool is_empty = true;
  void take(double value) {
    low = is_empty ? value : std::min(low, value);
    high = is_empty ? value : std::max(high, value);
    is_empty = false;
  }
  // Round limits with a little air; never of no width.
  std::pair<double, double> rounded(int wanted) const {
    const double air = 0.04 * std::max(high - low, 1e-3 * std::max(std::abs(high), std::abs(low)));
    const auto levels = round_levels(low - air, high + air, wanted);
    return {levels.front(), levels.back()};
  }
};

// Right of the plots, for the names of series.
double room_for_names(const FamilyChart& chart) {
  double widest = 0.0;
  for (const OurSeries& series : chart.ours) widest = std::max(widest, text_width(series.label, page::small));
  return widest > 0 ? widest + 12 : 0.0;
}

Panel upper(const FamilyChart& chart, double top) {
  Range x, y;
  for (const OurSeries& series : chart.ours)
    for (const OurMark& mark : series.marks) x.take(mark.point.x()), y.take(mark.point.y());
  for (const SourceTrace& trace : chart.traces)
    for (const Point& p : trace.points) x.take(p.x()), y.take(p.y());
  const auto [low, high] = y.rounded(8);
  const double air = x.high > x.low ? 0.02 * (x.high - x.low) : 0.5;
  if (x.low != 0) x.low -= air;
  x.high += air;
  const double left = page::margin + page::axis_left + 12;
  return {{left, top, page::width - page::margin - left - room_for_names(chart), plot_height},
          {x.low, low},
          {x.high, high}};
}

Panel lower(const FamilyChart& chart, const Panel& above) {
  Range y;
  y.take(0.0);
  for (const OffTrace& trace : chart.off)
    for (const OurMark& mark : trace.marks)
      y.take(mark.point.y() - mark.bound), y.take(mark.point.y() + mark.bound);
  const double widest = std::max(std::abs(y.low), std::abs(y.high));
  if (chart.claim && *chart.claim < 4 * widest) y.take(-*chart.claim), y.take(*chart.claim);
  const auto [low, high] = y.rounded(4);
  return {{above.box.x, above.box.bottom() + 22, above.box.width, off_height},
          {above.low.x(), low},
          {above.high.x(), high}};
}

void shade(Canvas& canvas, const Panel& panel, double from, double to, double low, double high,
           const Ink& ink) {
  const Spot a = panel.on_paper({std::max(from, panel.low.x()), std::min(high, panel.high.y())});
  const Spot b = panel.on_paper({std::min(to, panel.high.x()), std::max(low, panel.low.y())});
  if (b.x() <= a.x() || b.y() <= a.y()) return;
  canvas.rectangle({a.x(), a.y(), b.x() - a.x(), b.y() - a.y()});
  canvas.fill(ink);
}

// At the ticks of the y axis.
void draw_grid(Canvas& canvas, const Panel& panel) {
  for (const double y : ticks(panel.low.y(), panel.high.y(), static_cast<int>(panel.box.height / 21))) {
    canvas.move_to(panel.on_paper({panel.low.x(), y}));
    canvas.line_to(panel.on_paper({panel.high.x(), y}));
  }
  canvas.stroke({0.86, 0.86, 0.88}, 0.6);
}

void draw_line(Canvas& canvas, const Panel& panel, const std::vector<Point>& points, const Pen& style) {
  if (points.size() < 2) return;
  canvas.move_to(panel.on_paper(points.front()));
  for (std::size_t i = 1; i < points.size(); ++i) canvas.line_to(panel.on_paper(points[i]));
  canvas.stroke(style.ink, style.width, style.dashes);
}

// An open square: an entry of a source's table.
void draw_square(Canvas& canvas, const Spot& at, const Ink& ink, double half) {
  canvas.rectangle({at.x() - half, at.y() - half, 2 * half, 2 * half});
  canvas.stroke(ink, 1.3);
}

void draw_trace(Canvas& canvas, const Panel& panel, const SourceTrace& trace) {
  const Pen style = pen(trace.source);
  if (trace.is_table) {
    for (const Point& p : trace.points) draw_square(canvas, panel.on_paper(p), style.ink, 4.6);
    return;
  }
  const double slack = 1e-9 * (panel.high.x() - panel.low.x());
  std::vector<Point> before, inside, after;
  for (const Point& p : trace.points) {
    if (p.x() <= trace.valid_from + slack) before.push_back(p);
    if (p.x() >= trace.valid_from - slack && p.x() <= trace.valid_to + slack) inside.push_back(p);
    if (p.x() >= trace.valid_to - slack) after.push_back(p);
  }
  const Pen thin{style.ink, 0.8, {1.5, 2.5}};
  draw_line(canvas, panel, before, thin);
  draw_line(canvas, panel, after, thin);
  draw_line(canvas, panel, inside, style);
}

void draw_dot(Canvas& canvas, const Panel& panel, const OurMark& mark, const Ink& ink) {
  const Spot at = panel.on_paper(mark.point);
  const double reach = mark.bound / (panel.high.y() - panel.low.y()) * panel.box.height;
  if (reach > 2.6) {
    for (const double end : {-reach, reach}) {
      canvas.move_to(at);
      canvas.line_to(at + Spot(0, end));
      canvas.move_to(at + Spot(-3, end));
      canvas.line_to(at + Spot(3, end));
    }
    canvas.stroke(ink, 1.0);
  }
  canvas.circle(at, 2.6);
  canvas.fill(ink);
}

// Names of series at the right of the panel, level with their last points and kept apart.
void draw_names(Canvas& canvas, const Panel& panel, std::vector<std::pair<double, std::string>> names) {
  std::sort(names.begin(), names.end());
  const double step = page::small.size + 2;
  for (std::size_t i = 1; i < names.size(); ++i)
    names[i].first = std::max(names[i].first, names[i - 1].first + step);
  double limit = panel.box.bottom();
  for (std::size_t i = names.size(); i-- > 0; limit -= step) names[i].first = std::min(names[i].first, limit);
  for (const auto& [y, name] : names)
    canvas.text(name, {panel.box.right() + 8, y + 0.36 * page::small.size}, page::small, ink::text);
}

void draw_sample(Canvas& canvas, const FamilyChart& chart, std::size_t source, const Spot& at) {
  const auto is_of = [source](const SourceTrace& t) { return t.source == source; };
  const auto found = std::find_if(chart.traces.begin(), chart.traces.end(), is_of);
  if (found != chart.traces.end() && found->is_table) {
    draw_square(canvas, at + Spot(13, 0), pen(source).ink, 4.0);
    return;
  }
  canvas.move_to(at);
  canvas.line_to(at + Spot(26, 0));
  canvas.stroke(pen(source).ink, pen(source).width, pen(source).dashes);
}

// Rows of samples with their names above the plot; the height they take.
double draw_legend(Canvas& canvas, const FamilyChart& chart, double left, double top) {
  const double right = page::width - page::margin;
  double x = left, y = top + 6;
  const auto room = [&](const std::string& name) {
    const double width = 32 + text_width(name, page::small) + 18;
    if (x > left && x + width > right) x = left, y += 14;
    const Spot at(x, y);
    canvas.text(name, at + Spot(32, 0.36 * page::small.size), page::small, ink::text);
    x += width;
    return at;
  };
  for (std::size_t i = 0; i < chart.sources.size(); ++i)
    draw_sample(canvas, chart, i, room(chart.sources[i]));
  canvas.circle(room("computed here, with its bound where it can be seen") + Spot(13, 0), 2.6);
  canvas.fill(our_ink);
  if (chart.covered) {
    const Spot at = room("covered by every source shown");
    canvas.rectangle({at.x(), at.y() - 5, 26, 10});
    canvas.fill(covered_ink);
  }
  if (chart.claim) {
    const Spot at = room("accuracy claimed (the widest)");
    canvas.rectangle({at.x(), at.y() - 5, 26, 10});
    canvas.fill(claim_ink);
  }
  return y + 14 - top;
}

void draw_upper(Canvas& canvas, const FamilyChart& chart, const Panel& panel) {
  if (chart.covered)
    shade(canvas, panel, chart.covered->first, chart.covered->second, panel.low.y(), panel.high.y(),
          covered_ink);
  draw_grid(canvas, panel);
  draw_x_axis(canvas, panel.box, 0, {panel.low.x(), panel.high.x(), "", {}});
  draw_y_axis(canvas, panel.box, 0, {panel.low.y(), panel.high.y(), chart.y_name, {}});
  canvas.save();
  canvas.rectangle(panel.box.grown(5));
  canvas.clip();
  for (const SourceTrace& trace : chart.traces) draw_trace(canvas, panel, trace);
  for (const OurSeries& series : chart.ours)
    for (const OurMark& mark : series.marks) draw_dot(canvas, panel, mark, our_ink);
  canvas.restore();
  std::vector<std::pair<double, std::string>> names;
  for (const OurSeries& series : chart.ours)
    if (!series.label.empty() && !series.marks.empty())
      names.emplace_back(panel.on_paper(series.marks.back().point).y(), series.label);
  draw_names(canvas, panel, std::move(names));
}

void draw_lower(Canvas& canvas, const FamilyChart& chart, const Panel& panel) {
  if (chart.covered)
    shade(canvas, panel, chart.covered->first, chart.covered->second, panel.low.y(), panel.high.y(),
          covered_ink);
  if (chart.claim)
    shade(canvas, panel, panel.low.x(), panel.high.x(), -*chart.claim, *chart.claim, claim_ink);
  draw_grid(canvas, panel);
  draw_x_axis(canvas, panel.box, 0, {panel.low.x(), panel.high.x(), chart.x_name, {}});
  draw_y_axis(canvas, panel.box, 0, {panel.low.y(), panel.high.y(), "source off by, %", {}});
  canvas.move_to(panel.on_paper({panel.low.x(), 0}));
  canvas.line_to(panel.on_paper({panel.high.x(), 0}));
  canvas.stroke(our_ink, 1.0);
  std::vector<std::pair<double, std::string>> names;
  for (const OffTrace& trace : chart.off) {
    Pen style = pen(trace.source);
    style.width = 1.0;
    std::vector<Point> line;
    for (const OurMark& mark : trace.marks) line.push_back(mark.point);
    draw_line(canvas, panel, line, style);
    for (const OurMark& mark : trace.marks) draw_dot(canvas, panel, mark, style.ink);
    if (!trace.label.empty() && !trace.marks.empty())
      names.emplace_back(panel.on_paper(trace.marks.back().point).y(), trace.label);
  }
  draw_names(canvas, panel, std::move(names));
}

std::string drawn(const FamilyChart& chart, PaperKind kind) {
  check(chart);
  constexpr double text_width_available = page::width - 2 * page::margin;
  const std::vector<std::string> title = wrapped(chart.title, page::title, text_width_available);
  const std::vector<std::string> note = wrapped(chart.note, page::small, text_width_available);
  const double below_title = page::margin + page::title_step * static_cast<double>(title.size()) + 8;
  Canvas measure(PaperKind::svg, page::width, page::margin);  // the legend's height is known once drawn
  const double legend = draw_legend(measure, chart, page::margin, below_title);
  const Panel above = upper(chart, below_title + legend + 6), below = lower(chart, above);
  const double foot = below.box.bottom() + 52;
  Canvas canvas(kind, page::width, foot + 12.0 * static_cast<double>(note.size()) + page::margin / 2);
  for (std::size_t i = 0; i < title.size(); ++i)
    canvas.text(title[i],
                {page::margin, page::margin + page::title.size + page::title_step * static_cast<double>(i)},
                page::title, ink::text);
  draw_legend(canvas, chart, page::margin, below_title);
  draw_upper(canvas, chart, above);
  draw_lower(canvas, chart, below);
  for (std::size_t i = 0; i < note.size(); ++i)
    canvas.text(note[i], {page::margin, foot + 12.0 * static_cast<double>(i) + 6}, page::small, ink::quiet);
  return canvas.finish();
}

}  // namespace

void draw_family_chart_png(const FamilyChart& chart, const std::filesystem::path& file) {
  write_file(file, drawn(chart, PaperKind::png));
}

void draw_family_chart_svg(const FamilyChart& chart, const std::filesystem::path& file) {
  write_file(file, drawn(chart, PaperKind::svg));
}

}  // namespace raiser::io
