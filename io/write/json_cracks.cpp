#include <cmath>

#include "io/write/crack_words.hpp"
#include "io/write/json_parts.hpp"
#include "solver/crack/factors.hpp"

namespace raiser::io::json_part {
namespace {

Json energies(const solver::TipFindings& found) {
  const double g = found.energy_release.value;
  const auto beside = [&](double value) {
    Json object = quantity(value, "N/mm");
    const auto off = relative_difference(value, g);
    object["relative_difference"] = off ? Json(*off) : Json(nullptr);
    return object;
  };
  Json domains = Json::array();
  for (const Eigen::Vector3d& domain : found.domains)
    domains.push_back({{"K_I", domain[0]}, {"K_II", domain[1]}, {"T", domain[2]}});
  return {{"j_integral", beside(found.j_integral)},
          {"virtual_extension", beside(found.extension)},
          {"domains", domains}};
}

Json factors(const solver::CrackFactors& own) {
  const auto factor = [&](const std::optional<solver::Estimate>& y) {
    return y ? quantity(*y, "1") : without_value("1", own.why);
  };
  return {{"Y_I", factor(own.mode_one)},
          {"Y_II", factor(own.mode_two)},
          {"nominal_stress", quantity(own.nominal, "MPa")},
          {"definition", own.definition},
          {"a", quantity(own.size, "mm")},
          {"a_definition", own.size_definition}};
}

}  // namespace

Json tip(const Case& input, const std::vector<solver::Load>& loads, const solver::TipFindings& found) {
  const mesh::Plate& plate = input.problem.plate;
  const mesh::CrackTip at = mesh::tips(plate.cracks).at(found.tip);
  const Kink turn = kink(input, found);
  Json angle = turn.angle ? quantity(*turn.angle, "deg") : without_value("deg", turn.why);
  angle["criterion"] = kink_criterion();
  angle["sign"] = kink_sign();
  return {{"tip", at.name},
          {"crack", plate.cracks[at.crack].name},
          {"at", position(at.at)},
          {"direction", quantity(std::atan2(at.direction.y(), at.direction.x()) * degrees_per_radian, "deg")},
          {"K_I", quantity(found.k_one, "MPa sqrt(mm)")},
          {"K_II", quantity(found.k_two, "MPa sqrt(mm)")},
          {"K_I_per_metre", quantity(found.k_one.scaled(1 / root_metre), "MPa sqrt(m)")},
          {"K_II_per_metre", quantity(found.k_two.scaled(1 / root_metre), "MPa sqrt(m)")},
          {"T_stress", quantity(found.t_stress, "MPa")},
          {"energy_release_rate", quantity(found.energy_release, "N/mm")},
          {"beside_it", energies(found)},
          {"kink_angle", angle},
          {"factors", factors(solver::crack_factors(plate, loads, found))},
          {"kt", without_value("1", no_kt())}};
}

Json faces(const Case& input, const std::vector<solver::CrackOpening>& openings) {
  Json list = Json::array();
  for (const solver::CrackOpening& own : openings) {
    const std::string warning = closed_warning(input, own);
    list.push_back({{"crack", input.problem.plate.cracks.at(own.crack).name},
                    {"least_opening", quantity(own.least, "mm")},
                    {"at", position(own.where)},
                    {"largest_distance", quantity(own.largest, "mm")},
                    {"closed", own.is_closed()},
                    {"warning", warning.empty() ? Json(nullptr) : Json(warning)}});
  }
  return list;
}

}  // namespace raiser::io::json_part
