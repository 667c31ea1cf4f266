#include "validation/compare.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <numbers>
#include <set>

#include "validation/published.hpp"

namespace raiser::validation {
namespace {

using mesh::Hole;
using mesh::HoleShape;
using mesh::Point;
using solver::Load;

Hole hole(HoleShape shape, double length, double width, Point at = {0, 0}, double angle = 0,
          double radius = 0) {
  return {"hole", shape, length, width, radius, at, angle};
}
Hole circle(double d, Point at = {0, 0}) { return hole(HoleShape::circle, d, d, at); }

Load load(Load::Kind kind, double stress, std::size_t at = 0) {
  Load l;
  l.kind = kind;
  l.name = "load";
  l.stress = stress;
  l.hole = at;
  return l;
}

/// Findings as a solver would give them: the same largest and smallest edge
/// stress at every hole, bound 0.5 MPa.
solver::LoadFindings findings(const solver::Problem& p, double largest, double smallest) {
  solver::LoadFindings f;
  f.name = "load";
  for (std::size_t i = 0; i < p.plate.holes.size(); ++i) {
    solver::RaiserFindings h;
    h.raiser = i;
    h.largest.stress = {largest, 0.5};
    h.smallest.stress = {smallest, 0.5};
    f.raisers.push_back(h);
  }
  return f;
}

struct Given {
  double length = 400, width = 100;
  std::vector<Hole> holes;
  std::vector<Load> loads;
  double largest = 300, smallest = -100;
};

std::vector<Comparison> run(const Given& g) {
  const solver::Problem p{{g.length, g.width, 5, g.holes}, {200e3, 0.3, solver::PlaneState::stress}, g.loads};
  const auto one = findings(p, g.largest, g.smallest);
  return compare(p, one, std::vector<solver::LoadFindings>(g.loads.size(), one));
}

const Comparison* find(const std::vector<Comparison>& rows, Reference reference) {
  const auto name = record(reference).name;
  const auto source = record(reference).source;
  const auto it = std::find_if(rows.begin(), rows.end(),
                               [&](const Comparison& c) { return c.solution == name && c.source == source; });
  return it == rows.end() ? nullptr : &*it;
}

TEST(Compare, CentralHoleInTensionMeetsFourSolutions) {
  const auto rows =
      run({.holes = {circle(20)}, .loads = {load(Load::Kind::tension, 100)}, .largest = 315.26});
  EXPECT_EQ(rows.size(), 4u);
  for (const Reference r :
       {Reference::howland, Reference::heywood, Reference::roark_circle, Reference::peterson_circle}) {
    const auto* c = find(rows, r);
    ASSERT_TRUE(c) << record(r).name;
    EXPECT_EQ(c->quantity, "Kt net");
    EXPECT_NEAR(c->ours, 3.1526 * 0.8, 1e-9);
    EXPECT_NEAR(c->bound, 0.005 * 0.8, 1e-12);
    EXPECT_NEAR(c->difference, c->ours / c->published - 1, 1e-12);
    EXPECT_TRUE(c->in_range) << c->range_note;
    EXPECT_LT(std::abs(c->difference), 0.01);
    EXPECT_TRUE(c->from_memory);
  }
  EXPECT_NEAR(find(rows, Reference::howland)->published, 2.51, 1e-9);
}

TEST(Compare, CompressionGivesTheSameFactor) {
  const auto rows = run({.holes = {circle(20)},
                         .loads = {load(Load::Kind::tension, -100)},
                         .largest = 100,
                         .smallest = -315.26});
  ASSERT_TRUE(find(rows, Reference::howland));
  EXPECT_NEAR(find(rows, Reference::howland)->ours, 3.1526 * 0.8, 1e-9);
}

TEST(Compare, BeyondItsRangeASolutionSaysByHowMuch) {
  const auto rows = run({.holes = {circle(60)}, .loads = {load(Load::Kind::tension, 100)}});
  EXPECT_FALSE(find(rows, Reference::howland));  // its table ends
  const auto* heywood_row = find(rows, Reference::heywood);
  ASSERT_TRUE(heywood_row);
  EXPECT_FALSE(heywood_row->in_range);
  EXPECT_EQ(heywood_row->range_note, "d/W = 0.6 is above 0.3 by 100 %");
  EXPECT_TRUE(find(rows, Reference::peterson_circle)->in_range);
}

TEST(Compare, ShortStripIsOutOfRange) {
  const auto rows = run({.length = 100, .holes = {circle(20)}, .loads = {load(Load::Kind::tension, 100)}});
  for (const auto& c : rows) {
    EXPECT_FALSE(c.in_range);
    EXPECT_NE(c.range_note.find("0.4 widths from the hole"), std::string::npos) << c.range_note;
  }
  EXPECT_FALSE(rows.empty());
}

TEST(Compare, TransverseTensionSeesTheStripAcross) {
  const auto rows = run({.length = 100,
                         .width = 400,
                         .holes = {circle(20)},
                         .loads = {load(Load::Kind::transverse, 100)},
                         .largest = 315.26});
  ASSERT_TRUE(find(rows, Reference::howland));
  EXPECT_TRUE(find(rows, Reference::howland)->in_range);
  EXPECT_NEAR(find(rows, Reference::howland)->ours, 3.1526 * 0.8, 1e-9);
}

TEST(Compare, EccentricHole) {
  // c = 25, e = 75, r = 10: r/c 0.4, e/c 3.
  const auto rows =
      run({.holes = {circle(20, {0, -25})}, .loads = {load(Load::Kind::tension, 100)}, .largest = 362});
  const auto* chart = find(rows, Reference::sjostrom_eccentric);
  ASSERT_TRUE(chart);
  EXPECT_NEAR(chart->published, *sjostrom_eccentric(0.4, 3.0), 1e-12);
  EXPECT_NEAR(chart->ours, 3.62, 1e-12);
  EXPECT_TRUE(chart->in_range) << chart->range_note;
  EXPECT_FALSE(chart->from_memory);
  EXPECT_NEAR(find(rows, Reference::roark_eccentric)->published, roark_eccentric(0.4, 0.25), 1e-12);
  ASSERT_TRUE(find(rows, Reference::half_plane));
  EXPECT_FALSE(find(rows, Reference::half_plane)->in_range);  // the far edge is only three times as far
  EXPECT_FALSE(find(rows, Reference::howland));
}

TEST(Compare, HoleNearOneEdgeOfAWidePlate) {
  const auto rows = run({.length = 4000,
                         .width = 1000,
                         .holes = {circle(20, {0, 470})},
                         .loads = {load(Load::Kind::tension, 100)}});
  ASSERT_TRUE(find(rows, Reference::half_plane));
  EXPECT_TRUE(find(rows, Reference::half_plane)->in_range) << find(rows, Reference::half_plane)->range_note;
  EXPECT_NEAR(find(rows, Reference::half_plane)->published, half_plane_near(1 / 3.0), 1e-12);
}

TEST(Compare, Bending) {
  // Peak 2 * 0.2/(1 - 0.008) of the outer fibre's 100 MPa, within the formula's 0.6 %.
  const auto rows = run(
      {.holes = {circle(20)}, .loads = {load(Load::Kind::bending, 100)}, .largest = 40.1, .smallest = -40.1});
  ASSERT_EQ(rows.size(), 1u);
  EXPECT_DOUBLE_EQ(rows[0].published, 2);
  EXPECT_NEAR(rows[0].ours, 40.1 / (100 * 0.2 / 0.992), 1e-12);
  EXPECT_TRUE(rows[0].in_range) << rows[0].range_note;
  EXPECT_TRUE(run({.holes = {circle(20, {0, 10})}, .loads = {load(Load::Kind::bending, 100)}}).empty());
}

TEST(Compare, ShearAndTheInfinitePlate) {
  const Given small{.length = 1000,
                    .width = 1000,
                    .holes = {circle(20)},
                    .loads = {load(Load::Kind::shear, -100)},
                    .largest = 400,
                    .smallest = -400};
  auto rows = run(small);
  ASSERT_TRUE(find(rows, Reference::kirsch));
  EXPECT_DOUBLE_EQ(rows[0].published, 4);
  EXPECT_DOUBLE_EQ(rows[0].ours, 4);
  EXPECT_TRUE(rows[0].in_range) << rows[0].range_note;
  Given large = small;
  large.holes = {circle(400)};
  rows = run(large);
  EXPECT_FALSE(rows[0].in_range);
  EXPECT_NE(rows[0].range_note.find("far outside"), std::string::npos)
      << rows[0].range_note;  // 62 % in truth
  large.holes = {circle(200)};
  rows = run(large);
  EXPECT_NE(rows[0].range_note.find("about 16 %"), std::string::npos) << rows[0].range_note;
}

TEST(Compare, EllipseAlignedAndTurned) {
  auto rows = run({.holes = {hole(HoleShape::ellipse, 6, 30)},
                   .loads = {load(Load::Kind::tension, 100)},
                   .largest = 1174.08});
  const auto* fit = find(rows, Reference::roark_ellipse);
  ASSERT_TRUE(fit);
  EXPECT_NEAR(fit->published, roark_ellipse(5, 0.3), 1e-12);
  EXPECT_NEAR(fit->ours, 11.7408 * 0.7, 1e-12);
  EXPECT_TRUE(fit->in_range) << fit->range_note;
  EXPECT_LT(std::abs(fit->difference), 0.01);

  // The same hole written the other way round, and turned by 90 degrees.
  rows = run({.holes = {hole(HoleShape::ellipse, 30, 6, {0, 0}, std::numbers::pi / 2)},
              .loads = {load(Load::Kind::tension, 100)}});
  ASSERT_TRUE(find(rows, Reference::roark_ellipse));
  EXPECT_NEAR(find(rows, Reference::roark_ellipse)->published, roark_ellipse(5, 0.3), 1e-9);

  // At 45 degrees the table's 6.9267 for a/b = 5 is the infinite plate's.
  rows = run({.holes = {hole(HoleShape::ellipse, 30, 6, {0, 0}, std::numbers::pi / 4)},
              .loads = {load(Load::Kind::tension, 100)}});
  EXPECT_FALSE(find(rows, Reference::roark_ellipse));
  ASSERT_TRUE(find(rows, Reference::inglis));
  EXPECT_NEAR(find(rows, Reference::inglis)->published, 6.9267, 5e-4);
  EXPECT_FALSE(find(rows, Reference::inglis)->in_range);
  EXPECT_NE(find(rows, Reference::inglis)->range_note.find("not infinite"), std::string::npos);
}

TEST(Compare, LoadsTogetherOnAHole) {
  const auto rows = run({.length = 1000,
                         .width = 1000,
                         .holes = {circle(10)},
                         .loads = {load(Load::Kind::tension, 100), load(Load::Kind::transverse, -50),
                                   load(Load::Kind::pressure, 20)},
                         .largest = 370});
  const auto* c = find(rows, Reference::kirsch);
  ASSERT_TRUE(c);
  EXPECT_EQ(c->quantity, "peak edge stress, MPa");
  EXPECT_NEAR(c->published, 3 * 100 + 50 + 20, 1e-9);
  EXPECT_NEAR(c->difference, 0, 1e-12);
  EXPECT_TRUE(c->in_range);
  EXPECT_TRUE(find(rows, Reference::howland));            // of the first load by itself
  EXPECT_TRUE(find(rows, Reference::pressure_infinite));  // of the third
}

TEST(Compare, TwoHoles) {
  const std::vector<Hole> across{circle(20, {0, -20}), circle(20, {0, 20})};
  const Given wide{.length = 2000, .width = 2000, .holes = across, .loads = {load(Load::Kind::tension, 100)}};
  auto rows = run(wide);
  ASSERT_EQ(rows.size(), 2u);  // one for each hole
  EXPECT_EQ(rows[1].hole, 1u);
  EXPECT_NEAR(rows[0].published, 3.066, 1e-9);
  EXPECT_TRUE(rows[0].in_range) << rows[0].range_note;

  Given along = wide;
  along.loads = {load(Load::Kind::transverse, 100)};
  rows = run(along);
  EXPECT_NEAR(find(rows, Reference::ling)->published, 2.703, 1e-9);
  EXPECT_NEAR(find(rows, Reference::two_along_fit)->published, two_along_fit(0.5), 1e-12);

  Given both = wide;
  both.loads.push_back(load(Load::Kind::transverse, 100));
  rows = run(both);
  EXPECT_EQ(std::count_if(rows.begin(), rows.end(),
                          [](const auto& c) { return std::abs(c.published - 2.411) < 1e-9; }),
            2);

  Given narrow = wide;
  narrow.width = 100;
  EXPECT_FALSE(find(run(narrow), Reference::ling)->in_range);

  Given just = wide;  // one hole would pass, the pair across does not
  just.width = 320;
  ASSERT_TRUE(find(run(just), Reference::ling));
  EXPECT_FALSE(find(run(just), Reference::ling)->in_range);

  Given unequal = wide;
  unequal.holes[1].length = unequal.holes[1].width = 18;
  EXPECT_FALSE(find(run(unequal), Reference::ling));
}

TEST(Compare, MiddleOfARow) {
  Given g{.length = 3000, .width = 3000, .holes = {}, .loads = {load(Load::Kind::tension, 100)}};
  for (int i = -6; i <= 6; ++i) g.holes.push_back(circle(20, {0, 60.0 * i}));
  const auto rows = run(g);
  const auto* c = find(rows, Reference::row_across_fit);
  ASSERT_TRUE(c);
  EXPECT_EQ(c->hole, 6u);
  EXPECT_NEAR(c->published, row_across_fit(1 / 3.0), 1e-12);
  EXPECT_NEAR(c->ours, 300.0 / (100 / (1 - 1 / 3.0)), 1e-12);
  EXPECT_TRUE(c->in_range) << c->range_note;
}

TEST(Compare, SlotRectangleSquare) {
  auto rows = run({.length = 2000,
                   .width = 1000,
                   .holes = {hole(HoleShape::slot, 40, 10, {0, 0}, std::numbers::pi / 2)},
                   .loads = {load(Load::Kind::tension, 100)}});
  ASSERT_EQ(rows.size(), 1u);
  EXPECT_NEAR(rows[0].published, 5, 1e-9);
  EXPECT_TRUE(rows[0].in_range);
  EXPECT_TRUE(
      run({.holes = {hole(HoleShape::slot, 40, 10)}, .loads = {load(Load::Kind::tension, 100)}}).empty());

  rows = run({.length = 2000,
              .width = 1000,
              .holes = {hole(HoleShape::rounded_rectangle, 20, 40, {0, 0}, 0, 4)},
              .loads = {load(Load::Kind::tension, 100)}});
  ASSERT_EQ(rows.size(), 1u);
  EXPECT_NEAR(rows[0].published, rounded_rectangle(0.5, 0.4), 1e-12);
  EXPECT_TRUE(rows[0].in_range);

  rows = run({.length = 1000,
              .width = 1000,
              .holes = {hole(HoleShape::rounded_rectangle, 20, 20, {0, 0}, 0.3, 2)},
              .loads = {load(Load::Kind::tension, 100), load(Load::Kind::transverse, 100)}});
  ASSERT_EQ(rows.size(), 1u);
  EXPECT_NEAR(rows[0].published, 4.8384, 1e-9);
}

TEST(Compare, PressureInAHole) {
  auto rows = run({.length = 1000,
                   .width = 1000,
                   .holes = {circle(20)},
                   .loads = {load(Load::Kind::pressure, 50)},
                   .largest = 50,
                   .smallest = 49});
  ASSERT_EQ(rows.size(), 1u);
  EXPECT_DOUBLE_EQ(rows[0].ours, 1);
  EXPECT_TRUE(rows[0].in_range);

  rows = run({.length = 1000,
              .width = 1000,
              .holes = {circle(20, {0, 480})},
              .loads = {load(Load::Kind::pressure, 50)},
              .largest = 83});
  EXPECT_FALSE(find(rows, Reference::pressure_infinite)->in_range);
  EXPECT_NEAR(find(rows, Reference::pressure_half_plane)->published, 5 / 3.0, 1e-12);
  EXPECT_TRUE(find(rows, Reference::pressure_half_plane)->in_range);

  rows = run({.length = 1000,
              .width = 1000,
              .holes = {hole(HoleShape::ellipse, 30, 10)},
              .loads = {load(Load::Kind::pressure, 50)}});
  ASSERT_EQ(rows.size(), 1u);
  EXPECT_DOUBLE_EQ(rows[0].published, 5);
}

TEST(Compare, EdgeLoadsThatMakeATension) {
  Load right = load(Load::Kind::edge, 100), left = right;
  left.edge = mesh::rectangle::left;
  const auto rows = run({.holes = {circle(20)}, .loads = {right, left}, .largest = 315.26});
  ASSERT_TRUE(find(rows, Reference::howland));
  EXPECT_NEAR(find(rows, Reference::howland)->ours, 3.1526 * 0.8, 1e-9);
  EXPECT_EQ(rows.size(), 4u);
  left.stress = 60;
  EXPECT_TRUE(run({.holes = {circle(20)}, .loads = {right, left}}).empty());
}

TEST(Compare, NothingWhereNothingIsPublished) {
  const std::vector<Hole> tight{circle(20, {0, -12}), hole(HoleShape::slot, 30, 10, {0, 12})};
  EXPECT_TRUE(run({.holes = tight, .loads = {load(Load::Kind::tension, 100)}}).empty());
  const auto rows =
      run({.holes = {circle(20), circle(20, {80, 0})}, .loads = {load(Load::Kind::pressure, 9, 1)}});
  ASSERT_EQ(rows.size(), 1u);  // none for the hole without the pressure
  EXPECT_EQ(rows[0].hole, 1u);
  // All loads together are beyond Kirsch where another hole is under pressure.
  const auto with_pressure_beside =
      run({.holes = {circle(20), circle(20, {120, 0})},
           .loads = {load(Load::Kind::tension, 100), load(Load::Kind::transverse, 50),
                     load(Load::Kind::pressure, 9, 1)}});
  for (const auto& c : with_pressure_beside)
    EXPECT_FALSE(c.hole == 0 && c.solution == record(Reference::kirsch).name);
  EXPECT_EQ(std::count_if(with_pressure_beside.begin(), with_pressure_beside.end(),
                          [](const auto& c) { return c.solution == record(Reference::kirsch).name; }),
            1);
  EXPECT_TRUE(run({.holes = {circle(20)}, .loads = {load(Load::Kind::tension, 0)}}).empty());
}

TEST(Compare, ANeighbourIsSaid) {
  const auto rows = run({.length = 2000,
                         .width = 400,
                         .holes = {circle(20), hole(HoleShape::slot, 30, 10, {90, 0})},
                         .loads = {load(Load::Kind::tension, 100)}});
  const auto* c = find(rows, Reference::howland);
  ASSERT_TRUE(c);
  EXPECT_FALSE(c->in_range);
  EXPECT_NE(c->range_note.find("other holes"), std::string::npos);
}

}  // namespace
}  // namespace raiser::validation
