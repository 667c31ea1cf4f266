#include "mesh/plate/shoulder.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>

namespace raiser::mesh {

namespace {

constexpr double quarter = std::numbers::pi / 2;
constexpr double rounding = 1e-9;

bool positive(double x) { return std::isfinite(x) && x > 0.0; }

/// The bar between two shoulders.
struct Part {
  double left = 0.0, right = 0.0;  ///< mm
  double low = 0.0, high = 0.0;
};

std::string label(const Shoulder& s) { return fmt::format("shoulder '{}'", s.name); }

std::string fillet_fault(const Fillet& f) {
  switch (f.shape) {
    case FilletShape::circle:
      return positive(f.radius) ? "" : fmt::format("its fillet's radius is {:.6g} mm", f.radius);
    case FilletShape::ellipse:
      return positive(f.along) && positive(f.across) ? "" : "a semi-axis of its fillet is not greater than 0";
    case FilletShape::two_radii:
      if (!positive(f.radius) || !positive(f.second_radius))
        return "a radius of its fillet is not greater than 0";
      return f.turn > 0.0 && f.turn < quarter ? ""
                                              : "its first arc must turn by more than 0 and less than 90 deg";
    case FilletShape::undercut:
      if (!positive(f.radius) || !positive(f.undercut)) return "radius and undercut must be greater than 0";
      return f.undercut < f.radius ? "" : "its undercut is as deep as its radius or deeper";
    case FilletShape::sharp:
      break;
  }
  return "";
}

/// A fillet in its own axes: a from the face along the narrow edge, b from the
/// narrow edge up the face. `reach` and `rise` are what it takes of them.
struct Profile {
  double reach = 0.0;
  double rise = 0.0;
  Point root = Point::Zero();    ///< (a, b) of the net section's place
  Point centre = Point::Zero();  ///< for angles
  double smallest = 0.0;         ///< mm, radius of curvature
};

/// Nothing of the face is left where the arc is larger than the step.
Profile profile(const Fillet& f, double step) {
  const double r = f.radius;
  switch (f.shape) {
    case FilletShape::circle: {
      const double reach = r <= step ? r : std::sqrt(step * (2 * r - step));
      return {reach, std::min(r, step), {reach, 0}, {reach, r}, r};
    }
    case FilletShape::ellipse: {
      const double small = std::min(f.along, f.across);
      const double large = std::max(f.along, f.across);
      return {f.along, f.across, {f.along, 0}, {f.along, f.across}, small * small / large};
    }
    case FilletShape::two_radii: {
      const double more = r - f.second_radius;
      const double reach = f.second_radius + more * std::sin(f.turn);
      return {reach, r - more * std::cos(f.turn), {reach, 0}, {reach, r}, std::min(r, f.second_radius)};
    }
    case FilletShape::undercut: {
      const double up = r - f.undercut;
      return {r + std::sqrt(r * r - up * up), up, {r, -f.undercut}, {r, up}, r};
    }
    case FilletShape::sharp:
      break;
  }
  return {};
}

/// The fillet's arcs from the narrow edge to the face, in its own axes placed by
/// the corner and the directions of a and b.
Loop arcs(const Fillet& f, double step, const Point& corner, const Point& a, const Point& b,
          const Owner& owner) {
  const Profile p = profile(f, step);
  const auto arc = [&](const Point& centre, double ra, double rb, double begin, double end) {
    const Point c = corner + centre.x() * a + centre.y() * b;
    return Curve{Curve::Kind::arc, c, ra * a, rb * b, begin, end, owner};
  };
  // Seen from an arc's centre, the narrow edge lies at -90 deg and the face at -180 deg.
  switch (f.shape) {
    case FilletShape::circle: {
      const double turn = f.radius <= step ? quarter : std::acos((f.radius - step) / f.radius);
      return {arc(p.centre, f.radius, f.radius, -quarter, -quarter - turn)};
    }
    case FilletShape::ellipse:
      return {arc(p.centre, f.along, f.across, -quarter, -2 * quarter)};
    case FilletShape::two_radii: {
      const double more = f.radius - f.second_radius;
      const Point second(p.centre.x() - more * std::sin(f.turn), p.centre.y() - more * std::cos(f.turn));
      return {arc(p.centre, f.radius, f.radius, -quarter, -quarter - f.turn),
              arc(second, f.second_radius, f.second_radius, -quarter - f.turn, -2 * quarter)};
    }
    case FilletShape::undercut: {
      const double begin = -std::asin((f.radius - f.undercut) / f.radius);
      return {arc(p.centre, f.radius, f.radius, begin, -2 * quarter)};
    }
    case FilletShape::sharp:
      break;
  }
  return {};
}

std::string in_words(const Fillet& f) {
  switch (f.shape) {
    case FilletShape::circle:
      return fmt::format("fillet, radius {:.6g} mm", f.radius);
    case FilletShape::ellipse:
      return fmt::format("elliptical fillet, semi-axes {:.6g} mm along and {:.6g} mm across", f.along,
                         f.across);
    case FilletShape::two_radii:
      return fmt::format(
          "fillet of two radii, {:.6g} mm over {:.6g} deg from the narrow part, then {:.6g} mm", f.radius,
          f.turn * 180 / std::numbers::pi, f.second_radius);
    case FilletShape::undercut:
      return fmt::format("undercut fillet, radius {:.6g} mm, {:.6g} mm deep", f.radius, f.undercut);
    case FilletShape::sharp:
      break;
  }
  return "no fillet";
}

void check(const std::vector<Shoulder>& shoulders, double length, double width,
           std::vector<CutFault>& faults) {
  for (std::size_t i = 0; i < shoulders.size(); ++i) {
    const Shoulder& s = shoulders[i];
    const std::string wrong = fillet_fault(s.fillet);
    if (!wrong.empty()) faults.push_back({i, label(s) + ": " + wrong, "give sizes that are drawn"});
    if (!(std::abs(s.at) < length / 2))
      faults.push_back({i, fmt::format("{} stands at x = {:.6g} mm, not inside the bar", label(s), s.at),
                        fmt::format("place it between {:.6g} and {:.6g} mm", -length / 2, length / 2)});
    if (!(s.width > 0.0 && s.width < width))
      faults.push_back({i,
                        fmt::format("{}: its narrow part is {:.6g} mm wide, the plate {:.6g} mm", label(s),
                                    s.width, width),
                        "give a width smaller than the plate's; plate.width is that of the widest part"});
  }
}

/// From left to right. A part takes its width from the shoulder whose narrow
/// side it is, and the bar's width where it is on no narrow side.
std::vector<Part> parts_of(const std::vector<const Shoulder*>& sorted, double length, double width) {
  std::vector<Part> parts;
  for (std::size_t k = 0; k <= sorted.size(); ++k) {
    const Shoulder* before = k > 0 && sorted[k - 1]->narrow_is_right ? sorted[k - 1] : nullptr;
    const Shoulder* after = k < sorted.size() && !sorted[k]->narrow_is_right ? sorted[k] : nullptr;
    const Shoulder* own = before != nullptr ? before : after;
    Part part{k == 0 ? -length / 2 : sorted[k - 1]->at, k == sorted.size() ? length / 2 : sorted[k]->at,
              -width / 2, width / 2};
    if (own != nullptr) {
      part.low = own->sides == Shoulder::Sides::top      ? -width / 2
                 : own->sides == Shoulder::Sides::bottom ? width / 2 - own->width
                                                         : -own->width / 2;
      part.high = part.low + own->width;
    }
    parts.push_back(part);
  }
  return parts;
}

/// One side of the bar, from left to right, seen as if it were the top.
class Side {
 public:
  Side(Outline& outline, std::string name, bool is_top)
      : outline_(outline), name_(std::move(name)), is_top_(is_top) {}

  void go(const Point& to) {
    if ((to - at_).norm() > 0.0) loop_.push_back(line(at_, to, {Owner::Kind::edge, edge()}));
    at_ = to;
  }
  void start(const Point& at) { at_ = at; }
  void take(Loop arcs) {
    at_ = arcs.back().finish();
    loop_.insert(loop_.end(), arcs.begin(), arcs.end());
  }
  bool is_top() const { return is_top_; }
  void several(bool yes) { several_ = yes; }
  /// In the direction of the whole chain: the top runs from right to left.
  Loop anticlockwise() const {
    if (!is_top_) return loop_;
    Loop result;
    for (auto curve = loop_.rbegin(); curve != loop_.rend(); ++curve) {
      Curve turned = *curve;
      if (turned.kind == Curve::Kind::line)
        turned = line(curve->finish(), curve->start(), curve->owner);
      else
        std::swap(turned.begin, turned.end);
      result.push_back(turned);
    }
    return result;
  }

 private:
  std::size_t edge() {
    outline_.edges.push_back(several_ ? fmt::format("{} {}", name_, ++count_) : name_);
    return outline_.edges.size() - 1;
  }
  Outline& outline_;
  std::string name_;
  bool is_top_;
  bool several_ = false;
  int count_ = 0;
  Point at_ = Point::Zero();
  Loop loop_;
};

/// The step between two parts on one side, if they differ there.
struct Step {
  const Shoulder* shoulder;
  double left, right;  ///< y on either side
  double height() const { return std::abs(left - right); }
};

void add_step(Side& side, Outline& outline, const Step& step) {
  const Shoulder& s = *step.shoulder;
  const double up = side.is_top() ? 1.0 : -1.0;
  const bool narrow_right = up * step.right < up * step.left;
  const Point a(narrow_right ? 1.0 : -1.0, 0.0);
  const Point b(0.0, up);
  const double narrow_y = narrow_right ? step.right : step.left;
  const double wide_y = narrow_right ? step.left : step.right;
  const Point corner(s.at, narrow_y);
  const Point wide(s.at, wide_y);
  if (s.fillet.shape == FilletShape::sharp) {
    side.go(narrow_right ? wide : corner);
    side.go(narrow_right ? corner : wide);
    return;
  }
  const Owner owner{Owner::Kind::raiser, outline.raisers.size()};
  Loop fillet = arcs(s.fillet, step.height(), corner, a, b, owner);
  const Point foot = fillet.front().start();
  const Point head = fillet.back().finish();
  const bool no_face = (head - wide).norm() <= rounding * step.height();
  if (narrow_right) {
    side.go(wide);
    if (!no_face) side.go(head);
    std::reverse(fillet.begin(), fillet.end());
    for (Curve& curve : fillet) std::swap(curve.begin, curve.end);
    side.take(fillet);
  } else {
    side.go(foot);
    side.take(fillet);
    if (!no_face) side.go(wide);
    side.start(wide);
  }
  const Profile p = profile(s.fillet, step.height());
  const auto place = [&](const Point& own) { return Point(corner + own.x() * a + own.y() * b); };
  Raiser raiser{Raiser::Kind::fillet,
                s.name,
                place(p.centre),
                place(p.root),
                Point(s.at, place(p.root).y()),
                p.smallest,
                in_words(s.fillet),
                {},
                s.fillet};
  if (s.sides == Shoulder::Sides::both) raiser.name += side.is_top() ? " top" : " bottom";
  outline.raisers.push_back(raiser);
}

Loop side_of(Outline& outline, const std::vector<Part>& parts, const std::vector<const Shoulder*>& sorted,
             bool is_top) {
  const auto y = [&](const Part& part) { return is_top ? part.high : part.low; };
  Side side(outline, is_top ? "top" : "bottom", is_top);
  const bool steps =
      std::any_of(parts.begin(), parts.end(), [&](const Part& p) { return y(p) != y(parts.front()); });
  side.several(steps);
  side.start({parts.front().left, y(parts.front())});
  for (std::size_t k = 0; k < sorted.size(); ++k)
    if (y(parts[k]) != y(parts[k + 1])) add_step(side, outline, {sorted[k], y(parts[k]), y(parts[k + 1])});
  side.go({parts.back().right, y(parts.back())});
  return side.anticlockwise();
}

/// Two shoulders that have one part as their narrow side must agree on it.
void check_shared(const std::vector<const Shoulder*>& sorted, const std::vector<Shoulder>& all,
                  std::vector<CutFault>& faults) {
  for (std::size_t k = 0; k + 1 < sorted.size(); ++k) {
    const Shoulder& left = *sorted[k];
    const Shoulder& right = *sorted[k + 1];
    const bool shared = left.narrow_is_right && !right.narrow_is_right;
    if (left.at == right.at)
      faults.push_back({static_cast<std::size_t>(&right - all.data()),
                        fmt::format("{} and {} stand at the same place", label(left), label(right)),
                        "make them one, or move one"});
    else if (shared && (left.width != right.width || left.sides != right.sides))
      faults.push_back(
          {static_cast<std::size_t>(&right - all.data()),
           fmt::format("{} and {} give the part between them two widths or sides", label(left), label(right)),
           "give both the same width and sides"});
  }
}

/// Whether each fillet has the room it takes.
void check_room(const std::vector<Part>& parts, const std::vector<const Shoulder*>& sorted,
                const std::vector<Shoulder>& all, std::vector<CutFault>& faults) {
  for (std::size_t k = 0; k < sorted.size(); ++k) {
    const auto index = static_cast<std::size_t>(sorted[k] - all.data());
    const Part& left = parts[k];
    const Part& right = parts[k + 1];
    const bool stepped = left.low != right.low || left.high != right.high;
    const bool narrows = sorted[k]->narrow_is_right ? right.low >= left.low && right.high <= left.high
                                                    : left.low >= right.low && left.high <= right.high;
    if (!stepped || !narrows) {
      faults.push_back(
          {index,
           fmt::format("{}: the part on its narrow side is not narrower than the one beside it, everywhere",
                       label(*sorted[k])),
           "check width, sides and narrow of this shoulder and of its neighbours"});
      continue;
    }
    const Part& narrow = sorted[k]->narrow_is_right ? right : left;
    const double upper = std::abs(left.high - right.high);
    const double lower = std::abs(left.low - right.low);
    // Of two equal steps one says it.
    for (const double step :
         upper == lower ? std::vector<double>{upper} : std::vector<double>{upper, lower}) {
      if (step == 0.0) continue;
      const Profile p = profile(sorted[k]->fillet, step);
      if (p.rise > step * (1 + rounding))
        faults.push_back({index,
                          fmt::format("{}: its fillet rises {:.6g} mm, the step only {:.6g} mm",
                                      label(*sorted[k]), p.rise, step),
                          "make the fillet smaller or the step higher"});
      if (p.reach > (narrow.right - narrow.left) * (1 - rounding))
        faults.push_back(
            {index,
             fmt::format("{}: its fillet takes {:.6g} mm of the narrow part, which is {:.6g} mm long",
                         label(*sorted[k]), p.reach, narrow.right - narrow.left),
             "make the fillet smaller or the part longer"});
    }
  }
}

}  // namespace

std::string_view word(FilletShape shape) {
  switch (shape) {
    case FilletShape::circle:
      return "circle";
    case FilletShape::ellipse:
      return "ellipse";
    case FilletShape::two_radii:
      return "two radii";
    case FilletShape::undercut:
      return "undercut";
    case FilletShape::sharp:
      return "sharp";
  }
  return "";
}

OutlineResult stepped_bar(double length, double width, const std::vector<Shoulder>& shoulders) {
  OutlineResult result;
  check(shoulders, length, width, result.faults);
  if (!result.faults.empty()) return result;
  std::vector<const Shoulder*> sorted;
  for (const Shoulder& s : shoulders) sorted.push_back(&s);
  std::stable_sort(sorted.begin(), sorted.end(),
                   [](const Shoulder* a, const Shoulder* b) { return a->at < b->at; });
  check_shared(sorted, shoulders, result.faults);
  if (!result.faults.empty()) return result;
  const std::vector<Part> parts = parts_of(sorted, length, width);
  check_room(parts, sorted, shoulders, result.faults);
  if (!result.faults.empty()) return result;
  Outline outline;
  outline.edges = {"right", "left"};
  const Loop bottom = side_of(outline, parts, sorted, false);
  const Loop top = side_of(outline, parts, sorted, true);
  outline.curves = bottom;
  outline.curves.push_back(line(bottom.back().finish(), top.front().start(), {Owner::Kind::edge, 0}));
  outline.curves.insert(outline.curves.end(), top.begin(), top.end());
  outline.curves.push_back(line(top.back().finish(), bottom.front().start(), {Owner::Kind::edge, 1}));
  result.outline = std::move(outline);
  return result;
}

}  // namespace raiser::mesh
