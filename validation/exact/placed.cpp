#include <Eigen/Geometry>
#include <cmath>
#include <utility>

#include "validation/exact/exact.hpp"

namespace raiser::validation {

RemoteStress turned(const RemoteStress& s, double angle) {
  const double c = std::cos(2 * angle), n = std::sin(2 * angle);
  const double mean = 0.5 * (s.xx + s.yy), half = 0.5 * (s.xx - s.yy);
  const double even = half * c + s.xy * n;
  return {mean + even, mean - even, s.xy * c - half * n};
}

StressField placed(StressField own, const Point& centre, double angle) {
  return [own = std::move(own), centre, angle](const Point& x) {
    const Stress s = own(Eigen::Rotation2Dd(-angle) * (x - centre));
    const RemoteStress back = turned({s.xx, s.yy, s.xy}, -angle);
    return Stress{back.xx, back.yy, back.xy, s.zz};
  };
}

solver::Traction traction_of(StressField field) {
  return [field = std::move(field)](const solver::Owner&, const Point& x, const Point& n) {
    const Stress s = field(x);
    return Point(s.xx * n.x() + s.xy * n.y(), s.xy * n.x() + s.yy * n.y());
  };
}

}  // namespace raiser::validation
