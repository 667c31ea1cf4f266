#include <algorithm>
#include <array>
#include <cmath>
#include <exception>
#include <numbers>
#include <tuple>
#include <utility>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/sequence.hpp"
#include "validation/calibrate/trial.hpp"
#include "validation/exact/exact.hpp"

namespace raiser::validation {

namespace {

/// A plate with one hole whose stress field is known.
struct Exact {
  mesh::Plate plate;
  std::string load;
  StressField field;  ///< in the plate's axes
  double smallest = 0.0;
  double largest = 0.0;
  double normal = 0.0;  ///< stress normal to the hole's edge, MPa
};

/// Numbers spread evenly over [0, 1): multiples of square roots of primes,
/// modulo 1 (H. Weyl, Math. Ann. 77 (1916) 313-352).
class Spread {
 public:
  explicit Spread(std::uint64_t seed) : factor_(static_cast<double>(seed + 1)) {}
  double between(double low, double high) {
    static constexpr std::array primes{2.0, 3.0, 5.0, 7.0, 11.0, 13.0, 17.0, 19.0, 23.0, 29.0};
    const double x = factor_ * std::sqrt(primes.at(next_++));
    return low + (high - low) * (x - std::floor(x));
  }

 private:
  double factor_;
  std::size_t next_ = 0;
};

mesh::Plate plate_with_hole(Spread& spread, bool is_circle) {
  mesh::Plate plate;
  plate.width = 100.0;
  plate.length = spread.between(80.0, 300.0);
  plate.thickness = 1.0;
  mesh::Hole hole;
  hole.name = "hole";
  hole.shape = is_circle ? mesh::HoleShape::circle : mesh::HoleShape::ellipse;
  const double ratio = is_circle ? 1.0 : std::pow(10.0, spread.between(-1.0, 1.0));
  const double longest = spread.between(5.0, 60.0);
  hole.length = longest * std::min(1.0, ratio);
  hole.width = longest * std::min(1.0, 1.0 / ratio);
  hole.angle = is_circle ? 0.0 : spread.between(0.0, std::numbers::pi);
  const double room_x = 0.9 * (plate.length - longest) / 2, room_y = 0.9 * (plate.width - longest) / 2;
  const double x = spread.between(-room_x, room_x), y = spread.between(-room_y, room_y);
  hole.centre = {x, y};
  plate.holes.push_back(hole);
  return plate;
}

void press(Exact& exact, double pressure) {
  const mesh::Hole& hole = exact.plate.holes.front();
  const Ellipse ellipse{hole.length / 2, hole.width / 2};
  exact.load = "pressure";
  exact.normal = -pressure;
  if (hole.shape == mesh::HoleShape::circle) {
    exact.field = [pressure, ellipse](const Point& x) { return lame(pressure, ellipse.along_x, x); };
    exact.smallest = exact.largest = pressure;
    return;
  }
  exact.field = [pressure, ellipse](const Point& x) { return inglis_pressure(pressure, ellipse, x); };
  const auto [low, high] = inglis_extremes({pressure, pressure, 0.0}, ellipse);
  exact.smallest = low - pressure;
  exact.largest = high - pressure;
}

void pull(Exact& exact, const RemoteStress& remote) {
  const mesh::Hole& hole = exact.plate.holes.front();
  const Ellipse ellipse{hole.length / 2, hole.width / 2};
  exact.load = "remote stress";
  if (hole.shape == mesh::HoleShape::circle) {
    exact.field = [remote, ellipse](const Point& x) { return kirsch(remote, ellipse.along_x, x); };
    const double range = 2 * std::hypot(remote.xx - remote.yy, 2 * remote.xy);
    exact.smallest = remote.xx + remote.yy - range;
    exact.largest = remote.xx + remote.yy + range;
    return;
  }
  exact.field = [remote, ellipse](const Point& x) { return inglis(remote, ellipse, x); };
  std::tie(exact.smallest, exact.largest) = inglis_extremes(remote, ellipse);
}

Exact exact_case(std::uint64_t seed) {
  Spread spread(seed);
  Exact exact;
  exact.plate = plate_with_hole(spread, seed % 2 == 0);
  const double xx = spread.between(-100, 200), yy = spread.between(-100, 200), xy = spread.between(-80, 80);
  if (seed % 4 < 2)
    pull(exact, {xx, yy, xy});
  else
    press(exact, 150.0 + xx / 2);
  const mesh::Hole& hole = exact.plate.holes.front();
  exact.field = placed(std::move(exact.field), hole.centre, hole.angle);
  return exact;
}

double edge_von_mises(double tangential, double normal) {
  return solver::von_mises({.xx = tangential, .yy = normal});
}

std::vector<Trial> hold_exact(const Exact& exact, const solver::DegreeSequence& sequence) {
  // The von Mises stress is convex in the tangential stress: largest at an end of its range.
  const double equivalent =
      std::max(edge_von_mises(exact.smallest, exact.normal), edge_von_mises(exact.largest, exact.normal));
  const std::array truths{exact.largest, exact.smallest, equivalent};
  std::vector<Trial> trials;
  for (std::size_t q = 0; q < solver::quantity_count; ++q) {
    Trial trial = trial_at(exact.plate, 0, static_cast<Trial::What>(q));
    trial.load = exact.load;
    trial.scale = std::max(std::abs(exact.smallest), std::abs(exact.largest));
    const auto found = sequence.value(0, 0, static_cast<solver::Quantity>(q));
    hold(trial, found.stress, {truths[q], 1e-13 * trial.scale});
    trials.push_back(std::move(trial));
  }
  return trials;
}

/// The degrees of solver::settle on its first mesh; settle itself takes no
/// tractions of a caller's own.
bool raise_degree(solver::DegreeSequence& sequence) {
  constexpr int first = 3, last = 8;
  for (int degree = first; degree <= last; ++degree) {
    sequence.solve(degree);
    double worst = 0.0;
    for (const auto q : {solver::Quantity::largest_edge_stress, solver::Quantity::smallest_edge_stress,
                         solver::Quantity::von_mises})
      worst = std::max(worst, sequence.excess({q, 0, calibration_tolerance, ""}));
    if (worst <= 1.0) return true;
  }
  return false;
}

}  // namespace

PlateTrial try_closed_form(std::uint64_t seed) {
  PlateTrial plate;
  plate.seed = seed;
  plate.truth = PlateTrial::Truth::closed_form;
  try {
    const Exact exact = exact_case(seed);
    const double start = cpu_seconds();
    const solver::HookeLaw material{2e5, 0.3, solver::PlaneState::stress};
    const solver::Model model(mesh::triangulate(mesh::trace(exact.plate), {}), {}, material,
                              exact.plate.thickness, {{exact.load, traction_of(exact.field)}});
    solver::DegreeSequence sequence(model, exact.plate);
    plate.is_settled = raise_degree(sequence);
    if (!plate.is_settled) plate.reason = "the highest degree does not meet the tolerance";
    plate.cpu_seconds = cpu_seconds() - start;
    plate.degree = sequence.displacements().back().degree;
    plate.triangles = model.mesh().triangles().size();
    plate.unknowns = static_cast<std::size_t>(sequence.displacements().back().values.rows());
    plate.trials = hold_exact(exact, sequence);
  } catch (const std::exception& e) {
    plate.is_settled = false;
    plate.reason = std::string("failed: ") + e.what();
  }
  return plate;
}

}  // namespace raiser::validation
