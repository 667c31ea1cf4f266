#include "mesh/plate/outline.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>
#include <random>

#include "mesh/legendre.hpp"
#include "mesh/plate/build.hpp"
#include "mesh/plate/chain.hpp"
#include "mesh/plate/curve_distance.hpp"
#include "mesh/plate/plate.hpp"
#include "mesh/plate/section.hpp"
#include "mesh/plate/shoulder.hpp"
#include "mesh/region/region.hpp"

namespace raiser::mesh {
namespace {

constexpr double pi = std::numbers::pi;

// By Gauss quadrature of Green's formula, which knows nothing of how it was built.
double area(const Loop& loop) {
  const GaussRule rule = gauss_legendre(40);
  double sum = 0.0;
  for (const Curve& curve : loop)
    for (std::size_t q = 0; q < rule.points.size(); ++q) {
      const double half = (curve.end - curve.begin) / 2;
      const double t = (curve.begin + curve.end) / 2 + half * rule.points[q];
      const Point x = curve.at(t);
      const Point dx = curve.derivative(t);
      sum += rule.weights[q] * half * (x.x() * dx.y() - x.y() * dx.x()) / 2;
    }
  return sum;
}

void expect_closed(const Loop& loop) {
  for (std::size_t i = 0; i < loop.size(); ++i)
    EXPECT_LT((loop[i].finish() - loop[(i + 1) % loop.size()].start()).norm(), 1e-10) << i;
}

Notch notch(NotchShape shape, std::size_t edge, double depth, double radius) {
  Notch result;
  result.name = "a";
  result.shape = shape;
  result.edge = edge;
  result.depth = depth;
  result.root_radius = radius;
  return result;
}

Plate plate_of(const Outline& outline, double length, double width) {
  Plate plate;
  plate.length = length;
  plate.width = width;
  plate.thickness = 2;
  plate.outline = outline;
  return plate;
}

std::string all_of(const std::vector<CutFault>& faults) {
  std::string text;
  for (const CutFault& fault : faults) text += fault.what + "; " + fault.cure + "\n";
  return text;
}
std::string all_of(const std::vector<PlateFault>& faults) {
  std::string text;
  for (const PlateFault& fault : faults) text += fault.what + "; " + fault.cure + "\n";
  return text;
}

struct Cut {
  Notch notch;
  double area;  ///< mm^2, taken away
};

std::vector<Cut> cuts() {
  std::vector<Cut> all;
  all.push_back({notch(NotchShape::u, rectangle::top, 12, 3), 2 * 3 * 9 + pi * 9 / 2});
  // A segment of height 2 of a circle of radius 5.
  const double half_angle = std::acos(3.0 / 5.0);
  all.push_back(
      {notch(NotchShape::u, rectangle::left, 2, 5), 25 * (half_angle - std::sin(half_angle) * 0.6)});
  Notch v = notch(NotchShape::v, rectangle::bottom, 10, 2);
  v.opening_angle = pi / 3;
  const double deep = 10 - 2 * (1 - 0.5);  // where flanks meet the arc
  const double narrow = 2 * std::cos(pi / 6);
  const double wide = narrow + deep * std::tan(pi / 6);
  const double arc = pi - pi / 3;
  all.push_back({v, (narrow + wide) * deep + 4.0 / 2 * (arc - std::sin(arc))});
  all.push_back({notch(NotchShape::semicircle, rectangle::right, 7, 0), pi * 49 / 2});
  Notch ellipse = notch(NotchShape::semi_ellipse, rectangle::top, 8, 0);
  ellipse.width = 6;
  all.push_back({ellipse, pi * 8 * 3 / 2});
  Notch key = notch(NotchShape::keyhole, rectangle::bottom, 14, 4);
  key.width = 3;
  const double meets = 10 - std::sqrt(16 - 2.25);
  const double cap = 2 * std::asin(1.5 / 4);
  all.push_back({key, 3 * meets + pi * 16 - 16.0 / 2 * (cap - std::sin(cap))});
  return all;
}

TEST(Notches, TakeAwayTheAreaOfTheirShape) {
  for (const Cut& cut : cuts()) {
    for (const double at : {0.0, 11.0}) {
      Notch moved = cut.notch;
      moved.at = at;
      const auto result = with_notches(rectangular(120, 60), {moved});
      ASSERT_TRUE(result.outline) << word(moved.shape) << all_of(result.faults);
      expect_closed(result.outline->curves);
      EXPECT_NEAR(area(result.outline->curves), 120 * 60 - cut.area, 1e-9) << word(moved.shape);
      EXPECT_NEAR(area(result.outline->gross()), 120 * 60, 1e-9);
      const Plate plate = plate_of(*result.outline, 120, 60);
      EXPECT_TRUE(faults(plate).empty()) << all_of(faults(plate));
      ASSERT_EQ(raiser_count(plate), 1u);
      EXPECT_EQ(raiser(plate, 0).kind, Raiser::Kind::notch);
    }
  }
}

TEST(Notches, LieWhereTheyAreDrawn) {
  Notch top = notch(NotchShape::u, rectangle::top, 12, 3);
  top.at = 20;
  Notch left = notch(NotchShape::semicircle, rectangle::left, 5, 0);
  left.at = -8;
  left.name = "b";
  const auto result = with_notches(rectangular(120, 60), {top, left});
  ASSERT_TRUE(result.outline);
  const Plate plate = plate_of(*result.outline, 120, 60);
  EXPECT_LT((raiser(plate, 0).root - Point(20, 18)).norm(), 1e-12);
  EXPECT_LT((raiser(plate, 0).centre - Point(20, 21)).norm(), 1e-12);
  EXPECT_LT((raiser(plate, 1).root - Point(-55, -8)).norm(), 1e-12);
  EXPECT_DOUBLE_EQ(raiser(plate, 1).radius, 5);
  const auto across = material_along(plate, Direction::across, 20);
  ASSERT_EQ(across.size(), 1u);
  EXPECT_NEAR(across[0].begin, -30, 1e-12);
  EXPECT_NEAR(across[0].end, 18, 1e-12);
  EXPECT_EQ(across[0].raiser_at_end(), std::optional<std::size_t>(0));
  EXPECT_FALSE(across[0].raiser_at_begin());
  EXPECT_NEAR(shape_of(gross_along(plate, Direction::across, 20)).length, 60, 1e-12);
  const auto along = material_along(plate, Direction::along, -8);
  ASSERT_EQ(along.size(), 1u);
  EXPECT_EQ(along[0].raiser_at_begin(), std::optional<std::size_t>(1));
  EXPECT_NEAR(along[0].begin, -55, 1e-12);
  const auto through = material_along(plate, Direction::along, 25);  // cuts the notch's channel
  ASSERT_EQ(through.size(), 2u);
  EXPECT_NEAR(through[0].end, 17, 1e-12);
  EXPECT_NEAR(through[1].begin, 23, 1e-12);
}

TEST(Notches, OppositeOnesAreEachOthersImage) {
  Notch top = notch(NotchShape::v, rectangle::top, 9, 1);
  top.opening_angle = 1.0;
  top.at = 13;
  const Outline body = rectangular(120, 60);
  const auto place = opposite(body, top);
  ASSERT_TRUE(place);
  EXPECT_EQ(place->edge, rectangle::bottom);
  EXPECT_NEAR(place->at, 13, 1e-12);
  Notch bottom = top;
  bottom.edge = place->edge;
  bottom.at = place->at;
  bottom.name = "b";
  const auto result = with_notches(body, {top, bottom});
  ASSERT_TRUE(result.outline);
  const Plate plate = plate_of(*result.outline, 120, 60);
  EXPECT_EQ(mirrors(plate), (Mirrors{false, true}));
  EXPECT_EQ(mirror_image(plate, 0, {false, true}), 1u);
  const auto image = mirror_image(plate, {.x = false, .y = true});
  EXPECT_EQ(image->of({Owner::Kind::edge, rectangle::top}), (Owner{Owner::Kind::edge, rectangle::bottom}));
  EXPECT_EQ(image->of({Owner::Kind::edge, rectangle::right}), (Owner{Owner::Kind::edge, rectangle::right}));
  // Cut along both mirror lines where it stands in the middle: a quarter of the area.
  top.at = bottom.at = 0;
  const Plate centred = plate_of(*with_notches(body, {top, bottom}).outline, 120, 60);
  EXPECT_EQ(mirrors(centred), (Mirrors{true, true}));
  const Region quarter = cut(trace(centred), {true, true});
  ASSERT_EQ(quarter.loops.size(), 1u);
  EXPECT_NEAR(area(quarter.loops[0]), area(centred.outline->curves) / 4, 1e-9);
}

TEST(Notches, RefuseWhatDoesNotFit) {
  const auto refusal = [](std::vector<Notch> notches) {
    const auto result = with_notches(rectangular(120, 60), notches);
    EXPECT_FALSE(result.outline);
    return all_of(result.faults);
  };
  Notch u = notch(NotchShape::u, rectangle::top, 12, 3);
  u.at = 58;
  EXPECT_NE(refusal({u}).find("notch 'a' reaches 1 mm beyond its edge"), std::string::npos) << refusal({u});
  u.at = 0;
  Notch other = u;
  other.name = "b";
  other.at = 5;
  EXPECT_NE(refusal({u, other}).find("runs into"), std::string::npos);
  u.root_radius = -1;
  EXPECT_NE(refusal({u}).find("root radius is -1"), std::string::npos);
  Notch key = notch(NotchShape::keyhole, rectangle::top, 12, 3);
  key.width = 6;
  EXPECT_NE(refusal({key}).find("as wide as its circle"), std::string::npos);
  key.width = 2;
  key.depth = 5;
  EXPECT_NE(refusal({key}).find("does not fit into its depth"), std::string::npos);
  Notch lost = notch(NotchShape::u, 7, 12, 3);
  EXPECT_NE(refusal({lost}).find("not one straight line"), std::string::npos);
}

TEST(OutlineFaults, SeeNotchesThatMeetEachOtherOrAHole) {
  Notch top = notch(NotchShape::u, rectangle::top, 31, 3);
  Notch bottom = notch(NotchShape::u, rectangle::bottom, 30, 3);
  bottom.name = "b";
  const Plate crossing = plate_of(*with_notches(rectangular(120, 60), {top, bottom}).outline, 120, 60);
  EXPECT_NE(all_of(faults(crossing)).find("notch 'b' and notch 'a' touch or cross"), std::string::npos)
      << all_of(faults(crossing));
  Plate holed = plate_of(
      *with_notches(rectangular(120, 60), {notch(NotchShape::u, rectangle::top, 20, 3)}).outline, 120, 60);
  const auto with_hole = [&](double y, double d) {
    holed.holes = {{"h", HoleShape::circle, d, d, 0, Point(0, y), 0}};
    return all_of(faults(holed));
  };
  EXPECT_EQ(with_hole(0, 18), "");
  EXPECT_NE(with_hole(0, 21).find("hole 'h' touches or crosses notch 'a'"), std::string::npos);
  EXPECT_NE(with_hole(0, 20).find("hole 'h' touches or crosses notch 'a'"), std::string::npos);
  EXPECT_NE(with_hole(0, 19.999).find("leaves a ligament of 0.0005 mm to notch 'a'"), std::string::npos)
      << with_hole(0, 19.999);
  EXPECT_NE(with_hole(23, 2).find("hole 'h' lies outside the plate"), std::string::npos);
  EXPECT_NE(with_hole(-25, 12).find("touches or crosses edge 'bottom'"), std::string::npos);
}

Shoulder shoulder(double at, double width, bool narrow_is_right, Fillet fillet) {
  Shoulder s;
  s.name = "s";
  s.at = at;
  s.width = width;
  s.narrow_is_right = narrow_is_right;
  s.fillet = fillet;
  return s;
}

Fillet fillet(FilletShape shape, double radius) {
  Fillet result;
  result.shape = shape;
  result.radius = radius;
  return result;
}

TEST(SteppedBar, HasTheAreaOfItsPartsAndFillets) {
  const double spandrel = 1 - pi / 4;
  struct Given {
    std::vector<Shoulder> shoulders;
    double area;
    std::size_t raisers;
  };
  Fillet ellipse = fillet(FilletShape::ellipse, 0);
  ellipse.along = 12;
  ellipse.across = 6;
  Fillet two = fillet(FilletShape::two_radii, 10);
  two.second_radius = 4;
  two.turn = 0.5;
  // The spandrel of two arcs: the trapezoid under both centres less two sectors.
  const double reach = 4 + 6 * std::sin(0.5), rise = 10 - 6 * std::cos(0.5);
  double under = 0.0;  // between the arcs and the corner, by summing thin strips
  constexpr int n = 400000;
  for (int i = 0; i < n; ++i) {
    const double a = reach * (i + 0.5) / n;
    const double joint = reach - 10 * std::sin(0.5);
    const double b = a > joint ? 10 - std::sqrt(100 - (reach - a) * (reach - a))
                               : rise - std::sqrt(16 - (4 - a) * (4 - a));
    under += b * reach / n;
  }
  Fillet deep = fillet(FilletShape::undercut, 3);
  deep.undercut = 1;
  double undercut = 0.0;  // the same: what the arc leaves in the corner less what it takes below the edge
  const double deep_reach = 3 + std::sqrt(5.0);
  for (int i = 0; i < n; ++i) {
    const double a = deep_reach * (i + 0.5) / n;
    undercut += (2 - std::sqrt(9 - (a - 3) * (a - 3))) * deep_reach / n;
  }
  const std::vector<Given> all = {
      {{shoulder(0, 40, true, fillet(FilletShape::circle, 5))}, 60 * 80 + 60 * 40 + 2 * 25 * spandrel, 2},
      {{shoulder(0, 40, false, fillet(FilletShape::circle, 5))}, 60 * 80 + 60 * 40 + 2 * 25 * spandrel, 2},
      {{shoulder(10, 40, true, fillet(FilletShape::sharp, 0))}, 70 * 80 + 50 * 40, 0},
      {{shoulder(0, 40, true, ellipse)}, 60 * 80 + 60 * 40 + 2 * 72 * spandrel, 2},
      {{shoulder(0, 40, true, two)}, 60 * 80 + 60 * 40 + 2 * under, 2},
      {{shoulder(0, 40, true, deep)}, 60 * 80 + 60 * 40 + 2 * undercut, 2},
      {{shoulder(-30, 40, true, fillet(FilletShape::circle, 8)),
        shoulder(30, 40, false, fillet(FilletShape::circle, 8))},
       60 * 80 + 60 * 40 + 4 * 64 * spandrel,
       4}};
  for (std::size_t i = 0; i < all.size(); ++i) {
    const auto result = stepped_bar(120, 80, all[i].shoulders);
    ASSERT_TRUE(result.outline) << i << all_of(result.faults);
    expect_closed(result.outline->curves);
    const Plate plate = plate_of(*result.outline, 120, 80);
    EXPECT_TRUE(faults(plate).empty()) << i << all_of(faults(plate));
    EXPECT_EQ(raiser_count(plate), all[i].raisers);
    EXPECT_NEAR(area(result.outline->curves), all[i].area, 1e-5) << i;
    EXPECT_TRUE(mirrors(plate).y) << i;
  }
}

TEST(SteppedBar, KnowsItsNarrowAndWideSections) {
  for (const bool right : {true, false}) {
    const auto result = stepped_bar(120, 80, {shoulder(10, 40, right, fillet(FilletShape::circle, 5))});
    ASSERT_TRUE(result.outline);
    const Plate plate = plate_of(*result.outline, 120, 80);
    const double sign = right ? 1 : -1;
    const Raiser found = raiser(plate, 0);
    EXPECT_EQ(found.name, "s bottom");
    EXPECT_LT((found.root - Point(10 + sign * 5, -20)).norm(), 1e-12);
    EXPECT_LT((found.centre - Point(10 + sign * 5, -25)).norm(), 1e-12);
    const auto narrow = material_along(plate, Direction::across, found.root.x());
    EXPECT_NEAR(shape_of(narrow).length, 40, 1e-12);
    EXPECT_EQ(narrow.front().raiser_at_begin(), std::optional<std::size_t>(0));
    EXPECT_EQ(narrow.front().raiser_at_end(), std::optional<std::size_t>(1));
    EXPECT_NEAR(shape_of(gross_along(plate, Direction::across, found.mouth.x())).length, 80, 1e-12);
  }
}

TEST(SteppedBar, StepsOnOneSideOnlyWhereItIsToldTo) {
  Shoulder s = shoulder(0, 50, true, fillet(FilletShape::circle, 4));
  s.sides = Shoulder::Sides::top;
  const auto result = stepped_bar(120, 80, {s});
  ASSERT_TRUE(result.outline);
  EXPECT_EQ(result.outline->edges,
            (std::vector<std::string>{"right", "left", "bottom", "top 1", "top 2", "top 3"}));
  EXPECT_EQ(result.outline->raisers.size(), 1u);
  EXPECT_EQ(result.outline->raisers[0].name, "s");
  const Plate plate = plate_of(*result.outline, 120, 80);
  const auto shape = shape_of(gross_along(plate, Direction::across, 40));
  EXPECT_NEAR(shape.low, -40, 1e-12);
  EXPECT_NEAR(shape.high, 10, 1e-12);
}

TEST(SteppedBar, RefusesWhatCannotBeDrawn) {
  const auto refusal = [](std::vector<Shoulder> shoulders) {
    const auto result = stepped_bar(120, 80, shoulders);
    EXPECT_FALSE(result.outline);
    return all_of(result.faults);
  };
  EXPECT_NE(refusal({shoulder(0, 90, true, fillet(FilletShape::circle, 5))})
                .find("narrow part is 90 mm wide, the plate 80 mm"),
            std::string::npos);
  EXPECT_NE(refusal({shoulder(70, 40, true, fillet(FilletShape::circle, 5))}).find("not inside the bar"),
            std::string::npos);
  EXPECT_NE(refusal({shoulder(0, 40, true, fillet(FilletShape::circle, 0))}).find("radius is 0 mm"),
            std::string::npos);
  Fillet high = fillet(FilletShape::ellipse, 0);
  high.along = 5;
  high.across = 25;
  EXPECT_NE(refusal({shoulder(0, 40, true, high)}).find("rises 25 mm, the step only 20 mm"),
            std::string::npos);
  EXPECT_NE(refusal({shoulder(55, 40, true, fillet(FilletShape::circle, 10))})
                .find("takes 10 mm of the narrow part"),
            std::string::npos);
  EXPECT_NE(refusal({shoulder(-30, 40, true, fillet(FilletShape::circle, 5)),
                     shoulder(30, 50, false, fillet(FilletShape::circle, 5))})
                .find("two widths"),
            std::string::npos);
}

std::vector<OutlinePoint> bracket(bool clockwise) {
  std::vector<OutlinePoint> points(6);
  const std::vector<Point> places = {{0, 0}, {100, 0}, {100, 30}, {30, 30}, {30, 80}, {0, 80}};
  const std::vector<std::string> edges = {"base", "end", "ledge", "wall", "top", "back"};
  for (std::size_t i = 0; i < 6; ++i) {
    const std::size_t k = clockwise ? 5 - i : i;
    points[i].at = places[k];
    points[i].edge = clockwise ? edges[(10 - i) % 6] : edges[i];
    if (k == 3) points[i].corner_radius = 6, points[i].corner = "throat";
    if (k == 2) points[i].corner_radius = 4;
  }
  return points;
}

TEST(FreeOutline, OfABracketHasItsAreaEitherWayRound) {
  for (const bool clockwise : {false, true}) {
    const auto result = chain_outline(bracket(clockwise));
    ASSERT_TRUE(result.outline) << all_of(result.faults);
    expect_closed(result.outline->curves);
    const double spandrel = 1 - pi / 4;
    EXPECT_NEAR(area(result.outline->curves), 100 * 30 + 30 * 50 + 36 * spandrel - 16 * spandrel, 1e-9);
    EXPECT_LT((result.origin - Point(-50, -40)).norm(), 1e-12);
    const Plate plate = plate_of(*result.outline, result.length, result.width);
    EXPECT_TRUE(faults(plate).empty()) << all_of(faults(plate));
    ASSERT_EQ(raiser_count(plate), 1u);
    EXPECT_EQ(raiser(plate, 0).name, "throat");
    EXPECT_EQ(raiser(plate, 0).kind, Raiser::Kind::fillet);
    EXPECT_LT((raiser(plate, 0).root - Point(-14, -10)).norm(), 1e-12);
    EXPECT_LT((raiser(plate, 0).centre - Point(-14, -4)).norm(), 1e-12);
    EXPECT_NEAR(shape_of(gross_along(plate, Direction::across, raiser(plate, 0).mouth.x())).length, 80,
                1e-12);
    for (const char* name : {"base", "end", "ledge", "wall", "top", "back"})
      EXPECT_EQ(std::count(result.outline->edges.begin(), result.outline->edges.end(), name), 1) << name;
    for (const Curve& curve : result.outline->curves)
      if (curve.owner.kind == Owner::Kind::edge && result.outline->edges[curve.owner.index] == "end" &&
          curve.kind == Curve::Kind::line) {
        EXPECT_NEAR(curve.start().x(), 50, 1e-12);
      }
  }
}

TEST(FreeOutline, TakesArcsOfCirclesAndEllipses) {
  // A disc of radius 20 whose upper right quarter is elliptic: semi-axes 30 and 20.
  std::vector<OutlinePoint> points(3);
  points[0].at = {0, -20};
  points[1].at = {30, 0};
  points[2].at = {0, 20};
  for (OutlinePoint& point : points) point.piece.kind = Piece::Kind::outwards;
  points[0].piece.radius = points[1].piece.radius = 30;
  points[0].piece.across = points[1].piece.across = 20;
  points[2].piece.radius = 20;
  const auto result = chain_outline(points);
  ASSERT_TRUE(result.outline) << all_of(result.faults);
  EXPECT_NEAR(area(result.outline->curves), pi * 600 / 2 + pi * 400 / 2, 1e-9);
  EXPECT_NEAR(result.length, 50, 1e-12);
  EXPECT_NEAR(result.width, 40, 1e-12);
  points[0].piece.centre = {1, 0};
  EXPECT_NE(all_of(chain_outline(points).faults).find("point 1: its ellipse misses an end"),
            std::string::npos);
  points[0].piece.centre = {0, 0};
  points[2].piece.radius = 19;
  EXPECT_NE(all_of(chain_outline(points).faults).find("point 3: its radius of 19 mm is less than half"),
            std::string::npos);
}

TEST(FreeOutline, MakesInwardArcsNotchesUnlessTheyEndInASharpCorner) {
  std::vector<OutlinePoint> points(6);
  const std::vector<Point> places = {{-50, -20}, {50, -20}, {50, 20}, {10, 20}, {-10, 20}, {-50, 20}};
  for (std::size_t i = 0; i < 6; ++i) points[i].at = places[i];
  points[3].piece.kind = Piece::Kind::inwards;
  points[3].piece.radius = 10;
  auto result = chain_outline(points);
  ASSERT_TRUE(result.outline) << all_of(result.faults);
  ASSERT_EQ(result.outline->raisers.size(), 1u);
  EXPECT_EQ(result.outline->raisers[0].name, "notch 4");
  EXPECT_LT((result.outline->raisers[0].root - Point(0, 10)).norm(), 1e-12);
  EXPECT_NEAR(area(result.outline->curves), 4000 - pi * 50, 1e-9);
  points[3].at = points[4].at + Point(0, -8);  // an arc from below a step: re-entrant where it begins
  points[3].at = {10, 12};
  points.insert(points.begin() + 3, OutlinePoint{{20, 20}, 0, "", "", {}});
  points.insert(points.begin() + 4, OutlinePoint{{20, 12}, 0, "", "", {}});
  points[5].piece.radius = 30;
  points[6].at = {-10, 12};
  points[7].at = {-10, 20};
  points.push_back(OutlinePoint{{-50, 20}, 0, "", "", {}});
  result = chain_outline(points);
  ASSERT_TRUE(result.outline) << all_of(result.faults);
  EXPECT_EQ(result.outline->raisers.size(), 0u);
}

// A V of 90 degrees in the top edge, 10 mm deep to its sharp end, rounded by 2 mm: the
// same arc as that of a corner, but between two parts of one line.
TEST(FreeOutline, KnowsANotchDrawnIntoAStraightEdge) {
  std::vector<OutlinePoint> points(7);
  const std::vector<Point> places = {{0, 0}, {100, 0}, {100, 40}, {60, 40}, {50, 30}, {40, 40}, {0, 40}};
  for (std::size_t i = 0; i < 7; ++i) points[i].at = places[i];
  points[4].corner_radius = 2;
  const auto result = chain_outline(points);
  ASSERT_TRUE(result.outline) << all_of(result.faults);
  ASSERT_EQ(result.outline->raisers.size(), 1u);
  const Raiser& notch = result.outline->raisers[0];
  EXPECT_EQ(notch.kind, Raiser::Kind::notch);
  EXPECT_EQ(notch.name, "notch 5");
  EXPECT_LT((notch.root - Point(0, 10 + 2 * std::sqrt(2.0) - 2)).norm(), 1e-12);
  EXPECT_NEAR(area(result.outline->gross()), 4000, 1e-9);
  expect_closed(result.outline->gross());
  Plate plate{result.length, result.width, 5, {}, result.outline};
  EXPECT_NEAR(shape_of(gross_along(plate, Direction::across, 0)).length, 40, 1e-12);
  EXPECT_NEAR(shape_of(material_along(plate, Direction::across, 0)).length, 20 + notch.root.y(), 1e-12);
  // One cut into another edge of it leaves the drawn one closed.
  Notch more;
  more.name = "nick";
  more.shape = NotchShape::semicircle;
  more.edge = 0;
  more.depth = 3;
  const auto both = with_notches(*result.outline, {more});
  ASSERT_TRUE(both.outline);
  EXPECT_NEAR(area(both.outline->gross()), 4000, 1e-9);
}

// Of two pieces each meets the other at both of its ends.
TEST(FreeOutline, OfTwoPiecesIsADiscOrHalfOfOne) {
  const Piece arc{Piece::Kind::outwards, 30.0};
  const ChainResult disc = chain_outline({{{30, 0}, 0, "rim", "", arc}, {{-30, 0}, 0, "rim", "", arc}});
  ASSERT_TRUE(disc.outline) << all_of(disc.faults);
  EXPECT_TRUE(faults(plate_of(*disc.outline, disc.length, disc.width)).empty());
  EXPECT_NEAR(area(disc.outline->curves), 900 * pi, 1e-9);
  const ChainResult half = chain_outline({{{30, 0}, 0, "rim", "", arc}, {{-30, 0}, 0, "flat", "", {}}});
  ASSERT_TRUE(half.outline) << all_of(half.faults);
  EXPECT_TRUE(faults(plate_of(*half.outline, half.length, half.width)).empty());
  EXPECT_NEAR(area(half.outline->curves), 450 * pi, 1e-9);
}

TEST(FreeOutline, RefusesWhatDoesNotClose) {
  auto points = bracket(false);
  points[3].corner_radius = 60;
  EXPECT_NE(all_of(chain_outline(points).faults).find("roundings at its ends"), std::string::npos);
  points = bracket(false);
  points[2].at = points[1].at;
  EXPECT_NE(all_of(chain_outline(points).faults).find("same place as the next"), std::string::npos);
  points = bracket(false);
  points[3].at = {30, -10};  // below its base
  points[3].corner_radius = points[2].corner_radius = 0;
  const auto result = chain_outline(points);
  ASSERT_TRUE(result.outline);
  EXPECT_NE(all_of(faults(plate_of(*result.outline, result.length, result.width))).find("touch or cross"),
            std::string::npos);
}

TEST(Distance, OfCurvesIsThatOfTheirPoints) {
  std::mt19937 random(5);
  const auto number = [&](double low, double high) {
    return std::uniform_real_distribution<double>(low, high)(random);
  };
  const auto curve = [&]() -> Curve {
    const Point at(number(-5, 5), number(-5, 5));
    if (number(0, 1) < 0.4) return line(at, at + Point(number(-4, 4), number(-4, 4)));
    const double angle = number(0, 6), a = number(0.3, 3), b = number(0.3, 3), begin = number(0, 6);
    return {Curve::Kind::arc,
            at,
            a * Point(std::cos(angle), std::sin(angle)),
            b * Point(-std::sin(angle), std::cos(angle)),
            begin,
            begin + number(-6, 6),
            {}};
  };
  int apart = 0;
  for (int trial = 0; trial < 120; ++trial) {
    const Curve a = curve(), b = curve();
    constexpr int n = 200;
    double least = 1e9;
    for (int i = 0; i <= n; ++i)
      for (int k = 0; k <= n; ++k)
        least = std::min(
            least,
            (a.at(a.begin + (a.end - a.begin) * i / n) - b.at(b.begin + (b.end - b.begin) * k / n)).norm());
    const double found = distance(a, b, 100);
    EXPECT_LE(found, least * (1 + 1e-5) + 1e-9);
    EXPECT_GE(found, least - 0.15);
    EXPECT_GE(distance(a, b, 0.5), std::min(found * (1 - 1e-5), 0.5));
    apart += found > 0.1 ? 1 : 0;
  }
  EXPECT_GT(apart, 50);
}

}  // namespace
}  // namespace raiser::mesh
