#include "io/case/alloys.hpp"

#include <algorithm>
#include <array>

namespace raiser::io {

namespace {

// Published: Dowling = N. E. Dowling, Mechanical Behavior of Materials, 4th ed. (2013); Callister =
// W. D. Callister and D. G. Rethwisch, Materials Science and Engineering.
constexpr std::string_view eurocode = "E, nu: EN 1993-1-1, 3.2.6; yield: EN 10025-2";
constexpr std::string_view minimum = "yield is the least that the standard allows up to 16 mm thick";
constexpr std::string_view steel = "E, nu: Dowling, Table 5.2, mild steel; yield: Callister, Table 8.1";
constexpr std::string_view steel_b5 = "E, nu: Dowling, Table 5.2, mild steel; yield: Callister, Table B.5";
constexpr std::string_view steel_d = "E, nu: Dowling, Table 5.2, mild steel; yield: Dowling, Table 8.1";
constexpr std::string_view typical =
    "E within 5 %; yield typical, it varies by 20 % with product and heat treatment";

constexpr std::array<Alloy, 14> table{{
    {"S235", "structural steel", 210000, 0.3, 235, 16.0, minimum, eurocode},
    {"S275", "structural steel", 210000, 0.3, 275, 16.0, minimum, eurocode},
    {"S355", "structural steel", 210000, 0.3, 355, 16.0, minimum, eurocode},
    {"1040", "carbon steel", 212000, 0.293, 260, std::nullopt, typical, steel_b5},
    {"4130", "Cr-Mo steel, quenched and tempered", 212000, 0.293, 1090, std::nullopt, typical, steel_d},
    {"4140", "Cr-Mo steel, tempered at 482 C", 212000, 0.293, 1100, std::nullopt,
     "E within 5 %; yield 1,100 to 1,200 MPa, more or less with other tempers", steel_b5},
    {"4340", "Ni-Cr-Mo steel, tempered at 425 C", 212000, 0.293, 1420, std::nullopt, typical, steel},
    {"17-7PH", "stainless steel, aged at 510 C", 215000, 0.283, 1310, std::nullopt, typical,
     "E, nu: Dowling, Table 5.2, stainless steel; yield: Callister, Table B.5"},
    {"2024-T3", "aluminium", 73000, 0.33, 345, std::nullopt, typical,
     "E, nu: values of 2024-T4 in a university's list; yield: Callister, Table 8.1"},
    {"6061-T6", "aluminium", 70300, 0.345, 276, std::nullopt,
     "E 69 to 72 GPa; yield typical, it varies by 20 % with product and heat treatment",
     "E, nu: Dowling, Table 5.2, aluminium; yield: from memory"},
    {"7075-T651", "aluminium plate", 70300, 0.345, 495, std::nullopt,
     "E 69 to 72 GPa; yield typical, it varies by 20 % with thickness and direction",
     "E, nu: Dowling, Table 5.2, aluminium; yield: Callister, Table 8.1"},
    {"Ti-6Al-4V", "titanium", 114000, 0.34, 910, std::nullopt, "E 114 to 120 GPa; yield typical",
     "E, nu: a university's list; yield: Callister, Table 8.1"},
    {"AZ31B", "magnesium, extruded", 44700, 0.291, 200, std::nullopt, typical,
     "E, nu: Dowling, Table 5.2, magnesium; yield: Callister, Table B.5"},
    {"18Ni maraging", "steel, vacuum melted", 212000, 0.293, 1290, std::nullopt, typical, steel_d},
}};

}  // namespace

std::span<const Alloy> alloys() { return table; }

std::optional<Alloy> find_alloy(std::string_view name) {
  const auto* found =
      std::find_if(table.begin(), table.end(), [name](const Alloy& alloy) { return alloy.name == name; });
  if (found == table.end()) return std::nullopt;
  return *found;
}

}  // namespace raiser::io
