#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/plate/build.hpp"

namespace raiser::mesh {

namespace {

constexpr double quarter = std::numbers::pi / 2;
constexpr double rounding = 1e-9;  // of the sizes involved: touching

bool positive(double x) { return std::isfinite(x) && x > 0.0; }

/// Half the width of the notch at the edge.
double half_mouth(const Notch& n) {
  switch (n.shape) {
    case NotchShape::semi_ellipse:
    case NotchShape::keyhole:
      return n.width / 2;
    case NotchShape::semicircle:
      return n.depth;
    case NotchShape::u:
    case NotchShape::v:
      break;
  }
  const double half = n.shape == NotchShape::v ? n.opening_angle / 2 : 0.0;
  const double r = n.root_radius;
  const double flank = n.depth - r * (1 - std::sin(half));  // depth where flank and root meet
  if (flank <= 0.0) return std::sqrt(n.depth * (2 * r - n.depth));
  return r * std::cos(half) + flank * std::tan(half);
}

/// A notch in its own axes: s along the edge, in the chain's direction, and d
/// into the material.
class NotchChain {
 public:
  NotchChain(const Point& mouth, const Point& along, const Owner& owner)
      : mouth_(mouth), along_(along), inward_(-along.y(), along.x()), owner_(owner) {}

  Point place(double s, double d) const { return mouth_ + s * along_ + d * inward_; }
  void flank(double s0, double d0, double s1, double d1) {
    if (s0 != s1 || d0 != d1) loop_.push_back(line(place(s0, d0), place(s1, d1), owner_));
  }
  /// About (0, depth) with semi-axes a along the edge and b into the material.
  void arc(double depth, double a, double b, double begin, double end) {
    loop_.push_back({Curve::Kind::arc, place(0, depth), a * along_, b * inward_, begin, end, owner_});
  }
  Loop take() { return std::move(loop_); }

 private:
  Point mouth_, along_, inward_;
  Owner owner_;
  Loop loop_;
};

Loop chain(const Notch& n, const Point& mouth, const Point& along, const Owner& owner) {
  NotchChain result(mouth, along, owner);
  const double half = half_mouth(n);
  const double r = n.shape == NotchShape::semicircle ? n.depth : n.root_radius;
  const double centre = n.depth - r;
  if (n.shape == NotchShape::semi_ellipse || n.shape == NotchShape::semicircle) {
    result.arc(0, half, n.depth, 2 * quarter, 0);
    return result.take();
  }
  double turn = n.shape == NotchShape::v ? n.opening_angle / 2 : 0.0;  // of the arc's end, from the edge
  if (n.shape == NotchShape::keyhole) turn = -std::acos(n.width / (2 * r));
  const double joint = centre + r * std::sin(turn);  // depth where flank and root meet
  if (n.shape != NotchShape::keyhole && joint <= 0.0) turn = std::asin(-centre / r);
  const double s = r * std::cos(turn);
  const double d = std::max(centre + r * std::sin(turn), 0.0);
  if (d > 0.0) result.flank(-half, 0, -s, d);
  result.arc(centre, r, r, 2 * quarter - turn, turn);
  if (d > 0.0) result.flank(s, d, half, 0);
  return result.take();
}

std::string in_words(const Notch& n) {
  std::string text = fmt::format("{} notch, depth {:.6g} mm", word(n.shape), n.depth);
  if (n.shape == NotchShape::semi_ellipse || n.shape == NotchShape::keyhole)
    text += fmt::format(", width {:.6g} mm", n.width);
  if (n.shape != NotchShape::semicircle) text += fmt::format(", root radius {:.6g} mm", root_radius(n));
  if (n.shape == NotchShape::v)
    text += fmt::format(", opening angle {:.6g} deg", n.opening_angle * 180 / std::numbers::pi);
  return text;
}

/// The one straight curve of the body that is the edge, if it is that.
const Curve* straight(const Outline& body, std::size_t edge) {
  const Curve* found = nullptr;
  for (const Curve& curve : body.curves) {
    if (curve.owner != Owner{Owner::Kind::edge, edge}) continue;
    if (found != nullptr || curve.kind != Curve::Kind::line) return nullptr;
    found = &curve;
  }
  return found;
}

/// Whether the chain runs the edge towards larger x (y where upright).
double sense(const Point& along) {
  const double main = std::abs(along.x()) > 1e-12 ? along.x() : along.y();
  return main > 0 ? 1.0 : -1.0;
}

/// Distance of the notch's axis from the edge's start, along the chain.
double station(const Curve& edge, const Notch& n) {
  return edge.u.norm() / 2 + sense(edge.u.normalized()) * n.at;
}

std::string size_fault(const Notch& n) {
  const bool by_radius =
      n.shape == NotchShape::u || n.shape == NotchShape::v || n.shape == NotchShape::keyhole;
  if (!positive(n.depth)) return fmt::format("its depth is {:.6g} mm", n.depth);
  if (by_radius && !positive(n.root_radius))
    return fmt::format("its root radius is {:.6g} mm", n.root_radius);
  const bool by_width = n.shape == NotchShape::semi_ellipse || n.shape == NotchShape::keyhole;
  if (by_width && !positive(n.width)) return fmt::format("its width is {:.6g} mm", n.width);
  if (n.shape == NotchShape::v && !(n.opening_angle >= 0.0 && n.opening_angle < 0.97 * 2 * quarter))
    return fmt::format("its opening angle is {:.6g} deg; it lies between 0 and 174 deg",
                       n.opening_angle * 180 / std::numbers::pi);
  if (n.shape == NotchShape::keyhole && !(n.width < 2 * n.root_radius))
    return fmt::format("its channel of {:.6g} mm is as wide as its circle of {:.6g} mm or wider", n.width,
                       2 * n.root_radius);
  if (n.shape == NotchShape::keyhole && !(n.depth > 2 * n.root_radius))
    return fmt::format("its circle of diameter {:.6g} mm does not fit into its depth of {:.6g} mm",
                       2 * n.root_radius, n.depth);
  if (n.shape != NotchShape::keyhole && n.depth >= 2 * root_radius(n) && half_mouth(n) <= 0)
    return "it has no mouth";
  return {};
}

std::string label(const Notch& n) { return fmt::format("notch '{}'", n.name); }

/// Where each notch of one edge begins and ends along it; complains of what
/// does not fit.
struct Mouth {
  std::size_t notch = 0;
  double begin = 0.0, middle = 0.0, end = 0.0;
};
std::vector<Mouth> mouths_on(const Curve& edge, const std::vector<Notch>& notches,
                             const std::vector<std::size_t>& on_edge, std::vector<CutFault>& faults) {
  const double length = edge.u.norm();
  std::vector<Mouth> mouths;
  for (const std::size_t i : on_edge) {
    const double middle = station(edge, notches[i]);
    const double half = half_mouth(notches[i]);
    mouths.push_back({i, middle - half, middle, middle + half});
    const double over = std::max(half - middle, middle + half - length);
    if (!(over < -rounding * length))
      faults.push_back({i,
                        fmt::format("{} reaches {:.4g} mm beyond its edge, which is {:.6g} mm long",
                                    label(notches[i]), std::max(over, 0.0), length),
                        "move it towards the middle of the edge, or make it smaller"});
  }
  std::sort(mouths.begin(), mouths.end(), [](const Mouth& a, const Mouth& b) { return a.middle < b.middle; });
  for (std::size_t k = 1; k < mouths.size(); ++k)
    if (!(mouths[k].begin - mouths[k - 1].end > rounding * length))
      faults.push_back(
          {mouths[k].notch,
           fmt::format("{} runs into {}", label(notches[mouths[k].notch]),
                       label(notches[mouths[k - 1].notch])),
           fmt::format("move them at least {:.4g} mm apart", mouths[k - 1].end - mouths[k].begin)});
  return mouths;
}

}  // namespace

std::string_view word(NotchShape shape) {
  switch (shape) {
    case NotchShape::u:
      return "U";
    case NotchShape::v:
      return "V";
    case NotchShape::semicircle:
      return "semicircle";
    case NotchShape::semi_ellipse:
      return "semi-ellipse";
    case NotchShape::keyhole:
      return "keyhole";
  }
  return "";
}

double root_radius(const Notch& notch) {
  if (notch.shape == NotchShape::semicircle) return notch.depth;
  if (notch.shape == NotchShape::semi_ellipse) return notch.width * notch.width / (4 * notch.depth);
  return notch.root_radius;
}

OutlineResult with_notches(const Outline& body, const std::vector<Notch>& notches) {
  OutlineResult result;
  std::vector<std::vector<std::size_t>> by_edge(body.edges.size());
  for (std::size_t i = 0; i < notches.size(); ++i) {
    const std::string wrong = size_fault(notches[i]);
    if (!wrong.empty())
      result.faults.push_back(
          {i, label(notches[i]) + ": " + wrong, "give sizes greater than 0 that fit together"});
    else if (notches[i].edge >= body.edges.size() || straight(body, notches[i].edge) == nullptr)
      result.faults.push_back({i, label(notches[i]) + ": its edge is not one straight line",
                               "put it on a straight edge, or draw it as part of the outline"});
    else
      by_edge[notches[i].edge].push_back(i);
  }
  Outline outline = body;
  outline.body = body.gross();
  outline.curves.clear();
  for (const Curve& curve : body.curves) {
    const bool cut = curve.owner.kind == Owner::Kind::edge && !by_edge[curve.owner.index].empty();
    if (!cut) {
      outline.curves.push_back(curve);
      continue;
    }
    const Point along = curve.u.normalized();
    Point from = curve.start();
    for (const Mouth& m : mouths_on(curve, notches, by_edge[curve.owner.index], result.faults)) {
      const Notch& n = notches[m.notch];
      const Point mouth = curve.start() + m.middle * along;
      const Loop cut_out = chain(n, mouth, along, {Owner::Kind::raiser, outline.raisers.size()});
      outline.curves.push_back(line(from, cut_out.front().start(), curve.owner));
      outline.curves.insert(outline.curves.end(), cut_out.begin(), cut_out.end());
      from = cut_out.back().finish();
      const Point inward(-along.y(), along.x());
      const Point root = mouth + n.depth * inward;
      const bool on_edge = n.shape == NotchShape::semi_ellipse;
      const Point centre = on_edge ? mouth : Point(root - root_radius(n) * inward);
      outline.raisers.push_back(
          {Raiser::Kind::notch, n.name, centre, root, root, root_radius(n), in_words(n), n});
    }
    outline.curves.push_back(line(from, curve.finish(), curve.owner));
  }
  if (result.faults.empty()) result.outline = std::move(outline);
  return result;
}

std::optional<Opposite> opposite(const Outline& body, const Notch& notch) {
  const Curve* own = notch.edge < body.edges.size() ? straight(body, notch.edge) : nullptr;
  if (own == nullptr) return std::nullopt;
  const Point along = own->u.normalized();
  const Point inward(-along.y(), along.x());
  const Point mouth = own->start() + station(*own, notch) * along;
  std::optional<Opposite> best;
  double nearest = 0.0;
  for (std::size_t e = 0; e < body.edges.size(); ++e) {
    const Curve* other = straight(body, e);
    if (other == nullptr || other == own || along.dot(other->u.normalized()) > -1 + 1e-9) continue;
    const double across = (other->start() - mouth).dot(inward);
    const double reached = (mouth - other->start()).dot(other->u.normalized());
    if (across <= 0 || reached <= 0 || reached >= other->u.norm()) continue;
    if (best && across >= nearest) continue;
    nearest = across;
    best = Opposite{e, sense(other->u.normalized()) * (reached - other->u.norm() / 2)};
  }
  return best;
}

}  // namespace raiser::mesh
