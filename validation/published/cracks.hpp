#pragma once

#include <optional>
#include <utility>

/// Published stress intensity factors as F = K / (sigma sqrt(pi a)), unless said
/// otherwise, as functions of dimensionless parameters. Their records are in
/// validation/published.hpp.
namespace raiser::validation {

// Cracks in a strip of width W under tension or bending; x = a/b = 2a/W for the
// centre crack and two edge cracks, x = a/W for one edge crack. sigma gross, in
// bending 6M/(t W^2).

double centre_secant(double x);   ///< sqrt(sec(pi x/2)), C. E. Feddersen
double centre_tada(double x);     ///< the same with a correction, H. Tada
double centre_koiter(double x);   ///< (1 - x/2 + 0.326 x^2)/sqrt(1 - x), W. T. Koiter
double centre_tangent(double x);  ///< G. R. Irwin's tangent
/// M. Isida's series at its entries 0.1 to 0.9, interpolated between; empty outside.
std::optional<double> centre_isida(double x);

double edge_tada(double x);          ///< H. Tada, for any x
double edge_polynomial(double x);    ///< B. Gross and J. E. Srawley; W. F. Brown and J. E. Srawley
double edge_tada_simple(double x);   ///< H. Tada, the simpler form
double edge_bending_tada(double x);  ///< pure bending
double edge_bending_polynomial(double x);
double two_edges_tada(double x);
double two_edges_benthem(double x);

/// Uniform tension, edge crack in a half plane: F and T/sigma.
inline constexpr double half_plane_crack = 1.1215;
inline constexpr double half_plane_crack_t = -0.526;

// Test specimens; x = a/W.

/// Three-point bend, span 4W: K B sqrt(W)/P.
double bend_specimen(double x);
/// The same by W. F. Brown and J. E. Srawley: F on 1.5 P S/(B W^2), turned into K B sqrt(W)/P.
double bend_specimen_brown(double x);
/// Compact tension: K B sqrt(W)/P.
double compact_specimen(double x);

/// Crack at the angle beta (rad) to the tension, infinite plate: K_I and K_II
/// over sigma sqrt(pi a).
std::pair<double, double> inclined(double beta);
// One or two cracks of length a from a circular hole of radius R, infinite plate, q = a/R.

/// O. L. Bowie's table: F for one or two cracks, tension across them or equal
/// biaxial tension; entries interpolated; empty outside 0.1 to 10.
enum class HoleCracks { one, two };
enum class Tension { uniaxial, biaxial };
std::optional<double> bowie(HoleCracks cracks, Tension tension, double q);
double one_crack_fit(double q);   ///< a fit of damage-tolerance handbooks
double two_cracks_fit(double q);  ///< a rational fit
double tada_hole(HoleCracks cracks, Tension tension, double q);
double grandt_hole(HoleCracks cracks, double q);  ///< A. F. Grandt, uniaxial
double newman_hole(HoleCracks cracks, double q);  ///< J. C. Newman Jr., uniaxial
/// J. C. Newman's factor for a strip of width W: rho = R/W, a = crack length over W.
double newman_width(HoleCracks cracks, double rho, double a_over_w);
/// Two cracks, pressure on the hole's wall only: computed table, entries only.
std::optional<double> pressurised_wall(double q);

// Collinear cracks of length 2a, centres 2e apart, infinite plate; x = a/e.

double collinear_inner(double x);
double collinear_outer(double x);
double collinear_row(double x);  ///< endless row

// A crack of length l at the root of a notch: K over S sqrt(pi l), kt gross.

double notch_crack_short(double kt);                     ///< 1.1215 kt
double notch_crack_lukas(double kt, double l_over_rho);  ///< P. Lukas and M. Klesnil

/// K/(S sqrt(pi l)) at a semicircular notch in a half plane's edge: computed table, entries only.
std::optional<double> notch_crack_table(double l_over_rho);

/// T/sigma in long strips, computed table (entries only): centre crack, one edge
/// crack in tension and in bending, two edge cracks.
enum class Cracked { centre, edge, edge_bending, two_edges };
std::optional<double> t_stress(Cracked cracked, double x);

/// Exponent of a sharp notch with free flanks by its opening in degrees, printed
/// to four digits (entries only): symmetric or antisymmetric.
std::optional<double> corner_exponent(bool is_symmetric, double opening);

/// Point forces P per thickness on the middle of a centre crack's faces: K t sqrt(b)/P; x = a/b.
double point_forces(double x);

}  // namespace raiser::validation
