#include "solver/extract/estimate.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <cstdlib>
#include <limits>
#include <random>

namespace raiser::solver {
namespace {

constexpr double infinite = std::numeric_limits<double>::infinity();

void expect_text(double value, double bound, const std::string& text, const std::string& bound_text) {
  EXPECT_EQ(digits({value, bound}), text) << value << " +- " << bound;
  EXPECT_EQ(bound_digits({value, bound}), bound_text) << value << " +- " << bound;
}

TEST(Digits, StopAtTheBoundsLeadingDigit) {
  expect_text(313.4187, 0.03, "313.42", "0.04");  // 0.03 and the 0.0013 rounded off
  expect_text(1.0, 0.03, "1.00", "0.03");
  expect_text(1.0, 0.07, "1.00", "0.07");  // 0.07 / 0.01 is more than 7 in binary
  expect_text(1.0, 0.0701, "1.00", "0.08");
  expect_text(1.0, 0.099, "1.0", "0.1");
  expect_text(-3.14159, 0.002, "-3.142", "0.003");
  expect_text(9.996, 0.01, "10.00", "0.02");
  expect_text(31342.0, 300.0, "31300", "400");
  expect_text(99960.0, 100.0, "100000", "200");
  expect_text(3.0, 1e-9, "3.000000000", "1e-09");
}

TEST(Digits, OfValuesBelowTheirBoundAreZero) {
  expect_text(0.001, 0.03, "0.00", "0.04");
  expect_text(-0.001, 0.03, "0.00", "0.04");
  expect_text(0.02, 0.03, "0.00", "0.05");
  expect_text(-0.0, 0.5, "0.0", "0.5");
  expect_text(3.0, 50.0, "0", "60");
  expect_text(1e-13, 1e-12, "0", "2e-12");
}

TEST(Digits, OfHugeAndSmallValuesTurnScientific) {
  expect_text(2.1e11, 3e7, "2.1000e+11", "3e+07");
  expect_text(1.23456e-9, 2e-12, "1.235e-09", "3e-12");
  expect_text(9.9996e-9, 1e-12, "1.0000e-08", "2e-12");
  expect_text(9999999.9, 1.0, "1.0000000e+07", "2");
}

TEST(Digits, WithoutABoundAreThreeAndWithoutErrorTen) {
  expect_text(313.4187, infinite, "313", "unknown");
  expect_text(31341.87, infinite, "31300", "unknown");
  expect_text(0.00123456, infinite, "0.00123", "unknown");
  expect_text(0.0, infinite, "0", "unknown");
  expect_text(2.0 / 3.0, 0.0, "0.6666666667", "0");
  expect_text(0.0, 0.0, "0", "0");
  expect_text(-0.0, 0.0, "0", "0");
  expect_text(1.0, std::nan(""), "1.00", "unknown");
  expect_text(1.0, -0.1, "1.00", "unknown");
  expect_text(std::nan(""), 0.1, "undefined", "unknown");
  expect_text(infinite, 0.1, "unbounded", "unknown");
}

TEST(Digits, NeverExceedWhatADoubleHolds) { EXPECT_EQ(digits({313.4187, 1e-30}), "313.418700000000"); }

// The promise itself: value +- bound lies within what is printed, nothing
// printed lies below the bound's leading digit, the bound grows by little.
TEST(Digits, PrintedIntervalHoldsTheGivenOne) {
  std::mt19937 random(11);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  for (int trial = 0; trial < 20000; ++trial) {
    const double value = (unit(random) - 0.5) * std::pow(10.0, 24.0 * unit(random) - 12.0);
    const double bound = std::abs(value) * std::pow(10.0, 2.0 - 14.0 * unit(random));
    const std::string text = digits({value, bound});
    const std::string bound_text = bound_digits({value, bound});
    const double v = std::strtod(text.c_str(), nullptr);
    const double b = std::strtod(bound_text.c_str(), nullptr);
    const double slack = 1e-15 * std::abs(value);
    EXPECT_LE(v - b, value - bound + slack) << text << " +- " << bound_text;
    EXPECT_GE(v + b, value + bound - slack) << text << " +- " << bound_text;
    EXPECT_LE(b, 2.0 * (bound + std::abs(v - value)) * (1.0 + 1e-12)) << text << " +- " << bound_text;
    EXPECT_EQ(text == "-0" || text.find("-0.0000") == 0, false) << text;
    const double place = std::pow(10.0, std::floor(std::log10(b) + 1e-9));
    EXPECT_NEAR(v / place, std::nearbyint(v / place), 1e-3 + 1e-15 * std::abs(v / place))
        << text << " +- " << bound_text;
  }
}

}  // namespace
}  // namespace raiser::solver
