#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <map>

#include "io/case/case.hpp"
#include "io/case/describe.hpp"
#include "mesh/plate/plate.hpp"
#include "mesh/plate/section.hpp"

namespace raiser::io {
namespace {

const std::filesystem::path source = RAISER_SOURCE_DIR;

Case good(CaseReading reading) {
  if (!reading.value) throw std::runtime_error(text(reading.faults.front()));
  return *std::move(reading.value);
}

/// Kt on the gross section by the raiser's name.
std::map<std::string, solver::Estimate> factors(const Case& input) {
  const solver::Solution solution = solver::settle(input.problem, input.asks);
  EXPECT_EQ(solution.status, solver::Solution::Status::settled) << solution.reason;
  std::map<std::string, solver::Estimate> result;
  for (const solver::RaiserFindings& found : solution.combined.raisers)
    if (found.gross.kt) result[mesh::raiser(input.problem.plate, found.raiser).name] = *found.gross.kt;
  return result;
}

// The bracket of examples/vane-bracket.dxf, measured off its drawing.
constexpr const char* by_hand = R"(raiser = 1
plate = { thickness = "6 mm" }
material = { alloy = "6061-T6" }
outline = [
  { at = ["0 mm", "0 mm"], edge = "foot" },
  { at = ["40 mm", "0 mm"], edge = "front" },
  { at = ["40 mm", "110 mm"], edge = "under", corner_radius = "15 mm", name = "throat" },
  { at = ["190 mm", "110 mm"], edge = "end", arc = "outwards", radius = "20 mm" },
  { at = ["190 mm", "150 mm"], edge = "top" },
  { at = ["0 mm", "150 mm"], edge = "mast", corner_radius = "10 mm" },
]
hole = [
  { shape = "circle", diameter = "9 mm", at = ["20 mm", "30 mm"], name = "lower" },
  { shape = "circle", diameter = "9 mm", at = ["20 mm", "85 mm"], name = "upper" },
  { shape = "circle", diameter = "16 mm", at = ["190 mm", "130 mm"], name = "bearing" },
  { shape = "slot", length = "40 mm", width = "10 mm", at = ["110 mm", "130 mm"], name = "slot" },
]
support = [{ edge = "mast", kind = "clamped" }]
pin = [{ hole = "bearing", force = "450 N", direction = "-90 deg" }]
)";

std::string imported(const std::string& file, const std::string& more) {
  return "raiser = 1\nplate = { thickness = \"6 mm\" }\nmaterial = { alloy = \"6061-T6\" }\n[import]\nfile = "
         "\"" +
         file + "\"\n" + more + R"(
[[import.edge]]
name = "mast"
near = ["0 mm", "60 mm"]
[[import.hole]]
name = "throat"
near = ["45 mm", "105 mm"]
[[import.hole]]
name = "lower"
near = ["20 mm", "30 mm"]
[[import.hole]]
name = "upper"
near = ["20 mm", "85 mm"]
[[import.hole]]
name = "bearing"
near = ["190 mm", "130 mm"]
[[import.hole]]
name = "slot"
near = ["110 mm", "130 mm"]
[[support]]
edge = "mast"
kind = "clamped"
[[pin]]
hole = "bearing"
force = "450 N"
direction = "-90 deg"
)";
}

TEST(ImportCase, TheSamePartByHandFromDxfAndFromStepGivesTheSameKt) {
  const auto expected = factors(good(read_case_text(by_hand, "by-hand.toml")));
  EXPECT_EQ(expected.size(), 5U);
  const std::string dxf = (source / "examples/vane-bracket.dxf").string();
  const std::string step = (source / "tests/io/import/parts/vane-bracket.step").string();
  for (const auto& content : {imported(dxf, "layer = \"PART\"\n"), imported(step, "")}) {
    const auto found = factors(good(read_case_text(content, "imported.toml")));
    ASSERT_EQ(found.size(), expected.size());
    for (const auto& [name, kt] : expected) {
      ASSERT_TRUE(found.contains(name)) << name;
      EXPECT_LE(std::abs(found.at(name).value - kt.value), found.at(name).bound + kt.bound) << name;
      EXPECT_LE(kt.bound, 2e-3 * kt.value) << name;
    }
  }
}

bool any_contains(const std::vector<std::string>& lines, const std::string& part) {
  return std::any_of(lines.begin(), lines.end(),
                     [&](const std::string& line) { return line.find(part) != std::string::npos; });
}

// Drawn in inches: a gap of 2.54 um, one line drawn twice, an end in facets, notes.
TEST(ImportCase, RepairsAreReportedAndPrinted) {
  const Case input = good(read_case(source / "tests/io/cases/good/import-repaired.toml"));
  ASSERT_TRUE(input.import);
  const ImportReport& report = *input.import;
  EXPECT_EQ(report.unit, "in");
  EXPECT_EQ(report.unit_in_mm, 25.4);
  EXPECT_EQ(report.unit_source, "$INSUNITS");
  EXPECT_TRUE(any_contains(report.repairs, "a gap of 0.00254 mm closed at (101.601, 0) mm"));
  EXPECT_TRUE(any_contains(report.repairs, "1 curve drawn twice left out once"));
  EXPECT_TRUE(any_contains(report.repairs, "short lines taken as an arc of radius 12.7 mm"));
  ASSERT_EQ(report.left_out.size(), 2U);
  EXPECT_EQ(report.left_out[0].kind, "TEXT");
  EXPECT_EQ(report.left_out[0].count, 2U);
  const std::string shown = describe(input);
  for (const char* part : {"1 in = 25.4 mm a unit, says $INSUNITS", "2 TEXT", "a gap of 0.00254 mm closed",
                           "imported outline", "the drawing's coordinates"})
    EXPECT_NE(shown.find(part), std::string::npos) << part << "\n" << shown;
}

TEST(ImportCase, UnitsThatTheDrawingDoesNotSayComeFromTheCase) {
  const std::string drawing = (source / "tests/io/cases/drawings/no-units.dxf").string();
  const Case input = good(read_case_text(
      "raiser = 1\nplate = { thickness = \"6 mm\" }\nmaterial = { alloy = \"S355\" }\n[import]\nfile = \"" +
          drawing + "\"\nunits = \"cm\"\n[[load]]\nkind = \"tension\"\nstress = \"10 MPa\"\n",
      "case.toml"));
  EXPECT_NEAR(input.problem.plate.length, 1200, 1e-9);
  EXPECT_EQ(input.import->unit_source, "the case");
}

TEST(ImportCase, EdgesHolesAndNotchesOfADrawingCanBeNamedAndAddedTo) {
  const Case input = good(read_case(source / "tests/io/cases/good/import-named.toml"));
  const mesh::Plate& plate = input.problem.plate;
  const auto edges = mesh::edge_names(plate);
  EXPECT_NE(std::find(edges.begin(), edges.end(), "seat"), edges.end());
  EXPECT_EQ(std::count(edges.begin(), edges.end(), "seat"), 1);  // two lines beside the drawn notch
  std::vector<std::string> names;
  for (const mesh::Raiser& raiser : mesh::raisers(plate)) names.push_back(raiser.name);
  EXPECT_EQ(names, (std::vector<std::string>{"vent", "bolt", "relief", "nick"}));
  EXPECT_EQ(plate.cracks.size(), 1U);
  // Gross sections close the mouth of the drawn notch: 120 mm by 40 mm.
  const mesh::Raiser relief = mesh::raisers(plate)[2];
  EXPECT_EQ(relief.kind, mesh::Raiser::Kind::notch);
  EXPECT_NEAR(mesh::shape_of(mesh::gross_along(plate, mesh::Direction::across, relief.mouth.x())).length, 40,
              1e-9);
}

}  // namespace
}  // namespace raiser::io
