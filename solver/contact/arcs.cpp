#include "solver/contact/arcs.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>

namespace raiser::solver {

namespace {

constexpr double pi = std::numbers::pi;

/// Terms of a whole basis of which an even one keeps every second.
int kept(int terms, const Arc& arc) { return arc.form == Arc::Form::even ? terms / 2 + 1 : terms; }
int stride(const Arc& arc) { return arc.form == Arc::Form::even ? 2 : 1; }

/// T_k(s) / sqrt(1 - s^2) on the arc.
EdgeBasis singular_basis(const Arc& arc, int terms) {
  EdgeBasis basis{kept(terms, arc), {arc.begin, arc.end}, true, {}};
  basis.at = [half = arc.half(), step = stride(arc)](double phi, Eigen::Ref<Eigen::VectorXd> values) {
    for (Eigen::Index k = 0; k < values.size(); ++k)
      values[k] = half * std::cos(static_cast<double>(step * k) * phi);
  };
  return basis;
}

/// sqrt(1 - s^2) U_k(s) on the arc.
EdgeBasis vanishing_basis(const Arc& arc, int terms) {
  EdgeBasis basis{kept(terms - 2, arc), {arc.begin, arc.end}, true, {}};
  basis.at = [half = arc.half(), step = stride(arc)](double phi, Eigen::Ref<Eigen::VectorXd> values) {
    for (Eigen::Index k = 0; k < values.size(); ++k)
      values[k] = half * std::sin(static_cast<double>(step * k + 1) * phi) * std::sin(phi);
  };
  return basis;
}

/// Fourier's functions of the angle from `begin`, cosines only for a mirrored pin.
EdgeBasis ring_basis(double begin, int waves, bool mirrored) {
  EdgeBasis basis{mirrored ? waves / 2 + 2 : 2 * waves + 1, {begin, begin + 2 * pi}, false, {}};
  if (mirrored) waves = waves / 2 + 1;
  basis.at = [begin, waves, mirrored](double phi, Eigen::Ref<Eigen::VectorXd> values) {
    values[0] = 1.0;
    for (int k = 1; k <= waves; ++k) {
      values[mirrored ? k : 2 * k - 1] = std::cos(k * (phi - begin));
      if (!mirrored) values[2 * k] = std::sin(k * (phi - begin));
    }
  };
  return basis;
}

/// The arcs over which pressures at equidistant angles are positive, in rising order.
std::vector<Arc> positive(std::size_t pin, const std::vector<double>& angles,
                          const std::vector<double>& pressure) {
  const int n = static_cast<int>(angles.size());
  const double width = 2 * pi / n;
  const auto on = [&](int k) { return pressure[static_cast<std::size_t>((k % n + n) % n)] > 0; };
  int open = 0;
  while (open < n && on(open)) ++open;
  if (open == n) return {{pin, Arc::Form::ring, angles[0], angles[0] + 2 * pi}};
  std::vector<Arc> arcs;
  int count = 0;
  for (int k = open; k <= open + n; ++k) {
    if (k < open + n && on(k)) {
      ++count;
      continue;
    }
    // The first place lies behind the arc's begin, the last before its end.
    if (count > 0)
      arcs.push_back(
          {pin, Arc::Form::whole, angles[0] + (k - count - 0.6) * width, angles[0] + (k - 0.4) * width});
    count = 0;
  }
  return arcs;
}

/// What a singular pressure leaves at the two ends of an arc, over its mean, and
/// how that changes when an end moves outwards by an angle.
struct End {
  double left = 0.0;
  double slope = 0.0;  ///< 1 / rad, negative
};
End end_of(const Arc& arc, const Eigen::VectorXd& terms, bool at_begin) {
  double value = 0.0, steep = 0.0;
  for (Eigen::Index i = 0; i < terms.size(); ++i) {
    const auto k = static_cast<double>(stride(arc) * i);
    const double sign = at_begin && (stride(arc) * i) % 2 != 0 ? -1.0 : 1.0;
    value += sign * terms[i];
    steep += sign * k * k * terms[i];
  }
  // The last terms, and with them the steepness, are known badly: a pressure
  // about even in the middle has four times the mean.
  const double mean = std::abs(terms[0]);
  const double root = std::clamp(0.25 * value - steep, 0.5 * mean, 20 * mean);
  return {value / mean, -root / (2 * mean * arc.half())};
}

}  // namespace

double ArcSearch::axis(std::size_t pin) const { return symmetry_axis((*pins_)[pin], mirrors_); }

bool ArcSearch::is_meshed(double angle) const {
  return (!mirrors_.x || std::cos(angle) > 0) && (!mirrors_.y || std::sin(angle) > 0);
}

Arc ArcSearch::ring(std::size_t pin) const { return {pin, Arc::Form::ring, axis(pin), axis(pin) + 2 * pi}; }

Arc ArcSearch::image(const Arc& arc) const {
  const double twice = 2 * axis(arc.pin);
  return {arc.pin, arc.form, twice - arc.end, twice - arc.begin};
}

BearingPressure ArcSearch::image(const BearingPressure& pressure, std::size_t pin) const {
  const double twice = 2 * axis(pin);
  BearingPressure result{pressure.form, twice - pressure.end, twice - pressure.begin, pressure.terms};
  for (std::size_t k = 1; k < result.terms.size(); k += 2) result.terms[k] = -result.terms[k];
  return result;
}

std::vector<Arc> ArcSearch::of_pin(const std::vector<Arc>& arcs, std::size_t pin) const {
  std::vector<Arc> result;
  for (const Arc& arc : arcs) {
    if (arc.pin != pin) continue;
    result.push_back(arc);
    if (has_image(arc)) result.push_back(image(arc));
  }
  if (result.empty()) return result;
  // Rising from the first one on, each within a turn of it.
  for (Arc& arc : result) {
    const double shift = unwound(arc.middle(), result.front().middle()) - arc.middle();
    arc.begin += shift;
    arc.end += shift;
  }
  std::sort(result.begin(), result.end(), [](const Arc& a, const Arc& b) { return a.begin < b.begin; });
  return result;
}

/// Of all arcs those that the meshed half has to know, with their forms.
std::vector<Arc> ArcSearch::represented(const std::vector<Arc>& all) const {
  constexpr double same = 1e-6;
  std::vector<Arc> result;
  for (Arc arc : all) {
    if (arc.form == Arc::Form::ring) {
      result.push_back(ring(arc.pin));
      continue;
    }
    arc.form = Arc::Form::whole;
    if (is_mirrored()) {
      const double off = std::remainder(arc.middle() - axis(arc.pin), pi);
      if (std::abs(off) < same) {
        const double middle = arc.middle() - off, half = arc.half();
        arc = {arc.pin, Arc::Form::even, middle - half, middle + half};
      } else if (!is_meshed(arc.middle())) {
        continue;
      }
    }
    result.push_back(arc);
  }
  return result;
}

std::vector<Arc> ArcSearch::shown(const PinSystem::Start& start) const {
  std::vector<Arc> all;
  for (std::size_t p = 0; p < start.angles.size(); ++p)
    for (const Arc& arc : positive(p, start.angles[p], start.pressure[p])) all.push_back(arc);
  return represented(all);
}

std::vector<Patch> ArcSearch::patches(const std::vector<Arc>& arcs, int terms, bool singular) const {
  std::vector<Patch> result;
  for (const Arc& arc : arcs)
    result.push_back({arc.pin, arc.form == Arc::Form::ring ? ring_basis(arc.begin, terms, is_mirrored())
                               : singular                  ? singular_basis(arc, terms)
                                                           : vanishing_basis(arc, terms)});
  return result;
}

/// Joins what lies closer together than can matter. Whether anything was joined.
bool ArcSearch::join(std::vector<Arc>& arcs) const {
  constexpr double close = 0.01;  // rad: a pressure closes such a gap with 1e-5 of itself in tension
  std::vector<Arc> all;
  bool is_changed = false;
  for (std::size_t p = 0; p < pins_->size(); ++p) {
    std::vector<Arc> own = of_pin(arcs, p);
    for (std::size_t k = 0; k < own.size() && own[k].form != Arc::Form::ring;) {
      const bool is_last = k + 1 == own.size();
      const double next = is_last ? own.front().begin + 2 * pi : own[k + 1].begin;
      if (next - own[k].end > close) {
        ++k;
        continue;
      }
      is_changed = true;
      if (own.size() == 1) {
        own[0] = ring(p);
      } else if (is_last) {
        own.front().begin = own[k].begin - 2 * pi;
        own.pop_back();
      } else {
        own[k].end = own[k + 1].end;
        own.erase(own.begin() + static_cast<std::ptrdiff_t>(k) + 1);
      }
    }
    all.insert(all.end(), own.begin(), own.end());
  }
  if (is_changed) arcs = represented(all);
  return is_changed;
}

/// Opens rings where they pull, and drops arcs that pull as a whole beside
/// others of their pin that press. Whether anything was changed.
bool ArcSearch::open(std::vector<Arc>& arcs, const PinSystem::Answer& answer) const {
  constexpr int samples = 144;
  constexpr double allowed = 1e-3;  // of the largest pressure
  std::vector<Arc> all;
  bool is_changed = false;
  for (std::size_t k = 0; k < arcs.size(); ++k) {
    const Arc& arc = arcs[k];
    if (arc.form != Arc::Form::ring) {
      bool another_presses = false;
      for (std::size_t i = 0; i < arcs.size(); ++i)
        another_presses = another_presses || (arcs[i].pin == arc.pin && answer.terms[i][0] > 0);
      const bool is_dropped = answer.terms[k][0] <= 0 && another_presses;
      is_changed = is_changed || is_dropped;
      if (is_dropped) continue;
      all.push_back(arc);
      if (has_image(arc)) all.push_back(image(arc));
      continue;
    }
    const BearingPressure found = pressure(arc, answer.terms[k]);
    std::vector<double> angles, values;
    for (int i = 0; i < samples; ++i) {
      angles.push_back(arc.begin + 2 * pi * i / samples);
      values.push_back(found.at(angles.back()));
    }
    const auto [least, most] = std::minmax_element(values.begin(), values.end());
    const bool is_opened = *least < -allowed * *most;
    is_changed = is_changed || is_opened;
    const std::vector<Arc> parts = is_opened ? positive(arc.pin, angles, values) : std::vector{arc};
    all.insert(all.end(), parts.begin(), parts.end());
  }
  if (is_changed) arcs = represented(all);
  return is_changed;
}

/// Moves the ends outwards by the changes: of every arc its end, then its begin
/// unless it is even. Returns the largest move over the half size of its arc.
double ArcSearch::step(std::vector<Arc>& arcs, const Eigen::VectorXd& change) const {
  constexpr double most = 0.35;  // of the half size, and of the gap beside it
  const std::vector<Arc> old = arcs;
  double largest = 0.0;
  Eigen::Index i = 0;
  for (std::size_t k = 0; k < arcs.size(); ++k) {
    if (old[k].form == Arc::Form::ring) continue;
    const std::vector<Arc> own = of_pin(old, old[k].pin);
    const auto room = [&](double angle, bool is_end) {
      double least = 2 * pi;
      for (const Arc& other : own) {
        const double gap =
            is_end ? unwound(other.begin, angle) - angle : angle - unwound(other.end, angle - 2 * pi);
        least = std::min(least, gap);
      }
      return least;
    };
    const auto limited = [&](double wanted, double gap) {
      const double result = std::clamp(wanted, -most * old[k].half(), most * std::min(old[k].half(), gap));
      largest = std::max(largest, std::abs(result) / old[k].half());
      return result;
    };
    const double after = limited(change[i++], room(old[k].end, true));
    arcs[k].end += after;
    arcs[k].begin -= old[k].form == Arc::Form::even ? after : limited(change[i++], room(old[k].begin, false));
  }
  return largest;
}

double ArcSearch::move_ends(const PinSystem& system, int terms, std::vector<Arc>& arcs, double enough,
                            int most_passes) {
  double move = 0.0;
  Eigen::VectorXd last_left, last_step;
  for (int pass = 0; pass < most_passes; ++pass) {
    const PinSystem::Answer answer = system.solve(patches(arcs, terms, true));
    if (open(arcs, answer)) {
      slope_.resize(0, 0);
      last_step.resize(0);
      move = 1.0;
      continue;
    }
    std::vector<End> ends;
    for (std::size_t k = 0; k < arcs.size(); ++k) {
      if (arcs[k].form == Arc::Form::ring) continue;
      ends.push_back(end_of(arcs[k], answer.terms[k], false));
      if (arcs[k].form == Arc::Form::whole) ends.push_back(end_of(arcs[k], answer.terms[k], true));
    }
    if (ends.empty()) return 0.0;
    const auto n = static_cast<Eigen::Index>(ends.size());
    Eigen::VectorXd left(n);
    for (Eigen::Index i = 0; i < n; ++i) left[i] = ends[static_cast<std::size_t>(i)].left;
    if (slope_.rows() != n) {
      slope_ = Eigen::MatrixXd::Zero(n, n);
      for (Eigen::Index i = 0; i < n; ++i) slope_(i, i) = ends[static_cast<std::size_t>(i)].slope;
    } else if (last_step.size() == n && last_step.squaredNorm() > 0) {
      slope_ += (left - last_left - slope_ * last_step) * last_step.transpose() / last_step.squaredNorm();
    }
    const std::vector<Arc> before = arcs;
    move = step(arcs, -slope_.partialPivLu().solve(left));
    last_left = left;
    last_step.resize(n);
    for (std::size_t k = 0, i = 0; k < arcs.size(); ++k) {
      if (arcs[k].form == Arc::Form::ring) continue;
      last_step[static_cast<Eigen::Index>(i++)] = arcs[k].end - before[k].end;
      if (arcs[k].form == Arc::Form::whole)
        last_step[static_cast<Eigen::Index>(i++)] = before[k].begin - arcs[k].begin;
    }
    if (join(arcs)) {
      slope_.resize(0, 0);
      last_step.resize(0);
      move = 1.0;
      continue;
    }
    if (move <= enough) break;
  }
  return move;
}

PinSystem::Answer ArcSearch::pressures(const PinSystem& system, int terms,
                                       const std::vector<Arc>& arcs) const {
  return system.solve(patches(arcs, terms, false));
}

BearingPressure ArcSearch::pressure(const Arc& arc, const Eigen::VectorXd& terms) const {
  const bool is_ring = arc.form == Arc::Form::ring;
  BearingPressure result{
      is_ring ? BearingPressure::Form::ring : BearingPressure::Form::arc, arc.begin, arc.end, {terms[0]}};
  for (Eigen::Index k = 1; k < terms.size(); ++k) {
    if (!is_ring && arc.form == Arc::Form::even) result.terms.push_back(0.0);
    result.terms.push_back(terms[k]);
    if (is_ring && is_mirrored()) result.terms.push_back(0.0);
  }
  return result;
}

}  // namespace raiser::solver
