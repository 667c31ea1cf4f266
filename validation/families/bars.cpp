#include "validation/families/bars.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "mesh/plate/build.hpp"
#include "mesh/plate/shoulder.hpp"

namespace raiser::validation {

namespace {

using mesh::NotchShape;

mesh::Outline built(const mesh::OutlineResult& result) {
  if (!result.outline) throw std::invalid_argument(result.faults.front().what);
  return *result.outline;
}

mesh::Notch notch_of(const NotchForm& form, const char* name, std::size_t edge) {
  const NotchShape shape = form.is_ellipse    ? NotchShape::semi_ellipse
                           : form.opening > 0 ? NotchShape::v
                                              : NotchShape::u;
  mesh::Notch notch;
  notch.name = name;
  notch.shape = shape;
  notch.edge = edge;
  notch.depth = form.depth;
  if (form.is_ellipse)
    notch.width = 2 * std::sqrt(form.radius * form.depth);  // radius = (width/2)^2 / depth
  else
    notch.root_radius = form.radius;
  notch.opening_angle = form.opening;
  return notch;
}

}  // namespace

mesh::Plate notched_bar(double length, double width, const NotchForm& form, bool both) {
  std::vector<mesh::Notch> notches{notch_of(form, "upper", mesh::rectangle::top)};
  if (both) notches.push_back(notch_of(form, "lower", mesh::rectangle::bottom));
  return {length, width, 1.0, {}, built(mesh::with_notches(mesh::rectangular(length, width), notches))};
}

mesh::Plate stepped_bar(double length, double wide, double narrow, double radius) {
  mesh::Shoulder shoulder;
  shoulder.name = "step";
  shoulder.width = narrow;
  shoulder.fillet.radius = radius;
  return {length, wide, 1.0, {}, built(mesh::stepped_bar(length, wide, {shoulder}))};
}

std::size_t upper_raiser(const mesh::Plate& plate) {
  const auto all = mesh::raisers(plate);
  const auto lower = [](const mesh::Raiser& a, const mesh::Raiser& b) { return a.root.y() < b.root.y(); };
  return static_cast<std::size_t>(std::max_element(all.begin(), all.end(), lower) - all.begin());
}

mesh::Plate watched(mesh::Plate plate, std::size_t edge) {
  mesh::Outline outline = mesh::outline_of(plate);
  mesh::Raiser raiser;
  raiser.kind = mesh::Raiser::Kind::notch;
  raiser.name = outline.edges.at(edge);
  for (mesh::Curve& curve : outline.curves) {
    if (curve.owner != mesh::Owner{mesh::Owner::Kind::edge, edge}) continue;
    raiser.centre = raiser.root = raiser.mouth = curve.at((curve.begin + curve.end) / 2);
    raiser.radius = (curve.finish() - curve.start()).norm();
    curve.owner = {mesh::Owner::Kind::raiser, outline.raisers.size()};
  }
  outline.raisers.push_back(raiser);
  plate.outline = std::move(outline);
  return plate;
}

mesh::Plate elliptic_ring(const mesh::Point& outer, const mesh::Point& inner) {
  using mesh::Curve;
  mesh::Outline outline;
  outline.edges = {"outer"};
  const double quarter = std::numbers::pi / 2;
  for (int k = 0; k < 4; ++k)
    outline.curves.push_back({Curve::Kind::arc,
                              mesh::Point::Zero(),
                              {outer.x() / 2, 0},
                              {0, outer.y() / 2},
                              k * quarter,
                              (k + 1) * quarter,
                              {mesh::Owner::Kind::edge, 0}});
  const mesh::Hole hole{"inner", mesh::HoleShape::ellipse, inner.x(), inner.y(),
                        0.0,     mesh::Point::Zero(),      0.0};
  return {outer.x(), outer.y(), 1.0, {hole}, std::move(outline)};
}

}  // namespace raiser::validation
