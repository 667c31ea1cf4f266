#include "mesh/plate/grown.hpp"

#include <fmt/format.h>

#include <cmath>
#include <stdexcept>

namespace raiser::mesh {
namespace {

/// The tip's point and its neighbour in the chain.
struct End {
  Point& tip;
  const Point& inner;
};

End end_of(Crack& crack, bool at_end) {
  std::vector<Point>& p = crack.points;
  if (p.size() < 2) throw std::invalid_argument("a crack that grows needs two points");
  return at_end ? End{p.back(), p[p.size() - 2]} : End{p.front(), p[1]};
}

}  // namespace

Crack extended(Crack crack, bool at_end, double advance) {
  const End end = end_of(crack, at_end);
  const double length = (end.tip - end.inner).norm();
  if (!(length + advance > 1e-9 * length))
    throw std::invalid_argument(
        fmt::format("moving the tip back by {:.6g} mm takes away the last segment of the crack, {:.6g} mm",
                    -advance, length));
  end.tip = end.inner + (1.0 + advance / length) * (end.tip - end.inner);
  return crack;
}

Crack kinked(Crack crack, bool at_end, double advance, double angle) {
  if (!(advance > 0.0)) throw std::invalid_argument("a kinked crack grows by a positive length only");
  if (angle == 0.0) return extended(std::move(crack), at_end, advance);
  const End end = end_of(crack, at_end);
  const Point ahead = (end.tip - end.inner).normalized();
  const Point turned(std::cos(angle) * ahead.x() - std::sin(angle) * ahead.y(),
                     std::sin(angle) * ahead.x() + std::cos(angle) * ahead.y());
  const Point next = end.tip + advance * turned;
  crack.points.insert(at_end ? crack.points.end() : crack.points.begin(), next);
  return crack;
}

}  // namespace raiser::mesh
