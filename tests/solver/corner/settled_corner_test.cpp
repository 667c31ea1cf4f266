#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "mesh/plate/build.hpp"
#include "mesh/region/region.hpp"
#include "solver/solution.hpp"
#include "tests/mesh/polygon.hpp"

namespace raiser::solver {
namespace {

/// A plate with the outline of a polygon, edge k from point k to the next, its
/// bounding box centred at the origin.
Plate plate_of(const std::vector<Point>& points, std::vector<mesh::Hole> holes) {
  mesh::Outline outline;
  outline.curves = mesh::polygon(points).loops[0];
  Point low = points[0], high = points[0];
  for (std::size_t k = 0; k < points.size(); ++k) {
    low = low.cwiseMin(points[k]);
    high = high.cwiseMax(points[k]);
    outline.curves[k].owner = {mesh::Owner::Kind::edge, k};
    outline.edges.push_back("edge " + std::to_string(k));
  }
  return {high.x() - low.x(), high.y() - low.y(), 5.0, std::move(holes), outline};
}

Load on_edge(std::size_t edge, double stress) {
  Load load{Load::Kind::edge, "pull"};
  load.edge = edge;
  load.stress = stress;
  return load;
}

const HookeLaw steel{210000.0, 0.3, PlaneState::stress};

// A strip of 60 x 40 mm with a step of sharp corners to 20 mm at its right half,
// pulled at both ends, and a hole in its wide part.
const std::vector<Point> stepped{{-60, -20}, {20, -20}, {20, -10}, {60, -10},
                                 {60, 10},   {20, 10},  {20, 20},  {-60, 20}};
const mesh::Hole bolt{"bolt", mesh::HoleShape::circle, 12, 12, 0, Point(-20, 0), 0};
const std::vector<Load> pull{on_edge(3, 20.0), on_edge(7, 10.0)};

TEST(SettledCorner, IsReportedAndHasNoPeak) {
  const Solution s = settle({plate_of(stepped, {bolt}), steel, pull}, {{}});
  EXPECT_EQ(s.status, Solution::Status::settled) << s.reason;
  ASSERT_EQ(s.places.size(), 2U);
  for (const PlaceFindings& place : s.places) {
    EXPECT_EQ(place.kind, SingularPlace::Kind::corner);
    EXPECT_NEAR(place.angle, 1.5 * std::numbers::pi, 1e-12);
    ASSERT_EQ(place.fields.size(), 2U);
    EXPECT_NEAR(place.fields[0].exponent.real(), 0.5445, 5e-5);
    EXPECT_NEAR(place.fields[0].measured.value_or(0), 0.5445, 0.005);
    EXPECT_GT(place.fields[0].intensity.value, 10.0);
    EXPECT_LT(place.fields[0].intensity.bound, 0.02 * place.fields[0].intensity.value);
  }
  // The corners are mirror images: what is symmetric is the same, the rest changes its sign.
  const auto& [a, b] = std::pair(s.places[0].fields, s.places[1].fields);
  EXPECT_NEAR(a[0].intensity.value, b[0].intensity.value, 1e-5 * a[0].intensity.value);
  EXPECT_NEAR(a[1].intensity.value, -b[1].intensity.value, 1e-5 * a[0].intensity.value);
}

// The peak at the hole keeps its bound beside the corners: against a mesh graded
// and divided much further.
TEST(SettledCorner, DoesNotSpoilTheHole) {
  const Problem problem{plate_of(stepped, {bolt}), steel, pull};
  Ask fine;
  fine.tolerance = 1e-6;
  const Solution reference = settle(problem, {fine});
  ASSERT_EQ(reference.status, Solution::Status::settled) << reference.reason;
  const Estimate truth = reference.combined.raisers[0].largest.stress;
  EXPECT_LT(truth.bound, 2e-6 * truth.value);
  for (const double tolerance : {1e-2, 1e-3, 1e-4}) {
    Ask ask;
    ask.tolerance = tolerance;
    const Solution s = settle(problem, {ask});
    ASSERT_EQ(s.status, Solution::Status::settled) << s.reason;
    const Estimate found = s.combined.raisers[0].largest.stress;
    EXPECT_LE(std::abs(found.value - truth.value), found.bound + truth.bound) << tolerance;
    EXPECT_LT(s.unknowns, 20000U);
  }
  // The largest stress on the plate's edges is not that of a corner.
  EXPECT_LT(reference.checks.outer_von_mises, truth.value);
}

TEST(SettledCorner, ScalesWithThePlateByItsExponent) {
  const auto intensity = [](double scale) {
    std::vector<Point> points = stepped;
    for (Point& p : points) p *= scale;
    mesh::Hole hole = bolt;
    hole.length *= scale;
    hole.width *= scale;
    hole.centre *= scale;
    return settle({plate_of(points, {hole}), steel, pull}, {{}}).places[0].fields[0];
  };
  const SingularField one = intensity(1.0);
  const SingularField large = intensity(8.0);
  const double expected = one.intensity.value * std::pow(8.0, 1 - one.exponent.real());
  EXPECT_NEAR(large.intensity.value, expected, 1e-8 * expected);
}

/// A V notch in a loaded end: at its mouth the traction of the end fits no stress that
/// leaves the flank free.
TEST(SettledCorner, AnExtremeAtAPlaceWithoutAPeakHasNoBound) {
  mesh::Notch notch{"end notch", mesh::NotchShape::v, mesh::rectangle::right, 0.0, 10.0, 1.0, 1.0};
  Problem problem{{200, 100, 5, {}, mesh::with_notches(mesh::rectangular(200, 100), {notch}).outline},
                  {2e5, 0.3, PlaneState::stress},
                  {{Load::Kind::tension, "pull", 100.0}}};
  const auto solution = settle(
      problem, {{Quantity::largest_edge_stress, 0, 1e-3, ""}, {Quantity::smallest_edge_stress, 0, 1e-3, ""}});
  EXPECT_EQ(solution.status, Solution::Status::not_met);
  EXPECT_NE(solution.reason.find("lies at a place without a peak stress"), std::string::npos)
      << solution.reason;
  EXPECT_EQ(solution.levels.back().refinement, 0) << "a finer mesh is of no use";
  const RaiserFindings& found = solution.combined.raisers.at(0);
  EXPECT_TRUE(std::isinf(found.largest.stress.bound));
  // The peak at the root is not touched by that.
  EXPECT_LT(found.smallest.stress.bound, 1e-3 * std::abs(found.smallest.stress.value));
}

/// Stress falls to nothing where two free edges meet in a blunt corner, but like a
/// small power of the distance: without that known, no degree settles it.
TEST(SettledCorner, StressIsNothingInABluntCornerOfFreeEdges) {
  mesh::Notch notch{"dent", mesh::NotchShape::v, mesh::rectangle::top, 0.0, 10.0, 5.0, 2.6};
  Problem problem{{400, 100, 5, {}, mesh::with_notches(mesh::rectangular(400, 100), {notch}).outline},
                  {2e5, 0.3, PlaneState::stress},
                  {{Load::Kind::tension, "pull", 100.0}}};
  const auto solution = settle(
      problem, {{Quantity::largest_edge_stress, 0, 1e-3, ""}, {Quantity::smallest_edge_stress, 0, 1e-3, ""}});
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  EXPECT_EQ(solution.levels.back().refinement, 0);
  const EdgeValue& smallest = solution.combined.raisers.at(0).smallest;
  EXPECT_EQ(smallest.stress.value, 0.0);
  EXPECT_NEAR(smallest.point.y(), 50.0, 1e-9) << "at the mouth";
}

}  // namespace
}  // namespace raiser::solver
