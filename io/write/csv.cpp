#include "io/write/csv.hpp"

#include <fmt/format.h>

#include <cmath>
#include <initializer_list>
#include <numbers>
#include <optional>
#include <string_view>

#include "io/write/crack_words.hpp"
#include "solver/crack/factors.hpp"

namespace raiser::io {
namespace {

std::string cell(std::string_view text) {
  if (text.find_first_of(",\"\r\n") == std::string_view::npos) return std::string(text);
  std::string quoted = "\"";
  for (const char c : text) quoted.append(c == '"' ? 2 : 1, c);
  return quoted + "\"";
}

// The shortest text that reads back as the same number.
std::string cell(double value) {
  if (!std::isfinite(value)) return "";
  return fmt::format("{}", value == 0.0 ? 0.0 : value);
}

std::string line(std::initializer_list<std::string> cells) {
  std::string text;
  for (const std::string& c : cells) {
    if (&c != cells.begin()) text += ',';
    text += c;
  }
  return text + "\n";
}

double degrees(double angle) { return angle * 180.0 / std::numbers::pi; }

std::string name_of(const Case& input, std::size_t raiser) {
  return mesh::raiser(input.problem.plate, raiser).name;
}

std::string stress_cells(const solver::EdgeValue& value) {
  std::string text = line({cell(value.stress.value), cell(value.stress.bound), cell(value.point.x()),
                           cell(value.point.y()), cell(degrees(value.angle))});
  text.pop_back();
  return text;
}

std::string kt_cells(const solver::Concentration& kt) {
  const std::string numbers = kt.kt ? cell(kt.kt->value) + "," + cell(kt.kt->bound) : ",";
  return numbers + "," + cell(kt.nominal) + "," + cell(kt.definition);
}

std::string estimate_cells(const solver::Estimate& estimate) {
  return cell(estimate.value) + "," + cell(estimate.bound);
}

std::string factor_cells(const std::optional<solver::Estimate>& factor) {
  return factor ? estimate_cells(*factor) : ",";
}

constexpr std::string_view tip_columns =
    "K_I_MPa_sqrt_mm,K_I_bound_MPa_sqrt_mm,K_II_MPa_sqrt_mm,K_II_bound_MPa_sqrt_mm,T_MPa,T_bound_MPa,"
    "G_N_per_mm,G_bound_N_per_mm";
constexpr std::size_t tip_column_count = 8;

std::string tip_cells(const solver::TipFindings& found) {
  return estimate_cells(found.k_one) + "," + estimate_cells(found.k_two) + "," +
         estimate_cells(found.t_stress) + "," + estimate_cells(found.energy_release);
}

std::string tip_line(const Result& result, const solver::LoadFindings& load,
                     const solver::TipFindings& found) {
  const mesh::Plate& plate = result.input.problem.plate;
  const mesh::CrackTip tip = mesh::tips(plate.cracks).at(found.tip);
  const Kink turn = kink(result.input, found);
  const solver::CrackFactors factors = solver::crack_factors(plate, loads_of(result.input, load), found);
  return line({cell(load.name), cell(tip.name), cell(plate.cracks[tip.crack].name), cell(tip.at.x()),
               cell(tip.at.y()), cell(degrees(std::atan2(tip.direction.y(), tip.direction.x()))),
               tip_cells(found), cell(found.j_integral), cell(found.extension), factor_cells(turn.angle),
               factor_cells(factors.mode_one), factor_cells(factors.mode_two), cell(factors.nominal),
               cell(factors.definition), cell(factors.size)});
}

std::string case_cells(const Outcome& outcome) {
  return cell(outcome.case_file) + "," + cell(outcome.title) + "," + cell(outcome.status) + "," +
         std::to_string(outcome.exit_code) + "," + cell(outcome.message) + "," + cell(outcome.seconds);
}

}  // namespace

std::string edge_csv(const Case& input, const solver::Solution& solution) {
  std::string text =
      "raiser,angle_deg,x_mm,y_mm,arc_length_mm,tangential_stress_MPa,bound_MPa,von_mises_stress_MPa\n";
  for (std::size_t raiser = 0; raiser < solution.edges.size(); ++raiser) {
    const std::string name = cell(name_of(input, raiser));
    for (const solver::EdgeSample& at : solution.edges[raiser]) {
      text += line({name, cell(degrees(at.angle)), cell(at.point.x()), cell(at.point.y()),
                    cell(at.arc_length), cell(at.tangential), cell(at.bound), cell(at.von_mises)});
    }
  }
  return text;
}

std::string ligament_csv(const Case& input, const solver::Solution& solution) {
  std::string text =
      "raiser,from,to,ligament_width_mm,distance_mm,x_mm,y_mm,stress_xx_MPa,stress_yy_MPa,stress_xy_MPa,"
      "stress_zz_MPa,bound_MPa\n";
  for (const solver::Ligament& ligament : solution.ligaments) {
    const std::string name = cell(name_of(input, ligament.raiser));
    const std::string from = cell(ligament.from), to = cell(ligament.to), width = cell(ligament.width);
    for (const solver::LigamentPoint& at : ligament.points) {
      text += line({name, from, to, width, cell(at.distance), cell(at.point.x()), cell(at.point.y()),
                    cell(at.stress.xx), cell(at.stress.yy), cell(at.stress.xy), cell(at.stress.zz),
                    cell(at.bound)});
    }
  }
  return text;
}

std::string tips_csv(const Result& result) {
  std::string text = fmt::format(
      "load,tip,crack,x_mm,y_mm,direction_deg,{},J_N_per_mm,virtual_extension_N_per_mm,kink_deg,kink_bound_"
      "deg,"
      "Y_I,Y_I_bound,Y_II,Y_II_bound,nominal_stress_MPa,nominal_stress_definition,a_mm\n",
      tip_columns);
  const auto add = [&](const solver::LoadFindings& load) {
    for (const solver::TipFindings& found : load.tips) text += tip_line(result, load, found);
  };
  add(result.solution.combined);
  for (const solver::LoadFindings& unit : result.solution.units) add(unit);
  return text;
}

std::string summary_csv(const std::vector<Outcome>& outcomes) {
  std::string text = "case,title,status,exit_code,message,seconds,raiser";
  for (const std::string_view name :
       {"largest_edge_stress", "smallest_edge_stress", "largest_von_mises_stress"}) {
    text += fmt::format(",{0}_MPa,{0}_bound_MPa,{0}_x_mm,{0}_y_mm,{0}_angle_deg", name);
  }
  for (const std::string_view name : {"kt_gross", "kt_net"}) {
    text += fmt::format(",{0},{0}_bound,{0}_nominal_stress_MPa,{0}_definition", name);
  }
  text += fmt::format(",tip,{}\n", tip_columns);
  constexpr std::size_t raiser_columns = 1 + 3 * 5 + 2 * 4;
  for (const Outcome& outcome : outcomes) {
    const std::string head = case_cells(outcome);
    if (outcome.raisers.empty() && outcome.tips.empty())
      text += head + std::string(raiser_columns + 1 + tip_column_count, ',') + "\n";
    for (std::size_t i = 0; i < outcome.raisers.size(); ++i) {
      const solver::RaiserFindings& found = outcome.raisers[i];
      text += line({head, cell(outcome.raiser_names[i]), stress_cells(found.largest),
                    stress_cells(found.smallest), stress_cells(found.von_mises), kt_cells(found.gross),
                    kt_cells(found.net), std::string(tip_column_count, ',')});
    }
    for (std::size_t i = 0; i < outcome.tips.size(); ++i)
      text += head + std::string(raiser_columns, ',') + "," + cell(outcome.tip_names[i]) + "," +
              tip_cells(outcome.tips[i]) + "\n";
  }
  return text;
}

}  // namespace raiser::io
