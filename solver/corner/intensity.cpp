#include "solver/corner/intensity.hpp"

#include <Eigen/Geometry>
#include <Eigen/LU>
#include <Eigen/QR>
#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

#include "mesh/legendre.hpp"

namespace raiser::solver {
namespace {

using Complex = std::complex<double>;

/// Polar coordinates about a vertex, angles from the bisector of the material.
class Polar {
 public:
  explicit Polar(const CornerSite& site)
      : at_(site.vertex.at), bisector_(site.vertex.direction + site.wedge.angle / 2) {}

  struct Place {
    double r, theta;
    Point e_r, e_t;
  };
  Place place(const Point& x) const { return place_of_arm(x - at_); }
  Place place_of_arm(const Point& arm) const {
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
    const ComplexWedgeField d = duals[m].complex_at(p.r, p.theta, material);
    out[m] +=
        factor * (t.dot(p.e_r) * d.u_r + t.dot(p.e_t) * d.u_t - d.rr * u.dot(p.e_r) - d.rt * u.dot(p.e_t));
  }
}

/// Whether a cell lies beyond the disc for certain.
bool is_outside(const Field& field, std::size_t cell, const Point& at, double radius) {
  const mesh::Mesh& mesh = field.mesh();
  const Image& image = field.images()[cell / mesh.triangles().size()];
  Eigen::AlignedBox2d box;
  for (const int v : mesh.triangles()[cell % mesh.triangles().size()])
    box.extend(image.apply(mesh.points()[v]));
  const Point margin = 0.3 * box.sizes();  // for curved sides
  return Eigen::AlignedBox2d(box.min() - margin, box.max() + margin).exteriorDistance(at) >= radius;
}

/// Area of a cell at reference points of its sample.
double area_factor(const Field& field, std::size_t cell, const Point& reference) {
  const std::size_t triangles = field.mesh().triangles().size();
  const bool flips = field.images()[cell / triangles].flips();
  const Point own = flips ? Point(reference.y(), reference.x()) : reference;
  return field.mesh().map(static_cast<int>(cell % triangles), own).jacobian.determinant();
}

/// Minus the integral of (t u* - t* u) . grad(weight) over the disc.
void add_domain(const Field& field, const Polar& polar, const Weight& weight, const Point& origin,
                const std::vector<WedgeMode>& duals, const PlaneConstants& material,
                std::vector<Complex>& out) {
  const TriangleRule rule = triangle_rule(field.degree() + 7);
  for (std::size_t cell = 0; cell < field.cells(); ++cell) {
    if (is_outside(field, cell, polar.at(0.0, 0.0), weight.radius)) continue;
    const std::vector<FieldValue> values = field.sample(cell, rule.points);
    for (std::size_t q = 0; q < values.size(); ++q) {
      const Polar::Place p = polar.place(values[q].point);
      if (p.r >= weight.radius) continue;
      const double area = area_factor(field, cell, rule.points[q]) * rule.weights[q];
      add_arc_form(values[q], origin, p, -weight.slope(p.r) * area, duals, material, out);
    }
  }
}

/// The parameter at which a curve leaves the disc, from its end at the vertex.
double leaving(const mesh::Curve& curve, bool starts, const Point& at, double radius) {
  double inside = starts ? curve.begin : curve.end;
  double outside = starts ? curve.end : curve.begin;
  for (int step = 0; step < 80; ++step) {
    const double middle = (inside + outside) / 2;
    ((curve.at(middle) - at).norm() < radius ? inside : outside) = middle;
  }
  return inside;
}

/// The way from one parameter of a curve to another, exact to rounding however short.
Point arm(const mesh::Curve& curve, double from, double change) {
  if (curve.kind == mesh::Curve::Kind::line) return change * curve.u;
  const double chord = 2 * std::sin(change / 2);
  return chord * (std::cos(from + change / 2) * curve.v - std::sin(from + change / 2) * curve.u);
}

/// The integral of weight (t u* - t* u) along one edge within the disc; t* is
/// zero on a straight one.
void add_edge(const Field& field, const CornerSite& site, int edge, const Polar& polar, const Weight& weight,
              const Point& origin, const std::vector<WedgeMode>& duals, const PlaneConstants& material,
              std::vector<Complex>& out) {
  const mesh::Curve& curve = edge == 0 ? site.vertex.after : site.vertex.before;
  const WedgeEdge hold = edge == 0 ? site.wedge.first : site.wedge.second;
  const double from = edge == 0 ? curve.begin : curve.end;
  const double to = leaving(curve, edge == 0, site.vertex.at, weight.radius);
  const double strongest = duals.empty() ? 0.0 : -duals.back().exponent.real();
  const double power = std::clamp(1.0 / (1.0 - strongest), 2.0, 100.0);
  const mesh::GaussRule rule = mesh::gauss_legendre(40);
  for (std::size_t q = 0; q < rule.points.size(); ++q) {
    const double s = (1 + rule.points[q]) / 2;
    const double change = (to - from) * std::pow(s, power);
    const double parameter = from + change;
    const Point x = curve.at(parameter);
    const Polar::Place p = polar.place_of_arm(arm(curve, from, change));
    if (!(p.r > 0)) continue;
    const Point along = (curve.derivative(parameter) * (curve.end > curve.begin ? 1.0 : -1.0)).normalized();
    const Point outward(along.y(), -along.x());
    const double step = rule.weights[q] / 2 * power * std::pow(s, power - 1) * std::abs(to - from) *
                        curve.derivative(parameter).norm() * weight.value(p.r);
    const bool is_curved = curve.kind != mesh::Curve::Kind::line && hold == WedgeEdge::free;
    const auto value = is_curved ? field.at(x) : std::nullopt;
    const Point t = site.traction ? site.traction(edge, x, outward) : Point::Zero();
    // The face of a slit is told by its edge, not by the angle's rounding.
    const double theta = edge == 0 && p.theta > 0.5 * site.wedge.angle    ? p.theta - 2 * std::numbers::pi
                         : edge == 1 && p.theta < -0.5 * site.wedge.angle ? p.theta + 2 * std::numbers::pi
                                                                          : p.theta;
    for (std::size_t m = 0; m < duals.size(); ++m) {
      const ComplexWedgeField d = duals[m].complex_at(p.r, theta, material);
      out[m] += step * (t.dot(p.e_r) * d.u_r + t.dot(p.e_t) * d.u_t);
      if (!value) continue;
      const Point u = value->displacement - origin;
      const double n_r = outward.dot(p.e_r);
      const double n_t = outward.dot(p.e_t);
      out[m] -= step * ((n_r * d.rr + n_t * d.rt) * u.dot(p.e_r) + (n_r * d.rt + n_t * d.tt) * u.dot(p.e_t));
    }
  }
}

/// Stress in polar axes: rr, tt, rt.
Eigen::Vector3d polar_stress(const FieldValue& value, const Polar::Place& p) {
  Eigen::Matrix2d stress;
  stress << value.stress.xx, value.stress.xy, value.stress.xy, value.stress.yy;
  return {p.e_r.dot(stress * p.e_r), p.e_t.dot(stress * p.e_t), p.e_r.dot(stress * p.e_t)};
}

/// Sum of squares of the stress along an arc, of its symmetric or antisymmetric
/// part about the bisector, or of all of it.
std::optional<double> stress_on_arc(const Field& field, const CornerSite& site, const Polar& polar, double r,
                                    WedgeMode::Symmetry symmetry) {
  constexpr int half_angles = 12;
  const double sign = symmetry == WedgeMode::Symmetry::symmetric ? 1.0 : -1.0;
  double sum = 0.0;
  for (int i = 0; i < half_angles; ++i) {
    std::array<Eigen::Vector3d, 2> sides;
    for (const int side : {0, 1}) {
      const double theta = (side == 0 ? 0.5 : -0.5) * site.wedge.angle * (i + 0.5) / half_angles;
      const auto value = field.at(polar.at(r, theta));
      if (!value) return std::nullopt;
      sides[side] = polar_stress(*value, polar.place(value->point));
    }
    const Eigen::Vector3d turned(sides[1][0], sides[1][1], -sides[1][2]);
    if (symmetry == WedgeMode::Symmetry::none)
      sum += sides[0].squaredNorm() + sides[1].squaredNorm();
    else
      sum += (sides[0] + sign * turned).squaredNorm();
  }
  return sum;
}

}  // namespace

std::vector<Complex> amplitudes(const Field& field, const CornerSite& site,
                                const std::vector<WedgeMode>& modes, const PlaneConstants& material,
                                double radius) {
  std::vector<WedgeMode> duals;
  for (const WedgeMode& mode : modes) duals.push_back(dual(mode, site.wedge, material));
  const Polar polar(site);
  const Weight weight{radius};
  const auto tip = field.at(site.vertex.at);
  const Point origin = tip ? tip->displacement : Point::Zero();
  std::vector<Complex> result(modes.size(), 0.0);
  add_domain(field, polar, weight, origin, duals, material, result);
  for (const int edge : {0, 1}) add_edge(field, site, edge, polar, weight, origin, duals, material, result);
  for (std::size_t m = 0; m < modes.size(); ++m) {
    // Of a conjugate pair one field is real twice: the solution is half the sum of both.
    const double share = modes[m].is_complex() ? 2.0 : 1.0;
    result[m] *= share / pairing(modes[m], duals[m], site.wedge, material);
    if (!modes[m].is_complex()) result[m] = result[m].real();
  }
  return result;
}

std::optional<double> measured_exponent(const Field& field, const CornerSite& site,
                                        WedgeMode::Symmetry symmetry, double inner, double outer) {
  constexpr int radii = 12;
  const Polar polar(site);
  Eigen::MatrixX2d lines(radii, 2);
  Eigen::VectorXd logs(radii);
  for (int k = 0; k < radii; ++k) {
    const double r = inner * std::pow(outer / inner, static_cast<double>(k) / (radii - 1));
    const auto sum = stress_on_arc(field, site, polar, r, symmetry);
    if (!sum || !(*sum > 0)) return std::nullopt;
    lines.row(k) << 1.0, std::log(r);
    logs[k] = 0.5 * std::log(*sum);
  }
  const Eigen::Vector2d fit = lines.colPivHouseholderQr().solve(logs);
  return fit[1] + 1.0;
}

}  // namespace raiser::solver
