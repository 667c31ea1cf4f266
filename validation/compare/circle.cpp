#include <algorithm>
#include <cmath>
#include <optional>

#include "validation/compare/families.hpp"

namespace raiser::validation {

namespace {

std::vector<Comparison> central(const Situation& s, const Strip& strip) {
  const double x = 2 * strip.half_across / strip.width, net = strip.stress / (1 - x);
  const std::vector<Parameter> parameters{{"d/W", x}};
  const std::vector<Effect> effects{ends(strip), neighbours(s)};
  std::vector<Comparison> rows;
  const auto add = [&](Reference reference, double factor) {
    rows.push_back(row(s, reference, "Kt net", factor, net, parameters, effects));
  };
  if (const auto factor = howland(x)) add(Reference::howland, *factor);
  add(Reference::heywood, heywood(x));
  add(Reference::roark_circle, roark_circle(x));
  add(Reference::peterson_circle, peterson_circle(x));
  return rows;
}

/// How much the far edge of a strip disturbs the half plane's solution: fitted
/// to converged finite elements at c/W 0.1 and 0.2, r/c 0.2 to 0.7.
Effect far_edge(const Strip& strip) {
  const double q = strip.half_across / strip.near;
  return {"the far edge is not far away", 2 * strip.near / strip.width * q * q};
}

std::vector<Comparison> eccentric(const Situation& s, const Strip& strip) {
  const double q = strip.half_across / strip.near, share = strip.near / strip.width;
  const std::vector<Parameter> parameters{{"r/c", q}};
  const std::vector<Effect> effects{ends(strip), neighbours(s)};
  std::vector<Comparison> rows;
  const auto chart = sjostrom_eccentric(q, strip.far / strip.near);
  if (chart) {
    rows.push_back(
        row(s, Reference::sjostrom_eccentric, "Kt gross", *chart, strip.stress, parameters, effects));
  }
  rows.push_back(row(s, Reference::roark_eccentric, "Kt gross", roark_eccentric(q, share), strip.stress,
                     parameters, effects));
  if (share <= 0.25) {
    rows.push_back(row(s, Reference::half_plane, "Kt gross", half_plane_near(q), strip.stress, parameters,
                       {ends(strip), neighbours(s), far_edge(strip)}));
  }
  return rows;
}

std::vector<Comparison> bending(const Situation& s) {
  const Strip strip = lengthwise(s, s.bending);
  if (!strip.central()) return {};
  const double x = 2 * strip.half_across / strip.width;
  return {row(s, Reference::bending_circle, "Kt at the hole's edge", bending_factor,
              std::abs(s.bending) * bending_nominal(x), {{"d/W", x}}, {ends(strip), neighbours(s)})};
}

/// The edge distances in ascending order, mm.
std::vector<double> edge_distances(const Situation& s) {
  const auto& p = s.plate;
  const auto& c = s.shape().centre;
  std::vector<double> list{p.length / 2 - c.x(), p.length / 2 + c.x(), p.width / 2 - c.y(),
                           p.width / 2 + c.y()};
  std::sort(list.begin(), list.end());
  return list;
}

std::vector<Comparison> pressure(const Situation& s) {
  const double r = s.shape().length / 2;
  std::vector<Comparison> rows{row(s, Reference::pressure_infinite, "edge stress / p", 1.0, s.pressure, {},
                                   {edges(s), neighbours(s)})};
  const auto c = edge_distances(s);
  if (c[1] >= 2 * c[0]) {
    const double q = c[0] / r, share = r / c[1];
    const Effect others{"the other edges are not far away", 2.6 * share * share};
    rows.push_back(row(s, Reference::pressure_half_plane, "edge stress / p", pressure_rim(q), s.pressure,
                       {{"c/r", q}}, {others, neighbours(s)}));
  }
  return rows;
}

/// Any uniform remote stress, with or without pressure: the closed form.
std::vector<Comparison> uniform(const Situation& s) {
  const double r = s.shape().length / 2;
  const auto [low, high] = inglis_extremes(s.remote, {r, r});
  const double largest = high + s.pressure, smallest = low + s.pressure;
  const double value = std::abs(largest) >= std::abs(smallest) ? largest : smallest;
  if (value == 0) return {};
  const bool only_shear = s.uniform() && s.remote.xx == 0 && s.remote.yy == 0;
  const double nominal = only_shear ? std::abs(s.remote.xy) : std::copysign(1.0, value);
  return {row(s, Reference::kirsch, only_shear ? "Kt gross" : "peak edge stress, MPa", value / nominal,
              nominal, {}, {edges(s), neighbours(s)})};
}

}  // namespace

std::vector<Comparison> compare_circle(const Situation& s) {
  if (neighbours(s).size > 0.1) return {};
  const bool remote = s.remote.xx != 0 || s.remote.yy != 0 || s.remote.xy != 0;
  if (s.bending != 0) return remote || s.pressure != 0 ? std::vector<Comparison>{} : bending(s);
  if (s.uniaxial()) return strip(s).central() ? central(s, strip(s)) : eccentric(s, strip(s));
  return remote ? uniform(s) : pressure(s);
}

}  // namespace raiser::validation
