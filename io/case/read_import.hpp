#pragma once

#include "io/case/outline.hpp"

namespace raiser::io {

/// Reads [import] and the drawing that it names into the outline, its holes and
/// the report. Faults of the keys come first: the drawing is read only when there
/// are none. Adds the names of holes, notches and fillets to `names`.
void read_import(const Table& document, OutlineReading& result, Names& names);

}  // namespace raiser::io
