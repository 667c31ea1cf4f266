#include "solver/field/field.hpp"

#include <Eigen/Geometry>
#include <Eigen/LU>
#include <algorithm>
#include <cmath>

namespace raiser::solver {
namespace {

/// Bounding box of a curved triangle, a little larger than a lattice on it.
Eigen::AlignedBox2d box_of(const mesh::Mesh& mesh, int triangle) {
  Eigen::AlignedBox2d box;
  for (const int v : mesh.triangles()[triangle]) box.extend(mesh.points()[v]);
  if (!mesh.is_curved(triangle)) return box;
  for (int side = 0; side < 3; ++side)
    for (int k = 1; k < 8; ++k) box.extend(mesh.map(triangle, on_side(side, -1.0 + k / 4.0)).x);
  const Point margin = 0.02 * box.sizes();
  return {box.min() - margin, box.max() + margin};
}

}  // namespace

Field::Field(const Model& model, const Displacements& displacements)
    : mesh_(model.mesh()),
      material_(model.material()),
      degree_(displacements.degree),
      images_(model.images()) {
  const Eigen::Index functions = displacements.values.rows() / 2;
  for (const Image& image : images_) {
    Eigen::VectorXd sum = displacements.values * model.factors(0, image);
    Eigen::MatrixX2d coefficients(functions, 2);
    for (int c = 0; c < 2; ++c)
      coefficients.col(c) =
          image.sign[c] * Eigen::Map<Eigen::VectorXd, 0, Eigen::InnerStride<2>>(sum.data() + c, functions);
    coefficients_.push_back(std::move(coefficients));
  }
  build_grid();
}

void Field::build_grid() {
  Eigen::AlignedBox2d box;
  for (const Point& p : mesh_.points()) box.extend(p);
  origin_ = box.min();
  grid_size_ = std::sqrt(box.volume() / (1.0 + static_cast<double>(mesh_.triangles().size())));
  columns_ = static_cast<std::size_t>(box.sizes().x() / grid_size_) + 1;
  grid_.resize(columns_ * (static_cast<std::size_t>(box.sizes().y() / grid_size_) + 1));
  for (int t = 0; t < static_cast<int>(mesh_.triangles().size()); ++t) {
    const Eigen::AlignedBox2d own = box_of(mesh_, t);
    const std::size_t low = grid_cell(own.min());
    const std::size_t high = grid_cell(own.max());
    for (std::size_t row = low / columns_; row <= high / columns_; ++row)
      for (std::size_t column = low % columns_; column <= high % columns_; ++column)
        grid_[row * columns_ + column].push_back(t);
  }
}

std::size_t Field::grid_cell(const Point& x) const {
  const Point offset = (x - origin_) / grid_size_;
  const auto index = [](double value, std::size_t count) {
    return static_cast<std::size_t>(std::clamp(value, 0.0, static_cast<double>(count) - 1.0));
  };
  return index(offset.y(), grid_.size() / columns_) * columns_ + index(offset.x(), columns_);
}

std::optional<Field::Place> Field::locate(std::size_t image, const Point& x) const {
  constexpr double slack = 1e-9;
  for (const int t : grid_[grid_cell(x)]) {
    Point reference(1.0 / 3, 1.0 / 3);
    bool converged = false;
    for (int step = 0; step < 30 && !converged; ++step) {
      const mesh::MapPoint here = mesh_.map(t, reference);
      const Point change = here.jacobian.inverse() * (x - here.x);
      reference += change;
      converged = change.norm() < 1e-12 || !mesh_.is_curved(t);
      if (!(reference.norm() < 10.0)) break;
    }
    if (converged && reference.x() >= -slack && reference.y() >= -slack && reference.sum() <= 1 + slack)
      return Place{image, t, reference};
  }
  return std::nullopt;
}

std::vector<FieldValue> Field::evaluate(std::size_t image, int triangle,
                                        std::span<const Point> reference) const {
  const ShapeTable shapes = tabulate(degree_, reference);
  std::vector<mesh::MapPoint> maps(reference.size());
  mesh::MapTable(reference).evaluate(mesh_, triangle, maps);
  const Discretisation space(mesh_, degree_);
  Discretisation::Local local;
  space.local(triangle, local);
  Eigen::MatrixX2d own(static_cast<Eigen::Index>(local.function.size()), 2);
  for (std::size_t i = 0; i < local.function.size(); ++i)
    own.row(i) = local.sign[i] * coefficients_[image].row(local.function[i]);
  const Eigen::MatrixX2d u = shapes.value.transpose() * own;
  const Eigen::MatrixX2d ur = shapes.dr.transpose() * own;
  const Eigen::MatrixX2d us = shapes.ds.transpose() * own;
  const Eigen::Matrix3d law = material_.stiffness();
  const auto& sign = images_[image].sign;
  std::vector<FieldValue> values(reference.size());
  for (std::size_t q = 0; q < reference.size(); ++q) {
    Eigen::Matrix2d by_reference;  // row: component, column: dr, ds
    by_reference << ur.row(q).transpose(), us.row(q).transpose();
    Eigen::Matrix2d gradient = by_reference * maps[q].jacobian.inverse();
    gradient.col(0) *= sign[0];
    gradient.col(1) *= sign[1];
    const Eigen::Vector3d stress =
        law * Eigen::Vector3d(gradient(0, 0), gradient(1, 1), gradient(0, 1) + gradient(1, 0));
    values[q].point = images_[image].apply(maps[q].x);
    values[q].displacement = u.row(q).transpose();
    values[q].stress = {stress[0], stress[1], stress[2], material_.through_thickness(stress[0], stress[1])};
  }
  return values;
}

std::vector<FieldValue> Field::sample(std::size_t cell, std::span<const Point> reference) const {
  const std::size_t triangles = mesh_.triangles().size();
  const std::size_t image = cell / triangles;
  const int triangle = static_cast<int>(cell % triangles);
  if (!images_[image].flips()) return evaluate(image, triangle, reference);
  // A mirrored triangle runs clockwise: exchange r and s.
  std::vector<Point> exchanged;
  for (const Point& p : reference) exchanged.emplace_back(p.y(), p.x());
  return evaluate(image, triangle, exchanged);
}

std::optional<Field::Place> Field::place(const Point& x) const {
  for (std::size_t image = 0; image < images_.size(); ++image) {
    const Point inner = images_[image].apply(x);
    const mesh::Mirrors mirror = images_[image].mirror();
    // Each point belongs to the one image whose signs bring it to the meshed part.
    const bool is_x = images_.size() == 1 || images_.back().sign[0] > 0 || mirror.x == (x.x() < 0);
    const bool is_y = images_.size() == 1 || images_.back().sign[1] > 0 || mirror.y == (x.y() < 0);
    if (!is_x || !is_y) continue;
    if (const auto found = locate(image, inner)) return found;
  }
  return std::nullopt;
}

std::optional<FieldValue> Field::at(const Point& x) const {
  const auto found = place(x);
  return found ? std::optional(value(*found)) : std::nullopt;
}

}  // namespace raiser::solver
