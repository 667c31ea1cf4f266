#include "solver/extract/paths.hpp"

#include <fmt/format.h>

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>
#include <utility>

#include "mesh/legendre.hpp"
#include "mesh/plate/section.hpp"
#include "mesh/plate/words.hpp"
#include "mesh/region/region.hpp"
#include "solver/adapt/bound.hpp"

namespace raiser::solver {
namespace {

constexpr int ligament_points = 41;

double angle_about(const Point& centre, const Point& x) {
  const Point arm = x - centre;
  return std::atan2(arm.y(), arm.x());
}

/// How far along a chain a point on it lies: the position of the curve plus
/// the share of its length; of the nearest curve that holds it.
double way_along(const mesh::Loop& chain, const Point& x) {
  double best = std::numeric_limits<double>::infinity();
  double way = 0.0;
  for (std::size_t i = 0; i < chain.size(); ++i) {
    const mesh::Curve& curve = chain[i];
    const double low = std::min(curve.begin, curve.end);
    const double high = std::max(curve.begin, curve.end);
    const Point arm = x - curve.centre;
    double t = curve.u.dot(arm) / curve.u.squaredNorm();
    if (curve.kind == mesh::Curve::Kind::arc) {
      Eigen::Matrix2d axes;
      axes << curve.u, curve.v;
      const Point own = axes.inverse() * arm;
      constexpr double turn = 2 * std::numbers::pi;
      t = std::atan2(own.y(), own.x());
      t += turn * std::round(((low + high) / 2 - t) / turn);
    }
    t = std::clamp(t, low, high);
    const double miss = (curve.at(t) - x).norm();
    if (!(miss < best)) continue;
    best = miss;
    way = static_cast<double>(i) + (t - curve.begin) / (curve.end - curve.begin);
  }
  return way;
}

/// Puts samples in order and measures the way along the edge through them. The
/// shapes that a case can name are star-shaped about their centres; drawn holes and
/// other raisers have a chain of curves to follow. A closed one begins at the
/// smallest angle.
void order(std::vector<EdgeSample>& samples, const mesh::Loop& chain, bool is_closed) {
  std::vector<std::pair<double, EdgeSample>> placed;
  for (EdgeSample& sample : samples)
    placed.emplace_back(chain.empty() ? sample.angle : way_along(chain, sample.point), sample);
  std::sort(placed.begin(), placed.end(), [](const auto& a, const auto& b) { return a.first < b.first; });
  if (is_closed)
    std::rotate(
        placed.begin(),
        std::min_element(placed.begin(), placed.end(),
                         [](const auto& a, const auto& b) { return a.second.angle < b.second.angle; }),
        placed.end());
  for (std::size_t i = 0; i < samples.size(); ++i) {
    samples[i] = placed[i].second;
    if (i > 0)
      samples[i].arc_length = samples[i - 1].arc_length + (samples[i].point - samples[i - 1].point).norm();
  }
}

/// A drawn hole's edge run anticlockwise, with the material on its right.
mesh::Loop anticlockwise(const mesh::Hole& hole) {
  mesh::Loop chain = mesh::trace(hole, {});
  std::reverse(chain.begin(), chain.end());
  for (mesh::Curve& curve : chain) std::swap(curve.begin, curve.end);
  return chain;
}

/// The curves of a raiser of the outline or of a drawn hole in their order, none
/// for another hole.
mesh::Loop chain_of(const Plate& plate, const mesh::Loop& outline, std::size_t raiser) {
  mesh::Loop chain;
  if (raiser < plate.holes.size())
    return plate.holes[raiser].shape == mesh::HoleShape::drawn ? anticlockwise(plate.holes[raiser]) : chain;
  const Owner own{Owner::Kind::raiser, raiser - plate.holes.size()};
  const std::size_t n = outline.size();
  std::size_t first = 0;  // the chain may run over the outline's own beginning
  while (first < n && !(outline[first].owner == own && outline[(first + n - 1) % n].owner != own)) ++first;
  for (std::size_t k = 0; k < n; ++k)
    if (const mesh::Curve& curve = outline[(first + k) % n]; curve.owner == own) chain.push_back(curve);
  return chain;
}

/// The largest bound along one side from the values of successive degrees. At a
/// single point the differences may vanish by accident, most of all beside a
/// jump of curvature, where they fall slowly.
double largest_bound(const std::vector<Eigen::VectorXd>& degrees, double size,
                     const Convergence& convergence) {
  double largest = 0.0;
  for (Eigen::Index q = 0; q < degrees.back().size(); ++q) {
    std::vector<double> sequence;
    for (const Eigen::VectorXd& values : degrees) sequence.push_back(values[q]);
    largest = std::max(largest, convergence.bound(sequence, size));
  }
  return largest;
}

/// "hole bolt", but "hole 1" for a hole of that name.
std::string name_of(const mesh::Raiser& raiser) {
  const std::string kind = std::string(word(raiser.kind)) + " ";
  return raiser.name.starts_with(kind) ? raiser.name : kind + raiser.name;
}

std::string end_name(const Plate& plate, const Owner& owner) {
  if (owner.kind == Owner::Kind::raiser) return name_of(mesh::raiser(plate, owner.index));
  const auto edges = mesh::edge_names(plate);
  return owner.index < edges.size() ? mesh::edge_phrase(edges[owner.index]) : "edge";
}

/// A drawn hole may meet a section more than twice, its centre need not lie in it.
std::string start_name(const Plate& plate, std::size_t index, bool across, const mesh::Interval& piece,
                       bool from_begin) {
  const mesh::Raiser raiser = mesh::raiser(plate, index);
  if (raiser.kind != mesh::Raiser::Kind::hole) return name_of(raiser);
  if (plate.holes[index].shape == mesh::HoleShape::drawn)
    return fmt::format("{}, {} = {:.6g} mm", name_of(raiser), across ? 'y' : 'x',
                       (from_begin ? piece.begin : piece.end) + 0.0);
  return name_of(raiser) + (across ? ", y " : ", x ") + (from_begin ? ">" : "<") + " centre";
}

Ligament follow(const Plate& plate, std::size_t raiser, const Section& section, const mesh::Interval& piece,
                bool from_begin, const std::vector<Field>& fields, const Convergence& convergence,
                double doubt) {
  const bool across = section.direction == Section::Direction::across;
  Ligament ligament;
  ligament.raiser = raiser;
  ligament.from = start_name(plate, raiser, across, piece, from_begin);
  ligament.to = end_name(plate, from_begin ? piece.at_end : piece.at_begin);
  ligament.width = piece.end - piece.begin;
  for (int k = 0; k < ligament_points; ++k) {
    // Denser towards the raiser's edge; a hair inside the material at both ends.
    const double share =
        std::clamp(std::pow(static_cast<double>(k) / (ligament_points - 1), 2), 1e-12, 1 - 1e-12);
    const double distance = share * ligament.width;
    const double position = from_begin ? piece.begin + distance : piece.end - distance;
    const Point x = across ? Point(section.station, position) : Point(position, section.station);
    const auto place = fields.back().place(x);
    if (!place) continue;
    std::vector<std::array<double, 3>> values;
    LigamentPoint point;
    for (const Field& field : fields) {
      const FieldValue value = field.value(*place);
      values.push_back({value.stress.xx, value.stress.yy, value.stress.xy});
      point = {value.point, k == 0 ? 0.0 : distance, value.stress, 0.0};
    }
    const double size = von_mises(point.stress);
    for (int c = 0; c < 3; ++c) {
      std::vector<double> sequence;
      for (const auto& value : values) sequence.push_back(value[c]);
      point.bound = std::max(point.bound, convergence.bound(sequence, size));
    }
    point.bound += doubt;
    ligament.points.push_back(point);
  }
  return ligament;
}

}  // namespace

std::vector<std::vector<EdgeSample>> edge_samples(const Model& model, const Plate& plate,
                                                  const EdgeScanner& scanner,
                                                  const std::vector<EdgeScan>& scans,
                                                  const Convergence& convergence) {
  std::vector<std::vector<EdgeSample>> result(mesh::raiser_count(plate));
  const std::vector<mesh::Raiser> raisers = mesh::raisers(plate);
  const auto& positions = search_points();
  const EdgeScan& last = scans.back();
  for (std::size_t image = 0; image < model.images().size(); ++image) {
    const Eigen::VectorXd weight = scanner.weights(0, image);
    for (std::size_t side = 0; side < scanner.sides().size(); ++side) {
      const std::size_t raiser = scanner.raiser_in(side, image);
      std::vector<Eigen::VectorXd> tangential;
      for (const EdgeScan& scan : scans) tangential.push_back(scan.sides[side].tangential * weight);
      const Eigen::VectorXd normal = last.sides[side].normal * weight;
      const Eigen::VectorXd shear = last.sides[side].shear * weight;
      const RaiserExtremes& extremes = last.extremes[0][raiser];
      const double size = std::max(std::abs(extremes[0].value), std::abs(extremes[1].value));
      double bound = largest_bound(tangential, size, convergence);
      if (scanner.has_doubt(0))
        bound += (last.sides[side].tangential * scanner.weights(*doubt_in(model) + 1, image))
                     .cwiseAbs()
                     .maxCoeff();
      // The side's last point is the next side's first.
      for (std::size_t q = 0; q + 1 < positions.size(); q += 2) {
        EdgeSample sample;
        const mesh::BoundarySide& at = scanner.sides()[side];
        sample.point = model.images()[image].apply(at.curve.at(at.parameter(positions[q])));
        sample.angle = angle_about(raisers[raiser].centre, sample.point);
        sample.tangential = tangential.back()[q];
        sample.von_mises = von_mises({tangential.back()[q], normal[q], shear[q],
                                      model.material().through_thickness(tangential.back()[q], normal[q])});
        sample.bound = bound;
        result[raiser].push_back(sample);
      }
    }
  }
  const mesh::Loop outline = mesh::outline_of(plate).curves;
  for (std::size_t i = 0; i < result.size(); ++i)
    order(result[i], chain_of(plate, outline, i), i < plate.holes.size());
  return result;
}

double largest_doubt(const Model& model, const EdgeScan& scan) {
  const auto doubt = doubt_in(model);
  double largest = 0.0;
  if (doubt)
    for (const SideStress& side : scan.sides) {
      const auto column = static_cast<Eigen::Index>(*doubt);
      largest = std::max({largest, side.tangential.col(column).cwiseAbs().maxCoeff(),
                          side.normal.col(column).cwiseAbs().maxCoeff()});
    }
  return largest;
}

std::vector<Ligament> ligaments(const Plate& plate, const std::vector<Section>& sections,
                                const std::vector<Field>& fields, const Convergence& convergence,
                                double doubt) {
  std::vector<Ligament> result;
  for (std::size_t i = 0; i < sections.size(); ++i)
    for (const mesh::Interval& piece :
         mesh::material_along(plate, sections[i].direction, sections[i].station)) {
      if (piece.raiser_at_begin() == i)
        result.push_back(follow(plate, i, sections[i], piece, true, fields, convergence, doubt));
      if (piece.raiser_at_end() == i)
        result.push_back(follow(plate, i, sections[i], piece, false, fields, convergence, doubt));
    }
  return result;
}

FarStress far_stress(const Plate& plate, const Field& field, double station, double mean, double slope) {
  constexpr int panels = 16;
  static const mesh::GaussRule rule = mesh::gauss_legendre(4);
  const auto pieces = mesh::gross_along(plate, mesh::Direction::across, station);
  const mesh::SectionShape shape = mesh::shape_of(pieces);
  FarStress result;
  for (const mesh::Interval& piece : pieces)
    for (int panel = 0; panel < panels; ++panel)
      for (std::size_t q = 0; q < rule.points.size(); ++q) {
        const double length = piece.end - piece.begin;
        const double y = piece.begin + length * (panel + (1 + rule.points[q]) / 2) / panels;
        const auto value = field.at({station, y});
        if (!value) continue;
        result.mean += rule.weights[q] / 2 / panels * length / shape.length * value->stress.xx;
        const double nominal = mean + slope * (y - shape.centroid);
        result.scatter = std::max(result.scatter, std::abs(value->stress.xx - nominal));
      }
  return result;
}

}  // namespace raiser::solver
