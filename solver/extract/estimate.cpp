#include "solver/extract/estimate.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <cstdlib>
#include <string_view>

namespace raiser::solver {

namespace {

// One significant digit: digit x 10^exponent.
struct Rounded {
  int digit = 0;
  int exponent = 0;
};

// The shortest decimal text of x > 0 in the form d.ddde+xx.
std::string shortest(double x) {
  std::array<char, 40> buffer;
  const auto end =
      std::to_chars(buffer.data(), buffer.data() + buffer.size(), x, std::chars_format::scientific);
  return {buffer.data(), end.ptr};
}

int decimal_exponent(double x) {
  const std::string text = shortest(std::abs(x));
  return std::atoi(text.c_str() + text.find('e') + 1);
}

// Rounds x > 0 up, seen as its shortest decimal text so that 0.07 stays 0.07.
Rounded up(double x) {
  const std::string text = shortest(x);
  const std::string_view rest = std::string_view(text).substr(1, text.find('e') - 1);
  const bool more = rest.find_first_of("123456789") != std::string_view::npos;
  Rounded result{text[0] - '0' + (more ? 1 : 0), decimal_exponent(x)};
  if (result.digit == 10) result = {1, result.exponent + 1};
  return result;
}

double power_of_ten(int exponent) { return std::strtod(fmt::format("1e{}", exponent).c_str(), nullptr); }

// The multiple of 10^place nearest to x, as text.
std::string at_place(double x, int place) {
  if (std::abs(x) < power_of_ten(place))
    x = std::abs(x) < 0.5 * power_of_ten(place) ? 0.0 : std::copysign(power_of_ten(place), x);
  int leading = place;
  if (x != 0.0) {
    leading = decimal_exponent(x);
    const std::string carried = fmt::format("{:.{}e}", x, leading - place);  // 9.97 at place -1 is 10.0
    x = std::strtod(carried.c_str(), nullptr);
    leading = decimal_exponent(x);
  }
  const bool scientific = leading < -4 || leading >= 7;
  if (scientific) return x == 0.0 ? "0" : fmt::format("{:.{}e}", x, leading - place);
  if (x == 0.0) x = std::abs(x);  // no -0
  if (place <= 0) return fmt::format("{:.{}f}", x, -place);
  return fmt::format("{:.0f}", std::nearbyint(x / power_of_ten(place)) * power_of_ten(place));
}

std::string one_digit(const Rounded& rounded) {
  return at_place(rounded.digit * power_of_ten(rounded.exponent), rounded.exponent);
}

bool given(double bound) { return std::isfinite(bound) && bound >= 0.0; }

// Value and bound as printed: the interval printed holds the interval given,
// so the bound also covers what rounding the value takes away.
struct Printed {
  std::string value;
  std::string bound;
};

Printed printed(const Estimate& estimate) {
  constexpr int most_digits = 15;
  const double size = std::abs(estimate.value);
  Rounded bound = up(estimate.bound);
  for (;;) {
    int place = bound.exponent;
    if (size > 0.0) place = std::max(place, decimal_exponent(size) - (most_digits - 1));
    const std::string value = at_place(size < estimate.bound ? 0.0 : estimate.value, place);
    const double lost = std::abs(std::strtod(value.c_str(), nullptr) - estimate.value);
    const bool noise = lost <= 4e-16 * size;  // a difference of two doubles holds no more
    const Rounded covering = up(estimate.bound + (noise ? 0.0 : lost));
    if (covering.exponent <= bound.exponent) return {value, one_digit(covering)};
    bound = covering;
  }
}

}  // namespace

std::string digits(const Estimate& estimate) {
  if (std::isnan(estimate.value)) return "undefined";
  if (std::isinf(estimate.value)) return estimate.value > 0.0 ? "unbounded" : "-unbounded";
  if (given(estimate.bound) && estimate.bound > 0.0) return printed(estimate).value;
  if (estimate.value == 0.0) return "0";
  const int wanted = given(estimate.bound) ? 10 : 3;
  return at_place(estimate.value, decimal_exponent(estimate.value) - wanted + 1);
}

std::string bound_digits(const Estimate& estimate) {
  if (!given(estimate.bound) || !std::isfinite(estimate.value)) return "unknown";
  if (estimate.bound == 0.0) return "0";
  return printed(estimate).bound;
}

}  // namespace raiser::solver
