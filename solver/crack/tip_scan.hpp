#pragma once

#include <algorithm>
#include <optional>
#include <vector>

#include "solver/crack/tip_probe.hpp"

namespace raiser::solver {

/// K and T of every fan of the mesh in one solution, from each domain.
struct TipScan {
  std::vector<std::vector<TipValues>> values;  ///< [fan][domain]
};

/// Stress intensity at all tips of the plate, mirror images included. Load case
/// 0 is all loads together, 1 + l is load l alone. Holds references to the model.
class TipScanner {
 public:
  TipScanner(const Model& model, const Plate& plate);

  std::size_t tips() const { return places_.size(); }
  std::size_t domains() const;
  TipScan scan(const Displacements& displacements) const;

  /// (K_I, K_II, T) of a tip of the plate, MPa sqrt(mm) and MPa.
  Eigen::Vector3d value(const TipScan& scan, std::size_t load_case, std::size_t tip,
                        std::size_t domain) const;

  /// Energy release rate by the domain J integral over a ring, and by a virtual
  /// extension of the crack; N/mm.
  double j_integral(const Displacements& displacements, std::size_t load_case, std::size_t tip,
                    std::size_t domain) const;
  double virtual_extension(const Displacements& displacements, std::size_t load_case, std::size_t tip) const;

  /// Radius of the triangles at the tip over that of their fan.
  double depth(std::size_t tip) const;

  const NearFields& fields(std::size_t tip) const { return probes_[places_[tip].fan].fields(); }

 private:
  struct Place {
    std::size_t fan = 0;
    std::size_t image = 0;
  };
  const Model* model_;
  std::vector<TipProbe> probes_;
  std::vector<Place> places_;  ///< by tip of the plate
};

/// How far the faces of one crack are apart under all loads together.
struct CrackOpening {
  std::size_t crack = 0;
  double least = 0.0;  ///< mm, at the points looked at; negative where the faces would overlap
  Point where = Point::Zero();
  double largest = 0.0;       ///< mm, largest distance of the faces, of either sign
  double displacement = 0.0;  ///< mm, largest displacement of a corner of the mesh: the scale of rounding

  /// The faces press on each other somewhere: what was solved with free faces
  /// does not hold there.
  bool is_closed() const { return least < -std::max(1e-4 * largest, 1e-9 * displacement); }
};

/// One for each crack of the plate.
std::vector<CrackOpening> crack_openings(const Model& model, const Plate& plate,
                                         const Displacements& displacements);

/// Angle in rad from straight ahead, anticlockwise, at which the hoop stress is
/// largest; nothing when K_I and K_II do not open the crack. F. Erdogan and
/// G. C. Sih, J. Basic Eng. 85 (1963) 519. For isotropic plates.
std::optional<double> kink_angle(double k_one, double k_two);

}  // namespace raiser::solver
