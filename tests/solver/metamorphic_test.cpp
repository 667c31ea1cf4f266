// What must follow when the question is turned, mirrored, scaled, reordered or
// asked of another material: the answer, within the bounds of both.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>
#include <string>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/sequence.hpp"
#include "solver/solution.hpp"

namespace raiser::solver {
namespace {

using mesh::HoleShape;
using Kind = Load::Kind;

constexpr double pi = std::numbers::pi;

Load of(Kind kind, double stress) {
  Load load;
  load.kind = kind;
  load.name = std::string(word(kind));
  load.stress = stress;
  return load;
}

// Invented: a pump bracket's web, in no symmetry.
Problem bracket() {
  return {{110,
           70,
           5,
           {{"oval", HoleShape::ellipse, 20, 9, 0, Point(-18, 8), 0.6},
            {"bolt", HoleShape::circle, 14, 14, 0, Point(15, -6), 0},
            {"window", HoleShape::rounded_rectangle, 13, 8, 2, Point(33, 14), -0.2}}},
          {210000, 0.3, PlaneState::stress},
          {of(Kind::tension, 80), of(Kind::transverse, -25), of(Kind::shear, 30)}};
}

Solution solved(const Problem& problem, double tolerance = 1e-4) {
  std::vector<Ask> asks;
  for (std::size_t hole = 0; hole < problem.plate.holes.size(); ++hole)
    for (const Quantity q :
         {Quantity::largest_edge_stress, Quantity::smallest_edge_stress, Quantity::von_mises})
      asks.push_back({q, hole, tolerance, ""});
  Solution solution = settle(problem, asks);
  EXPECT_EQ(solution.status, Solution::Status::settled) << solution.reason;
  return solution;
}

// `a` times the factor and `b` are one number within what both promise.
void expect_same(const Estimate& a, const Estimate& b, double factor = 1.0) {
  const double slack = std::abs(factor) * a.bound + b.bound;
  EXPECT_NEAR(a.value * factor, b.value, slack);
  EXPECT_LT(slack, 2.1e-3 * std::max(std::abs(b.value), 100.0)) << "bounds too wide to say anything";
}

void expect_same(const RaiserFindings& a, const RaiserFindings& b, double factor = 1.0) {
  if (factor > 0) {
    expect_same(a.largest.stress, b.largest.stress, factor);
    expect_same(a.smallest.stress, b.smallest.stress, factor);
  } else {
    expect_same(a.largest.stress, b.smallest.stress, factor);
    expect_same(a.smallest.stress, b.largest.stress, factor);
  }
  expect_same(a.von_mises.stress, b.von_mises.stress, std::abs(factor));
  ASSERT_EQ(a.gross.kt.has_value(), b.gross.kt.has_value());
  if (a.gross.kt) {
    EXPECT_NEAR(a.gross.kt->value, b.gross.kt->value, a.gross.kt->bound + b.gross.kt->bound);
  }
}

void expect_same(const Solution& a, const Solution& b, double factor = 1.0) {
  ASSERT_EQ(a.combined.raisers.size(), b.combined.raisers.size());
  for (std::size_t h = 0; h < a.combined.raisers.size(); ++h) {
    SCOPED_TRACE("hole " + std::to_string(h));
    expect_same(a.combined.raisers[h], b.combined.raisers[h], factor);
  }
}

// The place of the largest stress, which a maximum fixes only to the root of
// its own error.
void expect_moved(const Solution& a, const Solution& b, const std::function<Point(const Point&)>& move,
                  double size) {
  for (std::size_t h = 0; h < a.combined.raisers.size(); ++h) {
    const Point wanted = move(a.combined.raisers[h].largest.point);
    EXPECT_LT((b.combined.raisers[h].largest.point - wanted).norm(), 2e-3 * size) << "hole " << h;
  }
}

TEST(Metamorphic, ATurnByAQuarterTurnsTheAnswer) {
  const Problem problem = bracket();
  Problem turned = problem;
  std::swap(turned.plate.length, turned.plate.width);
  for (mesh::Hole& hole : turned.plate.holes) {
    hole.centre = Point(-hole.centre.y(), hole.centre.x());
    hole.angle += pi / 2;
  }
  turned.loads = {of(Kind::tension, -25), of(Kind::transverse, 80), of(Kind::shear, -30)};
  const Solution before = solved(problem);
  const Solution after = solved(turned);
  expect_same(before, after);
  expect_moved(
      before, after, [](const Point& p) { return Point(-p.y(), p.x()); }, 110);
  EXPECT_NEAR(before.checks.strain_energy / after.checks.strain_energy, 1.0, 1e-5);
}

TEST(Metamorphic, AMirrorMirrorsTheAnswer) {
  const Problem problem = bracket();
  Problem mirrored = problem;
  for (mesh::Hole& hole : mirrored.plate.holes) {
    hole.centre.x() = -hole.centre.x();
    hole.angle = pi - hole.angle;
  }
  mirrored.loads[2].stress = -30;
  const Solution before = solved(problem);
  const Solution after = solved(mirrored);
  expect_same(before, after);
  expect_moved(
      before, after, [](const Point& p) { return Point(-p.x(), p.y()); }, 110);
}

Problem scaled(Problem problem, double factor) {
  problem.plate.length *= factor;
  problem.plate.width *= factor;
  problem.plate.thickness *= factor;
  for (mesh::Hole& hole : problem.plate.holes) {
    hole.length *= factor;
    hole.width *= factor;
    hole.corner_radius *= factor;
    hole.centre *= factor;
  }
  return problem;
}

TEST(Metamorphic, StressDoesNotDependOnTheUnitOfLength) {
  Problem problem = bracket();
  const Solution before = solved(problem);
  for (const double factor : {1e3, 1 / 25.4}) {
    const Solution after = solved(scaled(problem, factor));
    expect_same(before, after);
    expect_moved(
        before, after, [&](const Point& p) { return Point(factor * p); }, 110 * factor);
    EXPECT_NEAR(after.checks.strain_energy / before.checks.strain_energy, std::pow(factor, 3),
                1e-5 * std::pow(factor, 3));
  }
}

TEST(Metamorphic, StressFollowsTheLoads) {
  const Problem problem = bracket();
  const Solution before = solved(problem);
  for (const double factor : {1e-3, 145.0377, -2.5}) {
    Problem other = problem;
    for (Load& load : other.loads) load.stress *= factor;
    const Solution after = solved(other);
    for (std::size_t h = 0; h < before.combined.raisers.size(); ++h) {
      const RaiserFindings& a = before.combined.raisers[h];
      const RaiserFindings& b = after.combined.raisers[h];
      const double scale = 1e-9 * std::abs(factor) * 300;  // the same discrete problem: to rounding
      const bool turned = factor < 0;
      EXPECT_NEAR(factor * a.largest.stress.value, (turned ? b.smallest : b.largest).stress.value, scale);
      EXPECT_NEAR(factor * a.smallest.stress.value, (turned ? b.largest : b.smallest).stress.value, scale);
    }
  }
}

TEST(Metamorphic, TheOrderOfHolesAndLoadsDoesNotMatter) {
  const Problem problem = bracket();
  Problem other = problem;
  std::reverse(other.plate.holes.begin(), other.plate.holes.end());
  std::reverse(other.loads.begin(), other.loads.end());
  const Solution before = solved(problem);
  const Solution after = solved(other);
  const std::size_t last = before.combined.raisers.size() - 1;
  for (std::size_t h = 0; h <= last; ++h)
    expect_same(before.combined.raisers[h], after.combined.raisers[last - h]);
  ASSERT_EQ(before.units.size(), 3u);
  for (std::size_t l = 0; l < 3; ++l) {
    EXPECT_EQ(before.units[l].name, after.units[2 - l].name);
    for (std::size_t h = 0; h <= last; ++h)
      expect_same(before.units[l].raisers[h].largest.stress,
                  after.units[2 - l].raisers[last - h].largest.stress);
  }
}

TEST(Metamorphic, StressDoesNotDependOnYoungsModulus) {
  Problem problem = bracket();
  const Solution before = solved(problem);
  problem.material.youngs_modulus /= 3000;
  const Solution after = solved(problem);
  for (std::size_t h = 0; h < before.combined.raisers.size(); ++h)
    EXPECT_NEAR(before.combined.raisers[h].largest.stress.value,
                after.combined.raisers[h].largest.stress.value, 1e-7);
  EXPECT_NEAR(after.checks.strain_energy / before.checks.strain_energy, 3000, 1e-5);
}

// J. H. Michell, Proc. London Math. Soc. 31 (1899) 100-124: with the forces on
// each edge in balance, the in-plane stress depends on no elastic constant.
TEST(Metamorphic, StressDoesNotDependOnPoissonsRatioNorThePlaneState) {
  Problem problem = bracket();
  const Solution before = solved(problem, 1e-6);
  for (const HookeLaw law : {HookeLaw{210000, 0.0, PlaneState::stress},
                             {210000, 0.45, PlaneState::stress},
                             {210000, 0.3, PlaneState::strain}}) {
    problem.material = law;
    const Solution after = solved(problem, 1e-6);
    for (std::size_t h = 0; h < before.combined.raisers.size(); ++h) {
      expect_same(before.combined.raisers[h].largest.stress, after.combined.raisers[h].largest.stress);
      expect_same(before.combined.raisers[h].smallest.stress, after.combined.raisers[h].smallest.stress);
    }
  }
}

// Invented: four windows and a bolt hole in double symmetry.
Problem symmetric() {
  Problem problem{{120, 80, 5, {{"bolt", HoleShape::circle, 16, 16, 0, Point(0, 0), 0}}},
                  {210000, 0.3, PlaneState::stress},
                  {of(Kind::tension, 80), of(Kind::shear, 30), of(Kind::bending, 40)}};
  for (const double x : {-1.0, 1.0})
    for (const double y : {-1.0, 1.0})
      problem.plate.holes.push_back({std::string("window") + (x > 0 ? "+" : "-") + (y > 0 ? "+" : "-"),
                                     HoleShape::ellipse, 18, 10, 0, Point(34 * x, 17 * y), 0.5 * x * y});
  return problem;
}

// Extremes of the whole plate meshed without any mirror line, by the library's
// own parts.
TEST(Metamorphic, MirrorLinesChangeNothing) {
  const Problem problem = symmetric();
  const Solution quarter = solved(problem, 1e-5);
  EXPECT_EQ(quarter.mirrors_used, (mesh::Mirrors{true, true}));
  const Model whole(mesh::triangulate(mesh::trace(problem.plate), {}), {}, problem.material,
                    problem.plate.thickness, unit_loads(problem.plate, problem.loads));
  DegreeSequence sequence(whole, problem.plate);
  for (int degree = 3; degree <= 9; ++degree) sequence.solve(degree);
  for (std::size_t h = 0; h < problem.plate.holes.size(); ++h)
    for (std::size_t c = 0; c <= problem.loads.size(); ++c) {
      const RaiserFindings& hole = c == 0 ? quarter.combined.raisers[h] : quarter.units[c - 1].raisers[h];
      expect_same(hole.largest.stress, sequence.value(c, h, Quantity::largest_edge_stress).stress);
      expect_same(hole.smallest.stress, sequence.value(c, h, Quantity::smallest_edge_stress).stress);
      expect_same(hole.von_mises.stress, sequence.value(c, h, Quantity::von_mises).stress);
    }
  const Field field(whole, sequence.displacements().back());
  for (const Point& x : {Point(3, 30), Point(-3, 30), Point(-50, -10), Point(20, -35), Point(0, -20)}) {
    const auto a = quarter.field.at(x);
    const auto b = field.at(x);
    ASSERT_TRUE(a && b);
    EXPECT_NEAR(a->stress.xx, b->stress.xx, 2e-2);
    EXPECT_NEAR(a->stress.yy, b->stress.yy, 2e-2);
    EXPECT_NEAR(a->stress.xy, b->stress.xy, 2e-2);
  }
  EXPECT_NEAR(quarter.checks.strain_energy / whole.balance(sequence.displacements().back()).strain_energy,
              1.0, 1e-6);
}

// One displacement of all loads together is the sum of those of each load, at
// every point, through every mirror image.
TEST(Metamorphic, LoadsAdd) {
  const Problem problem = symmetric();
  const auto mesh = mesh::triangulate(mesh::cut(mesh::trace(problem.plate), {true, true}), {});
  const auto loads = unit_loads(problem.plate, problem.loads);
  const auto field_of = [&](const std::vector<UnitLoad>& some) {
    const Model model(mesh, {true, true}, problem.material, problem.plate.thickness, some);
    return Field(model, model.solve(6));
  };
  const Field together = field_of(loads);
  std::vector<Field> single;
  for (const UnitLoad& load : loads) single.push_back(field_of({load}));
  ASSERT_EQ(together.cells(), 4 * mesh.triangles().size());
  const std::vector<Point> reference{{0.2, 0.5}, {0.0, 0.0}};
  for (std::size_t cell = 0; cell < together.cells(); cell += 3) {
    const auto sum = together.sample(cell, reference);
    std::vector<Stress> parts(2);
    std::vector<Point> moved(2, Point::Zero());
    for (const Field& field : single) {
      const auto part = field.sample(cell, reference);
      for (int q = 0; q < 2; ++q) {
        EXPECT_EQ(part[q].point, sum[q].point);
        parts[q].xx += part[q].stress.xx;
        parts[q].yy += part[q].stress.yy;
        parts[q].xy += part[q].stress.xy;
        moved[q] += part[q].displacement;
      }
    }
    for (int q = 0; q < 2; ++q) {
      EXPECT_NEAR(sum[q].stress.xx, parts[q].xx, 1e-8);
      EXPECT_NEAR(sum[q].stress.yy, parts[q].yy, 1e-8);
      EXPECT_NEAR(sum[q].stress.xy, parts[q].xy, 1e-8);
      EXPECT_LT((sum[q].displacement - moved[q]).norm(), 1e-10);
    }
  }
}

TEST(Metamorphic, EachUnitLoadIsThatLoadAlone) {
  const Problem problem = bracket();
  const Solution all = solved(problem);
  for (std::size_t l = 0; l < problem.loads.size(); ++l) {
    Problem single = problem;
    single.loads = {problem.loads[l]};
    const Solution alone = solved(single);
    for (std::size_t h = 0; h < problem.plate.holes.size(); ++h) {
      const Estimate& a = all.units[l].raisers[h].largest.stress;
      const Estimate& b = alone.combined.raisers[h].largest.stress;
      EXPECT_NEAR(a.value, b.value, a.bound + b.bound);
      EXPECT_LT(a.bound, 0.01 * std::abs(b.value));
    }
  }
}

// What each image of a load of one parity does: the fields of an even load are
// mirrored, those of an odd load mirrored and turned over.
TEST(Metamorphic, FieldsHaveTheParityOfTheirLoads) {
  Problem problem = symmetric();
  for (const auto& [kind, parity] : {std::pair{Kind::tension, 1.0}, {Kind::shear, -1.0}}) {
    problem.loads = {of(kind, 50)};
    const Solution solution = solved(problem, 1e-3);
    for (const Point& x : {Point(7, 22), Point(52, 5), Point(20, 33)}) {
      const auto here = solution.field.at(x);
      const auto there = solution.field.at({-x.x(), x.y()});
      ASSERT_TRUE(here && there);
      EXPECT_NEAR(here->stress.xx, parity * there->stress.xx, 1e-9);
      EXPECT_NEAR(here->stress.xy, -parity * there->stress.xy, 1e-9);
      EXPECT_NEAR(here->displacement.x(), -parity * there->displacement.x(), 1e-12);
      EXPECT_NEAR(here->displacement.y(), parity * there->displacement.y(), 1e-12);
    }
  }
}

}  // namespace
}  // namespace raiser::solver
