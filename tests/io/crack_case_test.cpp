#include <fmt/format.h>
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "io/case/describe.hpp"
#include "tests/io/cracked.hpp"
#include "tests/io/solved.hpp"

namespace raiser::io {
namespace {

using mesh::Point;
using solver::Quantity;

// Invented data.
const std::string head = R"(raiser = 1
[plate]
length = "240 mm"
width = "60 mm"
thickness = "6 mm"
[material]
youngs_modulus = "210 GPa"
poissons_ratio = 0.3
[[hole]]
name = "slot"
shape = "slot"
length = "20 mm"
width = "10 mm"
at = ["-50 mm", "5 mm"]
[[load]]
kind = "tension"
stress = "10 MPa"
)";

mesh::Crack crack(const std::string& table) {
  return test::case_from(head + "[[crack]]\n" + table).problem.plate.cracks.at(0);
}

void expect_point(const Point& found, double x, double y) {
  EXPECT_NEAR((found - Point(x, y)).norm(), 0.0, 1e-9) << found.transpose();
}

TEST(CrackCase, LiesInsideThePlateWithATipAtEitherEnd) {
  const mesh::Crack own = crack("at = [\"40 mm\", \"5 mm\"]\nlength = \"10 mm\"\nangle = \"90 deg\"\n");
  ASSERT_EQ(own.points.size(), 2u);
  expect_point(own.points[0], 40, 0);
  expect_point(own.points[1], 40, 10);
  EXPECT_FALSE(own.has_mouth);
  const auto tips = mesh::tips({own});
  ASSERT_EQ(tips.size(), 2u);
  EXPECT_EQ(tips[0].name, "crack 1 A");
  EXPECT_EQ(tips[1].name, "crack 1 B");
  expect_point(crack("length = \"2 mm\"\n").points[1], 1, 0);
}

TEST(CrackCase, LeavesEachEdgeAlongItsNormalTurnedAnticlockwise) {
  const double s = 5 * std::sin(std::numbers::pi / 6), c = 5 * std::cos(std::numbers::pi / 6);
  const auto at = [](const char* edge, const char* place) {
    return crack(
        fmt::format("edge = \"{}\"\nat = \"{}\"\nlength = \"5 mm\"\nangle = \"30 deg\"\n", edge, place));
  };
  const mesh::Crack bottom = at("bottom", "20 mm");
  expect_point(bottom.points[0], 20, -30);
  expect_point(bottom.points[1], 20 - s, -30 + c);
  const mesh::Crack top = at("top", "-20 mm");
  expect_point(top.points[0], -20, 30);
  expect_point(top.points[1], -20 + s, 30 - c);
  const mesh::Crack left = at("left", "7 mm");
  expect_point(left.points[0], -120, 7);
  expect_point(left.points[1], -120 + c, 7 + s);
  const mesh::Crack right = at("right", "7 mm");
  expect_point(right.points[0], 120, 7);
  expect_point(right.points[1], 120 - c, 7 - s);
  EXPECT_TRUE(right.has_mouth);
  expect_point(crack("edge = \"top\"\nlength = \"5 mm\"\n").points[1], 0, 25);
}

TEST(CrackCase, LeavesAHoleAtTheEdgeAngleOfTheResults) {
  const mesh::Crack end = crack("from = \"slot\"\nplace = \"180 deg\"\nlength = \"3 mm\"\n");
  expect_point(end.points[0], -60, 5);
  expect_point(end.points[1], -63, 5);
  // The flank's normal is +y wherever the place is on it.
  const double angle = std::atan2(5.0, 3.0) * 180 / std::numbers::pi;
  const mesh::Crack flank = crack(
      fmt::format("from = \"slot\"\nplace = \"{} deg\"\nlength = \"3 mm\"\nangle = \"-45 deg\"\n", angle));
  expect_point(flank.points[0], -47, 10);
  expect_point(flank.points[1], -47 + 3 / std::sqrt(2), 10 + 3 / std::sqrt(2));
  EXPECT_EQ(mesh::tips({flank}).at(0).name, "crack 1");
}

TEST(CrackCase, PutsTheFirstPointOfAChainExactlyOnTheEdge) {
  const mesh::Crack own = crack(
      "from = \"slot\"\npoints = [[\"-40.01 mm\", \"5 mm\"], [\"-37 mm\", \"5 mm\"], [\"-35 mm\", \"7 "
      "mm\"]]\n");
  ASSERT_EQ(own.points.size(), 3u);
  expect_point(own.points[0], -40, 5);
  expect_point(own.points[2], -35, 7);
  EXPECT_TRUE(own.has_mouth);
  EXPECT_FALSE(crack("points = [[\"0 mm\", \"5 mm\"], [\"3 mm\", \"5 mm\"]]\n").has_mouth);
}

TEST(CrackCase, AsksForKAtEveryTipAndForTOnlyWhereWritten) {
  const std::string cracked =
      head + "[[crack]]\nname = \"c\"\nlength = \"8 mm\"\nat = [\"30 mm\", \"0 mm\"]\n";
  const auto asks = test::case_from(cracked).asks;
  ASSERT_EQ(asks.size(), 5u);  // three at the hole
  for (std::size_t t = 0; t < 2; ++t) {
    EXPECT_EQ(asks[3 + t].quantity, Quantity::stress_intensity);
    EXPECT_EQ(asks[3 + t].raiser, t);
    EXPECT_EQ(asks[3 + t].tolerance, 1e-3);
  }
  const auto some = test::case_from(cracked +
                                    "[ask]\ntolerance = \"0.01 %\"\nresults = [\"T-stress\", \"stress "
                                    "intensity\"]\ntips = [\"c B\"]\n[[ask.result]]\nname = \"T\"\nof = "
                                    "\"T-stress\"\ntip = \"c A\"\ntolerance = \"0.2 %\"\n")
                        .asks;
  ASSERT_EQ(some.size(), 3u);
  EXPECT_EQ(some[0].quantity, Quantity::t_stress);
  EXPECT_EQ(some[0].raiser, 1u);
  EXPECT_EQ(some[0].tolerance, 1e-2);
  EXPECT_EQ(some[1].tolerance, 1e-4);
  EXPECT_EQ(some[2].name, "T");
  EXPECT_EQ(some[2].raiser, 0u);
  EXPECT_EQ(some[2].tolerance, 2e-3);
}

TEST(CrackCase, PutsAPressureOnTheFacesOfACrack) {
  const Case input = test::case_from(
      head +
      "[[crack]]\nname = \"c\"\nlength = \"8 mm\"\n[[load]]\nkind = \"pressure\"\ncrack = \"c\"\npressure "
      "= \"5 MPa\"\n");
  const solver::Load& load = input.problem.loads.at(1);
  EXPECT_EQ(load.kind, solver::Load::Kind::face_pressure);
  EXPECT_EQ(load.crack, 0u);
  EXPECT_EQ(load.stress, 5.0);
  EXPECT_EQ(load.name, "pressure in c");
}

TEST(CrackCase, IsDescribedWithItsTips) {
  for (const char* content : {test::cracked_strap, test::cracked_hole}) {
    const std::string text = describe(test::case_from(content));
    EXPECT_LE(test::widest(text), 80u) << text;
    EXPECT_NE(text.find("Cracks"), std::string::npos);
    EXPECT_NE(text.find("every crack tip"), std::string::npos);
  }
  const std::string text = describe(test::case_from(test::cracked_strap));
  for (const char* part :
       {"opens at the top edge", "length 10 mm", "tip A at x = 0 mm", "pointing -90 deg from x", "y = 15 mm",
        "0 deg from the inward normal (default)", "tip flaw at"})
    EXPECT_NE(text.find(part), std::string::npos) << part << "\n" << text;
}

}  // namespace
}  // namespace raiser::io
