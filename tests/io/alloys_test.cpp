#include "io/case/alloys.hpp"

#include <gtest/gtest.h>

#include <set>

#include "solver/elasticity/hooke_law.hpp"

using namespace raiser;

TEST(Alloys, EveryOneIsSoundNamedOnceAndHasItsSource) {
  std::set<std::string_view> names;
  for (const io::Alloy& alloy : io::alloys()) {
    EXPECT_TRUE(names.insert(alloy.name).second) << alloy.name;
    EXPECT_TRUE(
        solver::faults({alloy.youngs_modulus, alloy.poissons_ratio, solver::PlaneState::strain}).empty())
        << alloy.name;
    EXPECT_GT(alloy.youngs_modulus, 4e4) << alloy.name;
    EXPECT_LT(alloy.youngs_modulus, 2.2e5) << alloy.name;
    EXPECT_GT(alloy.yield_strength, 100) << alloy.name;
    EXPECT_LT(alloy.yield_strength, 2000) << alloy.name;
    EXPECT_FALSE(alloy.condition.empty() || alloy.range.empty() || alloy.source.empty()) << alloy.name;
  }
  EXPECT_GE(names.size(), 10U);
}

TEST(Alloys, AreFoundByTheirExactNames) {
  ASSERT_TRUE(io::find_alloy("S355"));
  EXPECT_EQ(io::find_alloy("S355")->yield_strength, 355);
  EXPECT_FALSE(io::find_alloy("s355"));
  EXPECT_FALSE(io::find_alloy(""));
}
