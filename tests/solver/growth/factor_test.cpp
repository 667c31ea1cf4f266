#include "solver/growth/factor.hpp"

#include <gtest/gtest.h>

#include <cmath>

namespace raiser::solver {
namespace {

std::vector<XY> sampled(double low, double high, int count, double (*y)(double)) {
  std::vector<XY> points;
  for (int i = 0; i < count; ++i) {
    const double x = low + (high - low) * i / (count - 1);
    points.push_back({x, y(x)});
  }
  return points;
}

/// B. Gross and J. E. Srawley, NASA TN D-2603 (1964): a quartic for the edge crack in tension.
double edge_crack(double x) { return 1.12 + x * (-0.231 + x * (10.55 + x * (-21.72 + x * 30.39))); }

TEST(Fit, GivesAPolynomialBack) {
  const auto points = sampled(0.1, 0.6, 21, edge_crack);
  const auto fitted = fit(points, 1e-7);
  ASSERT_TRUE(fitted);
  EXPECT_EQ(fitted->coefficients.size(), 5u);
  EXPECT_TRUE(fitted->is_within());
  for (const double x : {0.11, 0.3333, 0.59}) EXPECT_NEAR(fitted->at(x), edge_crack(x), 1e-7);
  // Its own words: powers of s.
  const double s = (2 * 0.2 - 0.7) / 0.5;
  double sum = 0.0;
  for (std::size_t k = 0; k < fitted->coefficients.size(); ++k)
    sum += fitted->coefficients[k] * std::pow(s, k);
  EXPECT_NEAR(sum, edge_crack(0.2), 1e-7);
}

TEST(Fit, TakesTheLowestDegreeThatKeepsTheTolerance) {
  const auto points = sampled(0.05, 0.9, 60, [](double x) { return 1.0 / std::sqrt(1 - x); });
  const auto coarse = fit(points, 3e-2);
  const auto fine = fit(points, 1e-3);
  ASSERT_TRUE(coarse && fine);
  EXPECT_LT(coarse->coefficients.size(), fine->coefficients.size());
  EXPECT_LE(coarse->error, 3e-2);
  EXPECT_LE(fine->error, 1e-3);
  // The largest error is that over all points, those left out among them.
  double worst = 0.0;
  for (const XY& p : points) worst = std::max(worst, std::abs(coarse->at(p.x) / p.y - 1));
  EXPECT_NEAR(coarse->error, worst, 1e-14);
  EXPECT_LE(coarse->error_between, coarse->error);
  EXPECT_GT(coarse->error_between, 0.0);
}

TEST(Fit, SaysHowFarItMissesATolerance) {
  const auto points =
      sampled(0.0, 1.0, 9, [](double x) { return 1.0 + (x > 0.4 && x < 0.6 ? 1.0 : 0.0); });  // a spike
  const auto fitted = fit(points, 1e-6);
  ASSERT_TRUE(fitted);
  EXPECT_FALSE(fitted->is_within());
  EXPECT_GT(fitted->error, 0.01);
}

TEST(Fit, NeedsFivePointsOfOneSign) {
  EXPECT_FALSE(fit(sampled(0.1, 0.5, 4, edge_crack), 1e-3));
  EXPECT_FALSE(fit(sampled(-1.0, 1.0, 9, [](double x) { return x; }), 1e-3));
  EXPECT_TRUE(fit(sampled(0.1, 0.5, 9, [](double x) { return -edge_crack(x); }), 1e-3));
}

}  // namespace
}  // namespace raiser::solver
