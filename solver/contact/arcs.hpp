#pragma once

#include <Eigen/Core>
#include <numbers>
#include <vector>

#include "solver/contact/pin_system.hpp"
#include "solver/elasticity/bearing.hpp"

namespace raiser::solver {

/// An arc on which a pin is thought to touch its hole, anticlockwise.
struct Arc {
  enum class Form {
    whole,  ///< on its own; where a mirror line is used, its image touches as well
    even,   ///< its own image in the mirror line
    ring    ///< all round
  };
  std::size_t pin = 0;
  Form form = Form::whole;
  double begin = 0.0;  ///< rad
  double end = 0.0;
  double half() const { return 0.5 * (end - begin); }
  double middle() const { return 0.5 * (end + begin); }
};

/// The search for the arcs on which pins touch, with or without a mirror line
/// through the centres of all holes with pins.
///
/// The pressure over an arc with ends that are not where the contact ends is
/// N(s) / sqrt(1 - s^2), s from -1 to 1 along it. The ends are moved until N
/// vanishes there, by Broyden's method (C. G. Broyden, Math. Comp. 19 (1965)
/// 577-593): on the first step an end is too long by d where the pressure
/// beside it is q sqrt(x) - (q d / 2) / sqrt(x).
class ArcSearch {
 public:
  ArcSearch(mesh::Mirrors mirrors, const std::vector<Pin>& pins) : mirrors_(mirrors), pins_(&pins) {}

  /// The arcs that a unilateral start shows; of two that are images of each
  /// other the one in the meshed half. A pin that touches nowhere has none.
  std::vector<Arc> shown(const PinSystem::Start& start) const;

  /// Moves the ends of the arcs, joins those that meet and opens rings under
  /// tension. Returns the last move over the half size of its arc.
  double move_ends(const PinSystem& system, int terms, std::vector<Arc>& arcs, double enough,
                   int most_passes);

  /// The pressures on given arcs, vanishing at their ends.
  PinSystem::Answer pressures(const PinSystem& system, int terms, const std::vector<Arc>& arcs) const;

  /// The pressure on an arc from its terms in such an answer.
  BearingPressure pressure(const Arc& arc, const Eigen::VectorXd& terms) const;

  /// The image in the mirror line.
  Arc image(const Arc& arc) const;
  BearingPressure image(const BearingPressure& pressure, std::size_t pin) const;
  /// Whether the arc's image touches as well and is another one.
  bool has_image(const Arc& arc) const { return is_mirrored() && arc.form == Arc::Form::whole; }
  /// All arcs of a pin with their images, in rising order.
  std::vector<Arc> of_pin(const std::vector<Arc>& arcs, std::size_t pin) const;

 private:
  bool is_mirrored() const { return mirrors_.x || mirrors_.y; }
  bool is_meshed(double angle) const;
  double axis(std::size_t pin) const;
  std::vector<Arc> represented(const std::vector<Arc>& all) const;
  std::vector<Patch> patches(const std::vector<Arc>& arcs, int terms, bool singular) const;
  Arc ring(std::size_t pin) const;
  double reach(const std::vector<Arc>& arcs, const Arc& arc) const;
  bool join(std::vector<Arc>& arcs) const;
  bool open(std::vector<Arc>& arcs, const PinSystem::Answer& answer) const;
  double step(std::vector<Arc>& arcs, const Eigen::VectorXd& change) const;

  mesh::Mirrors mirrors_;
  const std::vector<Pin>* pins_;
  Eigen::MatrixXd slope_;  ///< Broyden's, of what is left at the ends by their moves outwards
};

}  // namespace raiser::solver
