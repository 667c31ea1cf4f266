#pragma once

#include <cstddef>
#include <string>
#include <string_view>

#include "io/case/layout.hpp"  // columns
#include "mesh/plate/outline.hpp"
#include "solver/extract/estimate.hpp"

namespace raiser::io {

/// The widest line of any table.
inline constexpr std::size_t page_width = 80;

/// Padded with blanks to `width` columns; longer texts stay as they are.
std::string left(std::string_view text, std::size_t width);
std::string right(std::string_view text, std::size_t width);

/// At most `width` columns, the last one an ellipsis when cut.
std::string shortened(std::string_view text, std::size_t width);

/// One line without control characters, for text that a user wrote.
std::string plain(std::string_view text);

/// "hole bolt" for a hole named bolt, and "hole 2" for one named so by default;
/// the same for notches and fillets.
std::string phrase(const mesh::Raiser& raiser);

/// "holes", "notches", "fillets".
std::string plural(mesh::Raiser::Kind kind);

/// Broken at blanks into lines of at most `page_width` columns, each ended by a
/// newline. The first line begins with `first`, the others with as many blanks
/// as `indent` says. A word that is too long gets a line of its own; a number is
/// not parted from its unit, nor a value from its bound.
std::string wrapped(std::string_view text, std::string_view first = "", std::size_t indent = 0);

/// "341.16 ± 0.03"; "341 (no bound)" when the bound is not finite, "undefined"
/// when the value is not.
std::string with_bound(const solver::Estimate& estimate);

/// The value without its bound, "undefined" when it is not finite; and the
/// bound, "none" when it is not.
std::string value_text(const solver::Estimate& estimate);
std::string bound_text(const solver::Estimate& estimate);

/// "341.16 ±0.03" in less than `width` columns: where it does not fit, the
/// bound is widened, which leaves it true.
std::string fitted(solver::Estimate estimate, std::size_t width);
/// The same without the bound.
std::string fitted_value(solver::Estimate estimate, std::size_t width);

/// A number that has no bound, with up to `significant` digits, no trailing zeros.
/// Whole numbers below 1e9 are written out: 200000, not 2e+05.
std::string brief(double value, int significant = 6);

/// A fraction as a percentage with two significant digits, e.g. "0.012 %".
std::string percent(double fraction);

/// A count with blanks between thousands: "12 345".
std::string count(std::size_t number);

}  // namespace raiser::io
