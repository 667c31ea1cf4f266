#pragma once

#include <vector>

#include "solver/crack/tip_scan.hpp"
#include "solver/extract/edge_scan.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {

/// Solutions of rising degree on one mesh, and what is known from all of them.
/// Holds a reference to the model.
class DegreeSequence {
 public:
  DegreeSequence(const Model& model, const Plate& plate);

  /// Solves with a degree higher than any before. Throws as Model::solve does.
  void solve(int degree);

  const Model& model() const { return *model_; }
  const EdgeScanner& scanner() const { return scanner_; }
  const std::vector<Displacements>& displacements() const { return displacements_; }
  const std::vector<EdgeScan>& scans() const { return scans_; }
  const TipScanner& tip_scanner() const { return tip_scanner_; }
  const std::vector<TipScan>& tip_scans() const { return tip_scans_; }

  /// The value of the last degree with its bound from all of them.
  EdgeValue value(std::size_t load_case, std::size_t raiser, Quantity quantity) const;

  /// K_I, K_II and T of a crack tip from the last degree, with bounds from all
  /// degrees that are no less than the spread of the domains (for T, of the outer
  /// ones), and than what the triangles at the tip are known to leave out.
  std::array<Estimate, 3> tip_value(std::size_t load_case, std::size_t tip) const;

  /// Largest magnitude of edge stress on the raiser under all loads, MPa.
  double peak(std::size_t raiser) const;

  /// Bound of an asked number over its tolerance; it is met at 1 or below.
  double excess(const Ask& ask) const;
  /// The part of it that comes from what is not known of pressures: no finer mesh
  /// and no higher degree takes it away.
  double doubt_excess(const Ask& ask) const;

 private:
  /// What the doubt of the model changes of a value at a raiser, and of K and T.
  double doubt(std::size_t load_case, std::size_t raiser, Quantity quantity) const;
  Eigen::Vector3d tip_doubt(std::size_t load_case, std::size_t tip) const;

  const Model* model_;
  const Plate* plate_;
  std::vector<Point> centres_;  ///< of the raisers
  EdgeScanner scanner_;
  Room room_;
  std::vector<Displacements> displacements_;
  std::vector<EdgeScan> scans_;
  TipScanner tip_scanner_;
  std::vector<TipScan> tip_scans_;

  double tip_excess(const Ask& ask, const Eigen::Vector3d& bounds) const;
};

}  // namespace raiser::solver
