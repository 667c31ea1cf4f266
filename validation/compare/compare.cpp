#include <cmath>

#include "validation/compare/families.hpp"

namespace raiser::validation {

namespace {

using solver::Load;

void add(Situation& s, const Load& load) {
  switch (load.kind) {
    case Load::Kind::tension:
      s.remote.xx += load.stress;
      break;
    case Load::Kind::transverse:
      s.remote.yy += load.stress;
      break;
    case Load::Kind::shear:
      s.remote.xy += load.stress;
      break;
    case Load::Kind::bending:
      s.bending += load.stress;
      break;
    case Load::Kind::pressure:
      if (load.hole == s.hole) s.pressure += load.stress;
      break;
    case Load::Kind::edge:
      break;
  }
}

/// Nothing published covers single edge tractions or pressure in another hole.
bool covered(const Load& load, std::size_t hole) {
  return load.kind != Load::Kind::edge && (load.kind != Load::Kind::pressure || load.hole == hole);
}

std::vector<Comparison> solutions(const Situation& s) {
  auto rows = compare_group(s);
  if (!rows.empty()) return rows;
  switch (s.shape().shape) {
    case mesh::HoleShape::circle:
      return compare_circle(s);
    case mesh::HoleShape::ellipse:
      return compare_ellipse(s);
    case mesh::HoleShape::slot:
      return compare_slot(s);
    case mesh::HoleShape::rounded_rectangle:
      return compare_rounded_rectangle(s);
  }
  return {};
}

void append(std::vector<Comparison>& all, const mesh::Plate& plate, const solver::LoadFindings& findings,
            const std::vector<Load>& loads) {
  for (const auto& found : findings.holes) {
    Situation s{plate, found.hole, found, findings.name, {}, 0.0, 0.0};
    bool known = true;
    for (const Load& load : loads) {
      known = known && covered(load, found.hole);
      add(s, load);
    }
    const bool loaded =
        s.remote.xx != 0 || s.remote.yy != 0 || s.remote.xy != 0 || s.bending != 0 || s.pressure != 0;
    if (!known || !loaded) continue;
    const auto rows = solutions(s);
    all.insert(all.end(), rows.begin(), rows.end());
  }
}

}  // namespace

std::vector<Comparison> compare(const solver::Problem& problem, const solver::LoadFindings& combined,
                                const std::vector<solver::LoadFindings>& units) {
  std::vector<Comparison> all;
  std::size_t unit = 0;  // edge loads come last, together
  for (const Load& load : problem.loads) {
    if (load.kind == Load::Kind::edge || unit >= units.size()) continue;
    append(all, problem.plate, units[unit++], {load});
  }
  if (problem.loads.size() > 1) append(all, problem.plate, combined, problem.loads);
  return all;
}

std::vector<Comparison> compare(const solver::Problem& problem, const solver::Solution& solution) {
  return compare(problem, solution.combined, solution.units);
}

}  // namespace raiser::validation
