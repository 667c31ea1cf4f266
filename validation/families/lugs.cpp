// Bars pulled by a pin in a hole near their end.
#include <array>
#include <optional>

#include "validation/families/list.hpp"
#include "validation/families/question.hpp"
#include "validation/published/edge_raisers.hpp"

namespace raiser::validation {

namespace {

using solver::Load;

constexpr double H = 100.0;  // mm, width of the bar

/// Pin and hole: nothing for a cosine pressure, otherwise what the diameter of
/// the hole exceeds that of the pin by, over the diameter.
struct Fit {
  const char* series;
  std::optional<double> clearance;
};
constexpr std::array fits{Fit{"cosine pressure", std::nullopt}, Fit{"contact, neat fit", 0.0},
                          Fit{"contact, clearance d/500", 0.002}};

/// Hole centre one width from the end, the bar held by a uniform pull three
/// widths on the other side.
Question lug_question(double x, const Fit& fit) {
  const double d = x * H, force = unit_stress * (H - d);
  solver::Problem problem{{4 * H, H, 1.0, {circle(d, {H, 0.0})}}, family_material, {}};
  Load pin;
  pin.kind = Load::Kind::pin;
  pin.name = "pin";
  pin.force = force;
  if (fit.clearance) pin.clearance = *fit.clearance * d;
  Load end = unit_load(Load::Kind::edge);
  end.edge = mesh::rectangle::left;
  end.stress = force / H;
  problem.loads = {pin, end};
  const Question question = settled(std::move(problem), largest_over(unit_stress));
  return fit.clearance ? no_finer_than(5e-4, question) : question;
}

}  // namespace

Family lug_pin() {
  Family f{"lug",
           "A28",
           "Lug: a bar of width H pulled by a pin in a hole of diameter d, H from its end",
           "d/H: diameter over width",
           "Kt on P/((H-d)t)",
           "a bar with three widths of shank under a uniform pull; largest edge stress over that of the net "
           "section; "
           "in contact a rigid pin without friction, the clearance under a net stress of E/2000",
           "a fit to photoelastic tests with real pins, whose clearance, friction and stiffness are not "
           "stated: the "
           "pressure decides. A cosine pressure gives 5 to 18 % less, a rigid pin without friction that fits "
           "neatly 2 "
           "to 26 % less, most where the hole is large; with a clearance of d/500 the source is met within 7 "
           "%: the pin "
           "then bears in the middle, as it will have done in the tests",
           1e-4,
           {},
           {}};
  for (const Fit& fit : fits) {
    for (const double x : {0.15, 0.2, 0.3, 0.4, 0.5, 0.6, 0.75})
      f.points.push_back(
          {fit.series, {{"d/H", x}}, {{Reference::lug, lug_net(x)}}, lug_question(x, fit), x == 0.4});
    f.curves.push_back({Reference::lug, fit.series, lug_net, 0.15, 0.75, false, {}});
  }
  return f;
}

}  // namespace raiser::validation
