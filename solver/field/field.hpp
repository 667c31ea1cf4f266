#pragma once

#include <Eigen/Core>
#include <optional>
#include <span>
#include <vector>

#include "mesh/mesh.hpp"
#include "solver/elasticity/hooke_law.hpp"
#include "solver/fe/model.hpp"

namespace raiser::solver {

/// Displacement and stress at one point.
struct FieldValue {
  Point point = Point::Zero();         ///< mm
  Point displacement = Point::Zero();  ///< mm
  Stress stress;                       ///< MPa, straight from the displacement, not smoothed
};

/// The solved field of all loads together over the whole plate, mirror images
/// included. A cell is one curved triangle; its reference coordinates (r, s)
/// lie in r, s >= 0, r + s <= 1, corners (0,0), (1,0), (0,1) anticlockwise.
/// Immutable; safe to read from several threads.
class Field {
 public:
  /// A field without cells.
  Field() = default;
  Field(const Model& model, const Displacements& displacements);

  std::size_t cells() const { return images_.size() * mesh_.triangles().size(); }
  int degree() const { return degree_; }
  /// The meshed part; cell k is triangle k modulo its triangles in image k over them.
  const mesh::Mesh& mesh() const { return mesh_; }
  const std::vector<Image>& images() const { return images_; }

  /// Values at reference points of cell `cell`, in order.
  std::vector<FieldValue> sample(std::size_t cell, std::span<const Point> reference) const;

  /// Where a point of the plate lies in the cells, the same for all fields on one mesh.
  struct Place {
    std::size_t image;
    int triangle;
    Point reference;
  };
  /// Nothing outside the material. A point on a side that two cells share lies in
  /// either.
  std::optional<Place> place(const Point& x) const;
  FieldValue value(const Place& place) const {
    return evaluate(place.image, place.triangle, {&place.reference, 1}).front();
  }
  /// Value at a point of the plate; nothing outside the material.
  std::optional<FieldValue> at(const Point& x) const;

 private:
  void build_grid();
  std::size_t grid_cell(const Point& x) const;
  std::optional<Place> locate(std::size_t image, const Point& x) const;
  std::vector<FieldValue> evaluate(std::size_t image, int triangle, std::span<const Point> reference) const;

  mesh::Mesh mesh_;
  HookeLaw material_;
  int degree_ = 0;
  std::vector<Image> images_;
  std::vector<Eigen::MatrixX2d> coefficients_;  ///< by image: one row a function
  Point origin_ = Point::Zero();
  double grid_size_ = 1.0;
  std::size_t columns_ = 1;
  std::vector<std::vector<int>> grid_;  ///< triangles whose box meets a grid cell
};

}  // namespace raiser::solver
