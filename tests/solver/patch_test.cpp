// Patch tests: stress fields that the shape functions hold exactly must come
// out to rounding, whatever the mesh.
#include <gtest/gtest.h>

#include <Eigen/Dense>
#include <cmath>
#include <numbers>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/field/edge.hpp"
#include "solver/field/field.hpp"

namespace raiser::solver {
namespace {

using StressAt = std::function<Stress(const Point&)>;
using DisplacementAt = std::function<Point(const Point&)>;

const mesh::Plate plate{40,
                        30,
                        3,
                        {{"", mesh::HoleShape::circle, 9, 9, 0, Point(-8, 3), 0},
                         {"", mesh::HoleShape::ellipse, 12, 5, 0, Point(8, -4), 0.7}}};

mesh::Mesh plate_mesh(int geometry_degree) {
  mesh::SizeRule rule;
  rule.turn = 0.8;
  return mesh::triangulate(mesh::trace(plate), rule).with_geometry_degree(geometry_degree);
}

// Traction of a stress field on the mesh's own boundary. Where its sides are
// not the drawing's curve, the traction per length of that curve: Model
// integrates along the drawing.
Traction traction_on(const mesh::Mesh& mesh, const StressAt& stress) {
  return [&mesh, stress](const Owner&, const Point& x, const Point&) {
    double nearest = 1e30;
    const mesh::BoundarySide* own = nullptr;
    double s = 0.0;
    for (const mesh::BoundarySide& side : mesh.boundary()) {
      const mesh::Curve& c = side.curve;
      Eigen::Matrix2d axes;
      axes << c.u, (c.kind == mesh::Curve::Kind::line ? Point(-c.u.y(), c.u.x()) : c.v);
      const Point local = axes.inverse() * (x - c.centre);
      double t = local.x();
      if (c.kind == mesh::Curve::Kind::arc) {
        const double middle = (c.begin + c.end) / 2;
        t = middle + std::remainder(std::atan2(local.y(), local.x()) - middle, 2 * std::numbers::pi);
      }
      const double position = (2 * t - c.begin - c.end) / (c.end - c.begin);
      const double miss = (c.at(t) - x).norm() + std::max(0.0, std::abs(position) - 1.0);
      if (miss < nearest) nearest = miss, own = &side, s = position;
    }
    const mesh::MapPoint place = mesh.map(own->triangle, on_side(own->side, s));
    const Point step = (on_side(own->side, 1.0) - on_side(own->side, -1.0)) / 2;
    const Point tangent = place.jacobian * step;
    const double drawn =
        (own->curve.derivative(own->parameter(s)) * (own->curve.end - own->curve.begin) / 2).norm();
    const Stress at = stress(place.x);
    const Point n = Point(tangent.y(), -tangent.x()) / drawn;
    return Point(at.xx * n.x() + at.xy * n.y(), at.xy * n.x() + at.yy * n.y());
  };
}

struct Miss {
  double stress = 0.0;        // largest, over the largest stress
  double displacement = 0.0;  // largest after the best rigid motion, over the largest displacement
  double reaction = 0.0;
  double residual = 0.0;
  double energy = 0.0;  // relative to the work
};

Miss miss(const mesh::Mesh& mesh, const HookeLaw& law, int degree, const StressAt& stress,
          const DisplacementAt& displacement) {
  const Model model(mesh, {}, law, plate.thickness, {{"patch", traction_on(mesh, stress)}});
  const Displacements solved = model.solve(degree);
  const Field field(model, solved);
  const std::vector<Point> reference{{0.2, 0.3}, {0.0, 0.0}, {0.6, 0.4}, {0.05, 0.9}};
  std::vector<FieldValue> values;
  for (std::size_t cell = 0; cell < field.cells(); ++cell)
    for (const FieldValue& value : field.sample(cell, reference)) values.push_back(value);
  const auto rows = static_cast<Eigen::Index>(2 * values.size());
  Eigen::MatrixX3d rigid(rows, 3);
  Eigen::VectorXd apart(rows);
  double most_stress = 0.0;
  double most_moved = 0.0;
  Miss result;
  for (std::size_t i = 0; i < values.size(); ++i) {
    const Point& x = values[i].point;
    const Stress wanted = stress(x);
    const Point moved = displacement(x);
    rigid.row(2 * i) << 1, 0, -x.y();
    rigid.row(2 * i + 1) << 0, 1, x.x();
    apart.segment<2>(2 * i) = values[i].displacement - moved;
    most_moved = std::max(most_moved, moved.norm());
    most_stress = std::max({most_stress, std::abs(wanted.xx), std::abs(wanted.yy), std::abs(wanted.xy)});
    const Stress& seen = values[i].stress;
    for (const double d : {seen.xx - wanted.xx, seen.yy - wanted.yy, seen.xy - wanted.xy,
                           seen.zz - law.through_thickness(wanted.xx, wanted.yy)})
      result.stress = std::max(result.stress, std::abs(d));
  }
  const Eigen::Vector3d motion = rigid.colPivHouseholderQr().solve(apart);
  result.displacement = (apart - rigid * motion).cwiseAbs().maxCoeff() / most_moved;
  result.stress /= most_stress;
  const Balance balance = model.balance(solved);
  result.reaction = balance.reaction;
  result.residual = balance.residual;
  result.energy = std::abs(balance.strain_energy / balance.external_work - 1);
  return result;
}

void expect_exact(const Miss& m) {
  EXPECT_LT(m.stress, 2e-11);
  EXPECT_LT(m.displacement, 2e-12);
  EXPECT_LT(m.reaction, 1e-11);
  EXPECT_LT(m.residual, 1e-11);
  EXPECT_LT(m.energy, 1e-12);
}

const StressAt constant = [](const Point&) { return Stress{70, -30, 20, 0}; };

DisplacementAt linear(const HookeLaw& law) {
  const Eigen::Vector3d strain = law.compliance() * Eigen::Vector3d(70, -30, 20);
  return [strain](const Point& x) {
    return Point(strain[0] * x.x() + strain[2] / 2 * x.y(), strain[2] / 2 * x.x() + strain[1] * x.y());
  };
}

// sigma_xx = c y: the plate bends to a parabola.
constexpr double c = 5.0;
const StressAt bending = [](const Point& x) { return Stress{c * x.y(), 0, 0, 0}; };

DisplacementAt parabola(const HookeLaw& law) {
  const Eigen::Matrix3d compliance = law.compliance();
  const double along = c * compliance(0, 0);
  const double across = c * compliance(0, 1);
  return [along, across](const Point& x) {
    return Point(along * x.x() * x.y(), (across * x.y() * x.y() - along * x.x() * x.x()) / 2);
  };
}

const HookeLaw laws[] = {{70000, 0.33, PlaneState::stress}, {70000, 0.33, PlaneState::strain}};

TEST(Patch, ConstantStressIsExactOnStraightTrianglesAtEveryDegree) {
  const mesh::Mesh mesh = plate_mesh(1);
  for (const HookeLaw& law : laws)
    for (int p = min_degree; p <= max_degree; ++p) {
      SCOPED_TRACE(p);
      expect_exact(miss(mesh, law, p, constant, linear(law)));
    }
}

TEST(Patch, ConstantStressIsExactOnCurvedTrianglesUpToTheDisplacementsDegree) {
  for (const int g : {2, 3, 5, 8}) {
    const mesh::Mesh mesh = plate_mesh(g);
    for (const int p : {g, g + 1, max_degree})
      for (const HookeLaw& law : laws) {
        SCOPED_TRACE("geometry degree " + std::to_string(g) + ", degree " + std::to_string(p));
        expect_exact(miss(mesh, law, p, constant, linear(law)));
      }
  }
}

TEST(Patch, ConstantStressIsNotExactOnTrianglesMoreCurvedThanThat) {
  EXPECT_GT(miss(plate_mesh(3), laws[0], 2, constant, linear(laws[0])).stress, 1e-6);
}

TEST(Patch, BendingIsExactFromDegreeTwo) {
  const mesh::Mesh straight = plate_mesh(1);
  for (const HookeLaw& law : laws) {
    EXPECT_GT(miss(straight, law, 1, bending, parabola(law)).stress, 1e-3);
    for (int p = 2; p <= max_degree; ++p) {
      SCOPED_TRACE(p);
      expect_exact(miss(straight, law, p, bending, parabola(law)));
    }
    for (const int g : {2, 4}) expect_exact(miss(plate_mesh(g), law, 2 * g, bending, parabola(law)));
  }
}

TEST(Patch, EdgeStressIsExactToo) {
  const mesh::Mesh mesh = plate_mesh(3);
  const Traction traction = [](const Owner&, const Point&, const Point& n) {
    return Point(70 * n.x() + 20 * n.y(), 20 * n.x() - 30 * n.y());
  };
  const HookeLaw& law = laws[1];
  const Model model(mesh, {}, law, 1.0, {{"patch", traction_on(mesh, constant)}});
  const Model probed(mesh, {}, law, 1.0, {{"patch", traction}});
  const std::vector<double> s{-0.7, 0.1, 1.0};
  const Displacements solved = model.solve(5);
  const SideTables tables(5, s);
  const EdgeProbe probe(probed, 5, s, tables);
  for (const mesh::BoundarySide& side : mesh.boundary()) {
    const SideStress seen = probe.at(side, solved);
    for (std::size_t q = 0; q < s.size(); ++q) {
      const mesh::Curve& curve = side.curve;
      const Point t = curve.derivative(side.parameter(s[q])).normalized();
      const double wanted = 70 * t.x() * t.x() - 30 * t.y() * t.y() + 40 * t.x() * t.y();
      EXPECT_NEAR(seen.tangential(static_cast<Eigen::Index>(q), 0), wanted, 1e-9);
      EXPECT_NEAR(seen.raw_normal(static_cast<Eigen::Index>(q), 0), 70 - 30 - wanted, 1e-9);
      EXPECT_NEAR(seen.raw_normal(static_cast<Eigen::Index>(q), 0),
                  seen.normal(static_cast<Eigen::Index>(q), 0), 1e-9);
      EXPECT_NEAR(seen.raw_shear(static_cast<Eigen::Index>(q), 0),
                  seen.shear(static_cast<Eigen::Index>(q), 0), 1e-9);
    }
  }
}

}  // namespace
}  // namespace raiser::solver
