#include <benchmark/benchmark.h>
#include <fcntl.h>
#include <sys/resource.h>
#include <sys/wait.h>
#include <unistd.h>

#include <cstdlib>
#include <filesystem>
#include <optional>
#include <string>

namespace raiser::bench {
namespace {

double seconds(const timeval& time) {
  return static_cast<double>(time.tv_sec) + 1e-6 * static_cast<double>(time.tv_usec);
}

/// CPU seconds of one run of the program, start to end; nothing when it fails.
std::optional<double> run_program(const std::string& folder) {
  const pid_t pid = fork();
  if (pid == 0) {
    const int nowhere = open("/dev/null", O_WRONLY);
    dup2(nowhere, STDOUT_FILENO);
    dup2(nowhere, STDERR_FILENO);
    execl(RAISER_PROGRAM, RAISER_PROGRAM, "solve", "--quiet", "--out", folder.c_str(),
          RAISER_SOURCE_DIR "/examples/hanger.toml", static_cast<char*>(nullptr));
    _exit(127);
  }
  int status = 0;
  rusage usage{};
  if (pid < 0 || wait4(pid, &status, 0, &usage) != pid || status != 0) return std::nullopt;
  return seconds(usage.ru_utime) + seconds(usage.ru_stime);
}

/// `raiser solve examples/hanger.toml`, all files written. The time shown as
/// real time is the CPU time of the whole process.
void solve_first_example(benchmark::State& state) {
  std::string folder = (std::filesystem::temp_directory_path() / "raiser-bench-XXXXXX").string();
  if (!mkdtemp(folder.data())) {
    state.SkipWithError("cannot create a folder for the results");
    return;
  }
  for (auto _ : state) {
    const std::optional<double> used = run_program(folder);
    if (!used) {
      state.SkipWithError("the program failed");
      break;
    }
    state.SetIterationTime(*used);
  }
  std::filesystem::remove_all(folder);
}
BENCHMARK(solve_first_example)->UseManualTime()->Unit(benchmark::kMillisecond);

}  // namespace
}  // namespace raiser::bench
