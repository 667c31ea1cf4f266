#include "io/write/table_parts.hpp"

#include <fmt/format.h>

#include <Eigen/Geometry>
#include <algorithm>
#include <cctype>
#include <cmath>
#include <limits>
#include <numbers>

#include "io/write/layout.hpp"
#include "io/write/table.hpp"

namespace raiser::io {
namespace {

constexpr std::size_t raisers_in_full = 3;

// No more decimals than the uncertainty leaves, never "-0".
std::string place_text(double value, double uncertainty) {
  const int decimals = std::clamp(static_cast<int>(std::ceil(-std::log10(uncertainty))), 0, 9);
  const double scale = std::pow(10.0, decimals);
  const double rounded = std::round(value * scale) / scale;
  return fmt::format("{:.{}f}", rounded == 0.0 ? 0.0 : rounded, decimals);
}

// How uncertain the place of a smooth extremum is, as a fraction of the radius
// of the edge there: near it the stress changes with the square of the distance.
double place_uncertainty(const solver::Estimate& stress) {
  const double relative = stress.bound / std::abs(stress.value);
  return std::isfinite(relative) ? std::clamp(std::sqrt(relative), 1e-4, 0.1) : 0.1;
}

std::string shape_text(const mesh::Hole& hole) {
  std::string text = std::string(mesh::word(hole.shape));
  if (hole.shape == mesh::HoleShape::circle) {
    text += fmt::format(", diameter {} mm", brief(hole.length));
  } else {
    text += fmt::format(", {} x {} mm", brief(hole.length), brief(hole.width));
    const bool is_drawn = hole.shape == mesh::HoleShape::drawn;
    if (hole.corner_radius > 0)
      text += fmt::format(", {} radius {} mm", is_drawn ? "smallest" : "corner", brief(hole.corner_radius));
    if (!is_drawn) text += fmt::format(", at {} deg", brief(hole.angle * 180.0 / std::numbers::pi, 4));
  }
  return text + fmt::format(", centre ({}, {}) mm", brief(hole.centre.x()), brief(hole.centre.y()));
}

std::string shape_text(const mesh::Plate& plate, std::size_t raiser) {
  return raiser < plate.holes.size() ? shape_text(plate.holes[raiser]) : mesh::raiser(plate, raiser).shape;
}

// The radius of a drawn hole's edge next to a point; where it is straight, half the
// hole's smaller size.
double drawn_radius(const mesh::Hole& hole, const mesh::Point& at) {
  double radius = 0.0;
  double least = std::numeric_limits<double>::infinity();
  for (const mesh::Curve& curve : hole.edge) {
    const mesh::Nearest found = mesh::nearest(curve, at - hole.centre);
    if (found.distance >= least) continue;
    least = found.distance;
    radius = curve.radius_of_curvature(found.parameter);
  }
  return std::min(radius, std::min(hole.length, hole.width) / 2);
}

// The radius of curvature of a raiser's edge at a point where a peak can be, mm.
double edge_radius(const mesh::Plate& plate, std::size_t raiser, const mesh::Point& at) {
  if (raiser >= plate.holes.size()) return mesh::raiser(plate, raiser).radius;
  const mesh::Hole& hole = plate.holes[raiser];
  const double a = hole.length / 2, b = hole.width / 2;
  if (hole.shape == mesh::HoleShape::rounded_rectangle) return hole.corner_radius;
  if (hole.shape == mesh::HoleShape::drawn) return drawn_radius(hole, at);
  if (hole.shape != mesh::HoleShape::ellipse) return std::min(a, b);
  const mesh::Point own = Eigen::Rotation2Dd(-hole.angle) * (at - hole.centre);
  const double sine = own.y() / b, cosine = own.x() / a;
  return std::pow(a * a * sine * sine + b * b * cosine * cosine, 1.5) / (a * b);
}

// A place in less than `width` columns, with fewer decimals where it must be.
std::string place_column(double value, double uncertainty, std::size_t width) {
  std::string text = place_text(value, uncertainty);
  while (columns(text) >= width && uncertainty < 1.0) text = place_text(value, uncertainty *= 10.0);
  return right(columns(text) < width ? text : brief(value, 3), width);
}

// A bound in less than `width` columns, rounded up where it must be.
std::string bound_column(const solver::Estimate& estimate, std::size_t width) {
  const std::string text = bound_text(estimate);
  if (columns(text) < width) return right(text, width);
  const double scale = std::pow(10.0, std::floor(std::log10(estimate.bound)));
  return right(fmt::format("{:.0e}", std::ceil(estimate.bound / scale) * scale), width);
}

std::string edge_line(std::string_view name, const solver::EdgeValue& value, const mesh::Plate& plate,
                      std::size_t raiser) {
  const double uncertain = place_uncertainty(value.stress) * edge_radius(plate, raiser, value.point);
  const double degree = 180.0 / std::numbers::pi;
  const double turn = uncertain / (value.point - mesh::raiser(plate, raiser).centre).norm();
  return fmt::format("  {}{}{}{}{}{}\n", left(name, 22), right(fitted_value(value.stress, 12), 12),
                     bound_column(value.stress, 9), place_column(value.point.x(), uncertain, 11),
                     place_column(value.point.y(), uncertain, 11),
                     place_column(value.angle * degree, turn * degree, 11));
}

std::string concentration_line(std::string_view name, const solver::Concentration& kt) {
  if (!kt.kt) return wrapped(plain(kt.why), fmt::format("  {} undefined: ", name), 13);
  return wrapped(fmt::format("on {} MPa = {}", brief(kt.nominal), plain(kt.definition)),
                 fmt::format("  {} {}  ", name, with_bound(*kt.kt)), 13);
}

// Zero for what rounding leaves of a value that vanishes beside `scale`.
double without_rounding(double value, double scale) { return std::abs(value) < 1e-11 * scale ? 0.0 : value; }

std::string section_line(const solver::Section& section, const mesh::Plate& plate) {
  const bool across = section.direction == solver::Section::Direction::across;
  const double size = std::max(plate.length, plate.width);
  const double force = std::max(
      {std::abs(section.normal_force), std::abs(section.shear_force), std::abs(section.moment) / size});
  return wrapped(
      fmt::format("gross {} mm^2, net {} mm^2; normal force {} N, shear force {} N, moment {} N mm",
                  brief(section.gross_area), brief(section.net_area),
                  brief(without_rounding(section.normal_force, force), 5),
                  brief(without_rounding(section.shear_force, force), 5),
                  brief(without_rounding(section.moment, force * size), 5)),
      fmt::format("  section {} = {} mm: ", across ? "x" : "y", brief(section.station)), 13);
}

// How many other places on the same edge the used mirror lines make of one.
std::size_t images_on_edge(const Result& result, const solver::RaiserFindings& found,
                           const solver::EdgeValue& value) {
  const mesh::Point& at = value.point;
  const solver::Problem& problem = result.input.problem;
  mesh::Mirrors even = result.solution.mirrors_used;
  for (const solver::UnitLoad& load : solver::unit_loads(problem.plate, problem.loads, problem.supports)) {
    even.x = even.x && load.under_x == solver::UnitLoad::Parity::even;
    even.y = even.y && load.under_y == solver::UnitLoad::Parity::even;
  }
  std::vector<mesh::Point> places{at};
  const double apart = 2.0 * place_uncertainty(value.stress) * edge_radius(problem.plate, found.raiser, at);
  for (const mesh::Mirrors mirror : {mesh::Mirrors{true, false}, {false, true}, {true, true}}) {
    if ((mirror.x && !even.x) || (mirror.y && !even.y)) continue;
    if (mesh::mirror_image(problem.plate, found.raiser, mirror) != found.raiser) continue;
    const mesh::Point image(mirror.x ? -at.x() : at.x(), mirror.y ? -at.y() : at.y());
    const auto same = [&](const mesh::Point& known) { return (known - image).norm() < apart; };
    if (std::none_of(places.begin(), places.end(), same)) places.push_back(image);
  }
  return places.size() - 1;
}

std::string images_line(const Result& result, const solver::RaiserFindings& found) {
  const bool upper = std::abs(found.largest.stress.value) >= std::abs(found.smallest.stress.value);
  const std::size_t images = images_on_edge(result, found, upper ? found.largest : found.smallest);
  if (images == 0) return "";
  return fmt::format("  {}the same at {} mirror image{} of this place\n",
                     left(upper ? "largest edge stress:" : "smallest edge stress:", 22), images,
                     images == 1 ? "" : "s");
}

std::string raiser_in_full(const Result& result, const solver::RaiserFindings& found) {
  const mesh::Plate& plate = result.input.problem.plate;
  const std::string name = phrase(mesh::raiser(plate, found.raiser));
  std::string text(1, '\n');
  text += wrapped(shape_text(plate, found.raiser),
                  fmt::format("{}{}: ", static_cast<char>(std::toupper(name.front())), name.substr(1)), 2);
  text += fmt::format("  {}{}{}{}{}{}\n", left("", 22), right("MPa", 12), right("± MPa", 9),
                      right("x, mm", 11), right("y, mm", 11), right("angle, deg", 11));
  text += edge_line("largest edge stress", found.largest, plate, found.raiser);
  text += edge_line("smallest edge stress", found.smallest, plate, found.raiser);
  text += edge_line("largest von Mises", found.von_mises, plate, found.raiser);
  text += images_line(result, found);
  text += concentration_line("Kt gross", found.gross);
  text += concentration_line("Kt net  ", found.net);
  return text + section_line(found.section, plate);
}

std::string kt_text(const solver::Concentration& kt) { return kt.kt ? fitted(*kt.kt, 16) : "-"; }

std::string raiser_line(const std::string& name, const solver::RaiserFindings& found) {
  return fmt::format("  {}{}{}{}{}\n", left(shortened(plain(name), 11), 12),
                     right(fitted(found.largest.stress, 17), 17),
                     right(fitted(found.smallest.stress, 17), 17), right(kt_text(found.gross), 16),
                     right(kt_text(found.net), 16));
}

std::string raiser_lines_head(std::string_view title) {
  return fmt::format("\n{}\n  {}{}{}{}{}\n", title, left("", 12), right("largest edge", 17),
                     right("smallest edge", 17), right("Kt gross", 16), right("Kt net", 16)) +
         fmt::format("  {}{}{}\n", left("", 12), right("MPa", 17), right("MPa", 17));
}

std::string comparison_lines(const validation::Comparison& line, bool name_load) {
  const std::string where = plain(line.place);
  const std::string load = name_load ? " under " + plain(line.load) : "";
  std::string text = wrapped(fmt::format("{} by {}, {} here: {}{}", brief(line.published, 5), line.solution,
                                         with_bound({line.ours, line.bound}), line.difference < 0 ? "-" : "+",
                                         percent(std::abs(line.difference))),
                             fmt::format("  {} at {}{}: ", line.quantity, where, load), 4);
  if (!line.in_range) text += wrapped(line.range_note, "    outside its range: ", 4);
  if (line.in_range && !line.range_note.empty()) text += wrapped(line.range_note, "    ", 4);
  text += wrapped(line.source, "    ", 4);
  if (line.accuracy.empty() && !line.from_memory) return text;
  const std::string memory = line.from_memory ? " (figures from memory)" : "";
  return text + wrapped(line.accuracy + memory, "    accuracy: ", 4);
}

}  // namespace

std::string raisers_part(const Result& result, const std::string& rest) {
  const auto& raisers = result.solution.combined.raisers;
  const mesh::Plate& plate = result.input.problem.plate;
  const std::string_view others = plate.outline ? "raisers" : "holes";
  const std::vector<std::size_t> order = worst_first(result.solution.combined);
  const std::size_t full = raisers.size() <= raisers_in_full ? raisers.size() : 1;
  std::string text;
  for (std::size_t i = 0; i < full; ++i) text += raiser_in_full(result, raisers[order[i]]);
  if (full == raisers.size()) return text;
  const std::size_t shown = std::min(raisers.size(), table_holes);
  text += raiser_lines_head(fmt::format("The other {}, worst first", others));
  for (std::size_t i = full; i < shown; ++i)
    text += raiser_line(mesh::raiser(plate, raisers[order[i]].raiser).name, raisers[order[i]]);
  if (shown < raisers.size()) {
    const std::string where = rest.empty() ? "" : ": see " + rest;
    text += wrapped(
        fmt::format("and {} more {}, none of them worse{}", count(raisers.size() - shown), others, where),
        "  ", 2);
  }
  return text;
}

std::string loads_part(const Result& result) {
  const auto& units = result.solution.units;
  const auto& combined = result.solution.combined;
  if (units.size() < 2 || combined.raisers.empty()) return "";
  constexpr std::size_t most = 12;
  const std::size_t worst = combined.raisers[worst_first(combined).front()].raiser;
  std::string text;
  for (std::size_t i = 0; i < std::min(units.size(), most); ++i) {
    const auto& raisers = units[i].raisers;
    const auto at = std::find_if(raisers.begin(), raisers.end(),
                                 [&](const auto& found) { return found.raiser == worst; });
    if (at != raisers.end()) text += raiser_line(units[i].name, *at);
  }
  if (units.size() > most) text += fmt::format("  and {} more loads\n", count(units.size() - most));
  const std::string place = phrase(mesh::raiser(result.input.problem.plate, worst));
  return raiser_lines_head(fmt::format("Each load by itself, at {}", place)) + text;
}

std::string published_part(const Result& result, const std::string& rest) {
  constexpr std::size_t most = 6;
  if (result.published.empty()) return "";
  std::string text = "\nPublished values beside these\n";
  const std::size_t shown = std::min(result.published.size(), most);
  for (std::size_t i = 0; i < shown; ++i) {
    text += comparison_lines(result.published[i], result.solution.units.size() > 1);
  }
  if (shown == result.published.size()) return text;
  const std::string where = rest.empty() ? "" : ": see " + rest;
  return text + wrapped(fmt::format("and {} more{}", count(result.published.size() - shown), where), "  ", 2);
}

std::string holding_part(const Result& result) {
  const solver::Problem& problem = result.input.problem;
  constexpr double degree = std::numbers::pi / 180;
  std::string text;
  if (!result.solution.pins.empty()) text += "\nContact of pins\n";
  for (const solver::PinFindings& pin : result.solution.pins) {
    std::string where;
    for (const solver::ContactArc& arc : pin.arcs)
      where += fmt::format(
          "touches {}, largest pressure {} MPa at {} deg; ",
          arc.all_round ? "all round"
                        : fmt::format("from {} deg to {} deg", with_bound(arc.begin.scaled(1 / degree)),
                                      with_bound(arc.end.scaled(1 / degree))),
          with_bound(arc.largest), brief(arc.largest_at / degree, 4));
    text +=
        wrapped(fmt::format("{}: {}resultant within {} of the force", plain(problem.loads.at(pin.load).name),
                            where, brief(std::max(pin.force_miss, 1e-15), 2)),
                "  ", 4);
  }
  if (!result.solution.reactions.empty()) text += "\nReactions of supports\n";
  const double size = std::max(problem.plate.length, problem.plate.width);
  double force = 0.0;
  for (const solver::SupportReaction& at : result.solution.reactions)
    force = std::max({force, at.reaction.force.norm(), std::abs(at.reaction.moment) / size});
  for (const solver::SupportReaction& at : result.solution.reactions)
    text += wrapped(fmt::format("{}: force ({}, {}) N, moment {} N mm about the plate's centre",
                                plain(problem.supports.at(at.support).name),
                                brief(without_rounding(at.reaction.force.x(), force), 6),
                                brief(without_rounding(at.reaction.force.y(), force), 6),
                                brief(without_rounding(at.reaction.moment, force * size), 6)),
                    "  ", 4);
  if (!result.solution.reactions.empty())
    text += wrapped(fmt::format("loads and reactions balance within {}; stress has no limit at the ends of a "
                                "clamped edge: no peak is given there",
                                brief(result.solution.checks.support_miss, 2)),
                    "  ", 4);
  return text;
}

std::string checks_part(const Result& result) {
  const solver::Solution& solution = result.solution;
  const solver::PlateChecks& checks = solution.checks;
  // A mean stress that vanishes leaves rounding behind, which is no finding.
  double largest = 0.0;
  for (const solver::RaiserFindings& found : solution.combined.raisers)
    largest = std::max(largest, found.gross.nominal);
  const double recovered = std::abs(checks.far_recovered) < 1e-12 * largest ? 0.0 : checks.far_recovered;
  std::string text = "\nChecks\n";
  text += wrapped(
      fmt::format("mean stress at x = {} mm: {} MPa from the loads, {} MPa recovered; departure from the "
                  "nominal distribution {}",
                  brief(checks.far_station, 4), brief(without_rounding(checks.far_applied, largest)),
                  brief(recovered), percent(checks.far_scatter)),
      "  ", 4);
  double on_raisers = 0.0;
  for (const solver::RaiserFindings& found : solution.combined.raisers)
    on_raisers = std::max(on_raisers, found.von_mises.stress.value);
  if (checks.outer_von_mises > on_raisers)
    text += wrapped(
        fmt::format(
            "ATTENTION: the plate's own edge carries more than any {}: von Mises {} MPa at ({}, {}) mm "
            "(no bound)",
            result.input.problem.plate.outline ? "raiser" : "hole", brief(checks.outer_von_mises, 4),
            brief(checks.outer_point.x(), 5), brief(checks.outer_point.y(), 5)),
        "  ", 4);
  text += wrapped(fmt::format("equilibrium residual {}, reactions {} of the applied force",
                              brief(checks.equilibrium_residual, 2), brief(checks.reaction, 2)),
                  "  ", 4);
  text += wrapped(fmt::format("strain energy {} N mm, work of the loads {} N mm",
                              brief(checks.strain_energy, 8), brief(checks.external_work, 8)),
                  "  ", 4);
  text += wrapped(fmt::format("degree {}, {} triangles over {}, {} unknowns, {} levels, {} s",
                              solution.degree, count(solution.triangles), solved_part(solution.mirrors_used),
                              count(solution.unknowns), solution.levels.size(), brief(solution.seconds, 2)),
                  "  ", 4);
  return text;
}

}  // namespace raiser::io
