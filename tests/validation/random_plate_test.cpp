#include "validation/random_plate.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <set>

#include "mesh/plate/distance.hpp"

namespace raiser::validation {
namespace {

constexpr std::uint64_t seeds = 300;

struct Span {
  double low = 1e300, high = 0.0;
  void add(double x) {
    low = std::min(low, x);
    high = std::max(high, x);
  }
};

/// Smallest ligament of a hole, in diameters of the smaller hole beside it.
double ligament(const mesh::Plate& plate, std::size_t i) {
  const auto& hole = plate.holes[i];
  double least = mesh::edge_distance(plate, hole) / mean_diameter(hole);
  for (std::size_t j = 0; j < plate.holes.size(); ++j) {
    if (j == i) continue;
    const double unit = std::min(mean_diameter(hole), mean_diameter(plate.holes[j]));
    least = std::min(least, mesh::gap(hole, plate.holes[j]) / unit);
  }
  return least;
}

TEST(RandomPlate, EverySeedIsLegalAndBalanced) {
  for (std::uint64_t seed = 0; seed < seeds; ++seed) {
    const auto problem = random_plate(seed);
    const auto wrong = mesh::faults(problem.plate);
    EXPECT_TRUE(wrong.empty()) << "seed " << seed << ": " << (wrong.empty() ? "" : wrong.front().what);
    const auto left = solver::imbalance(problem.plate, problem.loads);
    EXPECT_FALSE(left.has_value()) << "seed " << seed << ": " << (left ? left->what : "");
    EXPECT_FALSE(problem.loads.empty());
    for (const auto& load : problem.loads) EXPECT_LT(load.hole, problem.plate.holes.size());
  }
}

TEST(RandomPlate, SizesCoverTheRangesPromised) {
  Span ligaments, ratios, corners, counts;
  std::map<mesh::HoleShape, int> shapes;
  int narrow = 0, holes = 0;
  for (std::uint64_t seed = 0; seed < seeds; ++seed) {
    const auto plate = random_plate(seed).plate;
    counts.add(static_cast<double>(plate.holes.size()));
    for (std::size_t i = 0; i < plate.holes.size(); ++i) {
      const auto& hole = plate.holes[i];
      ++shapes[hole.shape];
      ++holes;
      const double room = ligament(plate, i);
      ligaments.add(room);
      narrow += room < 0.1;
      if (hole.shape == mesh::HoleShape::ellipse) ratios.add(hole.length / hole.width);
      if (hole.shape == mesh::HoleShape::rounded_rectangle)
        corners.add(hole.corner_radius / std::min(hole.length, hole.width));
    }
  }
  EXPECT_EQ(counts.low, 1);
  EXPECT_EQ(counts.high, 12);
  EXPECT_GE(ligaments.low, 0.0199);
  EXPECT_LT(ligaments.low, 0.021);
  EXPECT_GT(ligaments.high, 5.0);
  EXPECT_GT(narrow, holes / 10);
  EXPECT_LT(ratios.low, 0.11);
  EXPECT_GT(ratios.high, 9.0);
  EXPECT_GE(ratios.low, 0.1 - 1e-12);
  EXPECT_LE(ratios.high, 10 + 1e-12);
  EXPECT_LT(corners.low, 0.0115);
  EXPECT_GE(corners.low, 0.01 - 1e-12);
  EXPECT_GT(corners.high, 0.47);
  for (const auto& [shape, count] : shapes) EXPECT_GT(count, holes / 6) << mesh::word(shape);
  EXPECT_EQ(shapes.size(), 4u);
}

TEST(RandomPlate, EveryKindOfLoadComesAloneAndTogether) {
  std::map<solver::Load::Kind, int> alone;
  int together = 0, groups = 0;
  for (std::uint64_t seed = 0; seed < seeds; ++seed) {
    const auto loads = random_plate(seed).loads;
    if (loads.size() == 1)
      ++alone[loads.front().kind];
    else
      ++(loads.front().kind == solver::Load::Kind::edge ? groups : together);
    std::set<std::string> names;
    for (const auto& load : loads) names.insert(load.name);
    EXPECT_EQ(names.size(), loads.size()) << "seed " << seed;
  }
  EXPECT_EQ(alone.size(), 5u);
  for (const auto& [kind, count] : alone) EXPECT_GT(count, 15) << solver::word(kind);
  EXPECT_GT(together, 30);
  EXPECT_GT(groups, 15);
}

TEST(RandomPlate, ASeedAlwaysGivesTheSamePlate) {
  const auto a = random_plate(7), b = random_plate(7), c = random_plate(8);
  ASSERT_EQ(a.plate.holes.size(), b.plate.holes.size());
  for (std::size_t i = 0; i < a.plate.holes.size(); ++i) {
    EXPECT_EQ(a.plate.holes[i].centre, b.plate.holes[i].centre);
    EXPECT_EQ(a.plate.holes[i].angle, b.plate.holes[i].angle);
  }
  EXPECT_NE(a.plate.width, c.plate.width);
}

}  // namespace
}  // namespace raiser::validation
