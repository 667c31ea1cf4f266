#include "mesh/region/region.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>
#include <stdexcept>
#include <string>

#include "mesh/legendre.hpp"
#include "mesh/plate/section.hpp"
#include "tests/mesh/holes.hpp"

namespace raiser::mesh {
namespace {

constexpr double pi = std::numbers::pi;
constexpr double length = 120;
constexpr double width = 80;

Plate with(std::vector<Hole> holes) { return {length, width, 5, std::move(holes)}; }

Hole placed(Hole hole, Point centre, double angle) {
  hole.centre = centre;
  hole.angle = angle;
  return hole;
}

// Integral over a curve of x dy - y dx over two, and its length.
struct Measure {
  double area = 0.0;
  double length = 0.0;
};
Measure measure(const Curve& curve) {
  static const GaussRule rule = gauss_legendre(24);
  Measure sum;
  const double half = (curve.end - curve.begin) / 2;
  for (std::size_t q = 0; q < rule.points.size(); ++q) {
    const double t = curve.begin + half * (1 + rule.points[q]);
    const Point x = curve.at(t);
    const Point d = curve.derivative(t);
    sum.area += 0.5 * rule.weights[q] * half * (x.x() * d.y() - x.y() * d.x());
    sum.length += rule.weights[q] * std::abs(half) * d.norm();
  }
  return sum;
}

bool on_mirror(const Curve& curve) {
  return curve.owner.kind == Owner::Kind::mirror_x || curve.owner.kind == Owner::Kind::mirror_y;
}

// Area by Green's theorem, length of the true edges, length on each mirror line.
struct RegionMeasure {
  double area = 0.0;
  double edge = 0.0;
  double on_mirror_x = 0.0;
  double on_mirror_y = 0.0;
};
RegionMeasure measure(const Region& region) {
  RegionMeasure sum;
  for (const Loop& loop : region.loops)
    for (const Curve& curve : loop) {
      const Measure own = measure(curve);
      sum.area += own.area;
      if (!on_mirror(curve))
        sum.edge += own.length;
      else
        (curve.owner.kind == Owner::Kind::mirror_x ? sum.on_mirror_x : sum.on_mirror_y) += own.length;
    }
  return sum;
}

void expect_closed(const Region& region) {
  for (const Loop& loop : region.loops)
    for (std::size_t k = 0; k < loop.size(); ++k) {
      const Curve& next = loop[(k + 1) % loop.size()];
      EXPECT_LT((loop[k].at(loop[k].end) - next.at(next.begin)).norm(), 1e-12 * length);
    }
}

double material_on(const Plate& plate, Direction direction) {
  double sum = 0.0;
  for (const Interval& piece : material_along(plate, direction, 0.0)) sum += piece.end - piece.begin;
  return sum;
}

// The cut region and its images must make up the whole one.
void expect_cut_into_images(const Plate& plate, Mirrors lines) {
  const Region whole = trace(plate);
  const Region part = cut(whole, lines);
  expect_closed(part);
  const double images = (lines.x ? 2.0 : 1.0) * (lines.y ? 2.0 : 1.0);
  const RegionMeasure all = measure(whole);
  const RegionMeasure one = measure(part);
  EXPECT_NEAR(images * one.area, all.area, 1e-12 * all.area);
  EXPECT_NEAR(images * one.edge, all.edge, 1e-12 * all.edge);
  const double share_x = lines.y ? 0.5 : 1.0;
  const double share_y = lines.x ? 0.5 : 1.0;
  EXPECT_NEAR(one.on_mirror_x, lines.x ? share_x * material_on(plate, Direction::across) : 0.0, 1e-10);
  EXPECT_NEAR(one.on_mirror_y, lines.y ? share_y * material_on(plate, Direction::along) : 0.0, 1e-10);
  for (const Loop& loop : part.loops)
    for (const Curve& curve : loop)
      for (const double t : {curve.begin, (curve.begin + curve.end) / 2, curve.end}) {
        if (lines.x) {
          EXPECT_GE(curve.at(t).x(), -1e-12 * length);
        }
        if (lines.y) {
          EXPECT_GE(curve.at(t).y(), -1e-12 * length);
        }
      }
}

std::vector<Mirrors> lines_of(const Mirrors& found) {
  std::vector<Mirrors> sets;
  if (found.x) sets.push_back({true, false});
  if (found.y) sets.push_back({false, true});
  if (found.x && found.y) sets.push_back({true, true});
  return sets;
}

TEST(Trace, EncirclesTheMaterialOnItsLeft) {
  for (const Hole& hole : holes_of_every_shape())
    for (const double angle : {0.0, 0.7, -2.0}) {
      SCOPED_TRACE(hole.name);
      const Region region = trace(with({placed(hole, Point(11, -6), angle)}));
      expect_closed(region);
      ASSERT_EQ(region.loops.size(), 2u);
      double outer = 0.0;
      double inner = 0.0;
      for (const Curve& curve : region.loops[0]) outer += measure(curve).area;
      for (const Curve& curve : region.loops[1]) {
        inner += measure(curve).area;
        EXPECT_EQ(curve.owner, (Owner{Owner::Kind::raiser, 0}));
      }
      EXPECT_NEAR(outer, length * width, 1e-9);
      EXPECT_NEAR(inner, -area(hole), 1e-12 * area(hole));
    }
}

TEST(Trace, NamesTheOutlineByItsPlace) {
  const Region region = trace(with({}));
  for (const Curve& curve : region.loops[0]) {
    const Point middle = curve.at(0.5);
    const auto expected = middle.x() > 1    ? rectangle::right
                          : middle.x() < -1 ? rectangle::left
                          : middle.y() > 0  ? rectangle::top
                                            : rectangle::bottom;
    EXPECT_EQ(curve.owner, (Owner{Owner::Kind::edge, expected}));
  }
}

TEST(Curve, CurvatureAndDerivativeAreThoseOfItsPoints) {
  const Curve arc = trace(with({placed(holes_of_every_shape()[1], Point(3, 2), 0.4)})).loops[1][0];
  const double h = 1e-4;
  for (const double share : {0.1, 0.5, 0.9}) {
    const double t = arc.begin + share * (arc.end - arc.begin);
    const Point first = (arc.at(t + h) - arc.at(t - h)) / (2 * h);
    const Point second = (arc.at(t + h) - 2 * arc.at(t) + arc.at(t - h)) / (h * h);
    EXPECT_LT((arc.derivative(t) - first).norm(), 1e-7);
    const double cross = std::abs(first.x() * second.y() - first.y() * second.x());
    EXPECT_NEAR(arc.radius_of_curvature(t), std::pow(first.norm(), 3) / cross, 1e-5);
  }
}

TEST(Cut, KeepsOneImageOfAHoleOnTheCentreAtEveryMirroredAngle) {
  for (const Hole& hole : holes_of_every_shape())
    for (int quarter = -2; quarter <= 2; ++quarter) {
      SCOPED_TRACE(hole.name + " turned by quarters: " + std::to_string(quarter));
      const Plate plate = with({placed(hole, Point(0, 0), quarter * pi / 2)});
      ASSERT_EQ(mirrors(plate), (Mirrors{true, true}));
      for (const Mirrors lines : lines_of(mirrors(plate))) expect_cut_into_images(plate, lines);
    }
}

TEST(Cut, KeepsOneImageOfHolesOnOneMirrorLine) {
  for (const Hole& hole : holes_of_every_shape())
    for (const double angle : {0.0, pi / 2}) {
      SCOPED_TRACE(hole.name);
      const Plate on_x = with({placed(hole, Point(0, 13), angle)});
      ASSERT_EQ(mirrors(on_x), (Mirrors{true, false}));
      expect_cut_into_images(on_x, {true, false});
      const Plate on_y = with({placed(hole, Point(-21, 0), angle)});
      ASSERT_EQ(mirrors(on_y), (Mirrors{false, true}));
      expect_cut_into_images(on_y, {false, true});
      const Plate pair = with({placed(hole, Point(-21, 0), angle), placed(hole, Point(21, 0), angle)});
      for (const Mirrors lines : lines_of({true, true})) expect_cut_into_images(pair, lines);
    }
}

TEST(Cut, KeepsOneImageOfHolesOffTheMirrorLinesAtAnyAngle) {
  for (const Hole& hole : holes_of_every_shape())
    for (const double angle : {0.0, 0.6, 2.0}) {
      SCOPED_TRACE(hole.name);
      const Plate plate = with({placed(hole, Point(30, 18), angle), placed(hole, Point(-30, 18), -angle),
                                placed(hole, Point(-30, -18), angle), placed(hole, Point(30, -18), -angle)});
      ASSERT_EQ(mirrors(plate), (Mirrors{true, true}));
      for (const Mirrors lines : lines_of(mirrors(plate))) expect_cut_into_images(plate, lines);
      EXPECT_EQ(cut(trace(plate), {true, true}).loops.size(), 2u);
    }
}

TEST(Cut, OfASquareStandingOnItsCorner) {
  Hole square = placed(holes_of_every_shape()[6], Point(0, 0), pi / 4);
  for (const Mirrors lines : lines_of({true, true})) expect_cut_into_images(with({square}), lines);
  EXPECT_EQ(mirrors(with({square})), (Mirrors{true, true}));
}

TEST(Cut, OfManyHolesOnAndOffTheLines) {
  const auto shapes = holes_of_every_shape();
  std::vector<Hole> holes;
  for (int i = 0; i < 3; ++i)
    for (const double side : {-1.0, 1.0})
      holes.push_back(placed(shapes[i + 1], Point(side * 18 * (i + 1), 0), i % 2 ? pi / 2 : 0.0));
  for (const double side : {-1.0, 1.0}) holes.push_back(placed(shapes[5], Point(0, side * 20), 0));
  holes.push_back(placed(shapes[6], Point(0, 0), pi / 4));
  for (std::size_t i = 0; i < holes.size(); ++i) holes[i].name = std::to_string(i);
  const Plate plate = with(holes);
  ASSERT_TRUE(faults(plate).empty());
  ASSERT_EQ(mirrors(plate), (Mirrors{true, true}));
  for (const Mirrors lines : lines_of(mirrors(plate))) expect_cut_into_images(plate, lines);
}

TEST(Mirrors, AreLostByTheSmallestDifference) {
  const auto shapes = holes_of_every_shape();
  EXPECT_EQ(mirrors(with({})), (Mirrors{true, true}));
  EXPECT_EQ(mirrors(with({placed(shapes[0], Point(0, 0), 0.3)})), (Mirrors{true, true}));  // round: any angle
  EXPECT_EQ(mirrors(with({placed(shapes[1], Point(0, 0), 0.3)})), Mirrors{});
  EXPECT_EQ(mirrors(with({placed(shapes[1], Point(0, 0), 1e-9)})), Mirrors{});
  EXPECT_EQ(mirrors(with({placed(shapes[0], Point(1e-8, 0), 0)})), (Mirrors{false, true}));
  EXPECT_EQ(mirrors(with({placed(shapes[0], Point(0, 1e-8), 0)})), (Mirrors{true, false}));
  Hole smaller = placed(shapes[0], Point(20, 0), 0);
  smaller.length = smaller.width = 7.999;
  EXPECT_EQ(mirrors(with({placed(shapes[0], Point(-20, 0), 0), smaller})), (Mirrors{false, true}));
  EXPECT_EQ(mirrors(with({placed(shapes[1], Point(-20, 0), 0.5), placed(shapes[1], Point(20, 0), 0.5)})),
            Mirrors{});
}

TEST(MirrorImage, IsTheHoleOnTheOtherSide) {
  const auto shapes = holes_of_every_shape();
  const Plate plate = with({placed(shapes[3], Point(20, 10), 0.4), placed(shapes[0], Point(0, 0), 0),
                            placed(shapes[3], Point(-20, 10), pi - 0.4)});
  const Mirrors across{true, false};
  ASSERT_EQ(mirrors(plate), across);
  EXPECT_EQ(mirror_image(plate, 0, across), 2u);
  EXPECT_EQ(mirror_image(plate, 1, across), 1u);
  EXPECT_EQ(mirror_image(plate, 2, across), 0u);
  EXPECT_THROW(mirror_image(plate, 0, {false, true}), std::invalid_argument);
}

}  // namespace
}  // namespace raiser::mesh
