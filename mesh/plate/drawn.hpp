#pragma once

#include "mesh/plate/plate.hpp"

namespace raiser::mesh {

/// By how much a curve turns to the left, rad; 0 for a line.
double turning(const Curve& curve);

/// Tells the notches of a drawn chain from its fillets, where each raiser owns
/// one arc that bulges into the material. A notch cuts into one straight edge
/// (the lines on both sides of it and of its flanks are parts of one line), turns
/// by more than 120 degrees, or meets a neighbour at a corner; every other arc
/// rounds a corner and is a fillet.
void tell_notches(Outline& outline);

/// Completes a drawn chain whose raisers have kinds and names: raisers that end
/// in a sharp re-entrant corner have no peak and become edges; the sections of
/// the others are placed (of a fillet, the net one where the section across is
/// the smaller), and `body` closes the mouths of notches in straight edges.
/// `length` and `width` are those of its bounding box about the origin, mm.
void place_raisers(Outline& outline, double length, double width);

/// The hole that a closed clockwise chain of curves is, wherever it lies.
Hole drawn_hole(Loop edge);

/// The corners of a hole's clockwise edge where the material is re-entrant by
/// more than a drawing's rounding: the stress has no finite peak there.
std::vector<Point> sharp_corners(const Loop& edge);

}  // namespace raiser::mesh
