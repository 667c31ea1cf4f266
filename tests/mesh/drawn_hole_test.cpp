#include <gtest/gtest.h>

#include <cmath>
#include <random>

#include "mesh/plate/distance.hpp"
#include "mesh/plate/drawn.hpp"
#include "mesh/plate/section.hpp"
#include "mesh/region/region.hpp"

namespace raiser::mesh {
namespace {

Hole rounded(double length, double width, double radius, Point centre, double angle) {
  return {"", HoleShape::rounded_rectangle, length, width, radius, centre, angle};
}

Hole drawn(const Hole& hole) { return drawn_hole(trace(hole, {})); }

Plate plate_with(std::vector<Hole> holes) { return {200, 100, 5, std::move(holes)}; }

std::string faults_of(const Plate& plate) {
  std::string all;
  for (const PlateFault& fault : faults(plate)) all += fault.what + "\n";
  return all;
}

// A hole of known shape given by its curves measures the same as the shape itself.
TEST(DrawnHole, MeasuresAsTheShapeThatItIs) {
  std::mt19937 dice(7);
  std::uniform_real_distribution<double> any(-1.0, 1.0);
  for (int trial = 0; trial < 200; ++trial) {
    const Hole known = rounded(30, 14, 3, Point(10 * any(dice), 10 * any(dice)), 3 * any(dice));
    const Hole own = drawn(known);
    EXPECT_NEAR(own.corner_radius, 3, 1e-9);
    EXPECT_LT((own.centre - known.centre).norm(), 1e-9);
    const double angle = 3 * any(dice);
    const Point n(std::cos(angle), std::sin(angle));
    EXPECT_NEAR(half_extent(own, n), half_extent(known, n), 1e-9);
    const Hole other = rounded(10, 8, 2, Point(40 + 5 * any(dice), 30 * any(dice)), any(dice));
    EXPECT_NEAR(gap(own, other), gap(known, other), 1e-5 * gap(known, other));
    for (const Direction direction : {Direction::across, Direction::along}) {
      const double station = 25 * any(dice);
      const auto a = chord(known, direction, station);
      const auto b = chord(own, direction, station);
      ASSERT_EQ(a.has_value(), b.has_value());
      if (!a) continue;
      EXPECT_NEAR(a->begin, b->begin, 1e-9);
      EXPECT_NEAR(a->end, b->end, 1e-9);
    }
  }
}

TEST(DrawnHole, HasTheMirrorsOfItsShape) {
  const Hole level = drawn(rounded(30, 14, 3, Point::Zero(), 0));
  EXPECT_EQ(mirrors(plate_with({level})), (Mirrors{true, true}));
  EXPECT_EQ(mirrors(plate_with({drawn(rounded(30, 14, 3, Point::Zero(), 0.3))})), (Mirrors{false, false}));
  const Hole left = drawn(rounded(20, 14, 3, Point(-40, 5), 0.3));
  const Hole right = drawn(rounded(20, 14, 3, Point(40, 5), -0.3));
  EXPECT_EQ(mirrors(plate_with({left, right})), (Mirrors{true, false}));
}

TEST(DrawnHole, FaultsAreThoseOfAnyHole) {
  const Hole own = drawn(rounded(30, 14, 3, Point::Zero(), 0));
  EXPECT_EQ(faults_of(plate_with({own})), "");
  Hole out = own;
  out.centre = Point(90, 0);
  EXPECT_NE(faults_of(plate_with({out})).find("crosses the right edge by 5 mm"), std::string::npos);
  Hole near = own;
  near.centre = Point(20, 0);
  near.name = "b";
  EXPECT_NE(faults_of(plate_with({own, near})).find("overlap"), std::string::npos);
  const Hole inner = {"c", HoleShape::circle, 4, 4, 0, Point::Zero(), 0};
  EXPECT_NE(faults_of(plate_with({own, inner})).find("lies inside"), std::string::npos);
  const Hole apart = {"d", HoleShape::circle, 4, 4, 0, Point(0, 20), 0};
  EXPECT_EQ(faults_of(plate_with({own, apart})), "");
}

TEST(DrawnHole, SharpCornersAreNamed) {
  const Point a(0, 0), b(5, 10), c(10, 0);  // clockwise
  const Hole triangle = drawn_hole({line(a, b), line(b, c), line(c, a)});
  EXPECT_EQ(sharp_corners({line(a, b), line(b, c), line(c, a)}).size(), 3U);
  EXPECT_NE(faults_of(plate_with({triangle})).find("has a sharp corner at (5, 10) mm"), std::string::npos);
}

// Two rounded squares whose corners meet overlap, though their centres are
// farther apart than their sides are long.
TEST(DrawnHole, CornersThatMeetAreSeen) {
  const Hole a = rounded(10, 10, 0.1, Point(-6.5, -6.5), 0);
  Hole b = rounded(10, 10, 0.1, Point(3, 3), 0);
  b.name = "b";
  EXPECT_NE(faults_of(plate_with({a, b})).find("overlap"), std::string::npos);
}

// A bent slot is crossed twice where it turns back.
TEST(DrawnHole, MayTurnBack) {
  const double r = 2.0;
  const auto arc = [](Point centre, double radius, double begin, double end) {
    return Curve{Curve::Kind::arc, centre, {radius, 0}, {0, radius}, begin, end, {}};
  };
  const double pi = std::acos(-1.0);
  // A half ring between radii 8 and 12 with round ends, clockwise.
  const Hole ring = drawn_hole(
      {arc({0, 0}, 12, pi, 0), arc({10, 0}, r, 0, -pi), arc({0, 0}, 8, 0, pi), arc({-10, 0}, r, 0, -pi)});
  EXPECT_TRUE(sharp_corners(ring.edge).empty());
  EXPECT_NEAR(ring.width, 14, 1e-9);
  EXPECT_EQ(chords(ring, Direction::along, 0 + ring.centre.y() - 5.0).size(), 2U);
  EXPECT_EQ(chords(ring, Direction::across, 0).size(), 1U);
  const auto pieces = material_along(plate_with({ring}), Direction::along, 1.0);
  EXPECT_EQ(pieces.size(), 3U);
  EXPECT_EQ(faults_of(plate_with({ring})), "");
}

}  // namespace
}  // namespace raiser::mesh
