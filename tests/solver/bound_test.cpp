#include "solver/adapt/bound.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <vector>

namespace raiser::solver {
namespace {

/// Values of degrees 3 to `last` whose error is (1 / degree)^power.
std::vector<double> algebraic(double power, int last) {
  std::vector<double> values;
  for (int p = 3; p <= last; ++p) values.push_back(1 + std::pow(p, -power));
  return values;
}

TEST(TailFactor, CoversWhatAPowerOfTheDegreeLeaves) {
  for (const double power : {1.5, 2.0, 3.0, 4.0})
    for (const int last : {5, 6, 7, 8}) {
      const std::vector<double> values = algebraic(power, last);
      const double error = values.back() - 1;
      EXPECT_GT(error_bound(values, 1.0, tail_factor(values, last)), error) << power << ", degree " << last;
      EXPECT_LT(error_bound(values, 1.0, tail_factor(values, last)), 4 * error) << power << ", " << last;
    }
}

TEST(TailFactor, IsLittleWhereDifferencesFallFast) {
  EXPECT_EQ(tail_factor(std::vector{1.0, 1.1, 1.101}, 5), 1.25);
  EXPECT_EQ(tail_factor(std::vector{1.0, 1.1, 1.1}, 5), 1.25);
}

TEST(TailFactor, HasAnEnd) {
  EXPECT_EQ(tail_factor(std::vector{1.0, 1.1, 1.2}, 5), 6.0);
  EXPECT_EQ(tail_factor(std::vector{1.0, 1.0, 1.2}, 5), 6.0);
  EXPECT_EQ(tail_factor(std::vector{1.0, 1.1}, 5), 6.0);
}

TEST(ErrorBound, IsWiderWhereDifferencesFallSlowly) {
  const std::vector<double> values{1.0, 1.1, 1.14};
  EXPECT_NEAR(error_bound(values, 0.0), 0.04, 1e-12);
  EXPECT_NEAR(error_bound(values, 0.0, 2.5), 0.1, 1e-12);
}

}  // namespace
}  // namespace raiser::solver
