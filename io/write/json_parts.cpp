#include "io/write/json_parts.hpp"

#include <cmath>

namespace raiser::io::json_part {

Json quantity(double value, std::string_view unit) {
  Json object{{"value", nullptr}, {"unit", unit}};
  if (std::isfinite(value)) {
    object["value"] = value == 0.0 ? 0.0 : value;  // no negative zero
  } else {
    object["why"] = "not a finite number";
  }
  return object;
}

Json quantity(const solver::Estimate& estimate, std::string_view unit) {
  Json object{{"value", nullptr}, {"bound", nullptr}, {"unit", unit}};
  const bool bounded = std::isfinite(estimate.bound);
  if (std::isfinite(estimate.value)) object["value"] = estimate.value == 0.0 ? 0.0 : estimate.value;
  if (bounded) object["bound"] = estimate.bound;
  if (!std::isfinite(estimate.value)) {
    object["why"] = "not a finite number";
  } else if (!bounded) {
    object["why"] = "no bound can be given";
  }
  return object;
}

Json position(const mesh::Point& point) {
  return {{"x", quantity(point.x(), "mm")}, {"y", quantity(point.y(), "mm")}};
}

Json without_value(std::string_view unit, std::string_view why) {
  return {{"value", nullptr}, {"bound", nullptr}, {"unit", unit}, {"why", why}};
}

}  // namespace raiser::io::json_part
