// Notches in the edges of rectangles, and stepped bars.
#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>

#include "mesh/plate/section.hpp"
#include "validation/compare/families.hpp"
#include "validation/published/edge_raisers.hpp"

namespace raiser::validation {

namespace {

using mesh::Notch;
using mesh::NotchShape;

bool same(double a, double b, double size) { return std::abs(a - b) <= 1e-9 * size; }

/// Whether the plate is a rectangle but for its notches.
bool is_notched_rectangle(const mesh::Plate& plate) {
  const mesh::Loop& gross = plate.outline->gross();
  return gross.size() == 4 && std::all_of(gross.begin(), gross.end(), [](const mesh::Curve& c) {
           return c.kind == mesh::Curve::Kind::line && std::min(std::abs(c.u.x()), std::abs(c.u.y())) == 0.0;
         });
}

double half_mouth(const Notch& notch) {
  if (notch.shape == NotchShape::semi_ellipse) return notch.width / 2;
  const double radius = mesh::root_radius(notch);
  return radius + (notch.depth - radius) * std::tan(notch.opening_angle / 2);
}

/// A notch in a bar pulled or bent along its edge.
struct Bar {
  Notch notch;
  bool along_x = true;
  double width = 0.0;   ///< mm, of the bar
  double end = 0.0;     ///< mm, to the nearer loaded end
  double stress = 0.0;  ///< MPa, gross, of tension or of bending at the outer fibre
  bool bends = false;
  std::optional<std::size_t> opposite;  ///< raiser: the same notch on the other edge

  double sharpness() const { return notch.depth / mesh::root_radius(notch); }
  double share() const { return notch.depth / width; }
};

/// The same notch at the same place on the opposite edge, if there is one.
std::optional<std::size_t> opposite(const mesh::Plate& plate, const Notch& notch) {
  const std::size_t across = (notch.edge + 2) % 4;  // right, top, left, bottom
  for (std::size_t i = plate.holes.size(); i < mesh::raiser_count(plate); ++i) {
    const auto other = mesh::raiser(plate, i).notch;
    if (other && other->edge == across && other->shape == notch.shape &&
        same(other->at, notch.at, plate.length + plate.width) &&
        same(other->depth, notch.depth, notch.depth) &&
        same(mesh::root_radius(*other), mesh::root_radius(notch), notch.depth) &&
        same(other->opening_angle, notch.opening_angle, 1.0))
      return i;
  }
  return std::nullopt;
}

std::optional<Bar> bar_of(const Situation& s) {
  const auto notch = mesh::raiser(s.plate, s.hole).notch;
  if (!notch || !is_notched_rectangle(s.plate)) return std::nullopt;
  Bar bar;
  bar.notch = *notch;
  bar.along_x = notch->edge == mesh::rectangle::top || notch->edge == mesh::rectangle::bottom;
  const bool is_bent = s.bending != 0 && s.remote.xx == 0 && s.remote.yy == 0 && s.remote.xy == 0;
  const bool is_pulled = s.uniaxial() && (s.remote.xx != 0) == bar.along_x;
  if (s.pressure != 0 || !(is_pulled || (is_bent && bar.along_x))) return std::nullopt;
  bar.bends = is_bent;
  const double sign = notch->edge == mesh::rectangle::bottom ? -1.0 : 1.0;  // bending pulls the upper side
  bar.stress = is_bent ? sign * s.bending : (bar.along_x ? s.remote.xx : s.remote.yy);
  bar.width = bar.along_x ? s.plate.width : s.plate.length;
  const double length = bar.along_x ? s.plate.length : s.plate.width;
  bar.end = length / 2 - std::abs(notch->at) - half_mouth(*notch);
  bar.opposite = opposite(s.plate, *notch);
  return bar;
}

bool is_u(const Notch& notch) {
  return notch.shape == NotchShape::semicircle ||
         (notch.shape == NotchShape::u && notch.depth >= notch.root_radius);
}

std::vector<Comparison> pair(const Situation& s, const Bar& bar, const std::vector<Effect>& effects) {
  const double q = bar.sharpness(), x = 2 * bar.share();
  const double net = bar.stress / (bar.bends ? (1 - x) * (1 - x) : 1 - x);
  if (is_u(bar.notch)) {
    if (bar.bends)
      return {row(s, Reference::u_pair_bending, "Kt net", u_pair_bending(q, x), net, {{"h/r", q}}, effects)};
    return {row(s, Reference::u_pair_tension, "Kt net", u_pair_tension(q, x), net, {{"h/r", q}}, effects)};
  }
  if (bar.notch.shape != NotchShape::v || bar.bends) return {};
  // Two depths were measured; the factor of the U notch that is corrected is itself a fit.
  const double ktu = u_pair_tension(q, x), degrees = bar.notch.opening_angle * 180 / std::numbers::pi;
  constexpr double near = 0.01;
  if (std::abs(x - 0.398) <= near)
    return {row(s, Reference::v_pair, "Kt net", v_pair_shallow(ktu, degrees), net, {{"Ktu", ktu}}, effects)};
  if (std::abs(x - 0.667) <= near)
    return {
        row(s, Reference::v_pair_deep, "Kt net", v_pair_deep(ktu, degrees), net, {{"Ktu", ktu}}, effects)};
  return {};
}

/// A notch by itself: the far edge acts on it as on an edge crack, by 7 (h/D)^2, nearly.
Effect far_edge(const Bar& bar) { return {"the far edge is not far away", 7 * bar.share() * bar.share()}; }

std::vector<Comparison> single(const Situation& s, const Bar& bar, const std::vector<Effect>& effects) {
  const double q = bar.sharpness(), x = bar.share();
  std::vector<Comparison> rows;
  if (is_u(bar.notch) && bar.bends)
    rows.push_back(row(s, Reference::u_single_bending, "Kt net", u_single_bending(q, x),
                       bar.stress / ((1 - x) * (1 - x)), {{"h/r", q}}, effects));
  if (is_u(bar.notch) && !bar.bends)
    rows.push_back(row(s, Reference::u_single_tension, "Kt on P/A + M c/I of the net section",
                       u_single_tension(q, x), bar.stress * u_single_nominal(x), {{"h/r", q}}, effects));
  if (bar.bends || x > 0.1) return rows;
  std::vector<Effect> wide = effects;
  wide.push_back(far_edge(bar));
  const auto add = [&](Reference reference, double factor) {
    rows.push_back(row(s, reference, "Kt gross", factor, bar.stress, {{"t/r", q}}, wide));
  };
  const bool is_ellipse = bar.notch.shape == NotchShape::semi_ellipse;
  if (std::abs(q - 1) < 1e-9 && (is_ellipse || bar.notch.shape == NotchShape::semicircle))
    add(Reference::semicircle_half_plane, semicircle_half_plane);
  else if (is_ellipse)
    add(Reference::ellipse_half_plane, ellipse_half_plane(q));
  else if (is_u(bar.notch))
    add(Reference::u_half_plane, u_half_plane(q));
  return rows;
}

}  // namespace

std::vector<Comparison> compare_notch(const Situation& s) {
  const auto bar = bar_of(s);
  if (!bar) return {};
  std::vector<std::size_t> own{s.hole};
  if (bar->opposite) own.push_back(*bar->opposite);
  const Effect others = other_raisers(s.plate, mesh::raiser(s.plate, s.hole).root, own);
  if (others.size > 0.1) return {};
  const std::vector<Effect> effects{ends(bar->end, bar->width, "notch"), others};
  return bar->opposite ? pair(s, *bar, effects) : single(s, *bar, effects);
}

namespace {

/// A bar that steps from D to d on both sides, seen at one of its fillets.
struct Step {
  double wide = 0.0, narrow = 0.0, radius = 0.0;  // mm
  double end = 0.0;                               ///< mm, from the step to the nearer end
  std::size_t other = 0;                          ///< raiser: the fillet on the other side

  double height() const { return (wide - narrow) / 2; }
};

std::optional<Step> step_of(const Situation& s) {
  const mesh::Raiser own = mesh::raiser(s.plate, s.hole);
  if (!own.fillet || own.fillet->shape != mesh::FilletShape::circle) return std::nullopt;
  const double size = s.plate.length + s.plate.width;
  std::optional<std::size_t> other;
  for (std::size_t i = s.plate.holes.size(); i < mesh::raiser_count(s.plate); ++i) {
    const mesh::Raiser at = mesh::raiser(s.plate, i);
    const bool is_mirrored =
        i != s.hole && at.fillet && at.fillet->shape == own.fillet->shape &&
        same(at.fillet->radius, own.fillet->radius, size) && same(at.root.x(), own.root.x(), size) &&
        same(at.root.y(), -own.root.y(), size) && same(at.mouth.y(), -own.mouth.y(), size);
    if (is_mirrored) other = i;
  }
  if (!other) return std::nullopt;
  Step step;
  step.wide = 2 * std::abs(own.mouth.y());
  step.narrow = 2 * std::abs(own.root.y());
  step.radius = own.fillet->radius;
  step.end = s.plate.length / 2 - std::max(std::abs(own.root.x()), std::abs(own.mouth.x()));
  step.other = *other;
  // The shoulder's face must stand across the bar, as high as the two widths say.
  const double gross =
      mesh::shape_of(mesh::gross_along(s.plate, mesh::Direction::across, own.mouth.x())).length;
  const double net = mesh::shape_of(mesh::gross_along(s.plate, mesh::Direction::across, own.root.x())).length;
  const bool is_bar = std::abs(gross - s.plate.width) <= 1e-6 * size && net < gross &&
                      std::abs(net - step.narrow) <= 1e-6 * size;
  if (!is_bar) return std::nullopt;
  step.wide = gross;
  return step;
}

}  // namespace

std::vector<Comparison> compare_fillet(const Situation& s) {
  const auto step = step_of(s);
  const bool is_bent = s.bending != 0 && s.remote.xx == 0;
  const bool is_pulled = s.remote.xx != 0 && s.bending == 0;
  if (!step || s.pressure != 0 || s.remote.yy != 0 || s.remote.xy != 0 || is_bent == is_pulled) return {};
  const mesh::Raiser own = mesh::raiser(s.plate, s.hole);
  const Effect others = other_raisers(s.plate, own.root, {s.hole, step->other});
  if (others.size > 0.1) return {};
  const std::vector<Effect> effects{ends(step->end, step->wide, "step"), others};
  const double q = step->height() / step->radius, x = 2 * step->height() / step->wide;
  const double sign = is_bent && own.root.y() < 0 ? -1.0 : 1.0;
  const double net = std::copysign(s.found.net.nominal, sign * (is_bent ? s.bending : s.remote.xx));
  if (!s.found.net.kt || net == 0) return {};
  std::vector<Comparison> rows;
  if (is_pulled) {
    rows.push_back(
        row(s, Reference::fillet_tension, "Kt on P/(t d)", fillet_tension(q, x), net, {{"h/r", q}}, effects));
    return rows;
  }
  rows.push_back(row(s, Reference::fillet_bending, "Kt on 6M/(t d^2)", fillet_bending(q, x), net,
                     {{"h/r", q}}, effects));
  if (std::abs(step->wide / step->narrow - 1.111) < 0.005)
    rows.push_back(row(s, Reference::fillet_bending_power, "Kt on 6M/(t d^2)",
                       fillet_bending_power(step->radius / step->narrow), net, {}, effects));
  return rows;
}

}  // namespace raiser::validation
