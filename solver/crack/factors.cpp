#include "solver/crack/factors.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "solver/extract/section.hpp"

namespace raiser::solver {

double crack_size(const mesh::Crack& crack) { return crack.length() * (crack.has_mouth ? 1.0 : 0.5); }

double allowed_at_tip(const std::vector<mesh::Crack>& cracks, const std::vector<Eigen::Vector3d>& k,
                      const Ask& ask) {
  const std::vector<mesh::CrackTip> tips = mesh::tips(cracks);
  const auto root = [&](std::size_t tip) {
    return std::sqrt(std::numbers::pi * crack_size(cracks[tips[tip].crack]));
  };
  const auto stress = [&](std::size_t tip) { return k[tip].head<2>().norm() / root(tip); };
  double size = std::abs(k.at(ask.raiser)[2]);
  for (std::size_t t = 0; t < tips.size(); ++t) size = std::max(size, stress(t));
  size = std::max(stress(ask.raiser), 0.01 * size);
  return ask.tolerance * size * (ask.quantity == Quantity::t_stress ? 1.0 : root(ask.raiser));
}

CrackFactors crack_factors(const Plate& plate, const std::vector<Load>& loads, const TipFindings& found) {
  const mesh::CrackTip tip = mesh::tips(plate.cracks).at(found.tip);
  const mesh::Crack& crack = plate.cracks[tip.crack];
  CrackFactors result;
  result.size = crack_size(crack);
  result.size_definition = crack.has_mouth ? "the crack's length from its mouth" : "half the crack's length";
  double pressure = 0.0;
  for (const Load& load : loads)
    if (load.kind == Load::Kind::face_pressure && load.crack == tip.crack) pressure += load.stress;
  const Basis gross = gross_nominal(
      plate, loads,
      crack.has_mouth ? crack.points.front() : (crack.points.front() + crack.points.back()) / 2);
  if (gross.why.empty()) {
    result.nominal = gross.stress;
    result.definition = gross.definition;
    if (pressure != 0.0) result.definition += "; the pressure on the faces does not count";
  } else if (pressure != 0.0) {
    result.nominal = std::abs(pressure);
    result.definition = "p, the pressure on the crack's faces";
  } else {
    result.why = "the loads leave the plate without holes and cracks unstressed there: use K itself";
    return result;
  }
  const double unit = result.nominal * std::sqrt(std::numbers::pi * result.size);
  result.mode_one = found.k_one.scaled(1.0 / unit);
  result.mode_two = found.k_two.scaled(1.0 / unit);
  return result;
}

}  // namespace raiser::solver
