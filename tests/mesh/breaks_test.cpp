#include "mesh/region/breaks.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "mesh/triangulate/triangulate.hpp"

namespace raiser::mesh {
namespace {

Plate plate() { return {100, 60, 1, {{"a", HoleShape::circle, 20, 20, 0, Point(5, 0), 0}}}; }

double length_of(const Loop& loop) {
  double sum = 0;
  for (const Curve& curve : loop)
    sum += std::abs(curve.end - curve.begin) * curve.derivative(0.5 * (curve.begin + curve.end)).norm();
  return sum;
}

TEST(Breaks, DivideALineInThreePlaces) {
  const Region whole = trace(plate());
  const Region cut = broken(whole, {{{Owner::Kind::edge, rectangle::right}, Point(50, 4), 1.5}});
  EXPECT_EQ(cut.loops[0].size(), whole.loops[0].size() + 3);
  EXPECT_NEAR(length_of(cut.loops[0]), 320, 1e-9);
  std::vector<double> stops;
  for (const Curve& curve : cut.loops[0])
    if (curve.owner == Owner{Owner::Kind::edge, rectangle::right}) stops.push_back(curve.finish().y());
  EXPECT_NEAR(stops.at(0), 2.5, 1e-12);
  EXPECT_NEAR(stops.at(1), 4.0, 1e-12);
  EXPECT_NEAR(stops.at(2), 5.5, 1e-12);
}

TEST(Breaks, DivideAnArcAlsoAcrossItsJoints) {
  const double angle = 1e-3;  // just past the joint of two quarters
  const Point at = Point(5, 0) + 10 * Point(std::cos(angle), std::sin(angle));
  const Region cut = broken(trace(plate()), {{{Owner::Kind::raiser, 0}, at, 0.5}});
  EXPECT_NEAR(length_of(cut.loops[1]), 20 * std::acos(-1.0), 1e-9);
  double nearest = 1;
  for (const Curve& curve : cut.loops[1]) {
    nearest = std::min(nearest, (curve.start() - at).norm());
    EXPECT_GT(std::abs(curve.end - curve.begin) * 10, 0.1);  // no slivers
  }
  EXPECT_LT(nearest, 1e-12);  // the joint is where the break is
}

TEST(Breaks, NearOneAnotherAreAllVertices) {
  const auto on = [](double angle) {
    return Point(Point(5, 0) + 10 * Point(std::cos(angle), std::sin(angle)));
  };
  const std::vector<Break> breaks{{{Owner::Kind::raiser, 0}, on(1.0), 1.0},
                                  {{Owner::Kind::raiser, 0}, on(1.02), 1.0}};
  const Region cut = broken(trace(plate()), breaks);
  EXPECT_NEAR(length_of(cut.loops[1]), 20 * std::acos(-1.0), 1e-9);
  for (const Break& at : breaks) {
    double nearest = 1;
    for (const Curve& curve : cut.loops[1]) nearest = std::min(nearest, (curve.start() - at.at).norm());
    EXPECT_LT(nearest, 1e-12);
  }
}

TEST(Breaks, AtAnEndDivideNothing) {
  const Region whole = trace(plate());
  const Region cut = broken(whole, {{{Owner::Kind::edge, rectangle::right}, Point(50, 30), 0.0}});
  EXPECT_EQ(cut.loops[0].size(), whole.loops[0].size());
}

TEST(Breaks, BecomeVerticesWithSmallSidesBesideThem) {
  const Point at(50, 4);
  const Mesh mesh =
      triangulate(broken(trace(plate()), {{{Owner::Kind::edge, rectangle::right}, at, 0.4}}), {});
  double least = 1e9;
  for (const BoundarySide& side : mesh.boundary())
    if ((side.curve.start() - at).norm() < 1e-9) least = (side.curve.finish() - at).norm();
  EXPECT_NEAR(least, 0.4, 1e-9);
}

}  // namespace
}  // namespace raiser::mesh
