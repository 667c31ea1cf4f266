#include <cmath>

#include "validation/exact/exact.hpp"

namespace raiser::validation {

namespace {

struct Polar {
  double rr, tt, rt;
};

Stress cartesian(const Polar& s, double theta) {
  const double c = std::cos(theta), n = std::sin(theta);
  return {s.rr * c * c + s.tt * n * n - 2 * s.rt * c * n, s.rr * n * n + s.tt * c * c + 2 * s.rt * c * n,
          (s.rr - s.tt) * c * n + s.rt * (c * c - n * n), 0.0};
}

}  // namespace

Stress kirsch(const RemoteStress& remote, double radius, const Point& x) {
  const double theta = std::atan2(x.y(), x.x());
  const double k2 = radius * radius / x.squaredNorm(), k4 = k2 * k2;
  const double mean = 0.5 * (remote.xx + remote.yy), half = 0.5 * (remote.xx - remote.yy);
  const double even = half * std::cos(2 * theta) + remote.xy * std::sin(2 * theta);
  const double odd = half * std::sin(2 * theta) - remote.xy * std::cos(2 * theta);
  return cartesian({mean * (1 - k2) + (1 - 4 * k2 + 3 * k4) * even, mean * (1 + k2) - (1 + 3 * k4) * even,
                    -(1 + 2 * k2 - 3 * k4) * odd},
                   theta);
}

double kirsch_edge(const RemoteStress& remote, double theta) {
  return remote.xx + remote.yy - 2 * (remote.xx - remote.yy) * std::cos(2 * theta) -
         4 * remote.xy * std::sin(2 * theta);
}

Stress lame(double pressure, double radius, const Point& x) {
  const double p = pressure * radius * radius / x.squaredNorm();
  return cartesian({-p, p, 0.0}, std::atan2(x.y(), x.x()));
}

}  // namespace raiser::validation
