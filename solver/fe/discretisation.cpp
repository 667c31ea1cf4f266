#include "solver/fe/discretisation.hpp"

#include <stdexcept>
#include <string>

namespace raiser::solver {

Discretisation::Discretisation(const mesh::Mesh& mesh, int degree)
    : mesh_(&mesh),
      degree_(degree),
      vertices_(static_cast<int>(mesh.points().size())),
      edges_(static_cast<int>(mesh.edges().size())),
      triangles_(static_cast<int>(mesh.triangles().size())) {
  if (degree < min_degree || degree > max_degree)
    throw std::invalid_argument("Discretisation: degree " + std::to_string(degree) + " is outside " +
                                std::to_string(min_degree) + " to " + std::to_string(max_degree));
}

int Discretisation::first_function(int entity) const {
  const int on_edge = degree_ - 1;
  if (entity <= vertices_) return entity;
  if (entity <= vertices_ + edges_) return vertices_ + (entity - vertices_) * on_edge;
  return vertices_ + edges_ * on_edge + (entity - vertices_ - edges_) * interior_count(degree_);
}

void Discretisation::local(int triangle, Local& out) const {
  const auto& corners = mesh_->triangles()[triangle];
  out.function.clear();
  out.sign.assign(shape_count(degree_), 1.0);
  for (const int corner : corners) out.function.push_back(corner);
  for (int side = 0; side < 3; ++side) {
    const int first = first_function(edge_entity(mesh_->edge(triangle, side)));
    const bool is_reversed = corners[side] > corners[(side + 1) % 3];
    for (int k = 2; k <= degree_; ++k) {
      if (is_reversed && k % 2 == 1) out.sign[out.function.size()] = -1.0;
      out.function.push_back(first + k - 2);
    }
  }
  const int first = first_function(triangle_entity(triangle));
  for (int k = 0; k < interior_count(degree_); ++k) out.function.push_back(first + k);
}

}  // namespace raiser::solver
