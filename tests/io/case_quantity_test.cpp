#include <fmt/format.h>
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>
#include <random>
#include <string>
#include <variant>

#include "io/case/quantity.hpp"
#include "io/case/words.hpp"

using namespace raiser::io;

namespace {

double value(std::string_view text, Dimension dimension) {
  const auto parsed = parse_quantity(text, dimension);
  const auto* fault = std::get_if<QuantityFault>(&parsed);
  if (fault != nullptr) ADD_FAILURE() << text << ": " << fault->what;
  return fault != nullptr ? std::nan("") : std::get<double>(parsed);
}

std::string fault(std::string_view text, Dimension dimension) {
  const auto parsed = parse_quantity(text, dimension);
  const auto* found = std::get_if<QuantityFault>(&parsed);
  return found == nullptr ? "" : found->what + "; " + found->cure;
}

struct Factor {
  const char* text;
  Dimension dimension;
  double expected;
};

}  // namespace

// NIST Special Publication 811, "Guide for the Use of the International System
// of Units (SI)", 2008: B.6 exact definitions of inch, foot and pound (mass),
// 5.1 standard gravity; lbf = 0.45359237 * 9.80665 N. The stresses and moments
// follow from these.
TEST(Quantity, ConvertsByTheExactFactors) {
  constexpr double lbf = 0.45359237 * 9.80665;
  const Factor factors[] = {
      {"1 mm", Dimension::length, 1.0},
      {"1 cm", Dimension::length, 10.0},
      {"1 m", Dimension::length, 1000.0},
      {"1 um", Dimension::length, 1e-3},
      {"1 in", Dimension::length, 25.4},
      {"1 ft", Dimension::length, 304.8},
      {"1 N", Dimension::force, 1.0},
      {"1 kN", Dimension::force, 1e3},
      {"1 MN", Dimension::force, 1e6},
      {"1 lbf", Dimension::force, lbf},
      {"1 kip", Dimension::force, 1000.0 * lbf},
      {"1 Pa", Dimension::stress, 1e-6},
      {"1 kPa", Dimension::stress, 1e-3},
      {"1 MPa", Dimension::stress, 1.0},
      {"1 GPa", Dimension::stress, 1e3},
      {"1 N/mm^2", Dimension::stress, 1.0},
      {"1 N/mm2", Dimension::stress, 1.0},
      {"1 psi", Dimension::stress, lbf / (25.4 * 25.4)},
      {"1 ksi", Dimension::stress, 1e3 * lbf / (25.4 * 25.4)},
      {"1 Msi", Dimension::stress, 1e6 * lbf / (25.4 * 25.4)},
      {"1 N mm", Dimension::moment, 1.0},
      {"1 N m", Dimension::moment, 1e3},
      {"1 kN mm", Dimension::moment, 1e3},
      {"1 kN m", Dimension::moment, 1e6},
      {"1 lbf in", Dimension::moment, 25.4 * lbf},
      {"1 kip in", Dimension::moment, 25.4e3 * lbf},
      {"1 lbf ft", Dimension::moment, 304.8 * lbf},
      {"180 deg", Dimension::angle, std::numbers::pi},
      {"1 rad", Dimension::angle, 1.0},
      {"1 %", Dimension::ratio, 0.01},
      {"1", Dimension::ratio, 1.0},
  };
  for (const Factor& factor : factors) {
    EXPECT_NEAR(value(factor.text, factor.dimension) / factor.expected, 1.0, 1e-15) << factor.text;
  }
}

// B.9 of the same guide prints these rounded to seven figures.
TEST(Quantity, AgreesWithTheFactorsAsPrinted) {
  EXPECT_NEAR(value("1 psi", Dimension::stress), 6.894757e-3, 5e-10);
  EXPECT_NEAR(value("1 kip", Dimension::force), 4.448222e3, 5e-4);
  EXPECT_NEAR(value("1 lbf in", Dimension::moment), 1.129848e2, 5e-5);
  EXPECT_NEAR(value("1 lbf ft", Dimension::moment), 1.355818e3, 5e-4);
}

TEST(Quantity, EveryUnitGivesBackWhatWasWrittenInIt) {
  std::mt19937_64 generator(20240501);
  std::uniform_real_distribution<double> exponent(-6.0, 6.0);
  for (const Unit& unit : units()) {
    for (int i = 0; i < 200; ++i) {
      const double number = (i % 2 == 0 ? 1.0 : -1.0) * std::pow(10.0, exponent(generator));
      const double read = value(fmt::format("{} {}", number, unit.name), unit.dimension);
      EXPECT_NEAR(read * unit.divisor / unit.factor / number, 1.0, 1e-15) << number << unit.name;
    }
  }
}

TEST(Quantity, IsExactWhereDecimalsAre) {
  EXPECT_EQ(value("0.75 in", Dimension::length), 19.05);
  EXPECT_EQ(value("0.1 %", Dimension::ratio), 0.001);
  EXPECT_EQ(value("1.5e-3 m", Dimension::length), 1.5);
  EXPECT_EQ(value("7 um", Dimension::length), 0.007);
}

TEST(Quantity, TakesTheSpellingsPeopleType) {
  EXPECT_EQ(value("18mm", Dimension::length), 18.0);
  EXPECT_EQ(value("  +18  mm ", Dimension::length), 18.0);
  EXPECT_EQ(value("18\u00a0mm", Dimension::length), 18.0);
  EXPECT_EQ(value("-18 mm", Dimension::length), -18.0);
  EXPECT_EQ(value("5 \u00b5m", Dimension::length), 0.005);
  EXPECT_EQ(value("12 N*m", Dimension::moment), 12e3);
  EXPECT_EQ(value("12 N\u00b7m", Dimension::moment), 12e3);
  EXPECT_EQ(value("12 Nm", Dimension::moment), 12e3);
  EXPECT_EQ(value("3 N/mm\u00b2", Dimension::stress), 3.0);
  EXPECT_NEAR(value("30\u00b0", Dimension::angle), std::numbers::pi / 6.0, 1e-16);
}

TEST(Quantity, RefusesAndSaysWhatIsExpected) {
  struct Refusal {
    const char* text;
    Dimension dimension;
    const char* says;
  };
  const Refusal refusals[] = {
      {"18", Dimension::length, "a length needs a unit; write e.g. \"18 mm\""},
      {"", Dimension::stress, "nothing is written"},
      {"   ", Dimension::stress, "nothing is written"},
      {"mm", Dimension::length, "does not start with a number"},
      {"nan mm", Dimension::length, "not finite"},
      {"-inf MPa", Dimension::stress, "not finite"},
      {"1e400 mm", Dimension::length, "outside the range of double"},
      {"1e-400 mm", Dimension::length, "outside the range of double"},
      {"1e308 m", Dimension::length, "outside the range of double"},
      {"+-3 mm", Dimension::length, "does not start with a number"},
      {"0x10 mm", Dimension::length, "not a unit"},
      {"18,5 mm", Dimension::length, "decimal sign is a point"},
      {"3 kN", Dimension::length, "a length is expected and kN is a unit of force"},
      {"3 mm", Dimension::angle, "an angle is expected and mm is a unit of length"},
      {"3 mpa", Dimension::stress, "the nearest is \"MPa\""},
      {"3 mpa", Dimension::length, "the nearest is \"MPa\", a unit of stress"},
      {"3 furlong", Dimension::length, "the units of length are mm, cm, m, um, in, ft"},
      {"3 mm 4", Dimension::length, "not a unit"},
      {"5 %", Dimension::length, "% is a unit of ratio"},
  };
  for (const Refusal& refusal : refusals) {
    EXPECT_NE(fault(refusal.text, refusal.dimension).find(refusal.says), std::string::npos)
        << refusal.text << " -> " << fault(refusal.text, refusal.dimension);
  }
}

TEST(Words, EditDistanceCountsSteps) {
  EXPECT_EQ(edit_distance("width", "width"), 0.0);
  EXPECT_EQ(edit_distance("wdith", "width"), 1.0);  // neighbours swapped
  EXPECT_EQ(edit_distance("widt", "width"), 1.0);
  EXPECT_EQ(edit_distance("mpa", "MPa"), 1.0);  // two letters of the other case
  EXPECT_EQ(edit_distance("kitten", "sitting"), 3.0);
  EXPECT_EQ(edit_distance("", "abc"), 3.0);
}

TEST(Words, NearestIsTheClosestAndTheFirstOfEquals) {
  constexpr std::string_view keys[] = {"length", "width", "thickness"};
  EXPECT_EQ(nearest("wdith", keys), "width");
  EXPECT_EQ(nearest("thicknes", keys), "thickness");
  constexpr std::string_view equals[] = {"ab", "ac"};
  EXPECT_EQ(nearest("ax", equals), "ab");
  EXPECT_EQ(nearest(std::string(500, 'x'), keys), "");
}

TEST(Words, ShownFitsOnALine) {
  EXPECT_EQ(shown("a\nb"), "a\\x0ab");
  EXPECT_EQ(shown(std::string(200, 'x')), std::string(60, 'x') + "...");
  EXPECT_EQ(shown(std::string(59, 'x') + "\u00b5\u00b5"), std::string(59, 'x') + "\u00b5...");
}
