#pragma once

#include <complex>
#include <functional>
#include <optional>
#include <vector>

#include "mesh/region/vertex.hpp"
#include "solver/corner/wedge.hpp"
#include "solver/field/field.hpp"

namespace raiser::solver {

/// A corner of the plate as a wedge, and what is known on its edges near it.
struct CornerSite {
  mesh::Vertex vertex;
  double reach = 0.0;  ///< mm, see mesh::reach()
  Wedge wedge;         ///< `first` is the edge that leaves the vertex, `second` the one that arrives
  /// Traction in MPa on the leaving (0) and the arriving (1) edge at x with outward normal n.
  std::function<Point(int edge, const Point& x, const Point& n)> traction;
};

/// Amplitudes of a wedge's singular fields in a solution, from Betti's
/// reciprocal theorem with each field's dual over the disc of the given radius
/// (mm; at most the site's reach), as a domain integral with the weight
/// (1 - r^2/R^2)^4. Known tractions on the edges are taken into account, and so
/// is an edge that curves away from the wedge's. MPa mm^(1 - exponent); real
/// unless the exponent is complex, then for r in mm.
///
/// Source: M. Stern, E. B. Becker and R. S. Dunham, A contour integral
/// computation of mixed-mode stress intensity factors, Int. J. Fract. 12 (1976)
/// 359-368 (the contour form; from memory).
std::vector<std::complex<double>> amplitudes(const Field& field, const CornerSite& site,
                                             const std::vector<WedgeMode>& modes,
                                             const PlaneConstants& material, double radius);

/// The exponent e of a growth of stress as r^(e - 1) between two distances from
/// the vertex, from the root mean square of the stress along arcs about it: of
/// the part that is symmetric or antisymmetric about the bisector, or of all of
/// it. Nothing when a point of them is not in the plate or the part is zero.
std::optional<double> measured_exponent(const Field& field, const CornerSite& site,
                                        WedgeMode::Symmetry symmetry, double inner, double outer);

}  // namespace raiser::solver
