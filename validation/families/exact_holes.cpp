// Holes in an infinite plate: the exact traction acts on the outline of a
// finite one, so that the closed form is the exact answer of the plate solved.
#include <fmt/format.h>

#include <array>
#include <numbers>

#include "validation/families/list.hpp"
#include "validation/families/question.hpp"

namespace raiser::validation {

namespace {

constexpr double many_digits = 1e-8;
constexpr double a = 10.0;  // mm, half the hole's longer axis
constexpr double s = unit_stress;

constexpr auto exact_reading =
    "a plate of finite size on whose outline the exact traction of the infinite plate's field acts; "
    "largest edge stress over the remote stress";
constexpr auto exact_deviation = "the sources are exact: rounding and the bound only";

/// A hole of half axes a and a / ratio in a square plate.
mesh::Plate square_plate(double ratio, double angle = 0.0) {
  auto hole =
      sized_hole(ratio == 1 ? mesh::HoleShape::circle : mesh::HoleShape::ellipse, 2 * a, 2 * a / ratio);
  hole.angle = angle;
  return {6 * a, 6 * a, 1.0, {hole}};
}

Question ellipse_question(double ratio, const RemoteStress& remote) {
  const Ellipse ellipse{a, a / ratio};
  return exact_field(
      square_plate(ratio), [remote, ellipse](const Point& x) { return inglis(remote, ellipse, x); },
      solver::Quantity::largest_edge_stress, s);
}

}  // namespace

Family circle_infinite() {
  Family f{"circle-infinite",
           "A01",
           "Circular hole, infinite plate, stress S one way and lambda S the other",
           "lambda: the second remote stress over the first",
           "Kt gross, at the end of the diameter across S",
           exact_reading,
           exact_deviation,
           many_digits,
           {},
           {}};
  for (const double lambda : {-1.0, -0.5, 0.0, 0.5, 1.0}) {
    const RemoteStress remote{s, lambda * s, 0.0};
    const auto field = [remote](const Point& x) { return kirsch(remote, a, x); };
    f.points.push_back({"",
                        {{"lambda", lambda}},
                        {{Reference::kirsch, 3 - lambda}},
                        exact_field(square_plate(1.0), field, solver::Quantity::largest_edge_stress, s),
                        lambda <= 0});
  }
  f.curves.push_back({Reference::kirsch, "", [](double x) { return 3 - x; }, -1, 1, false, {}});
  return f;
}

Family ellipse_infinite() {
  Family f{
      "ellipse-infinite",
      "A07",
      "Elliptical hole, infinite plate, tension across the axis 2a, with and without equal tension along it",
      "a/b: half axis across the tension over the other",
      "Kt gross, at the end of a",
      exact_reading,
      exact_deviation,
      many_digits,
      {},
      {}};
  for (const bool is_biaxial : {false, true}) {
    const std::string series = is_biaxial ? "equal tension both ways" : "tension across 2a";
    const double second = is_biaxial ? 1.0 : 0.0;
    for (const double ratio : {1.0, 2.0, 5.0, 10.0, 20.0})
      f.points.push_back({series,
                          {{"a/b", ratio}},
                          {{Reference::inglis, 1 + 2 * ratio - second}},
                          ellipse_question(ratio, {second * s, s, 0.0}),
                          ratio == 5});
    f.curves.push_back(
        {Reference::inglis, series, [second](double x) { return 1 + 2 * x - second; }, 1, 20, false, {}});
  }
  return f;
}

Family ellipse_inclined() {
  Family f{"ellipse-inclined",
           "A08",
           "Elliptical hole, infinite plate, tension at the angle beta to the axis 2a",
           "beta, degrees: angle between tension and the axis 2a",
           "Kt gross, largest edge stress",
           exact_reading,
           exact_deviation,
           many_digits,
           {},
           {}};
  for (const double ratio : {2.0, 5.0, 10.0}) {
    const std::string series = fmt::format("a/b {:g}", ratio);
    for (const double degrees : {0.0, 30.0, 45.0, 60.0, 90.0}) {
      const double beta = degrees * std::numbers::pi / 180;
      f.points.push_back({series,
                          {{"beta", degrees}, {"a/b", ratio}},
                          {{Reference::inglis, inglis_inclined(ratio, beta)}},
                          ellipse_question(ratio, turned({s, 0.0, 0.0}, -beta)),
                          degrees == 45 && ratio == 5});
    }
    f.curves.push_back({Reference::inglis,
                        series,
                        [ratio](double x) { return inglis_inclined(ratio, x * std::numbers::pi / 180); },
                        0,
                        90,
                        false,
                        {}});
  }
  return f;
}

Family pressure_infinite() {
  Family f{"pressure-infinite",
           "A29",
           "Circular and elliptical hole under pressure p, infinite plate",
           "a/b: longer half axis over the shorter",
           "largest edge stress over p",
           exact_reading,
           exact_deviation,
           many_digits,
           {},
           {}};
  for (const double ratio : {1.0, 2.0, 3.0, 5.0}) {
    const Ellipse ellipse{a, a / ratio};
    const auto field = [ellipse](const Point& x) {
      const bool is_circle = ellipse.along_x == ellipse.along_y;
      return is_circle ? lame(s, ellipse.along_x, x) : inglis_pressure(s, ellipse, x);
    };
    const Reference source = ratio == 1 ? Reference::pressure_infinite : Reference::pressure_ellipse;
    f.points.push_back({"",
                        {{"a/b", ratio}},
                        {{source, 2 * ratio - 1}},
                        exact_field(square_plate(ratio), field, solver::Quantity::largest_edge_stress, s),
                        ratio < 3});
  }
  f.curves.push_back({Reference::pressure_ellipse, "", [](double x) { return 2 * x - 1; }, 1, 5, false, {}});
  return f;
}

}  // namespace raiser::validation
