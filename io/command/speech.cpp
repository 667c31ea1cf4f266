#include "io/command/speech.hpp"

#include <cerrno>
#include <ostream>
#include <system_error>

#include "io/write/layout.hpp"

namespace raiser::io {

void Output::say(std::string_view text) {
  if (failed_) return;
  errno = 0;
  stream_ << text << std::flush;
  if (stream_) return;
  failed_ = true;
  error_ = errno;
}

Exit Output::ended(Exit code, std::ostream& err) const {
  if (!failed_ || error_ == EPIPE) return code;
  const std::string reason = error_ != 0 ? std::generic_category().message(error_) : "it is closed";
  err << "raiser: cannot write to standard output: " << reason << "\n";
  return Exit::not_written;
}

void Progress::show(const std::string& text) {
  if (shown_) err_ << "\r\x1b[K" << shortened(plain(text), page_width - 1) << std::flush;
}

void Progress::wipe() {
  if (shown_) err_ << "\r\x1b[K" << std::flush;
}

}  // namespace raiser::io
