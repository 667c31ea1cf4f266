#include "io/import/dxf.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "dxf_writer.hpp"
#include "io/import/curve_tools.hpp"

namespace raiser::io {
namespace {

constexpr double pi = std::numbers::pi;
using mesh::Point;

DrawingReading read(const DxfWriter& writer, const std::optional<std::string>& layer = std::nullopt) {
  return read_dxf(writer.text(), "part.dxf", layer);
}

std::string all(const std::vector<Diagnostic>& faults) {
  std::string result;
  for (const Diagnostic& fault : faults) result += text(fault) + "\n";
  return result;
}

void expect_near(const Point& a, double x, double y) {
  EXPECT_NEAR(a.x(), x, 1e-10);
  EXPECT_NEAR(a.y(), y, 1e-10);
}

TEST(Dxf, ReadsEveryKindOfCurve) {
  DxfWriter dxf;
  dxf.line(1, 2, 3, 4).arc(10, 0, 2, 350, 80).circle(5, 5, 1.5).ellipse(0, 0, 3, 4, 0.5);
  dxf.polyline({{0, 0, 1}, {2, 0}, {2, 5}}).old_polyline({{0, 0, -0.5}, {1, 0}, {1, 1}});
  const auto reading = read(dxf);
  ASSERT_TRUE(reading.value) << all(reading.faults);
  const auto& strokes = reading.value->strokes;
  ASSERT_EQ(strokes.size(), 10U);
  EXPECT_EQ(reading.value->unit, 1.0);
  expect_near(start(strokes[0].curve), 1, 2);
  expect_near(finish(strokes[0].curve), 3, 4);
  expect_near(start(strokes[1].curve), 10 + 2 * std::cos(10 * pi / 180), -2 * std::sin(10 * pi / 180));
  expect_near(finish(strokes[1].curve), 10 + 2 * std::cos(80 * pi / 180), 2 * std::sin(80 * pi / 180));
  EXPECT_NEAR(length(strokes[1].curve), 2 * pi / 2, 1e-12);
  EXPECT_NEAR(length(strokes[2].curve), 3 * pi, 1e-12);
  EXPECT_NEAR(std::abs(area({strokes[3].curve})), pi * 5 * 2.5, 1e-10);
  // A bulge of 1 is a half circle to the right of the way from a to b.
  expect_near(strokes[4].curve.at(0.5 * (strokes[4].curve.begin + strokes[4].curve.end)), 1, -1);
  EXPECT_NEAR(length(strokes[4].curve), pi, 1e-12);
  // The bulge is the tangent of a quarter of the angle: height over half chord.
  expect_near(strokes[7].curve.at(0.5 * (strokes[7].curve.begin + strokes[7].curve.end)), 0.5, 0.25);
}

TEST(Dxf, ArcOfAnEllipseRunsBetweenItsParameters) {
  DxfWriter dxf;
  dxf.head("ELLIPSE").group(10, 1).group(20, 2).group(11, 0).group(21, 4).group(40, 0.25);
  dxf.group(41, 1.5 * pi).group(42, 2 * pi);
  const auto reading = read(dxf);
  ASSERT_TRUE(reading.value) << all(reading.faults);
  expect_near(start(reading.value->strokes[0].curve), 2, 2);
  expect_near(finish(reading.value->strokes[0].curve), 1, 6);
}

TEST(Dxf, CurvesDrawnFromBelowAreTurnedOver) {
  DxfWriter dxf;
  dxf.arc(-10, 5, 2, 0, 90).group(230, -1);
  dxf.head("ELLIPSE").group(10, 1).group(20, 2).group(11, 4).group(21, 0).group(40, 0.25);
  dxf.group(41, 0).group(42, pi / 2).group(230, -1);
  const auto reading = read(dxf);
  ASSERT_TRUE(reading.value) << all(reading.faults);
  expect_near(start(reading.value->strokes[0].curve), 8, 5);
  expect_near(finish(reading.value->strokes[0].curve), 10, 7);
  expect_near(finish(reading.value->strokes[1].curve), 1, 1);
}

TEST(Dxf, HonoursUnitsAndNeverGuessesThem) {
  const std::pair<int, double> known[] = {{1, 25.4}, {2, 304.8}, {4, 1}, {5, 10}, {6, 1000}, {14, 100}};
  for (const auto& [code, mm] : known) {
    const auto reading = read(DxfWriter(code).circle(0, 0, 1));
    ASSERT_TRUE(reading.value);
    EXPECT_DOUBLE_EQ(reading.value->unit.value_or(0), mm) << code;
  }
  for (const int silent : {-1, 0}) {
    const auto reading = read(DxfWriter(silent).circle(0, 0, 1));
    ASSERT_TRUE(reading.value);
    EXPECT_FALSE(reading.value->unit) << silent;
  }
  EXPECT_NE(all(read(DxfWriter(17).circle(0, 0, 1)).faults).find("$INSUNITS"), std::string::npos);
}

TEST(Dxf, ListsWhatIsNoEdge) {
  DxfWriter dxf;
  dxf.circle(0, 0, 1).head("TEXT").head("TEXT").head("DIMENSION").head("HATCH");
  dxf.circle(0, 0, 2).raw("67\n1\n").circle(0, 0, 3).raw("60\n1\n");
  dxf.layer("off").circle(0, 0, 4);
  dxf.before(
      "0\nSECTION\n2\nTABLES\n0\nTABLE\n2\nLAYER\n0\nLAYER\n2\nOFF\n70\n0\n62\n-7\n0\nENDTAB\n0\nENDSEC\n");
  const auto reading = read(dxf);
  ASSERT_TRUE(reading.value) << all(reading.faults);
  EXPECT_EQ(reading.value->strokes.size(), 1U);
  ASSERT_EQ(reading.value->left_out.size(), 6U);
  EXPECT_EQ(reading.value->left_out[0].kind, "TEXT");
  EXPECT_EQ(reading.value->left_out[0].count, 2U);
  EXPECT_EQ(reading.value->left_out[3].why, "in paper space");
  EXPECT_EQ(reading.value->left_out[4].why, "invisible");
  EXPECT_EQ(reading.value->left_out[5].why, "on a layer that is off");
}

TEST(Dxf, TakesOneLayerAndNamesTheOthers) {
  DxfWriter dxf;
  dxf.layer("Part").circle(0, 0, 1).layer("centre").line(0, 0, 5, 5).head("SPLINE");
  const auto part = read(dxf, "part");
  ASSERT_TRUE(part.value) << all(part.faults);
  EXPECT_EQ(part.value->strokes.size(), 1U);
  const std::string fault = all(read(dxf, "parts").faults);
  EXPECT_NE(fault.find("Part, centre"), std::string::npos) << fault;
}

// Each drawing that cannot be taken, and what its message must speak of.
TEST(Dxf, SaysWhatItCannotTake) {
  const auto with = [](const std::string& kind) { return DxfWriter().circle(0, 0, 1).head(kind).text(); };
  const std::string block =
      "0\nSECTION\n2\nBLOCKS\n0\nBLOCK\n2\nBolt\n0\nCIRCLE\n10\n0\n20\n0\n40\n1\n0\nENDBLK\n0\nENDSEC\n";
  const std::pair<std::string, std::string> bad[] = {
      {with("SPLINE"), "may be an edge"},
      {with("3DSOLID"), "no planar outline"},
      {with("3DFACE"), "no planar outline"},
      {DxfWriter().before(block).circle(0, 0, 1).head("INSERT").raw("2\nbolt\n").text(),
       "block \"bolt\" has curves"},
      {DxfWriter().circle(0, 0, 1).group(30, 1).circle(0, 0, 2).group(30, 4).text(), "not flat"},
      {DxfWriter().line(0, 0, 1, 1).group(31, 4).text(), "not flat"},
      {DxfWriter().circle(0, 0, 1).group(220, 1).group(230, 0).text(), "not x-y"},
      {DxfWriter().head("POLYLINE").raw("70\n8\n").text(), "in space"},
      {DxfWriter().head("POLYLINE").raw("70\n4\n").text(), "fitted by a spline"},
      {DxfWriter().circle(0, 0, -1).text(), "radius of -1"},
      {DxfWriter().head("CIRCLE").raw("10\nabc\n20\n0\n40\n1\n").text(), "group 10"},
      {DxfWriter().head("ARC").group(10, 0).group(20, 0).group(40, 1).text(), "group 50"},
      {DxfWriter().circle(1e12, 0, 1).text(), "beyond any drawing"},
      {DxfWriter().text(), "no lines, arcs"},
      {"0\nSECTION\n2\nENTITIES\n0\nCIRCLE\n10\n0\n20\n0\n40\n1\n", "cut off"},
      {"0\nSECTION\n2\nENTITIES\n0\nCIRCLE\n10\n", "cut off"},
      {"0\nSECTION\n2\nHEADER\n0\nENDSEC\n0\nEOF\n", "no ENTITIES section"},
      {"hello\nworld\n", "group code"},
      {"", "empty"},
      {"AutoCAD Binary DXF\r\n\x1a", "binary"},
      {std::string("0\nSECTION\n\0", 12), "binary"}};
  for (const auto& [content, expected] : bad) {
    const auto reading = read_dxf(content, "part.dxf", std::nullopt);
    EXPECT_FALSE(reading.value);
    EXPECT_NE(all(reading.faults).find(expected), std::string::npos) << all(reading.faults) << expected;
    for (const Diagnostic& fault : reading.faults) EXPECT_FALSE(fault.cure.empty());
  }
}

TEST(Dxf, NamesTheLineOfEveryFault) {
  DxfWriter dxf(-1);
  dxf.circle(0, 0, -1).head("SPLINE").circle(0, 0, -2);
  const auto reading = read(dxf);
  ASSERT_EQ(reading.faults.size(), 3U);
  EXPECT_EQ(reading.faults[0].position->line, 6U);
  EXPECT_EQ(reading.faults[1].position->line, 16U);
  EXPECT_EQ(reading.faults[2].position->line, 20U);
}

TEST(Dxf, ReadsWindowsLineEnds) {
  std::string content = DxfWriter().circle(1, 2, 3).text();
  std::string windows;
  for (const char c : content) windows += c == '\n' ? std::string("\r\n") : std::string(1, c);
  const auto reading = read_dxf(windows, "part.dxf", std::nullopt);
  ASSERT_TRUE(reading.value) << all(reading.faults);
  EXPECT_EQ(reading.value->strokes.size(), 1U);
}

}  // namespace
}  // namespace raiser::io
