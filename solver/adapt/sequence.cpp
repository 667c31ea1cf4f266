#include "solver/adapt/sequence.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>
#include <stdexcept>
#include <utility>

#include "solver/adapt/bound.hpp"
#include "solver/crack/factors.hpp"

namespace raiser::solver {
namespace {

/// The larger one of the edge stresses in magnitude.
std::size_t peak_of(const RaiserExtremes& extremes) {
  return std::abs(extremes[0].value) >= std::abs(extremes[1].value) ? 0 : 1;
}

}  // namespace

DegreeSequence::DegreeSequence(const Model& model, const Plate& plate, double end,
                               std::vector<SingularPlace> places)
    : model_(&model),
      plate_(&plate),
      end_(end),
      places_(std::move(places)),
      scanner_(model, plate),
      tip_scanner_(model, plate) {
  for (const mesh::Raiser& raiser : mesh::raisers(plate)) centres_.push_back(raiser.centre);
  joints_ = joints();
}

std::vector<DegreeSequence::Joints> DegreeSequence::joints() const {
  constexpr double near = 0.03;  // of the smallest radius
  std::vector<Joints> result(centres_.size());
  if (!plate_->outline) return result;
  for (const mesh::Curve& curve : plate_->outline->curves) {
    if (curve.owner.kind != Owner::Kind::raiser || curve.kind == mesh::Curve::Kind::line) continue;
    Joints& own = result[plate_->holes.size() + curve.owner.index];
    for (const double t : {curve.begin, curve.end}) {
      const double reach = near * curve.radius_of_curvature(t);
      own.near = own.places.empty() ? reach : std::min(own.near, reach);
      own.places.push_back(curve.at(t));
    }
  }
  return result;
}

void DegreeSequence::solve(int degree) {
  if (!displacements_.empty() && displacements_.back().degree >= degree)
    throw std::invalid_argument("DegreeSequence: the degree must rise");
  displacements_.push_back(model_->solve(degree, room_));
  scans_.push_back(scanner_.scan(displacements_.back()));
  tip_scans_.push_back(tip_scanner_.scan(displacements_.back()));
  largest_peak_ = 0.0;
  for (std::size_t r = 0; r < centres_.size(); ++r) largest_peak_ = std::max(largest_peak_, peak(r));
}

bool DegreeSequence::has_tail() const {
  const bool is_drawn = std::any_of(plate_->holes.begin(), plate_->holes.end(), [](const mesh::Hole& hole) {
    return hole.shape == mesh::HoleShape::drawn;
  });
  return plate_->outline || is_drawn || model_->material().orthotropy || !model_->held().empty();
}

Convergence DegreeSequence::convergence() const { return {displacements_.back().degree, has_tail()}; }

double DegreeSequence::own_bound(std::size_t load_case, std::size_t raiser, std::size_t quantity) const {
  std::vector<double> values;
  for (const EdgeScan& scan : scans_) values.push_back(scan.extremes[load_case][raiser][quantity].value);
  const RaiserExtremes& last = scans_.back().extremes[load_case][raiser];
  const double size = std::max(std::abs(last[0].value), std::abs(last[1].value));
  return convergence().bound(values, size) + last[quantity].rounding;
}

double DegreeSequence::left_out_at_joint(std::size_t load_case, std::size_t raiser,
                                         std::size_t quantity) const {
  const RaiserExtremes& last = scans_.back().extremes[load_case][raiser];
  const Joints& joints = joints_[raiser];
  const bool is_at_joint = std::any_of(joints.places.begin(), joints.places.end(), [&](const Point& x) {
    return (x - last[quantity].point).norm() < joints.near;
  });
  if (!is_at_joint) return 0.0;
  // Stress at a jump of curvature is as rough as r log r: what the triangles there
  // leave out falls with the square of the degree. The factor is calibrated.
  constexpr double unresolved = 2.5;
  const int degree = displacements_.back().degree;
  return unresolved * end_ / (degree * degree) * std::max(std::abs(last[0].value), std::abs(last[1].value));
}

bool DegreeSequence::is_at_place_without_peak(const Point& x) const {
  constexpr double share = 0.02;
  return std::any_of(places_.begin(), places_.end(), [&](const SingularPlace& place) {
    return (x - place.site.vertex.at).norm() < share * place.site.reach;
  });
}

EdgeValue DegreeSequence::value(std::size_t load_case, std::size_t raiser, Quantity quantity) const {
  const auto k = static_cast<std::size_t>(quantity);
  const Extreme& last = scans_.back().extremes[load_case][raiser][k];
  double bound = own_bound(load_case, raiser, k);
  // Where little stress is left, its differences may vanish by accident.
  if (const std::size_t peak = peak_of(scans_.back().extremes[load_case][raiser]); convergence().has_tail)
    bound = std::max(bound, 0.1 * own_bound(load_case, raiser, peak));
  bound += left_out_at_joint(load_case, raiser, k);
  if (is_at_place_without_peak(last.point)) bound = std::numeric_limits<double>::infinity();
  const Point arm = last.point - centres_[raiser];
  return {{last.value, bound + doubt(load_case, raiser, quantity)},
          last.point,
          std::atan2(arm.y(), arm.x()),
          last.traction_miss};
}

double DegreeSequence::doubt(std::size_t load_case, std::size_t raiser, Quantity quantity) const {
  if (!scanner_.has_doubt(load_case)) return 0.0;
  const auto k = static_cast<std::size_t>(quantity);
  const EdgeScan& last = scans_.back();
  return std::abs(last.doubted[load_case][raiser][k].value - last.extremes[load_case][raiser][k].value);
}

double DegreeSequence::doubt_excess(const Ask& ask) const {
  if (is_at_tip(ask.quantity)) return tip_excess(ask, tip_doubt(0, ask.raiser));
  const double doubt_of_it = doubt(0, ask.raiser, ask.quantity);
  return doubt_of_it == 0.0 ? 0.0 : doubt_of_it / (ask.tolerance * peak(ask.raiser));
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
  const double length = crack_size(plate_->cracks[mesh::tips(plate_->cracks)[tip].crack]);
  const double root = std::sqrt(std::numbers::pi * length);
  const std::array<double, 3> size = {k_size, k_size, k_size / root};
  // What the triangles at the tip leave unresolved acts like a slightly different crack
  // length: it falls with the fourth power of the degree, too slowly for differences
  // of degrees to show all of it. The factor is calibrated.
  constexpr double unresolved = 28.0;
  const double tip_error = unresolved * tip_scanner_.depth(tip) / std::pow(displacements_.back().degree, 4);
  // T from a ring is off in proportion to one over its radius.
  const std::size_t domains = tip_scanner_.domains();
  const std::array<std::size_t, 3> compared = {domains, domains, std::min<std::size_t>(domains, 3)};
  std::array<Estimate, 3> result;
  for (int i = 0; i < 3; ++i) {
    result[i] = {values[i].back(), error_bound(values[i], size[i]) + tip_error * size[i]};
    for (std::size_t d = 1; d < compared[i]; ++d)
      result[i].bound =
          std::max(result[i].bound,
                   std::abs(tip_scanner_.value(tip_scans_.back(), load_case, tip, d)[i] - result[i].value));
    // Of a crack that its load does not open, rounding is all that is left.
    constexpr double rounding = 3e-12;
    result[i].bound += rounding * std::max(k_size, std::abs(values[2].back()) * root) / (i == 2 ? root : 1.0);
    result[i].bound += tip_doubt(load_case, tip)[i];
  }
  return result;
}

Eigen::Vector3d DegreeSequence::tip_doubt(std::size_t load_case, std::size_t tip) const {
  if (!scanner_.has_doubt(load_case)) return Eigen::Vector3d::Zero();
  return tip_scanner_.value(tip_scans_.back(), *doubt_in(*model_) + 1, tip, 0).cwiseAbs();
}

double DegreeSequence::tip_excess(const Ask& ask, const Eigen::Vector3d& bounds) const {
  std::vector<Eigen::Vector3d> k;
  for (std::size_t tip = 0; tip < tip_scanner_.tips(); ++tip)
    k.push_back(tip_scanner_.value(tip_scans_.back(), 0, tip, 0));
  const bool is_t = ask.quantity == Quantity::t_stress;
  const double bound = is_t ? bounds[2] : std::max(bounds[0], bounds[1]);
  return bound / allowed_at_tip(plate_->cracks, k, ask);
}

double DegreeSequence::excess(const Ask& ask) const {
  if (is_at_tip(ask.quantity)) {
    const std::array<Estimate, 3> own = tip_value(0, ask.raiser);
    return tip_excess(ask, {own[0].bound, own[1].bound, own[2].bound});
  }
  constexpr double negligible = 1e-5;
  const double allowed = ask.tolerance * std::max(peak(ask.raiser), negligible * largest_peak_);
  const double bound = value(0, ask.raiser, ask.quantity).stress.bound;
  return bound == 0.0 ? 0.0 : bound / allowed;
}

}  // namespace raiser::solver
