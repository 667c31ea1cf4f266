#pragma once

#include <Eigen/Core>
#include <array>
#include <functional>
#include <vector>

#include "solver/fe/discretisation.hpp"
#include "solver/linear/room.hpp"

namespace raiser::solver {

/// In which order the unknowns of a mesh are eliminated: groups of triangles
/// are divided again and again by a line along x or y that cuts few sides and
/// leaves at least three tenths on either side, and an entity (vertex, edge,
/// triangle) is eliminated in the smallest group that contains all triangles
/// it belongs to. Depends on the mesh only, not on the degree.
/// Source: nested dissection by elements, A. George, SIAM J. Numer. Anal. 10
/// (1973) 345-363; multifrontal elimination, I. S. Duff and J. K. Reid, ACM
/// Trans. Math. Softw. 9 (1983) 302-325.
class EliminationTree {
 public:
  explicit EliminationTree(const mesh::Mesh& mesh);

  /// A group of triangles, children before parents.
  struct Group {
    std::array<int, 2> children{};  ///< groups; meaningless for a single triangle
    int triangle = -1;              ///< of a group of one, else -1
    std::vector<int> entities;      ///< still present, in the order of elimination
    int eliminated = 0;             ///< how many of them, from the first, are eliminated here
  };
  const std::vector<Group>& groups() const { return groups_; }
  /// All entities in the order of elimination.
  const std::vector<int>& order() const { return order_; }

 private:
  class Divider;
  int build(std::vector<int>& triangles, int first, int last, Divider& divider);
  std::vector<Group> groups_;
  std::vector<int> order_;
};

/// Cholesky factors of a symmetric positive definite matrix given element by
/// element, with some unknowns held at zero.
class Factorisation {
 public:
  /// Fills the element matrix of a triangle, signs applied, in the order of
  /// Discretisation::local with components interleaved.
  using ElementMatrix = std::function<void(int triangle, Eigen::MatrixXd& out)>;

  /// `held[u]`: unknown u is zero. The factors stand in `room`, which must
  /// outlive them and serve nothing else meanwhile. Throws std::runtime_error
  /// when a pivot is not positive (the plate can still move, or the matrix is
  /// not finite).
  Factorisation(const EliminationTree& tree, const Discretisation& space, const std::vector<bool>& held,
                const ElementMatrix& element, Room& room);

  /// Displacements for right-hand sides, one column each, unknowns by rows.
  /// Entries of held unknowns are ignored, and zero in the result.
  Eigen::MatrixXd solve(const Eigen::MatrixXd& loads) const;

  /// Loads, one column each, seen so that the product of two of them is the work of
  /// one in the displacements of the other: half of what solve() does, and less
  /// where loads act at few places. Rows in the order of elimination.
  Eigen::MatrixXd halfway(const Eigen::MatrixXd& loads) const;

  /// Numbers stored in the factors.
  std::size_t entries() const { return entries_; }

 private:
  struct Front {
    int first = 0;  ///< first eliminated unknown, in elimination order
    int eliminated = 0;
    std::vector<int> border;  ///< the other unknowns, in elimination order
    std::size_t offset = 0;   ///< of its columns in factors_
    /// Numbers of what it hands to its parent.
    std::size_t square() const { return border.size() * border.size(); }
  };
  void number(const EliminationTree& tree, const Discretisation& space, const std::vector<bool>& held);
  void lay_out(const EliminationTree& tree, Room& room);
  const double* panel(const Front& front) const { return factors_ + front.offset; }
  /// Solves with the eliminated part of a front, or its transpose, in place.
  void solve_at(const Front& front, bool transposed, Eigen::MatrixXd& x) const;
  /// The most numbers that wait for parents at a time, those of the front at hand included.
  std::size_t pending(const EliminationTree& tree) const;

  std::vector<int> position_;  ///< by unknown: place in elimination order, -1 when held
  int free_ = 0;
  std::vector<int> entity_first_;  ///< by entity: its first place
  std::vector<int> entity_count_;
  std::vector<Front> fronts_;
  double* factors_ = nullptr;
  std::size_t entries_ = 0;
};

}  // namespace raiser::solver
