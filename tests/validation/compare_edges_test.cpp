// Published values beside notches, fillets and cracks, from a solved plate each.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "mesh/plate/build.hpp"
#include "validation/compare.hpp"
#include "validation/families/bars.hpp"
#include "validation/families/question.hpp"
#include "validation/published.hpp"

namespace raiser::validation {
namespace {

using mesh::Crack;
using solver::Load;

std::vector<Comparison> compared(const solver::Problem& problem) {
  std::vector<solver::Ask> asks;
  for (std::size_t i = 0; i < mesh::raiser_count(problem.plate); ++i)
    asks.push_back({solver::Quantity::largest_edge_stress, i, 1e-2, ""});
  for (std::size_t i = 0; i < mesh::tips(problem.plate.cracks).size(); ++i)
    asks.push_back({solver::Quantity::stress_intensity, i, 1e-2, ""});
  return compare(problem, solver::settle(problem, asks));
}

const Comparison* find(const std::vector<Comparison>& rows, Reference reference) {
  const Published& from = record(reference);
  const auto it = std::find_if(rows.begin(), rows.end(), [&](const Comparison& c) {
    return c.solution == from.name && c.definition == from.definition;
  });
  return it == rows.end() ? nullptr : &*it;
}

/// In range, and as near as the source is known to be.
void expect_near(const std::vector<Comparison>& rows, Reference reference) {
  const Comparison* c = find(rows, reference);
  ASSERT_TRUE(c) << record(reference).name;
  EXPECT_TRUE(c->in_range) << c->range_note;
  EXPECT_LE(std::abs(c->published / c->ours - 1), record(reference).accuracy + c->bound / std::abs(c->ours))
      << c->solution << " " << c->published << " " << c->ours;
  EXPECT_FALSE(c->place.empty());
}

solver::Problem notched(const NotchForm& form, bool both, Load::Kind load, double length = 400) {
  return {notched_bar(length, 100, form, both), family_material, {unit_load(load)}};
}

TEST(CompareNotches, OppositeUNotchesMeetTheFitsOfTheirLoad) {
  const auto pulled = compared(notched({15, 5}, true, Load::Kind::tension));
  EXPECT_EQ(pulled.size(), 2U);  // one for each notch
  expect_near(pulled, Reference::u_pair_tension);
  const auto bent = compared(notched({15, 5}, true, Load::Kind::bending));
  EXPECT_EQ(bent.size(), 2U);
  for (const Comparison& c : bent) EXPECT_GT(c.ours, 1.0) << c.place;  // also where bending presses
  expect_near(bent, Reference::u_pair_bending);
}

TEST(CompareNotches, OneNotchStandsOnItsNetSectionWithTheBendingInIt) {
  const auto pulled = compared(notched({20, 10}, false, Load::Kind::tension));
  ASSERT_EQ(pulled.size(), 1U);
  expect_near(pulled, Reference::u_single_tension);
  expect_near(compared(notched({20, 10}, false, Load::Kind::bending)), Reference::u_single_bending);
}

TEST(CompareNotches, ASmallOneIsHeldToTheHalfPlaneAndADeepOneIsNot) {
  expect_near(compared(notched({1, 0.25, 0, true}, false, Load::Kind::tension)),
              Reference::ellipse_half_plane);
  const auto semicircle = compared(notched({0.5, 0.5, 0, true}, false, Load::Kind::tension));
  expect_near(semicircle, Reference::semicircle_half_plane);
  const auto deep = compared(notched({8, 8, 0, true}, false, Load::Kind::tension));
  const Comparison* c = find(deep, Reference::semicircle_half_plane);
  ASSERT_TRUE(c);
  EXPECT_FALSE(c->in_range);
  EXPECT_NE(c->range_note.find("far edge"), std::string::npos) << c->range_note;
  EXPECT_TRUE(compared(notched({20, 20, 0, true}, false, Load::Kind::tension)).empty());
}

TEST(CompareNotches, VNotchesAreCoveredAtTheDepthsThatWereMeasured) {
  const double opening = std::acos(0.0);
  const auto rows = compared(notched({19.9, 19.9 / 4, opening}, true, Load::Kind::tension));
  const Comparison* c = find(rows, Reference::v_pair);
  ASSERT_TRUE(c);
  EXPECT_LE(std::abs(c->difference), 0.06);  // the fit of the U notch's factor is off besides
  EXPECT_TRUE(compared(notched({15, 5, opening}, true, Load::Kind::tension)).empty());
  EXPECT_TRUE(compared(notched({19.9, 5, opening}, true, Load::Kind::bending)).empty());
}

TEST(CompareNotches, WhatTheSourcesDoNotCoverHasNone) {
  auto together = notched({15, 5}, true, Load::Kind::tension);
  together.loads.push_back(unit_load(Load::Kind::bending));
  const auto rows = compared(together);
  EXPECT_EQ(rows.size(), 4U);  // of either load by itself, none of both
  for (const Comparison& c : rows) EXPECT_NE(c.load, "all loads");
  EXPECT_TRUE(compared(notched({15, 5}, true, Load::Kind::transverse)).empty());
  auto crowded = notched({15, 5}, false, Load::Kind::tension);
  crowded.plate.holes = {circle(20, {0, 10})};
  for (const Comparison& c : compared(crowded)) EXPECT_NE(c.place, "upper");
  const auto short_bar = compared(notched({15, 5}, true, Load::Kind::tension, 60));
  ASSERT_FALSE(short_bar.empty());
  EXPECT_FALSE(short_bar.front().in_range);
}

TEST(CompareFillets, AStepOnBothSidesIsHeldToTheFits) {
  for (const auto load : {Load::Kind::tension, Load::Kind::bending}) {
    const bool is_bent = load == Load::Kind::bending;
    const auto rows = compared({stepped_bar(500, 100, 60, 8), family_material, {unit_load(load)}});
    EXPECT_EQ(rows.size(), 2U);
    for (const Comparison& c : rows) EXPECT_GT(c.ours, 1.0) << c.place;
    expect_near(rows, is_bent ? Reference::fillet_bending : Reference::fillet_tension);
  }
  expect_near(compared({stepped_bar(500, 100, 90, 9), family_material, {unit_load(Load::Kind::bending)}}),
              Reference::fillet_bending_power);
  const auto brief =
      compared({stepped_bar(80, 100, 60, 8), family_material, {unit_load(Load::Kind::tension)}});
  ASSERT_FALSE(brief.empty());
  EXPECT_FALSE(brief.front().in_range);
}

solver::Problem cracked(std::vector<Crack> cracks, Load::Kind load, std::vector<mesh::Hole> holes = {},
                        double length = 400) {
  auto problem = plate_under(length, 100, std::move(holes), {load});
  problem.plate.cracks = std::move(cracks);
  return problem;
}

const Crack middle{"middle", {{0, -20}, {0, 20}}, false, {}};
const Crack upper{"upper", {{0, 50}, {0, 25}}, true, {}};
const Crack lower{"lower", {{0, -50}, {0, -25}}, true, {}};

TEST(CompareCracks, EachIsHeldToTheFormsOfItsKind) {
  const auto inside = compared(cracked({middle}, Load::Kind::tension));
  EXPECT_EQ(inside.size(), 6U);  // three forms at each tip
  for (const auto r : {Reference::centre_tada, Reference::centre_secant, Reference::centre_isida})
    expect_near(inside, r);
  const auto edge = compared(cracked({upper}, Load::Kind::tension));
  for (const auto r : {Reference::edge_tada, Reference::edge_polynomial}) expect_near(edge, r);
  const auto bent = compared(cracked({upper}, Load::Kind::bending));
  for (const auto r : {Reference::edge_bending_tada, Reference::edge_bending_polynomial})
    expect_near(bent, r);
  const auto both = compared(cracked({upper, lower}, Load::Kind::tension));
  EXPECT_EQ(both.size(), 4U);
  for (const auto r : {Reference::two_edges_tada, Reference::two_edges_benthem}) expect_near(both, r);
}

TEST(CompareCracks, AtTheSideThatBendingPressesTheFactorIsTheSame) {
  const auto rows = compared(cracked({lower}, Load::Kind::bending));
  expect_near(rows, Reference::edge_bending_polynomial);  // K_I below 0 over a stress below 0
}

TEST(CompareCracks, AtAHoleTheWidthIsInTheFactorOrInTheNote) {
  const Crack one{"one", {{0, 5}, {0, 10}}, true, {}}, other{"other", {{0, -5}, {0, -10}}, true, {}};
  const auto single = compared(cracked({one}, Load::Kind::tension, {circle(10)}));
  expect_near(single, Reference::newman_strip_one);
  const Comparison* fit = find(single, Reference::one_crack_fit);
  ASSERT_TRUE(fit);
  EXPECT_FALSE(fit->in_range);
  EXPECT_NE(fit->range_note.find("not infinite"), std::string::npos);
  expect_near(compared(cracked({one, other}, Load::Kind::tension, {circle(10)})),
              Reference::newman_strip_two);
}

TEST(CompareCracks, WhatTheSourcesDoNotCoverHasNone) {
  const Crack oblique{"oblique", {{-10, -20}, {10, 20}}, false, {}}, off{"off", {{0, 0}, {0, 20}}, false, {}};
  const Crack kinked{"kinked", {{0, 50}, {0, 35}, {5, 25}}, true, {}};
  for (const Crack& crack : {oblique, off, kinked})
    EXPECT_TRUE(compared(cracked({crack}, Load::Kind::tension)).empty()) << crack.name;
  EXPECT_TRUE(compared(cracked({middle}, Load::Kind::bending)).empty());
  EXPECT_TRUE(compared(cracked({middle}, Load::Kind::transverse)).empty());
  EXPECT_TRUE(compared(cracked({upper, middle}, Load::Kind::tension)).empty());
  const auto brief = compared(cracked({upper}, Load::Kind::tension, {}, 120));
  ASSERT_FALSE(brief.empty());
  EXPECT_FALSE(brief.front().in_range);
  EXPECT_NE(brief.front().range_note.find("1 needed"), std::string::npos) << brief.front().range_note;
}

}  // namespace
}  // namespace raiser::validation
