// What `raiser validate` prints, writes and draws.
#include <gtest/gtest.h>

#include <filesystem>
#include <fstream>
#include <iterator>
#include <limits>
#include <nlohmann/json.hpp>
#include <sstream>

#include "io/picture/from_family.hpp"
#include "io/write/layout.hpp"
#include "io/write/validation.hpp"
#include "io/write/validation_words.hpp"
#include "tests/io/scratch.hpp"

namespace raiser::io {
namespace {

using validation::Family;
using validation::FamilyPoint;
using validation::FamilyResult;
using validation::Ours;
using validation::Reference;

// A family whose numbers are given, not solved: 1 % below the table, and at
// 0.4 without a value.
Family family() {
  Family f{"test-family",
           "A02",
           "Circular hole in a strip",
           "d/W: diameter over width",
           "Kt net",
           "nothing: the numbers are given",
           "they are invented",
           1e-5,
           {},
           {}};
  for (const double x : {0.1, 0.2, 0.3, 0.4}) {
    FamilyPoint point{
        "", {{"d/W", x}}, {{Reference::howland, 2.5}, {Reference::roark_circle, 2.475}}, {}, true};
    point.solve = [x](double) {
      Ours ours;
      if (x < 0.35) ours.value = solver::Estimate{2.475, 3e-5};
      ours.is_settled = x < 0.35;
      ours.reason = x < 0.35 ? "" : "no mesh | at all";
      return ours;
    };
    f.points.push_back(std::move(point));
  }
  f.curves = {{Reference::howland, "", [](double) { return 2.5; }, 0.1, 0.4, true, {0.1, 0.2, 0.3, 0.4}},
              {Reference::roark_circle, "", [](double) { return 2.475; }, 0.0, 1.0, false, {}}};
  return f;
}

class Written : public testing::Test {
 protected:
  Family f = family();
  std::vector<FamilyResult> results{run(f, false)};
};

TEST_F(Written, TableFitsThePageAndSaysWhatIsBeyond) {
  const std::string text = family_table(results[0]) + validation_summary(results) + family_legend();
  std::istringstream lines(text);
  for (std::string line; std::getline(lines, line);) EXPECT_LE(columns(line), page_width) << line;
  EXPECT_NE(text.find("BEYOND"), std::string::npos);
  EXPECT_NE(text.find("as known"), std::string::npos);
  EXPECT_NE(text.find("+1.01 %"), std::string::npos);
  EXPECT_NE(text.find("2.47500 ±3e-05"), std::string::npos) << text;
  EXPECT_NE(text.find("not settled: no mesh"), std::string::npos);
  EXPECT_NE(text.find("digits from memory"), std::string::npos);
  EXPECT_NE(text.find("  NO\n"), std::string::npos);
  EXPECT_NE(text.find("claims 0.5 %, and is +1.01 %"), std::string::npos) << text;
  EXPECT_NE(text.find("3 points"), std::string::npos) << text;
}

TEST_F(Written, PageHasARowForEveryValueAndEscapesBars) {
  const std::string page = validation_page(results, true);
  EXPECT_NE(page.find("[test-family](#test-family-a02)"), std::string::npos);
  EXPECT_NE(page.find("](test-family.svg)"), std::string::npos);
  EXPECT_EQ(validation_page(results, false).find(".svg"), std::string::npos);
  std::size_t rows = 0;
  for (std::size_t at = page.find("| d/W 0."); at != std::string::npos; at = page.find("| d/W 0.", at + 1))
    ++rows;
  EXPECT_EQ(rows, 7U);  // three points with two sources, and the one without a value
  EXPECT_NE(page.find("no mesh \\| at all"), std::string::npos);
}

TEST_F(Written, JsonHoldsTheSameNumbers) {
  const auto document = nlohmann::json::parse(validation_json(results, true));
  EXPECT_EQ(document["run"], "quick");
  const auto& told = document["families"].at(0);
  EXPECT_EQ(told["sound"], false);
  EXPECT_EQ(told["sources"].size(), 2U);
  EXPECT_EQ(told["sources"][0]["claimed_relative_error"], 5e-3);
  EXPECT_TRUE(told["sources"][1]["claimed_relative_error"].is_null());
  const auto& point = told["points"].at(0);
  EXPECT_EQ(point["parameters"]["d/W"], 0.1);
  EXPECT_EQ(point["ours"]["bound"], 3e-5);
  EXPECT_EQ(point["published"][0]["verdict"], "beyond claim");
  EXPECT_NEAR(point["published"][0]["off"], 2.5 / 2.475 - 1, 1e-12);
  EXPECT_TRUE(told["points"].at(3)["ours"]["value"].is_null());
  EXPECT_EQ(told["points"].at(3)["ours"]["reason"], "no mesh | at all");
}

TEST_F(Written, ChartKeepsEachSourceToItsRange) {
  const FamilyChart chart = chart_of(results[0]);
  ASSERT_EQ(chart.sources.size(), 2U);
  EXPECT_EQ(chart.sources[0], "Howland 1930 (digits from memory)");
  ASSERT_EQ(chart.traces.size(), 2U);
  EXPECT_TRUE(chart.traces[0].is_table);
  EXPECT_EQ(chart.traces[0].points.size(), 4U);
  EXPECT_EQ(chart.traces[1].valid_to, 1.0);
  ASSERT_TRUE(chart.covered);
  EXPECT_EQ(chart.covered->second, 0.5);
  EXPECT_NEAR(*chart.claim, 0.5, 1e-12);
  ASSERT_EQ(chart.ours.size(), 1U);
  EXPECT_EQ(chart.ours[0].marks.size(), 3U);  // the one without a value is left out
  ASSERT_EQ(chart.off.size(), 2U);
  EXPECT_NEAR(chart.off[0].marks[0].point.y(), 100 * (2.5 / 2.475 - 1), 1e-9);
}

TEST_F(Written, ChartIsDrawnInBothKinds) {
  const test::ScratchFolder folder;
  const FamilyChart chart = chart_of(results[0]);
  draw_family_chart_svg(chart, folder / "a.svg");
  draw_family_chart_png(chart, folder / "a.png");
  std::ifstream file(folder / "a.svg");
  const std::string svg{std::istreambuf_iterator<char>(file), {}};
  EXPECT_NE(svg.find("</svg>"), std::string::npos);
  EXPECT_GT(std::filesystem::file_size(folder / "a.png"), 5000U);
}

TEST_F(Written, ChartWithoutPointsOrWithoutFiniteValuesIsRefused) {
  FamilyChart chart = chart_of(results[0]);
  const test::ScratchFolder folder;
  const auto file = folder / "none.svg";
  chart.ours[0].marks[0].point.y() = std::numeric_limits<double>::quiet_NaN();
  EXPECT_THROW(draw_family_chart_svg(chart, file), std::invalid_argument);
  chart.ours.clear();
  EXPECT_THROW(draw_family_chart_svg(chart, file), std::invalid_argument);
  EXPECT_FALSE(std::filesystem::exists(file));
}

TEST(ValidationWords, OffSaysSomethingAtEverySize) {
  EXPECT_EQ(off_text(0.0), "0 %");
  EXPECT_EQ(off_text(-0.0064), "-0.64 %");
  EXPECT_EQ(off_text(0.1764), "+17.6 %");
  EXPECT_EQ(off_text(0.0996), "+10.0 %");
  EXPECT_EQ(off_text(4e-8), "+4e-06 %");
  EXPECT_EQ(off_text(-4.4e-4), "-0.04 %");
  EXPECT_EQ(off_text(-2e-6), "-2e-04 %");
  EXPECT_EQ(off_text(2e-5), "+0.002 %");
}

}  // namespace
}  // namespace raiser::io
