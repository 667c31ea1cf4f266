#pragma once

#include <iosfwd>
#include <string>
#include <vector>

namespace raiser::io {

/// How the program ends. The numbers are part of its interface.
enum class Exit : int {
  settled = 0,        ///< every asked number met its tolerance
  usage = 2,          ///< the command line is wrong
  input = 3,          ///< a case file cannot be read or breaks the format
  illegal = 4,        ///< well written, but the plate or its loads are not legal
  not_met = 5,        ///< solved, but a tolerance was not met
  undefined = 6,      ///< an asked number does not exist
  partial = 7,        ///< several cases, some of which did not end settled
  not_written = 8,    ///< a result could not be written
  interrupted = 130,  ///< stopped by an interrupt
};

/// What the streams are connected to.
struct Terminal {
  bool colour = false;    ///< `out` takes colours
  bool progress = false;  ///< `err` is a terminal: show what is running
};

/// Runs the program on its arguments (without the program's name). Data goes
/// to `out`, talk and faults to `err`. Nothing is written to either but by
/// this call; no exception leaves it. After Exit::interrupted a solution may
/// still be in progress on another thread: end the process with std::_Exit.
Exit run(const std::vector<std::string>& arguments, std::ostream& out, std::ostream& err,
         Terminal terminal = {});

/// Tells run() to stop at the next opportunity. Safe to call from a signal
/// handler.
void interrupt() noexcept;

}  // namespace raiser::io
