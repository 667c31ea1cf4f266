#include "mesh/plate/words.hpp"

namespace raiser::mesh {

std::string edge_phrase(const std::string& name) {
  return name.find("edge") != std::string::npos ? name : name + " edge";
}

}  // namespace raiser::mesh
