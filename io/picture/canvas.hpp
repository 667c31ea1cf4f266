#pragma once

#include <Eigen/Core>
#include <memory>
#include <span>
#include <string>

namespace raiser::io {

/// A position on the paper: x to the right, y downwards, in paper units
/// (1 unit = 1/72 inch in an SVG, 2 pixels in a PNG).
using Spot = Eigen::Vector2d;

/// An upright rectangle on the paper.
struct Box {
  double x = 0.0;
  double y = 0.0;
  double width = 0.0;
  double height = 0.0;

  double right() const { return x + width; }
  double bottom() const { return y + height; }
  Box grown(double by) const { return {x - by, y - by, width + 2 * by, height + 2 * by}; }
  bool overlaps(const Box& o) const {
    return x < o.right() && o.x < right() && y < o.bottom() && o.y < bottom();
  }
  bool holds(const Box& o) const {
    return x <= o.x && y <= o.y && o.right() <= right() && o.bottom() <= bottom();
  }
};

/// sRGB colour with opacity, each 0 to 1.
struct Ink {
  double red = 0.0;
  double green = 0.0;
  double blue = 0.0;
  double opacity = 1.0;
};

/// The sans-serif face of all pictures (DejaVu Sans) at a size in paper units.
struct Font {
  double size = 9.0;
  bool bold = false;
};

enum class Align { left, middle, right };
enum class PaperKind { png, svg };

/// Width that a line of text takes on the paper.
double text_width(const std::string& text, Font font);

/// A sheet of white paper to draw on; the only door to the drawing library.
/// A path is collected by move/line/curve and used up by fill or stroke.
/// Text is drawn as glyph outlines, so that an SVG looks the same everywhere.
class Canvas {
 public:
  Canvas(PaperKind kind, double width, double height);
  ~Canvas();
  Canvas(Canvas&&) noexcept;
  Canvas& operator=(Canvas&&) noexcept;

  void move_to(const Spot& p);
  void line_to(const Spot& p);
  void curve_to(const Spot& a, const Spot& b, const Spot& end);
  void close();
  void rectangle(const Box& box);
  void circle(const Spot& centre, double radius);

  void fill(const Ink& ink);  ///< non-zero winding
  void stroke(const Ink& ink, double width, std::span<const double> dashes = {});

  void save();     ///< remembers the clip
  void restore();  ///< back to the clip of the matching save()
  void clip();     ///< from now on only inside the path

  /// One line of text with its baseline at `at`; `angle` in rad, clockwise.
  void text(const std::string& text, const Spot& at, Font font, const Ink& ink, Align align = Align::left,
            double angle = 0.0);

  /// The finished file's bytes. Throws std::system_error when the drawing
  /// library reports trouble. Nothing can be drawn afterwards.
  std::string finish();

 private:
  struct Sheet;
  std::unique_ptr<Sheet> sheet_;
};

}  // namespace raiser::io
