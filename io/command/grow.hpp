#pragma once

#include <functional>
#include <iosfwd>

#include "io/command/options.hpp"
#include "io/command/speech.hpp"

namespace raiser::io {

/// `raiser grow`: K over the length of a crack of one case, printed and written.
/// `stopped` is asked after each length; what is done is kept.
Exit grow(const Options& options, Output& output, std::ostream& err, Progress& progress,
          const std::function<bool()>& stopped);

}  // namespace raiser::io
