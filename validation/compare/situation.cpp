#include "validation/compare/situation.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "mesh/plate/distance.hpp"

namespace raiser::validation {

namespace {

double largest_half(const mesh::Hole& hole) { return 0.5 * std::max(hole.length, hole.width); }

Strip strip_of(const Situation& s, bool along_x, double stress) {
  const auto& hole = s.shape();
  const double width = along_x ? s.plate.width : s.plate.length;
  const double length = along_x ? s.plate.length : s.plate.width;
  const double offset = std::abs(along_x ? hole.centre.y() : hole.centre.x());
  const double station = std::abs(along_x ? hole.centre.x() : hole.centre.y());
  const double in_x = half_extent(hole, Point::UnitX()), in_y = half_extent(hole, Point::UnitY());
  const double across = along_x ? in_y : in_x, along = along_x ? in_x : in_y;
  return {along_x,
          stress,
          width,
          width / 2 - offset,
          width / 2 + offset,
          across,
          along,
          length / 2 - station - along};
}

std::string percent(double ratio) {
  return ratio < 0.1 ? fmt::format("{:.2g} %", 100 * ratio) : fmt::format("{:.0f} %", 100 * ratio);
}

}  // namespace

bool Situation::uniform() const { return bending == 0 && pressure == 0; }

bool Situation::uniaxial() const {
  return uniform() && remote.xy == 0 && (remote.xx == 0) != (remote.yy == 0);
}

Strip strip(const Situation& s) {
  const bool along_x = s.remote.xx != 0;
  return strip_of(s, along_x, along_x ? s.remote.xx : s.remote.yy);
}

Strip lengthwise(const Situation& s, double stress) { return strip_of(s, true, stress); }

Effect edges(const Situation& s, double factor) {
  const auto& centre = s.shape().centre;
  const double nearest =
      std::min(s.plate.length / 2 - std::abs(centre.x()), s.plate.width / 2 - std::abs(centre.y()));
  const double share = largest_half(s.shape()) / nearest;
  return {fmt::format("the plate is not infinite (the hole takes {} of the way to the nearest edge)",
                      percent(share)),
          factor * share * share};
}

Effect edges(const Situation& s) {
  if (s.remote.xy != 0) return edges(s, 4.0);
  return edges(s, s.pressure != 0 ? 2.6 : 1.3);
}

Effect neighbours(const Situation& s, std::size_t partner) {
  double sum = 0.0;
  for (std::size_t i = 0; i < s.plate.holes.size(); ++i) {
    if (i == s.hole || i == partner) continue;
    const auto& other = s.plate.holes[i];
    const double ratio = largest_half(other) / (other.centre - s.shape().centre).norm();
    sum += 2.6 * ratio * ratio;
  }
  return {"other holes are not far away", sum};
}

Effect ends(double end, double width, std::string_view what, double needed) {
  const double share = end / width;
  if (share >= needed) return {};
  return {fmt::format("the strip is not long (the loaded end is {:.2g} widths from the {}, {} needed)", share,
                      what, needed),
          std::exp(-4.2 * std::max(0.0, share))};
}

Effect ends(const Strip& strip) { return ends(strip.end, strip.width, "hole"); }

Effect other_raisers(const mesh::Plate& plate, const Point& place, const std::vector<std::size_t>& own) {
  double sum = 0.0;
  for (std::size_t i = 0; i < mesh::raiser_count(plate); ++i) {
    if (std::find(own.begin(), own.end(), i) != own.end()) continue;
    const mesh::Raiser other = mesh::raiser(plate, i);
    double half = other.radius;
    if (i < plate.holes.size()) half = largest_half(plate.holes[i]);
    if (other.notch) half = std::max(other.notch->depth, other.notch->width / 2);
    const double ratio = half / (other.root - place).norm();
    sum += 2.6 * ratio * ratio;
  }
  return {"other raisers are not far away", sum};
}

namespace {

/// Effects are estimated by their leading term, which says nothing beyond.
constexpr double largest_estimate = 0.3;

std::string range_note(const Published& record, const std::vector<Parameter>& parameters,
                       const std::vector<Effect>& effects) {
  std::string note;
  const auto say = [&note](const std::string& text) { note += (note.empty() ? "" : "; ") + text; };
  for (const Limit& limit : record.limits) {
    const auto has = [&limit](const Parameter& p) { return p.name == limit.parameter; };
    const auto found = std::find_if(parameters.begin(), parameters.end(), has);
    if (found == parameters.end()) continue;
    const double value = found->value, slack = 1e-9 * (limit.high - limit.low);
    if (value > limit.high + slack) {
      say(fmt::format("{} = {:.3g} is above {:.3g} by {}", limit.parameter, value, limit.high,
                      percent(value / limit.high - 1)));
    } else if (value < limit.low - slack) {
      say(fmt::format("{} = {:.3g} is below {:.3g} by {}", limit.parameter, value, limit.low,
                      percent(1 - value / limit.low)));
    }
  }
  for (const Effect& effect : effects) {
    if (effect.size <= record.accuracy) continue;
    if (effect.size > largest_estimate) {
      say(fmt::format("{}: far outside what the solution covers, take no difference from it for an error",
                      effect.what));
      continue;
    }
    say(fmt::format("{}: expect about {}, more than the {} the solution can promise", effect.what,
                    percent(effect.size), percent(record.accuracy)));
  }
  return note;
}

/// What is compared where the largest edge stress is not the largest magnitude.
std::string signed_name(const std::string& quantity) {
  if (quantity == "Kt gross") return "largest edge stress / gross nominal stress";
  if (quantity == "Kt net") return "largest edge stress / net nominal stress";
  return quantity;
}

std::string accuracy(const Published& record) {
  if (record.found == record.claimed) return std::string(record.found);
  return fmt::format("found {} (source: {})", record.found, record.claimed);
}

}  // namespace

Comparison beside(Reference reference, std::string quantity, double factor, const solver::Estimate& ours,
                  const std::vector<Parameter>& parameters, const std::vector<Effect>& effects) {
  const Published& from = record(reference);
  Comparison c;
  c.quantity = std::move(quantity);
  c.published = factor;
  c.ours = ours.value;
  c.bound = ours.bound;
  c.difference = (ours.value - factor) / std::abs(factor);
  c.solution = from.name;
  c.source = from.source;
  c.definition = from.definition;
  c.range_note = range_note(from, parameters, effects);
  c.in_range = c.range_note.empty();
  c.accuracy = accuracy(from);
  c.from_memory = from.from_memory;
  return c;
}

Comparison row(const Situation& s, Reference reference, std::string quantity, double factor, double nominal,
               const std::vector<Parameter>& parameters, const std::vector<Effect>& effects) {
  const solver::Estimate one = s.found.largest.stress.scaled(1 / nominal);
  const solver::Estimate two = s.found.smallest.stress.scaled(1 / nominal);
  const solver::Estimate& ours = one.value >= two.value ? one : two;
  // Kt stands on the larger magnitude, the published value on the signed stress.
  const bool is_peak = std::abs(ours.value) >= std::max(std::abs(one.value), std::abs(two.value));
  Comparison c = beside(reference, is_peak ? std::move(quantity) : signed_name(quantity), factor, ours,
                        parameters, effects);
  c.hole = s.hole;
  c.place = mesh::raiser(s.plate, s.hole).name;
  c.load = s.load;
  return c;
}

}  // namespace raiser::validation
