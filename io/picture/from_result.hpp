#pragma once

#include "io/picture/chart.hpp"
#include "io/picture/picture.hpp"
#include "io/write/result.hpp"

namespace raiser::io {

/// The picture of a solved case: von Mises stress under all loads, the hole
/// with the largest peak enlarged. Sampled as finely as the page can show:
/// more where a cell is large on the paper or the stress varies fast in it.
Picture picture_of(const Result& result);

/// Edge stress of hole `hole` against the edge angle, with the nominal
/// stresses. Throws std::out_of_range for a hole that is not there.
Chart edge_chart(const Result& result, std::size_t hole);

/// Stress along ligament `ligament` of the solution: the one normal to the
/// section and von Mises, with the nominal stresses of its hole.
/// Throws std::out_of_range for a ligament that is not there.
Chart ligament_chart(const Result& result, std::size_t ligament);

}  // namespace raiser::io
