// Cracks in a long strip of width W: K from the edge's or the middle's crack, and T.
#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "validation/families/list.hpp"
#include "validation/families/series.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::validation {

namespace {

using mesh::Crack;
using solver::Load;

constexpr double W = 100.0;       // mm
constexpr double length = 6 * W;  // of the strip
constexpr double s = unit_stress;

constexpr auto strip_reading =
    "a strip six widths long, uniform or linear traction on its ends, which are free to turn; interaction "
    "integral over rings about the tip";

/// Cracks across the load; x is the crack's or both cracks' share of the width.
std::vector<Crack> centre_crack(double x) {
  return {{"crack", {{0, -x * W / 2}, {0, x * W / 2}}, false, {}}};
}
std::vector<Crack> edge_crack(double x) { return {{"crack", {{0, W / 2}, {0, W / 2 - x * W}}, true, {}}}; }
std::vector<Crack> two_edge_cracks(double x) {
  const double depth = x * W / 2;
  return {{"upper", {{0, W / 2}, {0, W / 2 - depth}}, true, {}},
          {"lower", {{0, -W / 2}, {0, -W / 2 + depth}}, true, {}}};
}

/// Length a in the crack's own definition.
double half_length(double x) { return x * W / 2; }
double whole_length(double x) { return x * W; }

struct Specimen {
  std::vector<Crack> (*cracks)(double x);
  double (*a)(double x);
  Load::Kind load;
};
constexpr Specimen centre{centre_crack, half_length, Load::Kind::tension};
constexpr Specimen edge{edge_crack, whole_length, Load::Kind::tension};
constexpr Specimen edge_bent{edge_crack, whole_length, Load::Kind::bending};
constexpr Specimen two_edges{two_edge_cracks, half_length, Load::Kind::tension};

solver::Problem strip_with(const Specimen& specimen, double x) {
  auto problem = plate_under(length, W, {}, {specimen.load});
  problem.plate.cracks = specimen.cracks(x);
  return problem;
}

Question factor(const Specimen& specimen, double x) {
  return settled_tip(strip_with(specimen, x), k_one_over(s * std::sqrt(std::numbers::pi * specimen.a(x))));
}

Question t_over_stress(const Specimen& specimen, double x) {
  return settled_tip(strip_with(specimen, x), t_over(s), 0.0, solver::Quantity::t_stress);
}

/// A family of one series with F over the crack's share of the width.
Family factor_family(Family f, const Specimen& specimen, std::string_view parameter, std::vector<double> at,
                     std::vector<Source> sources, double from, double to) {
  f.reading = strip_reading;
  f.tolerance = 1e-6;
  add_series(f, {"",
                 parameter,
                 std::move(at),
                 {0.5},
                 [specimen](double x) { return factor(specimen, x); },
                 std::move(sources),
                 from,
                 to});
  return f;
}

const std::vector<double> tenths{0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9};
const std::vector<double> edge_depths{0.01, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8};

constexpr auto edge_deviation =
    "interpolations between the limits of small and deep cracks; the polynomial is not meant beyond 0.6";

}  // namespace

Family crack_centre_strip() {
  Family f;
  f.id = "crack-centre-strip";
  f.records = "B02";
  f.title = "Crack of length 2a in the middle of a strip of width W, tension";
  f.abscissa = "2a/W: crack length over width";
  f.ordinate = "F = K_I/(sigma sqrt(pi a))";
  f.deviation =
      "the secant stands on no theory and the tangent on an endless row of cracks; Isida's series is exact "
      "to "
      "its digits but for the last";
  return factor_family(std::move(f), centre, "2a/W", tenths,
                       {{Reference::centre_isida, centre_isida, tenths},
                        {Reference::centre_secant, centre_secant},
                        {Reference::centre_tada, centre_tada},
                        {Reference::centre_koiter, centre_koiter},
                        {Reference::centre_tangent, centre_tangent}},
                       0.01, 0.9);
}

Family crack_edge_strip() {
  Family f;
  f.id = "crack-edge-strip";
  f.records = "B03";
  f.title = "Crack of length a at the edge of a strip of width W, tension, ends free to turn";
  f.abscissa = "a/W: crack length over width";
  f.ordinate = "F = K_I/(sigma sqrt(pi a))";
  f.deviation = edge_deviation;
  return factor_family(std::move(f), edge, "a/W", edge_depths,
                       {{Reference::edge_tada, edge_tada},
                        {Reference::edge_polynomial, edge_polynomial},
                        {Reference::edge_tada_simple, edge_tada_simple}},
                       0.005, 0.8);
}

Family crack_edge_bending() {
  Family f;
  f.id = "crack-edge-bending";
  f.records = "B04";
  f.title = "Crack of length a at the edge of a strip of width W, bending in the plane";
  f.abscissa = "a/W: crack length over width";
  f.ordinate = "F = K_I/(sigma sqrt(pi a)), sigma = 6M/(t W^2)";
  f.deviation = edge_deviation;
  return factor_family(std::move(f), edge_bent, "a/W", edge_depths,
                       {{Reference::edge_bending_tada, edge_bending_tada},
                        {Reference::edge_bending_polynomial, edge_bending_polynomial}},
                       0.005, 0.8);
}

Family crack_two_edges() {
  Family f;
  f.id = "crack-two-edges";
  f.records = "B07";
  f.title = "Cracks of length a at both edges of a strip of width W, tension";
  f.abscissa = "2a/W: both cracks' length over width";
  f.ordinate = "F = K_I/(sigma sqrt(pi a))";
  f.deviation = "two interpolations between the same limits";
  return factor_family(
      std::move(f), two_edges, "2a/W", tenths,
      {{Reference::two_edges_tada, two_edges_tada}, {Reference::two_edges_benthem, two_edges_benthem}}, 0.01,
      0.9);
}

namespace {

/// Cracks of length a at one or both sides of a central hole of radius R.
Question cracked_hole(HoleCracks cracks, double radius, double a) {
  auto problem = plate_under(length, W, {circle(2 * radius)}, {Load::Kind::tension});
  problem.plate.cracks = {{"upper", {{0, radius}, {0, radius + a}}, true, {}}};
  if (cracks == HoleCracks::two)
    problem.plate.cracks.push_back({"lower", {{0, -radius}, {0, -radius - a}}, true, {}});
  return settled_tip(std::move(problem), k_one_over(s * std::sqrt(std::numbers::pi * a)));
}

}  // namespace

Family crack_hole_strip() {
  Family f{
      "crack-hole-strip",
      "B12",
      "One or two cracks of length a at a circular hole of radius R in the middle of a strip of width W, "
      "tension",
      "(R+a)/W: extent of hole and crack from the middle over the width",
      "F = K_I/(sigma sqrt(pi a))",
      strip_reading,
      "fits to the infinite plate, which are off by up to 5 % themselves, times a factor put together from "
      "the secants of the hole and of the crack",
      1e-5,
      {},
      {}};
  for (const HoleCracks cracks : {HoleCracks::one, HoleCracks::two})
    for (const double rho : {0.05, 0.1, 0.2}) {
      const bool is_one = cracks == HoleCracks::one;
      const auto form = [=](double extent) {
        const double a = extent - rho;
        return newman_hole(cracks, a / rho) * newman_width(cracks, rho, a);
      };
      std::vector<double> extents;
      for (const double q : {0.25, 0.5, 1.0, 2.0, 3.0})
        if (rho * (1 + q) <= 0.4 + 1e-12) extents.push_back(rho * (1 + q));
      const double last = extents.back();
      add_series(f, {fmt::format("{}, R/W {:g}", is_one ? "one" : "two", rho),
                     "(R+a)/W",
                     std::move(extents),
                     rho == 0.1 ? std::vector{0.2} : std::vector<double>{},
                     [=](double extent) { return cracked_hole(cracks, rho * W, (extent - rho) * W); },
                     {{is_one ? Reference::newman_strip_one : Reference::newman_strip_two, form}},
                     1.05 * rho,
                     last});
    }
  return f;
}

Family t_stress_strip() {
  Family f{"t-stress-strip",
           "B17",
           "T stress of cracks in a strip of width W",
           "x: 2a/W of the middle and of two edges, a/W of one edge",
           "T/sigma, gross; in bending the outer fibre's; off relative to sigma where T is smaller",
           strip_reading,
           "no published digits are known to us: finite elements of another code, read off the crack's faces",
           1e-5,
           {},
           {}};
  struct Line {
    const char* name;
    Cracked cracked;
    Specimen specimen;
  };
  const std::vector<Line> all{{"middle", Cracked::centre, centre},
                              {"one edge", Cracked::edge, edge},
                              {"one edge, bending", Cracked::edge_bending, edge_bent},
                              {"two edges", Cracked::two_edges, two_edges}};
  for (const Line& line : all) {
    const auto published = [cracked = line.cracked](double x) { return t_stress(cracked, x); };
    std::vector<double> entries;
    for (const double x : tenths)
      if (published(x)) entries.push_back(x);
    add_series(f, {line.name,
                   "x",
                   entries,
                   {0.5},
                   [specimen = line.specimen](double x) { return t_over_stress(specimen, x); },
                   {{Reference::t_stress, published, entries}},
                   0.1,
                   0.9,
                   {},
                   1.0});
  }
  return f;
}

}  // namespace raiser::validation
