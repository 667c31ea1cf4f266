#pragma once

#include <optional>
#include <string_view>
#include <vector>

/// Published solutions as functions of dimensionless parameters, each with a
/// record of where it comes from and how far it can be trusted. The exact full
/// fields are in validation/exact/exact.hpp.
namespace raiser::validation {

/// What a published factor is multiplied by: the stress on the gross or the net
/// section, another nominal stress that the definition gives, or the pressure.
enum class Basis { gross, net, nominal, pressure };

enum class Reference {
  kirsch,
  inglis,
  howland,
  heywood,
  roark_circle,
  peterson_circle,
  bending_circle,
  bending_outer_edge,
  roark_eccentric,
  sjostrom_eccentric,
  half_plane,
  half_plane_far,
  ling,
  two_along_fit,
  row_across_fit,
  row_along_fit,
  roark_ellipse,
  slot_estimate,
  rounded_rectangle,
  rounded_square_biaxial,
  pressure_infinite,
  pressure_ellipse,
  pressure_half_plane,
  pressure_ring,
  u_pair_tension,
  u_pair_bending,
  u_single_tension,
  u_single_bending,
  u_half_plane,
  ellipse_half_plane,
  semicircle_half_plane,
  neuber_deep_tension,
  neuber_deep_bending,
  v_pair,
  v_pair_deep,
  fillet_tension,
  fillet_bending,
  fillet_bending_power,
  fillet_tension_chart,
  lug,
  orthotropic_circle,
  orthotropic_strip,
  centre_secant,
  centre_tada,
  centre_koiter,
  centre_tangent,
  centre_isida,
  edge_tada,
  edge_polynomial,
  edge_tada_simple,
  edge_bending_tada,
  edge_bending_polynomial,
  bend_specimen,
  bend_specimen_brown,
  compact_specimen,
  two_edges_tada,
  two_edges_benthem,
  inclined_crack,
  bowie_one,
  bowie_two,
  one_crack_fit,
  two_cracks_fit,
  tada_one,
  tada_two,
  grandt_one,
  grandt_two,
  newman_one,
  newman_two,
  newman_strip_one,
  newman_strip_two,
  collinear,
  collinear_row,
  through_crack,
  half_plane_crack,
  notch_crack_lukas,
  notch_crack_limits,
  notch_crack_table,
  pressurised_wall,
  t_stress,
  williams,
  point_forces,
  gere_bars,
  bhandari_bars,
  shigley_crack,
  dowling_cracks,
  boresi_crack,
  elliptic_membrane
};

/// The range of one parameter that a solution is good for, ends included.
struct Limit {
  std::string_view parameter;  ///< as the definition names it, e.g. "d/W"
  double low = 0.0;
  double high = 0.0;
};

/// A dimensionless parameter of a plate, named as in the definitions.
struct Parameter {
  std::string_view name;
  double value = 0.0;
};

/// Where a solution comes from and what it can promise.
struct Published {
  Reference reference;
  std::string_view name;        ///< short, for tables
  std::string_view source;      ///< the primary source
  std::string_view definition;  ///< of the parameters and of the factor
  Basis basis = Basis::gross;
  std::vector<Limit> limits;
  std::string_view claimed;  ///< accuracy that the source claims
  std::string_view found;    ///< accuracy found against converged finite elements or exact limits
  double accuracy = 0.0;     ///< largest relative error found within the limits
  bool from_memory = false;  ///< the figures were recalled, not read from the source
  std::optional<double> claim = std::nullopt;  ///< `claimed` as a relative error, 0 for exact solutions
};

/// All records, in the order of the enumeration.
const std::vector<Published>& published();

/// The record of one solution.
const Published& record(Reference reference);

/// Whether every limit on a parameter given is kept.
bool covers(const Published& record, const std::vector<Parameter>& parameters);

// Central circular hole of diameter d in a long strip of width W; x = d/W.

/// Kt net by interpolation in Howland's table; empty outside 0 to 0.5.
std::optional<double> howland(double x);
/// Kt net: 2 + (1 - x)^3.
double heywood(double x);
/// Kt net, the cubic in x of Roark's table.
double roark_circle(double x);
/// Kt net, the cubic in 1 - x of Peterson's chart.
double peterson_circle(double x);
/// In-plane bending: nominal stress at the hole's edge, 6 M d / ((W^3 - d^3) t),
/// as a multiple of the gross outer-fibre stress 6 M / (W^2 t). Kt on it is 2.
double bending_nominal(double x);
inline constexpr double bending_factor = 2.0;
/// The same at the outer edge: nominal stress 6 M W / ((W^3 - d^3) t), Kt 1.
double bending_edge_nominal(double x);
inline constexpr double bending_edge_factor = 1.0;

// Circular hole of radius r, centre at c from the near edge and e from the far one, W = c + e.

/// Kt gross at the near side: Roark's net-section cubic on his nominal stress.
double roark_eccentric(double r_over_c, double c_over_w);
/// Kt gross at the near side by interpolation in Sjostrom's chart; `e_over_c` may
/// be infinite. Empty where the chart was not read.
std::optional<double> sjostrom_eccentric(double r_over_c, double e_over_c);
/// Kt gross at the near (B) and the far (C) side of a hole in a half plane.
double half_plane_near(double r_over_c);
double half_plane_far(double r_over_c);

// Two equal circular holes in an infinite plate, diameter d, centre distance L.

/// Kt gross by interpolation in Ling's table; empty outside L/d 1.5 to 8. `across`:
/// tension normal to the line of centres; `along`: parallel to it, at the crown;
/// `biaxial`: equal tension both ways, at the inner point.
enum class Pair { across, along, biaxial };
std::optional<double> ling(Pair pair, double l_over_d);
/// Kt gross, tension along the line of centres; x = d/L.
double two_along_fit(double x);
/// Infinite row: Kt on the net stress S / (1 - x), load normal to the row; x = d/L.
double row_across_fit(double x);
/// Infinite row: Kt gross, load along the row.
double row_along_fit(double x);

// Other shapes.

/// Largest edge stress over S on an ellipse in an infinite plate, a the longer
/// half axis, tension S at the angle beta (rad) to it: the largest value over
/// the eccentric angle of Inglis' stress on the edge, as given by S. P. Timoshenko and
/// J. N. Goodier, Theory of Elasticity, 3rd ed. (1970). Requires a_over_b > 1.
double inglis_inclined(double a_over_b, double beta);

/// Kt net of a central ellipse, a semi-axis across the load, b along it; x = 2a/W.
double roark_ellipse(double a_over_b, double x);
/// Kt gross of a slot of half length a across the load and end radius r: 1 + 2 sqrt(a/r).
double slot_estimate(double a_over_r);
/// Kt gross of a rectangular hole, half sides a across and b along the load, corner radius r.
double rounded_rectangle(double b_over_a, double r_over_b);
/// Kt of a square hole of side s under equal biaxial tension; empty outside r/s 0.05 to 0.5.
std::optional<double> rounded_square_biaxial(double r_over_s);

// A circular hole under pressure p, centre at c from a straight free edge; q = c/r > 1.

/// Largest tangential stress on the hole over p: (q^2 + 1) / (q^2 - 1).
double pressure_rim(double q);
/// Tangential stress on the straight edge opposite the hole over p: 4 / (q^2 - 1).
double pressure_edge(double q);
/// A ring of outer over inner radius b/a under inner pressure: (b^2 + a^2) / (b^2 - a^2).
double pressure_ring(double b_over_a);

}  // namespace raiser::validation
