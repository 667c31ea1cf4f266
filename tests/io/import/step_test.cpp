#include "io/import/step.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <filesystem>
#include <fstream>
#include <numbers>

#include "io/import/contour.hpp"
#include "io/import/curve_tools.hpp"
#include "io/import/shapes.hpp"
#include "tests/io/scratch.hpp"

namespace raiser::io {
namespace {

constexpr double pi = std::numbers::pi;
using At = std::optional<std::array<double, 3>>;

// The parts are invented: a plate of 80 x 40 mm with a circle and an ellipse, a
// tilted block with a bore, and a face with a spline for one edge.
DrawingReading read(const std::string& name, const At& at = std::nullopt) {
  return read_step(std::filesystem::path(RAISER_SOURCE_DIR) / "tests/io/import/parts" / name, name, at);
}

std::string all(const DrawingReading& reading) {
  std::string result;
  for (const Diagnostic& fault : reading.faults) result += text(fault) + "\n";
  return result;
}

TEST(Step, ReadsTheOneFaceOfAFile) {
  const auto reading = read("plate.step");
  ASSERT_TRUE(reading.value) << all(reading);
  const Contours c = contours(reading.value->strokes, {});
  ASSERT_TRUE(c.faults.empty());
  EXPECT_NEAR(area(c.outer), 3200, 1e-9);
  EXPECT_NEAR(start(c.outer[0]).x(), 60, 1e-9);
  ASSERT_EQ(c.inner.size(), 2U);
  EXPECT_NEAR(area(c.inner[0]), -36 * pi, 1e-9);
  EXPECT_NEAR(area(c.inner[1]), -32 * pi, 1e-9);
  const auto circle = hole_of(c.inner[0], 1e-9);
  const auto ellipse = hole_of(c.inner[1], 1e-9);
  ASSERT_TRUE(circle && ellipse);
  EXPECT_EQ(circle->shape, mesh::HoleShape::circle);
  EXPECT_NEAR(circle->centre.x(), 80, 1e-9);
  EXPECT_EQ(ellipse->shape, mesh::HoleShape::ellipse);
  EXPECT_NEAR(ellipse->length, 16, 1e-9);
}

TEST(Step, TakesAFaceOfASolidByAPointOnIt) {
  const auto none = read("block.step");
  EXPECT_FALSE(none.value);
  EXPECT_NE(all(none).find("6 planar faces"), std::string::npos) << all(none);
  EXPECT_NE(all(none).find("face_at"), std::string::npos);
  // The upper face of the block before it was tilted about x by 0.5 rad.
  const double c = std::cos(0.5), s = std::sin(0.5);
  const auto top = read("block.step", std::array{20.0, 15 * c - 10 * s, 15 * s + 10 * c});
  ASSERT_TRUE(top.value) << all(top);
  const Contours found = contours(top.value->strokes, {});
  ASSERT_TRUE(found.faults.empty());
  EXPECT_NEAR(area(found.outer), 600, 1e-6);
  ASSERT_EQ(found.inner.size(), 1U);
  const auto bore = hole_of(found.inner[0], 1e-6);
  ASSERT_TRUE(bore);
  EXPECT_NEAR(bore->length, 6, 1e-6);
  EXPECT_FALSE(read("block.step", std::array{100.0, 0.0, 0.0}).value);
}

TEST(Step, RefusesOtherEdgesByName) {
  const auto reading = read("spline.step");
  EXPECT_FALSE(reading.value);
  ASSERT_EQ(reading.faults.size(), 1U);
  EXPECT_NE(all(reading).find("BSpline"), std::string::npos) << all(reading);
}

TEST(Step, RefusesWhatIsNoStepFile) {
  const test::ScratchFolder folder;
  folder.file("text.step", "hello");
  folder.file("junk.step", "ISO-10303-21;\njunk");
  for (const char* name : {"text.step", "junk.step", "missing.step"}) {
    const auto reading = read_step(folder / name, name, std::nullopt);
    EXPECT_FALSE(reading.value) << name;
    ASSERT_EQ(reading.faults.size(), 1U) << name;
    EXPECT_FALSE(reading.faults[0].cure.empty());
  }
}

TEST(Step, WritesNothingToStandardOutput) {
  testing::internal::CaptureStdout();
  static_cast<void>(read("plate.step"));
  static_cast<void>(read("block.step"));
  EXPECT_EQ(testing::internal::GetCapturedStdout(), "");
}

}  // namespace
}  // namespace raiser::io
