#include "solver/adapt/sequence.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "solver/adapt/bound.hpp"

namespace raiser::solver {
namespace {

/// The customary a of a crack: its length, or half of it between two tips.
double half_length(const mesh::Crack& crack) { return crack.length() * (crack.has_mouth ? 1.0 : 0.5); }

}  // namespace

DegreeSequence::DegreeSequence(const Model& model, const Plate& plate)
    : model_(&model), plate_(&plate), scanner_(model, plate), tip_scanner_(model, plate) {
  for (const mesh::Raiser& raiser : mesh::raisers(plate)) centres_.push_back(raiser.centre);
}

void DegreeSequence::solve(int degree) {
  if (!displacements_.empty() && displacements_.back().degree >= degree)
    throw std::invalid_argument("DegreeSequence: the degree must rise");
  displacements_.push_back(model_->solve(degree, room_));
  scans_.push_back(scanner_.scan(displacements_.back()));
  tip_scans_.push_back(tip_scanner_.scan(displacements_.back()));
}

EdgeValue DegreeSequence::value(std::size_t load_case, std::size_t raiser, Quantity quantity) const {
  const auto k = static_cast<std::size_t>(quantity);
  std::vector<double> values;
  for (const EdgeScan& scan : scans_) values.push_back(scan.extremes[load_case][raiser][k].value);
  const RaiserExtremes& last = scans_.back().extremes[load_case][raiser];
  const double size = std::max(std::abs(last[0].value), std::abs(last[1].value));
  const Point arm = last[k].point - centres_[raiser];
  return {{values.back(), error_bound(values, size) + doubt(load_case, raiser)},
          last[k].point,
          std::atan2(arm.y(), arm.x()),
          last[k].traction_miss};
}

double DegreeSequence::doubt(std::size_t load_case, std::size_t raiser) const {
  const auto& loads = model_->loads();
  const auto holds_pin = [&](const UnitLoad& load) { return !load.loads.empty(); };
  if (load_case > 0 && !holds_pin(loads[load_case - 1])) return 0.0;
  double sum = 0.0;
  for (std::size_t l = 0; l < loads.size(); ++l) {
    if (!loads[l].doubt) continue;
    const RaiserExtremes& extremes = scans_.back().extremes[l + 1][raiser];
    sum += std::max(std::abs(extremes[0].value), std::abs(extremes[1].value));
  }
  return sum;
}

double DegreeSequence::peak(std::size_t raiser) const {
  const RaiserExtremes& last = scans_.back().extremes[0][raiser];
  return std::max(std::abs(last[0].value), std::abs(last[1].value));
}

std::array<Estimate, 3> DegreeSequence::tip_value(std::size_t load_case, std::size_t tip) const {
  std::array<std::vector<double>, 3> values;
  for (const TipScan& scan : tip_scans_) {
    const Eigen::Vector3d k = tip_scanner_.value(scan, load_case, tip, 0);
    for (int i = 0; i < 3; ++i) values[i].push_back(k[i]);
  }
  const double k_size = std::hypot(values[0].back(), values[1].back());
  const double length = half_length(plate_->cracks[mesh::tips(plate_->cracks)[tip].crack]);
  const std::array<double, 3> size = {k_size, k_size, k_size / std::sqrt(std::numbers::pi * length)};
  std::array<Estimate, 3> result;
  for (int i = 0; i < 3; ++i) {
    result[i] = {values[i].back(), error_bound(values[i], size[i])};
    for (std::size_t d = 1; d < tip_scanner_.domains(); ++d)
      result[i].bound =
          std::max(result[i].bound,
                   std::abs(tip_scanner_.value(tip_scans_.back(), load_case, tip, d)[i] - result[i].value));
  }
  return result;
}

double DegreeSequence::tip_excess(const Ask& ask) const {
  const std::vector<mesh::CrackTip> tips = mesh::tips(plate_->cracks);
  const auto stress = [&](std::size_t tip) {  // K over sqrt(pi a)
    const Eigen::Vector3d k = tip_scanner_.value(tip_scans_.back(), 0, tip, 0);
    return std::hypot(k[0], k[1]) /
           std::sqrt(std::numbers::pi * half_length(plate_->cracks[tips[tip].crack]));
  };
  const std::array<Estimate, 3> own = tip_value(0, ask.raiser);
  double size = std::abs(own[2].value);
  for (std::size_t t = 0; t < tips.size(); ++t) size = std::max(size, stress(t));
  size = std::max(stress(ask.raiser), 0.01 * size);
  if (ask.quantity == Quantity::t_stress) return own[2].bound / (ask.tolerance * size);
  const double root = std::sqrt(std::numbers::pi * half_length(plate_->cracks[tips[ask.raiser].crack]));
  return std::max(own[0].bound, own[1].bound) / (ask.tolerance * size * root);
}

double DegreeSequence::excess(const Ask& ask) const {
  if (is_at_tip(ask.quantity)) return tip_excess(ask);
  const double allowed = ask.tolerance * peak(ask.raiser);
  const double bound = value(0, ask.raiser, ask.quantity).stress.bound;
  return bound == 0.0 ? 0.0 : bound / allowed;
}

}  // namespace raiser::solver
