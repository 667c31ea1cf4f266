// Formulas for cracks against converged finite elements of another
// code (degree 4 on curved degree 3 triangles, halving the root elements changed
// less than 0.01 %), and against their own values printed there: a wrong
// coefficient fails the second, a wrong accuracy the first.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "solver/crack/tip_scan.hpp"
#include "tests/validation/published_points.hpp"
#include "validation/published/cracks.hpp"

namespace raiser::validation {
namespace {

const Point1 centre_secant_points[] = {
    {0.1, 1.006, 1.00621},   {0.2, 1.02459, 1.02541}, {0.3, 1.05774, 1.0594},
    {0.4, 1.10937, 1.11179}, {0.5, 1.18666, 1.18921}, {0.6, 1.30331, 1.30434},
    {0.7, 1.48824, 1.48415}, {0.8, 1.81598, 1.79891}, {0.9, 2.5795, 2.52833}};
const Point1 centre_tada_points[] = {
    {0.1, 1.006, 1.00597},   {0.2, 1.02459, 1.02448}, {0.3, 1.05774, 1.05753},
    {0.4, 1.10937, 1.10905}, {0.5, 1.18666, 1.18623}, {0.6, 1.30331, 1.30274},
    {0.7, 1.48824, 1.48735}, {0.8, 1.81598, 1.81433}, {0.9, 2.5795, 2.57666}};
const Point1 centre_koiter_points[] = {
    {0.1, 1.006, 1.00482},   {0.2, 1.02459, 1.02081}, {0.3, 1.05774, 1.05101},
    {0.4, 1.10937, 1.10013}, {0.5, 1.18666, 1.17592}, {0.6, 1.30331, 1.29236},
    {0.7, 1.48824, 1.47838}, {0.8, 1.81598, 1.80817}, {0.9, 2.5795, 2.57428}};
const Point1 centre_tangent_points[] = {
    {0.1, 1.006, 1.00414},   {0.2, 1.02459, 1.01698}, {0.3, 1.05774, 1.03983},
    {0.4, 1.10937, 1.07533}, {0.5, 1.18666, 1.12838}, {0.6, 1.30331, 1.20846},
    {0.7, 1.48824, 1.33601}, {0.8, 1.81598, 1.56497}, {0.9, 2.5795, 2.11331}};
const Point1 edge_tada_points[] = {
    {0.01, 1.12232, 1.12522}, {0.1, 1.18918, 1.1957},  {0.2, 1.36732, 1.36666},
    {0.3, 1.65986, 1.65511},  {0.4, 2.1114, 2.10796},  {0.5, 2.82456, 2.82658},
    {0.6, 4.03308, 4.04321},  {0.7, 6.35479, 6.37552}, {0.8, 11.9551, 11.9926}};
const Point1 edge_polynomial_points[] = {
    {0.01, 1.12232, 1.12072}, {0.1, 1.18918, 1.18573}, {0.2, 1.36732, 1.37273},
    {0.3, 1.65986, 1.66212},  {0.4, 2.1114, 2.10594},  {0.5, 2.82456, 2.82913},
    {0.6, 4.03308, 4.02955},  {0.7, 6.35479, 5.97799}, {0.8, 11.9551, 9.01815}};
const Point1 edge_tada_simple_points[] = {
    {0.01, 1.12232, 1.12727}, {0.1, 1.18918, 1.20863}, {0.2, 1.36732, 1.38031},
    {0.3, 1.65986, 1.66267},  {0.4, 2.1114, 2.10639},  {0.5, 2.82456, 2.81529},
    {0.6, 4.03308, 4.02288},  {0.7, 6.35479, 6.3466},  {0.8, 11.9551, 11.9522}};
const Point1 edge_bending_tada_points[] = {
    {0.01, 1.10866, 1.10997}, {0.1, 1.04718, 1.04083}, {0.2, 1.05528, 1.03549},
    {0.3, 1.12411, 1.09781},  {0.4, 1.26063, 1.23447}, {0.5, 1.49716, 1.47523},
    {0.6, 1.91395, 1.8982},   {0.7, 2.7252, 2.71629},  {0.8, 4.67632, 4.67441}};
const Point1 edge_bending_polynomial_points[] = {
    {0.01, 1.10866, 1.10872}, {0.1, 1.04718, 1.04362}, {0.2, 1.05528, 1.05296},
    {0.3, 1.12411, 1.12194},  {0.4, 1.26063, 1.25608}, {0.5, 1.49716, 1.4945},
    {0.6, 1.91395, 1.90992},  {0.7, 2.7252, 2.60866},  {0.8, 4.67632, 3.73064}};
const Point1 bend_specimen_points[] = {
    {0.2, 4.64769, 4.6995}, {0.3, 6.05481, 6.08498}, {0.4, 7.88348, 7.92727}, {0.45, 9.08216, 9.1419},
    {0.5, 10.5729, 10.65},  {0.6, 14.9913, 15.0864}, {0.7, 23.361, 23.4014}};
const Point1 compact_specimen_points[] = {
    {0.2, 4.45799, 4.27368},  {0.3, 5.6918, 5.62089},  {0.45, 8.31169, 8.33959}, {0.5, 9.61671, 9.65908},
    {0.55, 11.3204, 11.3643}, {0.6, 13.6219, 13.6541}, {0.7, 21.5603, 21.5518},  {0.8, 41.1352, 41.1998}};
const Point1 two_edges_tada_points[] = {
    {0.1, 1.11685, 1.12073}, {0.2, 1.11178, 1.11849}, {0.3, 1.11496, 1.11979},
    {0.4, 1.13212, 1.13153}, {0.5, 1.16924, 1.16279}, {0.6, 1.23607, 1.22606},
    {0.7, 1.35294, 1.34293}, {0.8, 1.57369, 1.56671}, {0.9, 2.1162, 2.11346}};
const Point1 two_edges_benthem_points[] = {
    {0.1, 1.11685, 1.12187}, {0.2, 1.11178, 1.1237},  {0.3, 1.11496, 1.1312},
    {0.4, 1.13212, 1.14909}, {0.5, 1.16924, 1.18405}, {0.6, 1.23607, 1.24706},
    {0.7, 1.35294, 1.35978}, {0.8, 1.57369, 1.57716}, {0.9, 2.1162, 2.11794}};
const Point1 one_crack_fit_points[] = {{0.02, 3.2275, 3.2299}, {0.1, 2.7749, 2.786},  {0.2, 2.3765, 2.3883},
                                       {0.3, 2.0947, 2.104},   {0.4, 1.8872, 1.8938}, {0.5, 1.7295, 1.7339},
                                       {0.8, 1.4287, 1.4295},  {1, 1.3077, 1.3076},   {2, 1.0327, 1.0318},
                                       {3, 0.9309, 0.9308},    {5, 0.8462, 0.8461},   {10, 0.7798, 0.7791}};
const Point1 tada_one_points[] = {{0.02, 3.22746, 3.20537}, {0.1, 2.7749, 2.72122},  {0.2, 2.37653, 2.33078},
                                  {0.3, 2.09466, 2.07051},  {0.4, 1.88718, 1.88439}, {0.5, 1.72952, 1.74419},
                                  {0.6, 1.60653, 1.63437},  {0.8, 1.42873, 1.47266}, {1, 1.30772, 1.35877},
                                  {1.5, 1.12902, 1.18087},  {2, 1.03269, 1.07818},   {3, 0.93089, 0.96489},
                                  {5, 0.84624, 0.86632},    {10, 0.77976, 0.7881}};
const Point1 tada_two_points[] = {{0.02, 3.22823, 3.23567}, {0.1, 2.78875, 2.81292}, {0.2, 2.41516, 2.43572},
                                  {0.3, 2.15834, 2.16799},  {0.4, 1.97333, 1.97191}, {0.5, 1.83505, 1.8244},
                                  {0.6, 1.72857, 1.7108},   {0.8, 1.57681, 1.55012}, {1, 1.47505, 1.44422},
                                  {1.5, 1.32734, 1.29546},  {2, 1.24953, 1.22038},   {3, 1.16707, 1.14685},
                                  {5, 1.10079, 1.08957},    {10, 1.05128, 1.04643}};
const Point1 tada_one_biaxial_points[] = {
    {0.02, 2.18498, 2.19175}, {0.1, 1.98962, 2.01399}, {0.2, 1.80824, 1.83941}, {0.3, 1.67216, 1.70272},
    {0.4, 1.56626, 1.5933},   {0.5, 1.48147, 1.50404}, {0.6, 1.41204, 1.43005}, {0.8, 1.3051, 1.31496},
    {1, 1.22655, 1.23},       {1.5, 1.09864, 1.09215}, {2, 1.02172, 1.01041},   {3, 0.93257, 0.91887},
    {5, 0.85119, 0.83837},    {10, 0.78299, 0.77403}};
const Point1 tada_two_biaxial_points[] = {
    {0.02, 2.1855, 2.19034}, {0.1, 1.99931, 2.01277}, {0.2, 1.83636, 1.84664}, {0.3, 1.72008, 1.7228},
    {0.4, 1.63289, 1.62792}, {0.5, 1.56501, 1.55348}, {0.6, 1.51059, 1.4939},  {0.8, 1.42858, 1.40518},
    {1, 1.36955, 1.34288},   {1.5, 1.27533, 1.24755}, {2, 1.21997, 1.19419},   {3, 1.15504, 1.13661},
    {5, 1.09734, 1.08677},   {10, 1.05073, 1.04601}};
const Point1 grandt_one_points[] = {
    {0.02, 3.22746, 3.21118}, {0.1, 2.7749, 2.73344},  {0.2, 2.37653, 2.34121}, {0.3, 2.09466, 2.0746},
    {0.4, 1.88718, 1.88158},  {0.5, 1.72952, 1.73539}, {0.6, 1.60653, 1.62082}, {0.8, 1.42873, 1.45281},
    {1, 1.30772, 1.33554},    {1.5, 1.12902, 1.15485}, {2, 1.03269, 1.05189},   {3, 0.93089, 0.93889},
    {5, 0.84624, 0.84022},    {10, 0.77976, 0.76079}};
const Point1 grandt_two_points[] = {{0.02, 3.22823, 3.25379}, {0.1, 2.78875, 2.76389}, {0.2, 2.41516, 2.3825},
                                    {0.3, 2.15834, 2.13326},  {0.4, 1.97333, 1.95763}, {0.5, 1.83505, 1.8272},
                                    {0.6, 1.72857, 1.7265},   {0.8, 1.57681, 1.5812},  {1, 1.47505, 1.4814},
                                    {1.5, 1.32734, 1.33018},  {2, 1.24953, 1.24537},   {3, 1.16707, 1.15338},
                                    {5, 1.10079, 1.07399},    {10, 1.05128, 1.0107}};
const Point1 newman_one_points[] = {
    {0.02, 3.22746, 3.22245}, {0.1, 2.7749, 2.71637},  {0.2, 2.37653, 2.30951}, {0.3, 2.09466, 2.0452},
    {0.4, 1.88718, 1.86227},  {0.5, 1.72952, 1.72823}, {0.6, 1.60653, 1.62508}, {0.8, 1.42873, 1.47386},
    {1, 1.30772, 1.36513},    {1.5, 1.12902, 1.1838},  {2, 1.03269, 1.06898},   {3, 0.93089, 0.93345},
    {5, 0.84624, 0.81543},    {10, 0.77976, 0.73732}};
const Point1 newman_two_points[] = {
    {0.02, 3.22823, 3.21834}, {0.1, 2.78875, 2.76897}, {0.2, 2.41516, 2.3885},  {0.3, 2.15834, 2.12981},
    {0.4, 1.97333, 1.94544},  {0.5, 1.83505, 1.80864}, {0.6, 1.72857, 1.70361}, {0.8, 1.57681, 1.55342},
    {1, 1.47505, 1.45125},    {1.5, 1.32734, 1.29763}, {2, 1.24953, 1.21235},   {3, 1.16707, 1.12266},
    {5, 1.10079, 1.05313},    {10, 1.05128, 1.01184}};

TEST(PublishedCracks, CentreCrack) {
  hold_to(Reference::centre_secant, "2a/W", centre_secant, centre_secant_points);
  hold_to(Reference::centre_tada, "2a/W", centre_tada, centre_tada_points);
  hold_to(Reference::centre_koiter, "2a/W", centre_koiter, centre_koiter_points);
  hold_to(Reference::centre_tangent, "2a/W", centre_tangent, centre_tangent_points);
}

TEST(PublishedCracks, EdgeCrack) {
  hold_to(Reference::edge_tada, "a/W", edge_tada, edge_tada_points);
  hold_to(Reference::edge_polynomial, "a/W", edge_polynomial, edge_polynomial_points);
  hold_to(Reference::edge_tada_simple, "a/W", edge_tada_simple, edge_tada_simple_points);
  hold_to(Reference::edge_bending_tada, "a/W", edge_bending_tada, edge_bending_tada_points);
  hold_to(Reference::edge_bending_polynomial, "a/W", edge_bending_polynomial, edge_bending_polynomial_points);
}

TEST(PublishedCracks, Specimens) {
  hold_to(Reference::bend_specimen, "a/W", bend_specimen, bend_specimen_points);
  hold_to(Reference::compact_specimen, "a/W", compact_specimen, compact_specimen_points);
}

TEST(PublishedCracks, TwoEdgeCracks) {
  hold_to(Reference::two_edges_tada, "2a/W", two_edges_tada, two_edges_tada_points);
  hold_to(Reference::two_edges_benthem, "2a/W", two_edges_benthem, two_edges_benthem_points);
}

TEST(PublishedCracks, OneCrackFit) {
  hold_to(Reference::one_crack_fit, "a/R", one_crack_fit, one_crack_fit_points);
}

TEST(PublishedCracks, FormsAtAHole) {
  hold_to(
      Reference::tada_one, "a/R", [](double q) { return tada_hole(HoleCracks::one, Tension::uniaxial, q); },
      tada_one_points);
  hold_to(
      Reference::tada_two, "a/R", [](double q) { return tada_hole(HoleCracks::two, Tension::uniaxial, q); },
      tada_two_points);
  hold_to(
      Reference::tada_one, "a/R", [](double q) { return tada_hole(HoleCracks::one, Tension::biaxial, q); },
      tada_one_biaxial_points);
  hold_to(
      Reference::tada_two, "a/R", [](double q) { return tada_hole(HoleCracks::two, Tension::biaxial, q); },
      tada_two_biaxial_points);
  hold_to(
      Reference::grandt_one, "a/R", [](double q) { return grandt_hole(HoleCracks::one, q); },
      grandt_one_points);
  hold_to(
      Reference::grandt_two, "a/R", [](double q) { return grandt_hole(HoleCracks::two, q); },
      grandt_two_points);
  hold_to(
      Reference::newman_one, "a/R", [](double q) { return newman_hole(HoleCracks::one, q); },
      newman_one_points);
  hold_to(
      Reference::newman_two, "a/R", [](double q) { return newman_hole(HoleCracks::two, q); },
      newman_two_points);
}

// f(0.5) = 2.6625 for the bend specimen, K = 4 f P / (B sqrt W); 9.66 for the compact one.
TEST(PublishedCracks, SpecimensAtHalfTheWidth) {
  EXPECT_NEAR(bend_specimen(0.5), 10.65, 2e-3);
  EXPECT_NEAR(compact_specimen(0.5), 9.659, 1e-3);
  for (const double x : {0.2, 0.3, 0.4, 0.5, 0.6})
    EXPECT_NEAR(bend_specimen_brown(x) / bend_specimen(x), 1, 8e-3);
}

TEST(PublishedCracks, LimitsOfSmallAndOfDeepCracks) {
  for (const auto form : {centre_secant, centre_tada, centre_koiter, centre_tangent})
    EXPECT_NEAR(form(1e-4), 1, 1e-4);
  for (const auto form : {edge_tada, edge_polynomial, edge_tada_simple, edge_bending_polynomial,
                          edge_bending_tada, two_edges_tada, two_edges_benthem})
    EXPECT_NEAR(form(1e-4), 1.122, 1e-3);
  EXPECT_NEAR(edge_bending_tada(0.999) * std::pow(0.001, 1.5), 0.374, 2e-3);
  for (const HoleCracks cracks : {HoleCracks::one, HoleCracks::two}) {
    EXPECT_NEAR(tada_hole(cracks, Tension::uniaxial, 0), 3 * 1.1215, 1e-3);
    EXPECT_NEAR(tada_hole(cracks, Tension::biaxial, 0), 2 * 1.1215, 1e-12);
    EXPECT_NEAR(newman_hole(cracks, 0), 3 * 1.1215, 0.03);
    const double far = cracks == HoleCracks::one ? std::sqrt(0.5) : 1.0;
    EXPECT_NEAR(tada_hole(cracks, Tension::uniaxial, 1e9), far, 1e-3);
    EXPECT_NEAR(newman_hole(cracks, 1e9), far, 1e-3);
  }
  EXPECT_NEAR(one_crack_fit(0), 3.365, 1e-4);
  EXPECT_NEAR(two_cracks_fit(0), 3.404, 1e-12);
  EXPECT_NEAR(newman_width(HoleCracks::two, 0.2, 0.1),
              std::sqrt(1 / std::cos(0.2 * std::numbers::pi) / std::cos(0.3 * std::numbers::pi)), 1e-12);
  EXPECT_NEAR(newman_width(HoleCracks::one, 0.1, 0), 1 / std::cos(0.1 * std::numbers::pi), 1e-12);
}

TEST(PublishedCracks, Tables) {
  EXPECT_EQ(centre_isida(0.5), 1.1867);
  EXPECT_FALSE(centre_isida(0.05));
  EXPECT_EQ(bowie(HoleCracks::one, Tension::uniaxial, 1.0), 1.37);
  EXPECT_EQ(bowie(HoleCracks::one, Tension::biaxial, 0.3), 1.67);
  EXPECT_EQ(bowie(HoleCracks::two, Tension::uniaxial, 0.2), 2.41);
  EXPECT_EQ(bowie(HoleCracks::two, Tension::biaxial, 10), 1.03);
  EXPECT_FALSE(bowie(HoleCracks::two, Tension::biaxial, 11));
  EXPECT_EQ(pressurised_wall(0.5), 0.5866);
  EXPECT_FALSE(pressurised_wall(0.6));
  EXPECT_EQ(t_stress(Cracked::centre, 0.9), -4.9012);
  EXPECT_EQ(t_stress(Cracked::edge, 0.5), -0.423);
  EXPECT_EQ(t_stress(Cracked::edge_bending, 0.4), 0.1208);
  EXPECT_EQ(t_stress(Cracked::two_edges, 0.9), -0.5826);
  EXPECT_FALSE(t_stress(Cracked::edge, 0.9));
}

TEST(PublishedCracks, CollinearCracks) {
  EXPECT_NEAR(collinear_inner(0.1), 1.00132, 6e-6 * 1);
  EXPECT_NEAR(collinear_outer(0.1), 1.0012, 6e-6);
  EXPECT_NEAR(collinear_row(0.1), 1.00414, 6e-6 * 1);
  EXPECT_NEAR(collinear_inner(0.3), 1.01383, 6e-6 * 1);
  EXPECT_NEAR(collinear_outer(0.3), 1.01017, 6e-6);
  EXPECT_NEAR(collinear_row(0.3), 1.03983, 6e-6 * 1);
  EXPECT_NEAR(collinear_inner(0.5), 1.04796, 6e-6 * 1);
  EXPECT_NEAR(collinear_outer(0.5), 1.02795, 6e-6);
  EXPECT_NEAR(collinear_row(0.5), 1.12838, 6e-6 * 1);
  EXPECT_NEAR(collinear_inner(0.7), 1.13326, 6e-6 * 1);
  EXPECT_NEAR(collinear_outer(0.7), 1.05786, 6e-6);
  EXPECT_NEAR(collinear_row(0.7), 1.33601, 6e-6 * 1);
  EXPECT_NEAR(collinear_inner(0.9), 1.45387, 6e-6 * 1);
  EXPECT_NEAR(collinear_outer(0.9), 1.11741, 6e-6);
  EXPECT_NEAR(collinear_row(0.9), 2.11331, 6e-6 * 1);
}

TEST(PublishedCracks, InclinedCrackAndKink) {
  const double degree = std::numbers::pi / 180;
  EXPECT_NEAR(solver::kink_angle(inclined(90 * degree).first, inclined(90 * degree).second).value() / degree,
              0, 6e-3);
  EXPECT_NEAR(solver::kink_angle(inclined(75 * degree).first, inclined(75 * degree).second).value() / degree,
              -26.74, 6e-3);
  EXPECT_NEAR(solver::kink_angle(inclined(60 * degree).first, inclined(60 * degree).second).value() / degree,
              -43.22, 6e-3);
  EXPECT_NEAR(solver::kink_angle(inclined(45 * degree).first, inclined(45 * degree).second).value() / degree,
              -53.13, 6e-3);
  EXPECT_NEAR(solver::kink_angle(inclined(30 * degree).first, inclined(30 * degree).second).value() / degree,
              -60, 6e-3);
  EXPECT_NEAR(solver::kink_angle(inclined(15 * degree).first, inclined(15 * degree).second).value() / degree,
              -65.51, 6e-3);
}

// K/S of a crack at a semicircular edge notch, rho 1, half plane: computed 0.8299
// at l/rho 0.02 to 2.4322 at 0.5.
TEST(PublishedCracks, CrackAtANotch) {
  const auto lukas = [](double l) { return notch_crack_lukas(3.065, l) * std::sqrt(std::numbers::pi * l); };
  EXPECT_NEAR(lukas(0.02), 0.8249, 1e-3 * 0.8249);
  EXPECT_NEAR(lukas(0.02) / 0.8299, 1, record(Reference::notch_crack_lukas).accuracy);
  EXPECT_NEAR(notch_crack_short(3.065) * std::sqrt(std::numbers::pi * 0.02), 0.8615, 1e-3 * 0.8615);
  EXPECT_NEAR(lukas(0.05), 1.2308, 1e-3 * 1.2308);
  EXPECT_NEAR(lukas(0.05) / 1.2394, 1, record(Reference::notch_crack_lukas).accuracy);
  EXPECT_NEAR(notch_crack_short(3.065) * std::sqrt(std::numbers::pi * 0.05), 1.3623, 1e-3 * 1.3623);
  EXPECT_NEAR(lukas(0.1), 1.5999, 1e-3 * 1.5999);
  EXPECT_NEAR(lukas(0.1) / 1.6105, 1, record(Reference::notch_crack_lukas).accuracy);
  EXPECT_NEAR(notch_crack_short(3.065) * std::sqrt(std::numbers::pi * 0.1), 1.9266, 1e-3 * 1.9266);
  EXPECT_NEAR(lukas(0.2), 1.9766, 1e-3 * 1.9766);
  EXPECT_NEAR(lukas(0.2) / 1.9849, 1, record(Reference::notch_crack_lukas).accuracy);
  EXPECT_NEAR(notch_crack_short(3.065) * std::sqrt(std::numbers::pi * 0.2), 2.7246, 1e-3 * 2.7246);
  EXPECT_NEAR(lukas(0.5), 2.39, 1e-3 * 2.39);
  EXPECT_NEAR(lukas(0.5) / 2.4322, 1, record(Reference::notch_crack_lukas).accuracy);
  EXPECT_NEAR(notch_crack_short(3.065) * std::sqrt(std::numbers::pi * 0.5), 4.308, 1e-3 * 4.308);
}

TEST(PublishedCracks, TheComputedTableOfNotchCracksLiesBetweenTheLimits) {
  EXPECT_FALSE(notch_crack_table(0.3));
  EXPECT_NEAR(*notch_crack_table(0.1), 1.6105 / std::sqrt(std::numbers::pi * 0.1), 1e-12);
  for (const double x : {0.02, 0.05, 0.1, 0.2})
    EXPECT_LT(*notch_crack_table(x), notch_crack_short(3.065)) << x;
}

TEST(PublishedCracks, PointForcesOnASmallCrackAreThoseOfTheInfinitePlate) {
  for (const double x : {0.01, 0.1, 0.25})
    EXPECT_NEAR(point_forces(x) * std::sqrt(std::numbers::pi * x), 1, 0.1);
  EXPECT_NEAR(point_forces(1e-6) * std::sqrt(std::numbers::pi * 1e-6), 1, 1e-3);
}

}  // namespace
}  // namespace raiser::validation
