#include "validation/calibrate/truth.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>
#include <utility>

#include "solver/field/edge.hpp"

namespace raiser::validation {

namespace {

constexpr int coarse_degree = 9, fine_degree = 10;

/// Position s in [-1, 1] of a point on a boundary side, if it lies there.
std::optional<double> position_on(const mesh::BoundarySide& side, const mesh::Point& x) {
  const mesh::Curve& curve = side.curve;
  double t = 0.0;
  if (curve.kind == mesh::Curve::Kind::line) {
    t = (x - curve.centre).dot(curve.u) / curve.u.squaredNorm();
  } else {
    Eigen::Matrix2d axes;
    axes << curve.u, curve.v;
    const mesh::Point c = axes.inverse() * (x - curve.centre);
    const double middle = (curve.begin + curve.end) / 2, turn = 2 * std::numbers::pi;
    t = std::atan2(c.y(), c.x());
    t += turn * std::round((middle - t) / turn);
  }
  const double s = (2 * t - curve.begin - curve.end) / (curve.end - curve.begin);
  if (std::abs(s) > 1 + 1e-9) return std::nullopt;
  const double size = (curve.at(curve.end) - curve.at(curve.begin)).norm();
  if ((curve.at(t) - x).norm() > 1e-6 * size) return std::nullopt;
  return std::clamp(s, -1.0, 1.0);
}

}  // namespace

mesh::Mesh divided(const mesh::Mesh& mesh) {
  std::vector<mesh::Point> points = mesh.points();
  const int first = static_cast<int>(points.size());
  for (const auto& [a, b] : mesh.edges()) points.push_back((mesh.points()[a] + mesh.points()[b]) / 2);
  std::vector<mesh::Mesh::Triangle> triangles;
  for (int t = 0; t < static_cast<int>(mesh.triangles().size()); ++t) {
    const auto& [a, b, c] = mesh.triangles()[t];
    const int ab = first + mesh.edge(t, 0), bc = first + mesh.edge(t, 1), ca = first + mesh.edge(t, 2);
    // The corner children lie in the order of the corners: side k of the
    // parent becomes side k of children k and k + 1.
    triangles.insert(triangles.end(), {{a, ab, ca}, {ab, b, bc}, {ca, bc, c}, {ab, bc, ca}});
  }
  std::vector<mesh::BoundarySide> boundary;
  for (const mesh::BoundarySide& side : mesh.boundary()) {
    const double middle = side.parameter(0.0);
    points[first + mesh.edge(side.triangle, side.side)] = side.curve.at(middle);
    mesh::BoundarySide half = side;
    half.triangle = 4 * side.triangle + side.side;
    half.curve.end = middle;
    boundary.push_back(half);
    half.triangle = 4 * side.triangle + (side.side + 1) % 3;
    half.curve.begin = middle;
    half.curve.end = side.curve.end;
    boundary.push_back(half);
  }
  mesh::Mesh result(std::move(points), std::move(triangles), std::move(boundary));
  if (!mesh::inverted_triangles(result).empty()) throw std::runtime_error("divided: a triangle is inverted");
  return result;
}

FinerSolution::FinerSolution(const solver::Problem& problem, mesh::Mesh mesh)
    : plate_(problem.plate),
      model_(std::move(mesh), {}, problem.material, problem.plate.thickness,
             solver::unit_loads(problem.plate, problem.loads, problem.supports),
             solver::held_edges(problem.plate, problem.supports)),
      sequence_(model_, plate_) {
  for (const int degree : {coarse_degree, fine_degree}) {
    sequence_.solve(degree);
    fields_.emplace_back(model_, sequence_.displacements().back());
  }
  unknowns_ = static_cast<std::size_t>(solver::Discretisation(model_.mesh(), fine_degree).unknowns());
}

Known FinerSolution::extreme(std::size_t load_case, std::size_t hole, solver::Quantity quantity) const {
  const auto value = [&](const solver::EdgeScan& scan) {
    return scan.extremes[load_case][hole][static_cast<std::size_t>(quantity)].value;
  };
  const double last = value(sequence_.scans()[1]);
  return {last, std::abs(last - value(sequence_.scans()[0]))};
}

Known FinerSolution::tip(std::size_t load_case, std::size_t tip, int which) const {
  const solver::TipScanner& scanner = sequence_.tip_scanner();
  const auto value = [&](std::size_t level, std::size_t domain) {
    return scanner.value(sequence_.tip_scans()[level], load_case, tip, domain)[which];
  };
  const double last = value(1, 0);
  return {last, std::max(std::abs(last - value(0, 0)), std::abs(last - value(1, 1)))};
}

std::optional<Known> FinerSolution::tangential(std::size_t hole, const mesh::Point& x) const {
  for (const mesh::BoundarySide& side : sequence_.scanner().sides()) {
    if (!(side.curve.owner == mesh::Owner{mesh::Owner::Kind::raiser, hole})) continue;
    const auto s = position_on(side, x);
    if (!s) continue;
    std::array<double, 2> values{};
    for (std::size_t k = 0; k < 2; ++k) {
      const solver::Displacements& displacements = sequence_.displacements()[k];
      const solver::SideTables tables(displacements.degree, {&*s, 1});
      const solver::EdgeProbe probe(model_, displacements.degree, {&*s, 1}, tables);
      values[k] = probe.at(side, displacements).tangential.sum();
    }
    return Known{values[1], std::abs(values[1] - values[0])};
  }
  return std::nullopt;
}

std::optional<std::array<Known, 3>> FinerSolution::stress(const mesh::Point& x) const {
  const auto coarse = fields_[0].at(x), fine = fields_[1].at(x);
  if (!coarse || !fine) return std::nullopt;
  const auto known = [&](double solver::Stress::*part) {
    return Known{fine->stress.*part, std::abs(fine->stress.*part - coarse->stress.*part)};
  };
  return std::array{known(&solver::Stress::xx), known(&solver::Stress::yy), known(&solver::Stress::xy)};
}

}  // namespace raiser::validation
