#include "solver/fe/constraints.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <map>
#include <stdexcept>

namespace raiser::solver {

namespace {

/// A displacement held along one direction.
struct Hold {
  Point direction;
  double value;
};

/// Everything that holds one function.
struct Holds {
  std::vector<Hold> all;

  void add(const Point& direction, double value) {
    for (const Hold& hold : all) {
      const double same = hold.direction.dot(direction);
      if (std::abs(std::abs(same) - 1) > 1e-9) continue;
      if (std::abs(value - same * hold.value) > 1e-12 * (1 + std::abs(value)))
        throw std::invalid_argument("two supports hold their common corner at different places");
      return;
    }
    all.push_back({direction, value});
  }
};

/// What a boundary side holds: values of its vertices, 0 for its other functions.
std::vector<Hold> of_side(const Owner& owner, bool odd_x, bool odd_y, const std::vector<HeldEdge>& edges) {
  const auto unit = [](int component) { return component == 0 ? Point::UnitX() : Point::UnitY(); };
  if (owner.kind == Owner::Kind::mirror_x) return {{unit(odd_x ? 1 : 0), 0.0}};
  if (owner.kind == Owner::Kind::mirror_y) return {{unit(odd_y ? 0 : 1), 0.0}};
  std::vector<Hold> result;
  for (const HeldEdge& edge : edges) {
    if (!(edge.owner == owner)) continue;
    if (edge.along_normal) result.push_back({edge.normal, *edge.along_normal});
    if (edge.along_edge) result.push_back({Point(-edge.normal.y(), edge.normal.x()), *edge.along_edge});
  }
  return result;
}

bool is_along_axis(const Point& direction) {
  return std::abs(direction.x()) < 1e-12 || std::abs(direction.y()) < 1e-12;
}

void hold(Constraints& result, int function, const Holds& holds) {
  if (holds.all.size() > 1) {
    Eigen::Matrix2d rows;
    rows << holds.all[0].direction.transpose(), holds.all[1].direction.transpose();
    const Point at = rows.inverse() * Point(holds.all[0].value, holds.all[1].value);
    if (holds.all.size() > 2 && std::abs(holds.all[2].direction.dot(at) - holds.all[2].value) >
                                    1e-12 * (1 + std::abs(holds.all[2].value)))
      throw std::invalid_argument("two supports hold their common corner at different places");
    for (int c = 0; c < 2; ++c) {
      result.held[2 * function + c] = true;
      result.value[2 * function + c] = at[c];
    }
    return;
  }
  const Hold& only = holds.all.front();
  int component = 0;
  double value = only.value;
  if (is_along_axis(only.direction)) {
    component = std::abs(only.direction.x()) > 0.5 ? 0 : 1;
    value *= only.direction[component] > 0 ? 1.0 : -1.0;
  } else {
    result.turned.push_back({function, only.direction});
  }
  result.held[2 * function + component] = true;
  result.value[2 * function + component] = value;
}

void turn_by(const std::vector<Constraints::Turned>& turned, Eigen::MatrixXd& vectors, double sense) {
  for (const Constraints::Turned& at : turned) {
    Eigen::Matrix2d to;
    to << at.first.x(), sense * at.first.y(), -sense * at.first.y(), at.first.x();
    vectors.middleRows(2 * at.function, 2) = (to * vectors.middleRows(2 * at.function, 2)).eval();
  }
}

}  // namespace

Point Constraints::direction(int unknown) const {
  const auto at = std::lower_bound(turned.begin(), turned.end(), unknown / 2,
                                   [](const Turned& t, int function) { return t.function < function; });
  const Point first = at != turned.end() && at->function == unknown / 2 ? at->first : Point(1, 0);
  return unknown % 2 == 0 ? first : Point(-first.y(), first.x());
}

void Constraints::turn(Eigen::MatrixXd& vectors) const { turn_by(turned, vectors, 1.0); }
void Constraints::turn_back(Eigen::MatrixXd& vectors) const { turn_by(turned, vectors, -1.0); }

Constraints constraints_of(const Discretisation& space, bool odd_x, bool odd_y,
                           const std::vector<HeldEdge>& edges) {
  const mesh::Mesh& mesh = space.mesh();
  Constraints result{std::vector<bool>(space.unknowns(), false), Eigen::VectorXd::Zero(space.unknowns()), {}};
  std::map<int, Holds> holds;
  for (const mesh::BoundarySide& side : mesh.boundary()) {
    const std::vector<Hold> own = of_side(side.curve.owner, odd_x, odd_y, edges);
    if (own.empty()) continue;
    const auto& corners = mesh.triangles()[side.triangle];
    const int inner = space.edge_entity(mesh.edge(side.triangle, side.side));
    for (const int entity :
         {space.vertex_entity(corners[side.side]), space.vertex_entity(corners[(side.side + 1) % 3]), inner})
      for (int f = space.first_function(entity); f < space.first_function(entity + 1); ++f)
        for (const Hold& at : own) holds[f].add(at.direction, entity == inner ? 0.0 : at.value);
  }
  for (const auto& [function, what] : holds) hold(result, function, what);
  return result;
}

}  // namespace raiser::solver
