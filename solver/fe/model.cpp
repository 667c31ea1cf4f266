#include "solver/fe/model.hpp"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "mesh/legendre.hpp"
#include "solver/fe/stiffness.hpp"

namespace raiser::solver {

using mesh::BoundarySide;
using Parity = UnitLoad::Parity;

Model::Model(mesh::Mesh mesh, mesh::Mirrors mirrors, const HookeLaw& material, double thickness,
             std::vector<UnitLoad> loads)
    : mesh_(std::move(mesh)),
      mirrors_(mirrors),
      material_(material),
      thickness_(thickness),
      loads_(std::move(loads)),
      tree_(mesh_) {
  for (const double y : {1.0, -1.0})
    for (const double x : {1.0, -1.0})
      if ((x > 0 || mirrors.x) && (y > 0 || mirrors.y)) images_.push_back({{x, y}});
  if ((mirrors.x || mirrors.y) && !material_.has_mirrors())
    throw std::invalid_argument("Model: the material does not have the mirror lines of the mesh");
  for (std::size_t i = 0; i < loads_.size(); ++i) {
    if ((mirrors.x && loads_[i].under_x == Parity::neither) ||
        (mirrors.y && loads_[i].under_y == Parity::neither))
      throw std::invalid_argument("Model: load '" + loads_[i].name +
                                  "' does not have the mirror lines of the mesh");
    const bool odd_x = mirrors.x && loads_[i].under_x == Parity::odd;
    const bool odd_y = mirrors.y && loads_[i].under_y == Parity::odd;
    auto found = std::find_if(classes_.begin(), classes_.end(),
                              [&](const Class& c) { return c.odd_x == odd_x && c.odd_y == odd_y; });
    if (found == classes_.end()) found = classes_.insert(classes_.end(), Class{{}, odd_x, odd_y});
    found->loads.push_back(i);
  }
}

double Model::parity(std::size_t load, const Image& image) const {
  double sign = 1.0;
  if (image.sign[0] < 0 && loads_[load].under_x == Parity::odd) sign = -sign;
  if (image.sign[1] < 0 && loads_[load].under_y == Parity::odd) sign = -sign;
  return sign;
}

Eigen::VectorXd Model::factors(std::size_t load_case, const Image& image) const {
  Eigen::VectorXd result = Eigen::VectorXd::Zero(static_cast<Eigen::Index>(loads_.size()));
  for (std::size_t l = 0; l < loads_.size(); ++l)
    if (load_case == 0 || load_case == l + 1) result[static_cast<Eigen::Index>(l)] = parity(l, image);
  return result;
}

std::vector<bool> Model::held_on_mirrors(const Discretisation& space, const Class& cls) const {
  std::vector<bool> held(space.unknowns(), false);
  for (const BoundarySide& side : mesh_.boundary()) {
    int component = 0;
    if (side.curve.owner.kind == Owner::Kind::mirror_x)
      component = cls.odd_x ? 1 : 0;
    else if (side.curve.owner.kind == Owner::Kind::mirror_y)
      component = cls.odd_y ? 0 : 1;
    else
      continue;
    const auto& corners = mesh_.triangles()[side.triangle];
    for (const int entity :
         {space.vertex_entity(corners[side.side]), space.vertex_entity(corners[(side.side + 1) % 3]),
          space.edge_entity(mesh_.edge(side.triangle, side.side))})
      for (int f = space.first_function(entity); f < space.first_function(entity + 1); ++f)
        held[2 * f + component] = true;
  }
  return held;
}

std::vector<int> Model::pins(const std::vector<bool>& held) const {
  const auto& points = mesh_.points();
  const auto less_sum = [](const Point& a, const Point& b) { return a.sum() < b.sum(); };
  const auto first = std::min_element(points.begin(), points.end(), less_sum);
  const auto last = std::max_element(points.begin(), points.end(), less_sum);
  const double size = (*last - *first).norm();
  std::vector<Eigen::Vector3d> basis;  // of the rigid motions that are prevented
  const auto prevents_more = [&](int unknown) {
    const Point x = (points[unknown / 2] - *first) / size;
    Eigen::Vector3d row = unknown % 2 == 0 ? Eigen::Vector3d(1, 0, -x.y()) : Eigen::Vector3d(0, 1, x.x());
    for (const Eigen::Vector3d& b : basis) row -= row.dot(b) * b;
    if (row.norm() < 1e-6) return false;
    basis.push_back(row.normalized());
    return true;
  };
  const int vertices = static_cast<int>(points.size());
  for (int u = 0; u < 2 * vertices && basis.size() < 3; ++u)
    if (held[u]) prevents_more(u);
  std::vector<int> result;
  const int a = 2 * static_cast<int>(first - points.begin());
  const int b = 2 * static_cast<int>(last - points.begin());
  for (const int u : {a, a + 1, b, b + 1})
    if (basis.size() < 3 && !held[u] && prevents_more(u)) result.push_back(u);
  return result;
}

Eigen::MatrixXd Model::load_vectors(const Discretisation& space) const {
  Eigen::MatrixXd f = Eigen::MatrixXd::Zero(space.unknowns(), static_cast<Eigen::Index>(loads_.size()));
  const mesh::GaussRule& rule = traction_rule(space.degree());
  const auto& shapes = sides_at_gauss_points(space.degree()).shapes;
  Discretisation::Local local;
  for (const BoundarySide& side : mesh_.boundary()) {
    const Owner& owner = side.curve.owner;
    if (owner.kind == Owner::Kind::mirror_x || owner.kind == Owner::Kind::mirror_y) continue;
    space.local(side.triangle, local);
    for (std::size_t q = 0; q < rule.points.size(); ++q) {
      const double t = side.parameter(rule.points[q]);
      const Point along = side.curve.derivative(t) * (side.curve.end - side.curve.begin) / 2;
      const Point normal = Point(along.y(), -along.x()) / along.norm();
      const double weight = rule.weights[q] * along.norm();
      const Point x = side.curve.at(t);
      for (std::size_t l = 0; l < loads_.size(); ++l) {
        const Point force = weight * loads_[l].traction(owner, x, normal);
        if (force.isZero(0.0)) continue;
        for (std::size_t i = 0; i < local.function.size(); ++i) {
          const double value = local.sign[i] * shapes[side.side].value(i, q);
          f(2 * local.function[i], l) += value * force.x();
          f(2 * local.function[i] + 1, l) += value * force.y();
        }
      }
    }
  }
  return f;
}

Factorisation::ElementMatrix Model::element_matrices(const Discretisation& space) const {
  return [this, &space, stiffness = Stiffness(space.degree(), material_.stiffness()),
          local = Discretisation::Local{}](int t, Eigen::MatrixXd& out) mutable {
    stiffness.element(mesh_, t, out);
    space.local(t, local);
    for (std::size_t i = 0; i < local.sign.size(); ++i)
      if (local.sign[i] < 0) {
        out.middleRows(2 * i, 2) *= -1;
        out.middleCols(2 * i, 2) *= -1;
      }
  };
}

Displacements Model::solve(int degree) const {
  Room room;
  return solve(degree, room);
}

Displacements Model::solve(int degree, Room& room) const {
  const Discretisation space(mesh_, degree);
  const Eigen::MatrixXd f = load_vectors(space);
  const auto element = element_matrices(space);
  Displacements result{degree, Eigen::MatrixXd(f.rows(), f.cols())};
  for (const Class& cls : classes_) {
    std::vector<bool> held = held_on_mirrors(space, cls);
    for (const int u : pins(held)) held[u] = true;
    const Factorisation factors(tree_, space, held, element, room);
    Eigen::MatrixXd columns(f.rows(), static_cast<Eigen::Index>(cls.loads.size()));
    for (std::size_t k = 0; k < cls.loads.size(); ++k) columns.col(k) = f.col(cls.loads[k]);
    const Eigen::MatrixXd solved = factors.solve(columns);
    for (std::size_t k = 0; k < cls.loads.size(); ++k) result.values.col(cls.loads[k]) = solved.col(k);
  }
  return result;
}

Balance Model::balance(const Displacements& displacements) const {
  const Discretisation space(mesh_, displacements.degree);
  const Eigen::MatrixXd f = load_vectors(space);
  const auto element = element_matrices(space);
  const Eigen::MatrixXd& u = displacements.values;
  Eigen::MatrixXd force = Eigen::MatrixXd::Zero(u.rows(), u.cols());
  Discretisation::Local local;
  Eigen::MatrixXd matrix;
  Eigen::MatrixXd moved;
  for (int t = 0; t < static_cast<int>(mesh_.triangles().size()); ++t) {
    space.local(t, local);
    element(t, matrix);
    moved.resize(matrix.rows(), u.cols());
    for (std::size_t i = 0; i < local.function.size(); ++i)
      moved.middleRows(2 * i, 2) = u.middleRows(2 * local.function[i], 2);
    moved = (matrix * moved).eval();
    for (std::size_t i = 0; i < local.function.size(); ++i)
      force.middleRows(2 * local.function[i], 2) += moved.middleRows(2 * i, 2);
  }
  Balance result;
  for (const Class& cls : classes_) {
    const std::vector<bool> held = held_on_mirrors(space, cls);
    const std::vector<int> pinned = pins(held);
    Eigen::VectorXd together = Eigen::VectorXd::Zero(u.rows());
    Eigen::VectorXd elastic = Eigen::VectorXd::Zero(u.rows());
    Eigen::VectorXd applied = Eigen::VectorXd::Zero(u.rows());
    for (const std::size_t l : cls.loads) {
      Eigen::VectorXd residual = force.col(l) - f.col(l);
      for (std::size_t k = 0; k < held.size(); ++k)
        if (held[k]) residual[k] = 0.0;
      const double size = f.col(l).norm();
      for (const int p : pinned) result.reaction = std::max(result.reaction, std::abs(residual[p]) / size);
      result.residual = std::max(result.residual, residual.norm() / size);
      together += u.col(l);
      elastic += force.col(l);
      applied += f.col(l);
    }
    const double scale = 0.5 * thickness_ * static_cast<double>(images_.size());
    result.strain_energy += scale * together.dot(elastic);
    result.external_work += scale * together.dot(applied);
  }
  return result;
}

}  // namespace raiser::solver
