#include "solver/contact/compliance.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>

namespace raiser::solver {

namespace {

constexpr double turn = 2 * std::numbers::pi;

Point direction(double angle) { return {std::cos(angle), std::sin(angle)}; }

}  // namespace

RoundEdge round_edge(const mesh::Mesh& mesh, const Owner& owner, const Point& centre, double radius) {
  RoundEdge edge{centre, radius, {}};
  for (const mesh::BoundarySide& side : mesh.boundary()) {
    if (!(side.curve.owner == owner)) continue;
    const double offset = std::atan2(side.curve.u.y(), side.curve.u.x());
    edge.sides.push_back({side, offset + side.curve.begin, offset + side.curve.end});
  }
  return edge;
}

std::vector<EdgePoint> edge_points(const RoundEdge& edge, const EdgeBasis& basis, int degree) {
  const mesh::GaussRule& rule = traction_rule(degree);
  std::vector<EdgePoint> points;
  Eigen::VectorXd values(basis.count);
  for (std::size_t i = 0; i < edge.sides.size(); ++i) {
    const auto& side = edge.sides[i];
    const double low = unwound(std::min(side.from, side.to), basis.pieces.front());
    const double high = low + std::abs(side.to - side.from);
    const double shift = std::min(side.from, side.to) - low;
    for (std::size_t p = 0; p + 1 < basis.pieces.size(); ++p)
      for (const double wrap : {0.0, turn}) {
        const double from = std::max(low, basis.pieces[p] + wrap);
        const double to = std::min(high, basis.pieces[p + 1] + wrap);
        if (to - from <= 1e-13) continue;
        const double middle = 0.5 * (basis.pieces[p] + basis.pieces[p + 1]) + wrap;
        const double half = 0.5 * (basis.pieces[p + 1] - basis.pieces[p]);
        const auto phi_of = [&](double x) { return std::acos(std::clamp((x - middle) / half, -1.0, 1.0)); };
        const double a = basis.substituted ? phi_of(to) : from - wrap;
        const double b = basis.substituted ? phi_of(from) : to - wrap;
        for (std::size_t q = 0; q < rule.points.size(); ++q) {
          const double phi = 0.5 * (a + b) + 0.5 * (b - a) * rule.points[q];
          const double angle = basis.substituted ? middle + half * std::cos(phi) : phi + wrap;
          basis.at(phi, values);
          points.push_back({i, 2 * (angle + shift - side.from) / (side.to - side.from) - 1, angle,
                            edge.radius * 0.5 * (b - a) * rule.weights[q] * values});
        }
      }
  }
  return points;
}

Compliance::Compliance(const Model& model, int degree, Room& room)
    : model_(&model), space_(model.mesh(), degree), equations_(model.equations(space_, room)) {}

/// Calls visit(position, function, value) for the shape functions at positions s.
template <class Visit>
void Compliance::each(const RoundEdge& edge, std::size_t side, std::span<const double> s, Visit visit) const {
  const mesh::BoundarySide& at = edge.sides[side].side;
  std::vector<Point> reference;
  for (const double position : s) reference.push_back(on_side(at.side, position));
  const ShapeTable shapes = tabulate(space_.degree(), reference);
  Discretisation::Local local;
  space_.local(at.triangle, local);
  for (std::size_t i = 0; i < local.function.size(); ++i)
    for (std::size_t q = 0; q < s.size(); ++q) {
      const double value =
          local.sign[i] * shapes.value(static_cast<Eigen::Index>(i), static_cast<Eigen::Index>(q));
      if (value != 0.0) visit(q, local.function[i], value);
    }
}

Eigen::MatrixXd Compliance::radial_loads(const RoundEdge& edge, const std::vector<EdgePoint>& points) const {
  const Eigen::Index columns = points.empty() ? 0 : points.front().weight.size();
  Eigen::MatrixXd loads = Eigen::MatrixXd::Zero(space_.unknowns(), columns);
  for (std::size_t first = 0; first < points.size();) {
    std::size_t last = first;
    std::vector<double> s;
    for (; last < points.size() && points[last].side == points[first].side; ++last)
      s.push_back(points[last].s);
    each(edge, points[first].side, s, [&](std::size_t q, int function, double value) {
      const EdgePoint& point = points[first + q];
      const Point outward = direction(point.angle);
      for (int c = 0; c < 2; ++c)
        loads.row(2 * function + c) += value * outward[c] * point.weight.transpose();
    });
    first = last;
  }
  return loads;
}

Eigen::MatrixXd Compliance::radial_displacement(const RoundEdge& edge, std::span<const double> angles,
                                                const Eigen::MatrixXd& values) const {
  Eigen::MatrixXd result = Eigen::MatrixXd::Zero(static_cast<Eigen::Index>(angles.size()), values.cols());
  for (std::size_t i = 0; i < edge.sides.size(); ++i) {
    const auto& side = edge.sides[i];
    const double low = std::min(side.from, side.to);
    std::vector<double> s;
    std::vector<std::size_t> which;
    for (std::size_t k = 0; k < angles.size(); ++k) {
      const double angle = unwound(angles[k], low);
      if (angle > std::max(side.from, side.to)) continue;
      s.push_back(2 * (angle - side.from) / (side.to - side.from) - 1);
      which.push_back(k);
    }
    for (const std::size_t k : which) result.row(static_cast<Eigen::Index>(k)).setZero();
    each(edge, i, s, [&](std::size_t q, int function, double value) {
      const Point outward = direction(angles[which[q]]);
      for (int c = 0; c < 2; ++c)
        result.row(static_cast<Eigen::Index>(which[q])) += value * outward[c] * values.row(2 * function + c);
    });
  }
  return result;
}

}  // namespace raiser::solver
