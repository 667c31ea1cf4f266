#pragma once

#include <string>
#include <vector>

#include "io/import/part.hpp"
#include "mesh/plate/plate.hpp"

namespace raiser::io {

/// A name for the edge or hole nearest to a place of the drawing, in mm.
struct PlaceName {
  std::string name;
  mesh::Point near = mesh::Point::Zero();
};

/// What a part becomes: a plate, or why not.
struct PartPlate {
  std::optional<mesh::Plate> plate;
  std::vector<ContourFault> faults;
};

/// The plate that a part is. Its outline begins at its lowest corner (the left
/// one of several) and runs anticlockwise; edges have the names given or "edge 1",
/// ... in that order, holes the names given or "hole 1", ... in the part's order.
/// A rectangle along x and y without named edges is one with the edges right, top,
/// left and bottom. Arcs that cut into the material are fillets, or notches where
/// they turn by more than 120 degrees. Faults: holes that are no circle, ellipse,
/// slot or rounded rectangle; two names for one edge or hole.
PartPlate plate_of(const Part& part, double thickness, const std::vector<PlaceName>& edges,
                   const std::vector<PlaceName>& holes);

}  // namespace raiser::io
