#include <gtest/gtest.h>

#include <cmath>
#include <set>

#include "mesh/triangulate/triangulate.hpp"

namespace raiser::mesh {
namespace {

Plate plate_with(std::vector<Crack> cracks) {
  Plate plate;
  plate.length = 200;
  plate.width = 100;
  plate.thickness = 5;
  plate.cracks = std::move(cracks);
  return plate;
}

Crack chain(std::vector<Point> points, bool has_mouth = false) {
  Crack crack;
  crack.points = std::move(points);
  crack.has_mouth = has_mouth;
  return crack;
}

Hole round(Point centre, double diameter) {
  Hole hole;
  hole.length = hole.width = diameter;
  hole.centre = centre;
  hole.name = "a";
  return hole;
}

double area(const Mesh& mesh) {
  double sum = 0.0;
  for (const auto& t : mesh.triangles()) {
    const Point a = mesh.points()[t[1]] - mesh.points()[t[0]];
    const Point b = mesh.points()[t[2]] - mesh.points()[t[0]];
    sum += (a.x() * b.y() - a.y() * b.x()) / 2;
  }
  return sum;
}

/// Length of the faces of crack `index` in the mesh, both sides counted.
double face_length(const Mesh& mesh, std::size_t index) {
  double sum = 0.0;
  for (const BoundarySide& side : mesh.boundary())
    if (side.curve.owner == Owner{Owner::Kind::crack, index})
      sum += (side.curve.at(side.curve.end) - side.curve.at(side.curve.begin)).norm();
  return sum;
}

std::string only_fault(const Plate& plate) {
  const auto found = faults(plate);
  if (found.size() != 1) return std::to_string(found.size()) + " faults";
  EXPECT_FALSE(found[0].cure.empty());
  return found[0].what;
}

TEST(Crack, TipsPointOutOfTheCrack) {
  const std::vector<Crack> cracks = {chain({{0, 0}, {3, 0}, {3, 4}}), chain({{0, -50}, {0, -30}}, true)};
  const auto all = tips(cracks);
  ASSERT_EQ(all.size(), 3u);
  EXPECT_EQ(all[0].direction, Point(-1, 0));
  EXPECT_EQ(all[1].direction, Point(0, 1));
  EXPECT_EQ(all[2].direction, Point(0, 1));
  EXPECT_EQ(all[1].name, "crack 1 B");
  EXPECT_EQ(all[2].name, "crack 2");
  EXPECT_DOUBLE_EQ(cracks[0].length(), 7.0);
}

TEST(Crack, BothFacesAreMeshedAndTheAreaStays) {
  const Plate plate =
      plate_with({chain({{-40, -10}, {-10, 5}, {10, 5}}), chain({{60, -50}, {55, -20}}, true)});
  ASSERT_TRUE(faults(plate).empty());
  const Mesh mesh = triangulate(trace(plate), {});
  EXPECT_NEAR(area(mesh), 200.0 * 100.0, 1e-7);
  EXPECT_NEAR(face_length(mesh, 0), 2 * plate.cracks[0].length(), 1e-9);
  EXPECT_NEAR(face_length(mesh, 1), 2 * plate.cracks[1].length(), 1e-9);
  ASSERT_EQ(mesh.fans().size(), 3u);
  // The points on the faces are double, those at the tips single.
  const auto copies = [&](const Point& p) {
    return std::count_if(mesh.points().begin(), mesh.points().end(),
                         [&](const Point& x) { return (x - p).norm() < 1e-9; });
  };
  EXPECT_EQ(copies({-40, -10}), 1);
  EXPECT_EQ(copies({-10, 5}), 2);
  EXPECT_EQ(copies({60, -50}), 2);
  EXPECT_EQ(copies({55, -20}), 1);
}

TEST(Crack, FansShrinkGeometricallyIntoTheTip) {
  SizeRule rule;
  rule.tip_rings = 7;
  rule.tip_ratio = 0.2;
  const Mesh mesh = triangulate(trace(plate_with({chain({{0, -50}, {0, -20}}, true)})), rule);
  ASSERT_EQ(mesh.fans().size(), 1u);
  const TipFan& fan = mesh.fans()[0];
  ASSERT_EQ(fan.radii.size(), 8u);
  for (std::size_t k = 1; k < fan.radii.size(); ++k) EXPECT_NEAR(fan.radii[k] / fan.radii[k - 1], 0.2, 1e-9);
  for (std::size_t k = 0; k + 1 < fan.rings.size(); ++k) EXPECT_EQ(fan.rings[k].size(), 16u);
  EXPECT_EQ(fan.rings.back().size(), 8u);
  for (const int t : fan.rings.back()) {
    const auto& corners = mesh.triangles()[t];
    EXPECT_EQ(std::count_if(corners.begin(), corners.end(),
                            [&](int v) { return mesh.points()[v] == Point(0, -20); }),
              1);
  }
}

TEST(Crack, SymmetricHalvesKeepTheFaceOnTheMirrorLine) {
  Plate plate = plate_with({chain({{0, -20}, {0, 20}})});
  EXPECT_EQ(mirrors(plate), (Mirrors{true, true}));
  const Region quarter = cut(trace(plate), {true, true});
  ASSERT_EQ(quarter.tips.size(), 1u);
  EXPECT_TRUE(quarter.tips[0].on_mirror);
  EXPECT_TRUE(quarter.slits.empty());
  const Mesh mesh = triangulate(quarter, {});
  EXPECT_NEAR(area(mesh), 100.0 * 50.0, 1e-7);
  EXPECT_NEAR(face_length(mesh, 0), 20.0, 1e-9);
  EXPECT_EQ(mirror_image_of_tip(plate, 0, {.x = false, .y = true}), 1u);
  EXPECT_EQ(mirror_image_of_tip(plate, 0, {.x = true, .y = false}), 0u);

  // Crossing the mirror line: half of it stays, and opens there.
  plate = plate_with({chain({{-20, 10}, {20, 10}})});
  EXPECT_EQ(mirrors(plate), (Mirrors{true, false}));
  const Mesh half = triangulate(cut(trace(plate), {true, false}), {});
  EXPECT_NEAR(area(half), 100.0 * 100.0, 1e-7);
  EXPECT_NEAR(face_length(half, 0), 2 * 20.0, 1e-9);
  EXPECT_EQ(half.fans().size(), 1u);

  plate = plate_with({chain({{-20, 0}, {20, 1}})});
  EXPECT_EQ(mirrors(plate), (Mirrors{false, false}));
}

TEST(Crack, FromAHoleItsMouthLiesOnTheEdge) {
  Plate plate = plate_with({chain({{10 * std::cos(1.0), 10 * std::sin(1.0)}, {15, 25}}, true)});
  plate.holes = {round({0, 0}, 20)};
  ASSERT_TRUE(faults(plate).empty());
  const Mesh mesh = triangulate(trace(plate), {});
  EXPECT_NEAR(face_length(mesh, 0), 2 * plate.cracks[0].length(), 1e-8);
}

TEST(Crack, TinyCrackAtAHole) {
  Plate plate = plate_with({chain({{0, 10}, {0, 10.05}}, true)});
  plate.holes = {round({0, 0}, 20)};
  ASSERT_TRUE(faults(plate).empty());
  const Mesh mesh = triangulate(trace(plate), {});
  EXPECT_NEAR(face_length(mesh, 0), 0.1, 1e-9);
  EXPECT_LT(mesh.triangles().size(), 1200u);
}

TEST(Crack, FaultsSayWhere) {
  EXPECT_NE(only_fault(plate_with({chain({{0, 0}, {0, 60}})})).find("meets the top edge at (0, 50) mm"),
            std::string::npos);
  EXPECT_NE(only_fault(plate_with({chain({{0, -40}, {0, 0}}, true)})).find("10 mm from the nearest edge"),
            std::string::npos);
  EXPECT_NE(only_fault(plate_with({chain({{0, -50}, {0, -60}}, true)})).find("lies outside the material"),
            std::string::npos);
  EXPECT_NE(only_fault(plate_with({chain({{150, 0}, {160, 0}})})).find("lies outside the material"),
            std::string::npos);
  EXPECT_NE(only_fault(plate_with({chain({{0, 0}, {10, 0}}), chain({{5, -5}, {5, 5}})}))
                .find("meets crack 1 at (5, 0)"),
            std::string::npos);
  EXPECT_NE(
      only_fault(plate_with({chain({{0, 0}, {10, 0}, {10, 10}, {5, 10}, {5, -5}})})).find("meets itself"),
      std::string::npos);
  EXPECT_NE(only_fault(plate_with({chain({{0, 0}, {10, 0}, {1, 0.1}})})).find("folds back"),
            std::string::npos);
  EXPECT_NE(only_fault(plate_with({chain({{0, 0}, {0, 0}})})).find("too short"), std::string::npos);
  EXPECT_NE(only_fault(plate_with({chain({{0, 0}})})).find("fewer than two points"), std::string::npos);
  EXPECT_NE(only_fault(plate_with({chain({{0, NAN}, {1, 1}})})).find("has a point"), std::string::npos);
  Plate plate = plate_with({chain({{-30, 0}, {30, 0}})});
  plate.holes = {round({0, 0}, 20)};
  EXPECT_NE(only_fault(plate).find("meets hole 'a' at (-10, 0) mm"), std::string::npos);
  plate.cracks = {chain({{10, 0}, {49.999, 0}}, true)};
  plate.holes.push_back(round({60, 0}, 20));
  plate.holes.back().name = "b";
  EXPECT_NE(only_fault(plate).find("leaves a ligament"), std::string::npos);
}

}  // namespace
}  // namespace raiser::mesh
