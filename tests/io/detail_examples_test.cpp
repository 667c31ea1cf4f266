// What the lug with a pin and the composite strip among the examples are expected to give.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "tests/io/example.hpp"

namespace raiser::io {
namespace {

constexpr double degree = std::numbers::pi / 180;

// The numbers are what the same case gives when 2e-5 is asked for.
TEST(DetailExamples, LugWithAPinInContact) {
  const test::Example lug = test::example("lug.toml");
  const solver::RaiserFindings& eye = lug.solution.combined.raisers.at(0);
  test::expect_within(eye.largest.stress, 326.51677, "largest stress");
  EXPECT_NEAR(std::abs(eye.largest.angle), 78.475 * degree, 0.05 * degree);
  EXPECT_NEAR(eye.net.nominal, 20000 / (24.0 * 8), 1e-4);
  ASSERT_EQ(lug.solution.pins.size(), 1U);
  const solver::ContactArc& pin = lug.solution.pins[0].arcs.at(0);
  test::expect_within(pin.largest, 231.82240, "largest pressure");
  test::expect_within(pin.begin, 5.4173200, "beginning of the arc");
  test::expect_within(pin.end, 7.1490506, "end of the arc");
  EXPECT_NEAR(pin.largest_at, 2 * std::numbers::pi, 1e-6);
  EXPECT_LT(lug.solution.pins[0].force_miss, 1e-10);
  EXPECT_NEAR(lug.solution.reactions.at(0).reaction.force.x(), -20000, 0.01);
  EXPECT_NEAR(lug.solution.reactions.at(0).reaction.force.y(), 0, 0.01);
}

// The numbers are what the same case gives when 1e-7 is asked for.
TEST(DetailExamples, CompositeStripIsMostStressedBesideTheDiameterAcross) {
  const test::Example strip = test::example("composite-strip.toml");
  const solver::RaiserFindings& bolt = strip.solution.combined.raisers.at(0);
  test::expect_within(bolt.largest.stress, 621.67103, "largest stress");
  ASSERT_TRUE(bolt.gross.kt);
  test::expect_within(*bolt.gross.kt, 6.2167103, "Kt gross");
  // At both of two opposite places; across, at 90 degrees, an isotropic strip has it.
  const double angle = bolt.largest.angle < 0 ? bolt.largest.angle + std::numbers::pi : bolt.largest.angle;
  EXPECT_NEAR(angle, 101.572 * degree, 0.05 * degree);
}

}  // namespace
}  // namespace raiser::io
