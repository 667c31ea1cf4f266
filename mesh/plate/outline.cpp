#include "mesh/plate/outline.hpp"

#include <array>
#include <cmath>
#include <stdexcept>

#include "mesh/legendre.hpp"
#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

std::string_view word(Raiser::Kind kind) {
  switch (kind) {
    case Raiser::Kind::hole:
      return "hole";
    case Raiser::Kind::notch:
      return "notch";
    case Raiser::Kind::fillet:
      return "fillet";
  }
  return "";
}

double edge_length(const Outline& outline, std::size_t edge) {
  static const GaussRule rule = gauss_legendre(24);
  double sum = 0.0;
  for (const Curve& curve : outline.curves) {
    if (curve.owner != Owner{Owner::Kind::edge, edge}) continue;
    const double half = (curve.end - curve.begin) / 2;
    for (std::size_t q = 0; q < rule.points.size(); ++q)
      sum += rule.weights[q] * std::abs(half) *
             curve.derivative((curve.begin + curve.end) / 2 + half * rule.points[q]).norm();
  }
  return sum;
}

Outline rectangular(double length, double width) {
  const double x = length / 2;
  const double y = width / 2;
  const std::array<Point, 4> corners = {Point(-x, -y), Point(x, -y), Point(x, y), Point(-x, y)};
  constexpr std::array edges = {rectangle::bottom, rectangle::right, rectangle::top, rectangle::left};
  Outline result;
  result.edges = {"right", "top", "left", "bottom"};
  for (std::size_t k = 0; k < corners.size(); ++k)
    result.curves.push_back(line(corners[k], corners[(k + 1) % 4], {Owner::Kind::edge, edges[k]}));
  return result;
}

Outline outline_of(const Plate& plate) {
  return plate.outline ? *plate.outline : rectangular(plate.length, plate.width);
}

std::vector<std::string> edge_names(const Plate& plate) { return outline_of(plate).edges; }

Raiser raiser(const Plate& plate, std::size_t index) {
  if (index >= raiser_count(plate)) throw std::out_of_range("the plate has no raiser of that index");
  if (index >= plate.holes.size()) return plate.outline->raisers[index - plate.holes.size()];
  const Hole& hole = plate.holes[index];
  return {Raiser::Kind::hole, hole.name, hole.centre, hole.centre, hole.centre, 0.0, ""};
}

std::vector<Raiser> raisers(const Plate& plate) {
  std::vector<Raiser> all;
  for (std::size_t i = 0; i < raiser_count(plate); ++i) all.push_back(raiser(plate, i));
  return all;
}

std::size_t raiser_count(const Plate& plate) {
  return plate.holes.size() + (plate.outline ? plate.outline->raisers.size() : 0);
}

}  // namespace raiser::mesh
