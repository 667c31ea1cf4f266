#include "mesh/triangulate/size_field.hpp"

#include <Eigen/Geometry>
#include <algorithm>
#include <cmath>
#include <limits>

namespace raiser::mesh {

SizeField::SizeField(const Division& division, double growth, double crack_growth)
    : growth_(std::max(growth, crack_growth)) {
  Eigen::AlignedBox2d box;
  for (const auto* chains : {&division.loops, &division.slits})
    for (const DividedLoop& chain : *chains)
      for (const Curve& piece : chain) {
        const Point from = piece.at(piece.begin);
        const Point to = piece.at(piece.end);
        const bool at_crack =
            piece.owner.kind == Owner::Kind::inner || piece.owner.kind == Owner::Kind::crack;
        sources_.push_back({(from + to) / 2, (to - from).norm(), at_crack ? crack_growth : growth});
        box.extend(from);
      }
  origin_ = box.min();
  const Point extent = box.sizes();
  const double cells = std::clamp(static_cast<double>(sources_.size()) / 4, 1.0, 4000.0);
  cell_size_ = std::sqrt(extent.x() * extent.y() / cells);
  columns_ = static_cast<std::size_t>(extent.x() / cell_size_) + 1;
  cells_.resize(columns_ * (static_cast<std::size_t>(extent.y() / cell_size_) + 1));
}

double SizeField::size_from(const Source& source, const Point& x) const {
  return source.length + source.growth * std::max(0.0, (x - source.middle).norm() - source.length / 2);
}

const std::vector<int>& SizeField::relevant(std::size_t cell) {
  std::vector<int>& list = cells_[cell];
  if (!list.empty()) return list;
  const std::size_t row = cell / columns_;
  const std::size_t column = cell % columns_;
  const Point centre =
      origin_ + cell_size_ * Point(static_cast<double>(column) + 0.5, static_cast<double>(row) + 0.5);
  double smallest = size_from(sources_.front(), centre);
  for (const Source& source : sources_) smallest = std::min(smallest, size_from(source, centre));
  // Each size changes by at most growth * half a diagonal from the centre.
  const double limit = smallest + growth_ * cell_size_ * std::sqrt(2.0);
  for (std::size_t i = 0; i < sources_.size(); ++i)
    if (size_from(sources_[i], centre) <= limit) list.push_back(static_cast<int>(i));
  return list;
}

double SizeField::at(const Point& x) {
  const auto index = [&](double offset, std::size_t count) {
    return static_cast<std::size_t>(std::clamp(offset / cell_size_, 0.0, static_cast<double>(count) - 1.0));
  };
  const Point offset = x - origin_;
  const std::size_t cell =
      index(offset.y(), cells_.size() / columns_) * columns_ + index(offset.x(), columns_);
  double size = std::numeric_limits<double>::infinity();
  for (const int i : relevant(cell)) size = std::min(size, size_from(sources_[i], x));
  return size;
}

}  // namespace raiser::mesh
