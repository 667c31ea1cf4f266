#include "io/import/contour.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <numbers>
#include <random>

#include "dxf_writer.hpp"
#include "io/import/curve_tools.hpp"
#include "io/import/dxf.hpp"
#include "io/import/shapes.hpp"

namespace raiser::io {
namespace {

constexpr double pi = std::numbers::pi;
using mesh::HoleShape;

std::vector<Stroke> strokes(const DxfWriter& dxf) {
  auto reading = read_dxf(dxf.text(), "part.dxf", std::nullopt);
  EXPECT_TRUE(reading.value);
  return reading.value ? reading.value->strokes : std::vector<Stroke>{};
}

Contours contours_of(const DxfWriter& dxf, const ContourRule& rule = {}) {
  return contours(strokes(dxf), rule);
}

std::string all(const Contours& c) {
  std::string result;
  for (const auto& fault : c.faults) result += fault.what + "; " + fault.cure + "\n";
  for (const auto& repair : c.repairs) result += repair + "\n";
  return result;
}

bool mentions(const Contours& c, const std::string& words) { return all(c).find(words) != std::string::npos; }

TEST(Contours, AreTheSameHoweverTheStrokesCome) {
  DxfWriter dxf;
  dxf.rectangle(40, 20).circle(5, 0, 3).arc(-8, 0, 2, 0, 120).arc(-8, 0, 2, 120, 360);
  auto pieces = strokes(dxf);
  std::mt19937 random(3);
  for (int trial = 0; trial < 20; ++trial) {
    std::shuffle(pieces.begin(), pieces.end(), random);
    for (Stroke& s : pieces)
      if (random() % 2 == 0) s.curve = reversed(s.curve);
    const Contours c = contours(pieces, {});
    ASSERT_TRUE(c.faults.empty()) << all(c);
    EXPECT_TRUE(c.repairs.empty()) << all(c);
    EXPECT_EQ(c.outer.size(), 4U);
    EXPECT_NEAR(area(c.outer), 800, 1e-9);
    ASSERT_EQ(c.inner.size(), 2U);
    EXPECT_NEAR(area(c.inner[0]), -9 * pi, 1e-9);
    EXPECT_NEAR(area(c.inner[1]), -4 * pi, 1e-9);
    EXPECT_EQ(c.inner[1].size(), 1U);  // both arcs as one circle
  }
}

TEST(Contours, CloseSmallGapsAndSaySo) {
  DxfWriter dxf;
  dxf.line(0, 0, 10, 0).line(10, 0.003, 10, 5).line(10, 5, 0, 5).line(0, 5, 0, 0);
  const Contours c = contours_of(dxf);
  ASSERT_TRUE(c.faults.empty()) << all(c);
  EXPECT_TRUE(mentions(c, "a gap of 0.003 mm closed at (10, 0.0015) mm")) << all(c);
  for (std::size_t k = 0; k < 4; ++k)
    EXPECT_LT((finish(c.outer[k]) - start(c.outer[(k + 1) % 4])).norm(), 1e-14);
}

TEST(Contours, LeaveArcsAsDrawnWhereALineMissesThem) {
  DxfWriter dxf;
  dxf.line(0, 0, 10, 0).arc(10, 2, 2, 270, 90).line(10.002, 4, 0, 4).line(0, 4, 0, 0);
  const Contours c = contours_of(dxf);
  ASSERT_TRUE(c.faults.empty()) << all(c);
  for (const auto& curve : c.outer)
    if (curve.kind == mesh::Curve::Kind::arc) {
      EXPECT_NEAR(curve.u.norm(), 2, 1e-12);
    }
}

TEST(Contours, NameLooseEndsWithTheirNearestNeighbour) {
  DxfWriter dxf;
  dxf.line(0, 0, 10, 0).line(10, 0.02, 10, 5).line(10, 5, 0, 5).line(0, 5, 0, 0);
  const Contours c = contours_of(dxf);
  EXPECT_EQ(c.faults.size(), 2U);
  EXPECT_TRUE(c.outer.empty());
  EXPECT_TRUE(mentions(c, "0.02 mm away at (10, 0.02) mm")) << all(c);
  EXPECT_TRUE(contours_of(dxf, {.gap = 0.03}).faults.empty());
}

TEST(Contours, DropWhatIsDrawnTwice) {
  DxfWriter dxf;
  dxf.rectangle(10, 6).line(-5, -3, 5, -3).line(5, 3, 5, -3).circle(0, 0, 1).circle(0, 0, 1);
  const Contours c = contours_of(dxf);
  ASSERT_TRUE(c.faults.empty()) << all(c);
  EXPECT_TRUE(mentions(c, "3 curves drawn twice")) << all(c);
  EXPECT_EQ(c.inner.size(), 1U);
}

TEST(Contours, RefuseBranchesCrossingsAndSecondParts) {
  DxfWriter branch;
  branch.rectangle(10, 6).line(-5, -3, 0, 0).line(0, 0, 5, 3);
  EXPECT_TRUE(mentions(contours_of(branch), "3 ends of curves meet at (-5, -3) mm"));
  DxfWriter bow;
  bow.polyline({{0, 0}, {10, 5}, {10, 0}, {0, 5}});
  EXPECT_TRUE(mentions(contours_of(bow), "crosses itself at (5, 2.5) mm"));
  DxfWriter cut;
  cut.rectangle(10, 6).circle(5, 0, 2);
  EXPECT_TRUE(mentions(contours_of(cut), "two outlines cross"));
  DxfWriter two;
  two.rectangle(10, 6).circle(20, 0, 2);
  EXPECT_TRUE(mentions(contours_of(two), "lies outside the largest one"));
  DxfWriter island;
  island.rectangle(10, 6).circle(0, 0, 2).circle(0, 0, 1);
  EXPECT_TRUE(mentions(contours_of(island), "lies inside a hole"));
  DxfWriter nothing;
  nothing.line(0, 0, 1e-5, 0);
  EXPECT_TRUE(mentions(contours_of(nothing), "no closed curve"));
}

// A circle of n chords, its corners rounded as drawing programs round them.
DxfWriter& faceted(DxfWriter& dxf, double x, double y, double r, int n) {
  std::vector<DxfWriter::Vertex> corners;
  for (int k = 0; k < n; ++k) {
    const double t = 2 * pi * (k + 0.3) / n;
    corners.push_back(
        {std::round((x + r * std::cos(t)) * 1e6) / 1e6, std::round((y + r * std::sin(t)) * 1e6) / 1e6});
  }
  return dxf.polyline(corners);
}

TEST(Contours, TakeFacetsForArcsAndSaySo) {
  for (const int n : {16, 24, 72, 360}) {
    DxfWriter dxf;
    const Contours c = contours_of(faceted(dxf.rectangle(40, 20), 3, 1, 5, n));
    ASSERT_EQ(c.inner.size(), 1U) << all(c);
    const auto hole = hole_of(c.inner[0], 1e-5);
    ASSERT_TRUE(hole) << n << all(c);
    EXPECT_EQ(hole->shape, HoleShape::circle);
    EXPECT_NEAR(hole->length, 10, 1e-5);
    EXPECT_NEAR(hole->centre.x(), 3, 1e-5);
    EXPECT_TRUE(mentions(c, "short lines taken as an arc of radius 5 mm about (3, 1) mm")) << all(c);
    const Contours kept = contours_of(dxf, {.arcs_from_facets = false});
    EXPECT_EQ(kept.inner[0].size(), static_cast<std::size_t>(n));
  }
}

TEST(Contours, TakeFacetedEndsOfASlotForHalfCircles) {
  std::vector<DxfWriter::Vertex> corners;
  for (const double side : {1.0, -1.0})
    for (int k = 0; k <= 12; ++k) {
      const double t = pi * k / 12 - pi / 2;
      corners.push_back({side * (6 + 2 * std::cos(t)), side * 2 * std::sin(t)});
    }
  DxfWriter dxf;
  const Contours c = contours_of(dxf.rectangle(40, 20).polyline(corners));
  ASSERT_TRUE(c.faults.empty()) << all(c);
  const auto hole = hole_of(c.inner[0], 1e-5);
  ASSERT_TRUE(hole) << all(c);
  EXPECT_EQ(hole->shape, HoleShape::slot);
  EXPECT_NEAR(hole->length, 16, 1e-6);
  EXPECT_NEAR(hole->width, 4, 1e-6);
}

TEST(Contours, LeavePolygonsAlone) {
  for (const int n : {3, 4, 6, 8, 12}) {
    DxfWriter dxf;
    const Contours c = contours_of(faceted(dxf.rectangle(40, 20), 0, 0, 5, n));
    ASSERT_EQ(c.inner.size(), 1U);
    EXPECT_EQ(c.inner[0].size(), static_cast<std::size_t>(n));
    EXPECT_TRUE(c.repairs.empty()) << all(c);
  }
}

TEST(Contours, MakeLinesAndArcsInPiecesOne) {
  DxfWriter dxf;
  dxf.line(-5, -3, 0, -3).line(0, -3, 5, -3).line(5, -3, 5, 3).line(5, 3, -5, 3).line(-5, 3, -5, -3);
  const Contours c = contours_of(dxf);
  EXPECT_EQ(c.outer.size(), 4U);
  EXPECT_NEAR(area(c.outer), 60, 1e-12);
}

TEST(Contours, KnowTheShapesOfHoles) {
  DxfWriter dxf;
  dxf.rectangle(100, 60).ellipse(20, 0, 0, 6, 0.5);
  dxf.polyline({{-30, -2}, {-20, -2, 1}, {-20, 2}, {-30, 2, 1}});  // slot
  const double b = std::tan(pi / 8);
  dxf.polyline(
      {{-4, -20}, {4, -20, b}, {6, -18}, {6, -12, b}, {4, -10}, {-4, -10, b}, {-6, -12}, {-6, -18, b}});
  dxf.polyline({{0, 10}, {5, 10}, {0, 15}});  // triangle
  const Contours c = contours_of(dxf);
  ASSERT_EQ(c.inner.size(), 4U) << all(c);
  std::vector<std::optional<mesh::Hole>> holes;
  for (const auto& loop : c.inner) holes.push_back(hole_of(loop, 1e-6));
  ASSERT_TRUE(holes[0] && holes[1] && holes[2]);
  EXPECT_EQ(holes[0]->shape, HoleShape::rounded_rectangle);
  EXPECT_NEAR(holes[0]->length, 12, 1e-9);
  EXPECT_NEAR(holes[0]->width, 10, 1e-9);
  EXPECT_NEAR(holes[0]->corner_radius, 2, 1e-9);
  EXPECT_NEAR(holes[0]->centre.y(), -15, 1e-9);
  EXPECT_EQ(holes[1]->shape, HoleShape::ellipse);
  EXPECT_NEAR(holes[1]->length, 12, 1e-9);
  EXPECT_NEAR(holes[1]->angle, pi / 2, 1e-9);
  EXPECT_EQ(holes[2]->shape, HoleShape::slot);
  EXPECT_NEAR(holes[2]->length, 14, 1e-9);
  EXPECT_FALSE(holes[3]);
}

TEST(Contours, ASlotWithEndsOfOtherSweepIsNone) {
  DxfWriter dxf;
  dxf.rectangle(100, 60).polyline({{-30, -2}, {-20, -2, 0.8}, {-20, 2}, {-30, 2, 0.8}});
  const Contours c = contours_of(dxf);
  ASSERT_EQ(c.inner.size(), 1U);
  EXPECT_FALSE(hole_of(c.inner[0], 1e-6));
}

// Drawings that once broke the import, and the seeds of its fuzzer.
TEST(Contours, OfEveryStoredDrawingAreClosedOrRefused) {
  int drawings = 0;
  for (const auto& entry : std::filesystem::directory_iterator(RAISER_SOURCE_DIR "/tests/fuzz/drawings")) {
    ++drawings;
    std::ifstream file(entry.path(), std::ios::binary);
    const std::string content((std::istreambuf_iterator<char>(file)), {});
    const auto reading = read_dxf(content, "part.dxf", std::nullopt);
    ASSERT_EQ(reading.value.has_value(), reading.faults.empty()) << entry.path();
    if (!reading.value) continue;
    const Contours c = contours(reading.value->strokes, {});
    ASSERT_NE(c.faults.empty(), c.outer.empty()) << entry.path();
    if (c.faults.empty()) {
      EXPECT_GT(area(c.outer), 0) << entry.path();
    }
  }
  EXPECT_GE(drawings, 6);
}

}  // namespace
}  // namespace raiser::io
