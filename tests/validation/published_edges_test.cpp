// Formulas for notches, stepped bars, lugs and orthotropic plates against converged finite elements of
// another code (degree 4 on curved degree 3 triangles, halving the root elements changed less than 0.01 %),
// and against their own values printed there: a wrong coefficient fails the second, a wrong accuracy the
// first.
#include <gtest/gtest.h>

#include <cmath>

#include "tests/validation/published_points.hpp"
#include "validation/published/edge_raisers.hpp"

namespace raiser::validation {
namespace {

const Point2 u_pair_tension_points[] = {
    {0.25, 0.1, 1.77411, 1.7981},  {0.25, 0.3, 1.39183, 1.41408}, {0.25, 0.5, 1.16048, 1.18331},
    {0.25, 0.7, 1.06812, 1.06369}, {0.5, 0.1, 2.16976, 2.19711},  {0.5, 0.3, 1.68989, 1.70154},
    {0.5, 0.5, 1.32688, 1.34746},  {0.5, 0.7, 1.13167, 1.12259},  {1, 0.1, 2.74532, 2.73513},
    {1, 0.3, 2.13435, 2.13002},    {1, 0.5, 1.62445, 1.62413},    {1, 0.7, 1.26099, 1.24907},
    {2, 0.1, 3.5798, 3.4435},      {2, 0.3, 2.78224, 2.77986},    {2, 0.5, 2.09391, 2.10442},
    {2, 0.7, 1.51693, 1.51429},    {4, 0.1, 4.78391, 4.45278},    {4, 0.3, 3.71775, 3.52961},
    {4, 0.5, 2.78875, 2.67875},    {4, 0.7, 1.95764, 1.92093},    {10, 0.1, 7.21269, 6.46585},
    {10, 0.3, 5.60436, 5.05542},   {10, 0.5, 4.19938, 3.85449},   {10, 0.7, 2.91459, 2.74745},
    {25, 0.1, 11.093, 9.67941},    {25, 0.3, 8.61775, 7.57356},   {25, 0.5, 6.45549, 5.81412},
    {25, 0.7, 4.47337, 4.11065}};
const Point2 u_pair_bending_points[] = {
    {0.25, 0.1, 1.57151, 1.64532}, {0.25, 0.3, 1.21398, 1.21966}, {0.25, 0.5, 1.09527, 1.08981},
    {0.25, 0.7, 1.04192, 1.09443}, {0.5, 0.1, 1.90945, 2.02297},  {0.5, 0.3, 1.39583, 1.4365},
    {0.5, 0.5, 1.18328, 1.17467},  {0.5, 0.7, 1.08214, 1.09422},  {1, 0.1, 2.40857, 2.50454},
    {1, 0.3, 1.6944, 1.73905},     {1, 0.5, 1.34365, 1.33237},    {1, 0.7, 1.15833, 1.14958},
    {2, 0.1, 3.13789, 3.08055},    {2, 0.3, 2.15717, 2.15874},    {2, 0.5, 1.61827, 1.63083},
    {2, 0.7, 1.29767, 1.33914},    {4, 0.1, 4.19444, 4.01891},    {4, 0.3, 2.84866, 2.74367},
    {4, 0.5, 2.05819, 2.01238},    {4, 0.7, 1.54034, 1.58672},    {10, 0.1, 6.33035, 5.87959},
    {10, 0.3, 4.27167, 3.9271},    {10, 0.5, 3.00639, 2.79587},   {10, 0.7, 2.10894, 2.09568},
    {25, 0.1, 9.74692, 8.83091},   {25, 0.3, 6.56878, 5.87052},   {25, 0.5, 4.5754, 4.11462},
    {25, 0.7, 3.10407, 2.95453}};
const Point2 u_single_tension_points[] = {
    {0.5, 0.1, 1.77482, 1.87937}, {0.5, 0.2, 1.45907, 1.51569}, {0.5, 0.3, 1.28712, 1.29683},
    {0.5, 0.5, 1.12725, 1.16046}, {1, 0.1, 2.22354, 2.30104},   {1, 0.2, 1.78598, 1.78449},
    {1, 0.3, 1.524, 1.46203},     {1, 0.5, 1.24482, 1.22613},   {2, 0.1, 2.88152, 2.94298},
    {2, 0.2, 2.28101, 2.22955},   {2, 0.3, 1.90241, 1.76452},   {2, 0.5, 1.45567, 1.36618},
    {4, 0.1, 3.83653, 3.94204},   {4, 0.2, 3.01137, 2.98882},   {4, 0.3, 2.4774, 2.33004},
    {4, 0.5, 1.8069, 1.65863},    {10, 0.1, 5.76952, 6.24064},  {10, 0.2, 4.50354, 4.9457},
    {10, 0.3, 3.67243, 3.92979},  {10, 0.5, 2.58622, 2.56624}};
const Point2 u_single_bending_points[] = {
    {0.5, 0.1, 1.80769, 2.02719}, {0.5, 0.2, 1.47606, 1.69454}, {0.5, 0.3, 1.29056, 1.46445},
    {0.5, 0.5, 1.12639, 1.23053}, {1, 0.1, 2.28072, 2.48255},   {1, 0.2, 1.82521, 2.04777},
    {1, 0.3, 1.53939, 1.73664},   {1, 0.5, 1.24328, 1.38925},   {2, 0.1, 2.97533, 3.15529},
    {2, 0.2, 2.35712, 2.57968},   {2, 0.3, 1.94272, 2.15665},   {2, 0.5, 1.45634, 1.65025},
    {4, 0.1, 3.98403, 3.8837},    {4, 0.2, 3.14405, 3.15602},   {4, 0.3, 2.56038, 2.61125},
    {4, 0.5, 1.81752, 1.92775},   {10, 0.1, 6.02585, 5.67912},  {10, 0.2, 4.75377, 4.58982},
    {10, 0.3, 3.84961, 3.76465},  {10, 0.5, 2.63067, 2.69275}};
const Point2 fillet_tension_points[] = {
    {0.25, 0.1, 1.4968, 1.46337},  {0.25, 0.3, 1.30906, 1.37589}, {0.25, 0.5, 1.14214, 1.2735},
    {0.25, 0.7, 1.05882, 1.16347}, {0.5, 0.1, 1.72614, 1.65585},  {0.5, 0.3, 1.51024, 1.54101},
    {0.5, 0.5, 1.28482, 1.39779},  {0.5, 0.7, 1.11607, 1.23906},  {1, 0.1, 2.04838, 1.92771},
    {1, 0.3, 1.79503, 1.78016},    {1, 0.5, 1.51416, 1.58187},    {1, 0.7, 1.23717, 1.35355},
    {2, 0.1, 2.49967, 2.3115},     {2, 0.3, 2.19401, 2.12963},    {2, 0.5, 1.84829, 1.85883},
    {2, 0.7, 1.46323, 1.53068},    {4, 0.1, 3.12923, 2.80898},    {4, 0.3, 2.74986, 2.63255},
    {4, 0.5, 2.31819, 2.34475},    {4, 0.7, 1.81669, 1.92455},    {10, 0.1, 4.35225, 3.72201},
    {10, 0.3, 3.82872, 3.55449},   {10, 0.5, 3.23129, 3.23744},   {1, 0.2, 1.92583, 1.86157},
    {2, 0.2, 2.35184, 2.23366},    {4, 0.2, 2.94563, 2.73338},    {8, 0.1, 4.00367, 3.46999},
    {8, 0.2, 3.77018, 3.39674},    {8, 0.3, 3.52147, 3.3002},     {8, 0.5, 2.9713, 2.99095},
    {8, 0.7, 2.32183, 2.44963},    {16, 0.1, 5.21639, 4.3181},    {16, 0.2, 4.91325, 4.24634},
    {16, 0.3, 4.59053, 4.15519},   {16, 0.5, 3.87574, 3.82075},   {16, 0.7, 3.02549, 3.12671}};
const Point2 fillet_bending_points[] = {
    {0.25, 0.1, 1.39697, 1.38072}, {0.25, 0.3, 1.16901, 1.19914}, {0.25, 0.5, 1.07533, 1.08225},
    {0.25, 0.7, 1.03313, 1.01892}, {0.5, 0.1, 1.60887, 1.5492},   {0.5, 0.3, 1.30682, 1.30885},
    {0.5, 0.5, 1.14591, 1.14128},  {0.5, 0.7, 1.06493, 1.04028},  {1, 0.1, 1.90983, 1.7926},
    {1, 0.3, 1.52256, 1.4812},     {1, 0.5, 1.27202, 1.24537},    {1, 0.7, 1.12626, 1.08719},
    {2, 0.1, 2.33411, 2.14709},    {2, 0.3, 1.84226, 1.75931},    {2, 0.5, 1.48225, 1.43381},
    {2, 0.7, 1.23619, 1.18696},    {4, 0.1, 2.92789, 2.64924},    {4, 0.3, 2.3012, 2.21115},
    {4, 0.5, 1.8071, 1.78512},     {4, 0.7, 1.42618, 1.40578},    {10, 0.1, 4.08439, 3.50783},
    {10, 0.3, 3.20751, 2.94641},   {1, 0.2, 1.69814, 1.62758},    {2, 0.2, 2.07066, 1.94644},
    {4, 0.2, 2.59644, 2.43085},    {8, 0.1, 3.75505, 3.28008},    {8, 0.2, 3.33212, 3.0211},
    {8, 0.3, 2.94847, 2.75727},    {8, 0.5, 2.28322, 2.22579},    {8, 0.7, 1.72939, 1.70709},
    {16, 0.1, 4.90248, 4.01238},   {16, 0.2, 4.35529, 3.66509},   {16, 0.3, 3.85228, 3.34277},
    {16, 0.5, 2.96045, 2.73562},   {16, 0.7, 2.18355, 2.11612}};
const Point1 half_plane_points[] = {{1, 3.07288, 3.023}, {2, 4.00469, 3.95208}, {4, 5.34996, 5.266},
                                    {9, 7.68323, 7.509}, {16, 10.0376, 9.752},  {25, 12.4015, 11.995}};
const Point1 deep_tension_points[] = {{1, 1.55591, 1.55594},
                                      {2, 1.98153, 1.98247},
                                      {5, 2.93369, 2.93651},
                                      {10, 4.07176, 4.0751},
                                      {25, 6.38429, 6.38689}};
const Point1 deep_bending_points[] = {{1, 1.33337, 1.33333},
                                      {2, 1.5916, 1.59155},
                                      {5, 2.18037, 2.18032},
                                      {10, 2.89938, 2.89925},
                                      {25, 4.39065, 4.3904}};
const Point1 lug_net_points[] = {{0.15, 6.04189, 6.82017}, {0.2, 4.68565, 5.51634}, {0.3, 3.33794, 3.75137},
                                 {0.4, 2.68339, 2.85163},  {0.5, 2.31721, 2.50713}, {0.6, 2.1063, 2.40785},
                                 {0.75, 1.94815, 2.04061}};
const Point1 lug_bearing_points[] = {
    {0.15, 1.06622, 1.18753}, {0.2, 1.17141, 1.3575},  {0.3, 1.43054, 1.63387}, {0.4, 1.78892, 1.97133},
    {0.5, 2.31721, 2.54488},  {0.6, 3.15946, 3.52951}, {0.75, 5.84444, 6.16008}};

TEST(PublishedEdges, UPairTension) {
  hold_to(Reference::u_pair_tension, "h/r", u_pair_tension, u_pair_tension_points);
}

TEST(PublishedEdges, UPairBending) {
  hold_to(Reference::u_pair_bending, "h/r", u_pair_bending, u_pair_bending_points);
}

TEST(PublishedEdges, USingleTension) {
  hold_to(Reference::u_single_tension, "h/r", u_single_tension, u_single_tension_points);
}

TEST(PublishedEdges, USingleBending) {
  hold_to(Reference::u_single_bending, "h/r", u_single_bending, u_single_bending_points);
}

TEST(PublishedEdges, FilletTension) {
  hold_to(Reference::fillet_tension, "h/r", fillet_tension, fillet_tension_points);
}

TEST(PublishedEdges, FilletBending) {
  hold_to(Reference::fillet_bending, "h/r", fillet_bending, fillet_bending_points);
}

TEST(PublishedEdges, SemicircularNotchesHaveTheirOwnForm) {
  for (const double x : {0.1, 0.3, 0.5, 0.7}) {
    EXPECT_NEAR(u_pair_tension(1, x), 3.065 + x * (-3.370 + x * (0.647 + x * 0.658)), 5e-4);
    EXPECT_NEAR(u_pair_bending(1, x), 3.065 + x * (-6.269 + x * (7.015 - x * 2.812)), 2e-3);
    EXPECT_NEAR(u_single_tension(1, x), 3.065 + x * (-8.871 + x * (14.036 - x * 7.219)), 0.015);
  }
  EXPECT_NEAR(u_single_bending(1, 0), 3.065, 1e-12);
}

TEST(PublishedEdges, HalfPlane) {
  hold_to(Reference::u_half_plane, "t/r", u_half_plane, half_plane_points);
  EXPECT_NEAR(ellipse_half_plane(1), semicircle_half_plane, 1e-12);
}

TEST(PublishedEdges, DeepNotches) {
  hold_to(Reference::neuber_deep_tension, "", neuber_deep_tension, deep_tension_points);
  hold_to(Reference::neuber_deep_bending, "", neuber_deep_bending, deep_bending_points);
  EXPECT_NEAR(neuber_deep_tension(1e-8), 1, 1e-7);
  EXPECT_NEAR(neuber_deep_bending(1e-5), 1, 1e-4);
}

// Computed: 3.2434, 3.2092, 3.0115 at 60, 90, 120 degrees; 3.1238 for U.
TEST(PublishedEdges, VNotches) {
  EXPECT_EQ(v_pair_shallow(3.2473, 60), 3.2473);
  EXPECT_NEAR(v_pair_shallow(3.2473, 90), 3.15958, 1e-4);
  EXPECT_NEAR(v_pair_shallow(3.2473, 120), 2.95808, 1e-4);
  EXPECT_NEAR(v_pair_deep(3.1238, 60), 2.95287, 1e-4);
  EXPECT_NEAR(v_pair_deep(3.1238, 90), 2.82288, 1e-4);
  EXPECT_NEAR(v_pair_deep(3.1238, 120), 2.63407, 1e-4);
  EXPECT_EQ(v_pair_deep(3.1238, 59), 3.1238);
}

// R. L. Norton, Example 6-3: D 2, d 1.8, r 0.25 in.
TEST(PublishedEdges, OtherFillets) {
  EXPECT_NEAR(fillet_bending_power(0.25 / 1.8), 1.56, 5e-3);
  EXPECT_EQ(fillet_tension_chart(1.5, 0.1), 2.254);
  EXPECT_FALSE(fillet_tension_chart(1.5, 0.15));
}

TEST(PublishedEdges, Lug) {
  hold_to(Reference::lug, "d/H", lug_net, lug_net_points);
  for (const auto& [x, truth, printed] : lug_bearing_points) {
    EXPECT_NEAR(lug_bearing(x), printed, 6e-5 * printed);
    EXPECT_LE(lug_bearing(x) / truth - 1, 0.16);
  }
}

TEST(PublishedEdges, OrthotropicStrip) {
  EXPECT_NEAR(orthotropic_strip(6.21839, 0.2), 6.50296, 6e-5 * 6.50296);
  EXPECT_NEAR(orthotropic_strip(6.21839, 0.4), 7.39973, 6e-5 * 7.39973);
  EXPECT_NEAR(orthotropic_strip(6.21839, 0.5), 8.04063, 6e-5 * 8.04063);
  EXPECT_NEAR(orthotropic_strip(4.62278, 0.2), 4.8364, 6e-5 * 4.8364);
  EXPECT_NEAR(orthotropic_strip(4.62278, 0.4), 5.59366, 6e-5 * 5.59366);
  EXPECT_NEAR(orthotropic_strip(4.62278, 0.5), 6.24775, 6e-5 * 6.24775);
  EXPECT_NEAR(orthotropic_strip(3, 0.2), 3.14, 6e-5 * 3.14);
  EXPECT_NEAR(orthotropic_strip(3, 0.4), 3.69333, 6e-5 * 3.69333);
  EXPECT_NEAR(orthotropic_strip(3, 0.5), 4.25, 6e-5 * 4.25);
  EXPECT_NEAR(orthotropic_strip(2.33266, 0.2), 2.44195, 6e-5 * 2.44195);
  EXPECT_NEAR(orthotropic_strip(2.33266, 0.4), 2.89249, 6e-5 * 2.89249);
  EXPECT_NEAR(orthotropic_strip(2.33266, 0.5), 3.37143, 6e-5 * 3.37143);
}

}  // namespace
}  // namespace raiser::validation
