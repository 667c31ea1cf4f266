#include "solver/fe/model.hpp"

#include <Eigen/QR>
#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "mesh/legendre.hpp"
#include "solver/fe/stiffness.hpp"

namespace raiser::solver {

using mesh::BoundarySide;
using Parity = UnitLoad::Parity;

Model::Model(mesh::Mesh mesh, mesh::Mirrors mirrors, const HookeLaw& material, double thickness,
             std::vector<UnitLoad> loads, std::vector<HeldEdge> held)
    : mesh_(std::move(mesh)),
      mirrors_(mirrors),
      material_(material),
      thickness_(thickness),
      loads_(std::move(loads)),
      held_(std::move(held)),
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

Constraints Model::constraints(const Discretisation& space, const Class& cls) const {
  return constraints_of(space, cls.odd_x, cls.odd_y, held_);
}

Eigen::VectorXd Model::factors(std::size_t load_case, const Image& image) const {
  Eigen::VectorXd result = Eigen::VectorXd::Zero(static_cast<Eigen::Index>(loads_.size()));
  for (std::size_t l = 0; l < loads_.size(); ++l)
    if (load_case == l + 1 || (load_case == 0 && !loads_[l].doubt))
      result[static_cast<Eigen::Index>(l)] = parity(l, image);
  return result;
}

std::vector<int> Model::pins(const Constraints& constraints) const {
  const auto& points = mesh_.points();
  const auto less_sum = [](const Point& a, const Point& b) { return a.sum() < b.sum(); };
  const auto first = std::min_element(points.begin(), points.end(), less_sum);
  const auto last = std::max_element(points.begin(), points.end(), less_sum);
  const double size = (*last - *first).norm();
  std::vector<Eigen::Vector3d> basis;  // of the rigid motions that are prevented
  const auto prevents_more = [&](int unknown) {
    const Point x = (points[unknown / 2] - *first) / size;
    const Point e = constraints.direction(unknown);
    Eigen::Vector3d row(e.x(), e.y(), x.x() * e.y() - x.y() * e.x());
    for (const Eigen::Vector3d& b : basis) row -= row.dot(b) * b;
    if (row.norm() < 1e-6) return false;
    basis.push_back(row.normalized());
    return true;
  };
  const int vertices = static_cast<int>(points.size());
  for (int u = 0; u < 2 * vertices && basis.size() < 3; ++u)
    if (constraints.held[u]) prevents_more(u);
  std::vector<int> result;
  const int a = 2 * static_cast<int>(first - points.begin());
  const int b = 2 * static_cast<int>(last - points.begin());
  for (const int u : {a, a + 1, b, b + 1})
    if (basis.size() < 3 && !constraints.held[u] && prevents_more(u)) result.push_back(u);
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

Factorisation::ElementMatrix Model::turned_matrices(const Discretisation& space,
                                                    const Constraints& how) const {
  if (how.turned.empty()) return element_matrices(space);
  std::vector<int> turned(static_cast<std::size_t>(space.functions()), -1);
  for (std::size_t k = 0; k < how.turned.size(); ++k) turned[how.turned[k].function] = static_cast<int>(k);
  return [element = element_matrices(space), turned, list = how.turned, &space,
          local = Discretisation::Local{}](int t, Eigen::MatrixXd& out) mutable {
    element(t, out);
    space.local(t, local);
    for (std::size_t i = 0; i < local.function.size(); ++i) {
      const int k = turned[local.function[i]];
      if (k < 0) continue;
      Eigen::Matrix2d to;
      to << list[k].first.x(), list[k].first.y(), -list[k].first.y(), list[k].first.x();
      out.middleRows(2 * i, 2) = (to * out.middleRows(2 * i, 2)).eval();
      out.middleCols(2 * i, 2) = (out.middleCols(2 * i, 2) * to.transpose()).eval();
    }
  };
}

Eigen::MatrixXd Equations::solve(Eigen::MatrixXd loads) const {
  how.turn(loads);
  Eigen::MatrixXd solved = factors.solve(loads);
  how.turn_back(solved);
  return solved;
}

Eigen::MatrixXd Equations::halfway(Eigen::MatrixXd loads) const {
  how.turn(loads);
  return factors.halfway(loads);
}

Equations Model::equations(const Discretisation& space, const Class& cls, Room& room) const {
  Constraints how = constraints(space, cls);
  std::vector<bool> held = how.held;
  for (const int u : pins(how)) held[u] = true;
  Factorisation factors(tree_, space, held, turned_matrices(space, how), room);
  return {std::move(how), std::move(factors)};
}

Eigen::MatrixXd Model::solve(const Discretisation& space, const Equations& equations, const Class& cls,
                             const Eigen::MatrixXd& f) const {
  const auto count = static_cast<Eigen::Index>(cls.loads.size());
  Eigen::MatrixXd lifted = Eigen::MatrixXd::Zero(f.rows(), count);
  Eigen::MatrixXd columns(f.rows(), count);
  bool displaced = false;
  for (Eigen::Index k = 0; k < count; ++k) {
    const std::size_t load = cls.loads[static_cast<std::size_t>(k)];
    columns.col(k) = f.col(static_cast<Eigen::Index>(load));
    if (!loads_[load].displaces) continue;
    lifted.col(k) = equations.how.value;
    displaced = true;
  }
  if (!displaced) return equations.solve(std::move(columns));
  equations.how.turn_back(lifted);
  return lifted + equations.solve(columns - forces(space, lifted));
}

Displacements Model::solve(int degree) const {
  Room room;
  return solve(degree, room);
}

Displacements Model::solve(int degree, Room& room) const {
  const Discretisation space(mesh_, degree);
  const Eigen::MatrixXd f = load_vectors(space);
  Displacements result{degree, Eigen::MatrixXd(f.rows(), f.cols())};
  for (const Class& cls : classes_) {
    const Eigen::MatrixXd solved = solve(space, equations(space, cls, room), cls, f);
    for (std::size_t k = 0; k < cls.loads.size(); ++k) result.values.col(cls.loads[k]) = solved.col(k);
  }
  return result;
}

Model::Together Model::together(const Discretisation& space, const Equations& equations) const {
  const Class& cls = classes_.front();
  const Eigen::MatrixXd f = load_vectors(space);
  Together result{Eigen::VectorXd::Zero(f.rows()), solve(space, equations, cls, f).rowwise().sum()};
  for (const std::size_t load : cls.loads) result.load += f.col(static_cast<Eigen::Index>(load));
  return result;
}

Eigen::MatrixXd Model::forces(const Discretisation& space, const Eigen::MatrixXd& displacements) const {
  const auto element = element_matrices(space);
  Eigen::MatrixXd force = Eigen::MatrixXd::Zero(displacements.rows(), displacements.cols());
  Discretisation::Local local;
  Eigen::MatrixXd matrix;
  Eigen::MatrixXd moved;
  for (int t = 0; t < static_cast<int>(mesh_.triangles().size()); ++t) {
    space.local(t, local);
    element(t, matrix);
    moved.resize(matrix.rows(), displacements.cols());
    for (std::size_t i = 0; i < local.function.size(); ++i)
      moved.middleRows(2 * i, 2) = displacements.middleRows(2 * local.function[i], 2);
    moved = (matrix * moved).eval();
    for (std::size_t i = 0; i < local.function.size(); ++i)
      force.middleRows(2 * local.function[i], 2) += moved.middleRows(2 * i, 2);
  }
  return force;
}

Balance Model::balance(const Displacements& displacements) const {
  const Discretisation space(mesh_, displacements.degree);
  const Eigen::MatrixXd f = load_vectors(space);
  const Eigen::MatrixXd& u = displacements.values;
  const Eigen::MatrixXd force = forces(space, u);
  Balance result;
  for (const Class& cls : classes_) {
    const Constraints how = constraints(space, cls);
    const std::vector<int> pinned = pins(how);
    Eigen::VectorXd together = Eigen::VectorXd::Zero(u.rows());
    Eigen::VectorXd elastic = Eigen::VectorXd::Zero(u.rows());
    Eigen::VectorXd applied = Eigen::VectorXd::Zero(u.rows());
    for (const std::size_t l : cls.loads) {
      Eigen::MatrixXd residual = force.col(l) - f.col(l);
      how.turn(residual);
      Eigen::MatrixXd holding = Eigen::MatrixXd::Zero(u.rows(), 1);
      for (std::size_t k = 0; k < how.held.size(); ++k)
        if (how.held[k]) std::swap(holding(k, 0), residual(k, 0));
      const double size = loads_[l].displaces ? holding.norm() : f.col(l).norm();
      for (const int p : pinned) result.reaction = std::max(result.reaction, std::abs(residual(p, 0)) / size);
      result.residual = std::max(result.residual, residual.norm() / size);
      how.turn_back(holding);
      if (loads_[l].doubt) continue;
      together += u.col(l);
      elastic += force.col(l);
      applied += f.col(l) + holding.col(0);
    }
    const double scale = 0.5 * thickness_ * static_cast<double>(images_.size());
    result.strain_energy += scale * together.dot(elastic);
    result.external_work += scale * together.dot(applied);
  }
  return result;
}

/// Gives the held edges at a vertex their parts of its force: each only in the
/// directions that it holds, and of what several hold the same.
void Model::share(const Point& force, const Point& x, const std::vector<std::size_t>& edges, std::size_t load,
                  std::vector<std::vector<Resultant>>& sums) const {
  std::vector<std::pair<std::size_t, Point>> holds;
  for (const std::size_t e : edges) {
    const Point& n = held_[e].normal;
    if (held_[e].along_normal) holds.emplace_back(e, n);
    if (held_[e].along_edge) holds.emplace_back(e, Point(-n.y(), n.x()));
  }
  Eigen::Matrix2Xd directions(2, holds.size());
  for (std::size_t k = 0; k < holds.size(); ++k)
    directions.col(static_cast<Eigen::Index>(k)) = holds[k].second;
  const Eigen::VectorXd parts = directions.completeOrthogonalDecomposition().solve(force);
  for (std::size_t k = 0; k < holds.size(); ++k) {
    const Point part = parts[static_cast<Eigen::Index>(k)] * holds[k].second;
    Resultant& sum = sums[holds[k].first][load];
    sum.force += part;
    sum.moment += x.x() * part.y() - x.y() * part.x();
  }
}

std::vector<std::vector<Resultant>> Model::reactions(const Displacements& displacements) const {
  if (held_.empty()) return {};
  const Discretisation space(mesh_, displacements.degree);
  const Eigen::MatrixXd residual = forces(space, displacements.values) - load_vectors(space);
  // Held edges at each vertex; the functions of vertices alone make up a rigid motion of a straight edge.
  std::vector<std::vector<std::size_t>> at(mesh_.points().size());
  for (const BoundarySide& side : mesh_.boundary())
    for (std::size_t e = 0; e < held_.size(); ++e) {
      if (!(held_[e].owner == side.curve.owner)) continue;
      for (const int corner : {side.side, (side.side + 1) % 3}) {
        auto& edges = at[mesh_.triangles()[side.triangle][corner]];
        if (edges.empty() || edges.back() != e) edges.push_back(e);
      }
    }
  std::vector<std::vector<Resultant>> result(held_.size(), std::vector<Resultant>(loads_.size()));
  for (std::size_t v = 0; v < at.size(); ++v) {
    std::sort(at[v].begin(), at[v].end());
    at[v].erase(std::unique(at[v].begin(), at[v].end()), at[v].end());
    for (std::size_t l = 0; l < loads_.size() && !at[v].empty(); ++l) {
      const auto row = 2 * static_cast<Eigen::Index>(v);
      const Point force = thickness_ * residual.block<2, 1>(row, static_cast<Eigen::Index>(l));
      share(force, mesh_.points()[v], at[v], l, result);
    }
  }
  return result;
}

}  // namespace raiser::solver
