#include "io/picture/layout.hpp"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <utility>

#include "mesh/plate/distance.hpp"

namespace raiser::io {
namespace {

constexpr double inner = page::width - 2 * page::margin;
constexpr double arrow_rim = 30.0;
constexpr double gap = 26.0;
constexpr double bar_width = 18.0;
constexpr double bar_room = 104.0;  // bar with its numbers and its name
constexpr double bar_head = 22.0;   // the name above the bar

struct Room {
  double width, height;
};

double fit(const mesh::Plate& plate, Room room) {
  return std::min(room.width / plate.length, room.height / plate.width);
}

// Adds an enlargement `side` wide with its upper left corner (axis included)
// at (x, y): the hole's neighbourhood, or that of the peak where the hole is
// too large for the page to show it much larger.
bool place_detail(Layout& page, const Picture& picture, double x, double y, double side) {
  if (!picture.focus && picture.tips.empty()) return false;
  const Window window = picture.tips.empty() ? neighbourhood(picture.plate, *picture.focus)
                                             : neighbourhood_of_tip(picture.plate, picture.tips.front().tip);
  const double scale = side / (2 * window.half);
  const Box box{x + page::axis_left, y, side, side};
  page.at_peak = scale < 1.8 * page.whole.scale && !picture.peaks.empty() && picture.tips.empty();
  if (page.at_peak)
    page.detail = View{box, picture.peaks.front().point, 3 * page.whole.scale};
  else if (scale > 1.3 * page.whole.scale)
    page.detail = View{box, window.centre, scale};
  return page.detail.has_value();
}

void place_caption(Layout& page, const Picture& picture, double x, double y) {
  const double width = page::width - page::margin - x;
  for (std::size_t i = 0; i < picture.caption.size(); ++i) {
    const Font font = i == 0 ? page::body_bold : page::body;
    for (std::string& line : wrapped(picture.caption[i], font, width))
      page.caption.push_back(std::move(line));
    if (i == 0) page.stressed = page.caption.size();
  }
  page.text = {x, y, width, page::line_step * static_cast<double>(page.caption.size())};
}

// The whole plate across the page; enlargement, bar and caption below it.
double stack(Layout& page, const Picture& picture, double top, double scale) {
  const Room size{scale * picture.plate.length, scale * picture.plate.width};
  const double left = page::margin + page::axis_left + page.rim_x;
  const double spare = inner - page::axis_left - 2 * page.rim_x - size.width;
  page.whole = {{left + spare / 2, top + page.rim_y, size.width, size.height}, Point::Zero(), scale};
  const double y = page.whole.box.bottom() + page.rim_y + page::axis_bottom + gap;
  constexpr double side = 290.0;
  const bool detail = place_detail(page, picture, page::margin, y + bar_head, side);
  const double x = detail ? page.detail->box.right() + gap : page::margin + page::axis_left;
  page.bar = {x, y + bar_head, bar_width, detail ? side : 180.0};
  place_caption(page, picture, x + bar_room + 8, y + bar_head);
  return std::max(
      {page.bar.bottom(), detail ? page.detail->box.bottom() + page::axis_bottom : 0.0, page.text.bottom()});
}

// The whole plate at the left; enlargement, bar and caption to its right. Without
// an enlargement the plate takes more of the page.
double side_by_side(Layout& page, const Picture& picture, double top, double scale) {
  const Room size{scale * picture.plate.length, scale * picture.plate.width};
  page.whole = {{page::margin + page::axis_left + page.rim_x, top + page.rim_y, size.width, size.height},
                Point::Zero(),
                scale};
  const double x = page.whole.box.right() + page.rim_x + gap;
  const double side = std::min(330.0, page::width - page::margin - x - page::axis_left - gap - bar_room);
  const bool detail = place_detail(page, picture, x, top + bar_head, side);
  const double wider = fit(picture.plate, {420.0, 600.0});
  if (!detail && scale < wider) return side_by_side(page, picture, top, wider);
  const double bar_x = detail ? page.detail->box.right() + gap : x;
  page.bar = {bar_x, top + bar_head, bar_width, detail ? side : std::clamp(size.height, 180.0, 330.0)};
  if (detail)
    place_caption(page, picture, page.detail->box.x, page.bar.bottom() + page::axis_bottom + gap);
  else
    place_caption(page, picture, bar_x + bar_room + 8, page.bar.y);
  return std::max(
      {page.whole.box.bottom() + page.rim_y + page::axis_bottom, page.bar.bottom(), page.text.bottom()});
}

}  // namespace

namespace {

// Of a notch or fillet: twice the square around its curves.
Window around(const mesh::Outline& outline, std::size_t raiser) {
  Eigen::AlignedBox2d box;
  for (const mesh::Curve& curve : outline.curves)
    if (curve.owner == mesh::Owner{mesh::Owner::Kind::raiser, raiser})
      for (int i = 0; i <= 8; ++i) box.extend(curve.at(curve.begin + (curve.end - curve.begin) * i / 8));
  return {box.center(), box.sizes().maxCoeff()};
}

}  // namespace

Window neighbourhood_of_tip(const mesh::Plate& plate, std::size_t index) {
  const mesh::CrackTip tip = mesh::tips(plate.cracks).at(index);
  const mesh::Crack& crack = plate.cracks[tip.crack];
  return {tip.at, (crack.has_mouth ? 1.2 : 0.8) * crack.length()};
}

Window neighbourhood(const mesh::Plate& plate, std::size_t index) {
  if (index >= plate.holes.size() && plate.outline) return around(*plate.outline, index - plate.holes.size());
  const mesh::Hole& hole = plate.holes.at(index);
  const double reach =
      std::max(mesh::half_extent(hole, Point::UnitX()), mesh::half_extent(hole, Point::UnitY()));
  const double ligament = mesh::edge_distance(plate, hole);
  const double wanted = ligament < 1.2 * reach ? std::max(reach + 1.15 * ligament, 1.5 * reach) : 1.7 * reach;
  return {hole.centre, wanted};
}

std::vector<std::string> wrapped(const std::string& text, Font font, double width, Breaking breaking) {
  std::vector<std::string> lines;
  std::string line;
  const auto flush = [&] {
    if (!line.empty()) lines.push_back(std::exchange(line, {}));
  };
  for (std::size_t i = 0; i < text.size();) {
    const std::size_t end = std::min(text.find(' ', i), text.size());
    const std::string word = text.substr(i, end - i);
    i = end + 1;
    if (!line.empty() && text_width(line + ' ' + word, font) > width) flush();
    line += (line.empty() ? "" : " ") + word;
    while (breaking == Breaking::anywhere && line.size() > 1 && text_width(line, font) > width) {
      std::size_t fits = line.size() - 1;
      while (fits > 1 && ((line[fits] & 0xC0) == 0x80 || text_width(line.substr(0, fits), font) > width))
        --fits;
      lines.push_back(line.substr(0, fits));
      line.erase(0, fits);
    }
  }
  flush();
  return lines;
}

Layout lay_out(const Picture& picture) {
  Layout page;
  page.rim_x = page.rim_y = 8.0;
  page.width = page::width;
  for (const LoadArrow& arrow : picture.arrows)
    if (!arrow.room) (std::abs(arrow.outward.x()) > 0.5 ? page.rim_x : page.rim_y) = arrow_rim;
  page.title = wrapped(picture.title, page::title, inner);
  const double top = page::margin + page::title_step * static_cast<double>(page.title.size()) + 8;
  const double across = inner - page::axis_left - 2 * page.rim_x;
  const double stacked = fit(picture.plate, {across, 300.0});
  const double beside = fit(picture.plate, {250.0, 600.0});
  const double bottom =
      stacked > 1.25 * beside ? stack(page, picture, top, stacked) : side_by_side(page, picture, top, beside);
  page.caution = wrapped(picture.caution, page::small, inner);
  page.height = bottom + 24 + 12.0 * static_cast<double>(page.caution.size()) + page::margin / 2;
  return page;
}

}  // namespace raiser::io
