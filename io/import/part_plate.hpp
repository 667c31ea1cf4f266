#pragma once

#include <set>
#include <string>
#include <vector>

#include "io/import/part.hpp"
#include "mesh/plate/plate.hpp"

namespace raiser::io {

/// A name for the edge or raiser nearest to a place of the drawing, in mm.
struct PlaceName {
  std::string name;
  mesh::Point near = mesh::Point::Zero();
};

/// A place that means nothing or two things: which of those given, and why.
struct PlaceFault {
  bool is_edge = true;
  std::size_t index = 0;
  std::string what;
  std::string cure;
};

/// What a part becomes: a plate, or why not.
struct PartPlate {
  std::optional<mesh::Plate> plate;
  std::vector<ContourFault> faults;
  std::vector<PlaceFault> misplaced;
};

/// The plate that a part is. Its outline begins at its lowest corner (the left
/// one of several) and runs anticlockwise. Arcs that cut into the material are
/// notches or fillets (mesh::tell_notches), all other curves edges.
///
/// An edge has the name given for a place near it; several may share one and are
/// then one edge. The others are "edge 1", ... in order, those of a rectangle
/// along x and y right, top, left and bottom. Holes (also by a place in them) and
/// arcs have the names given or "hole 1", "fillet 2", ... in the part's order;
/// names in `taken` are left out. Holes that are no circle, ellipse, slot or
/// rounded rectangle are drawn ones. Faults: sharp corners of holes; places as near
/// to two things, far from all, or with two names for one thing.
PartPlate plate_of(const Part& part, double thickness, const std::vector<PlaceName>& edges,
                   const std::vector<PlaceName>& raisers,
                   const std::set<std::string, std::less<>>& taken = {});

}  // namespace raiser::io
