#include "solver/contact/contact.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/bound.hpp"
#include "solver/contact/arcs.hpp"

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

/// The values of one arc in a sequence of degrees.
struct History {
  std::vector<double> begin, end, largest;
  std::vector<BearingPressure> pressure;

  void add(const BearingPressure& now) {
    begin.push_back(now.begin);
    end.push_back(now.end);
    largest.push_back(largest_of(now).first);
    pressure.push_back(now);
  }
  ContactArc arc() const {
    ContactArc result;
    result.pressure = pressure.back();
    result.all_round = result.pressure.form == BearingPressure::Form::ring;
    result.begin = estimate(begin, 1.0, 4);
    result.end = estimate(end, 1.0, 4);
    result.largest = estimate(largest, largest.back(), 2);
    result.largest_at = largest_of(result.pressure).second;
    return result;
  }
  const BearingPressure& before() const { return pressure[pressure.size() > 1 ? pressure.size() - 2 : 0]; }
};

/// Whether the bounds are within the tolerance. An arc of a quarter turn to either
/// side or more ends where the edge stress is largest, with a root: there its
/// ends have to be known better than the largest pressure.
bool is_within(const ContactArc& arc, double largest, double tolerance) {
  constexpr double wide = 1.3;    // rad, half the arc
  constexpr double least = 6e-6;  // rad, what is left to doubt
  constexpr double at_end = 0.1;  // rad for each of the tolerance
  if (arc.largest.bound > tolerance * largest) return false;
  const double half = 0.5 * (arc.end.value - arc.begin.value);
  return arc.all_round || half < wide ||
         std::max(arc.begin.bound, arc.end.bound) <= std::max(least, at_end * tolerance);
}

double largest_of(const PinContact& contact) {
  double largest = 0.0;
  for (const ContactArc& arc : contact.arcs) largest = std::max(largest, arc.largest.value);
  return largest;
}

/// Why what was found breaks the conditions of contact, or nothing: a tension,
/// or a pin that goes through the material beside its arcs.
std::string breach(const PinSystem& system, const PinSystem::Answer& answer,
                   const std::vector<PinContact>& contacts, mesh::Mirrors mirrors,
                   const std::vector<Pin>& pins) {
  for (std::size_t p = 0; p < pins.size(); ++p) {
    double least = 0.0, deepest = 0.0, widest = 0.0;
    std::vector<double> free;
    for (int k = 0; k < 144; ++k) {
      const double angle = pins[p].direction() + 2 * pi * (k + 0.5) / 144;
      bool touches = false;
      for (const ContactArc& arc : contacts[p].arcs) {
        if (!arc.all_round && unwound(angle, arc.pressure.begin) >= arc.pressure.end) continue;
        touches = true;
        least = std::min(least, arc.pressure.at(angle));
      }
      const Point seen(std::cos(angle), std::sin(angle));
      const bool meshed = (!mirrors.x || seen.x() > 0) && (!mirrors.y || seen.y() > 0);
      if (!touches && meshed) free.push_back(angle);
    }
    const Eigen::VectorXd gap = system.gap(answer, p, free);
    if (gap.size() > 0) {
      deepest = -gap.minCoeff();
      widest = gap.maxCoeff();
    }
    if (least < -1e-3 * largest_of(contacts[p]))
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
  for (const Arc& arc : arcs)
    for (const double angle : {arc.begin, arc.end})
      if (arc.form != Arc::Form::ring)
        ends.push_back({pins[arc.pin].owner,
                        pins[arc.pin].centre + pins[arc.pin].radius * Point(std::cos(angle), std::sin(angle)),
                        share * arc.half() * pins[arc.pin].radius});
  return mesh::triangulate(mesh::cut(mesh::broken(mesh::trace(plate), ends), mirrors), mesh::SizeRule{});
}

/// How far two states of the arcs lie apart, of half an arc; 1 where they are not the same arcs.
double distance(const std::vector<Arc>& a, const std::vector<Arc>& b) {
  if (a.size() != b.size()) return 1.0;
  double off = 0.0;
  for (std::size_t k = 0; k < a.size(); ++k) {
    if (a[k].pin != b[k].pin || a[k].form != b[k].form) return 1.0;
    if (a[k].form == Arc::Form::ring) continue;
    off = std::max(
        {off, std::abs(a[k].begin - b[k].begin) / b[k].half(), std::abs(a[k].end - b[k].end) / b[k].half()});
  }
  return off;
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
    search_.emplace(mirrors_, pins_);
  }

  Contact find(double tolerance) {
    Contact contact;
    if (contact.reason = start(); !contact.reason.empty()) return contact;
    if (contact.reason = fit(); !contact.reason.empty()) return contact;
    sequence(tolerance, contact);
    return contact;
  }

 private:
  Model model(mesh::Mesh mesh) const {
    return {std::move(mesh), mirrors_, material_, plate_.thickness, {load_}, held_};
  }
  mesh::Mesh fitting() const {
    std::vector<Arc> all;
    for (std::size_t p = 0; p < pins_.size(); ++p)
      for (const Arc& arc : search_->of_pin(arcs_, p)) all.push_back(arc);
    return mesh_for(plate_, mirrors_, pins_, all);
  }

  std::string start() {
    const Model plain = model(fitting());
    arcs_ = search_->shown(PinSystem(plain, 4, pins_, room_).unilateral(places));
    for (std::size_t p = 0; p < pins_.size(); ++p)
      if (search_->of_pin(arcs_, p).empty()) return "a pin touches its hole nowhere";
    return "";
  }

  /// Meshes that fit the arcs, until the arcs found with one fit it.
  /// The mesh has to fit better than by the length of its sides at the ends.
  std::string fit() {
    constexpr double fits = 0.002;
    constexpr int degree = 4;
    for (int pass = 0; pass < 8; ++pass) {
      mesh_ = fitting();
      std::vector<Arc> next = arcs_;
      const Model fitted = model(mesh_);
      const double move =
          search_->move_ends(PinSystem(fitted, degree, pins_, room_), terms_for(degree), next, 0.1 * fits, 6);
      off_ = distance(arcs_, next);
      arcs_ = std::move(next);
      if (off_ <= fits && move <= fits) return "";
    }
    return "the ends of the arc of contact were not found";
  }

  void sequence(double tolerance, Contact& contact) {
    constexpr double close = 3e-4;  // of half the arc, for a mesh that few digits do not need made again
    if (off_ > close || tolerance < 1e-4) mesh_ = fitting();
    const Model fitted = model(mesh_);
    std::vector<History> histories;
    for (int degree = first_degree(tolerance); degree <= last_degree; ++degree) {
      const PinSystem system(fitted, degree, pins_, room_);
      const std::vector<Arc> before = arcs_;
      search_->move_ends(system, terms_for(degree), arcs_, 0.01 * tolerance, 8);
      if (distance(before, arcs_) >= 1.0 || histories.empty())
        histories.assign(arcs_.size(), {});  // other arcs than before
      const auto answer = search_->pressures(system, terms_for(degree), arcs_);
      contact.degree = degree;
      contact.unknowns = static_cast<std::size_t>(Discretisation(mesh_, degree).unknowns());
      for (std::size_t k = 0; k < arcs_.size(); ++k)
        histories[k].add(search_->pressure(arcs_[k], answer.terms[k]));
      contact.pins = contacts(histories);
      contact.settled = true;
      for (const PinContact& pin : contact.pins)
        for (const ContactArc& arc : pin.arcs)
          contact.settled = contact.settled && is_within(arc, largest_of(pin), tolerance);
      if (!contact.settled && degree < last_degree) continue;
      contact.reason = breach(system, answer, contact.pins, mirrors_, pins_);
      contact.found = contact.reason.empty();
      break;
    }
    if (contact.found && !contact.settled)
      contact.reason = "the largest contact pressure did not come within the tolerance";
    contact.settled = contact.settled && contact.found;
  }

  /// By pin, with the images of arcs that have one.
  std::vector<PinContact> contacts(const std::vector<History>& histories) const {
    std::vector<PinContact> result(pins_.size());
    for (std::size_t k = 0; k < arcs_.size(); ++k) {
      const std::size_t pin = arcs_[k].pin;
      const ContactArc arc = histories[k].arc();
      result[pin].arcs.push_back(arc);
      result[pin].before.push_back(histories[k].before());
      if (!search_->has_image(arcs_[k])) continue;
      const BearingPressure image = search_->image(arc.pressure, pin);
      result[pin].arcs.push_back({image,
                                  false,
                                  {image.begin, arc.end.bound},
                                  {image.end, arc.begin.bound},
                                  arc.largest,
                                  image.begin + arc.pressure.end - arc.largest_at});
      result[pin].before.push_back(search_->image(histories[k].before(), pin));
    }
    return result;
  }

  const Plate& plate_;
  HookeLaw material_;
  UnitLoad load_;
  mesh::Mirrors mirrors_;
  std::vector<HeldEdge> held_;
  std::vector<Pin> pins_;
  std::optional<ArcSearch> search_;
  std::vector<Arc> arcs_;
  Room room_;
  mesh::Mesh mesh_;
  double off_ = 0.0;  ///< how far the arcs found lie from those the mesh was made for, of half an arc
};

}  // namespace

std::vector<BearingPressure> pressures(const std::vector<ContactArc>& arcs) {
  std::vector<BearingPressure> result;
  for (const ContactArc& arc : arcs) result.push_back(arc.pressure);
  return result;
}

Contact find_contact(const Plate& plate, const HookeLaw& material, const Traction& other,
                     mesh::Mirrors mirrors, const std::vector<HeldEdge>& held, const std::vector<Pin>& pins,
                     double tolerance) {
  // A pin with both mirror lines has no force; one of them is as good.
  if (mirrors.x && mirrors.y) mirrors.x = false;
  return Run(plate, material, other, mirrors, held, pins).find(tolerance);
}

}  // namespace raiser::solver
