#pragma once

#include <cstddef>
#include <functional>
#include <string>
#include <vector>

#include "solver/solution.hpp"

namespace raiser::solver {

/// How cracks grow. All tips advance together, each by the same length; the
/// lengths are those of the crack of the first one.
struct GrowthPlan {
  /// straight: along the line of the last segment. kinked: so to the first length,
  /// then each step in the direction of the largest hoop stress of the step
  /// before (F. Erdogan and G. C. Sih, J. Basic Eng. 85 (1963) 519).
  enum class Path { straight, kinked };
  std::vector<std::size_t> tips;  ///< indices into mesh::tips(Plate::cracks)
  std::vector<double> lengths;    ///< mm, rising; the first ones may be shorter than the crack is
  Path path = Path::straight;
  double tolerance = 1e-3;  ///< of K_I and K_II, as in Ask
};

/// One length, solved or not.
struct GrowthStep {
  /// not_met: solved, but with a wider bound than asked. not_solved: `reason`
  /// says why, and there are no numbers.
  enum class Status { settled, not_met, not_solved };
  double length = 0.0;  ///< mm, of the crack of the first tip
  Status status = Status::not_solved;
  std::string reason;
  std::vector<Point> at;          ///< of each growing tip
  std::vector<TipFindings> tips;  ///< of each growing tip under all loads
  bool is_closed = false;         ///< the faces of a growing crack press on each other somewhere
  int degree = 0;
  std::size_t triangles = 0;
  std::size_t unknowns = 0;
  double seconds = 0.0;
};

/// What came of it.
struct Growth {
  std::vector<GrowthStep> steps;    ///< one a length; fewer only where it was stopped
  std::vector<mesh::Crack> cracks;  ///< at the last length that could be drawn
};

/// Everything wrong with a plan: no tip, a tip that is not there or named twice,
/// lengths that do not rise or are not positive, a tolerance that is not positive.
std::vector<std::string> faults(const GrowthPlan& plan, const Plate& plate);

/// `count` lengths at equal distances, both ends among them. Requires two or more.
std::vector<double> spaced(double from, double to, std::size_t count);

/// Meshes and settles the plate at every length. A step that cannot be solved
/// says why and stops a kinked path, whose later steps then say so, not a
/// straight one. A K_II within its bound turns no crack. `go_on` is asked after
/// each step. Throws std::invalid_argument for a plan or problem that is not legal.
Growth grow(const Problem& problem, const GrowthPlan& plan,
            const std::function<bool(const GrowthStep&)>& go_on = {});

}  // namespace raiser::solver
