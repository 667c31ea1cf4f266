#include "io/write/json.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <nlohmann/json.hpp>

#include "tests/io/solved.hpp"

namespace raiser::io {
namespace {

using nlohmann::json;

constexpr double infinite = std::numeric_limits<double>::infinity();
constexpr double no_number = std::numeric_limits<double>::quiet_NaN();

nlohmann::json parsed(const Result& result) { return nlohmann::json::parse(io::json(result)); }

TEST(Json, HoldsEveryNumberToTheLastBit) {
  const Result result = test::solved(test::two_holes);
  const auto document = parsed(result);
  ASSERT_EQ(document.at("results").size(), 3U);
  EXPECT_EQ(document["results"][0]["load"], "all loads");
  EXPECT_EQ(document["results"][1]["load"], "pull");
  for (std::size_t h = 0; h < 2; ++h) {
    const solver::RaiserFindings& found = result.solution.combined.raisers[h];
    const auto& hole = document["results"][0]["holes"][h];
    EXPECT_EQ(hole["largest_edge_stress"]["value"].get<double>(), found.largest.stress.value);
    EXPECT_EQ(hole["largest_edge_stress"]["bound"].get<double>(), found.largest.stress.bound);
    EXPECT_EQ(hole["largest_edge_stress"]["unit"], "MPa");
    EXPECT_EQ(hole["smallest_edge_stress"]["at"]["y"]["value"].get<double>(), found.smallest.point.y());
    EXPECT_NEAR(hole["largest_von_mises_stress"]["edge_angle"]["value"].get<double>(),
                found.von_mises.angle * 180.0 / std::acos(-1.0), 1e-12);
    EXPECT_EQ(hole["kt_net"]["value"].get<double>(), found.net.kt->value);
    EXPECT_EQ(hole["kt_net"]["definition"], found.net.definition);
    EXPECT_EQ(hole["section"]["net_area"]["value"].get<double>(), found.section.net_area);
  }
  EXPECT_EQ(document["discretisation"]["unknowns"].get<std::size_t>(), result.solution.unknowns);
  EXPECT_EQ(document["levels"].size(), result.solution.levels.size());
}

TEST(Json, SaysWhatWasAskedAndWhetherItIsMet) {
  Result result = test::solved(test::two_holes);
  const auto asked = parsed(result)["asked"];
  ASSERT_EQ(asked.size(), 7U);
  EXPECT_TRUE(asked[0]["name"].is_null());
  EXPECT_EQ(asked[6]["name"], "peak at the outlet");
  EXPECT_EQ(asked[6]["hole"], "outlet");
  EXPECT_TRUE(asked[6]["met"].get<bool>());
  for (auto& hole : result.solution.combined.raisers) hole.largest.stress.bound = 0.002 * peak(hole);
  const auto loose = parsed(result)["asked"];
  EXPECT_FALSE(loose[6]["met"].get<bool>()) << "0.2 % does not meet 0.1 %";
  EXPECT_TRUE(loose[0]["met"].get<bool>()) << "0.2 % meets 0.5 %";
}

TEST(Json, HasNullWithAReasonForWhatIsNoNumber) {
  Result result = test::solved(test::one_hole);
  solver::RaiserFindings& found = result.solution.combined.raisers[0];
  found.largest.stress = {no_number, infinite};
  found.smallest.stress.bound = infinite;
  found.net.kt.reset();
  found.net.why = "no net section";
  result.solution.checks.reaction = infinite;
  const auto document = parsed(result);
  const auto& hole = document["results"][0]["holes"][0];
  EXPECT_TRUE(hole["largest_edge_stress"]["value"].is_null());
  EXPECT_EQ(hole["largest_edge_stress"]["why"], "not a finite number");
  EXPECT_TRUE(hole["smallest_edge_stress"]["value"].is_number());
  EXPECT_TRUE(hole["smallest_edge_stress"]["bound"].is_null());
  EXPECT_EQ(hole["smallest_edge_stress"]["why"], "no bound can be given");
  EXPECT_EQ(hole["kt_net"]["why"], "no net section");
  EXPECT_TRUE(document["checks"]["reaction"]["value"].is_null());
}

TEST(Json, SurvivesAnyBytesInNames) {
  Result result = test::solved(test::one_hole);
  result.provenance.case_file = "caf\xe9.toml";
  result.input.title = "tab\t quote\" \x1b[31m";
  const auto document = parsed(result);
  EXPECT_EQ(document["title"], "tab\t quote\" \x1b[31m");
  EXPECT_EQ(document["provenance"]["case_file"], "caf\xef\xbf\xbd.toml");
}

TEST(Json, SaysWhereItComesFrom) {
  const auto document = parsed(test::solved(test::one_hole));
  EXPECT_EQ(document["provenance"]["version"], version());
  EXPECT_EQ(document["provenance"]["case_sha256"], sha256(test::one_hole));
  EXPECT_EQ(document["input"]["material"]["yield_strength"]["value"], 120.0);
  EXPECT_EQ(document["input"]["written"]["plate.width"], "50 mm");
  EXPECT_FALSE(document["input"]["written"].contains("material.state"));
  EXPECT_EQ(document["input"]["material"]["state"], "plane stress");
}

TEST(Json, OfSeveralCasesIsOneDocument) {
  const std::string first = io::json(test::solved(test::one_hole));
  Outcome good, bad;
  good.case_file = "a.toml";
  good.status = "settled";
  bad.case_file = "b \"quoted\".toml";
  bad.exit_code = 3;
  bad.status = "not read";
  std::string text = json_begin();
  text += json_entry(good, {}, first);
  text += json_between();
  text += json_entry(bad, {"b:1:2: wrong"}, "");
  text += json_end();
  const auto document = nlohmann::json::parse(text);
  ASSERT_EQ(document["cases"].size(), 2U);
  EXPECT_EQ(document["cases"][0]["result"], nlohmann::json::parse(first));
  EXPECT_TRUE(document["cases"][1]["result"].is_null());
  EXPECT_EQ(document["cases"][1]["faults"][0], "b:1:2: wrong");
  EXPECT_EQ(document["cases"][1]["case_file"], "b \"quoted\".toml");
  EXPECT_TRUE(nlohmann::json::parse(json_begin() + std::string(json_end()))["cases"].empty());
}

}  // namespace
}  // namespace raiser::io
