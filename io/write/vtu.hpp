#pragma once

#include <cstddef>
#include <functional>
#include <span>
#include <string>
#include <vector>

#include "io/write/provenance.hpp"
#include "solver/field/field.hpp"

namespace raiser::io {

/// The largest degree of the curved triangles in a .vtu file.
inline constexpr int highest_vtu_degree = 8;

/// Curved triangles and how to sample them; what a .vtu file is written from.
/// `sample` gives the values at reference points of one cell, as
/// solver::Field::sample does.
struct CellSource {
  std::size_t cells = 0;
  int degree = 1;  ///< at least 1
  std::function<std::vector<solver::FieldValue>(std::size_t cell, std::span<const mesh::Point>)> sample;
};

/// The cells of a field, which must outlive the result.
CellSource cells_of(const solver::Field& field);

/// A VTK XML unstructured grid (.vtu, binary, zlib) of curved Lagrange
/// triangles, whose degree is the source's up to `highest_vtu_degree`. Cells
/// share no nodes: the stress is as the displacement gives it, not averaged.
/// Point data: "displacement, mm" (3 components), "stress, MPa" (XX YY ZZ XY
/// YZ XZ), "largest principal stress, MPa" and "smallest principal stress,
/// MPa" (in the plane), "von Mises stress, MPa". Field data: where it comes
/// from.
std::string vtu(const CellSource& source, const Provenance& provenance);

/// Reference coordinates of the nodes of VTK's Lagrange triangle in its order.
std::vector<mesh::Point> vtk_triangle_nodes(int degree);

}  // namespace raiser::io
