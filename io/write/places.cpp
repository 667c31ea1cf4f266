#include <fmt/format.h>

#include <algorithm>
#include <numbers>
#include <set>

#include "io/write/layout.hpp"
#include "io/write/table_parts.hpp"
#include "mesh/plate/words.hpp"

namespace raiser::io {
namespace {

using solver::PlaceFindings;
using solver::SingularField;
using Symmetry = solver::WedgeMode::Symmetry;

constexpr std::size_t most_shown = 6;

std::string_view name_of(Symmetry symmetry) {
  switch (symmetry) {
    case Symmetry::symmetric:
      return "symmetric";
    case Symmetry::antisymmetric:
      return "antisymmetric";
    case Symmetry::none:
      return "singular";
  }
  return "";
}

std::string owner_name(const mesh::Plate& plate, const mesh::Owner& owner) {
  if (owner.kind == mesh::Owner::Kind::raiser) return phrase(mesh::raiser(plate, owner.index));
  const auto names = mesh::edge_names(plate);
  return owner.index < names.size() ? mesh::edge_phrase(plain(names[owner.index])) : "an edge";
}

std::string field_line(const SingularField& field) {
  const double e = field.exponent.real();
  std::string text = fmt::format("{} part: exponent {:.4f}", name_of(field.symmetry), e);
  if (field.exponent.imag() != 0) text += fmt::format(" + {:.4f} i", field.exponent.imag());
  if (field.measured) text += fmt::format(" ({:.2f} measured)", *field.measured);
  text += fmt::format(", intensity {} MPa mm^{:.4f}", with_bound(field.intensity), 1 - e);
  if (field.exponent.imag() != 0) text += fmt::format(", phase {:.4g} rad for r in mm", field.phase);
  return text;
}

std::string place_lines(const PlaceFindings& place, const mesh::Plate& plate) {
  std::string text = wrapped(
      fmt::format("{} at ({}, {}) mm, between {} and {}", place.what, brief(place.point.x()),
                  brief(place.point.y()), owner_name(plate, place.arrives), owner_name(plate, place.leaves)),
      "  ", 4);
  for (const SingularField& field : place.fields) text += wrapped(field_line(field), "    ", 6);
  if (place.fields.empty() && place.measured)
    text += wrapped(fmt::format("exponent {:.2f} measured from the growth of the stress", *place.measured),
                    "    ", 6);
  return text;
}

/// How the intensities are defined, for those that occur.
std::string definitions(const std::vector<PlaceFindings>& places) {
  bool alike = false, held = false;
  for (const PlaceFindings& place : places)
    for (const SingularField& field : place.fields) (field.symmetry == Symmetry::none ? held : alike) = true;
  std::string text;
  if (alike)
    text +=
        "on the corner's bisector, at a distance r, the normal stress across it is intensity / sqrt(2 pi) "
        "r^(e "
        "- 1) for the symmetric part and the shear stress is that for the antisymmetric one, e the exponent "
        "(R. Gross and A. Mendelson 1972; exponents: M. L. Williams 1952)";
  if (held)
    text += std::string(text.empty() ? "" : "; ") +
            "at the end of a held edge the normal stress on that edge, at a distance r, is intensity / "
            "sqrt(2 pi) "
            "r^(e - 1)";
  return text;
}

}  // namespace

std::string places_part(const Result& result) {
  const auto& places = result.solution.places;
  if (places.empty()) return "";
  std::string text = "\nPlaces without a peak stress\n";
  for (std::size_t i = 0; i < std::min(places.size(), most_shown); ++i)
    text += place_lines(places[i], result.input.problem.plate);
  if (places.size() > most_shown) text += fmt::format("  and {} more\n", places.size() - most_shown);
  std::set<std::string> said;
  for (const PlaceFindings& place : places) {
    // Reasons that differ in the exponent alone, which stands with each place, are one.
    if (said.insert(place.why.substr(0, place.why.find(", as r^"))).second)
      text += wrapped(place.why, "  Why: ", 7);
    if (said.insert(place.cure).second) text += wrapped(place.cure, "  Do: ", 6);
  }
  const std::string defined = definitions(places);
  return defined.empty() ? text : text + wrapped(defined, "  Intensity: ", 13);
}

}  // namespace raiser::io
