// Endless rows of holes: one hole in a cell as wide as the pitch, between lines
// of symmetry.
#include <cmath>
#include <numbers>

#include "mesh/triangulate/triangulate.hpp"
#include "solver/adapt/sequence.hpp"
#include "validation/families/list.hpp"
#include "validation/families/series.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::validation {

namespace {

constexpr double pitch = 100.0;  // mm, along x
constexpr double height =
    8.0 * pitch;  // of the cell; what differs from the far field fades as exp(-2 pi y/L)

/// A quarter of the cell; its side x = pitch/2 is a line of symmetry too.
mesh::Region quarter_cell(const mesh::Plate& plate) {
  mesh::Region region = mesh::cut(mesh::trace(plate), {true, true});
  for (mesh::Loop& loop : region.loops)
    for (mesh::Curve& curve : loop)
      if (curve.owner == mesh::Owner{mesh::Owner::Kind::edge, mesh::rectangle::right})
        curve.owner = {mesh::Owner::Kind::mirror_x, 0};
  return region;
}

/// Solves a cell under a traction that is even in x and y. Without lateral
/// contraction the sides that stay straight need no force to do so: the far
/// field is that of the endless row's plate, whatever its Poisson's ratio.
Ours in_cell(const mesh::Plate& plate, const solver::Traction& traction, const solver::Ask& ask,
             double nominal) {
  solver::HookeLaw material = family_material;
  material.poissons_ratio = 0.0;
  mesh::SizeRule rule;
  rule.growth = rule.crack_growth = 0.7;
  rule.tip_sectors = 8;
  rule.tip_ratio = 0.15;
  rule.tip_rings = 7;
  using Parity = solver::UnitLoad::Parity;
  const solver::Model model(mesh::triangulate(quarter_cell(plate), rule), {true, true}, material,
                            plate.thickness, {{"cell", traction, Parity::even, Parity::even}});
  return with_rising_degree(model, plate, ask, nominal);
}

/// A hole of the diameter x pitches; `add` comes on top of the edge stress, MPa.
Question hole_in_cell(double x, const solver::Traction& traction, double add, double nominal) {
  return [=](double tolerance) {
    const mesh::Plate plate{pitch, height, 1.0, {circle(x * pitch)}};
    Ours ours = in_cell(plate, traction, {solver::Quantity::largest_edge_stress, 0, tolerance, ""}, nominal);
    if (ours.value) ours.value->value += add / nominal;
    return ours;
  };
}

bool is_hole(const mesh::Owner& owner) { return owner.kind == mesh::Owner::Kind::raiser; }

}  // namespace

Family row_across() {
  Family f{"row-across",
           "A13",
           "Endless row of circular holes of diameter d, pitch L, tension across the row",
           "d/L: diameter over pitch",
           "Kt net, on S/(1-d/L)",
           "one hole between lines of symmetry half a pitch away, in a cell eight pitches high; largest edge "
           "stress "
           "over the net stress",
           "a cubic fitted to a chart",
           1e-5,
           {},
           {}};
  for (const double x : {0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8}) {
    const auto pull = [](const mesh::Owner& owner, const Point&, const Point& n) -> Point {
      return is_hole(owner) ? Point(Point::Zero()) : Point(unit_stress * n);
    };
    f.points.push_back({"",
                        {{"d/L", x}},
                        {{Reference::row_across_fit, row_across_fit(x)}},
                        hole_in_cell(x, pull, 0.0, unit_stress / (1 - x)),
                        x == 0.5});
  }
  f.curves.push_back({Reference::row_across_fit, "", row_across_fit, 0.0, 0.8, false, {}});
  return f;
}

Family row_along() {
  Family f{"row-along",
           "A13",
           "Endless row of circular holes of diameter d, pitch L, tension along the row",
           "d/L: diameter over pitch",
           "Kt gross",
           "one hole between lines of symmetry half a pitch away, in a cell eight pitches high: the uniform "
           "tension, and "
           "the stress that takes its traction off the hole; both are largest at the crown",
           "a cubic fitted to a chart; it is 4 to 5 % low from d/L 0.7",
           1e-5,
           {},
           {}};
  for (const double x : {0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8}) {
    const auto relieve = [](const mesh::Owner& owner, const Point&, const Point& n) -> Point {
      return is_hole(owner) ? Point(-unit_stress * n.x(), 0.0) : Point(Point::Zero());
    };
    f.points.push_back({"",
                        {{"d/L", x}},
                        {{Reference::row_along_fit, row_along_fit(x)}},
                        hole_in_cell(x, relieve, unit_stress, unit_stress),
                        x == 0.5});
  }
  f.curves.push_back({Reference::row_along_fit, "", row_along_fit, 0.0, 0.8, false, {}});
  return f;
}

namespace {

/// A crack of length x pitches under tension across.
Question crack_in_cell(double x) {
  return [x](double tolerance) {
    const double a = x * pitch / 2;
    mesh::Plate plate{pitch, height, 1.0, {}};
    plate.cracks = {{"crack", {{-a, 0}, {a, 0}}, false, {}}};
    const auto pull = [](const mesh::Owner& owner, const Point&, const Point& n) -> Point {
      return owner == mesh::Owner{mesh::Owner::Kind::edge, mesh::rectangle::top} ? Point(unit_stress * n)
                                                                                 : Point(Point::Zero());
    };
    return in_cell(plate, pull, {solver::Quantity::stress_intensity, 0, tolerance, ""},
                   unit_stress * std::sqrt(std::numbers::pi * a));
  };
}

}  // namespace

Family crack_row() {
  Family f{"crack-row",
           "B13",
           "Endless row of cracks of length 2a on a line, centres 2e apart, infinite plate, tension across",
           "a/e: crack length over distance of centres",
           "F = K_I/(sigma sqrt(pi a))",
           "one crack between lines of symmetry half a pitch away, in a cell eight pitches high; interaction "
           "integral over rings about the tip",
           "the source is exact: rounding and the bound only",
           5e-7,
           {},
           {}};
  add_series(f, {"",
                 "a/e",
                 {0.1, 0.3, 0.5, 0.7, 0.9},
                 {0.5},
                 crack_in_cell,
                 {{Reference::collinear_row, collinear_row}},
                 0.05,
                 0.92});
  return f;
}

}  // namespace raiser::validation
