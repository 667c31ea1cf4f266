#pragma once

#include <vector>

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

  /// The value of the last degree with its bound from all of them.
  EdgeValue value(std::size_t load_case, std::size_t raiser, Quantity quantity) const;

  /// Largest magnitude of edge stress on the raiser under all loads, MPa.
  double peak(std::size_t raiser) const;

  /// Bound of an asked number over its tolerance; it is met at 1 or below.
  double excess(const Ask& ask) const;

 private:
  const Model* model_;
  std::vector<Point> centres_;  ///< of the raisers
  EdgeScanner scanner_;
  Room room_;
  std::vector<Displacements> displacements_;
  std::vector<EdgeScan> scans_;
};

}  // namespace raiser::solver
