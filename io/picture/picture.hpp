#pragma once

#include <filesystem>
#include <optional>
#include <string>
#include <vector>

#include "io/picture/bands.hpp"
#include "mesh/plate/plate.hpp"

namespace raiser::io {

/// A marked place. The first of a picture's peaks is the largest.
struct PeakMark {
  Point point = Point::Zero();  ///< mm
  double value = 0.0;           ///< of the picture's quantity there
  std::string label;            ///< e.g. "peak 313.4 ± 0.3 MPa"; may be empty
};

/// A crack tip, where the stress has no limit.
struct TipMark {
  std::size_t tip = 0;  ///< index into mesh::tips(plate.cracks)
  Point point = Point::Zero();
  std::string label;  ///< e.g. "tip A: K_I 511.3 ± 0.2 MPa √mm"
};

/// A traction to be drawn as an arrow on the boundary.
struct LoadArrow {
  Point at = Point::Zero();        ///< mm, on the boundary
  Point outward = Point::Zero();   ///< unit normal out of the material
  Point traction = Point::Zero();  ///< MPa
  std::optional<double> room;      ///< mm the arrow may take on that side; any length when empty
};

/// Everything a picture of a stress field shows. Plain data; lengths in mm.
struct Picture {
  std::string title;
  mesh::Plate plate;
  std::string quantity;  ///< e.g. "von Mises stress"
  std::string unit;      ///< e.g. "MPa"
  std::vector<PictureCell> cells;
  std::vector<PeakMark> peaks;
  std::optional<std::size_t> focus;  ///< the raiser to show enlarged, if any
  std::vector<TipMark> tips;         ///< the worst first; it is shown enlarged in place of a raiser
  std::optional<double> top;         ///< all that is above has the highest colour; no end when empty
  std::vector<LoadArrow> arrows;
  std::vector<std::string> caption;  ///< lines, the first one stressed
  std::string caution;               ///< the line at the foot
};

/// The part of the plate around a raiser that an enlargement shows: the hole,
/// notch or fillet and room around it; of a hole also the ligament to the
/// nearest edge where that is not much wider than the hole. A square.
struct Window {
  Point centre = Point::Zero();
  double half = 0.0;
};
Window neighbourhood(const mesh::Plate& plate, std::size_t raiser);

/// The same around a crack tip: as much of the plate as the crack is long.
Window neighbourhood_of_tip(const mesh::Plate& plate, std::size_t tip);

/// The limits of the bands that the picture is drawn with.
std::vector<double> limits_of(const Picture& picture);

/// Draws the picture into a file, complete or not at all. Throws WriteError
/// (io/write/file.hpp) when it cannot be written, std::system_error when the
/// drawing library fails, std::invalid_argument for a picture without cells
/// or a cell whose sizes do not fit together.
void draw_png(const Picture& picture, const std::filesystem::path& file);
void draw_svg(const Picture& picture, const std::filesystem::path& file);

}  // namespace raiser::io
