#include <fmt/format.h>
#include <gtest/gtest.h>

#include <cmath>
#include <filesystem>
#include <fstream>
#include <numbers>
#include <string>

#include "io/case/case.hpp"
#include "io/case/describe.hpp"
#include "io/case/layout.hpp"
#include "tests/io/scratch.hpp"

using namespace raiser::io;
using raiser::mesh::HoleShape;
using raiser::solver::Load;
using raiser::solver::PlaneState;
using raiser::solver::Quantity;

namespace {

const std::string head = R"(raiser = 1
[plate]
length = "240 mm"
width = "60 mm"
thickness = "6 mm"
[material]
youngs_modulus = "210 GPa"
poissons_ratio = 0.3
)";
const std::string bolt = R"([[hole]]
name = "bolt"
shape = "circle"
diameter = "18 mm"
)";
const std::string pull = R"([[load]]
kind = "tension"
force = "36 kN"
)";

std::string all_faults(const CaseReading& reading) {
  std::string result;
  for (const Diagnostic& fault : reading.faults) result += text(fault) + "\n";
  return result;
}

Case read(const std::string& content) {
  auto reading = read_case_text(content, "test.toml");
  if (!reading.value) throw std::runtime_error(all_faults(reading));
  EXPECT_TRUE(reading.faults.empty());
  return std::move(*reading.value);
}

Load read_load(const std::string& table) {
  return read(head + bolt + "[[load]]\n" + table).problem.loads.at(0);
}

std::string only_fault(const std::string& content) {
  const auto reading = read_case_text(content, "test.toml");
  EXPECT_FALSE(reading.value);
  EXPECT_EQ(reading.faults.size(), 1U) << all_faults(reading);
  return reading.faults.empty() ? "" : text(reading.faults.front());
}

bool contains(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

}  // namespace

TEST(Case, ReadsThePlateWithItsDefaults) {
  const Case input = read(head + bolt + pull);
  const auto& plate = input.problem.plate;
  EXPECT_EQ(plate.length, 240.0);
  EXPECT_EQ(plate.width, 60.0);
  EXPECT_EQ(plate.thickness, 6.0);
  ASSERT_EQ(plate.holes.size(), 1U);
  EXPECT_EQ(plate.holes[0].name, "bolt");
  EXPECT_EQ(plate.holes[0].length, 18.0);
  EXPECT_EQ(plate.holes[0].width, 18.0);
  EXPECT_EQ(plate.holes[0].centre, raiser::mesh::Point(0.0, 0.0));
  EXPECT_EQ(input.problem.material.youngs_modulus, 210e3);
  EXPECT_EQ(input.problem.material.poissons_ratio, 0.3);
  EXPECT_EQ(input.problem.material.state, PlaneState::stress);
  EXPECT_FALSE(input.yield_strength);
  EXPECT_EQ(input.title, "test");
  EXPECT_EQ(input.problem.loads.at(0).name, "tension");
  EXPECT_EQ(input.problem.loads.at(0).stress, 100.0);
  ASSERT_EQ(input.asks.size(), 3U);
  EXPECT_EQ(input.asks[2].quantity, Quantity::von_mises);
  EXPECT_EQ(input.asks[2].tolerance, 1e-3);
  EXPECT_FALSE(input.written.contains("hole.1.at"));
  EXPECT_EQ(input.written.at("load.1.force"), "36 kN");
}

TEST(Case, ReadsEveryShape) {
  const Case input = read(head + R"([[hole]]
shape = "circle"
radius = "4 mm"
at = ["-80 mm", "5 mm"]
[[hole]]
shape = "ellipse"
length = "20 mm"
width = "10 mm"
angle = "30 deg"
at = ["-40 mm", "0 mm"]
[[hole]]
shape = "slot"
length = "2 cm"
width = "0.5 in"
[[hole]]
name = "window"
shape = "rounded rectangle"
length = "20 mm"
width = "30 mm"
corner_radius = "3 mm"
at = ["60 mm", "0 mm"]
angle = "-0.25 rad"
)" + pull);
  const auto& holes = input.problem.plate.holes;
  ASSERT_EQ(holes.size(), 4U);
  EXPECT_EQ(holes[0].name, "hole 1");
  EXPECT_EQ(holes[0].length, 8.0);
  EXPECT_EQ(holes[0].width, 8.0);
  EXPECT_EQ(holes[0].centre, raiser::mesh::Point(-80.0, 5.0));
  EXPECT_EQ(holes[1].shape, HoleShape::ellipse);
  EXPECT_NEAR(holes[1].angle, std::numbers::pi / 6.0, 1e-15);
  EXPECT_EQ(holes[2].shape, HoleShape::slot);
  EXPECT_EQ(holes[2].length, 20.0);
  EXPECT_EQ(holes[2].width, 12.7);
  EXPECT_EQ(holes[3].name, "window");
  EXPECT_EQ(holes[3].shape, HoleShape::rounded_rectangle);
  EXPECT_EQ(holes[3].corner_radius, 3.0);
  EXPECT_EQ(holes[3].angle, -0.25);
}

// Gross sections of the plate: 60 x 6 and 240 x 6 mm^2, section modulus
// 6 * 60^2 / 6 = 3600 mm^3.
TEST(Case, TurnsForcesAndMomentsIntoStresses) {
  EXPECT_EQ(read_load("kind = \"tension\"\nforce = \"36 kN\"").stress, 100.0);
  const Load across = read_load("kind = \"tension\"\ndirection = \"across\"\nforce = \"-144 kN\"");
  EXPECT_EQ(across.kind, Load::Kind::transverse);
  EXPECT_EQ(across.stress, -100.0);
  EXPECT_EQ(across.name, "tension across");
  EXPECT_EQ(read_load("kind = \"shear\"\nforce = \"18 kN\"").stress, 50.0);
  EXPECT_NEAR(read_load("kind = \"bending\"\nmoment = \"360 N m\"").stress, 100.0, 1e-12);
  EXPECT_EQ(read_load("kind = \"bending\"\nstress = \"70 MPa\"").stress, 70.0);
  const Load pressure = read_load("kind = \"pressure\"\nhole = \"bolt\"\npressure = \"10 MPa\"");
  EXPECT_EQ(pressure.kind, Load::Kind::pressure);
  EXPECT_EQ(pressure.hole, 0U);
  EXPECT_EQ(pressure.stress, 10.0);
}

TEST(Case, ReadsEdgeLoads) {
  const Case input = read(head + bolt + R"([[load]]
kind = "edge"
edge = "top"
normal_force = "144 kN"
shear = "20 MPa"
[[load]]
kind = "edge"
edge = "bottom"
normal = "100 MPa"
shear_force = "28.8 kN"
[[load]]
kind = "edge"
edge = "left"
shear_force = "-7.2 kN"
[[load]]
kind = "edge"
edge = "right"
shear = "-20 MPa"
)");
  const auto& loads = input.problem.loads;
  ASSERT_EQ(loads.size(), 4U);
  EXPECT_EQ(loads[0].edge, raiser::mesh::rectangle::top);
  EXPECT_EQ(loads[0].stress, 100.0);
  EXPECT_EQ(loads[0].along, 20.0);
  EXPECT_EQ(loads[1].edge, raiser::mesh::rectangle::bottom);
  EXPECT_EQ(loads[1].along, 20.0);
  EXPECT_EQ(loads[2].edge, raiser::mesh::rectangle::left);
  EXPECT_EQ(loads[2].along, -20.0);
  EXPECT_EQ(loads[2].stress, 0.0);
  EXPECT_EQ(loads[3].name, "right edge");
}

TEST(Case, GivesUnnamedLoadsNamesOfTheirOwn) {
  const Case input = read(head + bolt + pull + pull +
                          "[[load]]\nname = \"tension 2\"\nkind = \"shear\"\nstress = \"1 MPa\"\n");
  EXPECT_EQ(input.problem.loads[0].name, "tension");
  EXPECT_EQ(input.problem.loads[1].name, "tension 3");
}

TEST(Case, AsksForWhatIsWritten) {
  const std::string second =
      "[[hole]]\nname = \"pin\"\nshape = \"circle\"\ndiameter = \"9 mm\"\nat = [\"50 mm\", \"0 mm\"]\n";
  const Case input = read(head + bolt + second + pull + R"([ask]
tolerance = "0.5 %"
holes = ["pin"]
results = ["von Mises"]
[[ask.result]]
name = "peak"
of = "smallest edge stress"
hole = "bolt"
tolerance = 1e-5
[[ask.result]]
name = "other"
of = "largest edge stress"
hole = "pin"
)");
  ASSERT_EQ(input.asks.size(), 3U);
  EXPECT_EQ(input.asks[0].quantity, Quantity::von_mises);
  EXPECT_EQ(input.asks[0].raiser, 1U);
  EXPECT_EQ(input.asks[0].tolerance, 0.005);
  EXPECT_EQ(input.asks[1].quantity, Quantity::smallest_edge_stress);
  EXPECT_EQ(input.asks[1].raiser, 0U);
  EXPECT_EQ(input.asks[1].tolerance, 1e-5);
  EXPECT_EQ(input.asks[1].name, "peak");
  EXPECT_EQ(input.asks[2].tolerance, 0.005);
}

TEST(Case, SaysWhereWhatAndHowToMend) {
  std::string content = head + bolt + pull;
  content.replace(content.find("\"18 mm\""), 7, "\"18\"");
  EXPECT_EQ(only_fault(content),
            "test.toml:12:12: hole.diameter = \"18\": a length needs a unit; write e.g. \"18 mm\"");
}

TEST(Case, DoesNotDependOnLineEndsOrByteOrderMark) {
  std::string windows = "\xEF\xBB\xBF";
  for (const char c : head + bolt + pull) windows += c == '\n' ? std::string("\r\n") : std::string(1, c);
  const Case input = read(windows);
  EXPECT_EQ(input.problem.loads.at(0).stress, 100.0);
  windows.replace(windows.find("\"18 mm\""), 7, "\"18\"");
  EXPECT_TRUE(only_fault(windows).starts_with("test.toml:12:12: hole.diameter"));
}

TEST(Case, ReadsAThousandHolesAndNoMore) {
  const auto plate_of = [](int count) {
    std::string content = head;
    content.replace(content.find("\"240 mm\""), 8, "\"24 m\"");
    for (int i = 0; i < count; ++i) {
      content +=
          fmt::format("[[hole]]\nshape = \"circle\"\ndiameter = \"2 mm\"\nat = [\"{} mm\", \"0 mm\"]\n",
                      10 * (i - count / 2));
    }
    return content + pull;
  };
  EXPECT_EQ(read(plate_of(1000)).problem.plate.holes.size(), 1000U);
  const std::string fault = only_fault(plate_of(1001));
  EXPECT_TRUE(contains(fault, "test.toml:4009:1: hole: there are 1001 holes")) << fault;
}

TEST(Case, TellsKindsOfFaultApart) {
  const auto kind_of = [](const std::string& content) {
    const auto reading = read_case_text(content, "test.toml");
    EXPECT_EQ(reading.faults.size(), 1U) << all_faults(reading);
    return reading.faults.at(0).kind;
  };
  EXPECT_EQ(kind_of(head + pull), Diagnostic::Kind::input);
  EXPECT_EQ(kind_of(head + bolt + "at = [\"0 mm\", \"40 mm\"]\n" + pull), Diagnostic::Kind::geometry);
  EXPECT_EQ(kind_of(head + bolt + "[[load]]\nkind = \"edge\"\nedge = \"top\"\nnormal = \"5 MPa\"\n"),
            Diagnostic::Kind::loads);
}

TEST(Case, RefusesWhatIsNoCaseFile) {
  const test::ScratchFolder scratch;
  const auto refusal = [](const std::filesystem::path& file) {
    const auto reading = read_case(file);
    EXPECT_FALSE(reading.value);
    EXPECT_EQ(reading.faults.size(), 1U) << all_faults(reading);
    return all_faults(reading);
  };
  EXPECT_TRUE(contains(refusal(scratch.path() / "none.toml"), "none.toml: there is no such file"));
  EXPECT_TRUE(contains(refusal(scratch.path()), "this is a folder"));
  EXPECT_TRUE(contains(refusal("/dev/zero"), "not a regular file"));
  EXPECT_TRUE(contains(refusal(scratch.file("empty.toml", "")), "the file is empty"));
  EXPECT_TRUE(contains(refusal(scratch.file("blank.toml", " \r\n\t\n")), "the file is empty"));
  EXPECT_TRUE(contains(refusal(scratch.file("nul.toml", std::string("raiser = 1\n\0", 12))),
                       ":2:1: this is not text"));
  EXPECT_TRUE(
      contains(refusal(scratch.file("latin1.toml", "# \xE9t\xE9\n")), ":1:3: this is not text in UTF-8"));
  EXPECT_TRUE(contains(refusal(scratch.file("overlong.toml", "# \xC0\xAF\n")), "not text in UTF-8"));
  EXPECT_TRUE(contains(refusal(scratch.file("surrogate.toml", "# \xED\xA0\x80\n")), "not text in UTF-8"));
  EXPECT_TRUE(
      contains(refusal(scratch.file("large.toml", std::string(50 << 20, 'x'))), "the file has 50.0 MB"));
}

TEST(Case, ReadsFromAFile) {
  const test::ScratchFolder scratch;
  const auto reading = read_case(scratch.file("strip.toml", head + bolt + pull));
  ASSERT_TRUE(reading.value) << all_faults(reading);
  EXPECT_EQ(reading.value->title, "strip");
  EXPECT_EQ(reading.value->file, scratch.path() / "strip.toml");
}

TEST(Case, StandsDeepNestingAndLongJunk) {
  for (const std::string piece :
       {"[", "{", "a.", "\"a\".", "a={", "[[", "'''", "\"\"\"", "x=[\"\"\"\"\"\"\"\",{a.", "\\"}) {
    std::string junk = "x = ";
    while (junk.size() < most_bytes - 100) junk += piece;
    const auto reading = read_case_text(junk, "junk.toml");
    EXPECT_FALSE(reading.value) << piece;
    EXPECT_FALSE(reading.faults.empty()) << piece;
  }
  EXPECT_TRUE(contains(only_fault("x = " + std::string(5000, '[')), "nest deeper"));
  EXPECT_TRUE(contains(only_fault("[" + std::string(40, 'a') + ".b.b.b.b.b.b.b.b.b.b.b.b.b.b.b.b.b.b]\n"),
                       "nest deeper"));
}

TEST(Case, RefusesQuotesThatCanBeReadInTwoWays) {
  EXPECT_TRUE(
      contains(only_fault("raiser = 1\ntitle = \"\"\"x\"\"\"\n"), "test.toml:2:9: three quotes open"));
  EXPECT_TRUE(contains(only_fault("'''a' = 1\n"), "test.toml:1:1: three quotes open"));
  EXPECT_TRUE(contains(only_fault("a = 3\"x\"\n"), "test.toml:1:6: a quote opens or closes in the middle"));
  EXPECT_TRUE(contains(only_fault("a = \"x\"y\n"), "test.toml:1:8: a quote opens or closes in the middle"));
  EXPECT_EQ(read("title = \"say \\\"\\\\\\\" # ''' \" # ''' \"\"\"\n" + head + bolt + pull).title,
            "say \"\\\" # ''' ");
}

TEST(Describe, FitsEightyColumnsAndMarksDefaults) {
  std::string content = head;
  content.replace(content.find("\"240 mm\""), 8, "\"24 m\"");
  for (int i = 0; i < 1000; ++i) {
    content += fmt::format("[[hole]]\nshape = \"circle\"\ndiameter = \"2 mm\"\nat = [\"{} mm\", \"0 mm\"]\n",
                           10 * (i - 500));
  }
  const std::string report = describe(read(content + pull));
  EXPECT_LT(report.size(), 4000U);
  EXPECT_TRUE(contains(report, "994 not listed here"));
  EXPECT_TRUE(contains(report, "hole 1 (default)"));
  EXPECT_TRUE(contains(report, "plane stress (default)"));
  EXPECT_TRUE(contains(report, "length 24000 mm (written 24 m)"));
  EXPECT_FALSE(contains(report, "width 60 mm ("));
  for (std::size_t begin = 0; begin < report.size();) {
    const std::size_t end = std::min(report.find('\n', begin), report.size());
    EXPECT_LE(columns(std::string_view(report).substr(begin, end - begin)), 80U)
        << report.substr(begin, end - begin);
    begin = end + 1;
  }
}

// A hole of 18 mm in a section of 60 x 6 mm^2 leaves 42 x 6 = 252 mm^2; 450 lbf
// in are 450 * 112.9848 N mm (NIST SP 811, B.9).
TEST(Describe, GivesTheFiguresThatFollow) {
  const std::string report =
      describe(read(head + bolt + "[[load]]\nkind = \"bending\"\nmoment = \"450 lbf in\"\n"));
  EXPECT_TRUE(contains(report, "gross section 360 mm^2 across")) << report;
  EXPECT_TRUE(contains(report, "net section at x = 0 mm: 252 mm^2, 70.0 % of gross")) << report;
  EXPECT_TRUE(contains(report, "moment 50.8432 N m")) << report;
  EXPECT_TRUE(contains(report, "written 450 lbf in")) << report;
}

TEST(Case, ReadsAnOrthotropicMaterial) {
  const std::string plate = head.substr(0, head.find("[material]"));
  const Case input = read(plate +
                          "[material]\nE1 = \"138 GPa\"\nE2 = \"9 GPa\"\nG12 = \"6.9 GPa\"\nnu12 = 0.3\n"
                          "angle = \"30 deg\"\n" +
                          bolt + pull);
  const auto& law = input.problem.material;
  EXPECT_EQ(law.youngs_modulus, 138e3);
  EXPECT_EQ(law.poissons_ratio, 0.3);
  ASSERT_TRUE(law.orthotropy);
  EXPECT_EQ(law.orthotropy->youngs_modulus_2, 9e3);
  EXPECT_EQ(law.orthotropy->shear_modulus, 6.9e3);
  EXPECT_DOUBLE_EQ(law.orthotropy->angle, std::numbers::pi / 6);
  EXPECT_TRUE(contains(describe(input), "axis 1 at 30 deg"));
}

TEST(Case, TakesAnAlloyByNameAndOverridesItKeyByKey) {
  const std::string plate = head.substr(0, head.find("[material]"));
  const Case plain = read(plate + "[material]\nalloy = \"S355\"\n" + bolt + pull);
  EXPECT_EQ(plain.alloy, "S355");
  EXPECT_EQ(plain.problem.material.youngs_modulus, 210e3);
  EXPECT_EQ(plain.yield_strength, 355.0);
  EXPECT_TRUE(contains(describe(plain), "EN 10025-2"));
  EXPECT_TRUE(contains(describe(plain), "yield strength 355 MPa (of S355)"));
  const Case own = read(plate + "[material]\nalloy = \"S355\"\nyield_strength = \"300 MPa\"\n" + bolt + pull);
  EXPECT_EQ(own.yield_strength, 300.0);
  EXPECT_EQ(own.problem.material.poissons_ratio, 0.3);
  EXPECT_TRUE(contains(describe(own), "yield strength 300 MPa,") ||
              contains(describe(own), "yield strength 300 MPa\n"));
}
