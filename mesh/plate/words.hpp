#pragma once

#include <string>

namespace raiser::mesh {

/// An edge by its name in a sentence: "top edge", but "edge 3" as it is.
std::string edge_phrase(const std::string& name);

}  // namespace raiser::mesh
