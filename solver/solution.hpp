#pragma once

#include <Eigen/Core>
#include <optional>
#include <string>
#include <vector>

#include "mesh/plate/plate.hpp"
#include "mesh/plate/section.hpp"
#include "solver/contact/contact_arc.hpp"
#include "solver/corner/place_findings.hpp"
#include "solver/crack/tip_scan.hpp"
#include "solver/elasticity/hooke_law.hpp"
#include "solver/elasticity/load.hpp"
#include "solver/extract/estimate.hpp"
#include "solver/extract/quantity.hpp"
#include "solver/field/field.hpp"

namespace raiser::solver {

/// What is to be solved: complete, legal and balanced.
struct Problem {
  Plate plate;
  HookeLaw material;
  std::vector<Load> loads;
  std::vector<Support> supports = {};
};

/// One asked number and its tolerance. At a raiser it is relative to the largest
/// magnitude of edge stress there under all loads together, or to 1e-5 of that on
/// the whole plate's raisers where this is more. At a crack tip,
/// `stress_intensity` means both K_I and K_II, relative to sqrt(K_I^2 + K_II^2),
/// and T is relative to that over sqrt(pi a), a being the crack's length, or half
/// of it when both its ends are tips; no less than 1 % of what T and the other
/// tips' K would give there, so that a tip without stress has a tolerance, too.
struct Ask {
  Quantity quantity = Quantity::largest_edge_stress;
  std::size_t raiser = 0;  ///< index into mesh::raisers(plate), the holes first; of a tip into mesh::tips()
  double tolerance = 1e-3;
  std::string name;  ///< the user's, may be empty
};

/// A stress on a raiser's edge and where it is.
struct EdgeValue {
  Estimate stress;              ///< MPa
  Point point = Point::Zero();  ///< mm
  double angle = 0.0;           ///< rad, of the point seen from the raiser's centre, from +x, in (-pi, pi]
  double traction_miss = 0.0;   ///< MPa: how far the raw stress misses the known traction there
};

/// A straight section through the plate, and what it cuts. Of a fillet: the
/// section of the narrow part; gross_area alone is that of the wide part.
struct Section {
  using Direction = mesh::Direction;  ///< across: the line x = station; along: y = station
  Direction direction = Direction::across;
  double station = 0.0;       ///< mm
  double gross_area = 0.0;    ///< mm^2
  double net_area = 0.0;      ///< mm^2
  double net_centroid = 0.0;  ///< mm, along the section
  double net_inertia = 0.0;   ///< mm^4, second moment about net_centroid, times thickness
  double normal_force = 0.0;  ///< N, tension positive
  double shear_force = 0.0;   ///< N
  double moment = 0.0;        ///< N mm, about the centroid of the gross section
};

/// Kt with the nominal stress it stands on. `kt` is empty where it is not
/// defined, and `why` says so. Kt is the largest magnitude of edge stress on
/// the raiser over the magnitude of the nominal stress.
struct Concentration {
  std::optional<Estimate> kt;
  double nominal = 0.0;    ///< MPa
  std::string definition;  ///< formula of the nominal stress, in words and symbols
  std::string why;
};

/// What was found at one raiser under one load (or all together).
struct RaiserFindings {
  std::size_t raiser = 0;  ///< index into mesh::raisers(plate)
  EdgeValue largest;       ///< algebraically largest edge stress
  EdgeValue smallest;      ///< algebraically smallest edge stress
  EdgeValue von_mises;     ///< largest von Mises stress on the edge
  Section section;         ///< the one that the nominal stresses stand on
  Concentration gross;
  Concentration net;
};

/// What was found at one crack tip under one load (or all together). Signs as
/// in TipValues.
struct TipFindings {
  std::size_t tip = 0;      ///< index into mesh::tips()
  Estimate k_one;           ///< K_I, MPa sqrt(mm)
  Estimate k_two;           ///< K_II, MPa sqrt(mm)
  Estimate t_stress;        ///< MPa
  Estimate energy_release;  ///< N/mm, from K_I and K_II
  double j_integral = 0.0;  ///< N/mm, by the domain J integral
  double extension = 0.0;   ///< N/mm, by a virtual extension of the crack
  std::vector<Eigen::Vector3d>
      domains;                       ///< K_I, K_II and T from each domain; the first is the one given above
  std::optional<double> kink_angle;  ///< rad, as kink_angle() gives it
};

/// One load by itself, or all together.
struct LoadFindings {
  std::string name;  ///< the load's name, "all loads" for the combination
  std::vector<RaiserFindings> raisers;
  std::vector<TipFindings> tips = {};
  std::vector<std::size_t> loads = {};  ///< indices into Problem::loads
};

/// What a support puts on the plate under all loads.
struct SupportReaction {
  std::size_t support = 0;  ///< index into Problem::supports
  Resultant reaction;       ///< about the origin
};

/// Where a rigid pin touches its hole under all loads, and how hard.
struct PinFindings {
  std::size_t load = 0;          ///< index into Problem::loads
  std::vector<ContactArc> arcs;  ///< one, or several where a load that passes by draws the hole long
  double force_miss = 0.0;       ///< how far the pressure's resultant misses the pin's force, over that force
};

/// One step of the sequence that the bounds stand on.
struct Level {
  int refinement = 0;
  int degree = 0;
  std::size_t triangles = 0;
  std::size_t unknowns = 0;  ///< before condensation
  double peak = 0.0;         ///< MPa: the largest magnitude of edge stress over the raisers
  double worst = 0.0;        ///< largest ratio of bound to tolerance among what is asked
  double seconds = 0.0;
};

/// Checks on the whole plate.
struct PlateChecks {
  double support_miss = 0.0;          ///< what loads and reactions leave over / the largest of them
  double equilibrium_residual = 0.0;  ///< ||K u - f|| / ||f||, largest over the unit loads
  double reaction = 0.0;              ///< largest force in the rigid-body constraints / applied force
  double far_station = 0.0;           ///< mm, the section x = const where the nominal stress was recovered
  double far_applied = 0.0;           ///< MPa, mean sigma_xx there from the loads
  double far_recovered = 0.0;         ///< MPa, mean sigma_xx there, integrated from the solution
  double far_scatter = 0.0;  ///< largest departure of sigma_xx from the linear nominal distribution there,
                             ///< over the largest nominal stress
  double outer_von_mises = 0.0;  ///< MPa, the largest on the plate's own edges under all loads, away from
                                 ///< places without a peak; no bound
  Point outer_point = Point::Zero();  ///< mm, where
  double strain_energy = 0.0;         ///< N mm
  double external_work = 0.0;         ///< N mm, half the work of the loads
};

/// The stress along one ligament: from the raiser's edge to the next free edge
/// along the section.
struct LigamentPoint {
  Point point = Point::Zero();
  double distance = 0.0;  ///< mm from the raiser's edge
  Stress stress;          ///< MPa
  double bound = 0.0;     ///< MPa, on each component
};
struct Ligament {
  std::size_t raiser = 0;
  std::string from;    ///< e.g. "hole bolt, y > centre", "notch a"
  std::string to;      ///< e.g. "top edge", "hole b"
  double width = 0.0;  ///< mm
  std::vector<LigamentPoint> points;
};

/// The stress along a raiser's edge.
struct EdgeSample {
  Point point = Point::Zero();
  double angle = 0.0;  ///< rad, as in EdgeValue
  double arc_length =
      0.0;  ///< mm from the first sample: anticlockwise round a hole, along the outline elsewhere
  double tangential = 0.0;  ///< MPa
  double von_mises = 0.0;   ///< MPa
  double bound = 0.0;       ///< MPa, on the tangential stress
};

/// The answer. `status` is settled when every asked number met its tolerance.
struct Solution {
  enum class Status { settled, not_met };
  Status status = Status::not_met;
  std::string reason;  ///< why not, empty when settled

  LoadFindings combined;
  std::vector<LoadFindings> units;  ///< one for each unit load
  PlateChecks checks;
  std::vector<Level> levels;
  int degree = 0;
  std::size_t unknowns = 0;
  std::size_t triangles = 0;
  mesh::Mirrors mirrors_used;
  double seconds = 0.0;

  std::vector<SupportReaction> reactions;  ///< by support
  std::vector<PinFindings> pins;           ///< of the pins in contact

  std::vector<std::vector<EdgeSample>> edges;  ///< by raiser, under all loads
  std::vector<Ligament> ligaments;             ///< under all loads
  std::vector<CrackOpening> openings;          ///< by crack, under all loads
  std::vector<PlaceFindings> places;           ///< where no peak stress exists, under all loads
  Field field;                                 ///< under all loads, over the whole plate
};

/// How much of a solution is filled in. brief: the findings under all loads
/// together and the openings of cracks, for whoever solves many plates for a
/// number each; no unit loads, checks, edges, ligaments and field.
enum class Report { full, brief };

/// Solves until every asked number's bound meets its tolerance, or the budget
/// is spent. Throws std::invalid_argument for a problem that is not legal.
Solution settle(const Problem& problem, const std::vector<Ask>& asks, Report extent = Report::full);

}  // namespace raiser::solver
