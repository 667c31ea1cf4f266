#pragma once

#include <array>
#include <cmath>
#include <complex>
#include <functional>
#include <utility>

#include "solver/elasticity/hooke_law.hpp"
#include "solver/elasticity/load.hpp"

namespace raiser::validation {

using mesh::Point;
using solver::Stress;

/// The uniform stress state far away from the hole, MPa.
struct RemoteStress {
  double xx = 0.0;
  double yy = 0.0;
  double xy = 0.0;
};

/// Semi-axes of an ellipse along x and along y, mm, both positive.
struct Ellipse {
  double along_x = 0.0;
  double along_y = 0.0;
};

/// A stress field in the plane of the plate; sigma_zz is left 0.
using StressField = std::function<Stress(const Point&)>;

/// Stress round a traction-free circular hole of the given radius at the
/// origin of an infinite plate, at a point outside the hole.
/// E. G. Kirsch, Zeitschrift des VDI 42 (1898) 797-807.
Stress kirsch(const RemoteStress& remote, double radius, const Point& x);

/// Tangential stress on the edge of that hole at the angle theta from +x, MPa.
double kirsch_edge(const RemoteStress& remote, double theta);

/// Stress round a circular hole under the pressure p in an infinite plate that
/// is otherwise free: radial -p (r/R)^2, tangential +p (r/R)^2.
/// G. Lame, Lecons sur la theorie mathematique de l'elasticite (1852).
Stress lame(double pressure, double radius, const Point& x);

/// Stress round a traction-free elliptical hole, axes along x and y, centre at
/// the origin of an infinite plate, at a point outside the hole or on its edge.
/// C. E. Inglis, Trans. Inst. Naval Architects 55 (1913) 219-241, by the complex
/// potentials of N. I. Muskhelishvili, Some Basic Problems of the Mathematical
/// Theory of Elasticity (1953), section 82a; derived afresh for any remote state.
Stress inglis(const RemoteStress& remote, const Ellipse& ellipse, const Point& x);

/// Tangential stress on the edge of that hole at (along_x cos eta, along_y sin eta).
double inglis_edge(const RemoteStress& remote, const Ellipse& ellipse, double eta);

/// Smallest and largest tangential stress on the edge of that hole, MPa: the
/// exact extremes over eta.
std::pair<double, double> inglis_extremes(const RemoteStress& remote, const Ellipse& ellipse);

/// The same hole under the pressure p, nothing else loaded: the field of an
/// equal biaxial remote tension p less that tension itself.
Stress inglis_pressure(double pressure, const Ellipse& ellipse, const Point& x);

/// Stress round the same hole, free of traction, in an infinite plate of any
/// law of elasticity in the plane (MPa; the ellipse's axes along x and y, the
/// material's axes at any angle to them). Not for a law that is isotropic or so
/// close to it that the two complex parameters coincide: use inglis().
/// S. G. Lekhnitskii, Anisotropic Plates (1947; English 1968), chapter VI, by
/// complex potentials of the affine coordinates x + mu y; derived afresh.
class Lekhnitskii {
 public:
  /// Throws std::invalid_argument when the complex parameters coincide.
  Lekhnitskii(const solver::HookeLaw& law, const RemoteStress& remote, const Ellipse& ellipse);
  Stress at(const Point& x) const;

 private:
  RemoteStress remote_;
  Ellipse ellipse_;
  std::array<std::complex<double>, 2> mu_, amplitude_;
};

/// The largest edge stress over the remote tension for a circular hole in an
/// infinite orthotropic plate pulled along its first axis, at the ends of the
/// diameter across: 1 + sqrt(2 (sqrt(E1/E2) - nu12) + E1/G12). It is the largest
/// on the edge where it exceeds the stress elsewhere, as it does for E1 > E2.
/// S. G. Lekhnitskii, Anisotropic Plates (1947; English 1968).
double lekhnitskii_factor(const solver::HookeLaw& law);

/// Stress between two infinitely deep notches whose edges, free of traction, are the
/// branches of one hyperbola with its vertices at (-half_width, 0) and (half_width, 0),
/// mm, loaded along y so that the net section y = 0 has the nominal stress 1 MPa:
/// force over area, or 6 M / (t (2 half_width)^2), tensile at x > 0.
/// H. Neuber, Kerbspannungslehre (1937), by the complex potentials of elliptic
/// coordinates z = focus sin w, in which an edge is a line Re w = const; derived afresh.
class DeepNotches {
 public:
  /// Both positive, mm; the radius is that of the vertices.
  DeepNotches(double half_width, double root_radius);
  Stress tension(const Point& x) const;
  Stress bending(const Point& x) const;
  /// The edge's distance from x = 0 at a height.
  double edge(double y) const {
    const double slope = y / (focus_ * std::cos(edge_));
    return half_width_ * std::sqrt(1 + slope * slope);
  }

 private:
  double half_width_;
  double edge_;  ///< Re w there, rad
  double focus_;
};

/// The stress components in axes turned anticlockwise by `angle` (rad), e.g.
/// the remote stress in the axes of a hole at that angle.
RemoteStress turned(const RemoteStress& stress, double angle);

/// The field of a hole centred at `centre` and turned by `angle`, from a field
/// given in the hole's own axes.
StressField placed(StressField own, const Point& centre, double angle);

/// The traction that the field exerts on every boundary, MPa: applied to the
/// outline of a finite plate it makes the infinite plate's solution exact.
solver::Traction traction_of(StressField field);

}  // namespace raiser::validation
