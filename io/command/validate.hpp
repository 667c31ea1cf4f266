#pragma once

#include <functional>
#include <iosfwd>

#include "io/command/options.hpp"
#include "io/command/speech.hpp"

namespace raiser::io {

/// `raiser validate`: solves the families asked for, prints and writes what
/// comes of it. `stopped` is asked between plates; what is done is kept.
Exit validate(const Options& options, Output& output, std::ostream& err, Progress& progress,
              const std::function<bool()>& stopped);

}  // namespace raiser::io
