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

/// The loads behind each unit load: one each, or all edge loads together.
std::vector<std::vector<Load>> loads_of_units(const std::vector<Load>& loads,
                                              const std::vector<UnitLoad>& units) {
  std::vector<Load> edges;
  std::vector<std::vector<Load>> single;
  for (const Load& load : loads)
    if (load.kind == Load::Kind::edge)
      edges.push_back(load);
    else
      single.push_back({load});
  std::vector<std::vector<Load>> result;
  std::size_t next = 0;
  for (const UnitLoad& unit : units)
    result.push_back(!edges.empty() && unit.name == "edges" ? edges : single[next++]);
  return result;
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
    if (side.curve.owner.kind != Owner::Kind::edge) continue;
    const SideStress stress = probe.at(side, displacements);
    for (const Image& image : model.images()) {
      Eigen::VectorXd weight(static_cast<Eigen::Index>(model.loads().size()));
      for (std::size_t l = 0; l < model.loads().size(); ++l) weight[l] = model.parity(l, image);
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

void check_far_field(const Problem& problem, Solution& solution) {
  PlateChecks& checks = solution.checks;
  checks.far_station = far_station(problem.plate);
  const SectionForces forces =
      section_forces(problem.plate, problem.loads, mesh::Direction::across, checks.far_station);
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

}  // namespace

Solution report(const Problem& problem, const DegreeSequence& sequence,
                const std::vector<SingularPlace>& places, Report extent) {
  const Model& model = sequence.model();
  const Displacements& last = sequence.displacements().back();
  Solution solution;
  solution.combined = findings(problem, sequence, 0, "all loads", problem.loads);
  solution.degree = last.degree;
  solution.unknowns = static_cast<std::size_t>(Discretisation(model.mesh(), last.degree).unknowns());
  solution.triangles = model.mesh().triangles().size();
  solution.mirrors_used = model.mirrors();
  solution.openings = crack_openings(model, problem.plate, last);
  if (extent == Report::brief) return solution;

  const auto groups = loads_of_units(problem.loads, model.loads());
  for (std::size_t l = 0; l < model.loads().size(); ++l)
    solution.units.push_back(findings(problem, sequence, l + 1, model.loads()[l].name, groups[l]));
  solution.edges = edge_samples(model, problem.plate, sequence.scanner(), last_of(sequence.scans()));

  std::vector<Field> fields;
  for (const Displacements& level : last_of(sequence.displacements())) fields.emplace_back(model, level);
  std::vector<Section> sections;
  for (const RaiserFindings& found : solution.combined.raisers) sections.push_back(found.section);
  solution.ligaments = ligaments(problem.plate, sections, fields);
  solution.places = place_findings(places, fields, problem.material);
  solution.field = std::move(fields.back());

  const Balance balance = model.balance(last);
  solution.checks.equilibrium_residual = balance.residual;
  solution.checks.reaction = balance.reaction;
  solution.checks.strain_energy = balance.strain_energy;
  solution.checks.external_work = balance.external_work;
  check_outer_edges(model, last, places, solution.checks);
  check_far_field(problem, solution);
  return solution;
}

}  // namespace raiser::solver
