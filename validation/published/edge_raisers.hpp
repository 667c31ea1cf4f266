#pragma once

#include <optional>

/// Published factors of notches in an edge, of stepped bars and of lugs, as
/// functions of dimensionless parameters. Their records are in validation/published.hpp.
namespace raiser::validation {

// Notches of depth h and root radius r in a bar of width D. q = h/r.

/// Opposite U notches, x = 2h/D, in tension: Kt on P/(t(D-2h)).
double u_pair_tension(double q, double x);
/// The same in bending: Kt on 6M/(t(D-2h)^2).
double u_pair_bending(double q, double x);
/// One U notch, x = h/D, uniform far tension: Kt on P/A + M c/I of the net
/// section, M from the offset of its centroid; see u_single_nominal().
double u_single_tension(double q, double x);
/// One U notch in bending: Kt on 6M/(t(D-h)^2).
double u_single_bending(double q, double x);
/// P/A + M c/I at the root of one notch under uniform far tension, as a
/// multiple of the gross stress; x = h/D: (1 + 2x)/(1 - x)^2.
double u_single_nominal(double x);

/// A notch of depth t and root radius r in the edge of a half plane, tension
/// along the edge: Kt on the remote stress. U notch and half an ellipse.
double u_half_plane(double t_over_r);
double ellipse_half_plane(double t_over_r);
/// The semicircle: 3.065.
inline constexpr double semicircle_half_plane = 3.065;

/// Infinitely deep hyperbolic notches on both sides, half net width a, root
/// radius rho, q = a/rho: Kt on the net section's stress. H. Neuber's closed forms.
double neuber_deep_tension(double q);
double neuber_deep_bending(double q);

/// Opposite V notches with opening angle `degrees` and the factor `ktu` of U
/// notches of the same depth and radius, both on the net section, in tension;
/// for the two depths that were measured: 2h/D = 0.398 and 0.667.
double v_pair_shallow(double ktu, double degrees);
double v_pair_deep(double ktu, double degrees);

// Stepped flat bar, D wide and d wide, step h = (D-d)/2 on both sides, fillet radius r.

/// q = h/r, x = 2h/D. Tension: Kt on P/(t d); bending: Kt on 6M/(t d^2).
double fillet_tension(double q, double x);
double fillet_bending(double q, double x);
/// Bending, D/d = 1.111: 1.0147 (r/d)^-0.2179.
double fillet_bending_power(double r_over_d);
/// Tension, read off the printed chart: empty where it was not read (entries only).
std::optional<double> fillet_tension_chart(double D_over_d, double r_over_d);

// Lug: pin of diameter d in a bar of width H, hole centre at least H from the end; x = d/H.

/// Kt on P/((H-d)t), and on P/(d t).
double lug_net(double x);
double lug_bearing(double x);

// Orthotropic plate with a circular hole, tension along its axis 1.

/// Kt gross in a strip of width W, x = d/W, from that of the infinite plate
/// (lekhnitskii_factor).
double orthotropic_strip(double kt_infinite, double x);

}  // namespace raiser::validation
