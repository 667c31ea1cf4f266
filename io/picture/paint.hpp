#pragma once

#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "io/picture/canvas.hpp"
#include "io/picture/layout.hpp"
#include "mesh/region/region.hpp"

namespace raiser::io {

/// The range of an axis and its name, e.g. "x, mm".
struct Axis {
  double from = 0.0;
  double to = 1.0;
  std::string name;
  std::optional<double> step;  ///< distance of ticks; a round one of our choice when empty
};

/// An axis below `box` at distance `away`: ticks, numbers as many as fit, name.
void draw_x_axis(Canvas& canvas, const Box& box, double away, const Axis& axis);
/// The same at the left of `box`, upwards.
void draw_y_axis(Canvas& canvas, const Box& box, double away, const Axis& axis);

/// Adds the region's loops to the path as seen in `view`, arcs as Bézier
/// curves no further from the true arc than 1e-6 of its size.
void add_outline(Canvas& canvas, const mesh::Region& region, const View& view);

/// A straight arrow with its point at `tip`.
void draw_arrow(Canvas& canvas, const Spot& tail, const Spot& tip, const Ink& ink);

/// A ring with a dot that shows on light and on dark.
void draw_mark(Canvas& canvas, const Spot& at, double radius);

/// Keeps texts apart: what is taken stays free of what is placed later.
class Labels {
 public:
  void take(const Box& box) { taken_.push_back(box); }
  /// Discourages covering this place.
  void avoid(const Spot& spot) { avoided_.push_back(spot); }
  /// A polygon: labels prefer places outside all of these, or inside an even
  /// number of them.
  void prefer_outside(std::vector<Spot> polygon) { polygons_.push_back(std::move(polygon)); }

  /// The best free place for a label of this size near `target`, within
  /// `bounds`; taken from then on. Nothing when there is none.
  std::optional<Box> place(const Spot& target, double width, double height, const Box& bounds) {
    return place(target, std::vector<Spot>{{width, height}}, bounds);
  }
  /// The same for a label that can take one of several sizes.
  std::optional<Box> place(const Spot& target, const std::vector<Spot>& sizes, const Box& bounds);

  /// Whether nothing taken is in the way.
  bool free(const Box& box) const;

  /// The best free place that touches a line from above or below, at one of
  /// the points `along` it; the earlier points win where all else is equal.
  std::optional<Box> place_along(const std::vector<Spot>& along, double width, double height,
                                 const Box& bounds);

 private:
  double covered(const Box& box) const;
  bool outside(const Box& box) const;

  std::vector<Box> taken_;
  std::vector<Spot> avoided_;
  std::vector<std::vector<Spot>> polygons_;
};

/// Writes `text` beside `target` with a thin line leading to it, where there
/// is room; `radius` is that of the mark at the target.
void draw_call_out(Canvas& canvas, Labels& labels, const Spot& target, double radius, const std::string& text,
                   const Box& bounds);

}  // namespace raiser::io
