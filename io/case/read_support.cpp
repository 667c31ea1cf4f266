#include <fmt/format.h>

#include <array>

#include "io/case/outline.hpp"
#include "io/case/parts.hpp"
#include "mesh/plate/words.hpp"

namespace raiser::io {

namespace {

constexpr std::array<std::string_view, 5> support_keys{"name", "edge", "kind", "normal", "along"};
constexpr std::array<std::string_view, 3> fixed_keys{"name", "edge", "kind"};
constexpr std::array<std::string_view, 3> kinds{"clamped", "sliding", "displaced"};

/// Displacements of an edge that is moved: the normal one, the one along, or both.
bool read_displacements(const Table& table, solver::Support& support) {
  bool sound = true;
  for (const auto& [key, value] : {std::pair{"normal", &support.normal}, {"along", &support.along}}) {
    const Entry* entry = find(table, key);
    if (entry == nullptr) continue;
    *value = quantity(table, entry, Dimension::length, Sign::any);
    sound = sound && value->has_value();
  }
  if (sound && !support.normal && !support.along) {
    complain(
        table, "a displaced edge has no displacement",
        "add normal, positive outward, or along, positive anticlockwise, or both; e.g. normal = \"0.1 mm\"");
    return false;
  }
  return sound;
}

}  // namespace

std::vector<SupportReading> read_supports(const Table& document, const OutlineReading& outline) {
  const std::vector<std::string>& edges = outline.edges;
  const std::vector<std::string_view> edge_words(edges.begin(), edges.end());
  const std::string sample =
      edges.size() == 4 ? fmt::format("\"{}\"", edges[2]) : sample_of(edge_words, "left");
  std::vector<SupportReading> supports;
  Names names;
  for (const Table& table : tables_at(document, "support")) {
    refuse_unknown(table, support_keys);
    const auto edge = choice(table, require(table, "edge", sample), edge_words);
    const auto kind = choice(table, require(table, "kind", "\"clamped\""), kinds);
    solver::Support support;
    bool sound = edge && kind;
    if (kind && *kind < 2) {
      refuse_unfitting(table, fmt::format("a {} edge", kinds[*kind]), support_keys, fixed_keys);
      support.normal = 0.0;
      if (*kind == 0) support.along = 0.0;
    } else {
      sound = read_displacements(table, support) && sound;
    }
    support.edge = edge.value_or(0);
    support.name = unique_name(
        table,
        edge ? mesh::edge_phrase(edges[*edge]) + " held" : fmt::format("support {}", supports.size() + 1),
        names);
    supports.push_back({sound ? std::optional(std::move(support)) : std::nullopt, table.node->at});
  }
  return supports;
}

}  // namespace raiser::io
