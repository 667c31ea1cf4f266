#include "io/write/csv.hpp"

#include <fmt/format.h>

#include <cmath>
#include <initializer_list>
#include <numbers>
#include <optional>
#include <string_view>

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

std::string summary_csv(const std::vector<Outcome>& outcomes) {
  std::string text = "case,title,status,exit_code,message,seconds,raiser";
  for (const std::string_view name :
       {"largest_edge_stress", "smallest_edge_stress", "largest_von_mises_stress"}) {
    text += fmt::format(",{0}_MPa,{0}_bound_MPa,{0}_x_mm,{0}_y_mm,{0}_angle_deg", name);
  }
  for (const std::string_view name : {"kt_gross", "kt_net"}) {
    text += fmt::format(",{0},{0}_bound,{0}_nominal_stress_MPa,{0}_definition", name);
  }
  text += "\n";
  constexpr std::size_t raiser_columns = 1 + 3 * 5 + 2 * 4;
  for (const Outcome& outcome : outcomes) {
    const std::string head = case_cells(outcome);
    if (outcome.raisers.empty()) text += head + std::string(raiser_columns, ',') + "\n";
    for (std::size_t i = 0; i < outcome.raisers.size(); ++i) {
      const solver::RaiserFindings& found = outcome.raisers[i];
      text += line({head, cell(outcome.raiser_names[i]), stress_cells(found.largest),
                    stress_cells(found.smallest), stress_cells(found.von_mises), kt_cells(found.gross),
                    kt_cells(found.net)});
    }
  }
  return text;
}

}  // namespace raiser::io
