#include <fmt/format.h>

#include <Eigen/Geometry>
#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

#include "io/case/outline.hpp"
#include "io/case/parts.hpp"
#include "mesh/region/mouth.hpp"

namespace raiser::io {

namespace {

using mesh::Crack;
using mesh::Mouth;
using mesh::Owner;
using mesh::Point;

constexpr std::array<std::string_view, 9> crack_keys{"name", "at",    "length", "angle", "edge",
                                                     "from", "place", "points", "tips"};
constexpr std::array<std::string_view, 5> inner_keys{"name", "at", "length", "angle", "tips"};
constexpr std::array<std::string_view, 6> edge_keys{"name", "edge", "at", "length", "angle", "tips"};
constexpr std::array<std::string_view, 6> hole_keys{"name", "from", "place", "length", "angle", "tips"};
constexpr std::array<std::string_view, 5> chain_keys{"name", "points", "edge", "from", "tips"};
constexpr std::string_view point_sample = "[\"0 mm\", \"0 mm\"]";
constexpr std::string_view chain_sample = "[[\"0 mm\", \"0 mm\"], [\"5 mm\", \"1 mm\"]]";

// A first point farther from the edge than this part of its segment is no slip of rounding.
constexpr double farthest_from_edge = 1e-2;

/// Where and for what the cracks are read.
struct Context {
  std::optional<mesh::Plate> plate;  ///< without holes; empty without its sizes
  Point origin = Point::Zero();      ///< where the drawing's origin lies in the plate
  std::vector<std::string> edges;
  const std::vector<HoleReading>& holes;
  std::vector<std::string_view> raisers;  ///< names of the holes, then of what the outline has
};

/// Faults that no longer concern the text alone.
void complain_of_geometry(const Table& table, const Entry& entry, std::string what, std::string cure) {
  complain(table, entry, std::move(what), std::move(cure));
  table.report->faults.back().kind = Diagnostic::Kind::geometry;
}

std::optional<Point> read_point(const Table& table, const Entry& entry, const Node& value) {
  if (value.kind != Node::Kind::array || value.items.size() != 2) {
    complain(table, entry, value, "a place is a list of two coordinates",
             fmt::format("write x and y from the plate's centre, e.g. {}", point_sample));
    return std::nullopt;
  }
  const auto x = quantity(table, entry, value.items.front(), Dimension::length, Sign::any);
  const auto y = quantity(table, entry, value.items.back(), Dimension::length, Sign::any);
  if (!x || !y) return std::nullopt;
  return Point(*x, *y);
}

std::optional<double> read_angle(const Table& table) {
  const Entry* entry = find(table, "angle");
  if (entry == nullptr) return 0.0;
  return quantity(table, entry, Dimension::angle, Sign::any);
}

/// The angle between a crack from an edge and the normal into the material.
std::optional<double> read_deviation(const Table& table) {
  const auto angle = read_angle(table);
  if (!angle || std::abs(*angle) < std::numbers::pi / 2) return angle;
  complain_of_geometry(table, *find(table, "angle"), "this does not lead into the material",
                       "give the angle from the normal of the edge, between -90 and 90 deg, both excluded");
  return std::nullopt;
}

std::optional<double> read_length(const Table& table) {
  return quantity(table, require(table, "length", "\"5 mm\""), Dimension::length, Sign::positive);
}

/// The part of the plate that a crack opens at: one of its edges or a raiser.
struct Start {
  std::optional<std::size_t> edge;    ///< into Context::edges
  std::optional<std::size_t> raiser;  ///< into Context::raisers
};

/// The plate with no hole but the one that a crack starts at, and that start in it.
struct Site {
  mesh::Plate plate;
  Owner owner;
};
std::optional<Site> site_of(const Context& context, const Start& start) {
  if (!context.plate) return std::nullopt;
  Site site{*context.plate, {Owner::Kind::edge, start.edge.value_or(0)}};
  if (!start.raiser) return site;
  if (*start.raiser >= context.holes.size()) {
    site.owner = {Owner::Kind::raiser, *start.raiser - context.holes.size()};
    return site;
  }
  if (!context.holes[*start.raiser].hole) return std::nullopt;
  site.owner = {Owner::Kind::raiser, 0};
  site.plate.holes = {*context.holes[*start.raiser].hole};
  site.plate.holes.front().centre += context.origin;
  return site;
}

std::vector<std::string_view> views(const std::vector<std::string>& words) {
  return {words.begin(), words.end()};
}

std::optional<Crack> straight(const std::optional<Mouth>& mouth, double angle, double length) {
  if (!mouth) return std::nullopt;
  const Point direction = Eigen::Rotation2Dd(angle) * mouth->inward;
  return Crack{"", {mouth->at, mouth->at + length * direction}, true, {}};
}

std::optional<Crack> read_from_edge(const Table& table, const Context& context) {
  refuse_unfitting(table, "a crack from an edge of the plate", crack_keys, edge_keys);
  const auto edge = choice(table, find(table, "edge"), views(context.edges));
  const Entry* at = find(table, "at");
  const auto position =
      at == nullptr ? std::optional(0.0) : quantity(table, at, Dimension::length, Sign::any);
  const auto length = read_length(table);
  const auto angle = read_deviation(table);
  if (!edge || !position || !length || !angle || !context.plate) return std::nullopt;
  const auto mouth = mesh::mouth_on_edge(*context.plate, *edge, *position);
  if (!mouth)
    complain_of_geometry(table, *at,
                         fmt::format("this is beyond the end of the {} edge", context.edges[*edge]),
                         "give the distance from the middle of the edge, positive towards larger x or y");
  return straight(mouth, *angle, *length);
}

/// Where a crack opens at the edge of a hole, notch or fillet, in a direction from its
/// centre. A drawn hole may have its edge there more than once.
std::optional<Mouth> read_mouth(const Table& table, const Context& context, const Site& site, double place) {
  const auto mouths = mesh::mouths_on_raiser(site.plate, site.owner.index, place);
  if (mouths.empty()) {
    complain_of_geometry(table, *find(table, "place"), "nothing of that edge lies in this direction",
                         "give the edge angle of a place on it, as the results count it");
    return std::nullopt;
  }
  const auto& holes = site.plate.holes;
  const bool is_drawn = !holes.empty() && holes.front().shape == mesh::HoleShape::drawn;
  if (!is_drawn || mouths.size() == 1) return mouths.front();
  const Point near = mouths.front().at - context.origin, far = mouths.back().at - context.origin;
  complain_of_geometry(
      table, *find(table, "place"),
      fmt::format("that edge lies {} times in this direction, first at ({:.6g}, {:.6g}) mm and "
                  "last at ({:.6g}, {:.6g}) mm",
                  mouths.size(), near.x(), near.y(), far.x(), far.y()),
      "give points in place of an angle, the first of them on the edge");
  return std::nullopt;
}

std::optional<Crack> read_from_hole(const Table& table, const Context& context) {
  refuse_unfitting(table, "a crack from a hole", crack_keys, hole_keys);
  const auto raiser = choice(table, find(table, "from"), context.raisers);
  const auto place = quantity(table, require(table, "place", "\"90 deg\""), Dimension::angle, Sign::any);
  const auto length = read_length(table);
  const auto angle = read_deviation(table);
  if (!raiser || !place || !length || !angle) return std::nullopt;
  const auto site = site_of(context, {std::nullopt, raiser});
  if (!site) return std::nullopt;
  return straight(read_mouth(table, context, *site, *place), *angle, *length);
}

std::optional<Crack> read_inner(const Table& table, const Context& context) {
  refuse_unfitting(table, "a crack inside the plate", crack_keys, inner_keys);
  const Entry* entry = find(table, "at");
  const auto centre =
      entry == nullptr ? std::optional(Point(0.0, 0.0)) : read_point(table, *entry, entry->value);
  const auto length = read_length(table);
  const auto angle = read_angle(table);
  if (!centre || !length || !angle) return std::nullopt;
  const Point half = *length / 2 * Point(std::cos(*angle), std::sin(*angle));
  const Point middle = *centre + context.origin;
  return Crack{"", {middle - half, middle + half}, false, {}};
}

std::optional<std::vector<Point>> read_points(const Table& table) {
  const Entry* entry = find(table, "points");
  const std::vector<Node>* list = items(table, entry, chain_sample);
  if (list == nullptr) return std::nullopt;
  if (list->size() < 2 || list->size() > most_crack_points) {
    complain(table, *entry,
             fmt::format("a crack has 2 to {} points and this has {}", most_crack_points, list->size()),
             fmt::format("write each as x and y, e.g. {}", chain_sample));
    return std::nullopt;
  }
  std::vector<Point> points;
  for (const Node& item : *list)
    if (const auto point = read_point(table, *entry, item)) points.push_back(*point);
  if (points.size() != list->size()) return std::nullopt;
  return points;
}

/// Puts the first point exactly on the edge that the crack opens at.
bool put_on_edge(const Table& table, const Site& site, const Point& origin, std::vector<Point>& points) {
  const Mouth mouth = mesh::nearest_mouth(site.plate, site.owner, points[0]);
  const double off = (mouth.at - points[0]).norm();
  if (off > farthest_from_edge * (points[1] - points[0]).norm()) {
    complain_of_geometry(table, *find(table, "points"),
                         fmt::format("the first point lies {:.4g} mm away from that edge", off),
                         fmt::format("the nearest place on it is x = {:.10g} mm, y = {:.10g} mm",
                                     mouth.at.x() - origin.x(), mouth.at.y() - origin.y()));
    return false;
  }
  points[0] = mouth.at;
  return true;
}

std::optional<Crack> read_chain(const Table& table, const Context& context) {
  refuse_unfitting(table, "a crack of points", crack_keys, chain_keys);
  const Entry* edge = find(table, "edge");
  const Entry* from = find(table, "from");
  const Start start{choice(table, edge, views(context.edges)), choice(table, from, context.raisers)};
  auto points = read_points(table);
  if (edge != nullptr && from != nullptr) {
    complain(table, *from, "edge is given too", "give one of the two and remove the other");
    return std::nullopt;
  }
  if (!points) return std::nullopt;
  for (Point& point : *points) point += context.origin;
  if (edge == nullptr && from == nullptr) return Crack{"", std::move(*points), false, {}};
  const auto site = site_of(context, start);
  if ((!start.edge && !start.raiser) || !site || !put_on_edge(table, *site, context.origin, *points))
    return std::nullopt;
  return Crack{"", std::move(*points), true, {}};
}

std::optional<Crack> read_crack(const Table& table, const Context& context) {
  refuse_unknown(table, crack_keys);
  if (find(table, "points") != nullptr) return read_chain(table, context);
  if (find(table, "edge") != nullptr && find(table, "from") != nullptr) {
    complain(table, *find(table, "from"), "edge is given too", "give one of the two and remove the other");
    return std::nullopt;
  }
  if (find(table, "edge") != nullptr) return read_from_edge(table, context);
  if (find(table, "from") != nullptr) return read_from_hole(table, context);
  return read_inner(table, context);
}

/// The names of a crack's tips, as many as it has, whether or not they are written well.
std::vector<std::string> read_tips(const Table& table, const std::string& crack, bool has_mouth,
                                   Names& taken) {
  std::vector<std::string> names = has_mouth ? std::vector{crack} : std::vector{crack + " A", crack + " B"};
  const Entry* entry = find(table, "tips");
  const std::vector<Node>* list = items(table, entry, has_mouth ? "[\"A\"]" : "[\"A\", \"B\"]");
  if (list != nullptr && list->size() != names.size()) {
    complain(
        table, *entry,
        fmt::format("the crack has {} and this names {}", has_mouth ? "one tip" : "two tips", list->size()),
        has_mouth ? "a crack that opens at an edge has one tip, at its end"
                  : "name the tip at its first and that at its last point");
  } else if (list != nullptr) {
    for (std::size_t i = 0; i < names.size(); ++i)
      if (const auto name = text(table, *entry, (*list)[i])) names[i] = *name;
  }
  for (const std::string& name : names) {
    if (taken.insert(name).second) continue;
    const std::string what = fmt::format("the name \"{}\" of a tip is taken", name);
    const std::string cure = "give each tip a name of its own with tips = [...]";
    entry != nullptr ? complain(table, *entry, what, cure) : complain(table, what, cure);
  }
  return names;
}

/// Without what rounding leaves of a coordinate that is zero.
Point tidy(const Point& point) {
  const double least = 1e-14 * point.cwiseAbs().maxCoeff();
  return point.unaryExpr([&](double x) { return std::abs(x) < least ? 0.0 : x; });
}

}  // namespace

std::vector<CrackReading> read_cracks(const Table& document, const PlateSizes& plate,
                                      const OutlineReading& outline, const std::vector<HoleReading>& holes) {
  std::vector<Table> tables = tables_at(document, "crack");
  if (tables.size() > most_cracks) {
    complain(tables[most_cracks], fmt::format("there are {} cracks", tables.size()),
             fmt::format("a case has at most {}; leave the others out", most_cracks));
    tables.erase(tables.begin() + most_cracks, tables.end());
  }
  Context context{std::nullopt, outline.origin, outline.edges, holes, {}};
  if (plate.length && plate.width && plate.thickness && outline.is_sound)
    context.plate = mesh::Plate{*plate.length, *plate.width, *plate.thickness, {}, outline.outline};
  for (const HoleReading& hole : holes) context.raisers.push_back(hole.name);
  if (outline.outline)
    for (const mesh::Raiser& raiser : outline.outline->raisers) context.raisers.push_back(raiser.name);
  if (!outline.is_known) context.raisers.push_back(any_name);
  std::vector<CrackReading> cracks;
  Names names;
  Names tips;
  for (const Table& table : tables) {
    CrackReading reading;
    reading.at = table.node->at;
    reading.name = unique_name(table, fmt::format("crack {}", cracks.size() + 1), names);
    reading.crack = read_crack(table, context);
    const bool has_mouth = find(table, "edge") != nullptr || find(table, "from") != nullptr;
    reading.tips = read_tips(table, reading.name, has_mouth, tips);
    if (reading.crack) {
      for (mesh::Point& point : reading.crack->points) point = tidy(point);
      reading.crack->name = reading.name;
      reading.crack->tip_names = {has_mouth ? "" : reading.tips.front(), reading.tips.back()};
    }
    cracks.push_back(std::move(reading));
  }
  return cracks;
}

}  // namespace raiser::io
