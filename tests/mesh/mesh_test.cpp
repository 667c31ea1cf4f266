#include "mesh/mesh.hpp"

#include <gtest/gtest.h>

#include <Eigen/LU>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "mesh/legendre.hpp"

namespace raiser::mesh {
namespace {

constexpr double pi = std::numbers::pi;
constexpr double a = 5.0;  // semi-axes of the disc
constexpr double b = 3.0;

// An elliptical disc as a fan of triangles round its centre.
Mesh disc(int pieces, int geometry_degree, double along = a, double across = b) {
  std::vector<Point> points{Point(0, 0)};
  std::vector<Mesh::Triangle> triangles;
  std::vector<BoundarySide> sides;
  for (int k = 0; k < pieces; ++k) {
    const Curve arc{
        Curve::Kind::arc,          Point(0, 0), Point(along, 0), Point(0, across), 2 * pi * k / pieces,
        2 * pi * (k + 1) / pieces, {}};
    points.push_back(arc.at(arc.begin));
    triangles.push_back({0, k + 1, (k + 1) % pieces + 1});
    sides.push_back({k, 1, arc});
  }
  return {points, triangles, sides, geometry_degree};
}

// Reference point at s in [-1, 1] on the outer side (1) of a fan's triangle.
Point outer(double s) { return {(1 - s) / 2, (1 + s) / 2}; }

double area(const Mesh& mesh) {
  const GaussRule rule = gauss_legendre(20);
  double sum = 0.0;
  for (int t = 0; t < static_cast<int>(mesh.triangles().size()); ++t)
    for (std::size_t i = 0; i < rule.points.size(); ++i)
      for (std::size_t j = 0; j < rule.points.size(); ++j) {
        const double s = (1 + rule.points[j]) / 2;
        const double r = (1 + rule.points[i]) / 2 * (1 - s);
        sum += rule.weights[i] * rule.weights[j] * (1 - s) / 4 * mesh.map(t, {r, s}).jacobian.determinant();
      }
  return sum;
}

double perimeter(const Mesh& mesh) {
  const GaussRule rule = gauss_legendre(20);
  double sum = 0.0;
  for (const BoundarySide& side : mesh.boundary())
    for (std::size_t q = 0; q < rule.points.size(); ++q) {
      const Eigen::Matrix2d j = mesh.map(side.triangle, outer(rule.points[q])).jacobian;
      sum += rule.weights[q] * ((j.col(1) - j.col(0)) / 2).norm();
    }
  return sum;
}

// Perimeter of the ellipse by the trapezoidal rule over a period, which
// converges faster than any power.
double true_perimeter() {
  constexpr int n = 400;
  double sum = 0.0;
  for (int k = 0; k < n; ++k) {
    const double t = 2 * pi * k / n;
    sum += 2 * pi / n * std::hypot(a * std::sin(t), b * std::cos(t));
  }
  return sum;
}

double largest_miss(const Mesh& mesh) {
  double miss = 0.0;
  for (const BoundarySide& side : mesh.boundary())
    for (int k = -10; k <= 10; ++k) {
      const double s = k / 10.0;
      const Point wanted = side.curve.at(side.parameter(s));
      miss = std::max(miss, (mesh.map(side.triangle, outer(s)).x - wanted).norm());
    }
  return miss;
}

TEST(Mesh, ExactSidesHaveTheDrawingsAreaAndPerimeter) {
  for (const int pieces : {12, 24}) {
    const Mesh mesh = disc(pieces, Mesh::exact);
    EXPECT_NEAR(area(mesh), pi * a * b, 1e-13 * pi * a * b);
    EXPECT_NEAR(perimeter(mesh), true_perimeter(), 1e-13 * true_perimeter());
    EXPECT_LT(largest_miss(mesh), 1e-14 * a);
  }
}

// A side of degree g meets the curve at its ends and at the g - 1 Gauss points:
// the distance falls with the power g + 1. In area and perimeter the error is
// integrated against smooth factors, to which P_(g-1) is orthogonal as far as
// its degree goes: the powers are 2, 4, 4, 6, 8 for g = 1 to 5.
TEST(Mesh, PolynomialSidesConvergeAtTheirOwnRate) {
  constexpr double powers[] = {2, 4, 4, 6, 8};
  const double perimeter_wanted = true_perimeter();
  for (int g = 1; g <= 5; ++g) {
    SCOPED_TRACE(g);
    const Mesh coarse = disc(16, g);
    const Mesh fine = disc(32, g);
    const auto rate = [](double before, double after) { return std::log2(std::abs(before / after)); };
    EXPECT_NEAR(rate(largest_miss(coarse), largest_miss(fine)), g + 1, 0.2);
    EXPECT_NEAR(rate(area(coarse) - pi * a * b, area(fine) - pi * a * b), powers[g - 1], 0.3);
    EXPECT_NEAR(rate(perimeter(coarse) - perimeter_wanted, perimeter(fine) - perimeter_wanted), powers[g - 1],
                0.3);
  }
}

TEST(Mesh, DegreeOneIsThePolygon) {
  const Mesh mesh = disc(7, 1, a, a);
  EXPECT_NEAR(area(mesh), 3.5 * a * a * std::sin(2 * pi / 7), 1e-12);
  EXPECT_FALSE(mesh.is_curved(0));
  EXPECT_TRUE(disc(7, 2).is_curved(0));
}

TEST(Mesh, JacobianIsTheDerivativeOfTheMap) {
  const double h = 1e-6;
  for (const int degree : {Mesh::exact, 1, 2, 5}) {
    const Mesh mesh = disc(9, degree);
    for (const Point& p : {Point(0.2, 0.3), Point(0.05, 0.9), Point(0.6, 0.4)}) {
      const Eigen::Matrix2d j = mesh.map(4, p).jacobian;
      for (int k = 0; k < 2; ++k) {
        const Point step = h * Point::Unit(k);
        const Point slope = (mesh.map(4, p + step).x - mesh.map(4, p - step).x) / (2 * h);
        EXPECT_LT((j.col(k) - slope).norm(), 1e-8);
      }
    }
  }
}

TEST(Mesh, StaysStraightOnSidesInsideTheMaterial) {
  const Mesh mesh = disc(8, Mesh::exact);
  const Point from = mesh.points()[0];
  const Point to = mesh.points()[1];
  for (const double r : {0.25, 0.5, 0.75})
    EXPECT_LT((mesh.map(0, {r, 0.0}).x - (from + r * (to - from))).norm(), 1e-14);
}

TEST(Mesh, NumbersEachEdgeOnce) {
  const Mesh mesh = disc(8, Mesh::exact);
  EXPECT_EQ(mesh.edges().size(), 16u);
  for (int t = 0; t < 8; ++t)
    for (int k = 0; k < 3; ++k) {
      const auto& corners = mesh.triangles()[t];
      const auto [low, high] = std::minmax(corners[k], corners[(k + 1) % 3]);
      EXPECT_EQ(mesh.edges()[mesh.edge(t, k)], (std::array<int, 2>{low, high}));
    }
}

TEST(Mesh, RefusesWhatDoesNotConform) {
  const Mesh good = disc(8, Mesh::exact);
  auto missing_side = good.boundary();
  missing_side.pop_back();
  EXPECT_THROW(Mesh(good.points(), good.triangles(), missing_side), std::invalid_argument);
  auto doubled_side = good.boundary();
  doubled_side.push_back(doubled_side.front());
  EXPECT_THROW(Mesh(good.points(), good.triangles(), doubled_side), std::invalid_argument);
  auto missing_triangle = good.triangles();
  missing_triangle.pop_back();
  auto its_side = good.boundary();
  its_side.pop_back();
  EXPECT_THROW(Mesh(good.points(), missing_triangle, its_side), std::invalid_argument);
  EXPECT_THROW(Mesh(good.points(), good.triangles(), good.boundary(), -1), std::invalid_argument);
}

TEST(InvertedTriangles, NamesTheBadOnesOnly) {
  EXPECT_TRUE(inverted_triangles(disc(8, Mesh::exact)).empty());
  // A lens-shaped side that reaches across the triangle.
  const Curve bulge{Curve::Kind::arc, Point(0.5, 0), Point(0.5, 0), Point(0, 0.9), pi, 0.0, {}};
  const Curve straight{Curve::Kind::line, Point(0, 0), Point(1, 0), Point(0, 0), 0, 1, {}};
  const std::vector<Point> points{Point(0, 0), Point(1, 0), Point(0.5, 0.6)};
  const std::vector<Mesh::Triangle> triangles{{0, 1, 2}};
  const auto with_side = [&](const Curve& curve) {
    return Mesh(points, triangles, {{0, 0, curve}, {0, 1, straight}, {0, 2, straight}});
  };
  EXPECT_TRUE(inverted_triangles(with_side(straight)).empty());
  EXPECT_EQ(inverted_triangles(with_side(bulge)), std::vector<int>{0});
  const Mesh clockwise(points, {{0, 2, 1}}, {{0, 0, straight}, {0, 1, straight}, {0, 2, straight}});
  EXPECT_EQ(inverted_triangles(clockwise), std::vector<int>{0});
}

TEST(GaussLegendre, IsExactToItsDegreeAndNoFurther) {
  for (int n = 1; n <= 24; ++n) {
    const GaussRule rule = gauss_legendre(n);
    const auto moment = [&](int degree) {
      double sum = 0.0;
      for (int q = 0; q < n; ++q) sum += rule.weights[q] * std::pow(rule.points[q], degree);
      return sum;
    };
    for (int degree = 0; degree < 2 * n; ++degree)
      EXPECT_NEAR(moment(degree), degree % 2 ? 0.0 : 2.0 / (degree + 1), 2e-14) << n << ' ' << degree;
    if (n <= 10) {
      EXPECT_GT(std::abs(moment(2 * n) - 2.0 / (2 * n + 1)), 1e-7);
    }
  }
}

}  // namespace
}  // namespace raiser::mesh
