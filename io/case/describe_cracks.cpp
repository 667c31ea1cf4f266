#include "io/case/describe_cracks.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "io/case/layout.hpp"
#include "io/case/words.hpp"

namespace raiser::io {

namespace {

using mesh::Crack;
using mesh::CrackTip;
using Phrases = std::vector<std::string>;

constexpr std::size_t most_listed = 12;
constexpr std::string_view default_mark = " (default)";

std::string place(const mesh::Point& at) {
  return fmt::format("x = {:.10g} mm, y = {:.10g} mm", at.x() + 0.0, at.y() + 0.0);
}

/// What the author wrote for a key; empty when it was left to its default.
std::string written(const Case& input, const std::string& key) {
  const auto found = input.written.find(key);
  return found == input.written.end() ? "" : shown(found->second);
}

/// "5 mm" or "5 mm (written 0.005 m)", and the mark of a default.
std::string amount(const Case& input, const std::string& key, double value, std::string_view unit) {
  const std::string reading = fmt::format("{:.10g} {}", value, unit);
  const std::string own = written(input, key);
  if (own.empty()) return reading + std::string(default_mark);
  return own == reading ? reading : fmt::format("{} (written {})", reading, own);
}

/// Where the crack begins.
std::string beginning(const Case& input, const std::string& path) {
  const std::string edge = written(input, path + "edge");
  if (!edge.empty()) {
    const std::string at = written(input, path + "at");
    if (written(input, path + "points").empty())
      return fmt::format("opens at the {} edge, {} from its middle{}", edge, at.empty() ? "0 mm" : at,
                         at.empty() ? default_mark : "");
    return fmt::format("opens at the {} edge", edge);
  }
  const std::string hole = written(input, path + "from");
  if (hole.empty()) return "inside the plate";
  const std::string angle = written(input, path + "place");
  return angle.empty() ? fmt::format("opens at {}", hole)
                       : fmt::format("opens at {}, edge angle {}", hole, angle);
}

Phrases sizes(const Case& input, const Crack& crack, const std::string& path) {
  if (!written(input, path + "points").empty())
    return {fmt::format("{} straight piece{}", crack.points.size() - 1, crack.points.size() == 2 ? "" : "s"),
            fmt::format("length {:.6g} mm together", crack.length())};
  const std::string angle = written(input, path + "angle");
  const std::string from = crack.has_mouth ? "the inward normal" : "x";
  return {"length " + amount(input, path + "length", crack.length(), "mm"),
          fmt::format("angle {} from {}{}", angle.empty() ? "0 deg" : angle, from,
                      angle.empty() ? default_mark : "")};
}

std::string describe_tip(const CrackTip& tip) {
  const double angle = std::atan2(tip.direction.y(), tip.direction.x()) * 180.0 / std::numbers::pi;
  return row("", {fmt::format("tip {} at x = {:.10g} mm", shown(tip.name), tip.at.x() + 0.0),
                  fmt::format("y = {:.10g} mm", tip.at.y() + 0.0),
                  fmt::format("pointing {:.6g} deg from x", angle + 0.0)});
}

}  // namespace

std::string describe_cracks(const Case& input) {
  const std::vector<Crack>& cracks = input.problem.plate.cracks;
  if (cracks.empty()) return "";
  const std::size_t listed = cracks.size() > most_listed ? most_listed / 2 : cracks.size();
  std::string result = row("Cracks", {fmt::format("{}", cracks.size())});
  const std::vector<CrackTip> tips = mesh::tips(cracks);
  for (std::size_t i = 0; i < listed; ++i) {
    const std::string path = fmt::format("crack.{}.", i + 1);
    Phrases phrases{beginning(input, path)};
    for (std::string& phrase : sizes(input, cracks[i], path)) phrases.push_back(std::move(phrase));
    if (cracks[i].has_mouth) phrases.push_back("mouth at " + place(cracks[i].points.front()));
    std::string label = "  " + cracks[i].name;
    if (written(input, path + "name").empty()) label += std::string(default_mark);
    result += row(label, phrases);
    for (const CrackTip& tip : tips)
      if (tip.crack == i) result += describe_tip(tip);
  }
  if (listed < cracks.size())
    result += row("  and more", {fmt::format("{} not listed here", cracks.size() - listed)});
  return result;
}

}  // namespace raiser::io
