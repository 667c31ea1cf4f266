#pragma once

#include <array>
#include <optional>
#include <vector>

#include "solver/extract/quantity.hpp"
#include "solver/field/edge.hpp"

namespace raiser::solver {

/// The load of a model that is no part of all loads together, but what is not known
/// of the pressures of the loads in it; a model has at most one.
std::optional<std::size_t> doubt_in(const Model& model);

/// An extreme value on a raiser's edge in one solution.
struct Extreme {
  double value = 0.0;           ///< MPa
  Point point = Point::Zero();  ///< mm
  double traction_miss = 0.0;   ///< MPa: how far the raw stress misses the known traction there
  /// MPa: what the rounding of displacements comes to in stress there. A side of length h
  /// turns a rounding of the largest displacement u into E u p^2 / h, p the degree
  /// (Markov's inequality, for the derivative of a polynomial).
  double rounding = 0.0;
};
using RaiserExtremes = std::array<Extreme, quantity_count>;

/// The edges of all raisers in one solution: extremes for each case (0: all
/// loads together, 1 + l: load l alone) and raiser, and the stress at fixed
/// positions on the sides under all loads.
struct EdgeScan {
  std::vector<std::vector<RaiserExtremes>> extremes;  ///< [case][raiser]
  /// The same with the model's doubt added, for cases that it belongs to; empty for others.
  std::vector<std::vector<RaiserExtremes>> doubted;
  std::vector<SideStress> sides;  ///< by EdgeScanner::sides(), at search_points(), per load
  Eigen::VectorXd displacement;   ///< mm, the largest component at a corner of the mesh, per load
};

/// Searches the edges of all raisers between the nodes: every side is sampled at
/// Chebyshev points, the interpolant through them maximised, and the value at
/// its maximum taken from the solution itself. At a blunt corner with a free edge
/// (see mesh::SizeRule::blunt) all stress vanishes, as slowly as a small power of
/// the distance: there 0 counts in place of the last side. Holds a reference to the
/// model.
class EdgeScanner {
 public:
  EdgeScanner(const Model& model, const Plate& plate);

  EdgeScan scan(const Displacements& displacements) const;

  /// The boundary sides that lie on raisers.
  const std::vector<mesh::BoundarySide>& sides() const { return sides_; }
  /// The raiser of the whole plate that side `side` lies on in an image.
  std::size_t raiser_in(std::size_t side, std::size_t image) const;
  /// Factor of each load's stress in an image for a case.
  Eigen::VectorXd weights(std::size_t load_case, std::size_t image) const;
  /// Whether what is not known of pressures belongs to a case.
  bool has_doubt(std::size_t load_case) const;

 private:
  struct Search;
  /// The end of a raiser's edge in a corner where all stress vanishes.
  struct FreeEnd {
    std::size_t side = 0;
    double s = 0.0;  ///< -1 or 1
  };
  std::vector<FreeEnd> free_ends() const;

  std::vector<RaiserExtremes> extremes(const Displacements& displacements, const EdgeScan& scan,
                                       std::size_t load_case, bool doubted) const;
  const Model* model_;
  std::size_t raisers_;
  std::vector<mesh::BoundarySide> sides_;
  std::vector<std::vector<std::size_t>> raiser_of_;  ///< [image][raiser in the mesh]
  std::vector<FreeEnd> free_ends_;
  std::vector<bool> is_searched_;  ///< by side
};

}  // namespace raiser::solver
