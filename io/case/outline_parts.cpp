#include "io/case/outline_parts.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>

namespace raiser::io {

namespace {

using Keys = std::span<const std::string_view>;
using mesh::Fillet;
using mesh::FilletShape;
using mesh::Notch;
using mesh::NotchShape;
using mesh::OutlinePoint;
using mesh::Piece;
using mesh::Shoulder;

std::optional<double> length_of(const Table& table, std::string_view key, std::string_view sample) {
  return quantity(table, require(table, key, sample), Dimension::length, Sign::positive);
}

/// A length that may be left out.
std::optional<double> length_or(const Table& table, std::string_view key, double otherwise, Sign sign) {
  const Entry* entry = find(table, key);
  return entry == nullptr ? std::optional(otherwise) : quantity(table, entry, Dimension::length, sign);
}

/// Two lengths such as ["30 mm", "20 mm"].
std::optional<mesh::Point> pair_of(const Table& table, const Entry* entry, Sign sign,
                                   std::string_view sample) {
  const std::vector<Node>* values = items(table, entry, sample);
  if (values == nullptr) return std::nullopt;
  if (values->size() != 2) {
    complain(table, *entry, fmt::format("two lengths are expected and this has {}", values->size()),
             fmt::format("write e.g. {}", sample));
    return std::nullopt;
  }
  const auto first = quantity(table, *entry, values->front(), Dimension::length, sign);
  const auto second = quantity(table, *entry, values->back(), Dimension::length, sign);
  if (!first || !second) return std::nullopt;
  return mesh::Point(*first, *second);
}

/// Which of the words, or the first one where the key is absent.
std::optional<std::size_t> choice_or_first(const Table& table, std::string_view key, Keys words) {
  const Entry* entry = find(table, key);
  return entry == nullptr ? std::optional<std::size_t>(0) : choice(table, entry, words);
}

constexpr std::array<std::string_view, 11> shoulder_keys{"name",          "at",     "width",   "narrow",
                                                         "sides",         "fillet", "radius",  "semi_axes",
                                                         "second_radius", "turn",   "undercut"};
constexpr std::array fillet_shapes{FilletShape::circle, FilletShape::ellipse, FilletShape::two_radii,
                                   FilletShape::undercut, FilletShape::sharp};

Keys keys_of(FilletShape shape) {
  static constexpr std::array<std::string_view, 7> circle{"name",  "at",     "width", "narrow",
                                                          "sides", "fillet", "radius"};
  static constexpr std::array<std::string_view, 7> ellipse{"name",  "at",     "width",    "narrow",
                                                           "sides", "fillet", "semi_axes"};
  static constexpr std::array<std::string_view, 9> two{"name",   "at",     "width",         "narrow", "sides",
                                                       "fillet", "radius", "second_radius", "turn"};
  static constexpr std::array<std::string_view, 8> undercut{"name",  "at",     "width",  "narrow",
                                                            "sides", "fillet", "radius", "undercut"};
  static constexpr std::array<std::string_view, 6> sharp{"name", "at", "width", "narrow", "sides", "fillet"};
  switch (shape) {
    case FilletShape::circle:
      return circle;
    case FilletShape::ellipse:
      return ellipse;
    case FilletShape::two_radii:
      return two;
    case FilletShape::undercut:
      return undercut;
    case FilletShape::sharp:
      break;
  }
  return sharp;
}

std::optional<Fillet> read_fillet(const Table& table) {
  std::vector<std::string_view> words;
  for (const FilletShape shape : fillet_shapes) words.push_back(mesh::word(shape));
  const auto index = choice_or_first(table, "fillet", words);
  if (!index) return std::nullopt;
  Fillet fillet;
  fillet.shape = fillet_shapes[*index];
  refuse_unfitting(table, fmt::format("a shoulder with the fillet \"{}\"", words[*index]), shoulder_keys,
                   keys_of(fillet.shape));
  const std::size_t before = table.report->faults.size();
  const auto put = [](double& field, const std::optional<double>& value) { field = value.value_or(0.0); };
  if (fillet.shape == FilletShape::ellipse) {
    constexpr std::string_view sample = "[\"20 mm\", \"10 mm\"]";
    const auto axes = pair_of(table, require(table, "semi_axes", sample), Sign::positive, sample);
    if (axes) fillet.along = axes->x(), fillet.across = axes->y();
  } else if (fillet.shape != FilletShape::sharp) {
    put(fillet.radius, length_of(table, "radius", "\"5 mm\""));
  }
  if (fillet.shape == FilletShape::two_radii) {
    put(fillet.second_radius, length_of(table, "second_radius", "\"2 mm\""));
    put(fillet.turn, quantity(table, require(table, "turn", "\"30 deg\""), Dimension::angle, Sign::positive));
  }
  if (fillet.shape == FilletShape::undercut) put(fillet.undercut, length_of(table, "undercut", "\"0.5 mm\""));
  if (table.report->faults.size() != before) return std::nullopt;
  return fillet;
}

constexpr std::array<std::string_view, 10> outline_keys{
    "at", "corner_radius", "edge", "name", "arc", "radius", "longer", "centre", "semi_axes", "angle"};

/// A true or false that is false where it is absent.
std::optional<bool> flag(const Table& table, std::string_view key) {
  const Entry* entry = find(table, key);
  if (entry == nullptr) return false;
  if (entry->value.kind == Node::Kind::boolean) return entry->value.text == "true";
  complain(table, *entry, fmt::format("true or false is expected and this is {}", word(entry->value.kind)),
           fmt::format("write {} = true", key));
  return std::nullopt;
}

std::optional<Piece> read_piece(const Table& table) {
  constexpr std::array<std::string_view, 2> bulges{"inwards", "outwards"};
  constexpr std::array<std::string_view, 4> of_line{"at", "corner_radius", "edge", "name"};
  const Entry* entry = find(table, "arc");
  if (entry == nullptr) {
    refuse_unfitting(table, "a straight piece", outline_keys, of_line);
    return Piece{};
  }
  const auto bulge = choice(table, entry, bulges);
  const std::size_t before = table.report->faults.size();
  Piece piece;
  piece.kind = bulge.value_or(0) == 0 ? Piece::Kind::inwards : Piece::Kind::outwards;
  if (find(table, "semi_axes") == nullptr) {
    constexpr std::array<std::string_view, 7> of_arc{"at",  "corner_radius", "edge",  "name",
                                                     "arc", "radius",        "longer"};
    refuse_unfitting(table, "a circular arc", outline_keys, of_arc);
    piece.radius = length_of(table, "radius", "\"20 mm\"").value_or(0.0);
    piece.is_longer = flag(table, "longer").value_or(false);
  } else {
    constexpr std::array<std::string_view, 8> of_ellipse{"at",  "corner_radius", "edge",      "name",
                                                         "arc", "centre",        "semi_axes", "angle"};
    refuse_unfitting(table, "an elliptical arc", outline_keys, of_ellipse);
    constexpr std::string_view sample = "[\"30 mm\", \"20 mm\"]";
    const auto axes = pair_of(table, find(table, "semi_axes"), Sign::positive, sample);
    const auto centre = pair_of(table, require(table, "centre", sample), Sign::any, sample);
    const Entry* angle = find(table, "angle");
    if (angle != nullptr) piece.angle = quantity(table, angle, Dimension::angle, Sign::any).value_or(0.0);
    if (axes) piece.radius = axes->x(), piece.across = axes->y();
    if (centre) piece.centre = *centre;
  }
  if (!bulge || table.report->faults.size() != before) return std::nullopt;
  return piece;
}

constexpr std::array<std::string_view, 12> notch_keys{"name",  "shape",      "edge",        "at",
                                                      "depth", "radius",     "root_radius", "opening_angle",
                                                      "width", "both_sides", "repeat",      "pitch"};
constexpr std::array notch_shapes{NotchShape::u, NotchShape::v, NotchShape::semicircle,
                                  NotchShape::semi_ellipse, NotchShape::keyhole};

std::vector<std::string_view> keys_of(NotchShape shape) {
  std::vector<std::string_view> keys{"name", "shape", "edge", "at", "both_sides", "repeat", "pitch"};
  switch (shape) {
    case NotchShape::u:
      keys.insert(keys.end(), {"depth", "root_radius"});
      break;
    case NotchShape::v:
      keys.insert(keys.end(), {"depth", "root_radius", "opening_angle"});
      break;
    case NotchShape::semicircle:
      keys.push_back("radius");
      break;
    case NotchShape::semi_ellipse:
      keys.insert(keys.end(), {"depth", "width"});
      break;
    case NotchShape::keyhole:
      keys.insert(keys.end(), {"depth", "width", "root_radius"});
      break;
  }
  return keys;
}

/// The sizes that the shape has; nothing and faults where one is missing.
bool read_sizes(const Table& table, Notch& notch) {
  const std::vector<std::string_view> keys = keys_of(notch.shape);
  const auto has = [&](std::string_view key) {
    return std::find(keys.begin(), keys.end(), key) != keys.end();
  };
  const std::size_t before = table.report->faults.size();
  refuse_unfitting(table, fmt::format("a {} notch", mesh::word(notch.shape)), notch_keys, keys);
  if (has("radius")) notch.depth = length_of(table, "radius", "\"4 mm\"").value_or(0.0);
  if (has("depth")) notch.depth = length_of(table, "depth", "\"8 mm\"").value_or(0.0);
  if (has("root_radius")) notch.root_radius = length_of(table, "root_radius", "\"1 mm\"").value_or(0.0);
  if (has("width")) notch.width = length_of(table, "width", "\"4 mm\"").value_or(0.0);
  if (has("opening_angle"))
    notch.opening_angle =
        quantity(table, require(table, "opening_angle", "\"60 deg\""), Dimension::angle, Sign::positive)
            .value_or(0.0);
  return table.report->faults.size() == before;
}

}  // namespace

std::optional<Shoulder> read_shoulder(const Table& table, const std::string& name) {
  constexpr std::array<std::string_view, 2> narrow_words{"right", "left"};
  constexpr std::array<std::string_view, 3> side_words{"both", "top", "bottom"};
  refuse_unknown(table, shoulder_keys);
  const auto at = length_or(table, "at", 0.0, Sign::any);
  const auto width = length_of(table, "width", "\"40 mm\"");
  const auto narrow = choice_or_first(table, "narrow", narrow_words);
  const auto sides = choice_or_first(table, "sides", side_words);
  const auto fillet = read_fillet(table);
  if (!at || !width || !narrow || !sides || !fillet) return std::nullopt;
  return Shoulder{name, *at, *width, *narrow == 0, static_cast<Shoulder::Sides>(*sides), *fillet};
}

std::optional<OutlinePoint> read_point(const Table& table) {
  refuse_unknown(table, outline_keys);
  constexpr std::string_view sample = "[\"0 mm\", \"0 mm\"]";
  const auto at = pair_of(table, require(table, "at", sample), Sign::any, sample);
  const auto radius = length_or(table, "corner_radius", 0.0, Sign::positive);
  const Entry* edge = find(table, "edge");
  const auto edge_name = edge == nullptr ? std::optional<std::string>("") : text(table, edge);
  const Entry* name = find(table, "name");
  const auto raiser_name = name == nullptr ? std::optional<std::string>("") : text(table, name);
  const auto piece = read_piece(table);
  if (!at || !radius || !edge_name || !raiser_name || !piece) return std::nullopt;
  return OutlinePoint{*at, *radius, *edge_name, *raiser_name, *piece};
}

std::optional<NotchReading> read_notch(const Table& table, const std::string& name,
                                       const std::vector<std::string>& edges) {
  refuse_unknown(table, notch_keys);
  std::vector<std::string_view> words;
  for (const NotchShape shape : notch_shapes) words.push_back(mesh::word(shape));
  const auto shape = choice(table, require(table, "shape", "\"U\""), words);
  const std::vector<std::string_view> edge_words(edges.begin(), edges.end());
  const Entry* edge_entry =
      require(table, "edge", edges.empty() ? "\"top\"" : fmt::format("\"{}\"", edges.front()));
  const auto edge = edges.empty() ? std::nullopt : choice(table, edge_entry, edge_words);
  const auto at = length_or(table, "at", 0.0, Sign::any);
  const auto both = flag(table, "both_sides");
  const auto repeat = read_repeat(table, 1);
  NotchReading result;
  result.notch.name = name;
  if (shape) result.notch.shape = notch_shapes[*shape];
  const bool sized = shape && read_sizes(table, result.notch);
  if (!sized || !edge || !at || !both || !repeat) return std::nullopt;
  result.notch.edge = *edge;
  result.notch.at = *at;
  result.both_sides = *both;
  result.repeat = *repeat;
  return result;
}

}  // namespace raiser::io
