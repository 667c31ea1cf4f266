#include "solver/contact/contact.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/bound.hpp"

namespace raiser::solver {

namespace {

constexpr double pi = std::numbers::pi;
constexpr int places = 48;       // all round, of the start
constexpr int last_degree = 10;  // of the sequence that the bounds stand on
int first_degree(double tolerance) { return tolerance < 1e-4 ? 4 : 3; }

/// Terms of the pressure on a whole arc. On a curved edge the root at the ends
/// comes with powers times a logarithm, so that the terms fall with the fourth
/// power of their number only: with twice the degree of them, they and not the
/// triangles are what limits the digits. More than this the sides beside the
/// ends cannot tell apart.
int terms_for(int degree) { return 4 * degree; }

/// Where one pin is thought to touch.
struct Arc {
  bool ring = false;
  double begin = 0.0;
  double end = 0.0;
  double half() const { return 0.5 * (end - begin); }
  double middle() const { return 0.5 * (end + begin); }
};

/// T_k(s) / sqrt(1 - s^2) on the arc, even k only for a mirrored pin.
EdgeBasis singular_basis(const Arc& arc, int terms, bool mirrored) {
  EdgeBasis basis{terms, {arc.begin, arc.end}, true, {}};
  const int step = mirrored ? 2 : 1;
  basis.at = [half = arc.half(), step](double phi, Eigen::Ref<Eigen::VectorXd> values) {
    for (Eigen::Index k = 0; k < values.size(); ++k)
      values[k] = half * std::cos(static_cast<double>(step * k) * phi);
  };
  return basis;
}

/// sqrt(1 - s^2) U_k(s) on the arc, even k only for a mirrored pin.
EdgeBasis vanishing_basis(const Arc& arc, int terms, bool mirrored) {
  EdgeBasis basis{terms, {arc.begin, arc.end}, true, {}};
  const int step = mirrored ? 2 : 1;
  basis.at = [half = arc.half(), step](double phi, Eigen::Ref<Eigen::VectorXd> values) {
    for (Eigen::Index k = 0; k < values.size(); ++k)
      values[k] = half * std::sin(static_cast<double>(step * k + 1) * phi) * std::sin(phi);
  };
  return basis;
}

/// Fourier's functions of the angle from `begin`, cosines only for a mirrored pin.
EdgeBasis ring_basis(double begin, int waves, bool mirrored) {
  EdgeBasis basis{mirrored ? waves + 1 : 2 * waves + 1, {begin, begin + 2 * pi}, false, {}};
  basis.at = [begin, waves, mirrored](double phi, Eigen::Ref<Eigen::VectorXd> values) {
    values[0] = 1.0;
    for (int k = 1; k <= waves; ++k) {
      values[mirrored ? k : 2 * k - 1] = std::cos(k * (phi - begin));
      if (!mirrored) values[2 * k] = std::sin(k * (phi - begin));
    }
  };
  return basis;
}

/// The terms of a mirrored basis among those of the whole one.
std::vector<double> spread(const Eigen::VectorXd& terms, bool mirrored) {
  std::vector<double> result;
  for (Eigen::Index k = 0; k < terms.size(); ++k) {
    if (mirrored && k > 0) result.push_back(0.0);
    result.push_back(terms[k]);
  }
  return result;
}

BearingPressure pressure_of(const Arc& arc, const Eigen::VectorXd& terms, bool mirrored) {
  if (!arc.ring) return {BearingPressure::Form::arc, arc.begin, arc.end, spread(terms, mirrored)};
  BearingPressure ring{BearingPressure::Form::ring, arc.begin, arc.begin + 2 * pi, {terms[0]}};
  for (Eigen::Index k = 1; k < terms.size(); ++k) {
    ring.terms.push_back(terms[k]);
    if (mirrored) ring.terms.push_back(0.0);
  }
  return ring;
}

/// The arcs that a unilateral start shows, or why they are none that can be taken on.
struct Arcs {
  std::vector<Arc> arcs;
  std::string reason;
};
Arcs arcs_of(const PinSystem::Start& start) {
  Arcs result;
  for (std::size_t p = 0; p < start.angles.size(); ++p) {
    const auto& angles = start.angles[p];
    const auto& pressure = start.pressure[p];
    const int n = static_cast<int>(angles.size());
    const double step = 2 * pi / n;
    const auto on = [&](int k) { return pressure[(k % n + n) % n] > 0; };
    int open = 0;
    while (open < n && on(open)) ++open;
    if (open == n) {
      result.arcs.push_back({true, angles[0], angles[0] + 2 * pi});
      continue;
    }
    int first = 0, count = 0, runs = 0;
    for (int k = open; k < open + n; ++k) {
      if (!on(k)) continue;
      ++count;
      if (!on(k - 1)) {
        first = k;
        ++runs;
      }
    }
    if (runs != 1) {
      result.reason = runs == 0 ? "a pin touches its hole nowhere"
                                : fmt::format("a pin touches its hole on {} separate arcs", runs);
      return result;
    }
    const double begin = angles[0] + (first - 0.6) * step;
    result.arcs.push_back({false, begin, begin + (count + 0.2) * step});
  }
  return result;
}

/// By how much of its half size an arc must shrink at an end where the
/// pressure's numerator N(s) has this value and slope towards the end: beside
/// the true end the pressure is q sqrt(x), and -(q d / 2) / sqrt(x) more when
/// the arc is too long by d.
double overshoot(double value, double slope) {
  constexpr double most = 0.35;
  const double root = 0.25 * value - slope;
  if (!(root > 0)) return value < 0 ? most : -most;
  return std::clamp(-2 * value / root, -most, most);
}

/// Moves the ends of an arc towards where the pressure vanishes. Returns the
/// larger move over the half size.
double improve(Arc& arc, const Eigen::VectorXd& terms, bool mirrored) {
  const int step = mirrored ? 2 : 1;
  double at_end = 0, at_begin = 0, slope_end = 0, slope_begin = 0;
  for (Eigen::Index i = 0; i < terms.size(); ++i) {
    const auto k = static_cast<double>(step * i);
    const double sign = (step * i) % 2 == 0 ? 1.0 : -1.0;
    at_end += terms[i];
    at_begin += sign * terms[i];
    slope_end += k * k * terms[i];
    slope_begin += sign * k * k * terms[i];
  }
  const double half = arc.half();
  const double shrink_end = overshoot(at_end, slope_end);
  const double shrink_begin = overshoot(at_begin, slope_begin);
  arc.end -= shrink_end * half;
  arc.begin += shrink_begin * half;
  return std::max(std::abs(shrink_end), std::abs(shrink_begin));
}

/// One run of the search for the arcs' ends with the equations of one degree.
class Search {
 public:
  Search(const PinSystem& system, int terms, bool mirrored)
      : system_(&system), terms_(mirrored ? terms / 2 + 1 : terms), mirrored_(mirrored) {}

  /// Returns the last relative move.
  double ends(std::vector<Arc>& arcs, double enough, int most) const {
    double move = 0.0;
    for (int pass = 0; pass < most; ++pass) {
      std::vector<EdgeBasis> bases;
      for (const Arc& arc : arcs)
        bases.push_back(arc.ring ? ring(arc) : singular_basis(arc, terms_, mirrored_));
      const auto answer = system_->solve(bases);
      move = 0.0;
      for (std::size_t p = 0; p < arcs.size(); ++p) {
        if (!arcs[p].ring) move = std::max(move, improve(arcs[p], answer.terms[p], mirrored_));
        if (arcs[p].end - arcs[p].begin > 2 * pi) arcs[p].ring = true;
      }
      if (move <= enough) break;
    }
    return move;
  }

  PinSystem::Answer pressures(const std::vector<Arc>& arcs) const {
    std::vector<EdgeBasis> bases;
    for (const Arc& arc : arcs)
      bases.push_back(arc.ring ? ring(arc) : vanishing_basis(arc, terms_ - (mirrored_ ? 1 : 2), mirrored_));
    return system_->solve(bases);
  }

 private:
  EdgeBasis ring(const Arc& arc) const { return ring_basis(arc.begin, terms_, mirrored_); }
  const PinSystem* system_;
  int terms_;
  bool mirrored_;
};

/// The largest pressure and where, by sampling and halving.
std::pair<double, double> largest_of(const BearingPressure& pressure) {
  constexpr int samples = 200;
  double step = (pressure.end - pressure.begin) / samples;
  double best = pressure.begin;
  for (int k = 1; k < samples; ++k)
    if (pressure.at(pressure.begin + k * step) > pressure.at(best)) best = pressure.begin + k * step;
  for (; step > 1e-10; step /= 2)
    for (const double t : {best - step, best + step})
      if (t > pressure.begin && t < pressure.end && pressure.at(t) > pressure.at(best)) best = t;
  return {pressure.at(best), best};
}

/// What a steady fall with the fourth power of the degree leaves is up to twice
/// the last difference; of an arc's ends somewhat more (calibrated).
Estimate estimate(const std::vector<double>& values, double scale, double factor) {
  return {values.back(), factor * error_bound(values, scale)};
}

/// The values of one pin in a sequence of degrees.
struct History {
  std::vector<double> begin, end, largest;
  std::vector<BearingPressure> pressure;

  void add(const BearingPressure& now) {
    begin.push_back(now.begin);
    end.push_back(now.end);
    largest.push_back(largest_of(now).first);
    pressure.push_back(now);
  }
  PinContact contact() const {
    PinContact result;
    result.pressure = pressure.back();
    result.before = pressure[pressure.size() > 1 ? pressure.size() - 2 : 0];
    result.all_round = result.pressure.form == BearingPressure::Form::ring;
    result.begin = estimate(begin, 1.0, 4);
    result.end = estimate(end, 1.0, 4);
    result.largest = estimate(largest, largest.back(), 2);
    result.largest_at = largest_of(result.pressure).second;
    return result;
  }
};

/// Whether the bounds are within the tolerance. An arc of a quarter turn to either
/// side or more ends where the edge stress is largest, with a root: there its
/// ends have to be known better than the largest pressure.
bool is_within(const PinContact& contact, double tolerance) {
  constexpr double wide = 1.3;    // rad, half the arc
  constexpr double least = 6e-6;  // rad, what is left to doubt
  constexpr double at_end = 0.1;  // rad for each of the tolerance
  if (contact.largest.bound > tolerance * contact.largest.value) return false;
  const double half = 0.5 * (contact.end.value - contact.begin.value);
  return contact.all_round || half < wide ||
         std::max(contact.begin.bound, contact.end.bound) <= std::max(least, at_end * tolerance);
}

/// Why what was found breaks the conditions of contact, or nothing: a tension,
/// or a pin that goes through the material beside its arc.
std::string breach(const PinSystem& system, const PinSystem::Answer& answer, const std::vector<Arc>& arcs,
                   const std::vector<History>& histories, mesh::Mirrors mirrors,
                   const std::vector<Pin>& pins) {
  for (std::size_t p = 0; p < arcs.size(); ++p) {
    const BearingPressure& pressure = histories[p].pressure.back();
    double least = 0.0, deepest = 0.0, widest = 0.0;
    std::vector<double> free;
    for (int k = 0; k < 144; ++k) {
      const double angle = pins[p].direction() + 2 * pi * (k + 0.5) / 144;
      const bool touches = arcs[p].ring || unwound(angle, arcs[p].begin) < arcs[p].end;
      if (touches) least = std::min(least, pressure.at(angle));
      const Point seen(std::cos(angle), std::sin(angle));
      const bool meshed = (!mirrors.x || seen.x() > 0) && (!mirrors.y || seen.y() > 0);
      if (!touches && meshed) free.push_back(angle);
    }
    const Eigen::VectorXd gap = system.gap(answer, p, free);
    if (gap.size() > 0) {
      deepest = -gap.minCoeff();
      widest = gap.maxCoeff();
    }
    if (least < -1e-3 * histories[p].largest.back())
      return fmt::format("the pressure found has a tension of {:.3g} MPa", -least);
    if (deepest > 1e-3 * widest)
      return fmt::format(
          "beside its arc the pin would go {:.3g} mm into the material: it touches elsewhere as well",
          deepest);
  }
  return "";
}

/// The mesh for given arcs: its sides are short at their ends, where the pressure has a root.
mesh::Mesh mesh_for(const Plate& plate, mesh::Mirrors mirrors, const std::vector<Pin>& pins,
                    const std::vector<Arc>& arcs) {
  constexpr double share = 0.005;  // of half the arc
  std::vector<mesh::Break> ends;
  for (std::size_t p = 0; p < arcs.size(); ++p)
    for (const double angle : {arcs[p].begin, arcs[p].end})
      if (!arcs[p].ring)
        ends.push_back({pins[p].owner,
                        pins[p].centre + pins[p].radius * Point(std::cos(angle), std::sin(angle)),
                        share * arcs[p].half() * pins[p].radius});
  return mesh::triangulate(mesh::cut(mesh::broken(mesh::trace(plate), ends), mirrors), mesh::SizeRule{});
}

/// Pins, plate and what else loads it, and the run from start to bounds.
class Run {
 public:
  Run(const Plate& plate, const HookeLaw& material, const Traction& other, mesh::Mirrors mirrors,
      const std::vector<HeldEdge>& held, const std::vector<Pin>& pins)
      : plate_(plate),
        material_(material),
        load_{"other", other, UnitLoad::Parity::even, UnitLoad::Parity::even},
        mirrors_(mirrors),
        held_(held),
        pins_(pins) {
    load_.displaces = true;
  }

  Contact find(double tolerance) {
    Contact contact;
    if (contact.reason = start(); !contact.reason.empty()) return contact;
    if (contact.reason = fit(); !contact.reason.empty()) return contact;
    sequence(tolerance, contact);
    return contact;
  }

 private:
  bool mirrored() const { return mirrors_.x || mirrors_.y; }
  Model model(mesh::Mesh mesh) const {
    return {std::move(mesh), mirrors_, material_, plate_.thickness, {load_}, held_};
  }

  std::string start() {
    const Model plain = model(mesh_for(plate_, mirrors_, pins_, {}));
    const Arcs found = arcs_of(PinSystem(plain, 4, pins_, room_).unilateral(places));
    arcs_ = found.arcs;
    return found.reason;
  }

  /// Meshes that fit the arcs, until the arcs found with one fit it.
  /// The mesh has to fit better than by the length of its sides at the ends.
  std::string fit() {
    constexpr double fits = 0.002;
    for (int pass = 0; pass < 8; ++pass) {
      mesh_ = mesh_for(plate_, mirrors_, pins_, arcs_);
      std::vector<Arc> next = arcs_;
      const Model fitted = model(mesh_);
      const double move = Search(PinSystem(fitted, 4, pins_, room_), 8, mirrored()).ends(next, 0.1 * fits, 6);
      double off = 0.0;
      for (std::size_t p = 0; p < arcs_.size(); ++p)
        if (!next[p].ring)
          off = std::max({off, std::abs(next[p].begin - arcs_[p].begin) / next[p].half(),
                          std::abs(next[p].end - arcs_[p].end) / next[p].half()});
      arcs_ = std::move(next);
      off_ = off;
      if (off <= fits && move <= fits) return "";
    }
    return "the ends of the arc of contact were not found";
  }

  void sequence(double tolerance, Contact& contact) {
    constexpr double close = 3e-4;  // of half the arc, for a mesh that few digits do not need made again
    if (off_ > close || tolerance < 1e-4) mesh_ = mesh_for(plate_, mirrors_, pins_, arcs_);
    const Model fitted = model(mesh_);
    std::vector<History> histories(pins_.size());
    for (int degree = first_degree(tolerance); degree <= last_degree; ++degree) {
      const PinSystem system(fitted, degree, pins_, room_);
      const Search search(system, terms_for(degree), mirrored());
      search.ends(arcs_, 0.01 * tolerance, 8);
      const auto answer = search.pressures(arcs_);
      contact.degree = degree;
      contact.unknowns = static_cast<std::size_t>(Discretisation(mesh_, degree).unknowns());
      contact.pins.clear();
      contact.settled = true;
      for (std::size_t p = 0; p < pins_.size(); ++p) {
        histories[p].add(pressure_of(arcs_[p], answer.terms[p], mirrored()));
        contact.pins.push_back(histories[p].contact());
        contact.settled = contact.settled && is_within(contact.pins[p], tolerance);
      }
      if (!contact.settled && degree < last_degree) continue;
      contact.reason = breach(system, answer, arcs_, histories, mirrors_, pins_);
      contact.found = contact.reason.empty();
      break;
    }
    if (contact.found && !contact.settled)
      contact.reason = "the largest contact pressure did not come within the tolerance";
    contact.settled = contact.settled && contact.found;
  }

  const Plate& plate_;
  HookeLaw material_;
  UnitLoad load_;
  mesh::Mirrors mirrors_;
  std::vector<HeldEdge> held_;
  std::vector<Pin> pins_;
  std::vector<Arc> arcs_;
  Room room_;
  mesh::Mesh mesh_;
  double off_ = 0.0;  ///< how far the arcs found lie from those the mesh was made for, of half an arc
};

}  // namespace

Contact find_contact(const Plate& plate, const HookeLaw& material, const Traction& other,
                     mesh::Mirrors mirrors, const std::vector<HeldEdge>& held, const std::vector<Pin>& pins,
                     double tolerance) {
  // A pin with both mirror lines has no force; one of them is as good.
  if (mirrors.x && mirrors.y) mirrors.x = false;
  return Run(plate, material, other, mirrors, held, pins).find(tolerance);
}

}  // namespace raiser::solver
