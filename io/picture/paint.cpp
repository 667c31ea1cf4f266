#include "io/picture/paint.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

#include "io/picture/colours.hpp"
#include "io/picture/levels.hpp"

namespace raiser::io {
namespace {

constexpr Font number_font = page::small;
constexpr double tick_length = 4.0;

std::vector<double> positions(const Axis& axis, int at_most) {
  if (!axis.step) return ticks(axis.from, axis.to, at_most);
  std::vector<double> marks;
  for (double x = axis.from; x <= axis.to + 1e-9 * *axis.step; x += *axis.step) marks.push_back(x);
  return marks;
}

// As many round positions as leave their numbers apart along a width.
std::vector<double> spread(const Axis& axis, double width) {
  for (int at_most = std::max(1, static_cast<int>(width / 34)); at_most > 1; --at_most) {
    const std::vector<double> marks = positions(axis, at_most);
    if (marks.size() < 2) continue;
    double widest = 0.0;
    for (const double x : marks) widest = std::max(widest, text_width(tick_text(x), number_font));
    if (axis.step || (marks[1] - marks[0]) / (axis.to - axis.from) * width > widest + 10) return marks;
  }
  return positions(axis, 1);
}

void add_arc(Canvas& canvas, const mesh::Curve& curve, const View& view) {
  const double sweep = curve.end - curve.begin;
  const int pieces =
      std::max(1, static_cast<int>(std::ceil(std::abs(sweep) / (std::numbers::pi / 4) - 1e-9)));
  const double h = sweep / pieces;
  const double k = 4.0 / 3.0 * std::tan(h / 4);
  for (int i = 0; i < pieces; ++i) {
    const double t = curve.begin + i * h;
    const Point p = curve.at(t), q = curve.at(t + h);
    canvas.curve_to(view.on_paper(p + k * curve.derivative(t)),
                    view.on_paper(q - k * curve.derivative(t + h)), view.on_paper(q));
  }
}

}  // namespace

void draw_x_axis(Canvas& canvas, const Box& box, double away, const Axis& axis) {
  const double y = box.bottom() + away;
  const std::vector<double> marks = spread(axis, box.width);
  const auto place = [&](double value) {
    return box.x + (value - axis.from) / (axis.to - axis.from) * box.width;
  };
  canvas.move_to({box.x, y});
  canvas.line_to({box.right(), y});
  for (const double value : marks) {
    canvas.move_to({place(value), y});
    canvas.line_to({place(value), y + tick_length});
  }
  canvas.stroke(ink::quiet, 0.6);
  const double line = y + tick_length + number_font.size + 1;
  for (const double value : marks)
    canvas.text(tick_text(value), {place(value), line}, number_font, ink::quiet, Align::middle);
  canvas.text(axis.name, {box.x + box.width / 2, line + 1.25 * number_font.size + 2}, number_font, ink::quiet,
              Align::middle);
}

void draw_y_axis(Canvas& canvas, const Box& box, double away, const Axis& axis) {
  const double x = box.x - away;
  canvas.move_to({x, box.y});
  canvas.line_to({x, box.bottom()});
  const int at_most = std::max(1, static_cast<int>(box.height / 21));
  double widest = 0.0;
  for (const double value : positions(axis, at_most)) {
    const double y = box.bottom() - (value - axis.from) / (axis.to - axis.from) * box.height;
    canvas.move_to({x, y});
    canvas.line_to({x - tick_length, y});
    widest = std::max(widest, text_width(tick_text(value), number_font));
  }
  canvas.stroke(ink::quiet, 0.6);
  for (const double value : positions(axis, at_most)) {
    const double y = box.bottom() - (value - axis.from) / (axis.to - axis.from) * box.height;
    canvas.text(tick_text(value), {x - tick_length - 2, y + 0.36 * number_font.size}, number_font, ink::quiet,
                Align::right);
  }
  canvas.text(axis.name, {x - tick_length - widest - 8, box.y + box.height / 2}, number_font, ink::quiet,
              Align::middle, -std::numbers::pi / 2);
}

void add_outline(Canvas& canvas, const mesh::Region& region, const View& view) {
  for (const mesh::Loop& loop : region.loops) {
    canvas.move_to(view.on_paper(loop.front().at(loop.front().begin)));
    for (const mesh::Curve& curve : loop)
      if (curve.kind == mesh::Curve::Kind::line)
        canvas.line_to(view.on_paper(curve.at(curve.end)));
      else
        add_arc(canvas, curve, view);
    canvas.close();
  }
}

void draw_arrow(Canvas& canvas, const Spot& tail, const Spot& tip, const Ink& ink) {
  const Spot run = tip - tail;
  const double length = run.norm();
  if (length < 2.0) return;
  const Spot along = run / length;
  const Spot aside(-along.y(), along.x());
  const double head = std::min(6.0, 0.6 * length);
  canvas.move_to(tail);
  canvas.line_to(tip - 0.9 * head * along);
  canvas.stroke(ink, 1.1);
  canvas.move_to(tip);
  canvas.line_to(tip - head * along + 0.36 * head * aside);
  canvas.line_to(tip - head * along - 0.36 * head * aside);
  canvas.close();
  canvas.fill(ink);
}

void draw_mark(Canvas& canvas, const Spot& at, double radius) {
  canvas.circle(at, radius);
  canvas.stroke({1, 1, 1, 0.95}, 3.2);
  canvas.circle(at, radius);
  canvas.stroke(ink::text, 1.3);
  canvas.circle(at, 1.9);
  canvas.fill({1, 1, 1});
  canvas.circle(at, 1.2);
  canvas.fill(ink::text);
}

bool Labels::free(const Box& box) const {
  return std::none_of(taken_.begin(), taken_.end(), [&](const Box& b) { return b.overlaps(box.grown(1)); });
}

bool Labels::outside(const Box& box) const {
  for (const double x : {box.x, box.x + box.width / 2, box.right()})
    for (const double y : {box.y, box.y + box.height / 2, box.bottom()}) {
      bool inside = false;
      for (const std::vector<Spot>& polygon : polygons_)
        for (std::size_t i = 0; i < polygon.size(); ++i) {
          const Spot &p = polygon[i], &q = polygon[(i + 1) % polygon.size()];
          if ((p.y() > y) != (q.y() > y) && x < p.x() + (y - p.y()) / (q.y() - p.y()) * (q.x() - p.x()))
            inside = !inside;
        }
      if (inside) return false;
    }
  return true;
}

double Labels::covered(const Box& box) const {
  return static_cast<double>(std::count_if(avoided_.begin(), avoided_.end(), [&](const Spot& s) {
    return box.overlaps({s.x(), s.y(), 0, 0});
  }));
}

std::optional<Box> Labels::place(const Spot& target, const std::vector<Spot>& sizes, const Box& bounds) {
  std::optional<Box> best;
  double least = std::numeric_limits<double>::infinity();
  for (const Spot& size : sizes)
    for (const double away : {12.0, 20.0, 30.0, 42.0, 58.0, 78.0, 100.0, 130.0})
      for (int direction = 0; direction < 24; ++direction) {
        const double angle = direction * std::numbers::pi / 12 + 0.3;
        const Spot to(std::cos(angle), std::sin(angle));
        const Spot anchor = target + away * to;
        const Box box{anchor.x() - size.x() * (1 - to.x()) / 2, anchor.y() - size.y() * (1 - to.y()) / 2,
                      size.x(), size.y()};
        if (!bounds.holds(box) || !free(box)) continue;
        const double cost = away + 4.0 * covered(box.grown(3)) + (outside(box) ? 0.0 : 70.0);
        if (cost < least) least = cost, best = box;
      }
  if (best) take(*best);
  return best;
}

std::optional<Box> Labels::place_along(const std::vector<Spot>& along, double width, double height,
                                       const Box& bounds) {
  std::optional<Box> best;
  double least = std::numeric_limits<double>::infinity();
  for (const Spot& at : along)
    for (const double y : {at.y() - height - 2, at.y() + 2})
      for (const double x : {at.x() - width - 2, at.x() - width / 2, at.x() + 2}) {
        const Box box{x, y, width, height};
        if (!bounds.holds(box) || !free(box)) continue;
        const double cost = covered(box);
        if (cost < least) least = cost, best = box;
      }
  if (best) take(*best);
  return best;
}

void draw_call_out(Canvas& canvas, Labels& labels, const Spot& target, double radius, const std::string& text,
                   const Box& bounds) {
  constexpr Font font = page::body_bold;
  constexpr double step = font.size + 3;
  std::vector<Spot> sizes;
  std::vector<std::vector<std::string>> settings;
  double longest_word = 0.0;
  for (const std::string& word : wrapped(text, font, 0.0, Breaking::between_words))
    longest_word = std::max(longest_word, text_width(word, font));
  for (const double widest : {190.0, 150.0, 110.0}) {
    settings.push_back(wrapped(text, font, std::max(longest_word, std::min(widest, 0.8 * bounds.width))));
    double width = 0.0;
    for (const std::string& line : settings.back()) width = std::max(width, text_width(line, font));
    sizes.emplace_back(width + 10, step * static_cast<double>(settings.back().size()) + 6);
  }
  const auto box = labels.place(target, sizes, bounds);
  if (!box) return;
  const auto chosen = std::find_if(sizes.begin(), sizes.end(), [&](const Spot& size) {
    return size.x() == box->width && size.y() == box->height;
  });
  const Spot near(std::clamp(target.x(), box->x, box->right()),
                  std::clamp(target.y(), box->y, box->bottom()));
  const Spot from = target + radius * (near - target).normalized();
  for (const auto& [colour, width] : {std::pair(Ink{1, 1, 1, 0.8}, 2.6), std::pair(ink::text, 0.9)}) {
    canvas.move_to(from);
    canvas.line_to(near);
    canvas.stroke(colour, width);
  }
  canvas.rectangle(*box);
  canvas.fill(ink::paper);
  canvas.rectangle(*box);
  canvas.stroke(ink::text, 0.5);
  double y = box->y + font.size + 3;
  for (const std::string& line : settings[static_cast<std::size_t>(chosen - sizes.begin())]) {
    canvas.text(line, {box->x + 5, y}, font, ink::text);
    y += step;
  }
}

}  // namespace raiser::io
