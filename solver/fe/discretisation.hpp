#pragma once

#include <vector>

#include "mesh/mesh.hpp"
#include "solver/fe/shape.hpp"

namespace raiser::solver {

/// Numbers the global shape functions of one degree on a mesh. The space is
/// made of entities: vertices, then edges, then triangles; an entity's
/// functions have consecutive numbers. Unknown 2 f + c is component c (x, y)
/// of function f.
///
/// Holds a reference: the mesh must outlive it.
class Discretisation {
 public:
  Discretisation(const mesh::Mesh& mesh, int degree);

  const mesh::Mesh& mesh() const { return *mesh_; }
  int degree() const { return degree_; }
  int functions() const { return first_function(entities()); }
  int unknowns() const { return 2 * functions(); }

  int entities() const { return vertices_ + edges_ + triangles_; }
  int vertex_entity(int vertex) const { return vertex; }
  int edge_entity(int edge) const { return vertices_ + edge; }
  int triangle_entity(int triangle) const { return vertices_ + edges_ + triangle; }
  /// First function of an entity; entities() is allowed and gives the end.
  int first_function(int entity) const;

  /// Global number of each of a triangle's shape functions, in the order of
  /// ShapeTable, and the sign that fits it to its neighbour's.
  struct Local {
    std::vector<int> function;
    std::vector<double> sign;
  };
  void local(int triangle, Local& out) const;

 private:
  const mesh::Mesh* mesh_;
  int degree_;
  int vertices_, edges_, triangles_;
};

}  // namespace raiser::solver
