// The families of published solutions: what they cite, how a published value is
// judged, and a short run of all of them.
#include "validation/families.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <set>

namespace raiser::validation {
namespace {

Ours found(double value, double bound) {
  Ours ours;
  ours.value = solver::Estimate{value, bound};
  return ours;
}

Agreement judged(Reference reference, double published, double ours, std::vector<Parameter> parameters,
                 double bound = 0.0, double model = 0.0) {
  Ours o = found(ours, bound);
  o.model = model;
  return hold({reference, published}, parameters, o).agreement;
}

TEST(Families, HaveEachTheirOwnIdAndEverythingThatATableNeeds) {
  std::set<std::string> ids;
  for (const Family& family : families()) {
    EXPECT_TRUE(ids.insert(family.id).second) << family.id;
    EXPECT_FALSE(family.records.empty()) << family.id;
    EXPECT_FALSE(family.deviation.empty()) << family.id;
    EXPECT_FALSE(family.curves.empty()) << family.id;
    std::size_t quick = 0;
    for (const FamilyPoint& point : family.points) {
      quick += point.is_quick ? 1 : 0;
      ASSERT_FALSE(point.parameters.empty()) << family.id;
      EXPECT_EQ(point.parameters.front().name, family.points.front().parameters.front().name) << family.id;
      EXPECT_FALSE(point.cited.empty()) << family.id;
    }
    EXPECT_GE(quick, 1U) << family.id;
    EXPECT_LE(quick, 6U) << family.id;
  }
  EXPECT_GE(ids.size(), 16U);
}

// A curve that is drawn is the solution that is cited: no parameter taken for another.
TEST(Families, CurvesRunThroughTheCitedValues) {
  for (const Family& family : families())
    for (const FamilyPoint& point : family.points)
      for (const Cited& cited : point.cited) {
        bool seen = false;
        for (const FamilyCurve& curve : family.curves) {
          if (curve.reference != cited.reference || curve.series != point.series) continue;
          seen = true;
          const auto value = curve.at(point.parameters.front().value);
          ASSERT_TRUE(value) << family.id;
          EXPECT_NEAR(*value, cited.value, 1e-9 * std::abs(cited.value)) << family.id << " " << point.series;
        }
        // A family may cite a source at a single point, and draw none of it.
        if (!seen) {
          EXPECT_EQ(cited.reference, Reference::pressure_infinite) << family.id << " " << point.series;
        }
      }
}

TEST(Families, AnExactSourceMustBeMetWithinTheBound) {
  EXPECT_EQ(judged(Reference::kirsch, 3.0, 3.0 + 1e-7, {}, 2e-7), Agreement::exact);
  EXPECT_EQ(judged(Reference::kirsch, 3.0, 3.0 + 1e-7, {}, 5e-8), Agreement::not_exact);
  EXPECT_EQ(judged(Reference::kirsch, 3.0, 3.0 + 1e-7, {}, 5e-8, 1e-7), Agreement::exact);
  EXPECT_NEAR(*hold({Reference::kirsch, 3.0}, {}, found(3.0 + 3e-6, 0)).digits, 6, 1e-3);
}

TEST(Families, ASourceIsHeldToItsClaimOrElseToWhatIsKnownOfIt) {
  const std::vector<Parameter> x{{"d/W", 0.3}};
  EXPECT_EQ(judged(Reference::howland, 0.996, 1.0, x), Agreement::within_claim);
  EXPECT_EQ(judged(Reference::howland, 0.994, 1.0, x), Agreement::beyond_claim);
  EXPECT_EQ(judged(Reference::howland, 0.994, 1.0, x, 0.002), Agreement::within_claim);  // ours is not sure
  EXPECT_EQ(judged(Reference::roark_circle, 0.992, 1.0, x), Agreement::as_found);
  EXPECT_EQ(judged(Reference::roark_circle, 0.99, 1.0, x), Agreement::not_as_found);
  EXPECT_EQ(judged(Reference::howland, 0.5, 1.0, {{"d/W", 0.51}}), Agreement::outside_range);
  EXPECT_EQ(judged(Reference::howland, 1.0, 1.0, {{"d/W", -0.01}}), Agreement::outside_range);
  EXPECT_FALSE(hold({Reference::howland, 1.0}, x, found(1.0, 0)).digits);
}

TEST(Families, OffIsNegativeWhereTheSourceIsLow) {
  EXPECT_NEAR(hold({Reference::heywood, 2.0}, {}, found(2.5, 0)).off, -0.2, 1e-15);
  EXPECT_NEAR(hold({Reference::heywood, -3.0}, {}, found(-2.0, 0)).off, -0.5, 1e-15);
}

TEST(Families, OffIsRelativeToAScaleOfItsOwnWhereANumberPassesThroughZero) {
  EXPECT_NEAR(hold({Reference::through_crack, 0.0}, {}, found(1e-4, 0), 1.0).off, -1e-4, 1e-15);
  EXPECT_NEAR(hold({Reference::through_crack, 2.0}, {}, found(4.0, 0), 1.0).off, -0.5, 1e-15);
  EXPECT_EQ(hold({Reference::through_crack, 0.0}, {}, found(1e-4, 2e-4), 1.0).agreement, Agreement::exact);
}

TEST(Families, AFamilyIsUnsoundWithOnePlateThatIsNot) {
  FamilyResult result;
  PointResult good;
  good.ours = found(1.0, 0.0);
  result.points = {good, good};
  EXPECT_TRUE(is_sound(result));
  result.points[1].ours.is_settled = false;
  EXPECT_FALSE(is_sound(result));
  result.points[1] = good;
  result.points[1].ours.value.reset();
  EXPECT_FALSE(is_sound(result));
  result.points[1] = good;
  result.points[1].held.push_back(hold({Reference::kirsch, 2.0}, {}, good.ours));
  EXPECT_FALSE(is_sound(result));
}

TEST(Families, AFailedPlateIsAPointWithAReason) {
  Family family;
  family.id = "faulty";
  FamilyPoint point;
  point.parameters = {{"d/W", 0.5}};
  point.cited = {{Reference::heywood, 2.0}};
  point.solve = [](double) -> Ours { throw std::runtime_error("no mesh"); };
  family.points = {point};
  const FamilyResult result = run(family, false);
  ASSERT_EQ(result.points.size(), 1U);
  EXPECT_FALSE(result.points[0].ours.value);
  EXPECT_EQ(result.points[0].ours.reason, "no mesh");
  EXPECT_TRUE(result.points[0].held.empty());
  EXPECT_TRUE(run(family, true).points.empty());  // it is no quick one
  EXPECT_TRUE(run(family, false, [] { return true; }).points.empty());
}

// The short run: every plate is solved, every exact solution met to 6 digits at
// least, and no source farther off than is known of it.
TEST(Families, ShortRun) {
  for (const Family& family : families()) {
    const FamilyResult result = run(family, true);
    EXPECT_TRUE(is_sound(result)) << family.id;
    for (const PointResult& point : result.points) {
      EXPECT_TRUE(point.ours.is_settled) << family.id << ": " << point.ours.reason;
      for (const HeldValue& held : point.held) {
        EXPECT_NE(held.agreement, Agreement::not_as_found) << family.id << " off " << held.off;
        EXPECT_GE(held.digits.value_or(16.0), 6.0) << family.id;
      }
    }
  }
}

}  // namespace
}  // namespace raiser::validation
