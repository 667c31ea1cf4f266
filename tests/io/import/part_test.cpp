#include <gtest/gtest.h>

#include <cmath>
#include <filesystem>
#include <fstream>

#include "dxf_writer.hpp"
#include "io/import/part_plate.hpp"
#include "solver/solution.hpp"
#include "tests/io/scratch.hpp"

namespace raiser::io {
namespace {

using mesh::Point;

/// A drawing on disk while it lives.
class DrawingFile {
 public:
  explicit DrawingFile(const std::string& content, const std::string& name = "part.dxf")
      : path_(folder_.file(name, content)) {}
  const std::filesystem::path& path() const { return path_; }

 private:
  test::ScratchFolder folder_;
  std::filesystem::path path_;
};

PartReading read(const std::filesystem::path& path, const std::string& unit = "") {
  PartRequest request;
  request.path = path;
  request.file = path.filename().string();
  request.unit_word = unit;
  return read_part(request);
}

std::string all(const PartReading& reading) {
  std::string result;
  for (const Diagnostic& fault : reading.faults) result += text(fault) + "\n";
  return result;
}

// An invented plate of 80 x 40 mm with a circle and an ellipse, anywhere in its drawing.
DxfWriter plate_drawing(int units, double scale) {
  DxfWriter dxf(units);
  const auto s = [scale](double v) { return v / scale; };
  dxf.line(s(60), s(20), s(140), s(20)).line(s(140), s(20), s(140), s(60));
  dxf.line(s(140), s(60), s(60), s(60)).line(s(60), s(60), s(60), s(20));
  dxf.circle(s(80), s(40), s(6)).ellipse(s(115), s(45), s(8), 0, 0.5);
  return dxf;
}

const solver::HookeLaw steel{210000.0, 0.3, solver::PlaneState::stress};

std::vector<solver::Estimate> peaks(const mesh::Plate& plate) {
  solver::Load pull;
  pull.stress = 100.0;
  std::vector<solver::Ask> asks(plate.holes.size());
  for (std::size_t k = 0; k < asks.size(); ++k) asks[k].raiser = k;
  const solver::Solution s = solver::settle({plate, steel, {pull}}, asks);
  std::vector<solver::Estimate> result;
  for (const auto& found : s.combined.raisers) result.push_back(found.gross.kt.value());
  return result;
}

TEST(Part, ByHandFromDxfAndFromStepIsThePlateItIs) {
  const mesh::Plate by_hand{80,
                            40,
                            5,
                            {{"hole 1", mesh::HoleShape::circle, 12, 12, 0, Point(-20, 0), 0},
                             {"hole 2", mesh::HoleShape::ellipse, 16, 8, 0, Point(15, 5), 0}}};
  const auto expected = peaks(by_hand);
  const DrawingFile mm(plate_drawing(4, 1).text());
  const DrawingFile inches(plate_drawing(1, 25.4).text(), "inches.dxf");
  const std::filesystem::path step = RAISER_SOURCE_DIR "/tests/io/import/parts/plate.step";
  for (const auto& path : {mm.path(), inches.path(), step}) {
    const auto part = read(path);
    ASSERT_TRUE(part.value) << all(part);
    EXPECT_LT((part.value->centre - Point(100, 40)).norm(), 1e-6) << path;
    const PartPlate plate = plate_of(*part.value, 5, {}, {});
    ASSERT_TRUE(plate.plate) << path;
    EXPECT_FALSE(plate.plate->outline) << path;
    const auto found = peaks(*plate.plate);
    ASSERT_EQ(found.size(), expected.size());
    for (std::size_t k = 0; k < found.size(); ++k)
      EXPECT_LE(std::abs(found[k].value - expected[k].value), found[k].bound + expected[k].bound) << path;
  }
}

TEST(Part, UnitsAreHonouredOrAskedForNeverGuessed) {
  const DrawingFile silent(plate_drawing(0, 1).text());
  EXPECT_NE(all(read(silent.path())).find("does not say its units"), std::string::npos);
  const auto told = read(silent.path(), "cm");
  ASSERT_TRUE(told.value) << all(told);
  EXPECT_NEAR(told.value->size.x(), 800, 1e-9);
  const DrawingFile inches(plate_drawing(1, 1).text(), "inches.dxf");
  EXPECT_NE(all(read(inches.path(), "mm")).find("says that its unit is in"), std::string::npos);
  EXPECT_TRUE(read(inches.path(), "in").value);
}

TEST(Part, OtherFilesAreRefused) {
  const DrawingFile picture("hello", "part.svg");
  EXPECT_NE(all(read(picture.path())).find(".dxf, .step or .stp"), std::string::npos);
  EXPECT_NE(all(read("missing.dxf")).find("no such file"), std::string::npos);
}

TEST(Part, EdgesAndHolesAreNamedByPlace) {
  const DrawingFile file(plate_drawing(4, 1).text());
  const auto part = read(file.path());
  ASSERT_TRUE(part.value);
  const PartPlate plate = plate_of(*part.value, 5, {{"clamped", Point(60, 45)}}, {{"bolt", Point(80, 41)}});
  ASSERT_TRUE(plate.plate);
  EXPECT_EQ(plate.plate->holes[0].name, "bolt");
  EXPECT_EQ(mesh::edge_names(*plate.plate), (std::vector<std::string>{"bottom", "right", "top", "clamped"}));
  const PartPlate twice = plate_of(*part.value, 5, {}, {{"a", Point(80, 41)}, {"b", Point(80, 39)}});
  EXPECT_FALSE(twice.plate);
  ASSERT_EQ(twice.misplaced.size(), 1U);
  EXPECT_EQ(twice.misplaced[0].index, 1U);
  const PartPlate corner = plate_of(*part.value, 5, {{"a", Point(60, 20)}, {"b", Point(0, 0)}}, {});
  ASSERT_EQ(corner.misplaced.size(), 2U);
  EXPECT_NE(corner.misplaced[0].what.find("two edges are as near"), std::string::npos);
  EXPECT_NE(corner.misplaced[1].cure.find("from (60, 20) mm to (140, 60) mm"), std::string::npos);
}

// A stepped strip with fillets of 3 mm: arcs that cut into the material are fillets.
TEST(Part, ArcsThatCutInAreFillets) {
  const double b = std::tan(std::acos(-1.0) / 8);
  DxfWriter dxf;
  dxf.polyline({{0, 0},
                {40, 0},
                {40, 7, -b},
                {43, 10},
                {80, 10},
                {80, 30},
                {43, 30, -b},
                {40, 33},
                {40, 40},
                {0, 40}});
  const DrawingFile file(dxf.text());
  const auto part = read(file.path());
  ASSERT_TRUE(part.value) << all(part);
  const PartPlate plate = plate_of(*part.value, 5, {}, {});
  ASSERT_TRUE(plate.plate);
  const auto raisers = mesh::raisers(*plate.plate);
  ASSERT_EQ(raisers.size(), 2U);
  for (const mesh::Raiser& raiser : raisers) {
    EXPECT_EQ(raiser.kind, mesh::Raiser::Kind::fillet);
    EXPECT_NEAR(raiser.radius, 3, 1e-9);
    EXPECT_NEAR(raiser.root.x(), 3, 1e-9);  // x = 43 of the drawing: the narrow part
    EXPECT_NEAR(raiser.mouth.x(), 0, 1e-9);
  }
}

TEST(Part, SharpCornersOfHolesAreRefusedWithTheirPlace) {
  DxfWriter dxf;
  dxf.rectangle(40, 20).polyline({{0, 0}, {5, 0}, {0, 5}});
  const DrawingFile file(dxf.text());
  const auto part = read(file.path());
  ASSERT_TRUE(part.value);
  const PartPlate plate = plate_of(*part.value, 5, {}, {});
  EXPECT_FALSE(plate.plate);
  ASSERT_EQ(plate.faults.size(), 3U);
  std::string all;
  for (const auto& fault : plate.faults) all += fault.what;
  EXPECT_NE(all.find("(5, 0) mm"), std::string::npos) << all;
}

// An ellipse in two halves and a slot with its flanks in pieces and arcs of its
// ends in halves of other radii are no known shapes: they are drawn holes.
TEST(Part, HolesOfAnyShapeGiveTheKtOfTheirCurves) {
  DxfWriter dxf;
  dxf.rectangle(120, 60);
  const double pi = std::acos(-1.0);
  for (const double begin : {0.0, pi})
    dxf.head("ELLIPSE")
        .group(10, 0)
        .group(20, 0)
        .group(11, 0)
        .group(21, 10)
        .group(40, 0.5)
        .group(41, begin)
        .group(42, begin + pi);
  const DrawingFile file(dxf.text());
  const auto part = read(file.path());
  ASSERT_TRUE(part.value) << all(part);
  const PartPlate plate = plate_of(*part.value, 5, {}, {});
  ASSERT_TRUE(plate.plate);
  ASSERT_EQ(plate.plate->holes[0].shape, mesh::HoleShape::drawn);
  const mesh::Plate by_hand{120, 60, 5, {{"hole 1", mesh::HoleShape::ellipse, 10, 20, 0, Point(0, 0), 0}}};
  const auto expected = peaks(by_hand);
  const auto found = peaks(*plate.plate);
  EXPECT_GT(expected[0].value, 5.0);
  EXPECT_LE(std::abs(found[0].value - expected[0].value), found[0].bound + expected[0].bound);
}

}  // namespace
}  // namespace raiser::io
