#pragma once

#include "mesh/mesh.hpp"
#include "mesh/triangulate/size_rule.hpp"

namespace raiser::mesh {

/// Triangulates a region with Gmsh: sides on the boundary as the size rule
/// divides it, triangle sizes growing from there, curved sides exact. Divides
/// further where a curved triangle would be inverted.
///
/// Gmsh keeps global state: one call at a time in a process; it is started at
/// the first call. Throws std::runtime_error with Gmsh's own message when it
/// fails, or when triangles stay inverted.
Mesh triangulate(const Region& region, const SizeRule& rule);

}  // namespace raiser::mesh
