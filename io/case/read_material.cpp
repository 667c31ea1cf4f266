#include <fmt/format.h>

#include <algorithm>
#include <array>

#include "io/case/alloys.hpp"
#include "io/case/parts.hpp"

namespace raiser::io {

namespace {

using Keys = std::span<const std::string_view>;

constexpr std::array<std::string_view, 10> all_keys{
    "youngs_modulus", "poissons_ratio", "E1",   "E2", "G12", "nu12", "angle",
    "state",          "yield_strength", "alloy"};
constexpr std::array<std::string_view, 4> isotropic_keys{"youngs_modulus", "poissons_ratio", "state",
                                                         "yield_strength"};
// No yield strength: it would be held against von Mises' stress, which is of isotropic metals.
constexpr std::array<std::string_view, 6> orthotropic_keys{"E1", "E2", "G12", "nu12", "angle", "state"};
constexpr std::array<std::string_view, 5> alloy_keys{"alloy", "youngs_modulus", "poissons_ratio", "state",
                                                     "yield_strength"};

bool any_of_these(const Table& table, Keys keys) {
  return std::any_of(keys.begin(), keys.end(), [&](auto key) { return find(table, key) != nullptr; });
}

std::optional<double> modulus(const Table& table, std::string_view key, std::string_view sample) {
  return quantity(table, require(table, key, sample), Dimension::stress, Sign::positive);
}

/// The state: plane stress by default.
std::optional<solver::PlaneState> read_state(const Table& table) {
  constexpr std::array<std::string_view, 2> words{"plane stress", "plane strain"};
  const Entry* entry = find(table, "state");
  if (entry == nullptr) return solver::PlaneState::stress;
  const auto index = choice(table, entry, words);
  if (!index) return std::nullopt;
  return *index == 0 ? solver::PlaneState::stress : solver::PlaneState::strain;
}

/// Tells every fault of the law at the key it comes from; whether there is none.
bool is_sound(const Table& table, const solver::HookeLaw& law) {
  constexpr std::array<std::string_view, 6> isotropic{"youngs_modulus", "", "",
                                                      "poissons_ratio", "", "state"};
  constexpr std::array<std::string_view, 6> orthotropic{"E1", "E2", "G12", "nu12", "angle", "state"};
  const auto found = solver::faults(law);
  for (const solver::MaterialFault& fault : found) {
    const auto index = static_cast<std::size_t>(fault.constant);
    const Entry* entry = find(table, law.orthotropy ? orthotropic[index] : isotropic[index]);
    if (entry != nullptr)
      complain(table, *entry, fault.what, fault.cure);
    else
      complain(table, fault.what, fault.cure);
  }
  return found.empty();
}

/// An isotropic law from what could be read; what could not has its fault
/// already and must not hide those of the rest.
std::optional<solver::HookeLaw> isotropic_law(const Table& table, std::optional<double> e,
                                              std::optional<double> nu) {
  const auto state = read_state(table);
  const solver::HookeLaw law{
      e.value_or(1.0), nu.value_or(0.0), state.value_or(solver::PlaneState::stress), {}};
  if (!is_sound(table, law) || !e || !nu || !state) return std::nullopt;
  return law;
}

std::optional<solver::HookeLaw> read_isotropic(const Table& table) {
  refuse_unfitting(table, "an isotropic material", all_keys, isotropic_keys);
  const auto e = modulus(table, "youngs_modulus", "\"210 GPa\"");
  const auto nu = quantity(table, require(table, "poissons_ratio", "0.3"), Dimension::ratio, Sign::any);
  return isotropic_law(table, e, nu);
}

std::optional<solver::HookeLaw> read_orthotropic(const Table& table) {
  refuse_unfitting(table, "an orthotropic material", all_keys, orthotropic_keys);
  const auto e1 = modulus(table, "E1", "\"138 GPa\"");
  const auto e2 = modulus(table, "E2", "\"9 GPa\"");
  const auto g12 = modulus(table, "G12", "\"6.9 GPa\"");
  const auto nu12 = quantity(table, require(table, "nu12", "0.3"), Dimension::ratio, Sign::any);
  const Entry* entry = find(table, "angle");
  const auto angle =
      entry == nullptr ? std::optional(0.0) : quantity(table, entry, Dimension::angle, Sign::any);
  const auto state = read_state(table);
  const bool complete = e1 && e2 && g12 && nu12 && angle && state;
  const solver::Orthotropy own{complete ? *e2 : 1.0, complete ? *g12 : 1.0, angle.value_or(0.0)};
  const solver::HookeLaw law{complete ? *e1 : 1.0, complete ? *nu12 : 0.0,
                             state.value_or(solver::PlaneState::stress), own};
  if (!is_sound(table, law) || !complete) return std::nullopt;
  return law;
}

/// The alloy's own value where the table gives none.
std::optional<double> given_or(const Table& table, std::string_view key, Dimension dimension, Sign sign,
                               double otherwise) {
  const Entry* entry = find(table, key);
  return entry == nullptr ? std::optional(otherwise) : quantity(table, entry, dimension, sign);
}

Material read_alloy(const Table& table, const PlateSizes& plate) {
  refuse_unfitting(table, "an alloy", all_keys, alloy_keys);
  std::vector<std::string_view> names;
  for (const Alloy& alloy : alloys()) names.push_back(alloy.name);
  const Entry* entry = find(table, "alloy");
  const auto index = choice(table, entry, names);
  Alloy unknown;
  unknown.youngs_modulus = 1.0;
  const Alloy alloy = index ? alloys()[*index] : unknown;
  Material material;
  material.law = isotropic_law(
      table, given_or(table, "youngs_modulus", Dimension::stress, Sign::positive, alloy.youngs_modulus),
      given_or(table, "poissons_ratio", Dimension::ratio, Sign::any, alloy.poissons_ratio));
  if (!index) return {};
  material.alloy = alloy.name;
  if (find(table, "yield_strength") != nullptr) return material;
  material.yield_strength = alloy.yield_strength;
  if (alloy.most_thickness && plate.thickness && *plate.thickness > *alloy.most_thickness)
    complain(table, *entry,
             fmt::format("its yield strength of {:g} MPa holds up to {:g} mm and the plate is {:g} mm thick",
                         alloy.yield_strength, *alloy.most_thickness, *plate.thickness),
             "give the yield_strength of this thickness as well");
  return material;
}

}  // namespace

Material read_material(const Table& table, const PlateSizes& plate) {
  refuse_unknown(table, all_keys);
  constexpr std::array<std::string_view, 4> constants{"E1", "E2", "G12", "nu12"};
  Material material;
  if (find(table, "alloy") != nullptr)
    material = read_alloy(table, plate);
  else
    material.law = any_of_these(table, constants) ? read_orthotropic(table) : read_isotropic(table);
  const Entry* yield = find(table, "yield_strength");
  if (yield != nullptr) material.yield_strength = quantity(table, yield, Dimension::stress, Sign::positive);
  return material;
}

}  // namespace raiser::io
