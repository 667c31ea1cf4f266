#include "solver/elasticity/outer_edge.hpp"

#include <algorithm>
#include <stdexcept>

namespace raiser::solver {

namespace {

Point normal_of(std::size_t edge) {
  constexpr std::array<std::array<double, 2>, 4> normals = {{{1, 0}, {0, 1}, {-1, 0}, {0, -1}}};
  return {normals[edge][0], normals[edge][1]};
}

}  // namespace

std::optional<std::size_t> edge_index(Owner::Kind kind) {
  switch (kind) {
    case Owner::Kind::right:
      return 0;
    case Owner::Kind::top:
      return 1;
    case Owner::Kind::left:
      return 2;
    case Owner::Kind::bottom:
      return 3;
    default:
      return std::nullopt;
  }
}

std::size_t loaded_edge(const Load& load) {
  if (const auto edge = edge_index(load.edge)) return *edge;
  throw std::invalid_argument("an edge load must name the right, top, left or bottom edge");
}

Point edge_traction(double stress, double along, const Point& n) {
  return {stress * n.x() - along * n.y(), stress * n.y() + along * n.x()};
}

EdgePiece whole_edge(const Plate& plate, std::size_t edge) {
  const Point half(0.5 * plate.length, 0.5 * plate.width);
  const Point n = normal_of(edge);
  const Point direction(-n.y(), n.x());
  return {edge, (n - direction).cwiseProduct(half), (n + direction).cwiseProduct(half)};
}

EdgePiece beyond(EdgePiece piece, int axis, double station) {
  piece.from[axis] = std::max(piece.from[axis], station);
  piece.to[axis] = std::max(piece.to[axis], station);
  return piece;
}

Resultant resultant(const Plate& plate, const EdgePiece& piece, double stress, double along,
                    const Point& about) {
  const double area = (piece.to - piece.from).norm() * plate.thickness;
  const Point force = area * edge_traction(stress, along, normal_of(piece.edge));
  const Point arm = 0.5 * (piece.from + piece.to) - about;
  return {force, arm.x() * force.y() - arm.y() * force.x()};
}

}  // namespace raiser::solver
