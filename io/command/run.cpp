#include "io/command/run.hpp"

#include <fmt/format.h>

#include <atomic>
#include <chrono>
#include <functional>
#include <future>
#include <ostream>
#include <thread>

#include "io/case/describe.hpp"
#include "io/command/files.hpp"
#include "io/command/grow.hpp"
#include "io/command/options.hpp"
#include "io/command/speech.hpp"
#include "io/command/validate.hpp"
#include "io/write/csv.hpp"
#include "io/write/file.hpp"
#include "io/write/json.hpp"
#include "io/write/layout.hpp"
#include "io/write/summary.hpp"
#include "io/write/table.hpp"
#include "solver/linear/threads.hpp"

namespace raiser::io {
namespace {

// The only global of the program: a signal handler has no other way to speak.
std::atomic<bool> stop_asked{false};
static_assert(std::atomic<bool>::is_always_lock_free, "a signal handler may touch no other kind");

struct Session {
  const Options& options;
  Output output;
  std::ostream& err;
  Terminal terminal;
  Progress progress;
};

// One case on its way through the program.
struct Run {
  Outcome outcome;
  std::vector<std::string> faults;
  std::string json;   // of the result; empty for none
  std::string table;  // for a person; empty for none
};

void fail(Run& run, Exit code, std::string_view status, std::string fault) {
  run.outcome.exit_code = static_cast<int>(code);
  run.outcome.status = status;
  if (run.outcome.message.empty()) run.outcome.message = fault;
  run.faults.push_back(std::move(fault));
}

std::optional<Case> read(const std::filesystem::path& file, Run& run) {
  CaseReading reading = read_case(file);
  Exit code = Exit::illegal;
  for (const Diagnostic& fault : reading.faults) {
    if (fault.kind == Diagnostic::Kind::input) code = Exit::input;
  }
  const std::string_view status = code == Exit::input ? "not read" : "not legal";
  for (const Diagnostic& fault : reading.faults) fail(run, code, status, text(fault));
  if (reading.value) run.outcome.title = reading.value->title;
  return std::move(reading.value);
}

// Solves on another thread, so that an interrupt need not wait for the end; the
// thread owns all it works on. Nothing when interrupted.
std::optional<solver::Solution> solve(const Case& input, const std::function<void(double)>& waiting) {
  if (!solver::has_workspace()) throw std::bad_alloc();
  std::promise<solver::Solution> promise;
  std::future<solver::Solution> future = promise.get_future();
  std::thread([problem = input.problem, asks = input.asks, promise = std::move(promise)]() mutable {
    try {
      promise.set_value(solver::settle(problem, asks));
    } catch (...) {
      promise.set_exception(std::current_exception());
    }
  }).detach();
  const auto start = std::chrono::steady_clock::now();
  while (future.wait_for(std::chrono::milliseconds(50)) != std::future_status::ready) {
    if (stop_asked) return std::nullopt;
    waiting(std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count());
  }
  return future.get();
}

void keep_findings(Outcome& outcome, const Result& result) {
  const bool settled = result.solution.status == solver::Solution::Status::settled;
  outcome.exit_code = static_cast<int>(settled ? Exit::settled : Exit::not_met);
  outcome.status = words(result.solution.status);
  outcome.message = result.solution.reason;
  outcome.seconds = result.solution.seconds;
  outcome.raisers = result.solution.combined.raisers;
  for (const solver::RaiserFindings& found : outcome.raisers) {
    outcome.raiser_names.push_back(mesh::raiser(result.input.problem.plate, found.raiser).name);
  }
  outcome.tips = result.solution.combined.tips;
  const std::vector<mesh::CrackTip> tips = mesh::tips(result.input.problem.plate.cracks);
  for (const solver::TipFindings& found : outcome.tips) outcome.tip_names.push_back(tips.at(found.tip).name);
}

void tell_written(const Session& session, const std::vector<std::filesystem::path>& files) {
  if (session.options.quiet || files.empty()) return;
  std::string list;
  for (const auto& file : files) list += (list.empty() ? "" : ", ") + plain(file.filename().string());
  const std::string folder = files.front().parent_path().string();
  session.err << wrapped(list + (folder.empty() ? "" : " in " + plain(folder)), "Wrote ", 6);
}

void finish(const Session& session, Run& run, Case input, solver::Solution solution) {
  const std::filesystem::path file = input.file;
  Result result{std::move(input), std::move(solution), {}, provenance(file)};
  result.published = validation::compare(result.input.problem, result.solution);
  keep_findings(run.outcome, result);
  const Target target = target_of(file, session.options.folder.value_or(""));
  const bool several = session.options.cases.size() > 1;
  if (session.options.json || session.options.files) run.json = json(result);
  if (!session.options.json && !session.options.quiet && !several) {
    run.table =
        table(result, {session.terminal.colour, session.options.files ? target.stem + ".json" : "--json"});
  }
  if (!session.options.files) return;
  const auto written = write_results(result, run.json, target, session.options.charts);
  if (!several) tell_written(session, written);
}

// Reads, solves and writes one case. False when interrupted.
bool solve_case(Session& session, const std::filesystem::path& file, const std::string& step, Run& run) {
  try {
    std::optional<Case> input = read(file, run);
    if (!input) return true;
    session.progress.show(fmt::format("{}{}: solving", step, file.string()));
    std::optional<solver::Solution> solution = solve(*input, [&](double seconds) {
      session.progress.show(fmt::format("{}{}: solving, {:.0f} s", step, file.string(), seconds));
    });
    session.progress.wipe();
    if (!solution) return false;
    finish(session, run, std::move(*input), std::move(*solution));
  } catch (const WriteError& error) {
    fail(run, Exit::not_written, "not written", error.what());
    run.outcome.message = error.what();
  } catch (const std::invalid_argument& error) {
    fail(run, Exit::illegal, "not legal", fmt::format("{}: {}", file.string(), error.what()));
  } catch (const std::bad_alloc&) {
    fail(run, Exit::not_met, "not solved",
         fmt::format("{}: not solved: not enough memory; ask for a larger tolerance or split the plate",
                     file.string()));
  } catch (const std::exception& error) {
    fail(run, Exit::not_met, "not solved", fmt::format("{}: not solved: {}", file.string(), error.what()));
  } catch (...) {  // a library may throw anything; no case may stop the others
    fail(run, Exit::not_met, "not solved",
         fmt::format("{}: not solved: a library failed without a reason; change a size or an angle a little",
                     file.string()));
  }
  session.progress.wipe();
  return true;
}

Exit write_summary(const Session& session, const std::vector<Outcome>& outcomes) {
  if (!session.options.files) return Exit::settled;
  const std::filesystem::path file = summary_file(session.options.cases, session.options.folder.value_or(""));
  try {
    Staging staging(file.parent_path());
    staging.add(file.filename().string(), summary_csv(outcomes));
    const auto files = staging.publish();
    if (!session.options.quiet) session.err << "Wrote " << plain(files.front().string()) << "\n";
  } catch (const WriteError& error) {
    session.err << error.what() << "\n";
    return Exit::not_written;
  }
  return Exit::settled;
}

Exit code_of(const std::vector<Outcome>& outcomes, bool several) {
  for (const Outcome& outcome : outcomes) {
    if (outcome.exit_code != 0) return several ? Exit::partial : static_cast<Exit>(outcome.exit_code);
  }
  return Exit::settled;
}

void tell(Session& session, const Run& run, bool first) {
  for (const std::string& fault : run.faults) session.err << plain(fault) << "\n";
  if (session.options.json) {
    session.output.say(first ? json_begin() : std::string(json_between()));
    session.output.say(json_entry(run.outcome, run.faults, run.json));
  }
  session.output.say(run.table);
}

Exit solve_cases(Session& session) {
  const auto& cases = session.options.cases;
  const bool several = cases.size() > 1;
  std::vector<Outcome> outcomes;
  bool interrupted = false;
  for (const auto& file : cases) {
    interrupted = stop_asked;
    if (interrupted) break;
    Run run;
    run.outcome.case_file = file.string();
    const std::string step = several ? fmt::format("[{}/{}] ", outcomes.size() + 1, cases.size()) : "";
    interrupted = !solve_case(session, file, step, run);
    if (interrupted) break;
    tell(session, run, outcomes.empty());
    outcomes.push_back(std::move(run.outcome));
  }
  if (session.options.json)
    session.output.say((outcomes.empty() ? json_begin() : "") + std::string(json_end()));
  if (several && !session.options.json && !session.options.quiet) session.output.say(summary_table(outcomes));
  Exit code = code_of(outcomes, several);
  if (several && !outcomes.empty() && write_summary(session, outcomes) != Exit::settled)
    code = Exit::not_written;
  code = session.output.ended(code, session.err);
  if (!interrupted) return code;
  session.err << "raiser: interrupted; "
              << (outcomes.empty()
                      ? "nothing was written"
                      : fmt::format("{} of {} cases are done and kept", outcomes.size(), cases.size()))
              << "\n";
  return Exit::interrupted;
}

Exit check_cases(Session& session) {
  const auto& cases = session.options.cases;
  std::vector<Outcome> outcomes;
  for (const auto& file : cases) {
    if (stop_asked) return Exit::interrupted;
    Run run;
    const std::optional<Case> input = read(file, run);
    for (const std::string& fault : run.faults) session.err << plain(fault) << "\n";
    if (input && !session.options.quiet)
      session.output.say((outcomes.empty() ? "" : "\n") + describe(*input));
    outcomes.push_back(std::move(run.outcome));
  }
  return session.output.ended(code_of(outcomes, cases.size() > 1), session.err);
}

Exit dispatch(const Options& options, std::ostream& out, std::ostream& err, Terminal terminal) {
  Session session{options, Output(out), err, terminal, Progress(err, terminal.progress && !options.quiet)};
  if (options.command == Options::Command::check) return check_cases(session);
  if (options.command == Options::Command::validate)
    return validate(options, session.output, err, session.progress, [] { return stop_asked.load(); });
  if (options.command == Options::Command::grow)
    return grow(options, session.output, err, session.progress, [] { return stop_asked.load(); });
  if (options.files) {
    const std::vector<std::string> faults = clashes(options.cases, options.folder.value_or(""));
    for (const std::string& fault : faults) err << "raiser solve: " << plain(fault) << "\n";
    if (!faults.empty()) return Exit::usage;
  }
  return solve_cases(session);
}

}  // namespace

void interrupt() noexcept { stop_asked = true; }

Exit run(const std::vector<std::string>& arguments, std::ostream& out, std::ostream& err, Terminal terminal) {
  try {
    const auto parsed = parse(arguments);
    if (const auto* options = std::get_if<Options>(&parsed)) return dispatch(*options, out, err, terminal);
    const Reply& reply = std::get<Reply>(parsed);
    if (reply.code != Exit::settled) err << reply.text;
    Output output(out);
    if (reply.code == Exit::settled) output.say(reply.text);
    return output.ended(reply.code, err);
  } catch (const std::exception& error) {
    err << "raiser: " << error.what() << "\n";
    return Exit::not_met;
  }
}

}  // namespace raiser::io
