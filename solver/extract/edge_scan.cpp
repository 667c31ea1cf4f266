#include "solver/extract/edge_scan.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <map>
#include <numeric>
#include <stdexcept>

#include "mesh/region/vertex.hpp"

namespace raiser::solver {
namespace {

/// Value at s of the polynomial through `values` at search_points().
/// Source: barycentric formula, J.-P. Berrut and L. N. Trefethen, SIAM Review
/// 46 (2004) 501-517.
double interpolate(const Eigen::VectorXd& values, double s) {
  double above = 0.0;
  double below = 0.0;
  const int samples = static_cast<int>(search_points().size());
  for (int j = 0; j < samples; ++j) {
    const double distance = s - search_points()[j];
    if (distance == 0.0) return values[j];
    const double weight = (j % 2 == 0 ? 1.0 : -1.0) * (j == 0 || j == samples - 1 ? 0.5 : 1.0) / distance;
    above += weight * values[j];
    below += weight;
  }
  return above / below;
}

/// Position of the largest value of the interpolant near its largest sample.
double maximise(const Eigen::VectorXd& values) {
  Eigen::Index best = 0;
  values.maxCoeff(&best);
  const auto& s = search_points();
  double low = s[std::max<Eigen::Index>(best - 1, 0)];
  double high = s[std::min<Eigen::Index>(best + 1, static_cast<Eigen::Index>(s.size()) - 1)];
  const double golden = (std::sqrt(5.0) - 1) / 2;
  double a = high - golden * (high - low);
  double b = low + golden * (high - low);
  double fa = interpolate(values, a);
  double fb = interpolate(values, b);
  while (high - low > 1e-7) {
    if (fa > fb) {
      high = b;
      b = a;
      fb = fa;
      a = high - golden * (high - low);
      fa = interpolate(values, a);
    } else {
      low = a;
      a = b;
      fa = fb;
      b = low + golden * (high - low);
      fb = interpolate(values, b);
    }
  }
  const double middle = (low + high) / 2;
  return interpolate(values, middle) > values[best] ? middle : s[best];
}

/// The quantity under weighted loads at every point of a side, such that the
/// wanted extreme is the largest.
Eigen::VectorXd wanted(const SideStress& stress, const Eigen::VectorXd& weight, Quantity quantity,
                       const HookeLaw& material) {
  Eigen::VectorXd tangential = stress.tangential * weight;
  if (quantity == Quantity::largest_edge_stress) return tangential;
  if (quantity == Quantity::smallest_edge_stress) return -tangential;
  const Eigen::VectorXd normal = stress.normal * weight;
  const Eigen::VectorXd shear = stress.shear * weight;
  for (Eigen::Index i = 0; i < tangential.size(); ++i)
    tangential[i] =
        von_mises({tangential[i], normal[i], shear[i], material.through_thickness(tangential[i], normal[i])});
  return tangential;
}

/// Whether the side is boundary of the plate that is not held, and no load acts at
/// the place `t` of its curve.
bool is_free(const Model& model, const mesh::BoundarySide& side, double t) {
  const mesh::Curve& curve = side.curve;
  if (curve.owner.kind != Owner::Kind::edge && curve.owner.kind != Owner::Kind::raiser) return false;
  for (const HeldEdge& held : model.held())
    if (held.owner == curve.owner) return false;
  const Point along = (curve.end > curve.begin ? 1.0 : -1.0) * curve.derivative(t).normalized();
  const Point normal(along.y(), -along.x());
  return std::all_of(model.loads().begin(), model.loads().end(), [&](const UnitLoad& load) {
    return load.traction(curve.owner, curve.at(t), normal).isZero(0.0);
  });
}

std::vector<std::size_t> image_of(const Plate& plate, mesh::Mirrors mirror) {
  if (auto image = mesh::mirror_image(plate, mirror)) return std::move(image->raisers);
  throw std::invalid_argument("EdgeScanner: the plate does not have the mirror lines of the mesh");
}

}  // namespace

std::optional<std::size_t> doubt_in(const Model& model) {
  for (std::size_t l = 0; l < model.loads().size(); ++l)
    if (model.loads()[l].doubt) return l;
  return std::nullopt;
}

EdgeScanner::EdgeScanner(const Model& model, const Plate& plate)
    : model_(&model), raisers_(mesh::raiser_count(plate)) {
  for (const mesh::BoundarySide& side : model.mesh().boundary())
    if (side.curve.owner.kind == Owner::Kind::raiser) sides_.push_back(side);
  for (const Image& image : model.images()) {
    std::vector<std::size_t> map(raisers_);
    std::iota(map.begin(), map.end(), std::size_t{0});
    if (image.mirror() != mesh::Mirrors{}) map = image_of(plate, image.mirror());
    raiser_of_.push_back(std::move(map));
  }
  free_ends_ = free_ends();
  is_searched_.assign(sides_.size(), true);
  for (const FreeEnd& end : free_ends_) is_searched_[end.side] = false;
}

std::vector<EdgeScanner::FreeEnd> EdgeScanner::free_ends() const {
  const mesh::Mesh& mesh = model_->mesh();
  std::map<int, const mesh::BoundarySide*> begins;  // by corner of the mesh
  for (const mesh::BoundarySide& side : mesh.boundary())
    begins[mesh.triangles()[side.triangle][side.side]] = &side;
  std::map<int, std::size_t> own;  // raisers' sides by the corner where they begin
  for (std::size_t i = 0; i < sides_.size(); ++i)
    own[mesh.triangles()[sides_[i].triangle][sides_[i].side]] = i;
  std::vector<FreeEnd> result;
  for (const auto& [begin, before] : begins) {
    const int corner = mesh.triangles()[before->triangle][(before->side + 1) % 3];
    const auto found = begins.find(corner);
    if (found == begins.end()) continue;
    const mesh::BoundarySide& after = *found->second;
    if (!mesh::is_blunt(mesh::angle_between(before->curve, after.curve)) ||
        !is_free(*model_, *before, before->curve.end) || !is_free(*model_, after, after.curve.begin))
      continue;
    if (const auto side = own.find(begin); side != own.end()) result.push_back({side->second, 1.0});
    if (const auto side = own.find(corner); side != own.end()) result.push_back({side->second, -1.0});
  }
  return result;
}

std::size_t EdgeScanner::raiser_in(std::size_t side, std::size_t image) const {
  return raiser_of_[image][sides_[side].curve.owner.index];
}

Eigen::VectorXd EdgeScanner::weights(std::size_t load_case, std::size_t image) const {
  return model_->factors(load_case, model_->images()[image]);
}

bool EdgeScanner::has_doubt(std::size_t load_case) const {
  const auto doubt = doubt_in(*model_);
  if (!doubt || load_case == 0) return doubt.has_value();
  const std::vector<std::size_t>& in_doubt = model_->loads()[*doubt].loads;
  const std::vector<std::size_t>& own = model_->loads()[load_case - 1].loads;
  return load_case != *doubt + 1 &&
         std::find_first_of(own.begin(), own.end(), in_doubt.begin(), in_doubt.end()) != own.end();
}

/// The search for one quantity in one case over all raisers.
struct EdgeScanner::Search {
  const EdgeScanner& scanner;
  const Displacements& displacements;
  const EdgeScan& scan;
  std::size_t load_case;
  bool doubted;  ///< with the model's doubt added
  Quantity quantity;

  Eigen::VectorXd weights(std::size_t image) const {
    Eigen::VectorXd result = scanner.weights(load_case, image);
    if (doubted) result += scanner.weights(*doubt_in(*scanner.model_) + 1, image);
    return result;
  }

  struct Best {
    double value = -std::numeric_limits<double>::infinity();
    double least = std::numeric_limits<double>::infinity();
    double s = 0.0;
    std::size_t side = 0;
    std::size_t image = 0;
    bool is_free_end = false;
  };

  template <class Visit>
  void each(Visit visit) const {
    for (std::size_t image = 0; image < scanner.model_->images().size(); ++image) {
      const Eigen::VectorXd weight = weights(image);
      for (std::size_t side = 0; side < scanner.sides_.size(); ++side)
        if (scanner.is_searched_[side])
          visit(side, image, wanted(scan.sides[side], weight, quantity, scanner.model_->material()));
    }
  }

  std::vector<Best> between_nodes() const {
    std::vector<Best> sampled(scanner.raisers_);
    each([&](std::size_t side, std::size_t image, const Eigen::VectorXd& values) {
      Best& best = sampled[scanner.raiser_in(side, image)];
      best.value = std::max(best.value, values.maxCoeff());
      best.least = std::min(best.least, values.minCoeff());
    });
    std::vector<Best> result(scanner.raisers_);
    each([&](std::size_t side, std::size_t image, const Eigen::VectorXd& values) {
      const std::size_t raiser = scanner.raiser_in(side, image);
      const double margin = 0.05 * (sampled[raiser].value - sampled[raiser].least);
      if (values.maxCoeff() < sampled[raiser].value - margin) return;
      const double s = maximise(values);
      const double value = interpolate(values, s);
      if (value > result[raiser].value) result[raiser] = {value, 0.0, s, side, image};
    });
    for (std::size_t image = 0; image < scanner.model_->images().size(); ++image)
      for (const FreeEnd& end : scanner.free_ends_)
        if (Best& best = result[scanner.raiser_in(end.side, image)]; best.value < 0.0)
          best = {0.0, 0.0, end.s, end.side, image, true};
    return result;
  }

  Extreme from_solution(const Best& best) const {
    const mesh::BoundarySide& side = scanner.sides_[best.side];
    if (best.is_free_end)
      return {0.0, scanner.model_->images()[best.image].apply(side.curve.at(side.parameter(best.s))), 0.0};
    const EdgeProbe probe(*scanner.model_, displacements.degree, {&best.s, 1});
    const SideStress stress = probe.at(side, displacements);
    const Eigen::VectorXd weight = weights(best.image);
    Extreme result;
    result.value = wanted(stress, weight, quantity, scanner.model_->material())[0];
    if (quantity == Quantity::smallest_edge_stress) result.value = -result.value;
    result.point = scanner.model_->images()[best.image].apply(side.curve.at(side.parameter(best.s)));
    result.traction_miss = std::hypot(((stress.raw_normal - stress.normal) * weight)[0],
                                      ((stress.raw_shear - stress.shear) * weight)[0]);
    const double length = (side.curve.finish() - side.curve.start()).norm();
    result.rounding = std::numeric_limits<double>::epsilon() * displacements.degree * displacements.degree *
                      scanner.model_->material().youngs_modulus * scan.displacement.dot(weight.cwiseAbs()) /
                      length;
    return result;
  }
};

std::vector<RaiserExtremes> EdgeScanner::extremes(const Displacements& displacements, const EdgeScan& scan,
                                                  std::size_t load_case, bool doubted) const {
  std::vector<RaiserExtremes> result(raisers_);
  for (std::size_t k = 0; k < quantity_count; ++k) {
    const Search search{*this, displacements, scan, load_case, doubted, static_cast<Quantity>(k)};
    const auto best = search.between_nodes();
    for (std::size_t h = 0; h < raisers_; ++h) result[h][k] = search.from_solution(best[h]);
  }
  return result;
}

EdgeScan EdgeScanner::scan(const Displacements& displacements) const {
  EdgeScan result;
  const EdgeProbe probe(*model_, displacements.degree, search_points(),
                        sides_at_search_points(displacements.degree));
  for (const mesh::BoundarySide& side : sides_) result.sides.push_back(probe.at(side, displacements));
  const auto corners = static_cast<Eigen::Index>(model_->mesh().points().size());
  result.displacement = displacements.values.topRows(2 * corners).cwiseAbs().colwise().maxCoeff();
  // With one load, the load alone is all loads together.
  const auto doubt = doubt_in(*model_);
  const bool is_alone = model_->loads().size() == (doubt ? 2 : 1);
  for (std::size_t c = 0; c <= model_->loads().size(); ++c) {
    const bool repeats = c > 0 && is_alone && !(doubt && c == *doubt + 1);
    const bool has_values = c == 0 || !(doubt && c == *doubt + 1);
    result.extremes.push_back(!has_values ? std::vector<RaiserExtremes>{}
                              : repeats   ? result.extremes.front()
                                          : extremes(displacements, result, c, false));
    result.doubted.push_back(!has_doubt(c) ? std::vector<RaiserExtremes>{}
                             : repeats     ? result.doubted.front()
                                           : extremes(displacements, result, c, true));
  }
  return result;
}

}  // namespace raiser::solver
