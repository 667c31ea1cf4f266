#pragma once

#include <cmath>
#include <string>
#include <vector>

#include "mesh/plate/distance.hpp"
#include "solver/solution.hpp"

namespace raiser::bench {

inline solver::Problem in_tension(mesh::Plate plate) {
  solver::Load tension;
  tension.name = "tension";
  tension.stress = 100.0;
  return {std::move(plate), {2e5, 0.3, solver::PlaneState::stress}, {tension}};
}

inline mesh::Hole circle(double diameter, const mesh::Point& centre, std::size_t number) {
  mesh::Hole hole;
  hole.name = "hole " + std::to_string(number);
  hole.length = hole.width = diameter;
  hole.centre = centre;
  return hole;
}

/// Circular hole of half the plate's width, plate four times as long as wide.
inline solver::Problem reference_case() {
  return in_tension({400.0, 100.0, 5.0, {circle(50.0, mesh::Point::Zero(), 1)}});
}
/// Its Kt gross, from two independent codes that agree to nine digits.
inline constexpr double reference_kt = 4.34760414;

/// 10 x 10 holes of 40 mm with a pitch of 100 mm. `shift` mm off the centre
/// there is no mirror line.
inline solver::Problem grid_of_holes(double shift) {
  mesh::Plate plate{1000.0, 1000.0, 5.0, {}};
  for (int i = 0; i < 10; ++i)
    for (int j = 0; j < 10; ++j)
      plate.holes.push_back(
          circle(40.0, {100.0 * i - 450.0 + shift, 100.0 * j - 450.0}, plate.holes.size() + 1));
  return in_tension(std::move(plate));
}

/// 100 circular holes of 20 to 70 mm at scattered places with ligaments of at
/// least 6 mm. Places are multiples of square roots modulo 1.
inline solver::Problem scattered_holes() {
  mesh::Plate plate{1000.0, 1000.0, 5.0, {}};
  const auto spread = [](int k, double prime) {
    const double x = k * std::sqrt(prime);
    return x - std::floor(x);
  };
  for (int k = 1; plate.holes.size() < 100; ++k) {
    const mesh::Point at(1000 * spread(k, 2.0) - 500, 1000 * spread(k, 3.0) - 500);
    const mesh::Hole hole = circle(20 + 50 * spread(k, 5.0), at, plate.holes.size() + 1);
    bool is_free = mesh::edge_distance(plate, hole) > 6.0;
    for (const mesh::Hole& other : plate.holes) is_free = is_free && mesh::gap(hole, other) > 6.0;
    if (is_free) plate.holes.push_back(hole);
  }
  return in_tension(std::move(plate));
}

/// The largest edge stress at every hole.
inline std::vector<solver::Ask> every_peak(const solver::Problem& problem, double tolerance) {
  std::vector<solver::Ask> asks;
  for (std::size_t h = 0; h < problem.plate.holes.size(); ++h)
    asks.push_back({solver::Quantity::largest_edge_stress, h, tolerance, ""});
  return asks;
}

}  // namespace raiser::bench
