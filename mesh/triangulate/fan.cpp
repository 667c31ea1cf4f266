#include "mesh/triangulate/fan.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>
#include <stdexcept>

namespace raiser::mesh {
namespace {

constexpr double turn = 2 * std::numbers::pi;

Point on_circle(const Point& centre, double radius, double angle) {
  return centre + radius * Point(std::cos(angle), std::sin(angle));
}

Curve straight(const Point& from, const Point& to, Owner owner) {
  return {Curve::Kind::line, from, to - from, Point::Zero(), 0.0, 1.0, owner};
}

constexpr Owner inner{Owner::Kind::inner, 0};

/// A fan that the loop goes round: between the crack's face and the mirror line.
void take_out_half(Region& region, Fan& fan, double radius, int sectors) {
  for (Loop& loop : region.loops)
    for (std::size_t k = 0; k < loop.size(); ++k) {
      Curve& before = loop[k];
      Curve& after = loop[(k + 1) % loop.size()];
      const bool meets =
          before.kind == Curve::Kind::line && after.kind == Curve::Kind::line &&
          (before.at(before.end) - fan.at).norm() < 1e-9 * radius &&
          (before.owner.kind == Owner::Kind::crack) != (after.owner.kind == Owner::Kind::crack);
      if (!meets) continue;
      before.end -= radius / before.u.norm();
      after.begin += radius / after.u.norm();
      const Point start = after.at(after.begin);
      const double angle = std::atan2(start.y() - fan.at.y(), start.x() - fan.at.x());
      fan.outer = {start};
      for (int i = 1; i < sectors; ++i)
        fan.outer.push_back(on_circle(fan.at, radius, angle + i * std::numbers::pi / sectors));
      fan.outer.push_back(before.at(before.end));
      fan.first = after.owner;
      fan.last = before.owner;
      Loop around;
      for (std::size_t i = fan.outer.size() - 1; i > 0; --i)
        around.push_back(straight(fan.outer[i], fan.outer[i - 1], inner));
      loop.insert(loop.begin() + static_cast<std::ptrdiff_t>(k) + 1, around.begin(), around.end());
      return;
    }
  throw std::logic_error("take_out_fans: no loop passes the tip of a crack on a mirror line");
}

/// A fan inside the material: a loop of its own, the slit ends at its corner.
void take_out_whole(Region& region, std::size_t crack, Fan& fan, double radius, int sectors) {
  const double angle = std::atan2(-fan.direction.y(), -fan.direction.x());
  for (int i = 0; i < sectors; ++i)
    fan.outer.push_back(on_circle(fan.at, radius, angle + i * turn / sectors));
  fan.outer.push_back(fan.outer.front());
  fan.first = fan.last = {Owner::Kind::crack, crack};
  for (Slit& slit : region.slits)
    for (Point* end : {&slit.points.front(), &slit.points.back()})
      if (slit.crack == crack && (*end - fan.at).norm() < 1e-9 * radius) *end = fan.outer.front();
  Loop around;
  for (std::size_t i = fan.outer.size() - 1; i > 0; --i)
    around.push_back(straight(fan.outer[i], fan.outer[i - 1], inner));
  region.loops.push_back(std::move(around));
}

/// The triangle and side with the directed edge, if there is one.
std::map<std::pair<int, int>, std::pair<int, int>> directed_edges(
    const std::vector<Mesh::Triangle>& triangles) {
  std::map<std::pair<int, int>, std::pair<int, int>> result;
  for (int t = 0; t < static_cast<int>(triangles.size()); ++t)
    for (int k = 0; k < 3; ++k) result[{triangles[t][k], triangles[t][(k + 1) % 3]}] = {t, k};
  return result;
}

}  // namespace

std::vector<Fan> take_out_fans(Region& region, const SizeRule& rule) {
  std::vector<Fan> fans;
  for (const RegionTip& tip : region.tips) {
    const double radius = rule.tip_reach * rule.tip_factor(tip.tip) * tip.reach;
    Fan fan{tip.tip, tip.at, tip.direction, {}, {}, {}, rule.tip_ratio, rule.tip_rings};
    if (tip.on_mirror) {
      take_out_half(region, fan, radius, rule.tip_sectors / 2);
    } else {
      const auto slit = std::find_if(region.slits.begin(), region.slits.end(), [&](const Slit& s) {
        return std::min((s.points.front() - tip.at).norm(), (s.points.back() - tip.at).norm()) <
               1e-9 * radius;
      });
      if (slit == region.slits.end())
        throw std::logic_error("take_out_fans: no crack ends at one of the tips");
      take_out_whole(region, slit->crack, fan, radius, rule.tip_sectors);
    }
    fans.push_back(std::move(fan));
  }
  return fans;
}

void fill(const Fan& fan, const std::vector<int>& outer, Draft& draft) {
  const bool is_whole = outer.front() == outer.back();
  const std::size_t corners = outer.size();
  TipFan result{fan.tip, fan.at, fan.direction, !is_whole, {}, {}};
  const double radius = (fan.outer.front() - fan.at).norm();
  std::vector<int> ring = outer;
  const auto face = [&](const Owner& owner, int from, int to) {
    const Curve curve = straight(draft.points[from], draft.points[to], owner);
    if (is_whole)
      draft.seams.push_back({from, to, curve});
    else
      draft.sides.push_back({static_cast<int>(draft.triangles.size()), 0, curve});
  };
  double scale = 1.0;
  for (int layer = 0; layer <= fan.rings; ++layer) {
    const bool is_tip = layer == fan.rings;
    result.radii.push_back(radius * scale);
    result.rings.emplace_back();
    scale *= fan.ratio;
    std::vector<int> next(corners);
    const int first = static_cast<int>(draft.points.size());
    if (is_tip) {
      draft.points.push_back(fan.at);
      std::fill(next.begin(), next.end(), first);
    } else {
      for (std::size_t i = 0; i < corners; ++i) {
        next[i] = is_whole && i + 1 == corners ? next[0] : first + static_cast<int>(i);
        if (i + 1 < corners || !is_whole) draft.points.push_back(fan.at + scale * (fan.outer[i] - fan.at));
      }
    }
    // Seen from the tip, corner i lies to the right of corner i + 1: next[i],
    // ring[i], ring[i + 1], next[i + 1] run anticlockwise.
    for (std::size_t i = 0; i + 1 < corners; ++i) {
      const auto add = [&](int a, int b, int c) {
        result.rings.back().push_back(static_cast<int>(draft.triangles.size()));
        draft.triangles.push_back({a, b, c});
      };
      if (i == 0) face(fan.first, next[0], ring[0]);
      const bool ends = i + 2 == corners;
      if (is_tip) {
        if (ends && !is_whole)
          draft.sides.push_back({static_cast<int>(draft.triangles.size()), 2,
                                 straight(draft.points[ring[i + 1]], draft.points[next[i + 1]], fan.last)});
        add(next[i], ring[i], ring[i + 1]);
        continue;
      }
      // The diagonals mirror each other about the crack's line.
      if (i < (corners - 1) / 2) {
        add(next[i], ring[i], ring[i + 1]);
        add(next[i], ring[i + 1], next[i + 1]);
      } else {
        if (ends && !is_whole)
          draft.sides.push_back({static_cast<int>(draft.triangles.size()) + 1, 1,
                                 straight(draft.points[ring[i + 1]], draft.points[next[i + 1]], fan.last)});
        add(next[i], ring[i], next[i + 1]);
        add(ring[i], ring[i + 1], next[i + 1]);
      }
    }
    ring = next;
  }
  draft.fans.push_back(std::move(result));
}

void open_seams(Draft& draft) {
  if (draft.seams.empty()) return;
  const auto edges = directed_edges(draft.triangles);
  std::map<std::pair<int, int>, bool> closed;  // directed edges that must not be crossed
  std::map<int, std::vector<int>> around;      // triangles about the seams' points
  for (const Draft::Seam& seam : draft.seams) {
    closed[{seam.from, seam.to}] = closed[{seam.to, seam.from}] = true;
    around[seam.from];
    around[seam.to];
    Curve back = seam.curve;
    std::swap(back.begin, back.end);
    const auto [t, k] = edges.at({seam.from, seam.to});
    const auto [u, m] = edges.at({seam.to, seam.from});
    draft.sides.push_back({t, k, seam.curve});
    draft.sides.push_back({u, m, back});
  }
  const std::vector<Mesh::Triangle> old = draft.triangles;
  for (int t = 0; t < static_cast<int>(old.size()); ++t)
    for (const int v : old[t])
      if (const auto found = around.find(v); found != around.end()) found->second.push_back(t);
  for (const auto& [vertex, triangles] : around) {
    std::vector<int> left = triangles;
    bool is_first = true;
    while (!left.empty()) {
      // One sector of triangles that hang together across sides at the vertex.
      std::vector<int> sector = {left.back()};
      left.pop_back();
      for (std::size_t i = 0; i < sector.size(); ++i)
        for (int k = 0; k < 3; ++k) {
          const int a = old[sector[i]][k];
          const int b = old[sector[i]][(k + 1) % 3];
          if ((a != vertex && b != vertex) || closed.count({a, b})) continue;
          const auto other = edges.find({b, a});
          if (other == edges.end()) continue;
          const auto at = std::find(left.begin(), left.end(), other->second.first);
          if (at == left.end()) continue;
          sector.push_back(*at);
          left.erase(at);
        }
      if (!is_first) {
        draft.points.push_back(Point(draft.points[vertex]));
        for (const int t : sector)
          for (int& v : draft.triangles[t])
            if (v == vertex) v = static_cast<int>(draft.points.size()) - 1;
      }
      is_first = false;
    }
  }
}

}  // namespace raiser::mesh
