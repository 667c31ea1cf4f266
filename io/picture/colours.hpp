#pragma once

#include "io/picture/canvas.hpp"

namespace raiser::io {

/// The stress map: 0 (lowest) is pale like the paper, 1 (highest) dark like
/// ink. CIELAB lightness falls in a straight line from 96 to 19, so the order
/// survives a grey printer and any colour blindness; the hue runs from straw
/// over amber and rust to indigo. Values outside [0, 1] are clamped.
Ink stress_colour(double part);

/// CIELAB lightness L* (0 to 100, D65 white) of an sRGB colour.
double lightness(const Ink& ink);

namespace ink {
inline constexpr Ink text{0.13, 0.14, 0.17};
inline constexpr Ink quiet{0.42, 0.44, 0.48};
inline constexpr Ink hairline{0.72, 0.73, 0.76};
inline constexpr Ink outline{0.13, 0.14, 0.17};
inline constexpr Ink iso_line{0.10, 0.10, 0.16, 0.30};
inline constexpr Ink load{0.05, 0.42, 0.44};
inline constexpr Ink paper{1.0, 1.0, 1.0, 0.92};
}  // namespace ink

}  // namespace raiser::io
