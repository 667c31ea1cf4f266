#include <algorithm>
#include <numeric>

#include "solver/linear/elimination.hpp"

namespace raiser::solver {

int EliminationTree::build(std::vector<int>& triangles, int first, int last,
                           const std::vector<mesh::Point>& centres) {
  Group group;
  if (last - first == 1) {
    group.triangle = triangles[first];
  } else {
    mesh::Point low = centres[triangles[first]];
    mesh::Point high = low;
    for (int i = first; i < last; ++i) {
      low = low.cwiseMin(centres[triangles[i]]);
      high = high.cwiseMax(centres[triangles[i]]);
    }
    const int axis = high.x() - low.x() >= high.y() - low.y() ? 0 : 1;
    const int middle = (first + last) / 2;
    std::nth_element(triangles.begin() + first, triangles.begin() + middle, triangles.begin() + last,
                     [&](int a, int b) { return centres[a][axis] < centres[b][axis]; });
    group.children[0] = build(triangles, first, middle, centres);
    group.children[1] = build(triangles, middle, last, centres);
  }
  groups_.push_back(std::move(group));
  return static_cast<int>(groups_.size()) - 1;
}

EliminationTree::EliminationTree(const mesh::Mesh& mesh) {
  const Discretisation numbering(mesh, min_degree);
  const int count = static_cast<int>(mesh.triangles().size());
  std::vector<mesh::Point> centres;
  for (const auto& t : mesh.triangles())
    centres.push_back((mesh.points()[t[0]] + mesh.points()[t[1]] + mesh.points()[t[2]]) / 3);
  std::vector<int> triangles(count);
  std::iota(triangles.begin(), triangles.end(), 0);
  groups_.reserve(2 * count);
  build(triangles, 0, count, centres);

  std::vector<int> uses(numbering.entities(), 0);  // triangles that an entity belongs to
  std::vector<std::array<int, 7>> own(count);
  for (int t = 0; t < count; ++t) {
    for (int k = 0; k < 3; ++k) {
      own[t][k] = numbering.vertex_entity(mesh.triangles()[t][k]);
      own[t][3 + k] = numbering.edge_entity(mesh.edge(t, k));
    }
    own[t][6] = numbering.triangle_entity(t);
    for (const int entity : own[t]) ++uses[entity];
  }
  // Group by group: an entity is complete, hence eliminated, where the group
  // holds all its triangles. seen[entity]: how many of them the group that
  // last listed the entity holds.
  std::vector<int> place(numbering.entities(), -1);
  std::vector<int> listed_by(numbering.entities(), -1);
  std::vector<std::vector<int>> held(groups_.size());  // by group: triangles of each entity left
  std::vector<int> seen(numbering.entities(), 0);
  for (int g = 0; g < static_cast<int>(groups_.size()); ++g) {
    Group& group = groups_[g];
    const auto list = [&](int entity, int triangles_of_it) {
      if (listed_by[entity] != g) {
        listed_by[entity] = g;
        seen[entity] = 0;
        group.entities.push_back(entity);
      }
      seen[entity] += triangles_of_it;
    };
    if (group.triangle >= 0) {
      for (const int entity : own[group.triangle]) list(entity, 1);
    } else {
      for (const int child : group.children) {
        const Group& below = groups_[child];
        for (std::size_t k = below.eliminated; k < below.entities.size(); ++k)
          list(below.entities[k], held[child][k - below.eliminated]);
        held[child].clear();
      }
    }
    const auto rest = std::stable_partition(group.entities.begin(), group.entities.end(),
                                            [&](int entity) { return seen[entity] == uses[entity]; });
    group.eliminated = static_cast<int>(rest - group.entities.begin());
    for (auto entity = rest; entity != group.entities.end(); ++entity) held[g].push_back(seen[*entity]);
    for (int k = 0; k < group.eliminated; ++k) {
      place[group.entities[k]] = static_cast<int>(order_.size());
      order_.push_back(group.entities[k]);
    }
  }
  for (Group& group : groups_)
    std::sort(group.entities.begin() + group.eliminated, group.entities.end(),
              [&](int a, int b) { return place[a] < place[b]; });
}

}  // namespace raiser::solver
