#pragma once

#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "validation/compare.hpp"
#include "validation/exact/exact.hpp"
#include "validation/published.hpp"

namespace raiser::validation {

/// One hole, notch or fillet under one load or combination: what a published
/// solution is looked up for.
struct Situation {
  const mesh::Plate& plate;
  std::size_t hole = 0;  ///< index into mesh::raisers(plate)
  const solver::RaiserFindings& found;
  std::string load;
  RemoteStress remote;    ///< MPa, in plate axes
  double bending = 0.0;   ///< MPa, outer fibre
  double pressure = 0.0;  ///< MPa, on this hole

  const mesh::Hole& shape() const { return plate.holes[hole]; }  ///< of a hole only
  bool uniaxial() const;                                         ///< nothing but tension along or across
  bool uniform() const;                                          ///< a uniform remote stress, nothing else
};

/// The plate seen as a strip under tension along x or along y.
struct Strip {
  bool along_x = true;
  double stress = 0.0;                         ///< MPa, gross
  double width = 0.0;                          ///< mm
  double near = 0.0;                           ///< mm, from the hole's centre to the nearer long edge
  double far = 0.0;                            ///< mm, to the other one
  double half_across = 0.0, half_along = 0.0;  ///< mm, half sizes of the hole
  double end = 0.0;                            ///< mm, from the hole's edge to the nearer end

  bool central() const { return far - near <= 1e-6 * width; }
};

/// The strip of a uniaxial situation.
Strip strip(const Situation& situation);

/// Strip with the loaded ends x = const: for tension along x and for bending.
Strip lengthwise(const Situation& situation, double stress);

/// Something about the plate that the solution does not know of, with its
/// expected relative effect on the stress.
struct Effect {
  std::string what;
  double size = 0.0;
};

/// How much the plate's edges disturb a solution for an infinite plate. The
/// factor is that of a central circle, effect = factor (size / W)^2: common
/// practice, fitted to 1.3 for tension, 2.6 for pressure, 4 for shear.
Effect edges(const Situation& situation, double factor);
Effect edges(const Situation& situation);  ///< with the factor of its loads

/// How much the other holes disturb a solution for a single hole: at most 2.6
/// (radius / distance)^2 each, as two equal holes far apart show (Ling 1948).
/// `partner` is a hole that the solution knows of.
Effect neighbours(const Situation& situation, std::size_t partner = mesh::PlateFault::none);

/// A solution for a long strip needs its uniform end stress far from the hole:
/// three quarters of the width from the hole's edge (the slowest self-balanced
/// disturbance fades as exp(-4.2 x/W): J. Fadle, Ing.-Archiv 11 (1940), from
/// memory). `end` is the distance to the nearer loaded end, `what` the raiser,
/// `needed` the widths that the source wants between them.
Effect ends(double end, double width, std::string_view what, double needed = 0.75);
Effect ends(const Strip& strip);

/// How much holes, notches and fillets other than `own` disturb a solution for a
/// raiser at `place`: as neighbours() has it, with a notch's depth for the radius.
Effect other_raisers(const mesh::Plate& plate, const Point& place, const std::vector<std::size_t>& own);

/// Our peak in a published definition, and everything said about the match.
/// `nominal` in MPa is what the published factor multiplies.
Comparison row(const Situation& situation, Reference reference, std::string quantity, double factor,
               double nominal, const std::vector<Parameter>& parameters, const std::vector<Effect>& effects);

/// What a source says of a number of ours and how far that holds; place and load
/// are left to the caller.
Comparison beside(Reference reference, std::string quantity, double factor, const solver::Estimate& ours,
                  const std::vector<Parameter>& parameters, const std::vector<Effect>& effects);

}  // namespace raiser::validation
