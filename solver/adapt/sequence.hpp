#pragma once

#include <vector>

#include "mesh/triangulate/size_rule.hpp"
#include "solver/adapt/bound.hpp"
#include "solver/corner/singular_place.hpp"
#include "solver/crack/tip_scan.hpp"
#include "solver/extract/edge_scan.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {

/// Solutions of rising degree on one mesh, and what is known from all of them.
/// Holds a reference to the model.
class DegreeSequence {
 public:
  /// `end`: SizeRule::end of the model's mesh. `places`: where no peak exists.
  DegreeSequence(const Model& model, const Plate& plate, double end = mesh::SizeRule{}.end,
                 std::vector<SingularPlace> places = {});

  /// Solves with a degree higher than any before. Throws as Model::solve does.
  void solve(int degree);

  const Model& model() const { return *model_; }
  const EdgeScanner& scanner() const { return scanner_; }
  const std::vector<Displacements>& displacements() const { return displacements_; }
  /// Whether corners, held edges, jumps of curvature or of stiffness leave a slow tail in
  /// the values.
  bool has_tail() const;
  Convergence convergence() const;
  const std::vector<EdgeScan>& scans() const { return scans_; }
  const TipScanner& tip_scanner() const { return tip_scanner_; }
  const std::vector<TipScan>& tip_scans() const { return tip_scans_; }

  /// The value of the last degree with its bound from all of them: no less than a
  /// tenth of the bound of the largest magnitude of edge stress there, and where a notch or fillet
  /// begins, ends or changes its radius, than what the triangles there are known
  /// to leave out. Infinite where the extreme lies at a place without a peak.
  EdgeValue value(std::size_t load_case, std::size_t raiser, Quantity quantity) const;

  /// K_I, K_II and T of a crack tip from the last degree, with bounds from all
  /// degrees that are no less than the spread of the domains (for T, of the outer
  /// ones), and than what the triangles at the tip are known to leave out.
  std::array<Estimate, 3> tip_value(std::size_t load_case, std::size_t tip) const;

  /// Largest magnitude of edge stress on the raiser under all loads, MPa.
  double peak(std::size_t raiser) const;

  /// Bound of an asked number over its tolerance; it is met at 1 or below. A raiser
  /// that carries less than 1e-5 of the largest edge stress is held to that share of it.
  double excess(const Ask& ask) const;
  /// The part of it that comes from what is not known of pressures: no finer mesh
  /// and no higher degree takes it away.
  double doubt_excess(const Ask& ask) const;

 private:
  /// What the doubt of the model changes of a value at a raiser, and of K and T.
  double doubt(std::size_t load_case, std::size_t raiser, Quantity quantity) const;
  Eigen::Vector3d tip_doubt(std::size_t load_case, std::size_t tip) const;

  /// Places on a raiser's edge where its curvature jumps, and how near is at them.
  struct Joints {
    std::vector<Point> places;
    double near = 0.0;  ///< mm
  };
  std::vector<Joints> joints() const;
  /// The bound of one quantity from its own values.
  double own_bound(std::size_t load_case, std::size_t raiser, std::size_t quantity) const;
  bool is_at_place_without_peak(const Point& x) const;
  /// What the triangles leave out of a quantity that lies at a joint; 0 elsewhere.
  double left_out_at_joint(std::size_t load_case, std::size_t raiser, std::size_t quantity) const;

  const Model* model_;
  const Plate* plate_;
  double end_ = 0.0;
  double largest_peak_ = 0.0;  ///< MPa, over all raisers in the last solution
  std::vector<SingularPlace> places_;
  std::vector<Point> centres_;  ///< of the raisers
  std::vector<Joints> joints_;  ///< of the raisers; none on holes
  EdgeScanner scanner_;
  Room room_;
  std::vector<Displacements> displacements_;
  std::vector<EdgeScan> scans_;
  TipScanner tip_scanner_;
  std::vector<TipScan> tip_scans_;

  double tip_excess(const Ask& ask, const Eigen::Vector3d& bounds) const;
};

}  // namespace raiser::solver
