#pragma once

#include <optional>
#include <string>
#include <vector>

#include "io/picture/canvas.hpp"
#include "io/picture/picture.hpp"

namespace raiser::io {

/// A window onto the plate: `box` on the paper shows the plate around `centre`
/// at `scale` paper units a mm, the same in both directions.
struct View {
  Box box;
  Point centre = Point::Zero();
  double scale = 1.0;

  Spot on_paper(const Point& x) const {
    return {box.x + box.width / 2 + scale * (x.x() - centre.x()),
            box.y + box.height / 2 - scale * (x.y() - centre.y())};
  }
};

/// Where everything stands on the page. Nothing of it overlaps.
struct Layout {
  double width = 0.0;
  double height = 0.0;
  std::vector<std::string> title;  ///< in lines
  View whole;                      ///< exactly the plate's rectangle
  double rim_x = 0.0;              ///< room for load arrows at the ends
  double rim_y = 0.0;              ///< the same at the sides
  std::optional<View> detail;      ///< the hole in focus; a part of it where that would hardly enlarge
  bool at_peak = false;            ///< the enlargement shows the surroundings of the peak only
  Box bar;                         ///< the colours of the bar alone
  Box text;                        ///< the caption
  std::vector<std::string> caption;
  std::size_t stressed = 0;  ///< how many lines of the caption are in bold
  std::vector<std::string> caution;
};

namespace page {
inline constexpr double width = 840.0;
inline constexpr double margin = 26.0;
inline constexpr Font title{15.0, true};
inline constexpr Font body{10.0, false};
inline constexpr Font body_bold{10.0, true};
inline constexpr Font small{9.0, false};
inline constexpr double title_step = 20.0;
inline constexpr double line_step = 15.0;
inline constexpr double axis_left = 50.0;    ///< room for the numbers of the y axis
inline constexpr double axis_bottom = 34.0;  ///< room for those of the x axis and its name
}  // namespace page

/// Breaks a text at blanks into lines not wider than `width`. A word longer
/// than a line is cut, or left too long.
enum class Breaking { anywhere, between_words };
std::vector<std::string> wrapped(const std::string& text, Font font, double width,
                                 Breaking breaking = Breaking::anywhere);

Layout lay_out(const Picture& picture);

}  // namespace raiser::io
