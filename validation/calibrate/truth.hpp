#pragma once

#include <array>
#include <optional>

#include "mesh/mesh.hpp"
#include "solver/adapt/sequence.hpp"
#include "solver/solution.hpp"

namespace raiser::validation {

/// A value and how far it may be wrong, MPa.
struct Known {
  double value = 0.0;
  double doubt = 0.0;
};

/// The mesh with every triangle divided into four, new points of curved sides
/// on their curves. Throws std::runtime_error when that inverts a triangle.
mesh::Mesh divided(const mesh::Mesh& mesh);

/// A solution of degrees 9 and 10 of the whole plate, no mirror lines used.
class FinerSolution {
 public:
  FinerSolution(const solver::Problem& problem, mesh::Mesh mesh);
  FinerSolution(const FinerSolution&) = delete;
  FinerSolution& operator=(const FinerSolution&) = delete;

  /// An extreme on a hole's edge; cases as in EdgeScan.
  Known extreme(std::size_t load_case, std::size_t hole, solver::Quantity quantity) const;
  /// K_I, K_II or T (which = 0, 1, 2) of a tip; cases as in TipScanner. The spread
  /// of two domains counts as doubt, too.
  Known tip(std::size_t load_case, std::size_t tip, int which) const;
  /// Tangential stress under all loads at a point of a hole's edge; nothing
  /// when the point is not on it.
  std::optional<Known> tangential(std::size_t hole, const mesh::Point& x) const;
  /// sigma_xx, sigma_yy, sigma_xy under all loads; nothing outside the material.
  std::optional<std::array<Known, 3>> stress(const mesh::Point& x) const;

  std::size_t unknowns() const { return unknowns_; }

 private:
  mesh::Plate plate_;
  solver::Model model_;
  solver::DegreeSequence sequence_;
  std::vector<solver::Field> fields_;
  std::size_t unknowns_ = 0;
};

}  // namespace raiser::validation
