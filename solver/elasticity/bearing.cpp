#include "solver/elasticity/bearing.hpp"

#include <cmath>
#include <numbers>

namespace raiser::solver {

namespace {

constexpr double pi = std::numbers::pi;

double on_arc(const std::vector<double>& terms, double s) {
  const double phi = std::acos(s);  // sqrt(1 - s^2) U_k(s) = sin (k + 1) phi
  double sum = 0.0;
  for (std::size_t k = 0; k < terms.size(); ++k)
    sum += terms[k] * std::sin((static_cast<double>(k) + 1) * phi);
  return sum;
}

double all_round(const std::vector<double>& terms, double t) {
  double sum = terms.empty() ? 0.0 : terms[0];
  for (std::size_t i = 1; i < terms.size(); ++i) {
    const std::size_t wave = (i + 1) / 2;
    const auto k = static_cast<double>(wave);
    sum += terms[i] * (i % 2 == 1 ? std::cos(k * t) : std::sin(k * t));
  }
  return sum;
}

}  // namespace

double unwound(double angle, double begin) {
  const double turn = 2 * pi;
  const double t = angle - turn * std::floor((angle - begin) / turn);
  return t < begin + turn ? t : begin;
}

double BearingPressure::at(double angle) const {
  if (form == Form::ring) return all_round(terms, angle - begin);
  const double t = unwound(angle, begin);
  if (t > end) return 0.0;
  if (form == Form::cosine) return terms.at(0) * std::cos(t - middle());
  return on_arc(terms, std::fmin(1.0, std::fmax(-1.0, (t - middle()) / (0.5 * (end - begin)))));
}

BearingPressure cosine_pressure(double force, double direction, double radius, double thickness) {
  return {BearingPressure::Form::cosine,
          direction - pi / 2,
          direction + pi / 2,
          {2 * force / (pi * radius * thickness)}};
}

}  // namespace raiser::solver
