#include <gtest/gtest.h>

#include <Eigen/LU>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/fe/shape.hpp"
#include "tests/mesh/holes.hpp"
#include "validation/random_plate.hpp"

namespace raiser::validation {
namespace {

// Integral of the Jacobian over all triangles, and the smallest Jacobian.
std::pair<double, double> area_and_least(const mesh::Mesh& mesh) {
  static const solver::TriangleRule rule = solver::triangle_rule(11);
  static const mesh::MapTable inside(rule.points);
  static const std::vector<mesh::Point> lattice = [] {
    std::vector<mesh::Point> points;
    for (int i = 0; i <= 11; ++i)
      for (int j = 0; i + j <= 11; ++j) points.emplace_back(i / 11.0, j / 11.0);
    return points;
  }();
  static const mesh::MapTable everywhere(lattice);
  std::vector<mesh::MapPoint> values(rule.points.size());
  std::vector<mesh::MapPoint> grid(lattice.size());
  double area = 0.0;
  double least = 1e30;
  for (int t = 0; t < static_cast<int>(mesh.triangles().size()); ++t) {
    inside.evaluate(mesh, t, values);
    for (std::size_t q = 0; q < values.size(); ++q)
      area += rule.weights[q] * values[q].jacobian.determinant();
    everywhere.evaluate(mesh, t, grid);
    for (const mesh::MapPoint& p : grid) least = std::min(least, p.jacobian.determinant());
  }
  return {area, least};
}

TEST(Triangulate, InvertsNoTriangleOverAHundredRandomPlates) {
  std::vector<std::uint64_t> seeds{258, 768, 946};  // Gmsh folds a triangle over the boundary
  for (std::uint64_t seed = 1; seed <= 100; ++seed) seeds.push_back(seed);
  std::size_t triangles = 0;
  for (const std::uint64_t seed : seeds) {
    SCOPED_TRACE("seed " + std::to_string(seed));
    const mesh::Plate plate = random_plate(seed).plate;
    const mesh::Mesh mesh = mesh::triangulate(mesh::trace(plate), {});
    const auto [area, least] = area_and_least(mesh);
    const double wanted = mesh::area(plate);
    EXPECT_NEAR(area, wanted, 1e-10 * wanted);
    EXPECT_GT(least, 0.0);
    triangles += mesh.triangles().size();
  }
  RecordProperty("triangles", static_cast<int>(triangles));
}

}  // namespace
}  // namespace raiser::validation
