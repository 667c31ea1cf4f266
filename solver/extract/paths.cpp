#include "solver/extract/paths.hpp"

#include <algorithm>
#include <cmath>

#include "mesh/legendre.hpp"
#include "mesh/plate/section.hpp"
#include "solver/adapt/bound.hpp"

namespace raiser::solver {
namespace {

constexpr int ligament_points = 41;

double angle_about(const mesh::Hole& hole, const Point& x) {
  const Point arm = x - hole.centre;
  return std::atan2(arm.y(), arm.x());
}

/// Puts samples in anticlockwise order and measures the way along the edge
/// through them. Holes are star-shaped about their centres.
void order(std::vector<EdgeSample>& samples) {
  std::sort(samples.begin(), samples.end(),
            [](const EdgeSample& a, const EdgeSample& b) { return a.angle < b.angle; });
  for (std::size_t i = 1; i < samples.size(); ++i)
    samples[i].arc_length = samples[i - 1].arc_length + (samples[i].point - samples[i - 1].point).norm();
}

/// The largest bound along one side from the values of successive degrees. At a
/// single point the differences may vanish by accident, most of all beside a
/// jump of curvature, where they fall slowly.
double largest_bound(const std::vector<Eigen::VectorXd>& degrees, double size) {
  double largest = 0.0;
  for (Eigen::Index q = 0; q < degrees.back().size(); ++q) {
    std::vector<double> sequence;
    for (const Eigen::VectorXd& values : degrees) sequence.push_back(values[q]);
    largest = std::max(largest, error_bound(sequence, size));
  }
  return largest;
}

std::string end_name(const Plate& plate, const std::optional<std::size_t>& hole, const char* edge) {
  return hole ? "hole " + plate.holes[*hole].name : std::string(edge);
}

Ligament follow(const Plate& plate, std::size_t hole, const Section& section, const mesh::Interval& piece,
                bool from_begin, const std::vector<Field>& fields) {
  const bool across = section.direction == Section::Direction::across;
  Ligament ligament;
  ligament.hole = hole;
  ligament.from =
      "hole " + plate.holes[hole].name + (across ? ", y " : ", x ") + (from_begin ? ">" : "<") + " centre";
  ligament.to = from_begin ? end_name(plate, piece.hole_at_end, across ? "top edge" : "right edge")
                           : end_name(plate, piece.hole_at_begin, across ? "bottom edge" : "left edge");
  ligament.width = piece.end - piece.begin;
  for (int k = 0; k < ligament_points; ++k) {
    // Denser towards the hole's edge; a hair inside the material at both ends.
    const double share =
        std::clamp(std::pow(static_cast<double>(k) / (ligament_points - 1), 2), 1e-12, 1 - 1e-12);
    const double distance = share * ligament.width;
    const double position = from_begin ? piece.begin + distance : piece.end - distance;
    const Point x = across ? Point(section.station, position) : Point(position, section.station);
    std::vector<std::array<double, 3>> values;
    LigamentPoint point;
    for (const Field& field : fields)
      if (const auto value = field.at(x)) {
        values.push_back({value->stress.xx, value->stress.yy, value->stress.xy});
        point = {value->point, k == 0 ? 0.0 : distance, value->stress, 0.0};
      }
    if (values.empty()) continue;
    const double size = von_mises(point.stress);
    for (int c = 0; c < 3; ++c) {
      std::vector<double> sequence;
      for (const auto& value : values) sequence.push_back(value[c]);
      point.bound = std::max(point.bound, error_bound(sequence, size));
    }
    ligament.points.push_back(point);
  }
  return ligament;
}

}  // namespace

std::vector<std::vector<EdgeSample>> edge_samples(const Model& model, const Plate& plate,
                                                  const EdgeScanner& scanner,
                                                  const std::vector<EdgeScan>& scans) {
  std::vector<std::vector<EdgeSample>> result(plate.holes.size());
  const auto& positions = search_points();
  const EdgeScan& last = scans.back();
  for (std::size_t image = 0; image < model.images().size(); ++image) {
    const Eigen::VectorXd weight = scanner.weights(0, image);
    for (std::size_t side = 0; side < scanner.sides().size(); ++side) {
      const std::size_t hole = scanner.hole_in(side, image);
      std::vector<Eigen::VectorXd> tangential;
      for (const EdgeScan& scan : scans) tangential.push_back(scan.sides[side].tangential * weight);
      const Eigen::VectorXd normal = last.sides[side].normal * weight;
      const Eigen::VectorXd shear = last.sides[side].shear * weight;
      const HoleExtremes& extremes = last.extremes[0][hole];
      const double size = std::max(std::abs(extremes[0].value), std::abs(extremes[1].value));
      const double bound = largest_bound(tangential, size);
      // The side's last point is the next side's first.
      for (std::size_t q = 0; q + 1 < positions.size(); q += 2) {
        EdgeSample sample;
        const mesh::BoundarySide& at = scanner.sides()[side];
        sample.point = model.images()[image].apply(at.curve.at(at.parameter(positions[q])));
        sample.angle = angle_about(plate.holes[hole], sample.point);
        sample.tangential = tangential.back()[q];
        sample.von_mises = von_mises({tangential.back()[q], normal[q], shear[q],
                                      model.material().through_thickness(tangential.back()[q], normal[q])});
        sample.bound = bound;
        result[hole].push_back(sample);
      }
    }
  }
  for (auto& samples : result) order(samples);
  return result;
}

std::vector<Ligament> ligaments(const Plate& plate, const std::vector<Section>& sections,
                                const std::vector<Field>& fields) {
  std::vector<Ligament> result;
  for (std::size_t hole = 0; hole < sections.size(); ++hole)
    for (const mesh::Interval& piece :
         mesh::material_along(plate, sections[hole].direction, sections[hole].station)) {
      if (piece.hole_at_begin == hole)
        result.push_back(follow(plate, hole, sections[hole], piece, true, fields));
      if (piece.hole_at_end == hole)
        result.push_back(follow(plate, hole, sections[hole], piece, false, fields));
    }
  return result;
}

FarStress far_stress(const Plate& plate, const Field& field, double station, double nominal_mean,
                     double nominal_bending) {
  constexpr int panels = 16;
  static const mesh::GaussRule rule = mesh::gauss_legendre(4);
  FarStress result;
  for (int panel = 0; panel < panels; ++panel)
    for (std::size_t q = 0; q < rule.points.size(); ++q) {
      const double share = (panel + (1 + rule.points[q]) / 2) / panels;
      const double y = plate.width * (share - 0.5);
      const auto value = field.at({station, y});
      if (!value) continue;
      result.mean += rule.weights[q] / 2 / panels * value->stress.xx;
      const double nominal = nominal_mean + nominal_bending * 2 * y / plate.width;
      result.scatter = std::max(result.scatter, std::abs(value->stress.xx - nominal));
    }
  return result;
}

}  // namespace raiser::solver
