#include "solver/growth/factor.hpp"

#include <fmt/format.h>

#include <Eigen/QR>
#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/plate/section.hpp"
#include "solver/crack/factors.hpp"

namespace raiser::solver {
namespace {

double scaled(double x, double low, double high) { return (2 * x - low - high) / (high - low); }

/// Coefficients of powers of s, of the sum of c[k] T_k(s).
std::vector<double> powers(const Eigen::VectorXd& c) {
  const auto n = static_cast<std::size_t>(c.size());
  std::vector<double> sum(n, 0.0), before(n, 0.0), now(n, 0.0);  // T_{k-1}, T_k
  now[0] = 1.0;
  for (std::size_t k = 0; k < n; ++k) {
    for (std::size_t i = 0; i < n; ++i) sum[i] += c[static_cast<Eigen::Index>(k)] * now[i];
    std::vector<double> next(n, 0.0);  // T_{k+1} = 2 s T_k - T_{k-1}, but T_1 = s
    for (std::size_t i = 0; i < n; ++i)
      next[i] = (i > 0 ? (k == 0 ? 1.0 : 2.0) * now[i - 1] : 0.0) - (k == 0 ? 0.0 : before[i]);
    before = std::move(now);
    now = std::move(next);
  }
  return sum;
}

double rounded(double value) {
  const double scale = std::pow(10.0, FittedPolynomial::digits);
  return std::round(value * scale) / scale;
}

FittedPolynomial fit_degree(std::span<const XY> points, const std::vector<bool>& is_left_out, int degree) {
  FittedPolynomial result;
  result.low = points.front().x;
  result.high = points.back().x;
  const auto used = std::count(is_left_out.begin(), is_left_out.end(), false);
  Eigen::MatrixXd basis(used, degree + 1);
  Eigen::Index row = 0;
  for (std::size_t i = 0; i < points.size(); ++i) {
    if (is_left_out[i]) continue;
    const double angle = std::acos(std::clamp(scaled(points[i].x, result.low, result.high), -1.0, 1.0));
    for (int k = 0; k <= degree; ++k) basis(row, k) = std::cos(k * angle) / points[i].y;
    ++row;
  }
  const Eigen::VectorXd c = basis.colPivHouseholderQr().solve(Eigen::VectorXd::Ones(used));
  for (const double power : powers(c)) result.coefficients.push_back(rounded(power));
  for (std::size_t i = 0; i < points.size(); ++i) {
    const double error = std::abs(result.at(points[i].x) / points[i].y - 1);
    if (error > result.error) result.worst_at = points[i].x;
    result.error = std::max(result.error, error);
    if (is_left_out[i]) result.error_between = std::max(result.error_between, error);
  }
  return result;
}

}  // namespace

double FittedPolynomial::at(double x) const {
  const double s = scaled(x, low, high);
  double sum = 0.0;
  for (std::size_t k = coefficients.size(); k-- > 0;) sum = sum * s + coefficients[k];
  return sum;
}

std::optional<FittedPolynomial> fit(std::span<const XY> points, double tolerance) {
  if (points.size() < 5) return std::nullopt;
  const bool is_positive = points.front().y > 0;
  for (const XY& p : points)
    if (p.y == 0.0 || (p.y > 0) != is_positive) return std::nullopt;
  std::vector<bool> is_left_out(points.size());
  for (std::size_t i = 1; i + 1 < points.size(); i += 2) is_left_out[i] = true;
  const auto used = static_cast<double>(std::count(is_left_out.begin(), is_left_out.end(), false));
  const int highest = std::min(static_cast<int>(used) - 1, static_cast<int>(2 * std::sqrt(used)));
  std::optional<FittedPolynomial> best;
  for (int degree = 1; degree <= highest; ++degree) {
    FittedPolynomial trial = fit_degree(points, is_left_out, degree);
    if (!best || trial.error < best->error) best = std::move(trial);
    if (best->error <= tolerance) break;
  }
  best->tolerance = tolerance;
  return best;
}

namespace {

void measure_width(const Plate& plate, const mesh::Crack& crack, GeometryFactor& factor) {
  const Point line = crack.points.back() - crack.points.front();
  const bool across = std::abs(line.y()) >= std::abs(line.x());
  Point at = crack.points.front();
  for (double& c : at)
    if (std::abs(c) < 1e-9 * plate.width) c = 0.0;
  const mesh::SectionShape shape =
      mesh::shape_of(across ? mesh::gross_along(plate, mesh::Direction::across, at.x())
                            : mesh::gross_along(plate, mesh::Direction::along, at.y()));
  factor.width = shape.high - shape.low;
  factor.width_definition = fmt::format("extent of the gross section at {} = {:.6g} mm", across ? "x" : "y",
                                        across ? at.x() : at.y());
}

}  // namespace

GeometryFactor geometry_factor(const Problem& problem, const GrowthPlan& plan, const Growth& growth,
                               double tolerance) {
  GeometryFactor result;
  const std::size_t tip = plan.tips.at(0);
  const mesh::Crack& crack = problem.plate.cracks.at(mesh::tips(problem.plate.cracks).at(tip).crack);
  measure_width(problem.plate, crack, result);
  TipFindings any;
  any.tip = tip;
  const CrackFactors factors = crack_factors(problem.plate, problem.loads, any);
  result.nominal = factors.nominal;
  result.definition = factors.definition;
  result.size_definition = factors.size_definition;
  result.why = factors.why;
  if (!result.why.empty()) return result;
  bool is_lost = false;
  for (const GrowthStep& step : growth.steps) {
    if (step.tips.empty()) continue;
    const Estimate& k = step.tips.front().k_one;
    const double a = step.length * crack_size(crack) / crack.length();
    is_lost = is_lost || std::abs(k.value) <= k.bound;
    result.points.push_back({a / result.width, k.value / (result.nominal * std::sqrt(std::numbers::pi * a))});
  }
  if (is_lost)
    result.why = "K_I is zero within its bound at some lengths";
  else if (result.points.size() < 5)
    result.why = "a fit needs five solved lengths or more";
  else if (result.fit = fit(result.points, tolerance); !result.fit)
    result.why = "K_I changes its sign";
  return result;
}

}  // namespace raiser::solver
