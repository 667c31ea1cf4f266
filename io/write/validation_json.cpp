#include <cmath>
#include <nlohmann/json.hpp>

#include "io/write/provenance.hpp"
#include "io/write/validation.hpp"
#include "io/write/validation_words.hpp"

namespace raiser::io {
namespace {

using Json = nlohmann::ordered_json;
using validation::Agreement;

std::string_view word(Agreement agreement) {
  switch (agreement) {
    case Agreement::exact:
      return "exact";
    case Agreement::not_exact:
      return "not exact";
    case Agreement::within_claim:
      return "within claim";
    case Agreement::beyond_claim:
      return "beyond claim";
    case Agreement::as_found:
      return "as known";
    case Agreement::not_as_found:
      return "farther off than known";
    case Agreement::outside_range:
      return "outside range";
  }
  return "";
}

Json number(double value) { return std::isfinite(value) ? Json(value) : Json(nullptr); }

Json source(validation::Reference reference) {
  const validation::Published& from = validation::record(reference);
  Json limits = Json::array();
  for (const auto& limit : from.limits)
    limits.push_back({{"parameter", limit.parameter}, {"low", limit.low}, {"high", limit.high}});
  Json object{{"name", from.name},
              {"source", from.source},
              {"definition", from.definition},
              {"limits", limits},
              {"claimed", from.claimed},
              {"claimed_relative_error", nullptr},
              {"known", from.found},
              {"known_relative_error", from.accuracy},
              {"from_memory", from.from_memory}};
  if (from.claim) object["claimed_relative_error"] = *from.claim;
  return object;
}

Json point(const validation::PointResult& result) {
  Json parameters = Json::object();
  for (const auto& p : result.parameters) parameters[std::string(p.name)] = p.value;
  Json object{{"series", result.series}, {"parameters", parameters}};
  const validation::Ours& ours = result.ours;
  object["ours"] = {{"value", nullptr},
                    {"bound", nullptr},
                    {"unit", "1"},
                    {"relative_effect_of_the_plate", ours.model},
                    {"settled", ours.is_settled},
                    {"reason", ours.reason},
                    {"degree", ours.degree},
                    {"unknowns", ours.unknowns},
                    {"seconds", ours.seconds}};
  if (ours.value) {
    object["ours"]["value"] = number(ours.value->value);
    object["ours"]["bound"] = number(ours.value->bound);
  }
  object["published"] = Json::array();
  for (const auto& held : result.held) {
    Json value{{"source", validation::record(held.reference).name},
               {"value", held.published},
               {"off", number(held.off)},
               {"verdict", word(held.agreement)}};
    if (held.digits) value["digits"] = *held.digits;
    object["published"].push_back(std::move(value));
  }
  return object;
}

Json family(const validation::FamilyResult& result) {
  const validation::Family& f = *result.family;
  Json object{{"id", f.id},
              {"records", f.records},
              {"title", f.title},
              {"abscissa", f.abscissa},
              {"number", f.ordinate},
              {"computed_on", f.reading},
              {"why_sources_differ", f.deviation},
              {"tolerance", result.tolerance},
              {"sound", is_sound(result)}};
  object["sources"] = Json::array();
  for (const auto reference : cited_by(f)) object["sources"].push_back(source(reference));
  object["points"] = Json::array();
  for (const auto& p : result.points) object["points"].push_back(point(p));
  return object;
}

}  // namespace

std::string validation_json(const std::vector<validation::FamilyResult>& results, bool is_quick) {
  Json document{{"format", "raiser validation 1"},
                {"raiser", version()},
                {"compiler", compiler()},
                {"run", is_quick ? "quick" : "full"},
                {"off", "(published - ours) / |ours|"},
                {"families", Json::array()}};
  for (const auto& result : results) document["families"].push_back(family(result));
  return document.dump(2) + "\n";
}

}  // namespace raiser::io
