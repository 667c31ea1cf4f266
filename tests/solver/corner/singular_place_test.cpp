#include "solver/corner/singular_place.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <map>
#include <numbers>

#include "tests/mesh/polygon.hpp"

namespace raiser::solver {
namespace {

constexpr double pi = std::numbers::pi;
using Kind = SingularPlace::Kind;

const HookeLaw steel{210000.0, 0.3, PlaneState::stress};
const std::vector<Point> l_shape{{0, 0}, {40, 0}, {40, 15}, {15, 15}, {15, 40}, {0, 40}};
const std::vector<Point> square{{0, 0}, {40, 0}, {40, 40}, {0, 40}};

std::vector<SingularPlace> places(const std::vector<Point>& points,
                                  const std::map<std::size_t, WedgeEdge>& held,
                                  const std::map<std::size_t, Point>& loaded) {
  const auto hold = [held](const mesh::Owner& o) {
    const auto found = held.find(mesh::side_of(o));
    return found == held.end() ? WedgeEdge::free : found->second;
  };
  const auto traction = [loaded](const mesh::Owner& o, const Point&, const Point&) -> Point {
    const auto found = loaded.find(mesh::side_of(o));
    return found == loaded.end() ? Point::Zero() : found->second;
  };
  return singular_places(mesh::polygon(points), hold, traction, steel);
}

TEST(SingularPlaces, AreTheReEntrantCornersOfAFreePlate) {
  EXPECT_TRUE(places(square, {}, {}).empty());
  const auto found = places(l_shape, {}, {});
  ASSERT_EQ(found.size(), 1U);
  EXPECT_EQ(found[0].kind, Kind::corner);
  EXPECT_EQ(found[0].site.vertex.at, Point(15, 15));
  ASSERT_EQ(found[0].modes.size(), 2U);
  EXPECT_NEAR(found[0].modes[0].exponent.real(), 0.5445, 5e-5);
  EXPECT_NEAR(found[0].modes[1].exponent.real(), 0.9085, 5e-5);
}

TEST(SingularPlaces, AreTheEndsOfAClampedEdge) {
  const auto found = places(square, {{3, WedgeEdge::clamped}}, {});
  ASSERT_EQ(found.size(), 2U);
  for (const auto& place : found) {
    EXPECT_EQ(place.kind, Kind::held_end);
    EXPECT_EQ(place.site.vertex.at.x(), 0.0);
    EXPECT_FALSE(place.modes.empty());
  }
  EXPECT_TRUE(places(square, {{3, WedgeEdge::sliding}}, {}).empty());
  // Two clamped edges at a right angle are not singular where they meet.
  EXPECT_EQ(places(square, {{2, WedgeEdge::clamped}, {3, WedgeEdge::clamped}}, {}).size(), 2U);
}

TEST(SingularPlaces, AreJumpsOfTractionThatNoUniformStressFits) {
  // Normal tractions on all edges fit at right angles; a shear on one edge does not.
  EXPECT_TRUE(places(square, {}, {{1, Point(10, 0)}, {3, Point(-10, 0)}, {0, Point(0, 3)}}).empty());
  const auto shear = places(square, {}, {{1, Point(0, 5)}});
  ASSERT_EQ(shear.size(), 2U);
  for (const auto& place : shear) {
    EXPECT_EQ(place.kind, Kind::jump);
    EXPECT_FALSE(place.is_logarithmic);
    EXPECT_EQ(place.site.vertex.at.x(), 40.0);
  }
  // The same shear on all four edges is a uniform stress.
  EXPECT_TRUE(
      places(square, {}, {{0, Point(-5, 0)}, {1, Point(0, 5)}, {2, Point(5, 0)}, {3, Point(0, -5)}}).empty());
}

// On a straight edge a jump of normal stress leaves the stress finite, a jump of
// shear makes it grow with the logarithm of the distance.
TEST(SingularPlaces, OnAStraightEdgeAJumpOfShearIsLogarithmic) {
  const std::vector<Point> split{{0, 0}, {40, 0}, {40, 20}, {40, 40}, {0, 40}};
  const auto normal = places(split, {}, {{1, Point(10, 0)}});
  ASSERT_EQ(normal.size(), 1U);
  EXPECT_FALSE(normal[0].is_logarithmic);
  const auto at_middle = [](const std::vector<SingularPlace>& all) {
    for (const auto& place : all)
      if (place.site.vertex.at == Point(40, 20)) return place;
    throw std::logic_error("no place in the middle");
  };
  EXPECT_TRUE(at_middle(places(split, {}, {{1, Point(0, 10)}})).is_logarithmic);
}

TEST(SingularPlaces, OfAnOrthotropicSheetHaveNoIsotropicFields) {
  HookeLaw sheet{140000.0, 0.3, PlaneState::stress};
  sheet.orthotropy = Orthotropy{10000.0, 5000.0, 0.0};
  const auto none = [](const mesh::Owner&, const Point&, const Point&) -> Point { return Point::Zero(); };
  const auto found = singular_places(
      mesh::polygon(l_shape), [](const mesh::Owner&) { return WedgeEdge::free; }, none, sheet);
  ASSERT_EQ(found.size(), 1U);
  EXPECT_TRUE(found[0].modes.empty());
}

}  // namespace
}  // namespace raiser::solver
