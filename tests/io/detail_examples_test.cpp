// What the lug with a pin and the composite strip among the examples are expected to give.
#include <gtest/gtest.h>

#include <cmath>
#include <filesystem>
#include <numbers>
#include <stdexcept>

#include "io/case/case.hpp"

namespace raiser::io {
namespace {

constexpr double degree = std::numbers::pi / 180;

struct Solved {
  Case input;
  solver::Solution solution;
};

Solved example(const char* name) {
  CaseReading reading = read_case(std::filesystem::path(RAISER_SOURCE_DIR) / "examples" / name);
  if (!reading.value) throw std::runtime_error(text(reading.faults.front()));
  solver::Solution solution = solver::settle(reading.value->problem, reading.value->asks);
  EXPECT_EQ(solution.status, solver::Solution::Status::settled) << solution.reason;
  return {*std::move(reading.value), std::move(solution)};
}

void expect_within(const solver::Estimate& found, double exact, const char* what) {
  EXPECT_LE(std::abs(found.value - exact), found.bound)
      << what << " " << found.value << " +- " << found.bound;
}

// The numbers are what the same case gives when 2e-5 is asked for.
TEST(DetailExamples, LugWithAPinInContact) {
  const Solved lug = example("lug.toml");
  const solver::RaiserFindings& eye = lug.solution.combined.raisers.at(0);
  expect_within(eye.largest.stress, 326.51677, "largest stress");
  EXPECT_NEAR(std::abs(eye.largest.angle), 78.475 * degree, 0.05 * degree);
  EXPECT_NEAR(eye.net.nominal, 20000 / (24.0 * 8), 1e-4);
  ASSERT_EQ(lug.solution.pins.size(), 1U);
  const solver::PinFindings& pin = lug.solution.pins[0];
  expect_within(pin.largest, 231.82240, "largest pressure");
  expect_within(pin.begin, 5.4173200, "beginning of the arc");
  expect_within(pin.end, 7.1490506, "end of the arc");
  EXPECT_NEAR(pin.largest_at, 2 * std::numbers::pi, 1e-6);
  EXPECT_LT(pin.force_miss, 1e-10);
  EXPECT_NEAR(lug.solution.reactions.at(0).reaction.force.x(), -20000, 0.01);
  EXPECT_NEAR(lug.solution.reactions.at(0).reaction.force.y(), 0, 0.01);
}

// The numbers are what the same case gives when 1e-7 is asked for.
TEST(DetailExamples, CompositeStripIsMostStressedBesideTheDiameterAcross) {
  const Solved strip = example("composite-strip.toml");
  const solver::RaiserFindings& bolt = strip.solution.combined.raisers.at(0);
  expect_within(bolt.largest.stress, 621.67103, "largest stress");
  ASSERT_TRUE(bolt.gross.kt);
  expect_within(*bolt.gross.kt, 6.2167103, "Kt gross");
  // At both of two opposite places; across, at 90 degrees, an isotropic strip has it.
  const double angle = bolt.largest.angle < 0 ? bolt.largest.angle + std::numbers::pi : bolt.largest.angle;
  EXPECT_NEAR(angle, 101.572 * degree, 0.05 * degree);
}

}  // namespace
}  // namespace raiser::io
