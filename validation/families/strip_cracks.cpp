// Cracks in a long strip of width W: K from the edge's or the middle's crack, and T.
#include <cmath>
#include <numbers>

#include "validation/families/list.hpp"
#include "validation/families/question.hpp"
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

}  // namespace

Family crack_centre_strip() {
  Family f{"crack-centre-strip",
           "B02",
           "Crack of length 2a in the middle of a strip of width W, tension",
           "2a/W: crack length over width",
           "F = K_I/(sigma sqrt(pi a))",
           strip_reading,
           "the secant stands on no theory and the tangent on an endless row of cracks; Isida's series is "
           "exact to its "
           "digits but for the last",
           1e-6,
           {},
           {}};
  for (const double x : {0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9})
    f.points.push_back({"",
                        {{"2a/W", x}},
                        {{Reference::centre_isida, *centre_isida(x)},
                         {Reference::centre_secant, centre_secant(x)},
                         {Reference::centre_tada, centre_tada(x)},
                         {Reference::centre_koiter, centre_koiter(x)},
                         {Reference::centre_tangent, centre_tangent(x)}},
                        factor(centre, x),
                        x == 0.5});
  f.curves = {{Reference::centre_isida,
               "",
               centre_isida,
               0.1,
               0.9,
               true,
               {0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9}},
              {Reference::centre_secant, "", centre_secant, 0.01, 0.9, false, {}},
              {Reference::centre_tada, "", centre_tada, 0.01, 0.9, false, {}},
              {Reference::centre_koiter, "", centre_koiter, 0.01, 0.9, false, {}},
              {Reference::centre_tangent, "", centre_tangent, 0.01, 0.9, false, {}}};
  return f;
}

Family crack_edge_strip() {
  Family f{
      "crack-edge-strip",
      "B03",
      "Crack of length a at the edge of a strip of width W, tension, ends free to turn",
      "a/W: crack length over width",
      "F = K_I/(sigma sqrt(pi a))",
      strip_reading,
      "interpolations between the limits of small and deep cracks; the polynomial is not meant beyond 0.6",
      1e-6,
      {},
      {}};
  for (const double x : {0.01, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8})
    f.points.push_back({"",
                        {{"a/W", x}},
                        {{Reference::edge_tada, edge_tada(x)},
                         {Reference::edge_polynomial, edge_polynomial(x)},
                         {Reference::edge_tada_simple, edge_tada_simple(x)}},
                        factor(edge, x),
                        x == 0.5});
  f.curves = {{Reference::edge_tada, "", edge_tada, 0.005, 0.8, false, {}},
              {Reference::edge_polynomial, "", edge_polynomial, 0.005, 0.8, false, {}},
              {Reference::edge_tada_simple, "", edge_tada_simple, 0.005, 0.8, false, {}}};
  return f;
}

Family crack_edge_bending() {
  Family f{
      "crack-edge-bending",
      "B04",
      "Crack of length a at the edge of a strip of width W, bending in the plane",
      "a/W: crack length over width",
      "F = K_I/(sigma sqrt(pi a)), sigma = 6M/(t W^2)",
      strip_reading,
      "interpolations between the limits of small and deep cracks; the polynomial is not meant beyond 0.6",
      1e-6,
      {},
      {}};
  for (const double x : {0.01, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8})
    f.points.push_back({"",
                        {{"a/W", x}},
                        {{Reference::edge_bending_tada, edge_bending_tada(x)},
                         {Reference::edge_bending_polynomial, edge_bending_polynomial(x)}},
                        factor(edge_bent, x),
                        x == 0.5});
  f.curves = {{Reference::edge_bending_tada, "", edge_bending_tada, 0.005, 0.8, false, {}},
              {Reference::edge_bending_polynomial, "", edge_bending_polynomial, 0.005, 0.8, false, {}}};
  return f;
}

Family crack_two_edges() {
  Family f{"crack-two-edges",
           "B07",
           "Cracks of length a at both edges of a strip of width W, tension",
           "2a/W: both cracks' length over width",
           "F = K_I/(sigma sqrt(pi a))",
           strip_reading,
           "two interpolations between the same limits",
           1e-6,
           {},
           {}};
  for (const double x : {0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9})
    f.points.push_back({"",
                        {{"2a/W", x}},
                        {{Reference::two_edges_tada, two_edges_tada(x)},
                         {Reference::two_edges_benthem, two_edges_benthem(x)}},
                        factor(two_edges, x),
                        x == 0.5});
  f.curves = {{Reference::two_edges_tada, "", two_edges_tada, 0.01, 0.9, false, {}},
              {Reference::two_edges_benthem, "", two_edges_benthem, 0.01, 0.9, false, {}}};
  return f;
}

Family t_stress_strip() {
  Family f{"t-stress-strip",
           "B17",
           "T stress of cracks in a strip of width W",
           "x: 2a/W of the middle and of two edges, a/W of one edge",
           "T/sigma, gross; in bending the outer fibre's",
           strip_reading,
           "no published digits are known to us: finite elements of another code, read off the crack's faces",
           3e-3,
           {},
           {}};
  struct Series {
    const char* name;
    Cracked cracked;
    Specimen specimen;
    double last;
  };
  const std::vector<Series> all{{"middle", Cracked::centre, centre, 0.9},
                                {"one edge", Cracked::edge, edge, 0.8},
                                {"one edge, bending", Cracked::edge_bending, edge_bent, 0.8},
                                {"two edges", Cracked::two_edges, two_edges, 0.9}};
  for (const Series& series : all) {
    std::vector<double> entries;
    for (int k = 1; k < 10; ++k) {
      const double x = k / 10.0;
      const auto published = t_stress(series.cracked, x);
      if (!published || x > series.last + 1e-9) continue;
      entries.push_back(x);
      f.points.push_back({series.name,
                          {{"x", x}},
                          {{Reference::t_stress, *published}},
                          t_over_stress(series.specimen, x),
                          k == 5});
    }
    f.curves.push_back({Reference::t_stress, series.name,
                        [c = series.cracked](double x) { return t_stress(c, x); }, 0.1, 0.9, true, entries});
  }
  return f;
}

}  // namespace raiser::validation
