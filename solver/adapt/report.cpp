#include "solver/adapt/report.hpp"

#include <algorithm>
#include <cmath>

#include "mesh/plate/distance.hpp"
#include "solver/extract/paths.hpp"
#include "solver/extract/section.hpp"

namespace raiser::solver {
namespace {

/// Values from the last few degrees serve the bounds along paths.
constexpr std::size_t path_degrees = 4;

template <class T>
std::vector<T> last_of(const std::vector<T>& all) {
  return {all.end() - static_cast<std::ptrdiff_t>(std::min(path_degrees, all.size())), all.end()};
}

/// What the supports put on the whole plate in one load case.
std::vector<Resultant> reactions(const Problem& problem, const Model& model,
                                 const std::vector<std::vector<Resultant>>& meshed, std::size_t load_case) {
  std::vector<Resultant> sum(problem.supports.size());
  for (const Image& image : model.images()) {
    const Eigen::VectorXd factors = model.factors(load_case, image);
    const auto mapped = mesh::mirror_image(problem.plate, image.mirror());
    for (std::size_t e = 0; e < meshed.size(); ++e) {
      const std::size_t edge = mapped ? mapped->edges[problem.supports[e].edge] : problem.supports[e].edge;
      for (std::size_t s = 0; s < sum.size(); ++s) {
        if (problem.supports[s].edge != edge) continue;
        for (Eigen::Index l = 0; l < factors.size(); ++l) {
          const Resultant& own = meshed[e][static_cast<std::size_t>(l)];
          sum[s].force += factors[l] * image.apply(own.force);
          sum[s].moment += factors[l] * own.moment * (image.flips() ? -1.0 : 1.0);
        }
      }
    }
  }
  return sum;
}

/// A support's reaction as a load on its edge, linear along it, with the same
/// resultant: what sections beside it carry follows from that alone.
Load as_load(const Plate& plate, const Support& support, const Resultant& reaction) {
  const EdgeLine line = *straight_edge(plate, support.edge);
  const Point middle = line.at(line.length / 2);
  const double moment = reaction.moment - (middle.x() * reaction.force.y() - middle.y() * reaction.force.x());
  const double area = line.length * plate.thickness;
  const double mean = reaction.force.dot(line.normal()) / area;
  const double outer = -6 * moment / (area * line.length);  // at the end of the edge, less the mean
  Load load;
  load.kind = Load::Kind::edge;
  load.name = support.name;
  load.edge = support.edge;
  load.stress = mean - outer;
  load.stress_to = mean + outer;
  load.along = reaction.force.dot(line.direction) / area;
  return load;
}

/// The loads of a case with the reactions to them: they balance.
std::vector<Load> with_reactions(const Problem& problem, std::vector<Load> loads,
                                 const std::vector<Resultant>& reaction) {
  for (std::size_t s = 0; s < reaction.size(); ++s)
    loads.push_back(as_load(problem.plate, problem.supports[s], reaction[s]));
  return loads;
}

/// Why no nominal stress stands on a section that a held edge runs past, or nothing.
std::string beside_support(const Problem& problem, const Section& section) {
  const int axis = section.direction == Section::Direction::across ? 0 : 1;
  for (const Support& support : problem.supports) {
    const EdgeLine line = *straight_edge(problem.plate, support.edge);
    const double a = line.start[axis], b = line.at(line.length)[axis];
    if (std::min(a, b) < section.station && section.station < std::max(a, b) - 1e-9 * line.length)
      return "the support '" + support.name +
             "' holds the plate along both sides of this section, so that the "
             "loads alone do not say what it carries: use the edge stress itself";
  }
  return "";
}

TipFindings tip_findings(const DegreeSequence& sequence, std::size_t load_case, std::size_t tip) {
  const TipScanner& scanner = sequence.tip_scanner();
  const Displacements& last = sequence.displacements().back();
  TipFindings result;
  result.tip = tip;
  const std::array<Estimate, 3> k = sequence.tip_value(load_case, tip);
  result.k_one = k[0];
  result.k_two = k[1];
  result.t_stress = k[2];
  const NearFields& fields = scanner.fields(tip);
  const double g = fields.energy_release(k[0].value, k[1].value);
  double off = 0.0;  // largest change of G within the bounds of K
  for (const double one : {-1.0, 1.0})
    for (const double two : {-1.0, 1.0})
      off = std::max(
          off,
          std::abs(fields.energy_release(k[0].value + one * k[0].bound, k[1].value + two * k[1].bound) - g));
  result.energy_release = {g, off};
  result.j_integral = scanner.j_integral(last, load_case, tip, 0);
  result.extension = scanner.virtual_extension(last, load_case, tip);
  for (std::size_t d = 0; d < scanner.domains(); ++d)
    result.domains.push_back(scanner.value(sequence.tip_scans().back(), load_case, tip, d));
  if (!sequence.model().material().orthotropy) result.kink_angle = kink_angle(k[0].value, k[1].value);
  return result;
}

LoadFindings findings(const Problem& problem, const DegreeSequence& sequence, std::size_t load_case,
                      const std::string& name, const std::vector<Load>& loads) {
  LoadFindings result{name, {}};
  for (std::size_t r = 0; r < mesh::raiser_count(problem.plate); ++r) {
    RaiserFindings found;
    found.raiser = r;
    found.largest = sequence.value(load_case, r, Quantity::largest_edge_stress);
    found.smallest = sequence.value(load_case, r, Quantity::smallest_edge_stress);
    found.von_mises = sequence.value(load_case, r, Quantity::von_mises);
    const bool is_tensile = std::abs(found.largest.stress.value) >= std::abs(found.smallest.stress.value);
    const Estimate& peak = is_tensile ? found.largest.stress : found.smallest.stress;
    const Nominal basis = nominal(problem.plate, loads, r);
    found.section = basis.section;
    found.gross = concentration(peak, basis.gross);
    found.net = concentration(peak, basis.net);
    if (const std::string why = beside_support(problem, found.section); !why.empty())
      found.gross = found.net = {std::nullopt, 0.0, "", why};
    result.raisers.push_back(std::move(found));
  }
  for (std::size_t t = 0; t < sequence.tip_scanner().tips(); ++t)
    result.tips.push_back(tip_findings(sequence, load_case, t));
  return result;
}

/// From where to where along x each hole and each raiser of the outline reaches.
std::vector<std::pair<double, double>> reaches(const Plate& plate) {
  std::vector<std::pair<double, double>> result;
  for (const mesh::Hole& hole : plate.holes) {
    const double half = mesh::half_extent(hole, {1.0, 0.0});
    result.emplace_back(hole.centre.x() - half, hole.centre.x() + half);
  }
  if (!plate.outline) return result;
  for (const mesh::Curve& curve : plate.outline->curves) {
    if (curve.owner.kind != Owner::Kind::raiser) continue;
    std::vector<double> stops = mesh::extremes(curve, 0);
    stops.insert(stops.end(), {curve.begin, curve.end});
    std::vector<double> x;
    for (const double t : stops) x.push_back(curve.at(t).x());
    result.emplace_back(*std::min_element(x.begin(), x.end()), *std::max_element(x.begin(), x.end()));
  }
  return result;
}

/// The section farthest from every raiser and both ends.
double far_station(const Plate& plate) {
  std::vector<std::pair<double, double>> taken = reaches(plate);
  for (const mesh::Crack& crack : plate.cracks) {
    const auto [low, high] =
        std::minmax_element(crack.points.begin(), crack.points.end(),
                            [](const Point& a, const Point& b) { return a.x() < b.x(); });
    taken.emplace_back(low->x(), high->x());
  }
  std::sort(taken.begin(), taken.end());
  double best = 0.0;
  double room = -1.0;
  double from = -plate.length / 2;
  taken.emplace_back(plate.length / 2, plate.length / 2);
  for (const auto& [begin, end] : taken) {
    // The ends are loaded as the far field is: stay near them rather than near a raiser.
    const bool at_start = from == -plate.length / 2;
    const bool at_end = begin == plate.length / 2;
    const double share = at_start == at_end ? 0.5 : (at_start ? 0.25 : 0.75);
    if (begin - from > room) {
      room = begin - from;
      best = from + share * room;
    }
    from = std::max(from, end);
  }
  return best;
}

/// The largest von Mises stress on the plate's own edges, so that a stress
/// above those on the raisers does not go unsaid. Where it grows without limit,
/// there is none.
void check_outer_edges(const Model& model, const Displacements& displacements,
                       const std::vector<SingularPlace>& places, PlateChecks& checks) {
  const EdgeProbe probe(model, displacements.degree, search_points(),
                        sides_at_search_points(displacements.degree));
  for (const mesh::BoundarySide& side : model.mesh().boundary()) {
    const auto holds = [&](const HeldEdge& edge) { return edge.owner == side.curve.owner; };
    const bool is_held = std::any_of(model.held().begin(), model.held().end(), holds);
    if (side.curve.owner.kind != Owner::Kind::edge || is_held) continue;  // no traction is known there
    const SideStress stress = probe.at(side, displacements);
    for (const Image& image : model.images()) {
      const Eigen::VectorXd weight = model.factors(0, image);
      for (Eigen::Index q = 0; q < stress.tangential.rows(); ++q) {
        const double tangential = stress.tangential.row(q).dot(weight);
        const double normal = stress.normal.row(q).dot(weight);
        const double size = von_mises({tangential, normal, stress.shear.row(q).dot(weight),
                                       model.material().through_thickness(tangential, normal)});
        if (size <= checks.outer_von_mises) continue;
        const Point at = image.apply(side.curve.at(side.parameter(search_points()[q])));
        if (is_near_growth(places, at)) continue;
        checks.outer_von_mises = size;
        checks.outer_point = at;
      }
    }
  }
}

void check_far_field(const Problem& problem, const std::vector<Load>& loads, Solution& solution) {
  PlateChecks& checks = solution.checks;
  checks.far_station = far_station(problem.plate);
  const SectionForces forces =
      section_forces(problem.plate, loads, mesh::Direction::across, checks.far_station);
  const auto shape =
      mesh::shape_of(mesh::gross_along(problem.plate, mesh::Direction::across, checks.far_station));
  const double thickness = problem.plate.thickness;
  checks.far_applied = forces.normal / (shape.length * thickness);
  const double slope = forces.moment / (shape.inertia * thickness);
  const double bending = slope * std::max(shape.high - shape.centroid, shape.centroid - shape.low);
  const FarStress far =
      far_stress(problem.plate, solution.field, checks.far_station, checks.far_applied, slope);
  checks.far_recovered = far.mean;
  double largest = std::max({std::abs(checks.far_applied), std::abs(bending)});
  for (const RaiserFindings& found : solution.combined.raisers)
    largest = std::max(largest, found.gross.nominal);
  checks.far_scatter = largest > 0 ? far.scatter / largest : 0.0;
}

/// What loads and reactions leave over, as a part of the largest force among them.
double support_miss(const Problem& problem, const std::vector<Resultant>& reaction) {
  const double arm = 0.5 * std::max(problem.plate.length, problem.plate.width);
  Eigen::Vector3d sum = Eigen::Vector3d::Zero();
  double size = 0.0;
  const auto add = [&](const Resultant& part) {
    const Eigen::Vector3d own(part.force.x(), part.force.y(), part.moment / arm);
    sum += own;
    size = std::max(size, own.norm());
  };
  for (const Load& load : problem.loads) add(resultant(problem.plate, load));
  for (const Resultant& part : reaction) add(part);
  return size > 0 ? sum.norm() / size : 0.0;
}

}  // namespace

Solution report(const Problem& problem, const DegreeSequence& sequence,
                const std::vector<SingularPlace>& places, Report extent) {
  const Model& model = sequence.model();
  const Displacements& last = sequence.displacements().back();
  Solution solution;
  const auto meshed = model.reactions(last);
  const std::vector<Resultant> reaction = reactions(problem, model, meshed, 0);
  const std::vector<Load> all = with_reactions(problem, problem.loads, reaction);
  solution.combined = findings(problem, sequence, 0, "all loads", all);
  for (std::size_t i = 0; i < problem.loads.size(); ++i) solution.combined.loads.push_back(i);
  for (std::size_t s = 0; s < reaction.size(); ++s) solution.reactions.push_back({s, reaction[s]});
  solution.checks.support_miss = support_miss(problem, reaction);
  solution.degree = last.degree;
  solution.unknowns = static_cast<std::size_t>(Discretisation(model.mesh(), last.degree).unknowns());
  solution.triangles = model.mesh().triangles().size();
  solution.mirrors_used = model.mirrors();
  solution.openings = crack_openings(model, problem.plate, last);
  if (extent == Report::brief) return solution;

  const bool is_alone = model.loads().size() == 1;
  for (std::size_t l = 0; l < model.loads().size(); ++l) {
    const UnitLoad& unit = model.loads()[l];
    if (unit.doubt) continue;
    if (is_alone) {  // what all loads do it does
      solution.units.push_back(solution.combined);
      solution.units.back().name = unit.name;
      solution.units.back().loads = unit.loads;
      continue;
    }
    std::vector<Load> own;
    for (const std::size_t i : unit.loads) own.push_back(problem.loads[i]);
    own = with_reactions(problem, std::move(own), reactions(problem, model, meshed, l + 1));
    solution.units.push_back(findings(problem, sequence, l + 1, unit.name, own));
    solution.units.back().loads = unit.loads;
  }
  solution.edges = edge_samples(model, problem.plate, sequence.scanner(), last_of(sequence.scans()),
                                sequence.convergence());

  std::vector<Field> fields;
  for (const Displacements& level : last_of(sequence.displacements())) fields.emplace_back(model, level);
  std::vector<Section> sections;
  for (const RaiserFindings& found : solution.combined.raisers) sections.push_back(found.section);
  solution.ligaments = ligaments(problem.plate, sections, fields, sequence.convergence(),
                                 largest_doubt(model, sequence.scans().back()));
  solution.places = place_findings(places, fields, problem.material);
  solution.field = std::move(fields.back());

  const Balance balance = model.balance(last);
  solution.checks.equilibrium_residual = balance.residual;
  solution.checks.reaction = balance.reaction;
  solution.checks.strain_energy = balance.strain_energy;
  solution.checks.external_work = balance.external_work;
  check_outer_edges(model, last, places, solution.checks);
  check_far_field(problem, all, solution);
  return solution;
}

}  // namespace raiser::solver
