#include "solver/adapt/sequence.hpp"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "solver/adapt/bound.hpp"

namespace raiser::solver {

DegreeSequence::DegreeSequence(const Model& model, const Plate& plate)
    : model_(&model), scanner_(model, plate) {
  for (const mesh::Raiser& raiser : mesh::raisers(plate)) centres_.push_back(raiser.centre);
}

void DegreeSequence::solve(int degree) {
  if (!displacements_.empty() && displacements_.back().degree >= degree)
    throw std::invalid_argument("DegreeSequence: the degree must rise");
  displacements_.push_back(model_->solve(degree, room_));
  scans_.push_back(scanner_.scan(displacements_.back()));
}

EdgeValue DegreeSequence::value(std::size_t load_case, std::size_t raiser, Quantity quantity) const {
  const auto k = static_cast<std::size_t>(quantity);
  std::vector<double> values;
  for (const EdgeScan& scan : scans_) values.push_back(scan.extremes[load_case][raiser][k].value);
  const RaiserExtremes& last = scans_.back().extremes[load_case][raiser];
  const double size = std::max(std::abs(last[0].value), std::abs(last[1].value));
  const Point arm = last[k].point - centres_[raiser];
  return {{values.back(), error_bound(values, size)},
          last[k].point,
          std::atan2(arm.y(), arm.x()),
          last[k].traction_miss};
}

double DegreeSequence::peak(std::size_t raiser) const {
  const RaiserExtremes& last = scans_.back().extremes[0][raiser];
  return std::max(std::abs(last[0].value), std::abs(last[1].value));
}

double DegreeSequence::excess(const Ask& ask) const {
  const double allowed = ask.tolerance * peak(ask.raiser);
  const double bound = value(0, ask.raiser, ask.quantity).stress.bound;
  return bound == 0.0 ? 0.0 : bound / allowed;
}

}  // namespace raiser::solver
