#include <cmath>
#include <limits>

#include "mesh/region/region.hpp"

namespace raiser::mesh {

Point Curve::at(double t) const {
  if (kind == Kind::line) return centre + t * u;
  return centre + std::cos(t) * u + std::sin(t) * v;
}

Point Curve::derivative(double t) const {
  if (kind == Kind::line) return u;
  return std::cos(t) * v - std::sin(t) * u;
}

double Curve::radius_of_curvature(double t) const {
  if (kind == Kind::line) return std::numeric_limits<double>::infinity();
  const double area = std::abs(u.x() * v.y() - u.y() * v.x());
  return std::pow(derivative(t).norm(), 3) / area;
}

}  // namespace raiser::mesh
