#include "io/picture/picture.hpp"

#include <cairo/cairo.h>
#include <gtest/gtest.h>

#include <array>
#include <cmath>
#include <cstdlib>
#include <filesystem>
#include <memory>
#include <numbers>
#include <stdexcept>

#include "io/picture/chart.hpp"
#include "io/picture/colours.hpp"
#include "io/picture/layout.hpp"
#include "io/picture/levels.hpp"
#include "io/write/file.hpp"
#include "tests/io/kirsch_picture.hpp"

namespace raiser::io {
namespace {

using namespace test;

// A folder of its own for each test, gone afterwards.
class PictureFile : public testing::Test {
 protected:
  std::filesystem::path folder =
      std::filesystem::path(testing::TempDir()) /
      ("picture-" + std::string(testing::UnitTest::GetInstance()->current_test_info()->name()));
  void SetUp() override {
    std::filesystem::remove_all(folder);
    std::filesystem::create_directories(folder);
  }
  void TearDown() override { std::filesystem::remove_all(folder); }
};

class Pixels {
 public:
  explicit Pixels(const std::filesystem::path& file)
      : image_(cairo_image_surface_create_from_png(file.c_str()), cairo_surface_destroy) {
    if (cairo_surface_status(image_.get()) != CAIRO_STATUS_SUCCESS) throw std::runtime_error("not a PNG");
  }
  int width() const { return cairo_image_surface_get_width(image_.get()); }
  int height() const { return cairo_image_surface_get_height(image_.get()); }
  /// Red, green, blue, 0 to 255, at a place on the paper.
  std::array<int, 3> at(const Spot& spot) const {
    const auto x = static_cast<int>(std::floor(2 * spot.x())), y = static_cast<int>(std::floor(2 * spot.y()));
    const auto* row =
        cairo_image_surface_get_data(image_.get()) + y * cairo_image_surface_get_stride(image_.get());
    return {row[4 * x + 2], row[4 * x + 1], row[4 * x]};
  }

 private:
  std::unique_ptr<cairo_surface_t, void (*)(cairo_surface_t*)> image_;
};

std::array<int, 3> rgb(const Ink& ink) {
  const auto byte = [](double c) { return static_cast<int>(std::lround(255 * c)); };
  return {byte(ink.red), byte(ink.green), byte(ink.blue)};
}

void expect_near(const std::array<int, 3>& seen, const std::array<int, 3>& wanted, const std::string& what) {
  for (std::size_t k = 0; k < 3; ++k) EXPECT_NEAR(seen[k], wanted[k], 2) << what << ", channel " << k;
}

TEST_F(PictureFile, ShowsTheStressOfKirschInItsColours) {
  const Picture picture = kirsch_picture();
  draw_png(picture, folder / "kirsch.png");
  const Pixels image(folder / "kirsch.png");
  const Layout page = lay_out(picture);
  ASSERT_TRUE(page.detail);
  EXPECT_EQ(image.width(), static_cast<int>(2 * page.width));
  EXPECT_EQ(image.height(), static_cast<int>(2 * page.height));
  const std::vector<double> limits = limits_of(picture);
  const auto bands = limits.size() - 1;
  int tested = 0;
  for (double angle = 0.05; angle < 6.2; angle += 0.31)
    for (const double r : {11.5, 13.0, 15.0, 28.0, 40.0}) {
      const Point x(r * std::cos(angle), r * std::sin(angle));
      const double place = position_on_bar(limits, kirsch(x)) * static_cast<double>(bands);
      const double band = std::min(std::floor(place), static_cast<double>(bands - 1));
      if (place - band < 0.25 || place - band > 0.75) continue;  // a line may cross the pixel
      const std::string what = "r " + std::to_string(r) + ", angle " + std::to_string(angle);
      const auto wanted = rgb(stress_colour(band / static_cast<double>(bands - 1)));
      const Spot detail = page.detail->on_paper(x);
      if (page.detail->box.grown(-2).holds({detail.x(), detail.y(), 0, 0})) {
        expect_near(image.at(detail), wanted, what + ", enlarged");
        ++tested;
      } else {
        expect_near(image.at(page.whole.on_paper(x)), wanted, what);
        ++tested;
      }
    }
  EXPECT_GT(tested, 30);
}

TEST_F(PictureFile, DrawsTheHoleWhereItIsAndMarksThePeak) {
  Picture picture = kirsch_picture();
  picture.peaks[0].label.clear();
  draw_png(picture, folder / "hole.png");
  const Pixels image(folder / "hole.png");
  const View view = *lay_out(picture).detail;
  const double line = 1.5 / view.scale;  // clear of the outline's stroke
  for (const double angle : {0.0, 0.4, 0.8, 2.0, 3.3, 4.0, 5.5}) {
    const Point to(std::cos(angle), std::sin(angle));
    expect_near(image.at(view.on_paper((radius - line) * to)), {255, 255, 255}, "inside");
    EXPECT_LT(image.at(view.on_paper((radius + line) * to))[2], 250) << angle;
    EXPECT_LT(image.at(view.on_paper(radius * to))[0], 120) << angle;
  }
  expect_near(image.at(view.on_paper({0, radius})), rgb(ink::text), "dot of the peak's mark");
  const Spot ring = view.on_paper({0, radius}) + Spot(0, 4.2);
  EXPECT_LT(image.at(ring)[0], 90) << "ring of the peak's mark";
  const Spot opposite = view.on_paper({0, -radius}) + Spot(0, -4.2);
  expect_near(image.at(opposite), {255, 255, 255}, "no mark at the other side");
}

TEST_F(PictureFile, WritesAnSvgThatParsesAndIsSmall) {
  draw_svg(kirsch_picture(), folder / "kirsch.svg");
  EXPECT_LT(std::filesystem::file_size(folder / "kirsch.svg"), 1000000u);
  EXPECT_GT(std::filesystem::file_size(folder / "kirsch.svg"), 10000u);
  const std::string command =
      "python3 -c \"import sys, xml.dom.minidom as m; d = m.parse(sys.argv[1]); "
      "sys.exit(0 if d.documentElement.tagName == 'svg' and len(d.getElementsByTagName('path')) > 20 else "
      "1)\" '" +
      (folder / "kirsch.svg").string() + "'";
  EXPECT_EQ(std::system(command.c_str()), 0);
}

TEST_F(PictureFile, ThatCannotBeWrittenThrowsAndLeavesNothing) {
  EXPECT_THROW(draw_png(kirsch_picture(), folder / "missing" / "a.png"), WriteError);
  EXPECT_THROW(draw_svg(kirsch_picture(), folder / "missing" / "a.svg"), WriteError);
  std::filesystem::create_directories(folder / "taken.png");
  EXPECT_THROW(draw_png(kirsch_picture(), folder / "taken.png"), WriteError);
  EXPECT_EQ(std::distance(std::filesystem::directory_iterator(folder), {}), 1);
}

TEST_F(PictureFile, OfACellThatDoesNotFitIsRefused) {
  Picture picture = kirsch_picture();
  picture.cells.front().values.pop_back();
  EXPECT_THROW(draw_png(picture, folder / "a.png"), std::invalid_argument);
  picture.cells.clear();
  EXPECT_THROW(draw_png(picture, folder / "a.png"), std::invalid_argument);
  EXPECT_TRUE(std::filesystem::is_empty(folder));
}

Chart edge_of_kirsch() {
  Chart chart{"Edge of hole bolt", "edge angle, degrees", "stress, MPa", 45.0, {}, {}, {}, ""};
  chart.curves.push_back({"edge stress (tangential)", {}});
  for (int i = -180; i <= 180; ++i)
    chart.curves[0].points.emplace_back(i,
                                        validation::kirsch_edge({remote, 0, 0}, i * std::numbers::pi / 180));
  chart.levels = {{"nominal, gross section: 100 MPa", remote}};
  chart.marks = {{{90, 300}, 300, "300 MPa at 90°"}};
  return chart;
}

TEST_F(PictureFile, OfAChartShowsTheCurve) {
  Chart chart = edge_of_kirsch();
  chart.marks.clear();  // they stand on the curve
  draw_chart_png(chart, folder / "edge.png");
  draw_chart_svg(chart, folder / "edge.svg");
  EXPECT_LT(std::filesystem::file_size(folder / "edge.svg"), 200000u);
  const Pixels image(folder / "edge.png");
  // the curve's own colour stands somewhere in each of these columns of the plot
  const auto wanted = rgb(stress_colour(0.86));
  int columns = 0, hits = 0;
  for (double x = 150; x < 780; x += 10, ++columns)
    for (double y = 50; y < image.height() / 2.0; y += 0.5) {
      const auto seen = image.at({x, y});
      if (std::abs(seen[0] - wanted[0]) + std::abs(seen[1] - wanted[1]) + std::abs(seen[2] - wanted[2]) > 12)
        continue;
      ++hits;
      break;
    }
  EXPECT_EQ(hits, columns);
}

TEST_F(PictureFile, OfAChartWithoutACurveIsRefused) {
  Chart chart = edge_of_kirsch();
  chart.curves[0].points[5].y() = std::nan("");
  EXPECT_THROW(draw_chart_png(chart, folder / "a.png"), std::invalid_argument);
  chart.curves[0].points.resize(1);
  EXPECT_THROW(draw_chart_png(chart, folder / "a.png"), std::invalid_argument);
  chart.curves.clear();
  EXPECT_THROW(draw_chart_png(chart, folder / "a.png"), std::invalid_argument);
}

}  // namespace
}  // namespace raiser::io
