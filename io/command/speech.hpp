#pragma once

#include <iosfwd>
#include <string>
#include <string_view>

#include "io/command/run.hpp"

namespace raiser::io {

/// Standard output, with the reason when it fails.
class Output {
 public:
  explicit Output(std::ostream& stream) : stream_(stream) {}

  /// Writes and flushes. Does nothing once writing has failed.
  void say(std::string_view text);

  /// `code`, or Exit::not_written with a word to `err` when not all of the
  /// output has gone where it should. A reader that has closed its end wanted
  /// no more, and that is no fault.
  Exit ended(Exit code, std::ostream& err) const;

 private:
  std::ostream& stream_;
  bool failed_ = false;
  int error_ = 0;  // errno of the failure, 0 when unknown
};

/// What is running, on one line of a terminal that is wiped before anything
/// else is said. Does nothing when not shown.
class Progress {
 public:
  Progress(std::ostream& err, bool shown) : err_(err), shown_(shown) {}
  void show(const std::string& text);
  void wipe();

 private:
  std::ostream& err_;
  bool shown_;
};

}  // namespace raiser::io
