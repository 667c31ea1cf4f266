#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <map>
#include <nlohmann/json.hpp>
#include <sstream>

#include "io/picture/from_result.hpp"
#include "io/write/crack_words.hpp"
#include "io/write/csv.hpp"
#include "io/write/json.hpp"
#include "io/write/summary.hpp"
#include "io/write/table.hpp"
#include "solver/crack/factors.hpp"
#include "tests/io/cracked.hpp"
#include "tests/io/scratch.hpp"
#include "tests/io/solved.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::io {
namespace {

using Json = nlohmann::json;

bool contains(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

std::string changed(std::string text, const std::string& from, const std::string& to) {
  text.replace(text.find(from), from.size(), to);
  return text;
}

const solver::TipFindings& at_a(const solver::LoadFindings& load) { return load.tips.at(0); }

// F of an edge crack in a strip, B. Gross and J. E. Srawley and W. F. Brown: 0.5 %
// in tension and 1 % in bending is what their polynomials claim for a/W = 0.2.
TEST(CrackResult, GivesThePublishedFactorOfAnEdgeCrack) {
  const Result result = test::solved(test::cracked_strap);
  ASSERT_EQ(result.solution.units.size(), 2u);
  const double published[] = {validation::edge_polynomial(0.2), validation::edge_bending_polynomial(0.2)};
  for (std::size_t l = 0; l < 2; ++l) {
    const solver::LoadFindings& unit = result.solution.units[l];
    const solver::CrackFactors own =
        solver::crack_factors(result.input.problem.plate, loads_of(result.input, unit), at_a(unit));
    ASSERT_TRUE(own.mode_one) << own.why;
    EXPECT_NEAR(own.mode_one->value, published[l], 0.01 * published[l]) << own.definition;
    EXPECT_EQ(own.size, 10.0);
  }
  EXPECT_EQ(result.solution.status, solver::Solution::Status::settled);
}

TEST(CrackResult, TableSaysItAllWithinEightyColumns) {
  for (const char* content : {test::cracked_strap, test::cracked_hole}) {
    const Result result = test::solved(content);
    const std::string text = table(result);
    EXPECT_LE(test::widest(text), 80u) << text;
    for (const char* part :
         {"K_I, opening", "K_II, sliding", "T-stress", "energy release rate G", "J integral", "kink angle",
          "Erdogan", "sqrt(pi a)", "a crack has no Kt", "toughness"})
      EXPECT_TRUE(contains(text, part)) << part << "\n" << text;
    const auto& worst = result.solution.combined.tips[worst_tips_first(result.solution.combined)[0]];
    EXPECT_TRUE(contains(text, solver::digits(worst.k_one)));
    EXPECT_FALSE(contains(text, "press on each other"));
  }
  EXPECT_TRUE(contains(table(test::solved(test::cracked_strap)), "K at A"));
  EXPECT_TRUE(contains(table(test::solved(test::cracked_hole)), "Kt gross"));
}

TEST(CrackResult, JsonHoldsEveryTipUnderEveryLoad) {
  const Result result = test::solved(test::cracked_strap);
  const Json document = Json::parse(json(result));
  ASSERT_EQ(document["results"].size(), 3u);
  for (const Json& load : document["results"]) ASSERT_EQ(load["tips"].size(), 2u);
  const Json& tip = document["results"][0]["tips"][0];
  EXPECT_EQ(tip["tip"], "A");
  EXPECT_EQ(tip["crack"], "edge crack");
  EXPECT_EQ(tip["K_I"]["unit"], "MPa sqrt(mm)");
  EXPECT_NEAR(tip["K_I"]["value"].get<double>() / tip["K_I_per_metre"]["value"].get<double>(),
              std::sqrt(1000.0), 1e-9);
  EXPECT_EQ(tip["beside_it"]["domains"].size(), at_a(result.solution.combined).domains.size());
  for (const char* other : {"j_integral", "virtual_extension"})
    EXPECT_LT(std::abs(tip["beside_it"][other]["relative_difference"].get<double>()), 2e-3) << other;
  EXPECT_TRUE(tip["kt"]["value"].is_null());
  EXPECT_EQ(document["crack_faces"].size(), 2u);
  EXPECT_FALSE(document["crack_faces"][0]["closed"].get<bool>());
  EXPECT_EQ(document["input"]["cracks"][1]["tips"], Json::array({"flaw"}));
  std::size_t asked = 0;
  for (const Json& one : document["asked"]) asked += one.contains("tip") && one["met"].get<bool>();
  EXPECT_EQ(asked, 5u);
}

TEST(CrackResult, CsvHasALineForEachTipAndLoad) {
  const Result result = test::solved(test::cracked_strap);
  std::istringstream lines(tips_csv(result));
  std::string line;
  std::getline(lines, line);
  const auto columns = std::count(line.begin(), line.end(), ',');
  EXPECT_TRUE(contains(line, "K_I_MPa_sqrt_mm"));
  std::size_t count = 0;
  for (; std::getline(lines, line); ++count) {
    const auto found = contains(line, "\"") ? columns : std::count(line.begin(), line.end(), ',');
    EXPECT_EQ(found, columns) << line;
  }
  EXPECT_EQ(count, 6u);
}

TEST(CrackResult, FacesThatPressOnEachOtherAreNotPassedOverInSilence) {
  std::string content = changed(test::cracked_strap, "stress = \"50 MPa\"", "stress = \"-50 MPa\"");
  content = changed(content, "stress = \"20 MPa\"", "stress = \"-20 MPa\"");
  const Result result = test::solved(content);
  const std::string text = table(result);
  EXPECT_TRUE(contains(text, "ATTENTION: the faces of crack 'edge crack' would overlap")) << text;
  EXPECT_LE(test::widest(text), 80u);
  EXPECT_TRUE(contains(text, "K_I does not open the crack"));
  const Json document = Json::parse(json(result));
  EXPECT_TRUE(document["crack_faces"][0]["closed"].get<bool>());
  EXPECT_TRUE(contains(document["crack_faces"][0]["warning"].get<std::string>(), "solved as free"));
  EXPECT_TRUE(document["results"][0]["tips"][0]["kink_angle"]["value"].is_null());
}

TEST(CrackResult, KinkAngleNamesWhyThereIsNone) {
  Result result = test::solved(test::cracked_strap);
  solver::TipFindings found = at_a(result.solution.combined);
  ASSERT_TRUE(kink(result.input, found).angle);
  found.k_one = {1.0, 2.0};
  EXPECT_FALSE(kink(result.input, found).angle);
  EXPECT_FALSE(kink(result.input, found).why.empty());
  result.input.problem.material.orthotropy = solver::Orthotropy{};
  EXPECT_TRUE(contains(kink(result.input, at_a(result.solution.combined)).why, "orthotropic"));
}

TEST(CrackResult, SummaryPutsTheWorstTipOfACaseBelow) {
  std::vector<Outcome> outcomes(2);
  outcomes[0].case_file = "hole.toml";
  outcomes[0].status = "settled";
  const Result hole = test::solved(test::one_hole);
  outcomes[0].raisers = hole.solution.combined.raisers;
  outcomes[0].raiser_names = {"pin"};
  outcomes[1].case_file = "crack.toml";
  outcomes[1].status = "settled";
  const Result cracked = test::solved(test::cracked_strap);
  outcomes[1].tips = cracked.solution.combined.tips;
  outcomes[1].tip_names = {"A", "flaw"};
  const std::string text = summary_table(outcomes);
  EXPECT_LE(test::widest(text), 80u) << text;
  EXPECT_TRUE(contains(text, "worst tip")) << text;
  EXPECT_TRUE(contains(text, "no hole")) << text;
  EXPECT_EQ(text.find("worst tip"), text.rfind("worst tip"));
  std::istringstream lines(summary_csv(outcomes));
  std::string line;
  std::getline(lines, line);
  const auto columns = std::count(line.begin(), line.end(), ',');
  std::size_t count = 0;
  for (; std::getline(lines, line); ++count) {
    const auto found = contains(line, "\"") ? columns : std::count(line.begin(), line.end(), ',');
    EXPECT_EQ(found, columns) << line;
  }
  EXPECT_EQ(count, 3u);
}

TEST(CrackResult, PictureEndsItsColoursAndMarksTheTips) {
  for (const char* content : {test::cracked_strap, test::cracked_hole}) {
    const Result result = test::solved(content);
    const Picture picture = picture_of(result);
    ASSERT_TRUE(picture.top);
    EXPECT_GT(*picture.top, 50.0);
    const std::vector<double> limits = limits_of(picture);
    EXPECT_LT(limits.back(), 2 * *picture.top);
    EXPECT_EQ(picture.tips.size(), result.solution.combined.tips.size());
    double largest = 0.0;
    for (const PictureCell& cell : picture.cells)
      largest = std::max(largest, *std::max_element(cell.values.begin(), cell.values.end()));
    EXPECT_GT(largest, limits.back());
    const test::ScratchFolder folder;
    const auto file = folder / "crack.svg";
    draw_svg(picture, file);
    EXPECT_GT(std::filesystem::file_size(file), 10000u);
  }
}

// The .vtu takes its cells from the same field: on either side of the seam the
// displacement differs by the opening.
TEST(CrackResult, DisplacementJumpsAcrossTheCrack) {
  const Result result = test::solved(test::cracked_strap);
  std::map<std::pair<double, double>, std::pair<double, double>> at;  // least and largest u_x
  const solver::Field& field = result.solution.field;
  const std::vector<mesh::Point> corners = {{0, 0}, {1, 0}, {0, 1}};
  for (std::size_t cell = 0; cell < field.cells(); ++cell)
    for (const solver::FieldValue& value : field.sample(cell, corners)) {
      const std::pair key{std::round(value.point.x() * 1e6), std::round(value.point.y() * 1e6)};
      const double u = value.displacement.x();
      const auto [found, fresh] = at.emplace(key, std::pair{u, u});
      if (!fresh) found->second = {std::min(found->second.first, u), std::max(found->second.second, u)};
    }
  double jump = 0.0, elsewhere = 0.0;
  for (const auto& [key, range] : at) {
    const bool on_crack = key.first == 0.0 && key.second > 15000001.0;
    const bool near_flaw = std::hypot(key.first / 1e6 - 60, key.second / 1e6 + 25) < 8.1;
    if (on_crack) jump = std::max(jump, range.second - range.first);
    if (!on_crack && !near_flaw) elsewhere = std::max(elsewhere, range.second - range.first);
  }
  EXPECT_NEAR(jump, result.solution.openings.at(0).largest, 0.02 * jump);
  EXPECT_LT(elsewhere, 1e-9 * jump);
}

}  // namespace
}  // namespace raiser::io
