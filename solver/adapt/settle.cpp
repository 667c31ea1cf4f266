#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <chrono>
#include <cmath>
#include <memory>
#include <optional>
#include <stdexcept>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/pins.hpp"
#include "solver/adapt/report.hpp"
#include "solver/adapt/sequence.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

using Clock = std::chrono::steady_clock;

constexpr int most_refinements = 5;
constexpr std::size_t most_unknowns = 3'000'000;
constexpr int most_sectors = 24;
constexpr double plain_tolerance = 1e-3;  ///< of what is not asked for more closely

double seconds_since(Clock::time_point start) {
  return std::chrono::duration<double>(Clock::now() - start).count();
}

void require_legal(const Problem& problem, const std::vector<Ask>& asks) {
  if (const auto found = mesh::faults(problem.plate); !found.empty())
    throw std::invalid_argument("settle: the plate is not legal: " + found.front().what);
  if (const auto found = faults(problem.material); !found.empty())
    throw std::invalid_argument("settle: the material is not legal: " + found.front().what);
  if (const auto found = faults(problem.plate, problem.supports); !found.empty())
    throw std::invalid_argument("settle: a support is not legal: " + found.front().what);
  const auto& supports = problem.supports;
  if (problem.loads.empty() && std::none_of(supports.begin(), supports.end(), displaces))
    throw std::invalid_argument("settle: there is no load");
  if (const auto fault = imbalance(problem.plate, problem.loads, problem.supports))
    throw std::invalid_argument("settle: " + fault->what);
  const std::size_t tips = mesh::tips(problem.plate.cracks).size();
  for (const Ask& ask : asks)
    if (ask.raiser >= (is_at_tip(ask.quantity) ? tips : mesh::raiser_count(problem.plate)) ||
        !(ask.tolerance > 0))
      throw std::invalid_argument("settle: an asked number names no raiser or tip, or has no tolerance");
}

/// The mirror lines that the plate, its material and all loads share.
mesh::Mirrors usable_mirrors(const Problem& problem, const std::vector<UnitLoad>& loads) {
  if (!problem.material.has_mirrors()) return {};
  mesh::Mirrors shared = mesh::mirrors(problem.plate);
  shared.x = shared.x && have_mirror(problem.plate, problem.supports, {.x = true, .y = false});
  shared.y = shared.y && have_mirror(problem.plate, problem.supports, {.x = false, .y = true});
  for (const UnitLoad& load : loads) {
    shared.x = shared.x && load.under_x != UnitLoad::Parity::neither;
    shared.y = shared.y && load.under_y != UnitLoad::Parity::neither;
  }
  return shared;
}

double least_tolerance(const std::vector<Ask>& asks) {
  double least = plain_tolerance;
  for (const Ask& ask : asks) least = std::min(least, ask.tolerance);
  return least;
}

/// How the plate's edges are held, for the stress at their ends.
WedgeEdge held_as(const Problem& problem, const mesh::Owner& owner) {
  if (owner.kind != mesh::Owner::Kind::edge) return WedgeEdge::free;
  for (const Support& support : problem.supports)
    if (support.edge == owner.index) {
      if (support.normal && support.along) return WedgeEdge::clamped;
      return support.normal ? WedgeEdge::sliding : WedgeEdge::free;
    }
  return WedgeEdge::free;
}

/// Every place of the plate where no peak stress exists.
std::vector<SingularPlace> singular_places(const Problem& problem, const mesh::Region& boundary,
                                           const std::vector<UnitLoad>& loads) {
  const auto held = [&](const mesh::Owner& owner) { return held_as(problem, owner); };
  return singular_places(boundary, held, sum_of(loads), problem.material);
}

/// Where the pressure of pins on holes that are asked about ends: with a root in
/// contact, with a kink by a cosine.
std::vector<Point> ends_of_pressure(const Problem& problem, const std::vector<Ask>& asks) {
  const auto is_asked = [&](std::size_t hole) {
    return std::any_of(asks.begin(), asks.end(),
                       [hole](const Ask& ask) { return !is_at_tip(ask.quantity) && ask.raiser == hole; });
  };
  std::vector<Point> result;
  for (const Load& load : problem.loads)
    if (load.kind == Load::Kind::pin && is_asked(load.hole))
      for (const mesh::Break& end : breaks(problem.plate, load)) result.push_back(end.at);
  return result;
}

/// The first mesh for a tolerance, before anything is solved. Singular places
/// that geometry alone does not show are handed on, those of mirror images too.
mesh::SizeRule first_rule(const Problem& problem, const std::vector<Ask>& asks, double tolerance,
                          const std::vector<SingularPlace>& places) {
  constexpr double least_turn = 0.4, far_reaching = 1.5;
  mesh::SizeRule rule;
  for (const SingularPlace& place : places)
    if (place.kind != SingularPlace::Kind::corner) rule.singular.push_back(place.site.vertex.at);
  for (const Point& end : ends_of_pressure(problem, asks)) {
    rule.singular.push_back(end);
    rule.joint_growth = 3.0;  // the largest stress may be just there
  }
  // Along stiff fibres a field reaches far and changes fast beside them.
  const double stretch = problem.material.stretch();
  rule.turn *= std::max(least_turn, 1 / std::sqrt(stretch));
  if (stretch > far_reaching) rule.growth = 0.7;
  rule.end = std::clamp(5 * tolerance, 2e-4, rule.end);
  if (tolerance < 5e-5) rule.turn *= 0.8;
  if (tolerance < 1e-5) {
    rule.growth = std::min(rule.growth, 0.7);
    rule.joint = tolerance < 1e-7 ? 0.002 : 0.01;
  }
  if (tolerance < 3e-4) {
    rule.tip_sectors = 8;
    rule.tip_rings = 6;
    rule.crack_growth = 0.7;
  }
  if (tolerance < 1e-5) {
    rule.tip_ratio = 0.15;
    rule.tip_rings = tolerance < 1e-7 ? 9 : 7;
  }
  rule.refine.assign(mesh::raiser_count(problem.plate), 1.0);
  rule.refine_tip.assign(mesh::tips(problem.plate.cracks).size(), 1.0);
  for (const Point& end : clamped_ends(problem.plate, problem.supports)) rule.singular.push_back(end);
  return rule;
}

/// Makes the sides finer at what was asked and at its mirror images: only one
/// of them is in the mesh.
void refine(const Plate& plate, mesh::Mirrors mirrors, const Ask& ask, double factor, mesh::SizeRule& rule) {
  const bool at_tip = is_at_tip(ask.quantity);
  std::vector<double>& factors = at_tip ? rule.refine_tip : rule.refine;
  factors[ask.raiser] = factor;
  for (const mesh::Mirrors mirror :
       {mesh::Mirrors{true, false}, mesh::Mirrors{false, true}, mesh::Mirrors{true, true}})
    if ((mirrors.x || !mirror.x) && (mirrors.y || !mirror.y))
      factors[at_tip ? mesh::mirror_image_of_tip(plate, ask.raiser, mirror)
                     : mesh::mirror_image(plate, ask.raiser, mirror)] = factor;
}

/// Low degrees tell little where many digits are asked for, and degrees beyond
/// 8 pay only there, and for T: what a ring leaves unresolved of the near field
/// enters T over the root of its radius and falls only with the degree and with
/// more sectors, while it rises when the fan shrinks.
int first_degree(double tolerance) { return tolerance < 5e-4 ? 4 : 3; }
int last_degree(const std::vector<Ask>& asks, double tolerance) {
  const auto is_t = [](const Ask& ask) { return ask.quantity == Quantity::t_stress; };
  return tolerance < 1e-5 || std::any_of(asks.begin(), asks.end(), is_t) ? max_degree : 8;
}

/// Whether an asked number stays in doubt because the pressure of pins is not
/// known well enough, however fine the mesh.
bool is_doubtful(const DegreeSequence& sequence, const std::vector<Ask>& asks) {
  constexpr double share = 0.6;
  return std::any_of(asks.begin(), asks.end(),
                     [&](const Ask& ask) { return sequence.doubt_excess(ask) > share; });
}

/// Raises the degree until every asked number is met, refinement pays more, only
/// better known pressures help, or the budget is spent. Returns the largest excess.
double raise_degree(DegreeSequence& sequence, const std::vector<Ask>& asks, double tolerance, int refinement,
                    Clock::time_point start, std::vector<Level>& levels) {
  double worst = std::numeric_limits<double>::infinity();
  const int first = first_degree(tolerance), last = last_degree(asks, tolerance);
  // A plate with a slow tail whose mesh had to be refined: three values may agree by accident.
  const int least = refinement > 0 && sequence.has_tail() ? first + 3 : first;
  for (int degree = first; degree <= last && (worst > 1.0 || degree <= least); ++degree) {
    const std::size_t unknowns = Discretisation(sequence.model().mesh(), degree).unknowns();
    if (unknowns > most_unknowns && degree > first + 2) break;
    sequence.solve(degree);
    worst = 0.0;
    for (const Ask& ask : asks) worst = std::max(worst, sequence.excess(ask));
    Level level{refinement,          degree, sequence.model().mesh().triangles().size(), unknowns, 0.0, worst,
                seconds_since(start)};
    for (std::size_t h = 0; h < sequence.scans().back().extremes[0].size(); ++h)
      level.peak = std::max(level.peak, sequence.peak(h));
    levels.push_back(level);
    if (degree >= first + 2 && worst > 1.0 && is_doubtful(sequence, asks)) break;
  }
  return worst;
}

std::string place_of(const Ask& ask, const Plate& plate) {
  if (is_at_tip(ask.quantity)) return "tip " + mesh::tips(plate.cracks)[ask.raiser].name;
  const mesh::Raiser at = mesh::raiser(plate, ask.raiser);
  const std::string kind(word(at.kind));
  return at.name.starts_with(kind + " ") ? at.name : kind + " " + at.name;
}

/// Whether all asked numbers that miss their tolerance lie where no peak exists.
bool only_misses_where_no_peak_is(const DegreeSequence& sequence, const std::vector<Ask>& asks) {
  return std::all_of(asks.begin(), asks.end(), [&](const Ask& ask) {
    const double excess = sequence.excess(ask);
    return excess <= 1.0 || std::isinf(excess);
  });
}

/// Why the sequence does not do, for at least one asked number.
std::string reason_for(const DegreeSequence& sequence, const Plate& plate, const std::vector<Ask>& asks,
                       int refinements) {
  std::vector<double> excess;
  for (const Ask& ask : asks) excess.push_back(sequence.excess(ask));
  const auto missed = std::count_if(excess.begin(), excess.end(), [](double e) { return e > 1.0; });
  const auto worst = std::max_element(excess.begin(), excess.end());
  const Ask& ask = asks[worst - excess.begin()];
  const std::string head = fmt::format(
      "{} of {} asked numbers miss their tolerance after {} refinements and degree {}; the worst, at {}, ",
      missed, asks.size(), refinements, sequence.displacements().back().degree, place_of(ask, plate));
  if (std::isinf(*worst))
    return head + "lies at a place without a peak stress, where its edge meets another or a traction ends";
  return head + fmt::format("has a bound {:.2g} times the tolerance", *worst);
}

/// The plate's boundary, with vertices where the tractions change.
mesh::Region divided(const Problem& problem) {
  std::vector<mesh::Break> places;
  for (const Load& load : problem.loads)
    for (const mesh::Break& at : breaks(problem.plate, load)) places.push_back(at);
  return mesh::broken(mesh::trace(problem.plate), places);
}

/// What is to be said when the contact of pins was not found.
std::string contact_reason(const PinsInContact& contact) {
  return "the contact of the pins was not found: " + contact.reason +
         (contact.pins.empty() ? "; the numbers stand on a cosine pressure instead"
                               : "; the numbers stand on the last pressure tried");
}

/// A solution, and whether better known pressures of pins would mend it.
struct Attempt {
  Solution solution;
  bool is_doubtful = false;
};

/// The mesh by the rule. Where it cannot be made, sides shrink less towards the ends
/// of notches and fillets, which the bounds then count.
mesh::Mesh meshed(const mesh::Region& region, mesh::SizeRule& rule) {
  while (rule.end < rule.joint) {
    try {
      return mesh::triangulate(region, rule);
    } catch (const std::runtime_error&) {
      rule.end = std::min(4 * rule.end, rule.joint);
    }
  }
  return mesh::triangulate(region, rule);
}

/// A mesh, its model and what was solved on it.
struct Stage {
  Model model;
  DegreeSequence sequence;

  Stage(Model of, const Plate& plate, double end, const std::vector<SingularPlace>& places)
      : model(std::move(of)), sequence(model, plate, end, places) {}
};

/// Refines until the asked numbers are met, or the budget is spent, or only
/// better known pressures help, or no finer mesh can be made.
Attempt refine_until_met(const PinsInContact& contact, const std::vector<Ask>& asks, double tolerance,
                         Report extent, Clock::time_point start, std::vector<Level>& levels) {
  const Problem& problem = contact.problem;
  std::vector<UnitLoad> loads = unit_loads(problem.plate, problem.loads, problem.supports);
  const mesh::Region boundary = divided(problem);
  const std::vector<SingularPlace> places = singular_places(problem, boundary, loads);
  if (contact.doubt) loads.push_back(*contact.doubt);
  const mesh::Mirrors mirrors = usable_mirrors(problem, loads);
  const mesh::Region region = mesh::cut(boundary, mirrors);
  const std::vector<HeldEdge> held = held_edges(problem.plate, problem.supports);
  const auto stage_for = [&](mesh::SizeRule& rule) {
    return std::make_unique<Stage>(
        Model(meshed(region, rule), mirrors, problem.material, problem.plate.thickness, loads, held),
        problem.plate, rule.end, places);
  };
  mesh::SizeRule rule = first_rule(problem, asks, tolerance, places);
  std::unique_ptr<Stage> stage;
  try {
    stage = stage_for(rule);
  } catch (const std::runtime_error&) {
    // The first mesh for many digits may be too fine to be made.
    rule = first_rule(problem, asks, plain_tolerance, places);
    stage = stage_for(rule);
  }
  const auto finished = [&](bool is_settled, int refinements, const std::string& also) -> Attempt {
    const DegreeSequence& sequence = stage->sequence;
    const bool doubtful = !is_settled && is_doubtful(sequence, asks);
    Solution solution = report(problem, sequence, places, extent);
    const bool is_met = is_settled && contact.reason.empty();
    solution.status = is_met ? Solution::Status::settled : Solution::Status::not_met;
    if (!is_settled) solution.reason = reason_for(sequence, problem.plate, asks, refinements) + also;
    if (doubtful) solution.reason += "; the contact pressure of the pins is not known better";
    if (!contact.reason.empty()) solution.reason = contact_reason(contact);
    solution.pins = contact.pins;
    return {std::move(solution), doubtful};
  };
  for (int refinement = 0;; ++refinement) {
    DegreeSequence& sequence = stage->sequence;
    const bool is_settled = raise_degree(sequence, asks, tolerance, refinement, start, levels) <= 1.0;
    if (is_settled || is_doubtful(sequence, asks) || only_misses_where_no_peak_is(sequence, asks) ||
        refinement == most_refinements)
      return finished(is_settled, refinement, "");
    const double finer = std::pow(0.6, refinement + 1);
    for (const Ask& ask : asks) {
      if (!(sequence.excess(ask) > 1.0)) continue;
      if (ask.quantity == Quantity::t_stress)
        rule.tip_sectors = std::min(most_sectors, rule.tip_sectors + 4);
      else
        refine(problem.plate, mirrors, ask, finer, rule);
    }
    try {
      stage = stage_for(rule);
    } catch (const std::runtime_error& error) {
      return finished(false, refinement, fmt::format("; no finer mesh could be made: {}", error.what()));
    }
  }
}

}  // namespace

Solution settle(const Problem& problem, const std::vector<Ask>& asks, Report extent) {
  // Of a tolerance, what may go into the pressure of pins in contact, at first and at last.
  constexpr std::array contact_shares = {0.3, 0.03, 0.003};
  const auto start = Clock::now();
  require_legal(problem, asks);
  const double tolerance = least_tolerance(asks);
  std::vector<Level> levels;
  Attempt attempt;
  for (const double share : contact_shares) {
    attempt =
        refine_until_met(with_contact(problem, share * tolerance), asks, tolerance, extent, start, levels);
    if (!attempt.is_doubtful) break;
  }
  attempt.solution.levels = std::move(levels);
  attempt.solution.seconds = seconds_since(start);
  return std::move(attempt.solution);
}

}  // namespace raiser::solver
