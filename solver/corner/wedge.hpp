#pragma once

#include <array>
#include <complex>
#include <vector>

#include "solver/elasticity/hooke_law.hpp"

namespace raiser::solver {

/// What the fields of an isotropic wedge depend on.
struct PlaneConstants {
  double shear_modulus = 0.0;  ///< MPa
  double kappa = 0.0;          ///< Kolosov's: (3 - nu) / (1 + nu) in plane stress, 3 - 4 nu in plane strain
};
PlaneConstants plane_constants(const HookeLaw& material);

/// What happens on a straight edge of a wedge. free: no traction. clamped: no
/// displacement. sliding: no displacement across the edge, no shear on it.
enum class WedgeEdge { free, clamped, sliding };

/// An infinite wedge of isotropic material about a corner. Angles count from
/// the bisector of the material: `first` is the edge at -angle/2, `second` the
/// one at +angle/2.
struct Wedge {
  double angle = 0.0;  ///< rad, of the material, above 0 and at most 2 pi
  WedgeEdge first = WedgeEdge::free;
  WedgeEdge second = WedgeEdge::free;
};

/// Polar components of a wedge field at one point.
struct WedgeField {
  double rr = 0.0, tt = 0.0, rt = 0.0;  ///< MPa
  double u_r = 0.0, u_t = 0.0;          ///< mm
};

/// The same of a complex field, whose real part is one of the wedge.
struct ComplexWedgeField {
  std::complex<double> rr, tt, rt, u_r, u_t;
};

/// One field of the form r^exponent that keeps the wedge's edge conditions:
/// Airy's function is r^(exponent + 1) F(theta) with
///   F = c0 cos (e+1)t + c1 sin (e+1)t + c2 cos (e-1)t + c3 sin (e-1)t,
/// stress goes as r^(exponent - 1). Where the exponent is complex, the field
/// is the real part of an amplitude times this.
/// Source: M. L. Williams, Stress singularities resulting from various boundary
/// conditions in angular corners of plates in extension, J. Appl. Mech. 19
/// (1952) 526-528.
struct WedgeMode {
  enum class Symmetry { symmetric, antisymmetric, none };
  std::complex<double> exponent;
  Symmetry symmetry = Symmetry::none;
  std::array<std::complex<double>, 4> coefficients;

  bool is_complex() const { return exponent.imag() != 0.0; }
  /// The complex field at (r, theta), r in mm.
  ComplexWedgeField complex_at(double r, double theta, const PlaneConstants& material) const;
  /// The field of a complex amplitude at (r, theta), r in mm.
  WedgeField at(double r, double theta, const PlaneConstants& material,
                std::complex<double> amplitude = 1.0) const;
};

/// Exponents in (0, `below`) of the fields that keep the wedge's edge
/// conditions, to rounding, in the order of their real parts; of a conjugate
/// pair the one with positive imaginary part. The rigid rotation (exponent 1)
/// is not among them. `kappa` counts where an edge is held.
/// Throws std::invalid_argument for an angle outside (0, 2 pi], and for a slit
/// whose faces both slide.
///
/// Characteristic equations (Williams 1952; w = angle, e = exponent):
///   free-free        sin ew = -+ e sin w            symmetric / antisymmetric
///   clamped-clamped  kappa sin ew = +- e sin w      symmetric / antisymmetric
///   sliding-sliding  sin or cos of (e + 1) w / 2 or (e - 1) w / 2 = 0
///   clamped-free     4 kappa sin^2 ew = (kappa + 1)^2 - 4 e^2 sin^2 w
/// A sliding edge is the line of symmetry of a wedge of twice the angle.
struct Exponent {
  std::complex<double> value;
  WedgeMode::Symmetry symmetry = WedgeMode::Symmetry::none;
};
std::vector<Exponent> exponents(const Wedge& wedge, double kappa, double below);

/// The singular fields (real part of the exponent below 1) of a wedge, the
/// strongest first, normalised so that at a distance r
///   edges alike, symmetric:      sigma_tt on the bisector is r^(e-1) / sqrt(2 pi)
///   edges alike, antisymmetric:  sigma_rt on the bisector is that
///   edges unlike:                sigma_tt on the held edge is that (on the sliding one of two held);
///                                where it is zero there, sigma_rt there, then those on the bisector
/// The amplitude of a symmetric or antisymmetric field of a free corner is then
/// the generalised stress intensity of R. Gross and A. Mendelson, Plane
/// elastostatic analysis of V-notched plates, Int. J. Fract. Mech. 8 (1972)
/// 267-276 (definition from memory), and K_I, K_II of a crack.
std::vector<WedgeMode> singular_modes(const Wedge& wedge, const PlaneConstants& material);

/// The field with the opposite exponent that keeps the same edge conditions,
/// in any size: the one paired with a mode in Betti's reciprocal theorem.
WedgeMode dual(const WedgeMode& mode, const Wedge& wedge, const PlaneConstants& material);

/// Betti's form of two fields of a wedge over the arc r = 1:
/// the integral of (t u* - t* u), t the traction on the arc. N/mm.
std::complex<double> pairing(const WedgeMode& mode, const WedgeMode& other, const Wedge& wedge,
                             const PlaneConstants& material);

}  // namespace raiser::solver
