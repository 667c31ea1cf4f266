#include <gtest/gtest.h>

#include <algorithm>

#include "mesh/triangulate/triangulate.hpp"
#include "validation/calibrate.hpp"
#include "validation/calibrate/truth.hpp"
#include "validation/random_plate.hpp"

namespace raiser::validation {
namespace {

Trial made(double error, double bound, double doubt = 0.0) {
  Trial trial;
  trial.error = error;
  trial.bound = bound;
  trial.doubt = doubt;
  trial.load = "tension";
  trial.shape = "circle";
  return trial;
}

TEST(Calibration, AnErrorBeyondTheBoundIsOutside) {
  EXPECT_EQ(verdict(made(1.0, 2.0)), Verdict::within);
  EXPECT_EQ(verdict(made(1.0, 1.0)), Verdict::within);
  EXPECT_EQ(verdict(made(1.0001, 1.0)), Verdict::outside);
  EXPECT_EQ(verdict(made(0.9, 1.0, 0.2)), Verdict::undecided);
  EXPECT_EQ(verdict(made(1.1, 1.0, 0.2)), Verdict::undecided);
  EXPECT_EQ(verdict(made(1.3, 1.0, 0.2)), Verdict::outside);
}

TEST(Calibration, TallyCountsOnlyWhatIsSurelyWithin) {
  const Trial a = made(1, 2), b = made(3, 2), c = made(1, 1, 0.5), d = made(1, 10), e = made(1, 100);
  const Tally t = tally({&a, &b, &c, &d, &e});
  EXPECT_EQ(t.numbers, 5u);
  EXPECT_EQ(t.within, 3u);
  EXPECT_EQ(t.undecided, 1u);
  EXPECT_DOUBLE_EQ(t.coverage(), 0.6);
  EXPECT_DOUBLE_EQ(t.median_ratio, 2.0);
  EXPECT_DOUBLE_EQ(t.ratio_95, 100.0);
}

TEST(Calibration, ReportListsEveryMissAndEveryPlateNotSettled) {
  PlateTrial good, bad;
  good.seed = 4;
  good.is_settled = true;
  good.trials = {made(1, 2)};
  bad.seed = 17;
  bad.reason = "the bound stays wide";
  bad.trials = {made(3, 2)};
  const std::string text = calibration_report({good, bad});
  EXPECT_NE(text.find("1 of 2 settled"), std::string::npos) << text;
  EXPECT_NE(text.find("| **all** | 2 | 50.00 % | 1 | 0 |"), std::string::npos) << text;
  EXPECT_NE(text.find("- outside, seed 17, raiser 1"), std::string::npos) << text;
  EXPECT_NE(text.find("- seed 17: the bound stays wide"), std::string::npos) << text;
  EXPECT_EQ(text.find("seed 4"), std::string::npos) << text;
}

TEST(Calibration, LinesGiveThePlateBack) {
  PlateTrial plate;
  plate.seed = 9;
  plate.truth = PlateTrial::Truth::closed_form;
  plate.reason = "two\nlines";
  plate.degree = 6;
  plate.unknowns = 12345;
  plate.cpu_seconds = 0.1;
  plate.trials = {made(1.0 / 3, 2, 1e-300)};
  plate.trials.front().is_asked = false;
  const auto back = from_lines(to_lines(plate));
  ASSERT_EQ(back.size(), 1u);
  EXPECT_EQ(back[0].reason, "two lines");
  EXPECT_EQ(back[0].unknowns, 12345u);
  ASSERT_EQ(back[0].trials.size(), 1u);
  EXPECT_EQ(back[0].trials[0].error, 1.0 / 3);
  EXPECT_EQ(back[0].trials[0].load, "tension");
  EXPECT_FALSE(back[0].trials[0].is_asked);
  EXPECT_EQ(to_lines(back[0]), to_lines(from_lines(to_lines(back[0])).front()));
}

TEST(Calibration, DividedMeshHasFourTimesTheTrianglesAndTheSameBoundary) {
  const auto plate = random_plate(3).plate;
  const mesh::Mesh coarse = mesh::triangulate(mesh::trace(plate), {});
  const mesh::Mesh fine = divided(coarse);  // throws when it is not conforming
  EXPECT_EQ(fine.triangles().size(), 4 * coarse.triangles().size());
  EXPECT_EQ(fine.boundary().size(), 2 * coarse.boundary().size());
  for (const auto& side : fine.boundary()) {
    const auto& corners = fine.triangles()[side.triangle];
    const mesh::Point begin = side.curve.at(side.curve.begin), end = side.curve.at(side.curve.end);
    EXPECT_LT((fine.points()[corners[side.side]] - begin).norm(), 1e-12 * plate.length);
    EXPECT_LT((fine.points()[corners[(side.side + 1) % 3]] - end).norm(), 1e-12 * plate.length);
  }
}

void expect_settled_and_compared(const std::vector<PlateTrial>& plates) {
  for (const PlateTrial& plate : plates) {
    EXPECT_TRUE(plate.is_settled) << "seed " << plate.seed << ": " << plate.reason;
    EXPECT_FALSE(plate.trials.empty()) << "seed " << plate.seed << ": " << plate.reason;
  }
}

/// The short run of raiser_calibrate; the full one is in validation/calibration.md.
TEST(Calibration, BoundsHoldOnPlatesWithFewHoles) {
  std::vector<PlateTrial> plates;
  for (const std::uint64_t seed : seeds_with_few_holes(16, 2)) plates.push_back(try_random_plate(seed));
  for (std::uint64_t seed = 0; seed < 8; ++seed) plates.push_back(try_closed_form(seed));
  expect_settled_and_compared(plates);
  const Tally t = tally(peaks(plates));
  EXPECT_EQ(t.within, t.numbers) << calibration_report(plates);
  EXPECT_GT(t.numbers, 100u);
  EXPECT_LT(t.median_ratio, 30.0);
  EXPECT_GT(t.median_ratio, 2.0) << "bounds so close to the error are luck";
}

/// The short run on notches, shoulders and free outlines; the full one is there, too.
TEST(Calibration, BoundsHoldOnNotchesAndFillets) {
  std::vector<PlateTrial> plates;
  for (std::uint64_t seed = 0; seed < 4; ++seed) plates.push_back(try_outlined_plate(seed));
  expect_settled_and_compared(plates);
  const Tally t = tally(peaks(plates));
  EXPECT_GE(t.coverage(), 0.98) << calibration_report(plates);
  EXPECT_GT(t.numbers, 30u);
  EXPECT_LT(t.median_ratio, 60.0);
  EXPECT_GT(t.median_ratio, 2.0) << "bounds so close to the error are luck";
}

/// The short run on holes of drawn shapes; the full one is there, too.
TEST(Calibration, BoundsHoldOnDrawnHoles) {
  std::vector<PlateTrial> plates;
  for (std::uint64_t seed = 0; seed < 4; ++seed) plates.push_back(try_drawn_plate(seed));
  plates.push_back(try_drawn_plate(37));  // refined; three of its values agree by accident
  expect_settled_and_compared(plates);
  const std::vector<const Trial*> trials = peaks(plates);
  EXPECT_TRUE(std::any_of(trials.begin(), trials.end(), [](const Trial* t) { return t->shape == "drawn"; }));
  const Tally t = tally(trials);
  EXPECT_EQ(t.within, t.numbers) << calibration_report(plates);
  EXPECT_GT(t.numbers, 30u);
  EXPECT_LT(t.median_ratio, 60.0);
  EXPECT_GT(t.median_ratio, 2.0) << "bounds so close to the error are luck";
}

/// The short run on plates with cracks; the full one is in validation/calibration.md.
TEST(Calibration, BoundsOfKAndTHoldOnCrackedPlates) {
  std::vector<PlateTrial> plates;
  for (std::uint64_t seed = 0; seed < 6; ++seed) plates.push_back(try_cracked_plate(seed));
  expect_settled_and_compared(plates);
  const Tally t = tally(tip_values(plates));
  EXPECT_EQ(t.within, t.numbers) << calibration_report(plates);
  EXPECT_GT(t.numbers, 40u);
  EXPECT_LT(t.median_ratio, 40.0);
  EXPECT_GT(t.median_ratio, 2.0) << "bounds so close to the error are luck";
}

/// The short run on plates with pins, by cosine and in contact; the full one is in
/// validation/calibration.md.
TEST(Calibration, BoundsHoldOnPlatesWithPins) {
  std::vector<PlateTrial> plates;
  for (std::uint64_t seed = 0; seed < 8; ++seed) plates.push_back(try_pinned_plate(seed));
  expect_settled_and_compared(plates);
  const Tally t = tally(pin_values(plates));
  EXPECT_EQ(t.within, t.numbers) << calibration_report(plates);
  EXPECT_GT(t.numbers, 50u);
  EXPECT_LT(t.median_ratio, 40.0);
  EXPECT_GT(t.median_ratio, 2.0) << "bounds so close to the error are luck";
}

}  // namespace
}  // namespace raiser::validation
