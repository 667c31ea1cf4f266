#include "io/picture/sampling.hpp"

#include <algorithm>
#include <cmath>

#include "io/picture/layout.hpp"
#include "io/picture/levels.hpp"

namespace raiser::io {
namespace {

constexpr int coarse = 4;
constexpr int finest = 32;

PictureCell sample(const CellSource& source, std::size_t cell, int subdivisions) {
  PictureCell result;
  result.subdivisions = subdivisions;
  source.sample(cell, lattice(subdivisions), result);
  return result;
}

// The largest scale at which the page shows any of the cell.
double scale_of(const PictureCell& cell, const Layout& page) {
  if (!page.detail) return page.whole.scale;
  Point low = cell.points.front(), high = low;
  for (const Point& p : cell.points) low = low.cwiseMin(p), high = high.cwiseMax(p);
  const double half = page.detail->box.width / 2 / page.detail->scale;
  const Point& centre = page.detail->centre;
  const bool shown = ((low - centre).array() < half).all() && ((high - centre).array() > -half).all();
  return shown ? page.detail->scale : page.whole.scale;
}

int subdivisions(const PictureCell& cell, const Layout& page, const std::vector<double>& limits) {
  Point low = cell.points.front(), high = low;
  double least = 1.0, most = 0.0;
  for (std::size_t i = 0; i < cell.points.size(); ++i) {
    low = low.cwiseMin(cell.points[i]);
    high = high.cwiseMax(cell.points[i]);
    const double place = position_on_bar(limits, cell.values[i]);
    least = std::min(least, place);
    most = std::max(most, place);
  }
  const double size = scale_of(cell, page) * (high - low).maxCoeff();
  const double bands = (most - least) * static_cast<double>(limits.size() - 1);
  const double wanted = std::min(std::max(size / 12, 4 * bands), size / 2.5);
  int n = 1;
  while (n < finest && n < wanted) n *= 2;
  return n;
}

}  // namespace

std::vector<PictureCell> sampled(const CellSource& source, const Picture& picture) {
  Picture rough = picture;
  rough.cells.clear();
  for (std::size_t i = 0; i < source.cells; ++i) rough.cells.push_back(sample(source, i, coarse));
  const Layout page = lay_out(picture);
  const std::vector<double> limits = limits_of(rough);
  std::vector<PictureCell> cells = std::move(rough.cells);
  for (std::size_t i = 0; i < source.cells; ++i) {
    const int n = subdivisions(cells[i], page, limits);
    if (n != coarse) cells[i] = sample(source, i, n);
  }
  return cells;
}

}  // namespace raiser::io
