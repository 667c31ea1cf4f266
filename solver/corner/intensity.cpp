#include "solver/corner/intensity.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <numbers>

#include "mesh/legendre.hpp"

namespace raiser::solver {
namespace {

using Complex = std::complex<double>;

/// A mode's field as complex numbers.
struct Parts {
  WedgeField real, imaginary;
  Complex operator()(double WedgeField::*part) const { return {real.*part, imaginary.*part}; }
};
Parts parts(const WedgeMode& mode, double r, double theta, const PlaneConstants& material) {
  return {mode.at(r, theta, material), mode.at(r, theta, material, Complex(0, -1))};
}

/// Polar coordinates about a vertex, angles from the bisector of the material.
class Polar {
 public:
  explicit Polar(const CornerSite& site)
      : at_(site.vertex.at), bisector_(site.vertex.direction + site.wedge.angle / 2) {}

  struct Place {
    double r, theta;
    Point e_r, e_t;
  };
  Place place(const Point& x) const {
    const Point arm = x - at_;
    const double r = arm.norm();
    const Point e_r = arm / r;
    const double theta = std::remainder(std::atan2(arm.y(), arm.x()) - bisector_, 2 * std::numbers::pi);
    return {r, theta, e_r, Point(-e_r.y(), e_r.x())};
  }
  Point at(double r, double theta) const {
    return at_ + r * Point(std::cos(bisector_ + theta), std::sin(bisector_ + theta));
  }

 private:
  Point at_;
  double bisector_;
};

struct Weight {
  double radius;
  double value(double r) const { return std::pow(std::max(1 - r * r / (radius * radius), 0.0), 4); }
  double slope(double r) const {
    return -8 * r / (radius * radius) * std::pow(std::max(1 - r * r / (radius * radius), 0.0), 3);
  }
};

/// (t u* - t* u) on an arc about the vertex, one number a dual field.
void add_arc_form(const FieldValue& value, const Point& origin, const Polar::Place& p, double factor,
                  const std::vector<WedgeMode>& duals, const PlaneConstants& material,
                  std::vector<Complex>& out) {
  Eigen::Matrix2d stress;
  stress << value.stress.xx, value.stress.xy, value.stress.xy, value.stress.yy;
  const Point t = stress * p.e_r;
  const Point u = value.displacement - origin;
  for (std::size_t m = 0; m < duals.size(); ++m) {
    const Parts d = parts(duals[m], p.r, p.theta, material);
    out[m] += factor * (t.dot(p.e_r) * d(&WedgeField::u_r) + t.dot(p.e_t) * d(&WedgeField::u_t) -
                        d(&WedgeField::rr) * u.dot(p.e_r) - d(&WedgeField::rt) * u.dot(p.e_t));
  }
}

/// Minus the integral of (t u* - t* u) . grad(weight) over the disc.
void add_domain(const Field& field, const CornerSite& site, double radius, const Point& origin,
                const std::vector<WedgeMode>& duals, const PlaneConstants& material, std::vector<Complex>& out) {
  const TriangleRule rule = triangle_rule(field.degree() + 7);
  const Polar polar(site);
  const Weight weight{radius};
  const mesh::Mesh& mesh = field.mesh();
  std::vector<Point> corners{{0, 0}, {1, 0}, {0, 1}};
  for (std::size_t cell = 0; cell < field.cells(); ++cell) {
    const mesh::Box box = field.box(cell);
    if ((site.vertex.at.cwiseMax(box.low).cwiseMin(box.high) - site.vertex.at).norm() >= radius) continue;
    const std::vector<FieldValue> values = field.sample(cell, rule.points);
    const int triangle = static_cast<int>(cell % mesh.triangles().size());
    for (std::size_t q = 0; q < values.size(); ++q) {
      const Polar::Place p = polar.place(values[q].point);
      if (p.r >= radius) continue;
      const double area = field.jacobian(cell, rule.points[q]) * rule.weights[q];
      add_arc_form(values[q], origin, p, -weight.slope(p.r) * area, duals, material, out);
    }
  }
}

}  // namespace
}  // namespace raiser::solver
