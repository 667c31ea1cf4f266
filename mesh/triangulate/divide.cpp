#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/region/vertex.hpp"
#include "mesh/triangulate/fan.hpp"
#include "mesh/triangulate/size_rule.hpp"

namespace raiser::mesh {
namespace {

/// The sharp convex corners that a piece's whole curve runs into, and whether
/// the piece itself touches them. Numbers count the region's corners.
struct Sharp {
  static constexpr int none = -1;
  int begin = none;
  int end = none;
  bool touches_begin = true;
  bool touches_end = true;

  bool has(int corner) const { return corner != none && (corner == begin || corner == end); }
  bool touches(int corner) const {
    return corner != none && ((corner == begin && touches_begin) || (corner == end && touches_end));
  }
};

/// One piece of boundary with its chord.
struct Piece {
  Curve curve;
  Point from, to;
  Point inward;  ///< unit normal of the chord, into the material
  double length;
  std::size_t loop;
  Sharp sharp;
  bool is_slit;  ///< material on both sides

  Piece(const Curve& c, std::size_t l, const Sharp& corners = {}, bool slit = false)
      : curve(c), from(c.at(c.begin)), to(c.at(c.end)), loop(l), sharp(corners), is_slit(slit) {
    const Point chord = to - from;
    length = chord.norm();
    inward = Point(-chord.y(), chord.x()) / length;
  }
  bool on_mirror() const {
    return curve.owner.kind == Owner::Kind::mirror_x || curve.owner.kind == Owner::Kind::mirror_y;
  }
  /// Sides of fans are given.
  bool is_fixed() const { return curve.owner.kind == Owner::Kind::inner; }
  bool faces(const Point& direction) const {
    constexpr double facing = 0.1;
    const double share = direction.dot(inward);
    return is_slit ? std::abs(share) >= facing : share >= facing;
  }
};

std::pair<Curve, Curve> split_at(const Curve& curve, double fraction) {
  Curve first = curve;
  Curve second = curve;
  first.end = second.begin = curve.begin + fraction * (curve.end - curve.begin);
  return {first, second};
}

double turning(const Curve& curve) {
  const Point a = curve.derivative(curve.begin);
  const Point b = curve.derivative(curve.end);
  return std::abs(std::atan2(a.x() * b.y() - a.y() * b.x(), a.dot(b)));
}

/// Divides an arc so that no piece turns by more than `limit`: a circular one
/// into equal pieces, another by halving where it still turns too much.
void divide_by_turn(const Curve& curve, double limit, std::size_t loop, std::vector<Piece>& out) {
  const double span = std::abs(curve.end - curve.begin);
  const bool is_circular = std::abs(curve.u.norm() - curve.v.norm()) < 1e-9 * curve.u.norm();
  if (curve.kind == Curve::Kind::line || (span < 3.0 && turning(curve) <= limit)) {
    out.emplace_back(curve, loop);
    return;
  }
  const int pieces = is_circular ? static_cast<int>(std::ceil(span / limit - 1e-9)) : 2;
  Curve piece = curve;
  for (int k = 1; k <= pieces; ++k) {
    piece.end = k == pieces ? curve.end : curve.begin + k * (curve.end - curve.begin) / pieces;
    if (is_circular)
      out.emplace_back(piece, loop);
    else
      divide_by_turn(piece, limit, loop, out);
    piece.begin = piece.end;
  }
}

/// Shortest way between two chords: its length and unit direction from a to b.
struct Way {
  double length;
  Point direction;
};
Point nearest_on(const Piece& piece, const Point& x) {
  const Point chord = piece.to - piece.from;
  const double t = std::clamp((x - piece.from).dot(chord) / chord.squaredNorm(), 0.0, 1.0);
  return piece.from + t * chord;
}
Way way(const Piece& a, const Piece& b) {
  Point best = b.from - nearest_on(a, b.from);
  for (const Point& d : {Point(b.to - nearest_on(a, b.to)), Point(nearest_on(b, a.from) - a.from),
                         Point(nearest_on(b, a.to) - a.to)})
    if (d.squaredNorm() < best.squaredNorm()) best = d;
  const double length = best.norm();
  return {length, length > 0 ? Point(best / length) : Point::Zero()};
}

/// Whether the two meet at, or run towards, a sharp corner that `piece` touches:
/// the distance between them vanishes there, whatever their length.
bool share_corner(const Piece& piece, const Piece& other) {
  const auto shared = [&](int corner) { return piece.sharp.touches(corner) && other.sharp.has(corner); };
  return shared(piece.sharp.begin) || shared(piece.sharp.end);
}

/// Mouths of slits. Pieces there face each other across a wedge, not across a
/// ligament.
std::vector<Point> mouths(const Region& region, const std::vector<Fan>& fans) {
  std::vector<Point> result;
  for (const Slit& slit : region.slits)
    for (const Point& end : {slit.points.front(), slit.points.back()})
      if (std::none_of(fans.begin(), fans.end(), [&](const Fan& fan) { return fan.outer.front() == end; }))
        result.push_back(end);
  return result;
}

double distance(const Piece& piece, const Point& x) { return (nearest_on(piece, x) - x).norm(); }

/// Whether a piece runs about towards the corner: it is a flank of its wedge.
bool is_flank(const Piece& piece, const Point& corner) {
  constexpr double curved = 0.3;  // an arc leaves its tangent at the corner
  const Point arm = (piece.from + piece.to) / 2 - corner;
  return std::abs(arm.dot(piece.inward)) <= curved * arm.norm();
}

/// Whether the gap between two pieces is the opening of a wedge, on the scale of
/// their distance from its corner: there a triangle's side may be as long as
/// that distance.
bool spans_wedge(const Piece& piece, const Piece& other, double gap, const std::vector<Point>& corners) {
  return std::any_of(corners.begin(), corners.end(), [&](const Point& corner) {
    const double near = distance(piece, corner);
    if (near > 6 * gap || distance(other, corner) > 6 * gap) return false;
    if (!is_flank(piece, corner) || !is_flank(other, corner)) return false;
    return near < 1e-9 * piece.length || piece.length <= 2 * near;
  });
}

/// Whether `piece` is too long beside `other`. Pieces of boundary limit each
/// other across the material between them. A mirror line lies inside the
/// material: it limits as half a ligament and is graded like the triangles. So
/// is a slit.
bool is_too_long(const Piece& piece, const Piece& other, const SizeRule& rule,
                 const std::vector<Point>& corners) {
  if (piece.is_fixed()) return false;
  const Way between = way(piece, other);
  const bool at_corner = share_corner(piece, other);
  if (between.length <= 1e-9 * std::max(piece.length, other.length)) {  // they meet
    if (at_corner && !share_corner(other, piece)) return false;
    return piece.length > (piece.on_mirror() ? 2.0 : rule.neighbour) * other.length;
  }
  if (at_corner) return false;
  if ((piece.on_mirror() || piece.is_slit) &&
      piece.length > 2.0 * other.length + rule.growth * between.length)
    return true;
  if (!piece.faces(between.direction) || !other.faces(-between.direction)) return false;
  if (piece.on_mirror() && other.on_mirror()) return false;
  const double gap = (piece.on_mirror() || other.on_mirror() ? 2.0 : 1.0) * between.length;
  return piece.length > rule.ligament * gap && !spans_wedge(piece, other, between.length, corners);
}

/// Splits in halves every piece that is too long, once. Returns whether any was.
bool split_pass(std::vector<Piece>& pieces, const SizeRule& rule, const std::vector<Point>& corners) {
  std::vector<std::size_t> order(pieces.size());
  std::vector<double> low(pieces.size());
  double longest = 0.0;
  for (std::size_t i = 0; i < pieces.size(); ++i) {
    order[i] = i;
    low[i] = std::min(pieces[i].from.x(), pieces[i].to.x());
    longest = std::max(longest, std::abs(pieces[i].from.x() - pieces[i].to.x()));
  }
  std::sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) { return low[a] < low[b]; });
  const double reach_factor = std::max(1.0 / rule.ligament, 1.0 / rule.growth) * 1.01;
  std::vector<bool> split(pieces.size(), false);
  for (std::size_t i = 0; i < pieces.size(); ++i) {
    const double reach = reach_factor * pieces[i].length;
    const double high = std::max(pieces[i].from.x(), pieces[i].to.x()) + reach;
    const double y_low = std::min(pieces[i].from.y(), pieces[i].to.y()) - reach;
    const double y_high = std::max(pieces[i].from.y(), pieces[i].to.y()) + reach;
    auto at = std::lower_bound(order.begin(), order.end(), low[i] - reach - longest,
                               [&](std::size_t k, double x) { return low[k] < x; });
    for (; at != order.end() && low[*at] <= high && !split[i]; ++at) {
      const Piece& other = pieces[*at];
      if (*at == i || std::max(other.from.y(), other.to.y()) < y_low ||
          std::min(other.from.y(), other.to.y()) > y_high)
        continue;
      split[i] = is_too_long(pieces[i], other, rule, corners);
    }
  }
  std::vector<Piece> result;
  result.reserve(pieces.size());
  for (std::size_t i = 0; i < pieces.size(); ++i) {
    if (!split[i]) {
      result.push_back(pieces[i]);
      continue;
    }
    const auto [first, second] = split_at(pieces[i].curve, 0.5);
    result.emplace_back(first, pieces[i].loop, pieces[i].sharp, pieces[i].is_slit);
    result.back().sharp.touches_end = false;
    result.emplace_back(second, pieces[i].loop, pieces[i].sharp, pieces[i].is_slit);
    result.back().sharp.touches_begin = false;
  }
  const bool any = result.size() != pieces.size();
  pieces = std::move(result);
  return any;
}

/// The smaller radius of curvature where two curves meet smoothly, if it jumps
/// there. Across a mirror line the curve meets its own image: no jump.
double radius_at_jump(const Piece& a, const Piece& b) {
  if (a.on_mirror() || b.on_mirror()) return 0.0;
  const double ra = a.curve.radius_of_curvature(a.curve.end);
  const double rb = b.curve.radius_of_curvature(b.curve.begin);
  const double smaller = std::min(ra, rb);
  return std::isfinite(smaller) && smaller < 0.99 * std::max(ra, rb) ? smaller : 0.0;
}

/// The angle of the material where two pieces meet; on a mirror line with its
/// mirror image, and straight where both lie on mirror lines.
double whole_angle(const Piece& a, const Piece& b) {
  if (a.on_mirror() && b.on_mirror()) return std::numbers::pi;
  return (a.on_mirror() || b.on_mirror() ? 2 : 1) * angle_between(a.curve, b.curve);
}

bool is_corner(const Piece& a, const Piece& b) { return whole_angle(a, b) > std::numbers::pi + least_corner; }

/// Whether stress is singular, or asked to be taken as such, where two pieces meet.
bool is_singular(const Piece& a, const Piece& b, const SizeRule& rule) {
  if (is_corner(a, b)) return true;
  const double close = 1e-9 * (a.length + b.length);
  return std::any_of(rule.singular.begin(), rule.singular.end(),
                     [&](const Point& x) { return (x - b.from).norm() <= close; });
}

bool is_on_outline_raiser(const Piece& piece) {
  return piece.loop == 0 && piece.curve.owner.kind == Owner::Kind::raiser;
}

/// Wanted length of the sides where two pieces meet, if they are to shrink
/// towards that place: at a corner or a jump of curvature.
double size_at_joint(const Piece& a, const Piece& b, const SizeRule& rule) {
  if (a.is_fixed() || b.is_fixed()) return 0.0;
  const double shorter = std::min(a.length, b.length);
  if (is_singular(a, b, rule)) return rule.corner * shorter;
  if (is_blunt(whole_angle(a, b))) return rule.blunt * shorter;
  const double factor = std::min(rule.factor(a.curve.owner), rule.factor(b.curve.owner));
  return (is_on_outline_raiser(a) || is_on_outline_raiser(b) ? rule.end : rule.joint) * factor *
         radius_at_jump(a, b);
}

/// Pieces of `piece` that shrink geometrically to a wanted length at its begin
/// (`before` > 0) and its end (`after` > 0).
void grade(const Piece& piece, double before, double after, const SizeRule& rule, DividedLoop& out) {
  const double enough = std::sqrt(rule.joint_growth);
  if (before > 0 && after > 0 && piece.length > std::min(before, after) * enough) {
    const auto [first, second] = split_at(piece.curve, 0.5);
    grade(Piece(first, piece.loop, {}, piece.is_slit), before, 0, rule, out);
    grade(Piece(second, piece.loop, {}, piece.is_slit), 0, after, rule, out);
    return;
  }
  const double near = std::max(before, after);
  if (near == 0.0 || piece.length <= near * enough) {
    out.push_back(piece.curve);
    return;
  }
  const double fraction = 1.0 / rule.joint_growth;
  const auto [first, second] = split_at(piece.curve, before > 0 ? fraction : 1 - fraction);
  grade(Piece(first, piece.loop, {}, piece.is_slit), before, 0, rule, out);
  grade(Piece(second, piece.loop, {}, piece.is_slit), 0, after, rule, out);
}

DividedLoop grade_joints(const std::vector<Piece>& loop, const SizeRule& rule) {
  DividedLoop result;
  const std::size_t n = loop.size();
  for (std::size_t i = 0; i < n; ++i)
    grade(loop[i], size_at_joint(loop[(i + n - 1) % n], loop[i], rule),
          size_at_joint(loop[i], loop[(i + 1) % n], rule), rule, result);
  return result;
}

/// Divides a loop by turning, and marks its sharp corners: convex ones of less
/// than a right angle. `corners` counts those of the loops before.
void divide_loop(const Loop& loop, std::size_t index, const SizeRule& rule, int& corners,
                 std::vector<Piece>& out) {
  const std::size_t n = loop.size();
  std::vector<int> corner(n, Sharp::none);  // where curve k begins
  for (std::size_t k = 0; k < n; ++k)
    if (angle_between(loop[(k + n - 1) % n], loop[k]) < std::numbers::pi / 2 - 1e-6) corner[k] = corners++;
  for (std::size_t k = 0; k < n; ++k) {
    const std::size_t first = out.size();
    divide_by_turn(loop[k], rule.turn * rule.factor(loop[k].owner), index, out);
    for (std::size_t i = first; i < out.size(); ++i)
      out[i].sharp = {corner[k], corner[(k + 1) % n], i == first, i + 1 == out.size()};
  }
}

/// A kink in a crack is a re-entrant corner on one face: sides shrink towards it.
DividedLoop grade_kinks(const std::vector<Piece>& slit, const SizeRule& rule) {
  constexpr double share = 0.01;  // of the shorter side beside the kink
  DividedLoop result;
  const auto size_at = [&](std::size_t i) {
    if (i == 0 || i == slit.size()) return 0.0;
    const Point a = slit[i - 1].to - slit[i - 1].from;
    const Point b = slit[i].to - slit[i].from;
    const bool is_kink = std::abs(a.x() * b.y() - a.y() * b.x()) > 1e-6 * a.norm() * b.norm();
    return is_kink ? share * std::min(slit[i - 1].length, slit[i].length) : 0.0;
  };
  for (std::size_t i = 0; i < slit.size(); ++i) grade(slit[i], size_at(i), size_at(i + 1), rule, result);
  return result;
}

}  // namespace

Division divide(const Region& whole, const SizeRule& rule) {
  Division result;
  Region region = whole;
  result.fans = take_out_fans(region, rule);
  std::vector<Piece> pieces;
  int corners = 0;
  for (std::size_t l = 0; l < region.loops.size(); ++l)
    divide_loop(region.loops[l], l, rule, corners, pieces);
  const std::size_t loops = region.loops.size();
  for (std::size_t i = 0; i < region.slits.size(); ++i) {
    const Slit& slit = region.slits[i];
    for (std::size_t k = 1; k < slit.points.size(); ++k)
      pieces.emplace_back(Curve{Curve::Kind::line,
                                slit.points[k - 1],
                                slit.points[k] - slit.points[k - 1],
                                Point::Zero(),
                                0.0,
                                1.0,
                                {Owner::Kind::crack, slit.crack}},
                          loops + i, Sharp{}, true);
  }
  const std::vector<Point> wedges = mouths(region, result.fans);
  while (split_pass(pieces, rule, wedges)) {
  }
  std::vector<std::vector<Piece>> chains(loops + region.slits.size());
  for (const Piece& piece : pieces) chains[piece.loop].push_back(piece);
  for (std::size_t i = 0; i < chains.size(); ++i) {
    if (i >= loops) {
      result.slits.push_back(grade_kinks(chains[i], rule));
      continue;
    }
    result.loops.push_back(grade_joints(chains[i], rule));
    for (std::size_t k = 0; k < chains[i].size(); ++k)
      result.has_corner = result.has_corner || is_corner(chains[i][k], chains[i][(k + 1) % chains[i].size()]);
  }
  return result;
}

}  // namespace raiser::mesh
