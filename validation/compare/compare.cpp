#include <algorithm>
#include <array>
#include <cmath>
#include <optional>
#include <utility>

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
    case Load::Kind::face_pressure:
      break;  // in append_tips(): not covered
    case Load::Kind::edge:
    case Load::Kind::pin:
      break;  // in of_edges(); not covered
  }
}

/// The uniform remote stress that all edge loads make together, if they do.
std::optional<RemoteStress> of_edges(const std::vector<Load>& loads) {
  namespace edge = mesh::rectangle;
  std::array<std::pair<double, double>, 4> sum = {};
  double size = 0.0;
  for (const Load& load : loads) {
    if (load.kind != Load::Kind::edge) continue;
    sum.at(load.edge).first += load.stress;
    sum.at(load.edge).second += load.along;
    size = std::max({size, std::abs(load.stress), std::abs(load.along)});
  }
  const auto same = [size](double a, double b) { return std::abs(a - b) <= 1e-9 * size; };
  const auto& [xx, xy] = sum[edge::right];
  const auto& [yy, yx] = sum[edge::top];
  const bool normal = same(xx, sum[edge::left].first) && same(yy, sum[edge::bottom].first);
  const bool shear = same(xy, sum[edge::left].second) && same(xy, -yx) && same(xy, -sum[edge::bottom].second);
  if (!normal || !shear) return std::nullopt;
  return RemoteStress{xx, yy, xy};
}

/// Nothing published covers pressure in another hole.
bool covered(const Load& load, std::size_t hole) {
  return load.kind != Load::Kind::pressure || load.hole == hole;
}

std::vector<Comparison> solutions(const Situation& s) {
  if (s.hole >= s.plate.holes.size()) {
    const mesh::Raiser at = mesh::raiser(s.plate, s.hole);
    return at.kind == mesh::Raiser::Kind::fillet ? compare_fillet(s) : compare_notch(s);
  }
  if (s.plate.outline) return {};  // the published solutions of holes know rectangles only
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
    case mesh::HoleShape::drawn:
      break;
  }
  return {};
}

/// Whether the plate's edges are those of a rectangle, notches apart.
bool has_four_edges(const mesh::Plate& plate) {
  return mesh::edge_names(plate) == std::vector<std::string>{"right", "top", "left", "bottom"};
}

void append_raisers(std::vector<Comparison>& all, const mesh::Plate& plate,
                    const solver::LoadFindings& findings, const std::vector<Load>& loads,
                    const RemoteStress& from_edges) {
  for (const auto& found : findings.raisers) {
    Situation s{plate, found.raiser, found, findings.name, from_edges, 0.0, 0.0};
    bool known = true;
    for (const Load& load : loads) {
      known = known && covered(load, found.raiser);
      add(s, load);
    }
    const bool loaded =
        s.remote.xx != 0 || s.remote.yy != 0 || s.remote.xy != 0 || s.bending != 0 || s.pressure != 0;
    if (!known || !loaded) continue;
    const auto rows = solutions(s);
    all.insert(all.end(), rows.begin(), rows.end());
  }
}

void append_tips(std::vector<Comparison>& all, const solver::Problem& problem,
                 const solver::LoadFindings& findings, const std::vector<Load>& loads,
                 const RemoteStress& from_edges) {
  const auto presses = [](const Load& load) {
    return load.kind == Load::Kind::pressure || load.kind == Load::Kind::face_pressure;
  };
  if (problem.plate.outline || std::any_of(loads.begin(), loads.end(), presses)) return;
  for (const solver::TipFindings& found : findings.tips) {
    static const solver::RaiserFindings nothing;
    Situation sum{problem.plate, 0, nothing, findings.name, from_edges, 0.0, 0.0};
    for (const Load& load : loads) add(sum, load);
    const auto rows = compare_tip({problem, found, findings.name, sum.remote, sum.bending});
    all.insert(all.end(), rows.begin(), rows.end());
  }
}

void append(std::vector<Comparison>& all, const solver::Problem& problem,
            const solver::LoadFindings& findings, const std::vector<Load>& loads) {
  const auto is_at_edge = [](const Load& load) { return load.kind == Load::Kind::edge; };
  if (!has_four_edges(problem.plate) && std::any_of(loads.begin(), loads.end(), is_at_edge)) return;
  const auto from_edges = of_edges(loads);
  if (!from_edges) return;
  if (problem.plate.cracks.empty()) append_raisers(all, problem.plate, findings, loads, *from_edges);
  append_tips(all, problem, findings, loads, *from_edges);
}

}  // namespace

std::vector<Comparison> compare(const solver::Problem& problem, const solver::LoadFindings& combined,
                                const std::vector<solver::LoadFindings>& units) {
  std::vector<Comparison> all;
  // Every family here is of isotropic plates that uniform tractions load, held nowhere.
  const auto is_other = [](const Load& load) {
    return load.kind == Load::Kind::pin || load.from || load.to || load.stress_to || load.along_to;
  };
  if (problem.material.orthotropy || !problem.supports.empty() ||
      std::any_of(problem.loads.begin(), problem.loads.end(), is_other))
    return all;
  std::vector<std::vector<Load>> groups;  // one for each unit; edge loads come last, together
  std::vector<Load> at_edges;
  for (const Load& load : problem.loads) {
    if (load.kind == Load::Kind::edge)
      at_edges.push_back(load);
    else
      groups.push_back({load});
  }
  if (!at_edges.empty()) groups.push_back(at_edges);
  for (std::size_t i = 0; i < std::min(groups.size(), units.size()); ++i)
    append(all, problem, units[i], groups[i]);
  if (groups.size() > 1) append(all, problem, combined, problem.loads);
  return all;
}

std::vector<Comparison> compare(const solver::Problem& problem, const solver::Solution& solution) {
  return compare(problem, solution.combined, solution.units);
}

}  // namespace raiser::validation
