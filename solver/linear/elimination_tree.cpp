#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>
#include <span>

#include "solver/linear/elimination.hpp"

namespace raiser::solver {

/// Divides groups of triangles where few sides are cut: across holes and
/// through coarse parts of the mesh.
class EliminationTree::Divider {
 public:
  explicit Divider(const mesh::Mesh& mesh);

  /// Reorders triangles[first..last) so that a part of them comes before the
  /// rest; returns where the rest begins. At least two triangles.
  int divide(std::vector<int>& triangles, int first, int last);

 private:
  struct Cut {
    double cost = std::numeric_limits<double>::infinity();
    int at = 0;
    int axis = 0;
  };
  void sort(std::span<int> group, int axis) const;
  /// The best cut of a group that is sorted along an axis.
  Cut best_cut(std::span<const int> group, int axis);

  std::vector<mesh::Point> centres_;
  std::vector<std::array<int, 3>> neighbours_;  ///< by side; -1 beyond the boundary
  std::vector<int> mark_;                       ///< by triangle: when it was last seen
  int now_ = 0;
};

EliminationTree::Divider::Divider(const mesh::Mesh& mesh)
    : neighbours_(mesh.triangles().size(), {-1, -1, -1}), mark_(mesh.triangles().size(), 0) {
  std::vector<std::array<int, 2>> met(mesh.edges().size(), {-1, -1});  // by edge: triangle, side
  for (int t = 0; t < static_cast<int>(mesh.triangles().size()); ++t) {
    const auto& corner = mesh.triangles()[t];
    centres_.push_back((mesh.points()[corner[0]] + mesh.points()[corner[1]] + mesh.points()[corner[2]]) / 3);
    for (int side = 0; side < 3; ++side) {
      auto& [other, other_side] = met[mesh.edge(t, side)];
      if (other >= 0) {
        neighbours_[t][side] = other;
        neighbours_[other][other_side] = t;
      }
      other = t;
      other_side = side;
    }
  }
}

void EliminationTree::Divider::sort(std::span<int> group, int axis) const {
  std::sort(group.begin(), group.end(), [&](int a, int b) { return centres_[a][axis] < centres_[b][axis]; });
}

EliminationTree::Divider::Cut EliminationTree::Divider::best_cut(std::span<const int> group, int axis) {
  constexpr double smallest_share = 0.3;
  constexpr double imbalance_cost = 1.0;
  now_ += 2;
  for (const int t : group) mark_[t] = now_;
  Cut best;
  int sides = 0;  // between the triangles passed and the others of the group
  const int count = static_cast<int>(group.size());
  for (int i = 1; i < count; ++i) {
    const int passed = group[i - 1];
    for (const int other : neighbours_[passed])
      if (other >= 0 && mark_[other] >= now_) sides += mark_[other] == now_ ? 1 : -1;
    mark_[passed] = now_ + 1;
    const double off = std::abs(static_cast<double>(i) / count - 0.5);
    const double cost = sides * (1.0 + imbalance_cost * off);
    if ((off <= 0.5 - smallest_share || i == count / 2) && cost < best.cost) best = {cost, i, axis};
  }
  return best;
}

int EliminationTree::Divider::divide(std::vector<int>& triangles, int first, int last) {
  const std::span<int> group(triangles.data() + first, static_cast<std::size_t>(last - first));
  mesh::Point low = centres_[group.front()];
  mesh::Point high = low;
  for (const int t : group) {
    low = low.cwiseMin(centres_[t]);
    high = high.cwiseMax(centres_[t]);
  }
  const int longer = high.x() - low.x() >= high.y() - low.y() ? 0 : 1;
  sort(group, 1 - longer);
  const Cut along = best_cut(group, 1 - longer);
  sort(group, longer);
  const Cut across = best_cut(group, longer);
  if (across.cost <= along.cost) return first + across.at;
  sort(group, 1 - longer);
  return first + along.at;
}

int EliminationTree::build(std::vector<int>& triangles, int first, int last, Divider& divider) {
  Group group;
  if (last - first == 1) {
    group.triangle = triangles[first];
  } else {
    const int middle = divider.divide(triangles, first, last);
    group.children[0] = build(triangles, first, middle, divider);
    group.children[1] = build(triangles, middle, last, divider);
  }
  groups_.push_back(std::move(group));
  return static_cast<int>(groups_.size()) - 1;
}

EliminationTree::EliminationTree(const mesh::Mesh& mesh) {
  const Discretisation numbering(mesh, min_degree);
  const int count = static_cast<int>(mesh.triangles().size());
  std::vector<int> triangles(count);
  std::iota(triangles.begin(), triangles.end(), 0);
  groups_.reserve(2 * count);
  Divider divider(mesh);
  build(triangles, 0, count, divider);

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
