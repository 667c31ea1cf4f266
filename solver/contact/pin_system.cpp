#include "solver/contact/pin_system.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <numbers>

namespace raiser::solver {

namespace {

constexpr double turn = 2 * std::numbers::pi;

/// Functions that rise linearly from 0 to 1 and fall again, one at each of the
/// places at equal distances all round from `begin`. With `mirrored`, each
/// together with its mirror image in the line through `begin`.
EdgeBasis hats(double begin, int places, bool mirrored) {
  EdgeBasis basis;
  basis.count = mirrored ? places / 2 + 1 : places;
  for (int k = 0; k <= places; ++k) basis.pieces.push_back(begin + k * turn / places);
  basis.at = [begin, places, mirrored](double phi, Eigen::Ref<Eigen::VectorXd> values) {
    values.setZero();
    const double position = (phi - begin) * places / turn;
    const int left = std::clamp(static_cast<int>(position), 0, places - 1);
    for (const int k : {left, left + 1}) {
      const int place = k % places;
      const int index = mirrored ? std::min(place, places - place) : place;
      values[index] += 1 - std::abs(position - k);
    }
  };
  return basis;
}

}  // namespace

double Pin::direction() const { return force.isZero(0.0) ? 0.0 : std::atan2(force.y(), force.x()); }

double symmetry_axis(const Pin& pin, mesh::Mirrors mirrors) {
  return mirrors.x && pin.force.isZero(0.0) ? turn / 4 : pin.direction();
}

double Pin::opening(double angle) const {
  if (gap <= 0) return gap;
  const double sine = gap * std::sin(angle - direction());
  const double size = radius - gap;
  return gap + sine * sine / (size + std::sqrt((size - sine) * (size + sine)));
}

PinSystem::PinSystem(const Model& model, int degree, const std::vector<Pin>& pins, Room& room)
    : model_(&model), degree_(degree), pins_(pins), compliance_(model, degree, room) {
  for (const Pin& pin : pins) edges_.push_back(round_edge(model.mesh(), pin.owner, pin.centre, pin.radius));
  if (!model.mirrors().x) components_.push_back(0);
  if (!model.mirrors().y) components_.push_back(1);
  own_displacement_ = compliance_.own().displacement;
}

PinSystem::Parts PinSystem::assemble(const std::vector<Patch>& patches) const {
  const auto images = static_cast<double>(model_->images().size());
  const auto directions = static_cast<Eigen::Index>(components_.size());
  Parts parts;
  Eigen::Index count = 0;
  for (const Patch& patch : patches) {
    parts.first.push_back(count);
    count += patch.basis.count;
  }
  parts.first.push_back(count);
  parts.loads.resize(own_displacement_.size(), count);
  parts.resultant = Eigen::MatrixXd::Zero(count, directions * static_cast<Eigen::Index>(pins_.size()));
  parts.size = Eigen::VectorXd::Zero(count);
  for (std::size_t k = 0; k < patches.size(); ++k) {
    const std::size_t p = patches[k].pin;
    const Eigen::Index first = parts.first[k], own = patches[k].basis.count;
    const auto points = edge_points(edges_[p], patches[k].basis, degree_);
    parts.loads.middleCols(first, own) = compliance_.radial_loads(edges_[p], points);
    for (const EdgePoint& point : points) {
      const double e[] = {std::cos(point.angle), std::sin(point.angle)};
      for (Eigen::Index c = 0; c < directions; ++c)
        parts.resultant.col(directions * static_cast<Eigen::Index>(p) + c).segment(first, own) +=
            images * e[components_[c]] * point.weight;
      parts.size.segment(first, own) += images * pins_[p].opening(point.angle) * point.weight;
    }
  }
  parts.compliance = images * compliance_.work(parts.loads);
  parts.own = images * parts.loads.transpose() * own_displacement_;
  return parts;
}

/// Coefficients of the active functions, the others 0, and the pins' ways below them.
Eigen::VectorXd PinSystem::solve(const Parts& parts, const std::vector<bool>& active) const {
  std::vector<Eigen::Index> chosen;
  for (std::size_t k = 0; k < active.size(); ++k)
    if (active[k]) chosen.push_back(static_cast<Eigen::Index>(k));
  const auto n = static_cast<Eigen::Index>(chosen.size());
  const Eigen::Index ways = parts.resultant.cols();
  const auto directions = static_cast<Eigen::Index>(components_.size());
  // The ways in the unit that makes the equations of one size.
  const double scale = parts.compliance.diagonal().maxCoeff() / parts.resultant.cwiseAbs().maxCoeff();
  Eigen::MatrixXd matrix = Eigen::MatrixXd::Zero(n + ways, n + ways);
  Eigen::VectorXd right = Eigen::VectorXd::Zero(n + ways);
  for (Eigen::Index i = 0; i < n; ++i) {
    for (Eigen::Index j = 0; j < n; ++j) matrix(i, j) = parts.compliance(chosen[i], chosen[j]);
    matrix.row(i).tail(ways) = -scale * parts.resultant.row(chosen[i]);
    right[i] = -parts.own[chosen[i]] - parts.size[chosen[i]];
  }
  matrix.bottomLeftCorner(ways, n) = matrix.topRightCorner(n, ways).transpose();
  for (std::size_t p = 0; p < pins_.size(); ++p)
    for (Eigen::Index c = 0; c < directions; ++c)
      right[n + directions * static_cast<Eigen::Index>(p) + c] = -scale * pins_[p].force[components_[c]];
  const Eigen::VectorXd solved = matrix.fullPivLu().solve(right);
  Eigen::VectorXd result = Eigen::VectorXd::Zero(static_cast<Eigen::Index>(active.size()) + ways);
  for (Eigen::Index i = 0; i < n; ++i) result[chosen[i]] = solved[i];
  result.tail(ways) = scale * solved.tail(ways);
  return result;
}

PinSystem::Answer PinSystem::solve(const std::vector<Patch>& patches) const {
  const Parts parts = assemble(patches);
  const Eigen::Index count = parts.first.back();
  const Eigen::VectorXd solved = solve(parts, std::vector<bool>(static_cast<std::size_t>(count), true));
  const auto directions = static_cast<Eigen::Index>(components_.size());
  Answer answer;
  for (std::size_t k = 0; k < patches.size(); ++k)
    answer.terms.emplace_back(solved.segment(parts.first[k], patches[k].basis.count));
  for (std::size_t p = 0; p < pins_.size(); ++p) {
    Point way = Point::Zero();
    for (Eigen::Index c = 0; c < directions; ++c)
      way[components_[c]] = solved[count + directions * static_cast<Eigen::Index>(p) + c];
    answer.way.push_back(way);
  }
  answer.load = parts.loads * solved.head(count);
  return answer;
}

PinSystem::Start PinSystem::unilateral(int places) const {
  const bool mirrored = components_.size() < 2;
  std::vector<Patch> patches;
  for (std::size_t q = 0; q < pins_.size(); ++q)
    patches.push_back({q, hats(symmetry_axis(pins_[q], model_->mirrors()), places, mirrored)});
  const Parts parts = assemble(patches);
  const auto count = static_cast<std::size_t>(parts.first.back());
  // From all round with interference, from the side that the force presses on
  // with clearance: the other way round every place would be let go at once.
  std::vector<bool> active(count, true);
  for (std::size_t q = 0; q < pins_.size(); ++q)
    for (Eigen::Index k = 0; k < patches[q].basis.count && pins_[q].gap > 0; ++k)
      active[static_cast<std::size_t>(parts.first[q] + k)] =
          std::cos(turn * static_cast<double>(k) / places) > 0.7;
  Eigen::VectorXd solved;
  Start start;
  constexpr int most_passes = 60;
  for (int pass = 0; pass < most_passes && !start.settled; ++pass) {
    solved = solve(parts, active);
    const Eigen::VectorXd p = solved.head(parts.first.back());
    const Eigen::VectorXd open =
        parts.compliance * p + parts.own + parts.size - parts.resultant * solved.tail(parts.resultant.cols());
    const double rounding = 1e-10 * open.cwiseAbs().maxCoeff();
    start.settled = true;
    std::size_t left = 0;
    for (std::size_t k = 0; k < count; ++k) {
      const auto i = static_cast<Eigen::Index>(k);
      const bool was = active[k];
      active[k] = was ? p[i] > 0 : open[i] < -rounding;
      left += active[k] ? 1 : 0;
      start.settled = start.settled && active[k] == was;
    }
    if (left > 0) continue;
    // A contact narrower than the places are apart.
    Eigen::Index most = 0;
    p.maxCoeff(&most);
    active[static_cast<std::size_t>(most)] = true;
  }
  for (std::size_t q = 0; q < pins_.size(); ++q) {
    std::vector<double> angles, pressure;
    for (int k = 0; k < places; ++k) {
      angles.push_back(patches[q].basis.pieces[k]);
      const Eigen::Index index = parts.first[q] + (mirrored ? std::min(k, places - k) : k);
      pressure.push_back(std::max(0.0, solved[index]));
    }
    start.angles.push_back(std::move(angles));
    start.pressure.push_back(std::move(pressure));
  }
  return start;
}

Eigen::VectorXd PinSystem::gap(const Answer& answer, std::size_t pin, std::span<const double> angles) const {
  const Eigen::VectorXd displacement = own_displacement_ + compliance_.solve(answer.load);
  Eigen::VectorXd result = compliance_.radial_displacement(edges_[pin], angles, displacement);
  for (std::size_t k = 0; k < angles.size(); ++k)
    result[static_cast<Eigen::Index>(k)] +=
        pins_[pin].opening(angles[k]) - answer.way[pin].dot(Point(std::cos(angles[k]), std::sin(angles[k])));
  return result;
}

}  // namespace raiser::solver
