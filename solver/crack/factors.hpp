#pragma once

#include <Eigen/Core>
#include <optional>
#include <string>
#include <vector>

#include "solver/solution.hpp"

namespace raiser::solver {

/// The customary size a of a crack in mm: its length, or half of it when both
/// its ends are tips.
double crack_size(const mesh::Crack& crack);

/// The largest bound that meets what is asked at a tip, in the unit of the
/// quantity (see Ask). `k` holds (K_I, K_II, T) of every tip under all loads.
double allowed_at_tip(const std::vector<mesh::Crack>& cracks, const std::vector<Eigen::Vector3d>& k,
                      const Ask& ask);

/// K without dimension, Y = K / (S sqrt(pi a)). Empty where S is zero; `why`
/// then says so.
struct CrackFactors {
  double size = 0.0;  ///< a, mm
  std::string size_definition;
  double nominal = 0.0;    ///< S, MPa: the magnitude of the gross nominal stress at the crack
  std::string definition;  ///< of S
  std::optional<Estimate> mode_one;
  std::optional<Estimate> mode_two;
  std::string why;
};

/// The factors of one tip under `loads`, which `found` belongs to. S is the
/// gross nominal stress of a raiser at the crack's mouth, or at the middle
/// between its ends; where the loads leave that at zero, the pressure on its faces.
CrackFactors crack_factors(const Plate& plate, const std::vector<Load>& loads, const TipFindings& found);

}  // namespace raiser::solver
