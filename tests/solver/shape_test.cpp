#include "solver/fe/shape.hpp"

#include <gtest/gtest.h>

#include <Eigen/QR>
#include <array>
#include <cmath>
#include <map>
#include <random>

#include "solver/fe/discretisation.hpp"

namespace raiser::solver {
namespace {

// Points inside the reference triangle, always the same ones.
std::vector<Point> scattered(int count) {
  std::mt19937 random(7);
  std::uniform_real_distribution<double> uniform(0.0, 1.0);
  std::vector<Point> points;
  while (static_cast<int>(points.size()) < count) {
    const Point p(uniform(random), uniform(random));
    if (p.sum() < 1.0) points.push_back(p);
  }
  return points;
}

TEST(Shapes, DerivativesAreThoseOfTheValues) {
  const auto points = scattered(20);
  const double h = 1e-6;
  for (int p = min_degree; p <= max_degree; ++p) {
    const ShapeTable here = tabulate(p, points);
    for (int k = 0; k < 2; ++k) {
      std::vector<Point> before = points;
      std::vector<Point> after = points;
      for (std::size_t i = 0; i < points.size(); ++i) {
        before[i][k] -= h;
        after[i][k] += h;
      }
      const Eigen::MatrixXd slope = (tabulate(p, after).value - tabulate(p, before).value) / (2 * h);
      EXPECT_LT((slope - (k == 0 ? here.dr : here.ds)).cwiseAbs().maxCoeff(), 1e-7) << "degree " << p;
    }
  }
}

TEST(Shapes, OfALowerDegreeAreAmongThoseOfTheNext) {
  const auto points = scattered(40);
  for (int p = min_degree; p < max_degree; ++p) {
    const Eigen::MatrixXd low = tabulate(p, points).value;
    const Eigen::MatrixXd high = tabulate(p + 1, points).value;
    for (Eigen::Index i = 0; i < low.rows(); ++i) {
      double nearest = 1.0;
      for (Eigen::Index j = 0; j < high.rows(); ++j)
        nearest = std::min(nearest, (low.row(i) - high.row(j)).cwiseAbs().maxCoeff());
      EXPECT_LT(nearest, 1e-14) << "function " << i << " of degree " << p;
    }
  }
}

// As many independent functions as monomials, and every monomial among their
// sums: the space is that of all polynomials of the degree, and no larger.
TEST(Shapes, SpanThePolynomialsOfTheirDegree) {
  const auto points = scattered(400);
  for (int p = min_degree; p <= max_degree; ++p) {
    SCOPED_TRACE(p);
    const Eigen::MatrixXd values = tabulate(p, points).value.transpose();
    const Eigen::ColPivHouseholderQR<Eigen::MatrixXd> qr(values);
    ASSERT_EQ(values.cols(), shape_count(p));
    EXPECT_EQ(qr.rank(), shape_count(p));
    for (int i = 0; i <= p + 1; ++i)
      for (int j = 0; i + j <= p + 1; ++j) {
        Eigen::VectorXd monomial(400);
        for (int q = 0; q < 400; ++q)
          monomial[q] = std::pow(2 * points[q].x() - 0.7, i) * std::pow(2 * points[q].y() - 0.7, j);
        const double miss = (values * qr.solve(monomial) - monomial).cwiseAbs().maxCoeff();
        if (i + j <= p)
          EXPECT_LT(miss, 1e-11) << i << ' ' << j;
        else
          EXPECT_GT(miss, 1e-6) << i << ' ' << j;
      }
  }
}

TEST(Shapes, CountAndOrderAreAsDocumented) {
  for (int p = min_degree; p <= max_degree; ++p) {
    EXPECT_EQ(shape_count(p), 3 + 3 * (p - 1) + interior_count(p));
    std::vector<Point> edges;
    for (int side = 0; side < 3; ++side)
      for (const double s : {-1.0, -0.4, 0.3, 1.0}) edges.push_back(on_side(side, s));
    const Eigen::MatrixXd value = tabulate(p, edges).value;
    for (int side = 0; side < 3; ++side)
      for (int other = 0; other < 3; ++other) {
        const auto functions = value.block(3 + side * (p - 1), 4 * other, p - 1, 4);
        if (p == 1 || other == side) continue;
        EXPECT_LT(functions.cwiseAbs().maxCoeff(), 1e-14) << "a side's functions vanish on the others";
      }
    if (interior_count(p) > 0) {
      EXPECT_LT(value.bottomRows(interior_count(p)).cwiseAbs().maxCoeff(), 1e-14);
    }
  }
}

// l_k(s) is the integral of P_(k-1) from -1 to s: (P_k - P_(k-2)) / (2k - 1).
TEST(Shapes, OfSidesAreIntegratedLegendrePolynomials) {
  const std::vector<double> s{-0.8, -0.1, 0.45, 0.9};
  for (int side = 0; side < 3; ++side) {
    std::vector<Point> reference;
    for (const double at : s) reference.push_back(on_side(side, at));
    const Eigen::MatrixXd value = tabulate(max_degree, reference).value;
    for (std::size_t q = 0; q < s.size(); ++q)
      for (int k = 2; k <= max_degree; ++k) {
        const auto degree = static_cast<unsigned>(k);
        const double wanted = (std::legendre(degree, s[q]) - std::legendre(degree - 2, s[q])) / (2 * k - 1);
        EXPECT_NEAR(value(3 + side * (max_degree - 1) + k - 2, static_cast<Eigen::Index>(q)), wanted, 1e-14);
      }
  }
}

// Two triangles that share a side in every position and direction: every
// global function must have one value on the side, and those that belong to
// one triangle only must vanish there.
TEST(Shapes, MeetTheirNeighboursWithSidesRunEitherWay) {
  const std::vector<Point> place{Point(0, 0), Point(1, 0), Point(0.3, 0.8), Point(0.7, -0.9)};
  int turned = 0;
  for (const auto& number :
       std::vector<std::array<int, 4>>{{0, 1, 2, 3}, {1, 0, 2, 3}, {3, 2, 1, 0}, {2, 3, 0, 1}})
    for (int turn_a = 0; turn_a < 3; ++turn_a)
      for (int turn_b = 0; turn_b < 3; ++turn_b) {
        std::vector<Point> points(4);
        for (int i = 0; i < 4; ++i) points[number[i]] = place[i];
        const std::array<int, 3> upper{number[0], number[1], number[2]};
        const std::array<int, 3> lower{number[1], number[0], number[3]};
        std::vector<mesh::Mesh::Triangle> triangles(2);
        for (int k = 0; k < 3; ++k) {
          triangles[0][k] = upper[(k + turn_a) % 3];
          triangles[1][k] = lower[(k + turn_b) % 3];
        }
        std::vector<mesh::BoundarySide> sides;
        std::array<int, 2> shared{};
        for (int t = 0; t < 2; ++t)
          for (int k = 0; k < 3; ++k) {
            const int from = triangles[t][k];
            const int to = triangles[t][(k + 1) % 3];
            if (from + to == number[0] + number[1] && std::max(from, to) == std::max(number[0], number[1]))
              shared[t] = k;
            else
              sides.push_back({t,
                               k,
                               {mesh::Curve::Kind::line,
                                points[from],
                                points[to] - points[from],
                                Point(0, 0),
                                0,
                                1,
                                {}}});
          }
        const mesh::Mesh mesh(points, triangles, sides);
        const Discretisation space(mesh, 7);
        const std::vector<double> s{-0.9, -0.2, 0.35, 0.8};
        std::array<std::map<int, Eigen::RowVectorXd>, 2> seen;
        for (int t = 0; t < 2; ++t) {
          std::vector<Point> reference;  // the neighbour runs the side the other way
          for (const double at : s) reference.push_back(on_side(shared[t], t == 0 ? at : -at));
          const Eigen::MatrixXd value = tabulate(7, reference).value;
          Discretisation::Local local;
          space.local(t, local);
          for (std::size_t i = 0; i < local.function.size(); ++i) {
            seen[t][local.function[i]] = local.sign[i] * value.row(i);
            turned += local.sign[i] < 0;
          }
        }
        for (int t = 0; t < 2; ++t)
          for (const auto& [function, values] : seen[t]) {
            const auto other = seen[1 - t].find(function);
            const Eigen::RowVectorXd wanted =
                other == seen[1 - t].end() ? Eigen::RowVectorXd::Zero(4).eval() : other->second;
            EXPECT_LT((values - wanted).cwiseAbs().maxCoeff(), 1e-14) << "function " << function;
          }
        EXPECT_EQ(space.functions(), 4 + 5 * 6 + 2 * interior_count(7));
      }
  EXPECT_GT(turned, 0);
}

TEST(Discretisation, RefusesDegreesItDoesNotHave) {
  const mesh::Mesh none;
  EXPECT_THROW(Discretisation(none, 0), std::invalid_argument);
  EXPECT_THROW(Discretisation(none, max_degree + 1), std::invalid_argument);
}

TEST(TriangleRule, IsExactToItsDegree) {
  for (int n = 1; n <= 15; ++n) {
    const TriangleRule rule = triangle_rule(n);
    for (int i = 0; i <= 2 * n - 2; ++i)
      for (int j = 0; i + j <= 2 * n - 2; ++j) {
        double sum = 0.0;
        for (std::size_t q = 0; q < rule.points.size(); ++q)
          sum += rule.weights[q] * std::pow(rule.points[q].x(), i) * std::pow(rule.points[q].y(), j);
        // i! j! / (i + j + 2)!
        const double wanted = std::exp(std::lgamma(i + 1) + std::lgamma(j + 1) - std::lgamma(i + j + 3));
        EXPECT_NEAR(sum, wanted, 1e-12 * wanted) << n << ": " << i << ' ' << j;
      }
  }
}

}  // namespace
}  // namespace raiser::solver
