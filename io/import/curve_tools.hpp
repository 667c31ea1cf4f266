#pragma once

#include <vector>

#include "mesh/region/region.hpp"

namespace raiser::io {

/// Ends of a curve in its own direction.
mesh::Point start(const mesh::Curve& curve);
mesh::Point finish(const mesh::Curve& curve);

/// mm, to rounding for lines and circular arcs and to 1e-12 or so for elliptic ones.
double length(const mesh::Curve& curve);
/// Of all curves of a chain together, mm.
double length(const mesh::Loop& loop);

/// The same curve run the other way.
mesh::Curve reversed(mesh::Curve curve);

/// Whether it is an arc of a circle, within 1e-9 of its radius.
bool is_circular(const mesh::Curve& curve);

/// The curve moved, turned and scaled as a whole so that it runs from one point
/// to the other. Not for closed curves.
mesh::Curve between(mesh::Curve curve, const mesh::Point& from, const mesh::Point& to);

/// Area to the left of a closed chain of curves: negative when it runs clockwise.
double area(const mesh::Loop& loop);

/// Points along a loop, so that no chord turns by more than 3 degrees; the last
/// is not the first again.
std::vector<mesh::Point> flattened(const mesh::Loop& loop);

/// Whether a point lies inside a polygon; either on its edge.
bool is_inside(const mesh::Point& x, const std::vector<mesh::Point>& polygon);

}  // namespace raiser::io
