#include "validation/independent.hpp"

#include "mesh/plate/build.hpp"
#include "mesh/plate/shoulder.hpp"

namespace raiser::validation {

namespace {

using mesh::Hole;
using mesh::HoleShape;
using mesh::Point;
using solver::Load;

constexpr double width = 100.0;    // mm
constexpr double nominal = 100.0;  // MPa
constexpr auto integral = "boundary integral equation (Sherman-Lauricella), spectral panels";
constexpr auto potentials = "complex potentials with boundary collocation";

Hole circle(const char* name, double diameter, const Point& centre) {
  return {name, HoleShape::circle, diameter, diameter, 0.0, centre, 0.0};
}

Load load(Load::Kind kind) {
  Load result;
  result.kind = kind;
  result.name = solver::word(kind);
  result.stress = nominal;
  return result;
}

solver::Problem plate(double length, std::vector<Hole> holes, Load::Kind kind) {
  return {{length, width, 1.0, std::move(holes)}, {200e3, 0.3, solver::PlaneState::stress}, {load(kind)}};
}

/// Strip with U notches of depth 10 mm and root radius 3 mm on the given edges.
solver::Problem notched(const std::vector<std::size_t>& edges, Load::Kind kind) {
  solver::Problem problem = plate(4 * width, {}, kind);
  std::vector<mesh::Notch> notches;
  for (const std::size_t edge : edges)
    notches.push_back({edge == mesh::rectangle::top ? "upper" : "lower", mesh::NotchShape::u, edge, 0.0, 10.0,
                       3.0, 0.0, 0.0});
  problem.plate.outline = mesh::with_notches(mesh::rectangular(4 * width, width), notches).outline;
  return problem;
}

/// Bar that steps at x = 0 from 100 mm to 50 mm with fillets of 5 mm.
solver::Problem stepped() {
  solver::Problem problem = plate(6 * width, {}, Load::Kind::tension);
  mesh::Shoulder shoulder;
  shoulder.name = "step";
  shoulder.width = 50.0;
  shoulder.fillet.radius = 5.0;
  problem.plate.outline = mesh::stepped_bar(6 * width, width, {shoulder}).outline;
  return problem;
}

}  // namespace

std::vector<Independent> independent_values() {
  const auto strip = [](std::vector<Hole> holes, Load::Kind kind = Load::Kind::tension) {
    return plate(4 * width, std::move(holes), kind);
  };
  const auto square = [](std::vector<Hole> holes, Load::Kind kind) {
    return plate(width, std::move(holes), kind);
  };
  const Point o(0, 0);
  // Ellipse: 30 mm across the load, 6 mm along it. Square: side 30 mm, corners 3 mm.
  const Hole ellipse{"slim", HoleShape::ellipse, 6.0, 30.0, 0.0, o, 0.0};
  const Hole rounded{"square", HoleShape::rounded_rectangle, 30.0, 30.0, 3.0, o, 0.0};
  const std::vector<Hole> two{circle("lower", 15.0, {0, -11.25}), circle("upper", 15.0, {0, 11.25})};
  return {
      {"circle d/W 0.5, tension",
       strip({circle("hole", 50.0, o)}),
       0,
       4.347604140255796,
       4.3e-9,
       nominal,
       {0, 25},
       integral},
      {"circle d/W 0.2, tension",
       strip({circle("hole", 20.0, o)}),
       0,
       3.152567379190871,
       3.2e-9,
       nominal,
       {0, 10},
       integral},
      {"ellipse a/b 5, 2a/W 0.3, tension",
       strip({ellipse}),
       0,
       11.740829375048403,
       1.2e-8,
       nominal,
       {0, 15},
       integral},
      {"two circles across, L/d 1.5, tension",
       strip(two),
       1,
       3.4294002956759786,
       3.4e-9,
       nominal,
       {0, 3.75},
       integral},
      {"circle d/W 0.4 in a square, shear",
       square({circle("hole", 40.0, o)}, Load::Kind::shear),
       0,
       6.485817443064231,
       6.5e-9,
       nominal,
       {14.142135622, -14.142135622},
       potentials},
      {"circle d/W 0.4, 0.1 W off centre, bending",
       strip({circle("hole", 40.0, {0, 10})}, Load::Kind::bending),
       0,
       1.7388506893534417,
       1.7e-9,
       nominal,
       {0, 30},
       potentials},
      {"rounded square, r/side 0.1, tension",
       strip({rounded}),
       0,
       4.110089444727601,
       2.1e-8,
       nominal,
       {12.725039349, -14.911068178},
       integral},
      {"circle d/W 0.4 in a square, pressure",
       square({circle("hole", 40.0, o)}, Load::Kind::pressure),
       0,
       1.4054519010890276,
       7e-9,
       nominal,
       {14.142135622, -14.142135622},
       integral},
      {"opposite U notches, t/W 0.1, r/t 0.3, tension",
       notched({mesh::rectangle::top, mesh::rectangle::bottom}, Load::Kind::tension),
       0,
       4.893650590325094,
       2.4e-8,
       nominal,
       {0, 40},
       integral},
      {"one U notch, t/W 0.1, r/t 0.3, bending",
       notched({mesh::rectangle::top}, Load::Kind::bending),
       0,
       4.545338836215904,
       1.8e-7,
       nominal,
       {0, 40},
       integral},
      {"stepped bar, D/d 2, r/d 0.1, tension",
       stepped(),
       0,
       2.505669868509453,
       1.3e-8,
       nominal,
       {3.333894531, 25.285756416},
       integral},
  };
}

}  // namespace raiser::validation
