#include "io/picture/canvas.hpp"

#include <cairo-svg.h>
#include <cairo.h>
#include <png.h>

#include <bit>
#include <csetjmp>
#include <new>
#include <numbers>
#include <system_error>
#include <utility>

namespace raiser::io {
namespace {

constexpr double pixels_per_unit = 2.0;
constexpr const char* face = "DejaVu Sans";

void check(cairo_status_t status) {
  if (status != CAIRO_STATUS_SUCCESS)
    throw std::system_error(std::make_error_code(std::errc::io_error),
                            std::string("drawing a picture: ") + cairo_status_to_string(status));
}

cairo_status_t append(void* bytes, const unsigned char* data, unsigned int length) {
  static_cast<std::string*>(bytes)->append(reinterpret_cast<const char*>(data), length);
  return CAIRO_STATUS_SUCCESS;
}

void set_font(cairo_t* pen, Font font) {
  cairo_select_font_face(pen, face, CAIRO_FONT_SLANT_NORMAL,
                         font.bold ? CAIRO_FONT_WEIGHT_BOLD : CAIRO_FONT_WEIGHT_NORMAL);
  cairo_set_font_size(pen, font.size);
  cairo_font_options_t* options = cairo_font_options_create();
  cairo_font_options_set_hint_style(options, CAIRO_HINT_STYLE_NONE);
  cairo_font_options_set_hint_metrics(options, CAIRO_HINT_METRICS_OFF);
  cairo_set_font_options(pen, options);
  cairo_font_options_destroy(options);
}

double advance(cairo_t* pen, const std::string& text) {
  cairo_text_extents_t extents;
  cairo_text_extents(pen, text.c_str(), &extents);
  return extents.x_advance;
}

void set_ink(cairo_t* pen, const Ink& ink) {
  cairo_set_source_rgba(pen, ink.red, ink.green, ink.blue, ink.opacity);
}

// The paths of an SVG with two decimals: a hundredth of a unit is below what
// any eye or printer resolves, and the file is a third smaller.
std::string with_short_paths(const std::string& svg) {
  std::string result;
  result.reserve(svg.size());
  bool in_path = false;
  bool in_fraction = false;
  int decimals = 0;
  for (const char c : svg) {
    if (c == '"') in_path = !in_path && result.ends_with(" d=");
    const bool digit = c >= '0' && c <= '9';
    if (c == '.' && in_path) {
      in_fraction = true;
      decimals = 0;
    } else if (!digit) {
      in_fraction = false;
    } else if (in_fraction && ++decimals > 2) {
      continue;
    }
    result += c;
  }
  return result;
}

// Lets libpng append to a string without an exception on the way through it.
void append_packed(png_structp png, png_bytep data, png_size_t length) {
  try {
    static_cast<std::string*>(png_get_io_ptr(png))->append(reinterpret_cast<const char*>(data), length);
  } catch (const std::bad_alloc&) {
    png_error(png, "out of memory");
  }
}

// False when libpng gave up. Nothing here may need a destructor: libpng leaves by longjmp.
bool pack(png_structp png, png_infop info, cairo_surface_t* surface) {
  if (setjmp(png_jmpbuf(png)) != 0) return false;
  const int height = cairo_image_surface_get_height(surface);
  png_set_IHDR(png, info, static_cast<png_uint_32>(cairo_image_surface_get_width(surface)),
               static_cast<png_uint_32>(height), 8, PNG_COLOR_TYPE_RGB, PNG_INTERLACE_NONE,
               PNG_COMPRESSION_TYPE_BASE, PNG_FILTER_TYPE_BASE);
  png_set_filter(png, PNG_FILTER_TYPE_BASE, PNG_FILTER_NONE);
  png_set_compression_level(png, 3);
  png_write_info(png, info);
  if constexpr (std::endian::native == std::endian::little) png_set_bgr(png);
  png_set_filler(png, 0, std::endian::native == std::endian::little ? PNG_FILLER_AFTER : PNG_FILLER_BEFORE);
  const unsigned char* row = cairo_image_surface_get_data(surface);
  for (int y = 0; y < height; ++y, row += cairo_image_surface_get_stride(surface)) png_write_row(png, row);
  png_write_end(png, info);
  return true;
}

// The PNG file of an image surface. Cairo's own packing tries every row filter,
// which takes areas of one colour three times as long for no smaller a file.
std::string packed(cairo_surface_t* surface) {
  cairo_surface_flush(surface);
  std::string bytes;
  png_structp png = png_create_write_struct(PNG_LIBPNG_VER_STRING, nullptr, nullptr, nullptr);
  if (png == nullptr) throw std::bad_alloc();
  png_infop info = png_create_info_struct(png);
  png_set_write_fn(png, &bytes, append_packed, nullptr);
  const bool done = info != nullptr && pack(png, info, surface);
  png_destroy_write_struct(&png, &info);
  if (!done) throw std::system_error(std::make_error_code(std::errc::io_error), "packing a picture");
  return bytes;
}

struct DestroySurface {
  void operator()(cairo_surface_t* surface) const { cairo_surface_destroy(surface); }
};
struct DestroyPen {
  void operator()(cairo_t* pen) const { cairo_destroy(pen); }
};
using Surface = std::unique_ptr<cairo_surface_t, DestroySurface>;
using Pen = std::unique_ptr<cairo_t, DestroyPen>;

}  // namespace

struct Canvas::Sheet {
  PaperKind kind;
  std::string bytes;  // outlives the surface, which writes into it
  Surface surface;
  Pen pen;
};

Canvas::Canvas(PaperKind kind, double width, double height) : sheet_(std::make_unique<Sheet>()) {
  Sheet& s = *sheet_;
  s.kind = kind;
  const double zoom = kind == PaperKind::png ? pixels_per_unit : 1.0;
  s.surface.reset(kind == PaperKind::png
                      ? cairo_image_surface_create(CAIRO_FORMAT_RGB24, static_cast<int>(zoom * width),
                                                   static_cast<int>(zoom * height))
                      : cairo_svg_surface_create_for_stream(append, &s.bytes, width, height));
  check(cairo_surface_status(s.surface.get()));
  s.pen.reset(cairo_create(s.surface.get()));
  check(cairo_status(s.pen.get()));
  cairo_scale(s.pen.get(), zoom, zoom);
  cairo_set_line_join(s.pen.get(), CAIRO_LINE_JOIN_ROUND);
  rectangle({0, 0, width, height});
  fill({1, 1, 1});
}

Canvas::~Canvas() = default;
Canvas::Canvas(Canvas&&) noexcept = default;
Canvas& Canvas::operator=(Canvas&&) noexcept = default;

void Canvas::move_to(const Spot& p) { cairo_move_to(sheet_->pen.get(), p.x(), p.y()); }
void Canvas::line_to(const Spot& p) { cairo_line_to(sheet_->pen.get(), p.x(), p.y()); }
void Canvas::curve_to(const Spot& a, const Spot& b, const Spot& end) {
  cairo_curve_to(sheet_->pen.get(), a.x(), a.y(), b.x(), b.y(), end.x(), end.y());
}
void Canvas::close() { cairo_close_path(sheet_->pen.get()); }
void Canvas::rectangle(const Box& box) {
  cairo_rectangle(sheet_->pen.get(), box.x, box.y, box.width, box.height);
}
void Canvas::circle(const Spot& centre, double radius) {
  cairo_new_sub_path(sheet_->pen.get());
  cairo_arc(sheet_->pen.get(), centre.x(), centre.y(), radius, 0.0, 2 * std::numbers::pi);
  cairo_close_path(sheet_->pen.get());
}

void Canvas::fill(const Ink& ink) {
  set_ink(sheet_->pen.get(), ink);
  cairo_fill(sheet_->pen.get());
}

void Canvas::stroke(const Ink& ink, double width, std::span<const double> dashes) {
  set_ink(sheet_->pen.get(), ink);
  cairo_set_line_width(sheet_->pen.get(), width);
  cairo_set_dash(sheet_->pen.get(), dashes.data(), static_cast<int>(dashes.size()), 0.0);
  cairo_stroke(sheet_->pen.get());
}

void Canvas::save() { cairo_save(sheet_->pen.get()); }
void Canvas::restore() { cairo_restore(sheet_->pen.get()); }
void Canvas::clip() { cairo_clip(sheet_->pen.get()); }

void Canvas::text(const std::string& text, const Spot& at, Font font, const Ink& ink, Align align,
                  double angle) {
  cairo_t* pen = sheet_->pen.get();
  cairo_save(pen);
  set_font(pen, font);
  set_ink(pen, ink);
  const double part = align == Align::left ? 0.0 : align == Align::middle ? 0.5 : 1.0;
  cairo_translate(pen, at.x(), at.y());
  cairo_rotate(pen, angle);
  cairo_move_to(pen, -part * advance(pen, text), 0.0);
  cairo_show_text(pen, text.c_str());
  cairo_new_path(pen);
  cairo_restore(pen);
}

std::string Canvas::finish() {
  Sheet& s = *sheet_;
  check(cairo_status(s.pen.get()));
  s.pen.reset();
  if (s.kind == PaperKind::png) return packed(s.surface.get());
  cairo_surface_finish(s.surface.get());
  check(cairo_surface_status(s.surface.get()));
  return s.kind == PaperKind::svg ? with_short_paths(s.bytes) : std::move(s.bytes);
}

double text_width(const std::string& text, Font font) {
  const Surface surface(cairo_image_surface_create(CAIRO_FORMAT_A8, 1, 1));
  const Pen pen(cairo_create(surface.get()));
  set_font(pen.get(), font);
  const double width = advance(pen.get(), text);
  check(cairo_status(pen.get()));
  return width;
}

}  // namespace raiser::io
