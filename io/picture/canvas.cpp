#include "io/picture/canvas.hpp"

#include <cairo-svg.h>
#include <cairo.h>

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
  if (s.kind == PaperKind::png) check(cairo_surface_write_to_png_stream(s.surface.get(), append, &s.bytes));
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
