#include "io/write/csv.hpp"

#include <gtest/gtest.h>

#include <limits>
#include <string>
#include <vector>

#include "tests/io/solved.hpp"

namespace raiser::io {
namespace {

using Rows = std::vector<std::vector<std::string>>;

// A reader of RFC 4180 of its own, so that writer and reader share no mistake.
Rows rows(const std::string& text) {
  Rows all(1);
  all.back().emplace_back();
  bool quoted = false;
  for (std::size_t i = 0; i < text.size(); ++i) {
    const char c = text[i];
    if (quoted && c == '"' && i + 1 < text.size() && text[i + 1] == '"') {
      all.back().back() += text[++i];
    } else if (c == '"') {
      quoted = !quoted;
    } else if (c == ',' && !quoted) {
      all.back().emplace_back();
    } else if (c == '\n' && !quoted) {
      all.emplace_back();
      all.back().emplace_back();
    } else {
      all.back().back() += c;
    }
  }
  all.pop_back();  // after the last newline
  return all;
}

void expect_rectangular(const Rows& table) {
  for (const auto& row : table) EXPECT_EQ(row.size(), table.front().size());
}

TEST(Csv, EdgeHasEverySampleOfEveryHole) {
  const Result result = test::solved(test::two_holes);
  const Rows table = rows(edge_csv(result.input, result.solution));
  expect_rectangular(table);
  const auto& edges = result.solution.edges;
  ASSERT_EQ(table.size(), 1 + edges[0].size() + edges[1].size());
  EXPECT_EQ(table[0][0], "raiser");
  EXPECT_EQ(table[0][5], "tangential_stress_MPa");
  EXPECT_EQ(table[1][0], "inlet, left") << "a comma inside a name";
  const auto& last = edges[1].back();
  EXPECT_EQ(table.back()[0], "outlet");
  EXPECT_EQ(std::stod(table.back()[2]), last.point.x());
  EXPECT_EQ(std::stod(table.back()[5]), last.tangential);
  EXPECT_EQ(std::stod(table.back()[6]), last.bound);
  EXPECT_EQ(std::stod(table.back()[7]), last.von_mises);
}

TEST(Csv, LigamentHasEveryPoint) {
  Result result = test::solved(test::two_holes);
  ASSERT_FALSE(result.solution.ligaments.empty());
  result.solution.ligaments[0].points[1].bound = std::numeric_limits<double>::infinity();
  result.solution.ligaments[0].to = "a \"quoted\" edge";
  const Rows table = rows(ligament_csv(result.input, result.solution));
  expect_rectangular(table);
  std::size_t points = 0;
  for (const auto& ligament : result.solution.ligaments) points += ligament.points.size();
  ASSERT_EQ(table.size(), 1 + points);
  EXPECT_EQ(table[2][2], "a \"quoted\" edge");
  EXPECT_EQ(table[2].back(), "") << "a bound that does not exist is an empty cell";
  const auto& last = result.solution.ligaments.back().points.back();
  EXPECT_EQ(std::stod(table.back()[4]), last.distance);
  EXPECT_EQ(std::stod(table.back()[7]), last.stress.xx);
  EXPECT_EQ(std::stod(table.back()[9]), last.stress.xy);
}

TEST(Csv, SummaryHasALineForEachHoleAndForEachFailure) {
  const Result result = test::solved(test::two_holes);
  Outcome good{"a.toml",
               "Bracket",
               0,
               "settled",
               "",
               0.5,
               {"inlet, left", "outlet"},
               result.solution.combined.raisers};
  good.raisers[1].gross.kt.reset();
  const Outcome bad{"b.toml", "", 3, "not read", "b.toml:1:1: no\nplate", 0.0, {}, {}};
  const Rows table = rows(summary_csv({good, bad}));
  expect_rectangular(table);
  ASSERT_EQ(table.size(), 4U);
  EXPECT_EQ(table[1][6], "inlet, left");
  EXPECT_EQ(table[2][6], "outlet");
  const auto column = [&](const std::string& name) {
    const auto& head = table.front();
    return static_cast<std::size_t>(std::find(head.begin(), head.end(), name) - head.begin());
  };
  EXPECT_EQ(std::stod(table[2].at(column("largest_edge_stress_MPa"))), good.raisers[1].largest.stress.value);
  EXPECT_EQ(std::stod(table[1].at(column("kt_gross"))), good.raisers[0].gross.kt->value);
  EXPECT_EQ(table[2].at(column("kt_gross")), "");
  EXPECT_EQ(std::stod(table[2].at(column("kt_net"))), good.raisers[1].net.kt->value);
  EXPECT_EQ(std::stod(table[2].at(column("kt_net_nominal_stress_MPa"))), good.raisers[1].net.nominal);
  EXPECT_EQ(table[3].at(column("message")), "b.toml:1:1: no\nplate");
  EXPECT_EQ(table[3].at(column("kt_net_definition")), "");
}

}  // namespace
}  // namespace raiser::io
