#include "io/picture/from_result.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <functional>
#include <numbers>
#include <utility>

#include "io/picture/sampling.hpp"
#include "io/write/crack_words.hpp"
#include "io/write/layout.hpp"

namespace raiser::io {
namespace {

using mesh::Owner;
using solver::EdgeValue;
using solver::RaiserFindings;

constexpr double degree = std::numbers::pi / 180.0;

// Blanks that a line does not break at.
std::string together(const std::string& text) {
  std::string result;
  for (const char c : text) result += c == ' ' ? "\u00A0" : std::string(1, c);
  return result;
}

std::string amount(const solver::Estimate& estimate, const std::string& unit) {
  return together(with_bound(estimate) + (unit.empty() ? "" : " " + unit));
}

std::string amount(double value, const std::string& unit) { return together(brief(value) + " " + unit); }

const EdgeValue& peak_place(const RaiserFindings& found) {
  return std::abs(found.largest.stress.value) >= std::abs(found.smallest.stress.value) ? found.largest
                                                                                       : found.smallest;
}

std::string title_of(const Result& result) {
  const std::string title = plain(result.input.title);
  return title.empty() ? result.input.file.stem().string() : title;
}

std::string name_of(const Result& result, std::size_t raiser) {
  return phrase(mesh::raiser(result.input.problem.plate, raiser));
}

// The sample on the raiser's edge that lies nearest to a point.
double von_mises_near(const Result& result, std::size_t raiser, const Point& point) {
  const auto& edge = result.solution.edges.at(raiser);
  const auto nearest = std::min_element(edge.begin(), edge.end(), [&](const auto& a, const auto& b) {
    return (a.point - point).squaredNorm() < (b.point - point).squaredNorm();
  });
  return nearest == edge.end() ? 0.0 : nearest->von_mises;
}

std::string load_words(const Result& result, const solver::Load& load) {
  const std::string kind(solver::word(load.kind));
  std::string words = load.name.empty() ? kind : plain(load.name);
  if (words.find(kind) == std::string::npos) words += fmt::format(" ({})", kind);
  if (load.kind == solver::Load::Kind::pin) return words + fmt::format(" {}", amount(load.force, "N"));
  words += fmt::format(" {}", amount(load.stress, "MPa"));
  if (load.stress_to) words += fmt::format(" to {}", amount(*load.stress_to, "MPa"));
  if (load.kind == solver::Load::Kind::edge && load.along != 0.0)
    words += fmt::format(" and {} along it", amount(load.along, "MPa"));
  if (load.kind == solver::Load::Kind::face_pressure)
    words += fmt::format(" in {}", plain(mesh::label(result.input.problem.plate.cracks, load.crack)));
  if (load.kind == solver::Load::Kind::pressure) words += fmt::format(" in {}", name_of(result, load.hole));
  return words;
}

std::string loads_line(const Result& result) {
  constexpr std::size_t most = 4;
  const auto& loads = result.input.problem.loads;
  std::string line = "Loads: ";
  for (std::size_t i = 0; i < std::min(most, loads.size()); ++i)
    line += fmt::format("{}{}", i == 0 ? "" : ", ", load_words(result, loads[i]));
  if (loads.size() > most) line += fmt::format(" and {} more", loads.size() - most);
  return line;
}

void add_concentration(std::vector<std::string>& lines, const char* name,
                       const solver::Concentration& found) {
  if (found.kt)
    lines.push_back(fmt::format("{} {} on {}", name, amount(*found.kt, ""), amount(found.nominal, "MPa")));
}

std::string constants_line(const solver::HookeLaw& law) {
  if (!law.orthotropy)
    return fmt::format("E {}, ν {}", amount(law.youngs_modulus, "MPa"), brief(law.poissons_ratio));
  return fmt::format("E1 {} at {}°, E2 {}, G12 {}, ν12 {}", amount(law.youngs_modulus, "MPa"),
                     brief(law.orthotropy->angle / degree), amount(law.orthotropy->youngs_modulus_2, "MPa"),
                     amount(law.orthotropy->shear_modulus, "MPa"), brief(law.poissons_ratio));
}

std::string intensity_words(const solver::TipFindings& found) {
  return fmt::format("K_I {}, K_II {}", amount(found.k_one, ""), amount(found.k_two, "MPa √mm"));
}

std::string tip_name(const Result& result, std::size_t tip) {
  return tip_phrase(mesh::tips(result.input.problem.plate.cracks).at(tip).name);
}

const RaiserFindings* worst_raiser(const Result& result) {
  const auto& all = result.solution.combined;
  return all.raisers.empty() ? nullptr : &all.raisers[worst_first(all).front()];
}

// Where the colours end, and why there.
std::string end_of_colours(const Result& result, double top) {
  return fmt::format("the colours end near {}, {}", together(brief(top, 4) + " MPa"),
                     result.solution.combined.raisers.empty()
                         ? "exceeded on a hundredth of the area"
                         : "the largest stress on edges or on all but a hundredth of the area");
}

void add_crack_lines(std::vector<std::string>& lines, const Result& result, std::optional<double> top) {
  const auto& all = result.solution.combined;
  if (all.tips.empty()) return;
  const solver::TipFindings& worst = all.tips[worst_tips_first(all).front()];
  lines.push_back(fmt::format("{} at {}", intensity_words(worst), tip_name(result, worst.tip)));
  if (top)
    lines.push_back("The stress at a crack tip grows without limit and there is no Kt of it: " +
                    end_of_colours(result, *top));
  for (const solver::CrackOpening& opening : result.solution.openings)
    if (opening.is_closed())
      lines.push_back(
          fmt::format("The faces of {} press on each other and were solved as free: K does not hold",
                      plain(mesh::label(result.input.problem.plate.cracks, opening.crack))));
}

void add_place_lines(std::vector<std::string>& lines, const Result& result, std::optional<double> top) {
  const auto& places = result.solution.places;
  if (places.empty()) return;
  std::string line = fmt::format("{} without a peak stress: {} at ({}, {}) mm",
                                 places.size() == 1 ? "A place" : fmt::format("{} places", places.size()),
                                 places.front().what, brief(places.front().point.x(), 4),
                                 brief(places.front().point.y(), 4));
  if (places.size() > 1) line += places.size() == 2 ? " and another" : " and others";
  if (top && result.solution.combined.tips.empty()) line += "; " + end_of_colours(result, *top);
  lines.push_back(line);
}

void add_peak_lines(std::vector<std::string>& lines, const Result& result, const RaiserFindings& found) {
  lines.push_back(fmt::format("Peak edge stress {} at {}", amount(peak_place(found).stress, "MPa"),
                              name_of(result, found.raiser)));
  add_concentration(lines, "Kt gross", found.gross);
  add_concentration(lines, "Kt net", found.net);
}

std::vector<std::string> caption(const Result& result, std::optional<double> top) {
  const auto& problem = result.input.problem;
  const auto& plate = problem.plate;
  const auto& solution = result.solution;
  std::vector<std::string> lines;
  add_crack_lines(lines, result, top);
  if (const RaiserFindings* found = worst_raiser(result)) add_peak_lines(lines, result, *found);
  add_place_lines(lines, result, top);
  lines.push_back(fmt::format("Plate {} × {} × {}", brief(plate.length), brief(plate.width),
                              amount(plate.thickness, "mm")));
  lines.push_back(
      fmt::format("{}, {}", constants_line(problem.material),
                  problem.material.state == solver::PlaneState::stress ? "plane stress" : "plane strain"));
  lines.push_back(loads_line(result));
  lines.push_back(fmt::format("Displacement degree {} on {} triangles, {} unknowns", solution.degree,
                              together(count(solution.triangles)), together(count(solution.unknowns))));
  if (solution.status != solver::Solution::Status::settled)
    lines.push_back("Tolerance not met: " + plain(solution.reason));
  return lines;
}

Point total_traction(const std::vector<solver::UnitLoad>& loads, const Owner& owner, const Point& x,
                     const Point& n) {
  Point sum = Point::Zero();
  for (const solver::UnitLoad& load : loads) sum += load.traction(owner, x, n);
  return sum;
}

// Places at equal distances along a loop: the curve they lie on and its parameter.
struct Place {
  const mesh::Curve* curve;
  double t;
};
std::vector<Place> places(const mesh::Loop& loop, int wanted) {
  constexpr int pieces = 64;
  std::vector<double> reached{0.0};  // arc length at the end of each piece
  for (const mesh::Curve& curve : loop)
    for (int i = 0; i < pieces; ++i) {
      const double step = (curve.end - curve.begin) / pieces;
      reached.push_back(reached.back() +
                        curve.derivative(curve.begin + (i + 0.5) * step).norm() * std::abs(step));
    }
  std::vector<Place> result;
  for (int i = 0; i < wanted; ++i) {
    const double length = (i + 0.5) / wanted * reached.back();
    const auto end = std::upper_bound(reached.begin() + 1, reached.end() - 1, length);
    const auto piece = static_cast<std::size_t>(end - reached.begin() - 1);
    const mesh::Curve& curve = loop[piece / pieces];
    const double part = (length - reached[piece]) / (reached[piece + 1] - reached[piece]);
    const double share = (static_cast<double>(piece % pieces) + part) / pieces;
    result.push_back({&curve, curve.begin + share * (curve.end - curve.begin)});
  }
  return result;
}

void add_arrows(std::vector<LoadArrow>& arrows, const mesh::Loop& loop, int wanted,
                std::optional<double> room, const std::vector<solver::UnitLoad>& loads) {
  for (const Place& place : places(loop, wanted)) {
    const Point along =
        place.curve->derivative(place.t) * (place.curve->end > place.curve->begin ? 1.0 : -1.0);
    const Point outward = Point(along.y(), -along.x()).normalized();
    const Point at = place.curve->at(place.t);
    const Point traction = total_traction(loads, place.curve->owner, at, outward);
    if (traction.norm() > 0.0) arrows.push_back({at, outward, traction, room});
  }
}

/// The loads, with the pressure that was found for pins in contact.
std::vector<solver::UnitLoad> acting(const Result& result) {
  solver::Problem problem = result.input.problem;
  for (const solver::PinFindings& pin : result.solution.pins)
    problem.loads.at(pin.load).bearing = solver::pressures(pin.arcs);
  return solver::unit_loads(problem.plate, problem.loads, problem.supports);
}

std::vector<LoadArrow> arrows(const Result& of) {
  const solver::Problem& problem = of.input.problem;
  const auto& plate = problem.plate;
  const mesh::Region region = mesh::trace(plate);
  const std::vector<solver::UnitLoad> loads = acting(of);
  std::vector<LoadArrow> result;
  const double longer = std::max(plate.length, plate.width);
  for (const mesh::Curve& side : region.loops.front()) {
    const double length = (side.at(side.end) - side.at(side.begin)).norm();
    add_arrows(result, {side}, std::clamp(static_cast<int>(std::ceil(15 * length / longer)), 3, 9),
               std::nullopt, loads);
  }
  for (std::size_t hole = 0; hole < plate.holes.size(); ++hole)
    add_arrows(result, region.loops[1 + hole], 12,
               std::min(plate.holes[hole].length, plate.holes[hole].width) / 2, loads);
  return result;
}

std::vector<ChartLevel> nominal_levels(const RaiserFindings& found) {
  std::vector<ChartLevel> levels;
  if (found.gross.nominal != 0.0)
    levels.push_back(
        {fmt::format("nominal, gross section: {}", amount(found.gross.nominal, "MPa")), found.gross.nominal});
  if (found.net.nominal != 0.0)
    levels.push_back(
        {fmt::format("nominal, net section: {}", amount(found.net.nominal, "MPa")), found.net.nominal});
  return levels;
}

const RaiserFindings& findings(const Result& result, std::size_t raiser) {
  return result.solution.combined.raisers.at(raiser);
}

CellSource source_of(const solver::Field& field) {
  return {field.cells(), [&field](std::size_t cell, std::span<const Point> reference, PictureCell& out) {
            for (const solver::FieldValue& value : field.sample(cell, reference)) {
              out.points.push_back(value.point);
              out.values.push_back(solver::von_mises(value.stress));
            }
          }};
}

/// Where colours end in a plate whose stress has no limit somewhere: at the largest stress on the edges
/// of holes and notches, or at what only a hundredth of the area exceeds.
double colour_top(const Result& result) {
  double top = 0.0;
  for (const RaiserFindings& found : result.solution.combined.raisers)
    top = std::max(top, found.von_mises.stress.value);
  const std::vector<Point> inside = {{1.0 / 6, 1.0 / 6}, {2.0 / 3, 1.0 / 6}, {1.0 / 6, 2.0 / 3}};
  const solver::Field& field = result.solution.field;
  std::vector<std::pair<double, double>> values;  // with the area that has it
  double area = 0.0;
  for (std::size_t cell = 0; cell < field.cells(); ++cell) {
    const auto at = field.sample(cell, inside);
    const Point a = at[1].point - at[0].point, b = at[2].point - at[0].point;
    const double own = std::abs(a.x() * b.y() - a.y() * b.x());
    for (const solver::FieldValue& value : at) values.emplace_back(solver::von_mises(value.stress), own);
    area += own * static_cast<double>(at.size());
  }
  std::sort(values.begin(), values.end(), std::greater<>());
  double above = 0.0;
  for (const auto& [value, own] : values)
    if ((above += own) > 0.01 * area) return std::max(top, value);
  return top;
}

void add_tips(Picture& picture, const Result& result) {
  const auto& found = result.solution.combined;
  if (!found.tips.empty() || !result.solution.places.empty()) picture.top = colour_top(result);
  const std::vector<mesh::CrackTip> tips = mesh::tips(picture.plate.cracks);
  for (const std::size_t i : worst_tips_first(found)) {
    const solver::TipFindings& own = found.tips[i];
    picture.tips.push_back({own.tip, tips.at(own.tip).at,
                            fmt::format("{}: {}", tip_name(result, own.tip), intensity_words(own))});
  }
}

}  // namespace

Picture picture_of(const Result& result) {
  const auto& solution = result.solution;
  Picture picture;
  picture.title = title_of(result);
  picture.plate = result.input.problem.plate;
  for (mesh::Hole& hole : picture.plate.holes) hole.name = plain(hole.name);
  picture.quantity = "von Mises stress";
  picture.unit = "MPa";
  if (const RaiserFindings* worst = worst_raiser(result)) {
    const EdgeValue& peak = peak_place(*worst);
    picture.focus = worst->raiser;
    std::string label = "peak edge stress " + amount(peak.stress, "MPa");
    if (worst->gross.kt) label += ", " + together("Kt gross ") + amount(*worst->gross.kt, "");
    picture.peaks.push_back({peak.point, von_mises_near(result, worst->raiser, peak.point), label});
  }
  add_tips(picture, result);
  picture.arrows = arrows(result);
  picture.caption = caption(result, picture.top);
  picture.caution = "Linear elastic, 2D, nominal geometry; not a substitute for an independent check.";
  picture.cells = sampled(source_of(solution.field), picture);
  return picture;
}

Chart edge_chart(const Result& result, std::size_t hole) {
  const RaiserFindings& found = findings(result, hole);
  Chart chart;
  chart.title = fmt::format("{}: edge of {}", title_of(result), name_of(result, hole));
  chart.x_name = "edge angle from +x, degrees";
  chart.y_name = "stress, MPa";
  chart.x_step = 45.0;
  ChartCurve tangential{"edge stress (tangential)", {}};
  for (const solver::EdgeSample& sample : result.solution.edges.at(hole))
    tangential.points.emplace_back(sample.angle / degree, sample.tangential);
  std::sort(tangential.points.begin(), tangential.points.end(),
            [](const Point& a, const Point& b) { return a.x() < b.x(); });
  if (!tangential.points.empty()) {  // the curve closes: both ends are one point of the hole
    const Point first = tangential.points.front(), last = tangential.points.back();
    const double share = (180.0 - last.x()) / std::max(first.x() + 360.0 - last.x(), 1e-300);
    const double closing = last.y() + share * (first.y() - last.y());
    if (first.x() > -180.0) tangential.points.emplace(tangential.points.begin(), -180.0, closing);
    if (last.x() < 180.0) tangential.points.emplace_back(180.0, closing);
  }
  chart.curves.push_back(std::move(tangential));
  chart.levels = nominal_levels(found);
  for (const EdgeValue* value : {&found.largest, &found.smallest})
    chart.marks.push_back(
        {{value->angle / degree, value->stress.value},
         value->stress.value,
         amount(value->stress, "MPa") + " at " + together(fmt::format("{:.1f}°", value->angle / degree))});
  chart.note = loads_line(result);
  return chart;
}

Chart ligament_chart(const Result& result, std::size_t index) {
  const solver::Ligament& ligament = result.solution.ligaments.at(index);
  Chart chart;
  chart.title = fmt::format("{}: from {} to {}", title_of(result), plain(ligament.from), plain(ligament.to));
  chart.x_name = "distance from the edge, mm";
  chart.y_name = "stress, MPa";
  const Point run = ligament.points.back().point - ligament.points.front().point;
  const bool across = std::abs(run.y()) >= std::abs(run.x());
  ChartCurve normal{across ? "along x, normal to the section" : "along y, normal to the section", {}};
  ChartCurve equivalent{"von Mises", {}};
  for (const solver::LigamentPoint& point : ligament.points) {
    normal.points.emplace_back(point.distance, across ? point.stress.xx : point.stress.yy);
    equivalent.points.emplace_back(point.distance, solver::von_mises(point.stress));
  }
  chart.curves = {std::move(normal), std::move(equivalent)};
  chart.levels = nominal_levels(findings(result, ligament.raiser));
  chart.note = loads_line(result);
  return chart;
}

}  // namespace raiser::io
