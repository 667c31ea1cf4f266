#include "validation/families/question.hpp"

#include <algorithm>
#include <chrono>
#include <utility>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/sequence.hpp"
#include "solver/fe/discretisation.hpp"

namespace raiser::validation {

namespace {

using Clock = std::chrono::steady_clock;

double seconds_since(Clock::time_point start) {
  return std::chrono::duration<double>(Clock::now() - start).count();
}

/// Raises the degree until the bound of the quantity meets the tolerance.
bool raise_degree(solver::DegreeSequence& sequence, const solver::Ask& ask) {
  for (int degree = 4; degree <= solver::max_degree; ++degree) {
    sequence.solve(degree);
    if (degree > 5 && sequence.excess(ask) <= 1.0) return true;
  }
  return false;
}

}  // namespace

mesh::Hole circle(double diameter, const Point& centre) {
  return {"hole", mesh::HoleShape::circle, diameter, diameter, 0.0, centre, 0.0};
}

mesh::Hole sized_hole(mesh::HoleShape shape, double along_x, double along_y, double corner_radius) {
  const bool is_slot_across = shape == mesh::HoleShape::slot && along_y > along_x;
  if (is_slot_across) return {"hole", shape, along_y, along_x, 0.0, Point::Zero(), std::acos(0.0)};
  return {"hole", shape, along_x, along_y, corner_radius, Point::Zero(), 0.0};
}

solver::Load unit_load(solver::Load::Kind kind) {
  solver::Load load;
  load.kind = kind;
  load.name = solver::word(kind);
  load.stress = unit_stress;
  return load;
}

solver::Problem plate_under(double length, double width, std::vector<mesh::Hole> holes,
                            const std::vector<solver::Load::Kind>& loads) {
  solver::Problem problem{{length, width, 1.0, std::move(holes)}, family_material, {}};
  for (const auto kind : loads) problem.loads.push_back(unit_load(kind));
  return problem;
}

namespace {

Question asking(solver::Problem problem, const solver::Ask& asked, Measure measure, double model) {
  return [problem = std::move(problem), asked, measure = std::move(measure), model](double tolerance) {
    solver::Ask ask = asked;
    ask.tolerance = tolerance;
    const solver::Solution solution = solver::settle(problem, {ask});
    Ours ours;
    ours.value = measure(solution);
    ours.model = model;
    ours.is_settled = solution.status == solver::Solution::Status::settled;
    ours.reason = solution.reason;
    ours.degree = solution.degree;
    ours.unknowns = solution.unknowns;
    ours.seconds = solution.seconds;
    if (!ours.value) ours.reason = "the solution does not hold the place that is asked for";
    return ours;
  };
}

}  // namespace

Question settled(solver::Problem problem, Measure measure, double model, std::size_t hole) {
  return asking(std::move(problem), {solver::Quantity::largest_edge_stress, hole, 1.0, ""},
                std::move(measure), model);
}

Question settled_tip(solver::Problem problem, Measure measure, double model, solver::Quantity quantity,
                     std::size_t tip) {
  return asking(std::move(problem), {quantity, tip, 1.0, ""}, std::move(measure), model);
}

Question no_finer_than(double least, Question question) {
  return [least, question = std::move(question)](double tolerance) {
    return question(std::max(least, tolerance));
  };
}

Measure k_one_over(double nominal, std::size_t tip) {
  return [=](const solver::Solution& solution) -> std::optional<solver::Estimate> {
    return solution.combined.tips.at(tip).k_one.scaled(1 / nominal);
  };
}

Measure k_two_size_over(double nominal, std::size_t tip) {
  return [=](const solver::Solution& solution) -> std::optional<solver::Estimate> {
    const solver::Estimate k = solution.combined.tips.at(tip).k_two;
    return k.scaled((k.value < 0 ? -1 : 1) / nominal);
  };
}

Measure t_over(double nominal, std::size_t tip) {
  return [=](const solver::Solution& solution) -> std::optional<solver::Estimate> {
    return solution.combined.tips.at(tip).t_stress.scaled(1 / nominal);
  };
}

Measure largest_over(double nominal, std::size_t hole) {
  return [nominal, hole](const solver::Solution& solution) -> std::optional<solver::Estimate> {
    return solution.combined.raisers.at(hole).largest.stress.scaled(1 / nominal);
  };
}

Measure stress_at(const Point& point, double nominal, std::size_t hole) {
  return [point, nominal, hole](const solver::Solution& solution) -> std::optional<solver::Estimate> {
    for (const solver::EdgeSample& sample : solution.edges.at(hole)) {
      if ((sample.point - point).norm() > 1e-9 * point.norm()) continue;
      return solver::Estimate{sample.tangential, sample.bound}.scaled(1 / nominal);
    }
    for (const solver::Ligament& ligament : solution.ligaments) {
      const bool is_there = ligament.raiser == hole && !ligament.points.empty() &&
                            (ligament.points.front().point - point).norm() <= 1e-9 * point.norm();
      if (!is_there) continue;
      const solver::LigamentPoint& end = ligament.points.front();
      const auto direction = solution.combined.raisers.at(hole).section.direction;
      const double stress = direction == mesh::Direction::across ? end.stress.xx : end.stress.yy;
      return solver::Estimate{stress, end.bound}.scaled(1 / nominal);
    }
    return std::nullopt;
  };
}

namespace {

solver::Estimate asked_value(const solver::DegreeSequence& sequence, const solver::Ask& ask) {
  if (!solver::is_at_tip(ask.quantity)) return sequence.value(0, ask.raiser, ask.quantity).stress;
  return sequence.tip_value(0, ask.raiser)[ask.quantity == solver::Quantity::t_stress ? 2 : 0];
}

}  // namespace

Ours with_rising_degree(const solver::Model& model, const mesh::Plate& plate, const solver::Ask& ask,
                        double nominal) {
  const auto start = Clock::now();
  solver::DegreeSequence sequence(model, plate);
  Ours ours;
  ours.is_settled = raise_degree(sequence, ask);
  if (!ours.is_settled) ours.reason = "the highest degree does not meet the tolerance";
  ours.value = asked_value(sequence, ask).scaled(1 / nominal);
  ours.degree = sequence.displacements().back().degree;
  ours.unknowns = static_cast<std::size_t>(sequence.displacements().back().values.rows());
  ours.seconds = seconds_since(start);
  return ours;
}

Question exact_field(mesh::Plate plate, StressField field, solver::Quantity quantity, double nominal,
                     const solver::HookeLaw& material, std::size_t raiser) {
  return [plate = std::move(plate), field = std::move(field), quantity, nominal, material,
          raiser](double tolerance) {
    mesh::SizeRule rule;
    // The field of a stiff sheet varies faster along the edge.
    rule.turn = material.orthotropy ? 0.04 : 0.2;
    rule.growth = 0.7;
    const solver::Model model(mesh::triangulate(mesh::trace(plate), rule), {}, material, plate.thickness,
                              {{"exact", traction_of(field)}});
    return with_rising_degree(model, plate, {quantity, raiser, tolerance, ""}, nominal);
  };
}

}  // namespace raiser::validation
