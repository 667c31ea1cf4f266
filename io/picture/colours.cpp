#include "io/picture/colours.hpp"

#include <algorithm>
#include <array>
#include <cmath>

namespace raiser::io {
namespace {

struct Lab {
  double lightness, a, b;
};

// A path of our own through CIELAB, inside the sRGB gamut at every point.
constexpr std::array<Lab, 7> path{
    {{96, -2, 8}, {86, 1, 30}, {74, 18, 46}, {60, 38, 34}, {46, 45, 6}, {33, 36, -24}, {19, 22, -34}}};

double gamma(double linear) {
  const double c = std::clamp(linear, 0.0, 1.0);
  return c <= 0.0031308 ? 12.92 * c : 1.055 * std::pow(c, 1 / 2.4) - 0.055;
}

double linear(double encoded) {
  return encoded <= 0.04045 ? encoded / 12.92 : std::pow((encoded + 0.055) / 1.055, 2.4);
}

// CIE 1976 L*a*b* with D65 white to sRGB (IEC 61966-2-1).
Ink srgb(const Lab& c) {
  constexpr double knee = 6.0 / 29.0;
  const auto cube = [](double t) { return t > knee ? t * t * t : 3 * knee * knee * (t - 4.0 / 29.0); };
  const double f = (c.lightness + 16) / 116;
  const double x = 0.95047 * cube(f + c.a / 500);
  const double y = cube(f);
  const double z = 1.08883 * cube(f - c.b / 200);
  return {gamma(3.2404542 * x - 1.5371385 * y - 0.4985314 * z),
          gamma(-0.9692660 * x + 1.8760108 * y + 0.0415560 * z),
          gamma(0.0556434 * x - 0.2040259 * y + 1.0572252 * z), 1.0};
}

}  // namespace

Ink stress_colour(double part) {
  const double t = std::clamp(part, 0.0, 1.0);
  const double wanted = path.front().lightness + t * (path.back().lightness - path.front().lightness);
  std::size_t i = 0;
  while (i + 2 < path.size() && wanted < path[i + 1].lightness) ++i;
  const Lab &p = path[i], &q = path[i + 1];
  const double s = (wanted - p.lightness) / (q.lightness - p.lightness);
  return srgb({wanted, p.a + s * (q.a - p.a), p.b + s * (q.b - p.b)});
}

double lightness(const Ink& ink) {
  const double y = 0.2126 * linear(ink.red) + 0.7152 * linear(ink.green) + 0.0722 * linear(ink.blue);
  return y > 216.0 / 24389.0 ? 116 * std::cbrt(y) - 16 : y * 24389.0 / 27.0;
}

}  // namespace raiser::io
