#include "mesh/plate/plate.hpp"

#include <gtest/gtest.h>

#include <Eigen/Geometry>
#include <cmath>
#include <limits>
#include <numbers>
#include <random>

#include "mesh/plate/distance.hpp"
#include "mesh/plate/section.hpp"

namespace raiser::mesh {
namespace {

constexpr double pi = std::numbers::pi;
constexpr double nan = std::numeric_limits<double>::quiet_NaN();
constexpr double infinite = std::numeric_limits<double>::infinity();

Hole circle(double diameter, Point centre, std::string name = "") {
  return {std::move(name), HoleShape::circle, diameter, diameter, 0.0, centre, 0.0};
}

// The edge of a hole written down independently of the library: point at
// parameter t of [0, 1), walked as arcs and straight pieces of equal parameter.
Point edge_point(const Hole& hole, double t) {
  const double a = 0.5 * hole.length;
  const double b = 0.5 * hole.width;
  const double turn = 2.0 * pi * t;
  Point local(a * std::cos(turn), b * std::sin(turn));
  if (hole.shape == HoleShape::slot || hole.shape == HoleShape::rounded_rectangle) {
    const double r = hole.shape == HoleShape::slot ? b : hole.corner_radius;
    const double eighth = 8.0 * t;
    const int piece = static_cast<int>(eighth);
    const double s = eighth - piece;
    const Point corners[4] = {{a - r, b - r}, {r - a, b - r}, {r - a, r - b}, {a - r, r - b}};
    const int corner = piece / 2;
    const double angle = 0.5 * pi * (corner + (piece % 2 == 0 ? s : 1.0));
    local = corners[corner];
    if (piece % 2 == 1) local += s * (corners[(corner + 1) % 4] - corners[corner]);
    local += r * Point(std::cos(angle), std::sin(angle));
  }
  const double c = std::cos(hole.angle);
  const double s = std::sin(hole.angle);
  return hole.centre + Point(c * local.x() - s * local.y(), s * local.x() + c * local.y());
}

Hole random_hole(std::mt19937& random, double field) {
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  Hole hole;
  hole.shape = static_cast<HoleShape>(random() % 4);
  hole.length = std::exp(std::log(0.3) + unit(random) * std::log(30.0));
  hole.width = hole.shape == HoleShape::circle ? hole.length
               : hole.shape == HoleShape::slot ? hole.length * (0.1 + 0.9 * unit(random))
                                               : hole.length * std::exp((unit(random) - 0.5) * 4.0);
  if (hole.shape == HoleShape::rounded_rectangle)
    hole.corner_radius = std::min(hole.length, hole.width) * (0.01 + 0.49 * unit(random));
  hole.centre = field * Point(unit(random) - 0.5, unit(random) - 0.5);
  hole.angle = 2.0 * pi * unit(random);
  return hole;
}

// Distance of two edges by sampling, then by refining the best pair.
double sampled_distance(const Hole& a, const Hole& b) {
  constexpr int n = 400;
  double best = infinite;
  double ta = 0.0;
  double tb = 0.0;
  const auto look = [&](double s, double t) {
    const double distance = (edge_point(a, s - std::floor(s)) - edge_point(b, t - std::floor(t))).norm();
    if (distance < best) best = distance, ta = s, tb = t;
  };
  std::vector<Point> of_b;
  for (int j = 0; j < n; ++j) of_b.push_back(edge_point(b, double(j) / n));
  for (int i = 0; i < n; ++i) {
    const Point p = edge_point(a, double(i) / n);
    for (int j = 0; j < n; ++j)
      if ((p - of_b[j]).norm() < best) best = (p - of_b[j]).norm(), ta = double(i) / n, tb = double(j) / n;
  }
  for (double h = 1.0 / n; h > 1e-10;) {
    const double before = best;
    const double s = ta;
    const double t = tb;
    for (int i = -2; i <= 2; ++i)
      for (int j = -2; j <= 2; ++j) look(s + i * h, t + j * h);
    if (!(best < before * (1.0 - 1e-6))) h *= 0.5;
  }
  return best;
}

bool holds(const Hole& hole, const Point& p) {
  const double c = std::cos(hole.angle);
  const double s = std::sin(hole.angle);
  const Point d = p - hole.centre;
  const double x = std::abs(c * d.x() + s * d.y());
  const double y = std::abs(c * d.y() - s * d.x());
  const double a = 0.5 * hole.length;
  const double b = 0.5 * hole.width;
  if (hole.shape == HoleShape::circle || hole.shape == HoleShape::ellipse)
    return std::hypot(x / a, y / b) < 1.0;
  const double r = hole.shape == HoleShape::slot ? b : hole.corner_radius;
  return std::hypot(std::max(x - (a - r), 0.0), std::max(y - (b - r), 0.0)) < r;
}

TEST(Gap, AgreesWithDenseSamplingOverRandomPairs) {
  std::mt19937 random(20240611);
  int apart = 0;
  int overlapping = 0;
  for (int trial = 0; trial < 400; ++trial) {
    const Hole a = random_hole(random, 12.0);
    const Hole b = random_hole(random, 12.0);
    const double size = a.length + a.width + b.length + b.width;
    bool common = false;
    for (int i = 0; i < 1000 && !common; ++i)
      common = holds(a, edge_point(b, i / 1000.0)) || holds(b, edge_point(a, i / 1000.0));
    const double found = gap(a, b);
    if (common) {
      ++overlapping;
      EXPECT_LT(found, 0.0) << "trial " << trial;
      Hole moved = b;  // the shift it names must be needed: half of it is not enough in any direction
      for (int k = 0; k < 36; ++k) {
        moved.centre = b.centre - 0.5 * found * Point(std::cos(k * pi / 18), std::sin(k * pi / 18));
        EXPECT_LT(gap(a, moved), 0.0) << "trial " << trial;
      }
      continue;
    }
    ++apart;
    const double sampled = sampled_distance(a, b);
    EXPECT_LE(found, sampled + 1e-12 * size) << "trial " << trial;
    EXPECT_NEAR(found, sampled, 1e-7 * size) << "trial " << trial;
  }
  EXPECT_GT(apart, 150);
  EXPECT_GT(overlapping, 50);
}

// Two ellipses placed from the answer: a point and normal on each, a given
// distance apart along the common normal.
TEST(Gap, OfEllipsesIsGoodToTenDigitsWhateverTheirFlatness) {
  std::mt19937 random(7);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  for (int trial = 0; trial < 500; ++trial) {
    Hole a;
    a.shape = HoleShape::ellipse;
    a.length = 10.0;
    a.width = 10.0 * std::pow(10.0, -3.0 * unit(random));
    Hole b = a;
    b.length = 1.0 + 9.0 * unit(random);
    b.width = b.length * std::pow(10.0, 2.0 - 4.0 * unit(random));
    const auto contact = [](const Hole& hole, double t) {  // point and outward normal, own axes
      const Point p(0.5 * hole.length * std::cos(t), 0.5 * hole.width * std::sin(t));
      return std::pair(p,
                       Point(p.x() / std::pow(hole.length, 2), p.y() / std::pow(hole.width, 2)).normalized());
    };
    const auto [pa, na] = contact(a, 2.0 * pi * unit(random));
    const auto [pb, nb] = contact(b, 2.0 * pi * unit(random));
    b.angle = std::atan2(-na.y(), -na.x()) - std::atan2(nb.y(), nb.x());
    const double expected = std::pow(10.0, -4.0 * unit(random));
    const Eigen::Rotation2Dd turn(b.angle);
    b.centre = pa + expected * na - turn * pb;
    EXPECT_NEAR(gap(a, b), expected, 1e-12 * (a.length + b.length + b.width)) << "trial " << trial;
    b.centre = pa - 1e-6 * na - turn * pb;
    EXPECT_LT(gap(a, b), 0.0) << "trial " << trial;
    EXPECT_GE(gap(a, b), -1.0001e-6) << "trial " << trial;
  }
}

TEST(Gap, OfRoundedShapesIsExact) {
  const Hole slot{"", HoleShape::slot, 10.0, 2.0, 0.0, Point(0, 0), 0.0};
  EXPECT_DOUBLE_EQ(gap(slot, circle(2.0, Point(3.0, 5.0))), 3.0);
  EXPECT_NEAR(gap(slot, circle(2.0, Point(7.0, 4.0))), 3.0, 1e-14);  // 3-4-5 from the end's centre (4, 0)
  Hole square{"", HoleShape::rounded_rectangle, 4.0, 4.0, 0.5, Point(0, 6), 0.25 * pi};
  EXPECT_NEAR(gap(slot, square), 6.0 - 1.0 - 1.5 * std::sqrt(2.0) - 0.5, 1e-14);
  square.centre.y() = 2.0;
  EXPECT_NEAR(gap(slot, square), 2.0 - 1.0 - 1.5 * std::sqrt(2.0) - 0.5, 1e-12);
  EXPECT_NEAR(gap(circle(2.0, Point(1, 1)), circle(4.0, Point(1, 1))), -3.0, 1e-3);
}

TEST(HalfExtent, IsTheFarthestPointOfTheEdge) {
  std::mt19937 random(3);
  for (int trial = 0; trial < 100; ++trial) {
    const Hole hole = random_hole(random, 5.0);
    const Point n(std::cos(trial), std::sin(trial));
    double farthest = 0.0;
    for (int i = 0; i < 20000; ++i)
      farthest = std::max(farthest, n.dot(edge_point(hole, i / 20000.0) - hole.centre));
    EXPECT_LE(farthest, half_extent(hole, n) * (1 + 1e-14)) << "trial " << trial;
    EXPECT_NEAR(farthest, half_extent(hole, n), 1e-6 * (hole.length + hole.width)) << "trial " << trial;
  }
}

TEST(EdgeDistance, NamesEachEdge) {
  Plate plate{100, 60, 5, {circle(10, Point(20, 5))}};
  const auto distances = edge_distances(plate, plate.holes[0]);
  EXPECT_DOUBLE_EQ(distances[0], 25.0);
  EXPECT_DOUBLE_EQ(distances[1], 20.0);
  EXPECT_DOUBLE_EQ(distances[2], 65.0);
  EXPECT_DOUBLE_EQ(distances[3], 30.0);
  EXPECT_DOUBLE_EQ(edge_distance(plate, plate.holes[0]), 20.0);
}

TEST(Chord, MeetsTheEdgeAndAgreesWithCountingPoints) {
  std::mt19937 random(99);
  int hits = 0;
  for (int trial = 0; trial < 300; ++trial) {
    const Hole hole = random_hole(random, 4.0);
    const Direction direction = trial % 2 ? Direction::across : Direction::along;
    const double station = std::uniform_real_distribution<double>(-4, 4)(random);
    const auto at = [&](double s) {
      return direction == Direction::across ? Point(station, s) : Point(s, station);
    };
    constexpr int n = 40000;
    const double reach = 12.0;
    int count = 0;
    for (int i = 0; i < n; ++i) count += holds(hole, at(-reach + 2.0 * reach * (i + 0.5) / n)) ? 1 : 0;
    const auto found = chord(hole, direction, station);
    EXPECT_NEAR(found ? found->end - found->begin : 0.0, 2.0 * reach * count / n, 2.1 * reach / n + 1e-9)
        << "trial " << trial;
    if (!found) continue;
    ++hits;
    const double little = 1e-9 * (hole.length + hole.width);
    const double length = found->end - found->begin;
    if (length < 1e-3) continue;
    for (const auto& [end, outwards] : {std::pair(found->begin, -1.0), std::pair(found->end, 1.0)}) {
      EXPECT_FALSE(holds(hole, at(end + outwards * little))) << "trial " << trial;
      EXPECT_TRUE(holds(hole, at(end - outwards * little))) << "trial " << trial;
    }
  }
  EXPECT_GT(hits, 60);
}

TEST(MaterialAlong, NamesWhatBoundsEachPiece) {
  const Plate plate{
      100, 60, 5, {circle(10, Point(0, 12)), circle(8, Point(1, -10)), circle(4, Point(30, 0))}};
  const auto pieces = material_along(plate, Direction::across, 0.0);
  ASSERT_EQ(pieces.size(), 3u);
  const double half = std::sqrt(16.0 - 1.0);
  EXPECT_DOUBLE_EQ(pieces[0].begin, -30.0);
  EXPECT_DOUBLE_EQ(pieces[0].end, -10.0 - half);
  EXPECT_DOUBLE_EQ(pieces[1].begin, -10.0 + half);
  EXPECT_DOUBLE_EQ(pieces[1].end, 7.0);
  EXPECT_DOUBLE_EQ(pieces[2].begin, 17.0);
  EXPECT_DOUBLE_EQ(pieces[2].end, 30.0);
  EXPECT_FALSE(pieces[0].raiser_at_begin());
  EXPECT_EQ(pieces[0].raiser_at_end(), std::optional<std::size_t>(1));
  EXPECT_EQ(pieces[1].raiser_at_begin(), std::optional<std::size_t>(1));
  EXPECT_EQ(pieces[2].raiser_at_begin(), std::optional<std::size_t>(0));
  EXPECT_FALSE(pieces[2].raiser_at_end());
  EXPECT_EQ(material_along(plate, Direction::along, 0.0).size(), 2u);
  EXPECT_TRUE(material_along(plate, Direction::across, 50.1).empty());
  EXPECT_EQ(material_along(plate, Direction::across, 5.0).size(), 1u);  // touches the one, misses the other
}

Plate with(std::vector<Hole> holes) { return {200.0, 100.0, 5.0, std::move(holes)}; }

void expect_one(const Plate& plate, const std::string& text) {
  const auto found = faults(plate);
  ASSERT_EQ(found.size(), 1u) << "wanted: " << text;
  EXPECT_NE(found[0].what.find(text), std::string::npos) << found[0].what;
  EXPECT_FALSE(found[0].cure.empty());
}

TEST(Faults, NoneForALegalPlate) {
  EXPECT_TRUE(faults(with({})).empty());
  EXPECT_TRUE(faults(with({circle(20, Point(0, 0), "a"),
                           {"b", HoleShape::slot, 10, 10, 0, Point(30, 0), 0.3},
                           {"c", HoleShape::rounded_rectangle, 10, 6, 3, Point(60, 0), 1.0},
                           {"d", HoleShape::ellipse, 1, 30, 0, Point(-40, 0), 0.1}}))
                  .empty());
}

TEST(Faults, NameEachKindWithItsFigures) {
  expect_one(with({circle(10, Point(110, 0))}), "lies outside the plate, beyond its right edge");
  expect_one(with({circle(10, Point(0, 47))}), "crosses the top edge by 2 mm");
  expect_one(with({circle(10, Point(0, -45))}), "touches the bottom edge");
  expect_one(with({circle(10, Point(-94.9995, 0))}), "leaves a ligament of 0.0005 mm to the left edge");
  expect_one(with({circle(10, Point(0, 0), "a"), circle(10, Point(8, 0), "b")}),
             "'a' and hole 'b' overlap by 2 mm");
  expect_one(with({circle(10, Point(0, 0), "a"), circle(10, Point(10, 0), "b")}), "'a' and hole 'b' touch");
  expect_one(with({circle(10, Point(0, 0), "a"), circle(30, Point(2, 0), "b")}), "'a' lies inside hole 'b'");
  expect_one(with({circle(10, Point(0, 0)), circle(10, Point(10.0005, 0))}), "ligament of 0.0005 mm");
  expect_one(with({circle(10, Point(0, 0), "a"), circle(10, Point(30, 0), "a")}), "both named 'a'");
  expect_one(with({circle(-3, Point(0, 0))}), "diameter is -3 mm");
  expect_one(with({circle(nan, Point(0, 0))}), "diameter is nan mm");
  expect_one(with({circle(3, Point(infinite, 0))}), "centre is (inf, 0) mm");
  expect_one(with({{"", HoleShape::ellipse, 5, 0, 0, Point(0, 0), 0}}), "width is 0 mm");
  expect_one(with({{"", HoleShape::ellipse, 5, 3, 0, Point(0, 0), nan}}), "angle is nan rad");
  expect_one(with({{"", HoleShape::circle, 5, 3, 0, Point(0, 0), 0}}), "two diameters");
  expect_one(with({{"", HoleShape::slot, 5, 6, 0, Point(0, 0), 0}}), "length 5 mm, less than its width 6 mm");
  expect_one(with({{"", HoleShape::rounded_rectangle, 5, 6, 0, Point(0, 0), 0}}), "corner radius of 0 mm");
  expect_one(with({{"", HoleShape::rounded_rectangle, 5, 6, 2.6, Point(0, 0), 0}}),
             "more than half its smaller side");
  Plate flat = with({});
  flat.thickness = 0.0;
  expect_one(flat, "thickness is 0 mm");
}

TEST(Faults, AllComeAtOnceAndEachPairOnce) {
  const Plate plate{nan, -1, infinite, {circle(0, Point(nan, 0), "a"), circle(5, Point(0, 0), "a")}};
  EXPECT_EQ(faults(plate).size(), 3u + 2u + 1u);
  const auto found = faults(with({circle(10, Point(16, 0)), circle(10, Point(0, 0)), circle(10, Point(8, 0)),
                                  circle(10, Point(60, 60))}));
  ASSERT_EQ(found.size(), 2u + 1u);  // 0-2, 1-2, and hole 3 outside
  EXPECT_EQ(found[2].hole, 1u);
  EXPECT_EQ(found[2].other, 2u);
}

TEST(Faults, SayTheShiftThatCures) {
  Plate plate = with({{"", HoleShape::slot, 20, 6, 0, Point(0, 0), 0.5 * pi}, circle(8, Point(5, 4))});
  const auto found = faults(plate);
  ASSERT_EQ(found.size(), 1u);
  EXPECT_NE(found[0].cure.find("at least 2.001 mm further apart"), std::string::npos) << found[0].cure;
  plate.holes[1].centre.x() += 2.0005;
  EXPECT_EQ(faults(plate).size(), 1u);
  plate.holes[1].centre.x() += 0.0002;
  EXPECT_TRUE(faults(plate).empty());
}

TEST(Faults, FindTheOneAmongAThousandHoles) {
  Plate plate{1000, 1000, 5, {}};
  std::mt19937 random(5);
  for (int i = 0; i < 1000; ++i)
    plate.holes.push_back({std::to_string(i), HoleShape::ellipse, 33.0, 12.0, 0.0,
                           Point(-480 + 30.0 * (i % 32), -480 + 30.0 * (i / 32)),
                           0.7 + 0.01 * double(random() % 20)});
  EXPECT_TRUE(faults(plate).empty());
  plate.holes[517].length = 60.0;
  const auto found = faults(plate);
  ASSERT_FALSE(found.empty());
  for (const PlateFault& fault : found) EXPECT_TRUE(fault.hole == 517 || fault.other == 517) << fault.what;
}

TEST(Faults, SizesTooFarApartToResolve) {
  const auto rectangle = [](double radius) {
    return Hole{"", HoleShape::rounded_rectangle, 10, 10, radius, Point(0, 0), 0.2};
  };
  expect_one(with({rectangle(0.0099)}), "corner radius 0.0099 mm is less than 0.001 of its smaller side");
  EXPECT_TRUE(faults(with({rectangle(0.0101)})).empty());
  expect_one(with({rectangle(4.9999999)}), "straight run of 2e-07 mm is too short");
  EXPECT_TRUE(faults(with({rectangle(5)})).empty());
  EXPECT_TRUE(faults(with({rectangle(4.9999)})).empty());
  expect_one(with({{"", HoleShape::slot, 10.000001, 10, 0, Point(0, 0), 0}}), "straight run of 1e-06 mm");
  expect_one(with({{"", HoleShape::ellipse, 10, 0.001, 0, Point(0, 0), 0}}),
             "smallest radius on its edge, 5e-08 mm");
  EXPECT_TRUE(faults(with({{"", HoleShape::ellipse, 10, 0.01, 0, Point(0, 0), 0}})).empty());
  expect_one({10001, 5, 1, {circle(1, Point(0, 0))}}, "longer side is 2000 times its shorter one");
  EXPECT_TRUE(faults(Plate{10000, 5, 1, {circle(1, Point(0, 0))}}).empty());
}

// Two rounded squares whose corners meet overlap, though their centres are
// farther apart than their sides are long.
TEST(Plate, SeesSquaresThatMeetCornerToCorner) {
  const auto square = [](double at, const char* name) {
    return Hole{name, HoleShape::rounded_rectangle, 10, 10, 0.1, Point(at, at), 0};
  };
  const auto found = faults(Plate{200, 100, 5, {square(-6.5, "a"), square(3, "b")}});
  ASSERT_EQ(found.size(), 1U);
  EXPECT_NE(found[0].what.find("overlap"), std::string::npos);
  EXPECT_TRUE(faults(Plate{200, 100, 5, {square(-6.5, "a"), square(4, "b")}}).empty());
}

}  // namespace
}  // namespace raiser::mesh
