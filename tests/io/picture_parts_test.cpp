#include <gtest/gtest.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdint>

#include "io/picture/bands.hpp"
#include "io/picture/colours.hpp"
#include "io/picture/layout.hpp"
#include "io/picture/levels.hpp"
#include "io/picture/sampling.hpp"
#include "tests/io/kirsch_picture.hpp"

namespace raiser::io {
namespace {

using namespace test;

// Area of the part of a triangle, linear in its corner values, at or above a level.
double triangle_area_above(const std::array<Point, 3>& p, std::array<double, 3> v, double level) {
  const Point a = p[1] - p[0], b = p[2] - p[0];
  const double whole = std::abs(a.x() * b.y() - a.y() * b.x()) / 2;
  std::sort(v.begin(), v.end());
  if (level <= v[0]) return whole;
  if (level > v[2]) return 0.0;
  if (level <= v[1]) return whole * (1 - (level - v[0]) * (level - v[0]) / ((v[1] - v[0]) * (v[2] - v[0])));
  return whole * (v[2] - level) * (v[2] - level) / ((v[2] - v[0]) * (v[2] - v[1]));
}

double area_above(const std::vector<PictureCell>& cells, double level) {
  double sum = 0.0;
  for (const PictureCell& cell : cells) {
    const int n = cell.subdivisions;
    const auto index = [n](int i, int j) {
      return static_cast<std::size_t>(j * (n + 1) - j * (j - 1) / 2 + i);
    };
    const auto add = [&](std::size_t a, std::size_t b, std::size_t c) {
      sum += triangle_area_above({cell.points[a], cell.points[b], cell.points[c]},
                                 {cell.values[a], cell.values[b], cell.values[c]}, level);
    };
    for (int j = 0; j < n; ++j)
      for (int i = 0; i + j < n; ++i) {
        add(index(i, j), index(i + 1, j), index(i, j + 1));
        if (i + j + 1 < n) add(index(i + 1, j), index(i + 1, j + 1), index(i, j + 1));
      }
  }
  return sum;
}

TEST(Bands, AreasAreThoseOfTheClippedTriangles) {
  const std::vector<PictureCell> cells = rings(5);
  const std::vector<double> limits = round_levels(0, 300, 11);
  const std::vector<double> areas = band_areas(cells, limits);
  double sum = 0.0;
  for (std::size_t i = 0; i < areas.size(); ++i) {
    const double wanted = area_above(cells, limits[i]) - area_above(cells, limits[i + 1]);
    EXPECT_NEAR(areas[i], wanted, 1e-6) << "band from " << limits[i];
    EXPECT_GT(areas[i], 0.0);
    sum += areas[i];
  }
  // everything but what lies above the last limit, which is nothing
  EXPECT_NEAR(sum, area_above(cells, -1.0), 1e-6);
}

TEST(Bands, SharedEdgesCancel) {
  PictureCell lower{2, {}, {}}, upper{2, {}, {}};
  for (const Point& r : lattice(2)) {
    lower.points.push_back(r);
    upper.points.push_back(Point(1, 1) - r);
    lower.values.push_back(1.0);
    upper.values.push_back(1.0);
  }
  const LevelSet cut = cut_at({lower, upper}, 0.5);
  ASSERT_EQ(cut.region.size(), 1u);
  EXPECT_EQ(simplified(cut.region.front(), 1e-9).size(), 5u);  // a square, closed
  EXPECT_DOUBLE_EQ(area(cut.region), 1.0);
  EXPECT_TRUE(cut.lines.empty());
}

TEST(Bands, LinesLieOnTheLevel) {
  PictureCell cell{4, {}, {}};
  for (const Point& r : lattice(4)) {
    cell.points.push_back(r);
    cell.values.push_back(3 * r.x() + 2 * r.y());
  }
  const LevelSet cut = cut_at({cell}, 1.3);
  ASSERT_EQ(cut.lines.size(), 1u);  // one unbroken line across the cell
  for (const Point& p : cut.lines.front()) EXPECT_NEAR(3 * p.x() + 2 * p.y(), 1.3, 1e-12);
  EXPECT_NEAR(cut.lines.front().front().y() * cut.lines.front().back().y(), 0.0, 1e-12);
}

TEST(Bands, LinesJoinAcrossASmallJump) {
  PictureCell lower{1, {{0, 0}, {1, 0}, {0, 1}}, {0, 1, 0}};
  PictureCell upper{1, {{1, 1}, {0, 1}, {1, 0}}, {1, 0.002, 1.002}};
  EXPECT_EQ(cut_at({lower, upper}, 0.5).lines.size(), 2u);
  const LevelSet joined = cut_at({lower, upper}, 0.5, 0.01);
  ASSERT_EQ(joined.lines.size(), 1u);
  EXPECT_NEAR(std::abs(joined.lines[0].front().y() - joined.lines[0].back().y()), 1.0, 0.02);
}

TEST(Bands, SimplifiedStaysWithinTheTolerance) {
  Polyline arc;
  for (int i = 0; i <= 1000; ++i) arc.emplace_back(std::cos(i * 3e-3), std::sin(i * 3e-3));
  const Polyline few = simplified(arc, 1e-3);
  EXPECT_LT(few.size(), 100u);
  for (std::size_t i = 1; i < few.size(); ++i) EXPECT_GT(((few[i - 1] + few[i]) / 2).norm(), 1 - 1.001e-3);
}

TEST(Levels, AreRoundEqualAndReachOverTheRange) {
  std::uint64_t state = 20240607;
  const auto random = [&] {
    return static_cast<double>((state = state * 6364136223846793005u + 1442695040888963407u) >> 11) /
           9007199254740992.0;
  };
  for (int i = 0; i < 2000; ++i) {
    const double low = std::pow(10.0, 6 * random() - 3) * (random() < 0.5 ? -1 : 1);
    const double high = low + std::pow(10.0, 6 * random() - 3);
    if (high - low < 1e-6 * std::abs(low)) continue;
    const std::vector<double> levels = round_levels(low, high, 11);
    const double step = levels[1] - levels[0];
    const double slack = 1e-6 * step;
    EXPECT_LE(levels.front(), low + slack);
    EXPECT_GE(levels.back(), high - slack);
    EXPECT_GT(levels.front(), low - step);
    EXPECT_LT(levels.back(), high + step);
    EXPECT_GE(levels.size(), 8u) << low << " to " << high;
    EXPECT_LE(levels.size(), 16u) << low << " to " << high;
    const double mantissa = step / std::pow(10.0, std::floor(std::log10(step) + 1e-6));
    const auto is = [&](double m) { return std::abs(mantissa - m) < 1e-6; };
    EXPECT_TRUE(is(1) || is(2) || is(2.5) || is(5)) << step;
  }
}

TEST(Levels, OfSteepFieldsArePreferredNumbers) {
  const std::vector<double> limits = band_limits({{0, 1}, {100, 10}}, 3900.0);
  EXPECT_EQ(limits.front(), 0.0);
  EXPECT_GE(limits.back(), 3900.0);
  EXPECT_LE(limits.back(), 4000.0 * (1 + 1e-12));
  for (std::size_t i = 2; i < limits.size(); ++i)
    EXPECT_NEAR(limits[i] / limits[i - 1], std::pow(10.0, 0.2), 0.04);
  EXPECT_LT(limits[1], 100.0);
}

TEST(Levels, KeepAwayFromPlateaus) {
  std::vector<Spread> values;
  for (int i = 0; i < 300; ++i) values.push_back({i + 0.5, 1.0});
  EXPECT_EQ(band_limits(values, 300.0), round_levels(0.5, 300.0, 11));  // 0, 25, 50...
  for (int i = 0; i < 300; ++i) values.push_back({100.0 + 1e-3 * (i - 150), 1.0});
  const std::vector<double> limits = band_limits(values, 300.0);
  for (const double limit : limits) EXPECT_GT(std::abs(limit - 100.0), 2.0);
  EXPECT_LE(limits.front(), 0.5);
  EXPECT_GE(limits.back(), 300.0);
  EXPECT_GE(limits.size(), 9u);
}

TEST(Levels, PositionOnTheBarGoesBandByBand) {
  const std::vector<double> limits{0, 10, 100};
  EXPECT_DOUBLE_EQ(position_on_bar(limits, 5), 0.25);
  EXPECT_DOUBLE_EQ(position_on_bar(limits, 55), 0.75);
  EXPECT_DOUBLE_EQ(position_on_bar(limits, 1e9), 1.0);
  EXPECT_DOUBLE_EQ(position_on_bar(limits, -1), 0.0);
}

TEST(Levels, TicksAreInsideRoundAndFew) {
  EXPECT_EQ(ticks(-30, 30, 7), (std::vector<double>{-30, -20, -10, 0, 10, 20, 30}));
  EXPECT_EQ(ticks(-30, 30, 6), (std::vector<double>{-20, 0, 20}));
  EXPECT_EQ(ticks(-20, 20, 1), (std::vector<double>{0}));
  EXPECT_EQ(tick_text(-2.5), "\u22122.5");
  EXPECT_EQ(tick_text(-0.0), "0");
}

// Colours must stay in order for a grey printer and for every eye.
TEST(Colours, LightnessFallsInAStraightLine) {
  for (int i = 0; i <= 100; ++i) EXPECT_NEAR(lightness(stress_colour(i / 100.0)), 96 - 0.77 * i, 0.25) << i;
}

TEST(LayoutOfAPicture, KeepsThingsApartForEveryAspect) {
  for (const double ratio : {0.05, 0.2, 0.5, 0.9, 1.0, 1.3, 2.0, 5.0, 20.0})
    for (const double part : {0.1, 0.5, 0.9}) {
      Picture picture = kirsch_picture();
      const double width = 100 / std::sqrt(ratio), length = 100 * std::sqrt(ratio);
      picture.plate = plate_with_hole(length, width, part * std::min(length, width));
      const Layout page = lay_out(picture);
      const auto with_axes = [](const View& view, double rim_x, double rim_y) {
        const Box& b = view.box;
        return Box{b.x - rim_x - page::axis_left, b.y - rim_y, b.width + 2 * rim_x + page::axis_left,
                   b.height + 2 * rim_y + page::axis_bottom};
      };
      std::vector<Box> boxes{with_axes(page.whole, page.rim_x, page.rim_y), page.bar, page.text};
      if (page.detail) boxes.push_back(with_axes(*page.detail, 0, 18));
      const Box paper{0, page::margin, page.width, page.height - page::margin - 12};
      for (std::size_t i = 0; i < boxes.size(); ++i) {
        EXPECT_TRUE(paper.holds(boxes[i])) << "box " << i << ", ratio " << ratio << ", hole " << part;
        for (std::size_t j = 0; j < i; ++j)
          EXPECT_FALSE(boxes[i].overlaps(boxes[j]))
              << i << ", " << j << ", ratio " << ratio << ", hole " << part;
      }
      EXPECT_NEAR(page.whole.box.width / page.whole.box.height, ratio, 1e-9 * ratio);
      // the box of the whole view is the plate's rectangle, y upwards
      EXPECT_LT(
          (page.whole.on_paper({-length / 2, width / 2}) - Spot(page.whole.box.x, page.whole.box.y)).norm(),
          1e-9);
      EXPECT_LT((page.whole.on_paper({length / 2, -width / 2}) -
                 Spot(page.whole.box.right(), page.whole.box.bottom()))
                    .norm(),
                1e-9);
      if (page.detail) {
        EXPECT_GT(page.detail->scale, 1.29 * page.whole.scale);
      }
    }
}

TEST(LayoutOfAPicture, LinesFitAndKeepEveryWord) {
  const std::string text =
      "Hanger strip of a footbridge with a bolt hole andaveryveryverylongwordindeedthatfitsnowhere";
  std::string joined;
  for (const std::string& line : wrapped(text, page::body, 90)) {
    EXPECT_LE(text_width(line, page::body), 90.0) << line;
    joined += line;
  }
  std::string wanted = text;
  std::erase(wanted, ' ');
  std::erase(joined, ' ');
  EXPECT_EQ(joined, wanted);
}

TEST(LayoutOfAPicture, NeighbourhoodHoldsHoleAndNearLigament) {
  mesh::Plate plate = plate_with_hole(200, 60, 20);
  plate.holes[0].centre = {40, 14};
  const Window window = neighbourhood(plate, 0);
  EXPECT_GE(window.centre.y() + window.half, 30.0);
  EXPECT_LE(window.half, 30.0);
  plate.holes[0].centre = {0, 0};
  plate.width = 200;
  EXPECT_NEAR(neighbourhood(plate, 0).half, 17.0, 1e-12);  // the edge is far: the hole and air around it
}

TEST(Sampling, IsFinerWhereStressVariesOrPaperIsLarge) {
  Picture picture = kirsch_picture();
  picture.focus.reset();
  const CellSource source{
      2, [](std::size_t cell, std::span<const Point> reference, PictureCell& out) {
        for (const Point& r : reference) {
          out.points.push_back(Point(-50 + 60.0 * static_cast<double>(cell), -50) + 40 * r);
          out.values.push_back(cell == 0 ? 100.0 : 300 * r.x());
        }
      }};
  const auto cells = sampled(source, picture);
  ASSERT_EQ(cells.size(), 2u);
  EXPECT_GT(cells[1].subdivisions, cells[0].subdivisions);
  for (const PictureCell& cell : cells) EXPECT_EQ(cell.points.size(), lattice(cell.subdivisions).size());
}

}  // namespace
}  // namespace raiser::io
