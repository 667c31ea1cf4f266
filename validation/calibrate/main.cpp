#include <cblas.h>
#include <fmt/format.h>
#include <sys/wait.h>
#include <unistd.h>

#include <algorithm>
#include <array>
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
    "usage: raiser_calibrate [--holes A..B] [--closed A..B] [--cracked A..B] [--outlined A..B]\n"
    "                        [--drawn A..B] [--pinned A..B] [--short] [--jobs N]\n"
    "                        [--records FILE] [--from FILE]\n"
    "\n"
    "Solves seeded random plates and prints, as Markdown, how often the true error\n"
    "lies within the bound. A..B are the seeds A to B - 1; kinds that are not named\n"
    "are left out. Without any: --holes 0..320 --closed 0..60.\n"
    "\n"
    "  --holes A..B     plates with holes\n"
    "  --closed A..B    plates with a closed form\n"
    "  --cracked A..B   plates with cracks\n"
    "  --outlined A..B  notches, shoulders and free outlines, some orthotropic or clamped\n"
    "  --drawn A..B     holes of drawn shapes\n"
    "  --pinned A..B    pins that press on holes, by cosine and in contact\n"
    "  --short          a few plates of each kind\n"
    "  --jobs N         worker processes (default 1)\n"
    "  --records FILE   also writes every number to FILE\n"
    "  --from FILE      solves nothing: reports what --records wrote\n";

/// A kind of random plate and how it is tried.
struct Kind {
  const char* option;
  PlateTrial::Truth truth;
  PlateTrial (*attempt)(std::uint64_t seed);
  std::uint64_t few;  ///< of them in a short run
};
constexpr std::array kinds{
    Kind{"--holes", PlateTrial::Truth::finer_solution, raiser::validation::try_random_plate, 16},
    Kind{"--closed", PlateTrial::Truth::closed_form, raiser::validation::try_closed_form, 8},
    Kind{"--cracked", PlateTrial::Truth::finer_cracked, raiser::validation::try_cracked_plate, 12},
    Kind{"--outlined", PlateTrial::Truth::finer_outlined, raiser::validation::try_outlined_plate, 12},
    Kind{"--drawn", PlateTrial::Truth::finer_drawn, raiser::validation::try_drawn_plate, 8},
    Kind{"--pinned", PlateTrial::Truth::finer_pinned, raiser::validation::try_pinned_plate, 8},
};

struct Task {
  const Kind* kind;
  std::uint64_t seed;
};

struct Options {
  std::vector<Task> tasks;
  std::uint64_t jobs = 1;
  std::string records, from;
};

void add_tasks(Options& options, const Kind& kind, std::uint64_t first, std::uint64_t last) {
  for (std::uint64_t seed = first; seed < last; ++seed) options.tasks.push_back({&kind, seed});
}

void add_few(Options& options) {
  for (const Kind& kind : kinds) {
    if (kind.truth != PlateTrial::Truth::finer_solution) {
      add_tasks(options, kind, 0, kind.few);
      continue;
    }
    for (const std::uint64_t seed : raiser::validation::seeds_with_few_holes(kind.few, 2))
      options.tasks.push_back({&kind, seed});
  }
}

std::uint64_t number(const std::string& option, const std::string& text) {
  std::uint64_t value = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (error != std::errc{} || end != text.data() + text.size())
    throw std::invalid_argument(option + ": '" + text + "' is not a whole number from 0 up");
  return value;
}

/// Whether the option names a kind of plate; its tasks are added.
bool reads_kind(const std::string& name, const std::string& value, Options& options) {
  for (const Kind& kind : kinds) {
    const std::size_t dots = value.find("..");
    if (name != kind.option || dots == std::string::npos) continue;
    add_tasks(options, kind, number(name, value.substr(0, dots)), number(name, value.substr(dots + 2)));
    return true;
  }
  return false;
}

Options read(const std::vector<std::string>& arguments) {
  Options options;
  bool names_plates = false;
  for (std::size_t i = 0; i < arguments.size(); ++i) {
    const std::string& name = arguments[i];
    if (name == "--short") {
      add_few(options);
      names_plates = true;
      continue;
    }
    if (i + 1 == arguments.size()) throw std::invalid_argument(name + ": unknown, or its value is missing");
    const std::string& value = arguments[++i];
    if (reads_kind(name, value, options)) {
      names_plates = true;
    } else if (name == "--jobs") {
      options.jobs = std::max<std::uint64_t>(1, number(name, value));
    } else if (name == "--records") {
      options.records = value;
    } else if (name == "--from") {
      options.from = value;
      names_plates = true;
    } else {
      throw std::invalid_argument(name + " " + value + ": unknown option or value");
    }
  }
  if (!names_plates) {
    add_tasks(options, kinds[0], 0, 320);
    add_tasks(options, kinds[1], 0, 60);
  }
  return options;
}

using File = std::unique_ptr<std::FILE, int (*)(std::FILE*)>;

/// Solves one task and appends its lines to the file, in one piece.
void work(const Task& task, int file) {
  openblas_set_num_threads(1);
  const std::string lines = to_lines(task.kind->attempt(task.seed));
  if (write(file, lines.data(), lines.size()) != static_cast<ssize_t>(lines.size())) _exit(1);
}

/// What is recorded when a process ends before its plate does.
std::string lost(const Task& task, int status) {
  PlateTrial plate;
  plate.seed = task.seed;
  plate.truth = task.kind->truth;
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
    const std::string text =
        options.from.empty() ? solve(options.tasks, options.jobs) : read_file(options.from);
    if (!options.records.empty()) write_file(options.records, text);
    const std::vector<PlateTrial> plates = raiser::validation::from_lines(text);
    fmt::print("{}", calibration_report(plates));
    return options.from.empty() && plates.size() != options.tasks.size() ? 1 : 0;
  } catch (const std::exception& e) {
    fmt::print(stderr, "raiser_calibrate: {}\n\n{}", e.what(), usage);
    return 2;
  }
}
