#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "mesh/plate/crack.hpp"
#include "mesh/plate/outline.hpp"

namespace raiser::mesh {

enum class HoleShape { circle, ellipse, slot, rounded_rectangle, drawn };

/// One hole. `length` and `width` are its full sizes along its own first and
/// second axis in mm: both the diameter for a circle, the two axes of an
/// ellipse, overall length and width of a slot (round ends of radius width/2
/// at the ends of the first axis), the sides of a rounded rectangle, those of the
/// bounding box of a drawn one.
struct Hole {
  std::string name;
  HoleShape shape = HoleShape::circle;
  double length = 0.0;
  double width = 0.0;
  double corner_radius = 0.0;  ///< mm; of a drawn hole the smallest radius of curvature; 0 of others
  Point centre = Point::Zero();
  double angle = 0.0;  ///< rad, from the plate's x axis to the hole's first axis; 0 of a drawn hole
  /// Of a drawn hole alone: its edge, clockwise and without crossing itself, about
  /// the middle of its bounding box.
  Loop edge = {};
};

/// A plate of one thickness with holes and cracks: a rectangle, or what `outline`
/// says. Lengths in mm.
struct Plate {
  double length = 0.0;  ///< of the bounding box, along x
  double width = 0.0;   ///< of the bounding box, along y
  double thickness = 0.0;
  std::vector<Hole> holes;
  /// The outline, its bounding box centred at the origin; none for the rectangle.
  std::optional<Outline> outline = std::nullopt;
  std::vector<Crack> cracks = {};
};

/// The plate's outline, also where it is the rectangle.
Outline outline_of(const Plate& plate);

/// The names of the plate's edges, which Owner::index of kind edge counts:
/// right, top, left and bottom for the rectangle.
std::vector<std::string> edge_names(const Plate& plate);

/// Everything on the plate whose edge is searched for peaks, which Owner::index
/// of kind raiser counts: the holes first, then what its outline has.
std::vector<Raiser> raisers(const Plate& plate);
std::size_t raiser_count(const Plate& plate);
/// One of them. Throws std::out_of_range when there is none of that index.
Raiser raiser(const Plate& plate, std::size_t index);

/// The word used for a shape in case files, tables and messages.
std::string_view word(HoleShape shape);

/// Something that makes a plate illegal. `hole` and `other` are indices into
/// Plate::holes, `crack` one into Plate::cracks, or `none`.
struct PlateFault {
  static constexpr std::size_t none = static_cast<std::size_t>(-1);
  std::size_t hole = none;
  std::size_t other = none;
  std::string what;          ///< what is wrong, with the figures
  std::string cure;          ///< what to do about it
  std::size_t crack = none;  ///< index into Plate::cracks
};

/// Every reason why the plate cannot be analysed: sizes that are not positive
/// or not finite, a hole outside, touching or crossing the outline, holes that
/// overlap, touch or lie inside one another, ligaments, corners and roots too
/// small beside the rest to resolve, a plate longer than 2,000 times its width,
/// a crack that leaves the plate, meets a hole, another crack or itself, or
/// whose mouth lies on no edge.
/// Empty for a legal plate.
std::vector<PlateFault> faults(const Plate& plate);

}  // namespace raiser::mesh
