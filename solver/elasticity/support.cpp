#include "solver/elasticity/support.hpp"

#include <fmt/format.h>

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <limits>
#include <stdexcept>

namespace raiser::solver {

namespace {

/// The held components as directions with their values.
std::vector<std::pair<Point, double>> holds(const EdgeLine& line, const Support& support) {
  std::vector<std::pair<Point, double>> result;
  if (support.normal) result.emplace_back(line.normal(), *support.normal);
  if (support.along) result.emplace_back(line.direction, *support.along);
  return result;
}

/// Whether two supports with a common corner can both be had.
bool agree(const Plate& plate, const Support& a, const Support& b) {
  const auto first = straight_edge(plate, a.edge);
  const auto second = straight_edge(plate, b.edge);
  if (!first || !second) return true;
  const double near = 1e-9 * (plate.length + plate.width);
  const bool meet = (first->at(first->length) - second->start).norm() < near ||
                    (second->at(second->length) - first->start).norm() < near;
  if (!meet) return true;
  auto all = holds(*first, a);
  for (const auto& hold : holds(*second, b)) all.push_back(hold);
  Eigen::MatrixX2d rows(all.size(), 2);
  Eigen::VectorXd values(all.size());
  for (std::size_t i = 0; i < all.size(); ++i) {
    rows.row(i) = all[i].first.transpose();
    values[i] = all[i].second;
  }
  const Eigen::Vector2d place = rows.fullPivLu().solve(values);
  return (rows * place - values).cwiseAbs().maxCoeff() <= 1e-9 * (1e-12 + values.cwiseAbs().maxCoeff());
}

std::optional<SupportFault> own_fault(const Plate& plate, const std::vector<Support>& supports,
                                      std::size_t i) {
  const Support& support = supports[i];
  const auto names = mesh::edge_names(plate);
  if (support.edge >= names.size())
    return SupportFault{i, "the support names no edge of the plate", "name an edge"};
  if (!straight_edge(plate, support.edge))
    return SupportFault{i, fmt::format("the edge {} is not straight", names[support.edge]),
                        "hold a straight edge"};
  for (const auto& value : {support.normal, support.along})
    if (value && !std::isfinite(*value))
      return SupportFault{i, "a displacement is not finite", "give a number"};
  if (!support.normal && !support.along)
    return SupportFault{i, "the support holds nothing",
                        "hold the normal displacement, the one along, or both"};
  for (std::size_t k = 0; k < i; ++k)
    if (supports[k].edge == support.edge)
      return SupportFault{
          i, fmt::format("the edge {} is held by '{}' already", names[support.edge], supports[k].name),
          "hold each edge once"};
  for (std::size_t k = 0; k < i; ++k)
    if (!agree(plate, supports[k], support))
      return SupportFault{
          i, fmt::format("it holds the corner that it shares with '{}' at another place", supports[k].name),
          "let both give the corner the same displacement, or leave a component free"};
  return std::nullopt;
}

}  // namespace

std::optional<EdgeLine> straight_edge(const Plate& plate, std::size_t edge) {
  EdgeLine line;
  double low = std::numeric_limits<double>::infinity();
  double high = -low;
  const double near = 1e-9 * (plate.length + plate.width);
  for (const mesh::Curve& curve : mesh::outline_of(plate).curves) {
    if (!(curve.owner == Owner{Owner::Kind::edge, edge})) continue;
    if (curve.kind != mesh::Curve::Kind::line) return std::nullopt;
    if (line.direction.isZero(0.0)) {
      line.start = curve.start();
      line.direction = (curve.finish() - curve.start()).normalized();
    }
    for (const Point& x : {curve.start(), curve.finish()}) {
      const double distance = line.distance(x);
      if ((line.at(distance) - x).norm() > near) return std::nullopt;
      low = std::min(low, distance);
      high = std::max(high, distance);
    }
  }
  if (line.direction.isZero(0.0)) return std::nullopt;
  line.start = line.at(low);
  line.length = high - low;
  return line;
}

std::vector<HeldEdge> held_edges(const Plate& plate, const std::vector<Support>& supports) {
  if (const auto found = faults(plate, supports); !found.empty())
    throw std::invalid_argument(found.front().what);
  std::vector<HeldEdge> result;
  for (const Support& support : supports)
    result.push_back({{Owner::Kind::edge, support.edge},
                      straight_edge(plate, support.edge)->normal(),
                      support.normal,
                      support.along});
  return result;
}

std::vector<SupportFault> faults(const Plate& plate, const std::vector<Support>& supports) {
  std::vector<SupportFault> all;
  for (std::size_t i = 0; i < supports.size(); ++i)
    if (auto fault = own_fault(plate, supports, i)) all.push_back(std::move(*fault));
  return all;
}

std::vector<Eigen::Vector3d> takes_up(const Plate& plate, const std::vector<Support>& supports, double size) {
  std::vector<Eigen::Vector3d> basis;
  const auto add = [&](const Point& at, const Point& direction) {
    Eigen::Vector3d row(direction.x(), direction.y(),
                        (at.x() * direction.y() - at.y() * direction.x()) / size);
    for (const Eigen::Vector3d& b : basis) row -= row.dot(b) * b;
    if (row.norm() > 1e-9) basis.push_back(row.normalized());
  };
  for (const Support& support : supports) {
    const auto line = straight_edge(plate, support.edge);
    if (!line) continue;
    if (support.along) add(line->start, line->direction);
    if (!support.normal) continue;
    add(line->start, line->normal());
    add(line->at(line->length), line->normal());
  }
  return basis;
}

bool have_mirror(const Plate& plate, const std::vector<Support>& supports, mesh::Mirrors mirror) {
  if (supports.empty()) return true;
  const auto image = mesh::mirror_image(plate, mirror);
  if (!image) return false;
  return std::all_of(supports.begin(), supports.end(), [&](const Support& support) {
    return std::any_of(supports.begin(), supports.end(), [&](const Support& other) {
      return other.edge == image->edges[support.edge] &&
             other.normal.has_value() == support.normal.has_value() &&
             other.along.has_value() == support.along.has_value();
    });
  });
}

bool displaces(const Support& support) {
  return support.normal.value_or(0.0) != 0.0 || support.along.value_or(0.0) != 0.0;
}

std::vector<Point> clamped_ends(const Plate& plate, const std::vector<Support>& supports) {
  std::vector<Point> result;
  for (const Support& support : supports) {
    const auto line = straight_edge(plate, support.edge);
    if (!line || !support.normal || !support.along) continue;
    result.push_back(line->start);
    result.push_back(line->at(line->length));
  }
  return result;
}

}  // namespace raiser::solver
