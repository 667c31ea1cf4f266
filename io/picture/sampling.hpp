#pragma once

#include <functional>
#include <span>
#include <vector>

#include "io/picture/picture.hpp"

namespace raiser::io {

/// A stress field in curved triangles: `sample` fills a cell's points and
/// values at reference points.
struct CellSource {
  std::size_t cells = 0;
  std::function<void(std::size_t cell, std::span<const Point> reference, PictureCell& out)> sample;
};

/// The cells of `picture` (which needs plate and focus, for the scale) from
/// the source, each on a lattice of 1 to 32 subdivisions (a power of two) as
/// its size on the paper and the number of bands that it crosses ask for.
std::vector<PictureCell> sampled(const CellSource& source, const Picture& picture);

}  // namespace raiser::io
