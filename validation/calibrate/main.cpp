#include <cblas.h>
#include <fmt/format.h>
#include <sys/wait.h>
#include <unistd.h>

#include <algorithm>
#include <charconv>
#include <cstdio>
#include <fstream>
#include <iterator>
#include <map>
#include <memory>
#include <stdexcept>
#include <string>
#include <vector>

#include "validation/calibrate.hpp"

namespace {

using raiser::validation::PlateTrial;

constexpr const char* usage =
    "usage: raiser_calibrate [--seeds A..B] [--closed N] [--cracked A..B] [--pinned A..B]\n"
    "                        [--jobs N] [--short] [--records FILE] [--from FILE]\n"
    "\n"
    "Solves seeded random plates and plates with a closed form and prints, as\n"
    "Markdown, how often the true error lies within the bound.\n"
    "\n"
    "  --seeds A..B    random plates with the seeds A to B - 1 (default 0..320)\n"
    "  --closed N      N plates with a closed form (default 60)\n"
    "  --cracked A..B  random plates with cracks (default 0..240)\n"
    "  --pinned A..B   random plates with pins (default 0..120)\n"
    "  --jobs N        worker processes (default 1)\n"
    "  --short         16 plates with at most two holes, 8 closed forms, 12 plates with cracks, 8 with pins\n"
    "  --records FILE  also writes every number to FILE\n"
    "  --from FILE     solves nothing: reports what --records wrote\n";

struct Options {
  std::uint64_t first = 0, last = 320, closed = 60, jobs = 1;
  std::uint64_t first_cracked = 0, last_cracked = 240;
  std::uint64_t first_pinned = 0, last_pinned = 120;
  bool is_short = false;
  std::string records, from;
};

std::uint64_t number(const std::string& option, const std::string& text) {
  std::uint64_t value = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (error != std::errc{} || end != text.data() + text.size())
    throw std::invalid_argument(option + ": '" + text + "' is not a whole number from 0 up");
  return value;
}

Options read(const std::vector<std::string>& arguments) {
  Options options;
  for (std::size_t i = 0; i < arguments.size(); ++i) {
    const std::string& name = arguments[i];
    if (name == "--short") {
      options.is_short = true;
      continue;
    }
    if (i + 1 == arguments.size()) throw std::invalid_argument(name + ": unknown, or its value is missing");
    const std::string& value = arguments[++i];
    const std::size_t dots = value.find("..");
    if (name == "--seeds" && dots != std::string::npos) {
      options.first = number(name, value.substr(0, dots));
      options.last = number(name, value.substr(dots + 2));
    } else if (name == "--cracked" && dots != std::string::npos) {
      options.first_cracked = number(name, value.substr(0, dots));
      options.last_cracked = number(name, value.substr(dots + 2));
    } else if (name == "--pinned" && dots != std::string::npos) {
      options.first_pinned = number(name, value.substr(0, dots));
      options.last_pinned = number(name, value.substr(dots + 2));
    } else if (name == "--closed") {
      options.closed = number(name, value);
    } else if (name == "--jobs") {
      options.jobs = std::max<std::uint64_t>(1, number(name, value));
    } else if (name == "--records") {
      options.records = value;
    } else if (name == "--from") {
      options.from = value;
    } else {
      throw std::invalid_argument(name + " " + value + ": unknown option or value");
    }
  }
  return options;
}

struct Task {
  PlateTrial::Truth truth;
  std::uint64_t seed;
};

std::vector<Task> tasks(const Options& options) {
  std::vector<std::uint64_t> seeds;
  if (options.is_short)
    seeds = raiser::validation::seeds_with_few_holes(16, 2);
  else
    for (std::uint64_t seed = options.first; seed < options.last; ++seed) seeds.push_back(seed);
  std::vector<Task> list;
  for (const std::uint64_t seed : seeds) list.push_back({PlateTrial::Truth::finer_solution, seed});
  for (std::uint64_t seed = 0; seed < (options.is_short ? 8 : options.closed); ++seed)
    list.push_back({PlateTrial::Truth::closed_form, seed});
  const std::uint64_t last_cracked = options.is_short ? 12 : options.last_cracked;
  for (std::uint64_t seed = options.is_short ? 0 : options.first_cracked; seed < last_cracked; ++seed)
    list.push_back({PlateTrial::Truth::finer_cracked, seed});
  const std::uint64_t last_pinned = options.is_short ? 8 : options.last_pinned;
  for (std::uint64_t seed = options.is_short ? 0 : options.first_pinned; seed < last_pinned; ++seed)
    list.push_back({PlateTrial::Truth::finer_pinned, seed});
  return list;
}

PlateTrial run(const Task& task) {
  switch (task.truth) {
    case PlateTrial::Truth::closed_form:
      return raiser::validation::try_closed_form(task.seed);
    case PlateTrial::Truth::finer_cracked:
      return raiser::validation::try_cracked_plate(task.seed);
    case PlateTrial::Truth::finer_pinned:
      return raiser::validation::try_pinned_plate(task.seed);
    case PlateTrial::Truth::finer_solution:
      break;
  }
  return raiser::validation::try_random_plate(task.seed);
}

using File = std::unique_ptr<std::FILE, int (*)(std::FILE*)>;

/// Solves one task and appends its lines to the file, in one piece.
void work(const Task& task, int file) {
  openblas_set_num_threads(1);
  const std::string lines = to_lines(run(task));
  if (write(file, lines.data(), lines.size()) != static_cast<ssize_t>(lines.size())) _exit(1);
}

/// What is recorded when a process ends before its plate does.
std::string lost(const Task& task, int status) {
  PlateTrial plate;
  plate.seed = task.seed;
  plate.truth = task.truth;
  plate.reason = WIFSIGNALED(status) ? fmt::format("failed: the process ended by signal {}", WTERMSIG(status))
                                     : "failed: the process ended early";
  return to_lines(plate);
}

std::string contents(std::FILE* file) {
  std::rewind(file);
  std::string text;
  std::vector<char> buffer(1 << 16);
  for (std::size_t n = 0; (n = std::fread(buffer.data(), 1, buffer.size(), file)) > 0;)
    text.append(buffer.data(), n);
  return text;
}

/// Each task in a process of its own: Gmsh keeps global state, and ends the
/// process where it fails inside a parallel region. Results come through a file.
std::string solve(const std::vector<Task>& list, std::uint64_t jobs) {
  const File file(std::tmpfile(), &std::fclose);
  if (!file) throw std::runtime_error("cannot create a temporary file");
  std::map<pid_t, Task> running;
  std::string failures;
  std::size_t next = 0, done = 0;
  while (next < list.size() || !running.empty()) {
    if (next < list.size() && running.size() < jobs) {
      const pid_t pid = fork();
      if (pid < 0) throw std::runtime_error("cannot start a process");
      if (pid == 0) {
        work(list[next], fileno(file.get()));
        _exit(0);
      }
      running.emplace(pid, list[next++]);
      continue;
    }
    int status = 0;
    const auto ended = running.find(wait(&status));
    if (ended == running.end()) continue;
    if (status != 0) failures += lost(ended->second, status);
    running.erase(ended);
    if (++done % 10 == 0) fmt::print(stderr, "{} of {} done\n", done, list.size());
  }
  return contents(file.get()) + failures;
}

std::string read_file(const std::string& path) {
  std::ifstream in(path);
  if (!in) throw std::runtime_error(path + ": cannot be read");
  return {std::istreambuf_iterator<char>(in), {}};
}

void write_file(const std::string& path, const std::string& text) {
  std::ofstream out(path);
  out << text;
  if (!out.flush()) throw std::runtime_error(path + ": cannot be written");
}

}  // namespace

int main(int argc, char** argv) {
  const std::vector<std::string> arguments(argv + 1, argv + argc);
  if (std::find(arguments.begin(), arguments.end(), "--help") != arguments.end()) {
    fmt::print("{}", usage);
    return 0;
  }
  try {
    const Options options = read(arguments);
    const std::vector<Task> list = options.from.empty() ? tasks(options) : std::vector<Task>{};
    const std::string text = options.from.empty() ? solve(list, options.jobs) : read_file(options.from);
    if (!options.records.empty()) write_file(options.records, text);
    const std::vector<PlateTrial> plates = raiser::validation::from_lines(text);
    fmt::print("{}", calibration_report(plates));
    return options.from.empty() && plates.size() != list.size() ? 1 : 0;
  } catch (const std::exception& e) {
    fmt::print(stderr, "raiser_calibrate: {}\n\n{}", e.what(), usage);
    return 2;
  }
}
