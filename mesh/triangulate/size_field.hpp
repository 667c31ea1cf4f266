#pragma once

#include <vector>

#include "mesh/triangulate/size_rule.hpp"

namespace raiser::mesh {

/// Wanted triangle size anywhere in the plate: the smallest, over all boundary
/// pieces, of the piece's length plus growth times the distance to it.
class SizeField {
 public:
  SizeField(const Division& division, double growth, double crack_growth);
  double at(const Point& x);

 private:
  struct Source {
    Point middle;
    double length;
    double growth;
  };
  double size_from(const Source& source, const Point& x) const;
  const std::vector<int>& relevant(std::size_t cell);

  double growth_;  ///< the largest
  std::vector<Source> sources_;
  Point origin_;
  double cell_size_ = 1.0;
  std::size_t columns_ = 1;
  std::vector<std::vector<int>> cells_;  ///< sources that can be smallest in a cell; filled when asked
};

}  // namespace raiser::mesh
