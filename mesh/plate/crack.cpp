#include "mesh/plate/crack.hpp"

#include <fmt/format.h>

namespace raiser::mesh {

double Crack::length() const {
  double sum = 0.0;
  for (std::size_t i = 1; i < points.size(); ++i) sum += (points[i] - points[i - 1]).norm();
  return sum;
}

std::string label(const std::vector<Crack>& cracks, std::size_t crack) {
  const std::string& name = cracks[crack].name;
  return name.empty() ? fmt::format("crack {}", crack + 1) : fmt::format("crack '{}'", name);
}

std::vector<CrackTip> tips(const std::vector<Crack>& cracks) {
  std::vector<CrackTip> result;
  for (std::size_t i = 0; i < cracks.size(); ++i) {
    const Crack& crack = cracks[i];
    if (crack.points.size() < 2) continue;
    const std::string own = crack.name.empty() ? fmt::format("crack {}", i + 1) : crack.name;
    const auto name = [&](std::size_t end) {
      if (!crack.tip_names[end].empty()) return crack.tip_names[end];
      return crack.has_mouth ? own : own + (end == 0 ? " A" : " B");
    };
    const auto& p = crack.points;
    if (!crack.has_mouth) result.push_back({i, false, p[0], (p[0] - p[1]).normalized(), name(0)});
    result.push_back({i, true, p.back(), (p.back() - p[p.size() - 2]).normalized(), name(1)});
  }
  return result;
}

}  // namespace raiser::mesh
