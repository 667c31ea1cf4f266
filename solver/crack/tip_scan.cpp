#include "solver/crack/tip_scan.hpp"

#include <cmath>

#include "mesh/region/region.hpp"

namespace raiser::solver {

TipScanner::TipScanner(const Model& model, const Plate& plate)
    : model_(&model), places_(mesh::tips(plate.cracks).size()) {
  std::vector<bool> found(places_.size(), false);
  for (std::size_t f = 0; f < model.mesh().fans().size(); ++f) {
    probes_.emplace_back(model, f);
    const std::size_t own = model.mesh().fans()[f].tip;
    for (std::size_t i = 0; i < model.images().size(); ++i) {
      const mesh::Mirrors mirror = model.images()[i].mirror();
      const std::size_t tip = mirror.x || mirror.y ? mesh::mirror_image_of_tip(plate, own, mirror) : own;
      if (!found[tip]) places_[tip] = {f, i};
      found[tip] = true;
    }
  }
}

std::size_t TipScanner::domains() const { return probes_.empty() ? 0 : probes_.front().domains(); }

double TipScanner::depth(std::size_t tip) const {
  const std::vector<double>& radii = probes_[places_[tip].fan].fan().radii;
  return radii.back() / radii.front();
}

TipScan TipScanner::scan(const Displacements& displacements) const {
  TipScan result;
  for (const TipProbe& probe : probes_) {
    result.values.emplace_back();
    for (std::size_t d = 0; d < probe.domains(); ++d)
      result.values.back().push_back(probe.values(displacements, d));
  }
  return result;
}

Eigen::Vector3d TipScanner::value(const TipScan& scan, std::size_t load_case, std::size_t tip,
                                  std::size_t domain) const {
  const auto [fan, image] = places_[tip];
  Eigen::Vector3d k = scan.values[fan][domain] * model_->factors(load_case, model_->images()[image]);
  if (model_->images()[image].flips()) k[1] = -k[1];
  return k;
}

double TipScanner::j_integral(const Displacements& displacements, std::size_t load_case, std::size_t tip,
                              std::size_t domain) const {
  const auto [fan, image] = places_[tip];
  return probes_[fan].j_integral(displacements, model_->factors(load_case, model_->images()[image]), domain);
}

double TipScanner::virtual_extension(const Displacements& displacements, std::size_t load_case,
                                     std::size_t tip) const {
  const auto [fan, image] = places_[tip];
  return probes_[fan].virtual_extension(displacements, model_->factors(load_case, model_->images()[image]));
}

std::optional<double> kink_angle(double k_one, double k_two) {
  if (!(k_one > 0.0)) return std::nullopt;
  if (k_two == 0.0) return 0.0;
  // 2 atan((K_I - sqrt(K_I^2 + 8 K_II^2)) / (4 K_II)) without cancellation
  return 2 * std::atan(-2 * k_two / (k_one + std::hypot(k_one, std::sqrt(8.0) * k_two)));
}

}  // namespace raiser::solver
