#include "io/write/growth.hpp"

#include <gtest/gtest.h>

#include <filesystem>
#include <fstream>
#include <nlohmann/json.hpp>
#include <sstream>

#include "io/command/options.hpp"
#include "io/command/run.hpp"
#include "io/picture/from_growth.hpp"
#include "io/write/layout.hpp"
#include "tests/io/cracked.hpp"
#include "tests/io/scratch.hpp"

namespace raiser::io {
namespace {

namespace fs = std::filesystem;

/// The strap's crack at its hole, grown at six lengths and once beyond the plate.
const GrowthResult& grown() {
  static const GrowthResult result = [] {
    GrowthResult r{*read_case_text(test::cracked_hole, "strap.toml").value, {}, {}, {}, {}, {}};
    r.plan.tips = {0};
    r.plan.lengths = {0.5, 1.0, 2.0, 4.0, 6.0, 8.0, 40.0};
    r.growth = solver::grow(r.input.problem, r.plan);
    r.factor = solver::geometry_factor(r.input.problem, r.plan, r.growth);
    r.notch = solver::notch_limits(r.input.problem, 0);
    return r;
  }();
  return result;
}

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines;
  std::istringstream in(text);
  for (std::string line; std::getline(in, line);) lines.push_back(line);
  return lines;
}

TEST(GrowthWords, TheTableFitsThePageAndSaysWhatYStandsOn) {
  const std::string table = growth_table(grown());
  for (const std::string& line : lines_of(table)) EXPECT_LE(columns(line), page_width) << line;
  EXPECT_NE(table.find("S = 50 MPa"), std::string::npos) << table;
  EXPECT_NE(table.find("W = 40 mm"), std::string::npos) << table;
  EXPECT_NE(table.find("Short and long crack at the notch"), std::string::npos) << table;
  EXPECT_NE(table.find("not solved: "), std::string::npos) << table;
  EXPECT_NE(table.find("assumed, not predicted"), std::string::npos) << table;
}

TEST(GrowthWords, TheFitInTheTextIsTheFit) {
  ASSERT_TRUE(grown().factor.fit) << grown().factor.why;
  const std::string text = factor_text(grown());
  const auto at = [&](std::string_view word) { return text.find(word) + word.size(); };
  const double centre = std::stod(text.substr(at("s = (a/W - "))), half = std::stod(text.substr(at(") / ")));
  std::string terms = text.substr(at("Y = +") - 1);
  double y = 0.0, power = 1.0;
  const double s = (0.1 - centre) / half;  // a/W = 0.1: the crack of 4 mm
  std::istringstream in(terms);
  for (std::string word; in >> word;) {
    if (word.front() == 's') continue;
    y += std::stod(word) * power;
    power *= s;
  }
  EXPECT_NEAR(y, grown().factor.points[3].y, 1.1 * grown().factor.fit->error * y);
}

TEST(GrowthFiles, EveryLengthHasItsRowWithAllColumns) {
  const std::vector<std::string> lines = lines_of(growth_csv(grown()));
  std::vector<std::string> rows;
  for (const std::string& line : lines)
    if (line.front() != '#') rows.push_back(line);
  ASSERT_EQ(rows.size(), 8u);
  const auto commas = [](const std::string& row) {
    bool is_quoted = false;
    std::size_t n = 0;
    for (const char c : row) {
      is_quoted = is_quoted != (c == '"');
      n += c == ',' && !is_quoted;
    }
    return n;
  };
  for (const std::string& row : rows) EXPECT_EQ(commas(row), commas(rows[0])) << row;
  EXPECT_EQ(rows[1].rfind("0.5,\"hole crack\",", 0), 0u) << rows[1];
  EXPECT_NE(rows[7].find("\"not solved\""), std::string::npos) << rows[7];
}

TEST(GrowthFiles, TheDocumentIsJson) {
  const auto document = nlohmann::json::parse(growth_json(grown()));
  ASSERT_EQ(document["steps"].size(), 7u);
  const auto& tip = document["steps"][2]["tips"][0];
  EXPECT_EQ(tip["K_I"]["value"].get<double>(), grown().growth.steps[2].tips[0].k_one.value);
  EXPECT_EQ(document["steps"][6]["status"], "not solved");
  EXPECT_EQ(document["factor"]["fit"]["coefficients_of_powers_of_s"].size(),
            grown().factor.fit->coefficients.size());
  EXPECT_NEAR(document["notch"]["Kt"].get<double>(), grown().notch.limits->kt(), 1e-12);
}

TEST(GrowthChart, ShowsKAndTheLimits) {
  const Chart chart = chart_of(grown());
  ASSERT_GE(chart.curves.size(), 3u);
  EXPECT_EQ(chart.curves[0].points.size(), 6u);
  EXPECT_EQ(chart.curves[0].label, "K_I");
}

class GrowCommand : public ::testing::Test {
 protected:
  GrowCommand() : strap_(folder_.file("strap.toml", test::cracked_strap)) {}
  Exit grow(std::vector<std::string> arguments) {
    arguments.insert(arguments.begin(), {"grow", strap_.string()});
    out_.str("");
    err_.str("");
    return run(arguments, out_, err_);
  }
  test::ScratchFolder folder_;
  fs::path strap_;
  std::ostringstream out_, err_;
};

TEST_F(GrowCommand, WritesTableFilesAndCurve) {
  ASSERT_EQ(grow({"--crack", "edge crack", "--to", "20 mm", "--steps", "5"}), Exit::settled) << err_.str();
  EXPECT_NE(out_.str().find("K_II"), std::string::npos);
  for (const char* name : {"strap-grow.csv", "strap-grow.json", "strap-grow.svg", "strap-grow.png"})
    EXPECT_TRUE(fs::exists(folder_ / name)) << name;
  EXPECT_EQ(grow({"--crack", "flaw", "--tip", "flaw", "--to", "9 mm", "--steps", "2", "--kinked", "--json",
                  "--no-files"}),
            Exit::settled)
      << err_.str();
  EXPECT_EQ(nlohmann::json::parse(out_.str())["path"], "kinked");
}

TEST_F(GrowCommand, NamesEveryFaultAtOnce) {
  EXPECT_EQ(grow({"--crack", "edge crak", "--from", "3", "--to", "0 mm", "--steps", "1"}), Exit::usage);
  for (const char* what : {"did you mean \"edge crack\"?", "--from = \"3\"", "--to = \"0 mm\"", "--steps 1"})
    EXPECT_NE(err_.str().find(what), std::string::npos) << what << "\n" << err_.str();
  EXPECT_EQ(grow({"--to", "20 mm"}), Exit::usage);
  EXPECT_NE(err_.str().find("several cracks"), std::string::npos) << err_.str();
  EXPECT_EQ(grow({"--crack", "flaw", "--tip", "A", "--to", "20 mm"}), Exit::usage);
  EXPECT_NE(err_.str().find("no such tip"), std::string::npos) << err_.str();
  EXPECT_EQ(grow({"--crack", "flaw", "--to", "5 mm"}), Exit::usage);
  EXPECT_NE(err_.str().find("not longer than the first length, 8 mm"), std::string::npos) << err_.str();
  EXPECT_EQ(grow({"--crack", "flaw"}), Exit::usage);
  EXPECT_NE(err_.str().find("--to is missing"), std::string::npos) << err_.str();
}

}  // namespace
}  // namespace raiser::io
