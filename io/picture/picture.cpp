#include "io/picture/picture.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <stdexcept>

#include "io/picture/colours.hpp"
#include "io/picture/layout.hpp"
#include "io/picture/levels.hpp"
#include "io/picture/paint.hpp"
#include "io/write/crack_words.hpp"
#include "io/write/file.hpp"
#include "io/write/layout.hpp"

namespace raiser::io {
namespace {

constexpr double longest_arrow = 24.0;
constexpr double tag_size = 13.0;

void check(const Picture& picture) {
  if (picture.cells.empty()) throw std::invalid_argument("a picture needs at least one cell");
  for (const PictureCell& cell : picture.cells) {
    const auto n = static_cast<std::size_t>(std::max(cell.subdivisions, 0));
    const std::size_t points = (n + 1) * (n + 2) / 2;
    if (n < 1 || cell.points.size() != points || cell.values.size() != points)
      throw std::invalid_argument(
          fmt::format("a cell with {} subdivisions needs {} points and values, not {} and {}",
                      cell.subdivisions, points, cell.points.size(), cell.values.size()));
  }
}

bool touches(const PictureCell& cell, const View& view) {
  Point low = cell.points.front(), high = low;
  for (const Point& p : cell.points) low = low.cwiseMin(p), high = high.cwiseMax(p);
  const Spot a = view.on_paper(low), b = view.on_paper(high);
  return view.box.grown(1).overlaps({a.x(), b.y(), b.x() - a.x(), a.y() - b.y()});
}

void add_lines(Canvas& canvas, const std::vector<Polyline>& lines, const View& view, bool closed) {
  for (const Polyline& line : lines) {
    const Polyline few = simplified(line, 0.12 / view.scale);
    if (few.size() < 2) continue;
    if (closed && std::abs(area({few})) * view.scale * view.scale < 0.02) continue;  // nothing to see
    canvas.move_to(view.on_paper(few.front()));
    for (std::size_t i = 1; i < few.size(); ++i) canvas.line_to(view.on_paper(few[i]));
    if (closed) canvas.close();
  }
}

Ink band_colour(std::size_t band, std::size_t bands) {
  return stress_colour(bands > 1 ? static_cast<double>(band) / static_cast<double>(bands - 1) : 0.5);
}

// Bands from the lowest up, each as the union of all that is higher, so that
// no seam can show between two of them; then the lines between them.
void draw_bands(Canvas& canvas, const Picture& picture, const View& view, const std::vector<double>& limits) {
  std::vector<PictureCell> seen;
  std::copy_if(picture.cells.begin(), picture.cells.end(), std::back_inserter(seen),
               [&](const PictureCell& cell) { return touches(cell, view); });
  std::vector<std::vector<Polyline>> lines;
  for (std::size_t i = 1; i + 1 < limits.size(); ++i) {
    LevelSet cut = cut_at(seen, limits[i], 0.3 / view.scale);
    add_lines(canvas, cut.region, view, true);
    canvas.fill(band_colour(i, limits.size() - 1));
    lines.push_back(std::move(cut.lines));
  }
  for (const auto& level : lines) add_lines(canvas, level, view, false);
  canvas.stroke(ink::iso_line, 0.45);
}

// An arrow as it stands on the paper; nothing where there is no room for it.
struct PaperArrow {
  Spot tail, tip;
};
std::optional<PaperArrow> on_paper(const LoadArrow& arrow, const View& view, double largest) {
  double length = longest_arrow;
  if (arrow.room) length = std::min(length, 0.8 * *arrow.room * view.scale);
  const double size = arrow.traction.norm();
  if (length < 7.0 || size < 0.02 * largest) return std::nullopt;
  length *= size / largest;
  const auto turned = [](const Point& x) { return Spot(x.x(), -x.y()); };
  const Spot along = turned(arrow.traction) / size, outward = turned(arrow.outward);
  const Spot foot = view.on_paper(arrow.at) + 2.5 * outward;
  const double pull = along.dot(outward);
  if (pull > 0.25) return PaperArrow{foot, foot + length * along};
  if (pull < -0.25) return PaperArrow{foot - length * along, foot};
  const Spot middle = foot + 4.5 * outward;
  return PaperArrow{middle - length / 2 * along, middle + length / 2 * along};
}

void draw_loads(Canvas& canvas, const Picture& picture, const View& view, Labels& labels) {
  double outer = 0.0, inner = 0.0;
  for (const LoadArrow& arrow : picture.arrows) {
    double& largest = arrow.room ? inner : outer;
    largest = std::max(largest, arrow.traction.norm());
  }
  for (const LoadArrow& arrow : picture.arrows) {
    const auto drawn = on_paper(arrow, view, arrow.room ? inner : outer);
    if (!drawn) continue;
    draw_arrow(canvas, drawn->tail, drawn->tip, ink::load);
    const Spot low = drawn->tail.cwiseMin(drawn->tip), high = drawn->tail.cwiseMax(drawn->tip);
    labels.take(Box{low.x(), low.y(), high.x() - low.x(), high.y() - low.y()}.grown(2));
  }
}

void draw_cracks(Canvas& canvas, const Picture& picture, const View& view) {
  for (const mesh::Crack& crack : picture.plate.cracks) {
    canvas.move_to(view.on_paper(crack.points.front()));
    for (std::size_t i = 1; i < crack.points.size(); ++i) canvas.line_to(view.on_paper(crack.points[i]));
  }
  canvas.stroke(ink::outline, 1.6);
}

// The bands reach a little into the holes, whose edges the triangles follow by
// chords: the holes are painted over afterwards, which costs less than a clip.
void draw_view(Canvas& canvas, const Picture& picture, const mesh::Region& region, const View& view,
               const std::vector<double>& limits) {
  const auto outer = region.loops.begin();
  canvas.save();
  canvas.rectangle(view.box.grown(0.6));
  canvas.clip();
  add_outline(canvas, {{*outer}, {}, {}}, view);
  canvas.fill(band_colour(0, limits.size() - 1));
  draw_bands(canvas, picture, view, limits);
  add_outline(canvas, {{outer + 1, region.loops.end()}, {}, {}}, view);
  canvas.fill({1, 1, 1});
  add_outline(canvas, region, view);
  canvas.stroke(ink::outline, 1.0);
  if (!picture.plate.cracks.empty()) draw_cracks(canvas, picture, view);
  canvas.restore();
}

void draw_bar(Canvas& canvas, const Picture& picture, const Box& bar, const std::vector<double>& limits) {
  const std::size_t bands = limits.size() - 1;
  const double step = bar.height / static_cast<double>(bands);
  for (std::size_t i = 0; i < bands; ++i) {
    canvas.rectangle({bar.x, bar.bottom() - static_cast<double>(i + 1) * step, bar.width, step});
    canvas.fill(band_colour(i, bands));
  }
  for (std::size_t i = 0; i <= bands; ++i) {
    const double y = bar.bottom() - static_cast<double>(i) * step;
    canvas.move_to({bar.x, y});
    canvas.line_to({bar.right() + 3, y});
    canvas.stroke(ink::iso_line, 0.45);
    const bool is_open = picture.top && i == bands;
    canvas.text(tick_text(limits[i]) + (is_open ? " and above" : ""), {bar.right() + 6, y + 3}, page::small,
                ink::text);
  }
  canvas.rectangle(bar);
  canvas.stroke(ink::outline, 0.7);
  canvas.text(picture.quantity + ", " + picture.unit, {bar.x - 4, bar.y - 10}, page::small, ink::text);
  if (picture.peaks.empty()) return;
  const double y = bar.bottom() - bar.height * position_on_bar(limits, picture.peaks.front().value);
  canvas.move_to({bar.x - 1.5, y});
  canvas.line_to({bar.x - 7.5, y - 3.2});
  canvas.line_to({bar.x - 7.5, y + 3.2});
  canvas.close();
  canvas.fill(ink::text);
}

// Labels had better not cover the outline or the highest stresses, and rather
// stand in a hole or beside the plate.
void prefer_blank(Labels& labels, const Picture& picture, const mesh::Region& region, const View& view,
                  const std::vector<double>& limits) {
  for (const mesh::Loop& loop : region.loops) {
    std::vector<Spot> polygon;
    for (const mesh::Curve& curve : loop)
      for (int i = 0; i < 24; ++i)
        polygon.push_back(view.on_paper(curve.at(curve.begin + (curve.end - curve.begin) * i / 24)));
    for (const Spot& spot : polygon) labels.avoid(spot);
    labels.prefer_outside(std::move(polygon));
  }
  for (const PictureCell& cell : picture.cells)
    for (const std::size_t corner :
         {std::size_t{0}, static_cast<std::size_t>(cell.subdivisions), cell.points.size() - 1})
      if (position_on_bar(limits, cell.values[corner]) > 0.6)
        labels.avoid(view.on_paper(cell.points[corner]));
}

void draw_peaks(Canvas& canvas, const Picture& picture, const View& view, const Box& bounds, Labels& labels,
                bool with_text) {
  const auto seen = [&](const PeakMark& peak) {
    const Spot p = view.on_paper(peak.point);
    return view.box.grown(0.5).holds({p.x(), p.y(), 0, 0});
  };
  for (std::size_t i = picture.peaks.size(); i-- > 0;) {
    if (!seen(picture.peaks[i])) continue;
    const Spot at = view.on_paper(picture.peaks[i].point);
    draw_mark(canvas, at, i == 0 ? 4.2 : 3.0);
    labels.take({at.x() - 6, at.y() - 6, 12, 12});
  }
  for (std::size_t i = 0; with_text && i < picture.peaks.size(); ++i)
    if (seen(picture.peaks[i]) && !picture.peaks[i].label.empty())
      draw_call_out(canvas, labels, view.on_paper(picture.peaks[i].point), i == 0 ? 4.2 : 3.0,
                    picture.peaks[i].label, bounds);
}

void draw_tips(Canvas& canvas, const Picture& picture, const View& view, const Box& bounds, Labels& labels) {
  constexpr double radius = 3.0;
  std::vector<const TipMark*> seen;
  for (const TipMark& tip : picture.tips) {
    const Spot at = view.on_paper(tip.point);
    if (!view.box.grown(0.5).holds({at.x(), at.y(), 0, 0})) continue;
    draw_mark(canvas, at, radius);
    labels.take({at.x() - 5, at.y() - 5, 10, 10});
    seen.push_back(&tip);
  }
  for (const TipMark* tip : seen)
    draw_call_out(canvas, labels, view.on_paper(tip->point), radius, tip->label, bounds);
}

void draw_axes(Canvas& canvas, const View& view, const Spot& away) {
  const Point half = Point(view.box.width, view.box.height) / (2 * view.scale);
  draw_x_axis(canvas, view.box, away.y(),
              {view.centre.x() - half.x(), view.centre.x() + half.x(), "x, mm", {}});
  draw_y_axis(canvas, view.box, away.x(),
              {view.centre.y() - half.y(), view.centre.y() + half.y(), "y, mm", {}});
}

void draw_tag(Canvas& canvas, const Box& tag) {
  canvas.rectangle(tag);
  canvas.fill(ink::text);
  canvas.text("A", {tag.x + tag.width / 2, tag.y + 9.8}, {9, true}, {1, 1, 1}, Align::middle);
}

// The frame in the whole view of what the enlargement shows, and its letter.
void draw_frame(Canvas& canvas, Labels& labels, const Layout& page) {
  const View &whole = page.whole, &detail = *page.detail;
  const Spot centre = whole.on_paper(detail.centre);
  const double half = detail.box.width / 2 / detail.scale * whole.scale;
  const Box room = whole.box.grown(3.5);
  const double left = std::max(centre.x() - half, room.x), right = std::min(centre.x() + half, room.right());
  const double top = std::max(centre.y() - half, room.y), bottom = std::min(centre.y() + half, room.bottom());
  const Box frame{left, top, right - left, bottom - top};
  canvas.rectangle(frame);
  canvas.stroke({1, 1, 1, 0.9}, 2.6);
  canvas.rectangle(frame);
  canvas.stroke(ink::text, 1.0);
  Box tag{frame.x, frame.y, tag_size, tag_size};
  if (frame.width < 5 * tag_size)  // it would hide what the frame shows
    for (const Spot& beside : {Spot(frame.x, frame.y - tag_size), Spot(frame.x, frame.bottom()),
                               Spot(frame.x - tag_size, frame.y), Spot(frame.right(), frame.y)}) {
      tag = {beside.x(), beside.y(), tag_size, tag_size};
      if (labels.free(tag.grown(-1.5))) break;
    }
  draw_tag(canvas, tag);
  labels.take(tag);
}

// What the enlargement shows, with a comma; empty when it has no name.
std::string name_of_focus(const Picture& picture) {
  if (!picture.tips.empty()) {
    const std::string name = plain(mesh::tips(picture.plate.cracks).at(picture.tips.front().tip).name);
    return tip_phrase(name) + ", ";
  }
  const mesh::Raiser focus = mesh::raiser(picture.plate, *picture.focus);
  return focus.name.empty() ? "" : phrase(focus) + ", ";
}

void draw_detail(Canvas& canvas, const Picture& picture, const mesh::Region& region, const Layout& page,
                 const std::vector<double>& limits) {
  const View& view = *page.detail;
  draw_view(canvas, picture, region, view, limits);
  canvas.save();
  canvas.rectangle(view.box);
  canvas.clip();
  Labels labels;
  prefer_blank(labels, picture, region, view, limits);
  draw_loads(canvas, picture, view, labels);
  canvas.restore();
  canvas.rectangle(view.box);
  canvas.stroke(ink::text, 1.0);
  const Box tag{view.box.x, view.box.y - 18, tag_size, tag_size};
  draw_tag(canvas, tag);
  const std::string heading = fmt::format("{}{}enlarged {:.2g} times", name_of_focus(picture),
                                          page.at_peak ? "at the peak, " : "", view.scale / page.whole.scale);
  canvas.text(wrapped(heading, page::small, view.box.width - 18).front(), {tag.right() + 5, tag.y + 9.5},
              page::small, ink::text);
  draw_axes(canvas, view, {4.0, 4.0});
  draw_peaks(canvas, picture, view, view.box.grown(-5), labels, true);
  draw_tips(canvas, picture, view, view.box.grown(-5), labels);
}

void draw_words(Canvas& canvas, const Layout& page) {
  double y = page::margin + page::title.size;
  for (const std::string& line : page.title) {
    canvas.text(line, {page::margin, y}, page::title, ink::text);
    y += page::title_step;
  }
  y = page.text.y + page::body.size;
  for (std::size_t i = 0; i < page.caption.size(); ++i) {
    canvas.text(page.caption[i], {page.text.x, y}, i < page.stressed ? page::body_bold : page::body,
                ink::text);
    y += page::line_step;
  }
  y = page.height - page::margin / 2 - 12.0 * static_cast<double>(page.caution.size());
  canvas.move_to({page::margin, y - 4});
  canvas.line_to({page.width - page::margin, y - 4});
  canvas.stroke(ink::hairline, 0.5);
  for (const std::string& line : page.caution) {
    y += 12;
    canvas.text(line, {page::margin, y - 2}, page::small, ink::quiet);
  }
}

std::string drawn(const Picture& picture, PaperKind kind) {
  check(picture);
  const Layout page = lay_out(picture);
  const std::vector<double> limits = limits_of(picture);
  const mesh::Region region = mesh::trace(picture.plate);
  Canvas canvas(kind, page.width, page.height);
  draw_words(canvas, page);
  draw_view(canvas, picture, region, page.whole, limits);
  Labels labels;
  prefer_blank(labels, picture, region, page.whole, limits);
  draw_loads(canvas, picture, page.whole, labels);
  draw_axes(canvas, page.whole, {page.rim_x, page.rim_y});
  if (page.detail) draw_frame(canvas, labels, page);
  const Box& plate = page.whole.box;
  const Box bounds{plate.x - page.rim_x + 2, plate.y - page.rim_y + 2, plate.width + 2 * page.rim_x - 4,
                   plate.height + 2 * page.rim_y - 4};
  draw_peaks(canvas, picture, page.whole, bounds, labels, !page.detail);
  if (!page.detail) draw_tips(canvas, picture, page.whole, bounds, labels);
  if (page.detail) draw_detail(canvas, picture, region, page, limits);
  draw_bar(canvas, picture, page.bar, limits);
  return canvas.finish();
}

}  // namespace

std::vector<double> limits_of(const Picture& picture) {
  const double top = picture.top.value_or(std::numeric_limits<double>::infinity());
  std::vector<Spread> values;
  for (const PictureCell& cell : picture.cells) {
    const auto n = static_cast<std::size_t>(cell.subdivisions);
    const Point a = cell.points[n] - cell.points[0], b = cell.points.back() - cell.points[0];
    const double area = std::abs(a.x() * b.y() - a.y() * b.x()) / 2;
    for (const double value : cell.values)
      values.push_back({std::min(value, top), area / static_cast<double>(cell.values.size())});
  }
  double largest = values.front().value;
  for (const PeakMark& peak : picture.peaks) largest = std::max(largest, std::min(peak.value, top));
  return band_limits(values, largest);
}

void draw_png(const Picture& picture, const std::filesystem::path& file) {
  write_file(file, drawn(picture, PaperKind::png));
}

void draw_svg(const Picture& picture, const std::filesystem::path& file) {
  write_file(file, drawn(picture, PaperKind::svg));
}

}  // namespace raiser::io
