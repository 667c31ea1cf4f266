#pragma once

#include <Eigen/Core>
#include <array>
#include <vector>

#include "mesh/mesh.hpp"
#include "solver/elasticity/hooke_law.hpp"
#include "solver/elasticity/load.hpp"
#include "solver/fe/constraints.hpp"
#include "solver/fe/discretisation.hpp"
#include "solver/linear/elimination.hpp"

namespace raiser::solver {

/// One mirror image of the meshed part of the plate: x and y are multiplied
/// by the signs.
struct Image {
  std::array<double, 2> sign{1.0, 1.0};
  bool flips() const { return sign[0] * sign[1] < 0; }
  Point apply(const Point& p) const { return {sign[0] * p.x(), sign[1] * p.y()}; }
  mesh::Mirrors mirror() const { return {sign[0] < 0, sign[1] < 0}; }
};

/// Displacements of all unit loads in the space of one degree: one column a
/// load, rows as Discretisation numbers the unknowns; mm.
struct Displacements {
  int degree = 0;
  Eigen::MatrixXd values;
};

/// How well displacements solve the discrete equations, over the meshed part.
struct Balance {
  double residual = 0.0;       ///< ||K u - f|| / ||f|| on the free unknowns, largest over the loads
  double reaction = 0.0;       ///< largest force at the points held against rigid motion / ||f||
                               ///< (with supports, what holds the motions that they leave free)
  double strain_energy = 0.0;  ///< N mm, all loads together, whole plate
  double external_work = 0.0;  ///< N mm, half the work of all loads together, whole plate
};

/// Factorised equations of one degree, with what is held.
struct Equations {
  Constraints how;
  Factorisation factors;
  /// Displacements for load vectors, held unknowns 0.
  Eigen::MatrixXd solve(Eigen::MatrixXd loads) const;
  /// Factorisation::halfway of load vectors.
  Eigen::MatrixXd halfway(Eigen::MatrixXd loads) const;
};

/// A meshed plate (or its half or quarter between mirror lines) with its
/// material and self-balanced unit loads: everything but the degree.
///
/// Without held edges, or where they leave rigid motions free, points are held
/// so that nothing moves as a whole, at which balanced loads leave no force.
///
/// With mirror lines, each load must be even or odd under each of them, and
/// the material its own mirror image.
/// Throws std::invalid_argument otherwise.
class Model {
 public:
  Model(mesh::Mesh mesh, mesh::Mirrors mirrors, const HookeLaw& material, double thickness,
        std::vector<UnitLoad> loads, std::vector<HeldEdge> held = {});

  const mesh::Mesh& mesh() const { return mesh_; }
  const HookeLaw& material() const { return material_; }
  const std::vector<UnitLoad>& loads() const { return loads_; }
  const std::vector<HeldEdge>& held() const { return held_; }
  const std::vector<Image>& images() const { return images_; }
  mesh::Mirrors mirrors() const { return mirrors_; }

  /// +1 or -1: the factor of a load's mirrored solution in an image.
  double parity(std::size_t load, const Image& image) const;

  /// Factor of each load's solution in an image for a load case: 0 is all loads
  /// together but doubts, 1 + l load l alone.
  Eigen::VectorXd factors(std::size_t load_case, const Image& image) const;

  /// Solves for all loads. Throws std::runtime_error when the factorisation fails.
  Displacements solve(int degree) const;
  /// The same with memory that is used again from call to call.
  Displacements solve(int degree, Room& room) const;

  Balance balance(const Displacements& displacements) const;

  /// What each held edge (of the meshed part) puts on the plate under each load,
  /// [held edge][load], whole plate thickness, about the origin; N and N mm.
  /// A component that two edges hold at their common corner counts by halves.
  std::vector<std::vector<Resultant>> reactions(const Displacements& displacements) const;

  /// Load vectors of all loads for unit thickness, one column each, N/mm.
  Eigen::MatrixXd load_vectors(const Discretisation& space) const;
  /// The equations of the first load's class, in `room`. Other right-hand sides of that
  /// class can be solved with them.
  Equations equations(const Discretisation& space, Room& room) const {
    return equations(space, classes_.front(), room);
  }
  /// All loads of the first load's class together: load vector and displacement.
  struct Together {
    Eigen::VectorXd load, displacement;
  };
  Together together(const Discretisation& space, const Equations& equations) const;

 private:
  /// Loads that share held unknowns, hence a factorisation.
  struct Class {
    std::vector<std::size_t> loads;
    bool odd_x = false;
    bool odd_y = false;
  };
  void share(const Point& force, const Point& x, const std::vector<std::size_t>& edges, std::size_t load,
             std::vector<std::vector<Resultant>>& sums) const;
  Constraints constraints(const Discretisation& space, const Class& cls) const;
  /// Unknowns to hold in addition, so that no rigid motion is left.
  std::vector<int> pins(const Constraints& constraints) const;
  /// Stiffness times displacements.
  Eigen::MatrixXd forces(const Discretisation& space, const Eigen::MatrixXd& displacements) const;
  Equations equations(const Discretisation& space, const Class& cls, Room& room) const;
  /// Displacements of a class's loads with load vectors f of all loads.
  Eigen::MatrixXd solve(const Discretisation& space, const Equations& equations, const Class& cls,
                        const Eigen::MatrixXd& f) const;
  Factorisation::ElementMatrix element_matrices(const Discretisation& space) const;
  /// The same in the axes of the held edges.
  Factorisation::ElementMatrix turned_matrices(const Discretisation& space, const Constraints& how) const;

  mesh::Mesh mesh_;
  mesh::Mirrors mirrors_;
  HookeLaw material_;
  double thickness_;
  std::vector<UnitLoad> loads_;
  std::vector<HeldEdge> held_;
  std::vector<Image> images_;
  std::vector<Class> classes_;
  EliminationTree tree_;
};

}  // namespace raiser::solver
