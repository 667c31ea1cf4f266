#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "io/picture/from_result.hpp"
#include "tests/io/solved.hpp"

namespace raiser::io {
namespace {

TEST(PictureOfAResult, CoversThePlateAndReachesThePeak) {
  const Result result = test::solved(test::one_hole);
  const Picture picture = picture_of(result);
  const auto& plate = result.input.problem.plate;
  const double hole = std::numbers::pi / 4 * plate.holes[0].length * plate.holes[0].width;
  double covered = 0.0, largest = 0.0;
  for (const PictureCell& cell : picture.cells) {
    covered += area(cut_at({cell}, -1.0).region);
    largest = std::max(largest, *std::max_element(cell.values.begin(), cell.values.end()));
  }
  // chords of the hole's edge leave out less than one part in a thousand of it
  EXPECT_NEAR(covered, plate.length * plate.width - hole, 1e-3 * hole);
  const auto& found = result.solution.combined.raisers[0];
  EXPECT_NEAR(largest, found.von_mises.stress.value, 0.01 * found.von_mises.stress.value);
  EXPECT_NEAR(picture.peaks.at(0).value, found.von_mises.stress.value, 0.01 * found.von_mises.stress.value);
  EXPECT_EQ(picture.peaks[0].point, found.largest.point);
  EXPECT_NE(picture.peaks[0].label.find(solver::digits(found.largest.stress)), std::string::npos)
      << picture.peaks[0].label;
  EXPECT_NE(picture.peaks[0].label.find(solver::digits(*found.gross.kt)), std::string::npos);
  EXPECT_EQ(picture.focus, 0u);
}

TEST(PictureOfAResult, DrawsTheLoadsAsTheyAct) {
  const Result result = test::solved(test::one_hole);
  const auto& problem = result.input.problem;
  ASSERT_EQ(problem.loads.size(), 1u);
  ASSERT_EQ(problem.loads[0].kind, solver::Load::Kind::tension);
  const Picture picture = picture_of(result);
  Point sum = Point::Zero();
  int right = 0, left = 0;
  for (const LoadArrow& arrow : picture.arrows) {
    EXPECT_NEAR(std::abs(arrow.at.x()), problem.plate.length / 2, 1e-9);
    EXPECT_LT(std::abs(arrow.at.y()), problem.plate.width / 2);
    EXPECT_NEAR(arrow.traction.dot(arrow.outward), problem.loads[0].stress, 1e-9);
    (arrow.at.x() > 0 ? right : left) += 1;
    sum += arrow.at;
  }
  EXPECT_GE(right, 3);
  EXPECT_EQ(right, left);
  EXPECT_NEAR(sum.norm(), 0.0, 1e-6);  // evenly spread
}

TEST(PictureOfAResult, NeedsNoMoreThanTheCaseSays) {
  Result result = test::solved(test::two_holes);
  result.input.title.clear();
  result.input.file = "folder/cover.toml";
  const Picture picture = picture_of(result);
  EXPECT_EQ(picture.title, "cover");
  const auto worst = worst_first(result.solution.combined).front();
  EXPECT_EQ(picture.focus, result.solution.combined.raisers[worst].raiser);
  ASSERT_FALSE(picture.caption.empty());
  EXPECT_NE(picture.caption[0].find(picture.plate.holes[*picture.focus].name), std::string::npos);
}

TEST(ChartOfAResult, EdgeRunsOnceRoundAndMeetsTheExtremes) {
  const Result result = test::solved(test::one_hole);
  const Chart chart = edge_chart(result, 0);
  const auto& points = chart.curves.at(0).points;
  EXPECT_DOUBLE_EQ(points.front().x(), -180.0);
  EXPECT_DOUBLE_EQ(points.back().x(), 180.0);
  EXPECT_DOUBLE_EQ(points.front().y(), points.back().y());
  for (std::size_t i = 1; i < points.size(); ++i) EXPECT_GE(points[i].x(), points[i - 1].x());
  const auto [low, high] = std::minmax_element(points.begin(), points.end(),
                                               [](const Point& a, const Point& b) { return a.y() < b.y(); });
  const auto& found = result.solution.combined.raisers[0];
  const double size = found.largest.stress.value;
  EXPECT_NEAR(high->y(), found.largest.stress.value, 0.01 * size);
  EXPECT_NEAR(low->y(), found.smallest.stress.value, 0.01 * size);
  ASSERT_EQ(chart.levels.size(), 2u);
  EXPECT_DOUBLE_EQ(chart.levels[0].value, found.gross.nominal);
  EXPECT_DOUBLE_EQ(chart.levels[1].value, found.net.nominal);
  EXPECT_THROW(edge_chart(result, 99), std::out_of_range);
}

TEST(ChartOfAResult, LigamentStartsAtTheEdgeAndCarriesTheLoad) {
  const Result result = test::solved(test::one_hole);
  ASSERT_FALSE(result.solution.ligaments.empty());
  const Chart chart = ligament_chart(result, 0);
  const auto& points = chart.curves.at(0).points;
  const auto& found = result.solution.combined.raisers[0];
  EXPECT_NEAR(points.front().x(), 0.0, 1e-9);
  EXPECT_NEAR(points.back().x(), result.solution.ligaments[0].width, 1e-9);
  EXPECT_NEAR(points.front().y(), found.largest.stress.value, 0.02 * found.largest.stress.value);
  double integral = 0.0;
  for (std::size_t i = 1; i < points.size(); ++i)
    integral += (points[i].y() + points[i - 1].y()) / 2 * (points[i].x() - points[i - 1].x());
  // the mean over the ligament of a central hole is the net nominal stress
  EXPECT_NEAR(integral / points.back().x(), found.net.nominal, 0.02 * found.net.nominal);
  EXPECT_THROW(ligament_chart(result, 99), std::out_of_range);
}

}  // namespace
}  // namespace raiser::io
