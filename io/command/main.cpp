#include <signal.h>
#include <unistd.h>

#include <cstdlib>
#include <iostream>
#include <string>
#include <vector>

#include "io/command/run.hpp"
#include "solver/linear/threads.hpp"

namespace {

extern "C" void on_interrupt(int) { raiser::io::interrupt(); }

void set_signals() {
  struct sigaction stop = {};
  stop.sa_handler = on_interrupt;
  // A second interrupt ends the process at once.
  stop.sa_flags = static_cast<int>(SA_RESETHAND);
  ::sigaction(SIGINT, &stop, nullptr);
  ::sigaction(SIGTERM, &stop, nullptr);
  // Closed pipes and file size limits are errors of writing, reported as such.
  ::signal(SIGPIPE, SIG_IGN);
  ::signal(SIGXFSZ, SIG_IGN);
}

bool takes_colour(int descriptor) {
  const char* refusal = std::getenv("NO_COLOR");  // NOLINT(concurrency-mt-unsafe)
  const char* term = std::getenv("TERM");         // NOLINT(concurrency-mt-unsafe)
  const bool refused = refusal != nullptr && *refusal != '\0';
  return !refused && term != nullptr && std::string(term) != "dumb" && ::isatty(descriptor) == 1;
}

}  // namespace

int main(int count, char** arguments) {
  set_signals();
  raiser::solver::use_one_thread();
  const raiser::io::Terminal terminal{takes_colour(STDOUT_FILENO), ::isatty(STDERR_FILENO) == 1};
  const auto code = raiser::io::run({arguments + 1, arguments + count}, std::cout, std::cerr, terminal);
  if (code == raiser::io::Exit::interrupted || !raiser::solver::has_workspace()) {
    std::cout.flush();
    std::_Exit(static_cast<int>(code));
  }
  return static_cast<int>(code);
}
