#include "validation/families/bars.hpp"

#include <cmath>
#include <numbers>

namespace raiser::validation {

namespace {

using mesh::Curve;
using mesh::Owner;
using mesh::Point;
using mesh::Raiser;

constexpr double pi = std::numbers::pi;

/// Lays curves end to end.
class Chain {
 public:
  explicit Chain(const Point& start) : at_(start) {}

  void line_to(const Point& to, const Owner& owner) {
    if ((to - at_).norm() < 1e-12 * to.norm()) return;
    loop_.push_back(mesh::line(at_, to, owner));
    at_ = to;
  }
  /// An arc of the ellipse with axes along x and y from parameter t to another.
  void arc(const Point& centre, double along_x, double along_y, double from, double to, const Owner& owner) {
    loop_.push_back({Curve::Kind::arc, centre, {along_x, 0}, {0, along_y}, from, to, owner});
    at_ = loop_.back().finish();
  }
  const Point& at() const { return at_; }
  mesh::Loop loop() const { return loop_; }

 private:
  Point at_;
  mesh::Loop loop_;
};

constexpr Owner edge(std::size_t index) { return {Owner::Kind::edge, index}; }
constexpr Owner raiser(std::size_t index) { return {Owner::Kind::raiser, index}; }

/// The curves of a notch in the upper edge y = top, from right to left.
mesh::Loop notch_curves(const NotchForm& notch, double top, const Owner& owner) {
  if (notch.is_ellipse) {
    const double half = std::sqrt(notch.radius * notch.depth);  // r = half^2 / depth
    Chain chain({half, top});
    chain.arc({0, top}, half, notch.depth, 0, -pi, owner);
    return chain.loop();
  }
  const double r = notch.radius;
  const Point centre(0, top - notch.depth + r);
  // Where the arc begins: at the flank's tangent point, or at the edge itself.
  const double tangent = -notch.opening / 2;
  const double rise = top - (centre.y() + r * std::sin(tangent));
  if (rise <= 0) {
    const double at_edge = std::asin((top - centre.y()) / r);
    Chain chain(centre + r * Point(std::cos(at_edge), std::sin(at_edge)));
    chain.arc(centre, r, r, at_edge, -pi - at_edge, owner);
    return chain.loop();
  }
  const double mouth = r * std::cos(tangent) + rise * std::tan(notch.opening / 2);
  Chain chain({mouth, top});
  chain.line_to(centre + r * Point(std::cos(tangent), std::sin(tangent)), owner);
  chain.arc(centre, r, r, tangent, -pi - tangent, owner);
  chain.line_to({-mouth, top}, owner);
  return chain.loop();
}

/// The same in the lower edge, from left to right: turned by half a turn.
mesh::Loop turned_over(mesh::Loop loop, const Owner& owner) {
  for (Curve& curve : loop) {
    curve.centre = -curve.centre;
    curve.u = -curve.u;
    curve.v = -curve.v;
    curve.owner = owner;
  }
  return loop;
}

void append(mesh::Loop& loop, const mesh::Loop& more) { loop.insert(loop.end(), more.begin(), more.end()); }

Raiser notch_raiser(const NotchForm& notch, const char* name, double side, double top) {
  const Point root(0, side * (top - notch.depth));
  return {Raiser::Kind::notch, name,   {0, side * (top - notch.depth + notch.radius)}, root, root,
          notch.radius,        "notch"};
}

}  // namespace

mesh::Plate notched_bar(double length, double width, const NotchForm& notch, bool both) {
  namespace side = mesh::rectangle;
  const double x = length / 2, y = width / 2;
  mesh::Outline outline = mesh::rectangular(length, width);
  outline.body = outline.curves;
  const mesh::Loop above = notch_curves(notch, y, raiser(0));
  mesh::Loop loop;
  if (both) {
    const mesh::Loop below = turned_over(above, raiser(1));
    loop.push_back(mesh::line({-x, -y}, below.front().start(), edge(side::bottom)));
    append(loop, below);
    loop.push_back(mesh::line(below.back().finish(), {x, -y}, edge(side::bottom)));
  } else {
    loop.push_back(mesh::line({-x, -y}, {x, -y}, edge(side::bottom)));
  }
  loop.push_back(mesh::line({x, -y}, {x, y}, edge(side::right)));
  loop.push_back(mesh::line({x, y}, above.front().start(), edge(side::top)));
  append(loop, above);
  loop.push_back(mesh::line(above.back().finish(), {-x, y}, edge(side::top)));
  loop.push_back(mesh::line({-x, y}, {-x, -y}, edge(side::left)));
  outline.curves = std::move(loop);
  outline.raisers.push_back(notch_raiser(notch, "upper", 1, y));
  if (both) outline.raisers.push_back(notch_raiser(notch, "lower", -1, y));
  return {length, width, 1.0, {}, std::move(outline)};
}

mesh::Plate stepped_bar(double length, double wide, double narrow, double radius) {
  const double x = length / 2, high = wide / 2, low = narrow / 2, step = high - low, r = radius;
  // The arc runs from the narrow part (its lowest point) to the shoulder, or to the wide edge itself.
  const bool has_shoulder = r <= step;
  const double end = has_shoulder ? pi : pi - std::asin((r - step) / r);
  const Point centre(r, low + r);
  const double mouth = has_shoulder ? 0.0 : r * (1 + std::cos(end));  // x where the wide part ends
  mesh::Outline outline;
  outline.edges = {"right", "top", "left", "bottom", "upper shoulder", "lower shoulder"};
  Chain chain({-x, -high});
  chain.line_to({mouth, -high}, edge(3));
  if (has_shoulder) chain.line_to({0.0, -centre.y()}, edge(5));
  chain.arc({r, -centre.y()}, r, r, end, pi / 2, raiser(1));
  chain.line_to({x, -low}, edge(3));
  chain.line_to({x, low}, edge(0));
  chain.line_to({r, low}, edge(1));
  chain.arc(centre, r, r, -pi / 2, -end, raiser(0));
  if (has_shoulder) chain.line_to({0.0, high}, edge(4));
  chain.line_to({-x, high}, edge(1));
  chain.line_to({-x, -high}, edge(2));
  outline.curves = chain.loop();
  for (const double side : {1.0, -1.0})
    outline.raisers.push_back({Raiser::Kind::fillet,
                               side > 0 ? "upper" : "lower",
                               {r, side * centre.y()},
                               {r, side * low},
                               {mouth, side * high},
                               r,
                               "circular"});
  return {length, wide, 1.0, {}, std::move(outline)};
}

mesh::Plate elliptic_ring(const Point& outer, const Point& inner) {
  mesh::Outline outline;
  outline.edges = {"outer"};
  for (int k = 0; k < 4; ++k)
    outline.curves.push_back({Curve::Kind::arc,
                              Point::Zero(),
                              {outer.x() / 2, 0},
                              {0, outer.y() / 2},
                              k * pi / 2,
                              (k + 1) * pi / 2,
                              edge(0)});
  return {outer.x(),
          outer.y(),
          1.0,
          {{"inner", mesh::HoleShape::ellipse, inner.x(), inner.y(), 0.0, Point::Zero(), 0.0}},
          std::move(outline)};
}

}  // namespace raiser::validation
