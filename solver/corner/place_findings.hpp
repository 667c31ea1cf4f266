#pragma once

#include <complex>
#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "solver/corner/singular_place.hpp"
#include "solver/extract/estimate.hpp"

namespace raiser::solver {

/// One singular field at a place: stress goes as intensity r^(exponent - 1).
struct SingularField {
  std::complex<double> exponent;
  WedgeMode::Symmetry symmetry = WedgeMode::Symmetry::none;
  /// Generalised stress intensity, MPa mm^(1 - Re exponent), as singular_modes()
  /// defines it; the magnitude where the exponent is complex.
  Estimate intensity;
  double phase = 0.0;              ///< rad, of a complex intensity, for r in mm
  std::optional<double> measured;  ///< the exponent from the computed growth of this part of the stress
};

/// A place where no peak stress exists, under all loads together.
struct PlaceFindings {
  SingularPlace::Kind kind = SingularPlace::Kind::corner;
  Point point = Point::Zero();  ///< mm
  double angle = 0.0;           ///< rad, of the material
  mesh::Owner leaves, arrives;  ///< the edges on both sides, anticlockwise the first comes after the place
  std::vector<SingularField> fields;  ///< strongest first; empty for a jump or an orthotropic sheet
  std::optional<double> measured;     ///< the exponent from the computed growth of the whole stress
  std::string what;                   ///< e.g. "sharp re-entrant corner of 270 deg"
  std::string why;                    ///< why there is no peak stress and no Kt
  std::string cure;                   ///< what to do instead
};

/// What solutions of successive degrees on one mesh (the last gives the values,
/// all together the bounds) show at singular places.
std::vector<PlaceFindings> place_findings(const std::vector<SingularPlace>& places,
                                          const std::vector<Field>& fields, const HookeLaw& material);

}  // namespace raiser::solver
