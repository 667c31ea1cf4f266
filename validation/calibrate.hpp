#pragma once

#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

#include "solver/solution.hpp"

namespace raiser::validation {

/// One number of a solution held against its truth. Stresses in MPa, K in MPa sqrt(mm).
struct Trial {
  enum class What {
    largest,
    smallest,
    von_mises,
    edge_sample,
    ligament_point,
    k_one,
    k_two,
    t_stress,
    contact_pressure,
    contact_end  ///< rad
  };
  What what = What::largest;
  std::size_t hole = 0;  ///< index of the raiser, or of the crack tip
  std::string load;      ///< kind of the load, "together" for several
  bool is_asked = true;  ///< false: a unit load of several, for which no tolerance is asked
  double value = 0.0;    ///< MPa
  double bound = 0.0;    ///< MPa
  double error = 0.0;    ///< MPa: magnitude of value less truth
  double doubt = 0.0;    ///< MPa: how far the truth itself may be wrong
  double scale = 0.0;    ///< MPa: largest magnitude of edge stress on the hole; of K and T at the tip
  std::string shape;     ///< of the raiser, or the kind of crack
  /// Smallest ligament of a hole over the smaller diameter beside it; of a notch or
  /// fillet, that of its net section over twice its smallest radius.
  double ligament = 0.0;
};

/// Whether the truth lies within the bound, with regard to its own doubt.
enum class Verdict { within, outside, undecided };
Verdict verdict(const Trial& trial);

/// What came of one plate.
struct PlateTrial {
  enum class Truth { finer_solution, closed_form, finer_cracked, finer_outlined, finer_pinned, finer_drawn };
  std::uint64_t seed = 0;
  Truth truth = Truth::finer_solution;
  bool is_settled = false;
  std::string reason;  ///< why not settled, or why nothing could be compared
  int degree = 0;
  int refinements = 0;
  std::size_t triangles = 0;
  std::size_t unknowns = 0;        ///< before condensation
  std::size_t truth_unknowns = 0;  ///< of the finer solution, 0 for closed forms
  double cpu_seconds = 0.0;        ///< CPU time of the solution, report included
  std::vector<Trial> trials;
};

/// The tolerance at which everything is asked.
inline constexpr double calibration_tolerance = 1e-3;

/// Solves random_plate(seed), asking all three quantities at every hole, and
/// holds every number, those of each unit load, edge samples and ligament
/// points against a finer solution: of the whole plate (no mirror lines used),
/// of degree 10 on a mesh with arcs in half as long pieces, slower growth and
/// joints graded closer. The difference of degrees 9 and 10 is that truth's own
/// doubt; where it is not below a tenth of every bound, the truth is solved
/// again on finer meshes, at last with every triangle divided into four. Takes
/// seconds. Never throws: what fails is a plate that is not settled, or has no
/// trials, with the reason.
PlateTrial try_random_plate(std::uint64_t seed);

/// One circular or elliptical hole in a plate on whose outline acts the exact
/// traction of an infinite plate's field, remote stress or pressure in the
/// hole (Kirsch 1898, Lame 1852, Inglis 1913), so that the truth is a closed
/// form. Axes ratio 0.1 to 10, any angle and place.
PlateTrial try_closed_form(std::uint64_t seed);

/// The same of random_outlined_plate(seed), at every hole, notch and fillet.
PlateTrial try_outlined_plate(std::uint64_t seed);

/// The same of random_drawn_plate(seed).
PlateTrial try_drawn_plate(std::uint64_t seed);

/// Solves random_cracked_plate(seed), asking K and T at every tip, and holds them,
/// those of each unit load too, against a solution of degree 10 of the whole plate
/// on a finer mesh with finer fans about the tips, as try_random_plate does. A
/// K_II that is zero by symmetry to rounding is left out.
PlateTrial try_cracked_plate(std::uint64_t seed);

/// Solves random_pinned_plate(seed), asking all three quantities at every hole, and
/// holds them, the largest pressures and the ends of the arcs of contact against the
/// same asked 250 times as finely, contact, mesh and degree included; its difference
/// from the same asked 50 times as finely is its doubt. Where that leaves a number
/// undecided, 500 and 250 times.
PlateTrial try_pinned_plate(std::uint64_t seed);

/// The first `count` seeds whose random plate has at most `most_holes` holes.
std::vector<std::uint64_t> seeds_with_few_holes(std::size_t count, std::size_t most_holes);

/// Counts over some trials. A ratio is bound over error.
struct Tally {
  std::size_t numbers = 0;
  std::size_t within = 0;
  std::size_t undecided = 0;
  double median_ratio = 0.0;
  double ratio_95 = 0.0;  ///< 95 of 100 ratios are smaller

  /// Share of the numbers that are surely within their bound; 1 for none.
  double coverage() const;
};
Tally tally(const std::vector<const Trial*>& trials);

/// All trials of peaks at holes (not edge samples, not ligament points).
std::vector<const Trial*> peaks(const std::vector<PlateTrial>& plates);

/// All trials of K and T at crack tips.
std::vector<const Trial*> tip_values(const std::vector<PlateTrial>& plates);

/// All trials of plates with pins: peaks, pressures and ends of contact.
std::vector<const Trial*> pin_values(const std::vector<PlateTrial>& plates);

/// The result as Markdown: coverage and ratios by group, every miss, every
/// plate that is not settled, unknowns and CPU time.
std::string calibration_report(const std::vector<PlateTrial>& plates);

/// One plate as lines of text and back, for passing between processes.
std::string to_lines(const PlateTrial& plate);
std::vector<PlateTrial> from_lines(std::string_view text);

}  // namespace raiser::validation
