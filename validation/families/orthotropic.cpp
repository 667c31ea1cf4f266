// A circular hole in an orthotropic sheet, tension along its axis 1.
#include <cmath>

#include "validation/families/list.hpp"
#include "validation/families/question.hpp"
#include "validation/published/edge_raisers.hpp"

namespace raiser::validation {

namespace {

/// Figures as usual for such laminates; moduli in GPa.
struct Sheet {
  const char* name;
  double e1, e2, g12, nu12;

  solver::HookeLaw law() const {
    return {1e3 * e1, nu12, solver::PlaneState::stress, solver::Orthotropy{1e3 * e2, 1e3 * g12, 0.0}};
  }
  double infinite() const { return lekhnitskii_factor(law()); }
};

const std::vector<Sheet>& sheets() {
  static const std::vector<Sheet> list{{"carbon fibres along", 138, 9, 6.9, 0.3},
                                       {"glass fibres along", 38.6, 8.27, 4.14, 0.26},
                                       {"isotropic", 200, 200, 200 / 2.6, 0.3},
                                       {"carbon fibres across", 9, 138, 6.9, 0.3 * 9 / 138}};
  return list;
}

}  // namespace

Family orthotropic_infinite() {
  Family f{"orthotropic-infinite",
           "A31",
           "Circular hole in an infinite orthotropic sheet (E2 10 GPa, G12 5 GPa, nu12 0.25), tension along "
           "its axis 1",
           "E1/E2",
           "Kt gross, at the side of the hole",
           "a plate of finite size on whose outline the exact traction of Lekhnitskii's field acts; largest "
           "edge stress "
           "over the remote stress",
           "the formula is exact: rounding and the bound only",
           5e-7,
           {},
           {}};
  constexpr double radius = 10.0;
  for (const double ratio : {2.0, 4.0, 8.0, 15.0}) {
    const solver::HookeLaw law = Sheet{"", 10 * ratio, 10, 5, 0.25}.law();
    const Lekhnitskii field(law, {unit_stress, 0.0, 0.0}, {radius, radius});
    f.points.push_back({"",
                        {{"E1/E2", ratio}},
                        {{Reference::orthotropic_circle, lekhnitskii_factor(law)}},
                        exact_field(
                            {6 * radius, 6 * radius, 1.0, {circle(2 * radius)}},
                            [field](const Point& x) { return field.at(x); },
                            solver::Quantity::largest_edge_stress, unit_stress, law),
                        ratio == 8});
  }
  f.curves.push_back({Reference::orthotropic_circle,
                      "",
                      [](double x) {
                        return lekhnitskii_factor(Sheet{"", 10 * x, 10, 5, 0.25}.law());
                      },
                      1.0,
                      15.0,
                      false,
                      {}});
  return f;
}

Family orthotropic_strip_tension() {
  Family f{
      "orthotropic-strip",
      "A32",
      "Circular hole of diameter d in an orthotropic strip of width W, tension along its axis 1",
      "d/W: diameter over width",
      "Kt gross",
      "a strip eight widths long, uniform traction on its ends; largest edge stress over the gross stress",
      "the formula takes the isotropic strip by Heywood and corrects it for the infinite sheet's Kt; for "
      "sheets "
      "stiffer across than along the correction has the wrong sign",
      1e-5,
      {},
      {}};
  constexpr double width = 100.0;
  for (const Sheet& sheet : sheets()) {
    for (const double x : {0.1, 0.2, 0.3, 0.4, 0.5}) {
      auto problem = plate_under(8 * width, width, {circle(x * width)}, {solver::Load::Kind::tension});
      problem.material = sheet.law();
      f.points.push_back({sheet.name,
                          {{"d/W", x}},
                          {{Reference::orthotropic_strip, orthotropic_strip(sheet.infinite(), x)}},
                          settled(std::move(problem), largest_over(unit_stress)),
                          x == 0.4 && sheet.e1 == 138});
    }
    f.curves.push_back({Reference::orthotropic_strip,
                        sheet.name,
                        [kt = sheet.infinite()](double x) { return orthotropic_strip(kt, x); },
                        0.02,
                        0.5,
                        false,
                        {}});
  }
  return f;
}

}  // namespace raiser::validation
