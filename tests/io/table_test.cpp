#include "io/write/table.hpp"

#include <gtest/gtest.h>

#include <limits>
#include <string>

#include "io/write/json.hpp"
#include "io/write/layout.hpp"
#include "io/write/summary.hpp"
#include "tests/io/solved.hpp"

namespace raiser::io {
namespace {

constexpr double infinite = std::numeric_limits<double>::infinity();

bool holds(const std::string& text, const std::string& part) { return text.find(part) != std::string::npos; }

std::size_t occurrences(const std::string& text, const std::string& part) {
  std::size_t n = 0;
  for (std::size_t at = text.find(part); at != std::string::npos; at = text.find(part, at + 1)) ++n;
  return n;
}

// A result with `n` holes whose peaks grow with their number.
Result many_holes(std::size_t n) {
  Result result = test::solved(test::one_hole);
  mesh::Hole hole = result.input.problem.plate.holes[0];
  solver::RaiserFindings found = result.solution.combined.raisers[0];
  result.input.problem.plate.holes.clear();
  result.solution.combined.raisers.clear();
  for (std::size_t i = 0; i < n; ++i) {
    hole.name = "bore " + std::to_string(i);
    found.raiser = i;
    found.largest.stress = {100.0 + static_cast<double>(i), 0.05};
    result.input.problem.plate.holes.push_back(hole);
    result.solution.combined.raisers.push_back(found);
  }
  result.published.clear();
  return result;
}

TEST(Table, FitsThePageAndShowsValueBoundPlaceAndDefinition) {
  Result result = test::solved(test::one_hole);
  solver::RaiserFindings& found = result.solution.combined.raisers[0];
  found.largest = {{153.41872, 0.03}, mesh::Point(0.004, 5.0), 1.57};
  found.gross = {solver::Estimate{3.0683744, 0.0006}, 50.0, "F / (W t), gross section x = 0 mm", ""};
  const std::string text = table(result);
  EXPECT_LE(test::widest(text), page_width) << text;
  EXPECT_TRUE(holds(text, "153.42")) << text;
  EXPECT_FALSE(holds(text, "153.419")) << "a digit that the bound makes meaningless";
  EXPECT_TRUE(holds(text, "153.42     0.04       0.00       5.00       90.0\n")) << text;
  EXPECT_TRUE(holds(text, "3.0684 ± 0.0007  on 50 MPa = F / (W t), gross section x = 0 mm")) << text;
  EXPECT_TRUE(holds(text, "SETTLED"));
  EXPECT_TRUE(holds(text, "Howland")) << text;
  EXPECT_TRUE(holds(text, "Not a substitute"));
}

TEST(Table, PlacesAPeakAsFinelyAsTheEdgeIsCurvedThere) {
  Result result = test::solved(test::two_holes);
  mesh::Hole& hole = result.input.problem.plate.holes[1];
  hole.angle = 0.0;
  hole.length = 40.0;
  hole.width = 4.0;  // radius of curvature 0.2 mm at the tip, 200 mm at the crown
  solver::RaiserFindings& found = result.solution.combined.raisers[1];
  found.largest = {{900.0, 0.9}, hole.centre + mesh::Point(20.0, 0.0), 0.0};
  found.smallest = {{-90.0, 0.09}, hole.centre + mesh::Point(0.0, 2.0), 1.5708};
  const std::string text = table(result);
  EXPECT_TRUE(holds(text, "     70.000      0.000       0.00\n")) << text;
  EXPECT_TRUE(holds(text, "         50          2         90\n")) << text;
}

TEST(Table, SaysWhyAToleranceWasNotMet) {
  Result result = test::solved(test::two_holes);
  result.solution.status = solver::Solution::Status::not_met;
  result.solution.reason = "the budget of 4 refinements is spent";
  for (auto& hole : result.solution.combined.raisers) hole.largest.stress.bound = 0.002 * peak(hole);
  const std::string text = table(result);
  EXPECT_TRUE(holds(text, "NOT MET: the budget of 4 refinements is spent")) << text;
  EXPECT_TRUE(holds(text, "peak at the outlet: largest edge stress at outlet")) << text;
  EXPECT_FALSE(holds(text, "SETTLED"));
  EXPECT_LE(test::widest(text), page_width) << text;
}

TEST(Table, ShowsNoNumberWhereThereIsNone) {
  Result result = test::solved(test::one_hole);
  solver::RaiserFindings& found = result.solution.combined.raisers[0];
  found.smallest.stress.bound = infinite;
  found.net.kt.reset();
  found.net.why = "the loads leave the net section free of stress";
  const std::string text = table(result);
  EXPECT_TRUE(holds(text, "Kt net   undefined: the loads leave the net section free of stress")) << text;
  EXPECT_TRUE(holds(text, "none")) << text;
  EXPECT_FALSE(holds(text, "inf")) << text;
}

TEST(Table, ShowsTheWorstOfManyHolesAndCountsTheRest) {
  const std::string text = table(many_holes(40), {false, "plate.json"});
  EXPECT_LE(test::widest(text), page_width) << text;
  EXPECT_TRUE(holds(text, "Hole bore 39: circle")) << text;
  EXPECT_TRUE(holds(text, "bore 28 "));
  EXPECT_FALSE(holds(text, "bore 27 "));
  EXPECT_LT(text.find("bore 38 "), text.find("bore 37 "));
  EXPECT_TRUE(holds(text, "and 28 more holes, none of them worse: see plate.json")) << text;
}

TEST(Table, ShowsEveryArcThatAPinTouches) {
  const Result result = test::solved(R"(
raiser = 1
plate = { length = "240 mm", width = "60 mm", thickness = "6 mm" }
material = { youngs_modulus = "210 GPa", poissons_ratio = 0.3 }
hole = [{ name = "eye", shape = "circle", diameter = "20 mm" }]
support = [{ edge = "left", kind = "clamped" }]
pin = [{ hole = "eye", force = "6 kN", direction = "0 deg", model = "contact" }]
load = [{ kind = "edge", edge = "right", normal = "150 MPa" }]
)");
  ASSERT_EQ(result.solution.pins.size(), 1U);
  EXPECT_EQ(result.solution.pins[0].arcs.size(), 2U);
  const std::string text = table(result, {false, "plate.json"});
  EXPECT_EQ(occurrences(text, "touches from"), 2U) << text;
  EXPECT_LE(test::widest(text), 80U);
  EXPECT_EQ(occurrences(json(result), "\"largest_pressure\""), 2U);
}

TEST(Table, ShowsAFewHolesInFullWorstFirst) {
  const std::string text = table(many_holes(3));
  EXPECT_EQ(occurrences(text, "Kt gross"), 3U);
  EXPECT_LT(text.find("Hole bore 2"), text.find("Hole bore 0"));
  EXPECT_FALSE(holds(text, "more holes"));
}

TEST(Table, ShowsEachOfSeveralLoadsByItself) {
  const std::string text = table(test::solved(test::two_holes));
  EXPECT_TRUE(holds(text, "Each load by itself")) << text;
  EXPECT_TRUE(holds(text, "\n  pull "));
  EXPECT_TRUE(holds(text, "\n  bend "));
  EXPECT_FALSE(holds(table(test::solved(test::one_hole)), "Each load by itself"));
}

TEST(Table, StaysOnThePageAtTheFinestTolerance) {
  Result result = many_holes(5);
  for (auto& hole : result.solution.combined.raisers) {
    hole.largest.stress = {-12345.678901234, 3e-7};
    hole.smallest.stress = {-98765.432101234, 3e-7};
    hole.von_mises.stress = {98765.432101234, 3e-7};
    hole.gross.kt = {3.0123456789012, 1e-11};
    hole.net.kt = {3.0123456789012, 1e-11};
  }
  const std::string text = table(result);
  EXPECT_LE(test::widest(text), page_width) << text;
}

TEST(Table, RemarksOnYield) {
  Result result = test::solved(test::one_hole);
  auto& findings = result.solution.combined;
  findings.raisers[0].von_mises.stress = {119.0, 0.5};
  EXPECT_TRUE(holds(yield_remark(result.input, findings), "99 % of the yield strength"));
  EXPECT_TRUE(holds(yield_remark(result.input, findings), "on the holes' edges"));
  findings.raisers[0].von_mises.stress = {119.8, 0.5};
  EXPECT_TRUE(holds(yield_remark(result.input, findings), "may exceed the yield strength of 120 MPa"));
  findings.raisers[0].von_mises.stress = {150.0, 0.5};
  EXPECT_TRUE(holds(yield_remark(result.input, findings), "exceeds the yield strength of 120 MPa"));
  EXPECT_TRUE(holds(yield_remark(result.input, findings), "elastic peak above yield is fictitious"));
  result.input.yield_strength.reset();
  EXPECT_EQ(yield_remark(result.input, findings), "");
}

TEST(Table, LetsNoControlCharacterThrough) {
  Result result = test::solved(test::one_hole);
  result.input.title = "bad \x1b[31m title\xc2\x9b";
  result.input.problem.plate.holes[0].name = "a\nb\x7f";
  const std::string text = table(result);
  EXPECT_FALSE(holds(text, "\x1b"));
  EXPECT_FALSE(holds(text, "\x7f"));
  EXPECT_FALSE(holds(text, "\xc2\x9b"));
  EXPECT_TRUE(holds(text, "Hole a b : circle")) << text;
  EXPECT_TRUE(holds(table(result, {true, ""}), "\x1b[1;32mSETTLED\x1b[0m"));
}

TEST(Summary, HasALineForEachCaseAndCountsThem) {
  const Result result = test::solved(test::two_holes);
  Outcome good{"a.toml", "", 0, "settled", "", 0.5, {"inlet", "outlet"}, result.solution.combined.raisers};
  good.raisers[0].largest.stress = {100.0, 0.5};
  good.raisers[0].smallest.stress = {-500.0, 0.5};
  good.raisers[1].largest.stress = {400.0, 0.5};
  const Outcome bad{
      "a/very/long/path/to/a/folder/of/cases/b.toml", "", 3, "not read", std::string(90, 'x'), 0, {}, {}};
  Outcome unsolved = bad;
  unsolved.exit_code = 5;
  unsolved.status = "not solved";
  Outcome open = good;
  open.exit_code = 5;
  open.status = "not met";
  const std::string text = summary_table({good, bad, good, unsolved, open});
  EXPECT_LE(test::widest(text), page_width) << text;
  EXPECT_TRUE(holds(text, "-500.0 ±0.5")) << "the largest magnitude, not the largest value\n" << text;
  EXPECT_TRUE(holds(text, "inlet"));
  EXPECT_FALSE(holds(text, "outlet"));
  EXPECT_TRUE(holds(text, "folder/of/cases/b.toml") || holds(text, "cases/b.toml")) << text;
  EXPECT_TRUE(holds(text, "5 cases: 2 settled, 1 not read, 1 not met, 1 not solved")) << text;
}

TEST(Summary, NamesCasesByTheirFilesUnlessTheseAreTheSame) {
  Outcome a, b;
  a.case_file = "one/a.toml";
  b.case_file = "two/b.toml";
  EXPECT_FALSE(holds(summary_table({a, b}), "one/"));
  b.case_file = "two/a.toml";
  EXPECT_TRUE(holds(summary_table({a, b}), "\none/a.toml")) << summary_table({a, b});
  EXPECT_TRUE(holds(summary_table({a, b}), "\ntwo/a.toml"));
}

TEST(Layout, WrapsAtThePage) {
  const std::string text =
      wrapped(std::string(30, 'a') + " " + std::string(30, 'b') + " " + std::string(30, 'c'), "- ", 2);
  EXPECT_EQ(text,
            "- " + std::string(30, 'a') + " " + std::string(30, 'b') + "\n  " + std::string(30, 'c') + "\n");
  EXPECT_EQ(wrapped("x " + std::string(77, 'y')), "x " + std::string(77, 'y') + "\n");
  EXPECT_EQ(wrapped("±± " + std::string(77, 'y')), "±± " + std::string(77, 'y') + "\n")
      << "columns, not bytes";
  EXPECT_EQ(wrapped("xxx " + std::string(77, 'y')), "xxx\n" + std::string(77, 'y') + "\n");
}

TEST(Layout, KeepsNumbersWithTheirUnitsAndBounds) {
  const std::string most(70, 'a');
  EXPECT_EQ(wrapped(most + " with 0.25 s"), most + " with\n0.25 s\n");
  EXPECT_EQ(wrapped(most + " x -2.5 N mm; z"), most + " x\n-2.5 N mm; z\n");
  EXPECT_EQ(wrapped(most + " 3.61 ± 0.02 here"), most + "\n3.61 ± 0.02 here\n");
  EXPECT_EQ(wrapped(most + " in 12 parts"), most + " in 12\nparts\n") << "no unit, no tie";
}

TEST(Layout, WritesWholeNumbersOut) {
  EXPECT_EQ(brief(-200000, 5), "-200000");
  EXPECT_EQ(brief(99999.7, 5), "100000");
  EXPECT_EQ(brief(36000, 5), "36000");
  EXPECT_EQ(brief(2e9, 5), "2e+09");
  EXPECT_EQ(brief(1.5e-13, 2), "1.5e-13");
  EXPECT_EQ(percent(2.352), "235 %");
}

TEST(Layout, ShortensByCharacters) {
  mesh::Raiser raiser;
  raiser.name = "bolt";
  EXPECT_EQ(phrase(raiser), "hole bolt");
  raiser.name = "hole 2";
  EXPECT_EQ(phrase(raiser), "hole 2");
  raiser.kind = mesh::Raiser::Kind::notch;
  EXPECT_EQ(phrase(raiser), "notch hole 2");
  EXPECT_EQ(shortened("ärger", 5), "ärger");
  EXPECT_EQ(shortened("ärgern", 5), "ärge…");
  EXPECT_EQ(count(1), "1");
  EXPECT_EQ(count(1234567), "1 234 567");
  EXPECT_EQ(percent(0.00123), "0.12 %");
}

}  // namespace
}  // namespace raiser::io
