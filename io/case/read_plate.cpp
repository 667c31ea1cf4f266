#include <fmt/format.h>

#include <array>

#include "io/case/outline.hpp"
#include "io/case/parts.hpp"

namespace raiser::io {

namespace {

using Keys = std::span<const std::string_view>;

constexpr std::array<std::string_view, 11> hole_keys{"name",   "shape",  "diameter",      "radius",
                                                     "length", "width",  "corner_radius", "at",
                                                     "angle",  "repeat", "pitch"};
constexpr std::array<std::string_view, 2> circle_sizes{"diameter", "radius"};
constexpr std::array<std::string_view, 7> circle_keys{"name", "shape",  "diameter", "radius",
                                                      "at",   "repeat", "pitch"};
constexpr std::array<std::string_view, 8> long_hole_keys{"name", "shape", "length", "width",
                                                         "at",   "angle", "repeat", "pitch"};
constexpr std::array<std::string_view, 9> rectangle_keys{"name", "shape", "length", "width", "corner_radius",
                                                         "at",   "angle", "repeat", "pitch"};
constexpr std::array shapes{mesh::HoleShape::circle, mesh::HoleShape::ellipse, mesh::HoleShape::slot,
                            mesh::HoleShape::rounded_rectangle};

Keys keys_of(mesh::HoleShape shape) {
  switch (shape) {
    case mesh::HoleShape::circle:
      return circle_keys;
    case mesh::HoleShape::ellipse:
      return long_hole_keys;
    case mesh::HoleShape::slot:
      return long_hole_keys;
    case mesh::HoleShape::rounded_rectangle:
      return rectangle_keys;
    case mesh::HoleShape::drawn:  // not in a case file: imported alone
      break;
  }
  return hole_keys;
}

std::optional<double> size(const Table& table, std::string_view key, std::string_view sample) {
  return quantity(table, require(table, key, sample), Dimension::length, Sign::positive);
}

std::optional<mesh::HoleShape> read_shape(const Table& table) {
  std::vector<std::string_view> words;
  for (const mesh::HoleShape shape : shapes) words.push_back(mesh::word(shape));
  const auto index = choice(table, require(table, "shape", "\"circle\""), words);
  if (!index) return std::nullopt;
  return shapes[*index];
}

/// The centre: the plate's own by default.
std::optional<mesh::Point> read_centre(const Table& table) {
  const Entry* entry = find(table, "at");
  if (entry == nullptr) return mesh::Point::Zero();
  constexpr std::string_view sample = "[\"0 mm\", \"0 mm\"]";
  const std::vector<Node>* coordinates = items(table, entry, sample);
  if (coordinates == nullptr) return std::nullopt;
  if (coordinates->size() != 2) {
    complain(table, *entry, fmt::format("a place needs two coordinates and this has {}", coordinates->size()),
             fmt::format("write x and y from the plate's centre, e.g. {}", sample));
    return std::nullopt;
  }
  const auto x = quantity(table, *entry, coordinates->front(), Dimension::length, Sign::any);
  const auto y = quantity(table, *entry, coordinates->back(), Dimension::length, Sign::any);
  if (!x || !y) return std::nullopt;
  return mesh::Point(*x, *y);
}

/// The angle: 0 by default.
std::optional<double> read_angle(const Table& table) {
  const Entry* entry = find(table, "angle");
  if (entry == nullptr) return 0.0;
  return quantity(table, entry, Dimension::angle, Sign::any);
}

struct Sizes {
  std::optional<double> length;
  std::optional<double> width;
  std::optional<double> corner_radius = 0.0;
};

Sizes read_circle(const Table& table) {
  const Entry* entry = require_one(table, circle_sizes, "\"18 mm\"");
  auto diameter = quantity(table, entry, Dimension::length, Sign::positive);
  if (diameter && entry->key == "radius") *diameter *= 2.0;
  return {diameter, diameter};
}

std::optional<double> read_corner_radius(const Table& table) {
  const Entry* entry = require(table, "corner_radius", "\"4 mm\"");
  const auto radius = quantity(table, entry, Dimension::length, Sign::any);
  if (!radius || *radius > 0.0) return radius;
  complain(
      table, *entry, "this must be greater than zero",
      "give the radius that the corner has, e.g. \"4 mm\": at a sharp corner the stress has no finite peak");
  return std::nullopt;
}

Sizes read_sizes(const Table& table, mesh::HoleShape shape) {
  if (shape == mesh::HoleShape::circle) return read_circle(table);
  Sizes sizes{size(table, "length", "\"30 mm\""), size(table, "width", "\"12 mm\"")};
  if (shape == mesh::HoleShape::rounded_rectangle) sizes.corner_radius = read_corner_radius(table);
  return sizes;
}

/// Reports what is wrong with the sizes of a hole whose shape is not known.
void check_sizes(const Table& table) {
  for (const std::string_view key : {"diameter", "radius", "length", "width", "corner_radius"}) {
    quantity(table, find(table, key), Dimension::length, Sign::positive);
  }
}

std::optional<mesh::Hole> read_hole(const Table& table, const std::string& name) {
  const auto shape = read_shape(table);
  refuse_unknown(table, hole_keys, shape ? keys_of(*shape) : Keys(hole_keys));
  const auto centre = read_centre(table);
  if (!shape) {
    check_sizes(table);
    read_angle(table);
    return std::nullopt;
  }
  const std::string_view article = *shape == mesh::HoleShape::ellipse ? "an" : "a";
  refuse_unfitting(table, fmt::format("{} {}", article, mesh::word(*shape)), hole_keys, keys_of(*shape));
  const Sizes sizes = read_sizes(table, *shape);
  const auto angle = *shape == mesh::HoleShape::circle ? std::optional(0.0) : read_angle(table);
  if (!sizes.length || !sizes.width || !sizes.corner_radius || !centre || !angle) return std::nullopt;
  return mesh::Hole{name, *shape, *sizes.length, *sizes.width, *sizes.corner_radius, *centre, *angle};
}

}  // namespace

std::string sample_of(const std::vector<std::string_view>& names, std::string_view otherwise) {
  return fmt::format("\"{}\"", names.empty() || names.front() == any_name ? otherwise : names.front());
}

PlateSizes read_plate(const Table& table, bool is_drawn) {
  constexpr std::array<std::string_view, 3> keys{"length", "width", "thickness"};
  constexpr std::array<std::string_view, 1> drawn_keys{"thickness"};
  refuse_unknown(table, keys);
  if (is_drawn) {
    refuse_unfitting(table, "a plate with a drawn outline", keys, drawn_keys);
    return {std::nullopt, std::nullopt, size(table, "thickness", "\"6 mm\"")};
  }
  return {size(table, "length", "\"240 mm\""), size(table, "width", "\"60 mm\""),
          size(table, "thickness", "\"6 mm\"")};
}

namespace {

/// The holes that one table stands for.
void expand(const Table& table, HoleReading one, Names& names, std::vector<HoleReading>& holes) {
  const auto repeat = read_repeat(table, 2);
  if (!repeat) one.hole.reset();
  if (!repeat || !repeat->is_written) {
    holes.push_back(std::move(one));
    return;
  }
  const std::vector<mesh::Point> grid = places(*repeat);
  for (std::size_t i = 0; i < grid.size() && holes.size() <= most_holes; ++i) {
    HoleReading copy = one;
    copy.name += fmt::format(" {}", i + 1);
    if (!names.insert(copy.name).second)
      complain(table, fmt::format("the name \"{}\" that follows from this one is taken", copy.name),
               "choose another name");
    if (copy.hole) {
      copy.hole->name = copy.name;
      copy.hole->centre += grid[i];
    }
    holes.push_back(std::move(copy));
  }
}

}  // namespace

std::vector<HoleReading> read_holes(const Table& document, Names& names) {
  std::vector<HoleReading> holes;
  const std::vector<Table> tables = tables_at(document, "hole");
  for (std::size_t k = 0; k < tables.size(); ++k) {
    const Table& table = tables[k];
    if (holes.size() >= most_holes) {
      complain(table,
               tables.size() > most_holes ? fmt::format("there are {} holes", tables.size())
                                          : fmt::format("there are more than {} holes", most_holes),
               fmt::format("a case has at most {}; leave the others out", most_holes));
      break;
    }
    std::string name = unique_name(table, fmt::format("hole {}", k + 1), names);
    auto hole = read_hole(table, name);
    expand(table, {std::move(name), std::move(hole), table.node->at, k + 1}, names, holes);
  }
  return holes;
}

}  // namespace raiser::io
