#include <algorithm>
#include <cmath>
#include <complex>

#include "validation/exact/exact.hpp"

namespace raiser::validation {

namespace {

using Complex = std::complex<double>;

/// The outside of the unit circle mapped to that of the ellipse:
/// z = R (zeta + m / zeta). Valid for either axis the longer one (m of any sign).
struct Map {
  double R, m;

  explicit Map(const Ellipse& e)
      : R(0.5 * (e.along_x + e.along_y)), m((e.along_x - e.along_y) / (e.along_x + e.along_y)) {}

  Complex zeta(Complex z) const {
    const Complex root = std::sqrt(z * z - Complex(4 * R * R * m));
    const Complex plus = z + root, minus = z - root;
    return (std::norm(plus) >= std::norm(minus) ? plus : minus) / (2 * R);
  }
};

/// phi'(z) and its z-derivative, and psi'(z). With phi = G R zeta + A / zeta,
/// G a quarter of the remote trace, the free edge |zeta| = 1 gives
/// psi = -conj(phi)(1/zeta) - conj(z)(1/zeta) phi'(zeta) / z'(zeta), and the
/// remote deviator fixes A. Everything is differentiated in closed form.
struct Potentials {
  Complex phi1, phi2, psi1;
};

Potentials potentials(const RemoteStress& remote, const Map& map, Complex t) {
  const double R = map.R, m = map.m, G = 0.25 * (remote.xx + remote.yy);
  const Complex deviator(0.5 * (remote.yy - remote.xx), remote.xy);
  const Complex A = -R * (std::conj(deviator) + m * G);
  const Complex t2 = t * t, t3 = t2 * t;
  const Complex dz = R * (1.0 - m / t2), d2z = 2 * R * m / t3;
  const Complex dphi = G * R - A / t2, d2phi = 2.0 * A / t3;
  const Complex g = t * (1.0 + m * t2) / (t2 - m);
  const Complex dg = ((1.0 + 3 * m * t2) * (t2 - m) - 2.0 * t2 * (1.0 + m * t2)) / ((t2 - m) * (t2 - m));
  const Complex dpsi = G * R / t2 - std::conj(A) - dg * dphi - g * d2phi;
  return {dphi / dz, (d2phi * dz - dphi * d2z) / (dz * dz * dz), dpsi / dz};
}

/// Edge stress as (P - Q cos 2 eta - S sin 2 eta) / (M - N cos 2 eta): the
/// published formula with its hyperbolic functions written in the semi-axes, so
/// that a circle is no special case.
struct EdgeForm {
  double P, Q, S, M, N;
};

EdgeForm edge_form(const RemoteStress& remote, const Ellipse& e) {
  const double a = e.along_x, b = e.along_y, difference = a * a - b * b, square = (a + b) * (a + b);
  const double deviator = remote.xx - remote.yy;
  return {2 * a * b * (remote.xx + remote.yy) + difference * deviator, square * deviator,
          square * 2 * remote.xy, a * a + b * b, difference};
}

}  // namespace

Stress inglis(const RemoteStress& remote, const Ellipse& ellipse, const Point& x) {
  const Map map(ellipse);
  const Complex z(x.x(), x.y());
  const Potentials p = potentials(remote, map, map.zeta(z));
  const double half_trace = 2 * p.phi1.real();
  const Complex rest = std::conj(z) * p.phi2 + p.psi1;
  return {half_trace - rest.real(), half_trace + rest.real(), rest.imag(), 0.0};
}

double inglis_edge(const RemoteStress& remote, const Ellipse& ellipse, double eta) {
  const EdgeForm f = edge_form(remote, ellipse);
  const double c = std::cos(2 * eta), s = std::sin(2 * eta);
  return (f.P - f.Q * c - f.S * s) / (f.M - f.N * c);
}

std::pair<double, double> inglis_extremes(const RemoteStress& remote, const Ellipse& ellipse) {
  // A value y is taken once only, hence extreme, where (P - yM)^2 = (Q - yN)^2 + S^2.
  const EdgeForm f = edge_form(remote, ellipse);
  const double a = 4 * ellipse.along_x * ellipse.along_x * ellipse.along_y * ellipse.along_y;  // M^2 - N^2
  const double b = f.P * f.M - f.Q * f.N, c = f.P * f.P - f.Q * f.Q - f.S * f.S;
  const double root = std::sqrt(std::max(0.0, b * b - a * c));
  return {(b - root) / a, (b + root) / a};
}

Stress inglis_pressure(double pressure, const Ellipse& ellipse, const Point& x) {
  Stress s = inglis({pressure, pressure, 0.0}, ellipse, x);
  s.xx -= pressure;
  s.yy -= pressure;
  return s;
}

}  // namespace raiser::validation
