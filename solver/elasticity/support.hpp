#pragma once

#include <optional>
#include <string>
#include <vector>

#include "mesh/region/breaks.hpp"
#include "mesh/region/region.hpp"

namespace raiser::solver {

using mesh::Owner;
using mesh::Plate;
using mesh::Point;

/// A straight edge of the plate: from `start` anticlockwise round the plate.
struct EdgeLine {
  Point start = Point::Zero();
  Point direction = Point::Zero();  ///< unit vector
  double length = 0.0;              ///< mm, whatever notches cut out of it included

  Point normal() const { return {direction.y(), -direction.x()}; }  ///< outward
  Point at(double distance) const { return start + distance * direction; }
  /// Distance of a place on the edge from its start, mm.
  double distance(const Point& x) const { return (x - start).dot(direction); }
};

/// The line that edge `edge` of mesh::edge_names() lies on; nothing when it is
/// not straight or there is no such edge.
std::optional<EdgeLine> straight_edge(const Plate& plate, std::size_t edge);

/// What holds a straight edge of the plate: its displacement along the outward
/// normal, along the edge (anticlockwise round the plate), or both, in mm. A
/// component without a value is free.
struct Support {
  std::string name;
  std::size_t edge = 0;
  std::optional<double> normal;
  std::optional<double> along;
};

/// A held edge for the finite elements: `normal` is the outward unit normal.
struct HeldEdge {
  Owner owner;
  Point normal = Point::Zero();
  std::optional<double> along_normal;
  std::optional<double> along_edge;
};
/// Throws std::invalid_argument for a support that is not legal.
std::vector<HeldEdge> held_edges(const Plate& plate, const std::vector<Support>& supports);

/// Something that makes a support illegal; `support` is its index.
struct SupportFault {
  std::size_t support = 0;
  std::string what;
  std::string cure;
};
/// Edges that are not there, not straight or held twice, supports that hold
/// nothing, and corners held at two places at once. Empty for legal supports.
std::vector<SupportFault> faults(const Plate& plate, const std::vector<Support>& supports);

/// Orthonormal basis of the resultants that supports can take up, as rows
/// (Fx, Fy, M / size) about the plate's centre. Three rows: any load is held.
std::vector<Eigen::Vector3d> takes_up(const Plate& plate, const std::vector<Support>& supports, double size);

/// Whether the same components are held on the edges that a mirror exchanges.
bool have_mirror(const Plate& plate, const std::vector<Support>& supports, mesh::Mirrors mirror);

/// Whether a support holds an edge at another place than where it is.
bool displaces(const Support& support);

/// The ends of edges held in both components, where stress is singular.
std::vector<Point> clamped_ends(const Plate& plate, const std::vector<Support>& supports);

}  // namespace raiser::solver
