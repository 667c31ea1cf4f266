#include "io/command/options.hpp"

#include <CLI/CLI.hpp>
#include <algorithm>

#include "io/write/provenance.hpp"

namespace raiser::io {
namespace {

constexpr const char* general_help = R"(raiser: how far holes raise the stress in a plate

usage: raiser solve CASE... [--out DIR] [--json] [--quiet] [--no-files]
       raiser check CASE... [--quiet]
       raiser grow CASE [--crack NAME] --to LENGTH [--steps N] [--kinked]
       raiser validate [FAMILY...] [--out DIR] [--quick] [--json]
       raiser --help | --version

  solve   solve case files; print peak stresses and Kt, each with an error
          bound, and write result files
  check   read and validate case files; print them as understood, with every
          default and unit
  grow    stress intensity over the length of a growing crack, with a fitted
          factor, in a table, CSV and a curve
  validate
          hold published solutions against this program, in a table and charts

`raiser solve --help` and so on say more.

examples:
  raiser check hanger.toml
  raiser solve hanger.toml
  raiser solve plates/*.toml --out results
  raiser solve hanger.toml --json | jq '.cases[0].result.results[0]'
)";

constexpr const char* exit_codes = R"(
exit codes:
    0  settled: every asked number is within its tolerance
    2  the command line is wrong
    3  a case file cannot be read or breaks the format
    4  a plate or its loads are not legal
    5  a tolerance was not met; the reason is given
    6  an asked number does not exist (reserved)
    7  of several cases, some did not end with 0
    8  a result could not be written
  130  interrupted
)";

constexpr const char* solve_help =
    R"(usage: raiser solve CASE... [--out DIR] [--json] [--quiet] [--no-files]
                    [--charts]

Solves each case file. One case prints its table; several print one line each
and end in one summary. A faulty case stops no other.

  CASE         case files (TOML)
  --out DIR    write results into DIR instead of beside each case; DIR is made
               where it is missing
  --json       print one JSON document instead of the table
  --quiet      print no table and no remarks, only faults
  --no-files   write no result files
  --charts     also draw the stress along the edge of each hole and along each
               ligament: STEM-edge-1.svg, STEM-ligament-1.svg and so on, in the
               order of the CSV files, of the first 20 holes and ligaments

Results of STEM.toml: STEM.vtu (field), STEM.json (every number), STEM.png and
STEM.svg (picture), STEM-edge.csv (stress along the holes), STEM-ligament.csv
(stress along the ligaments). Several cases also give summary.csv, in DIR or
beside the first case. Older results of the same names are replaced.

Data goes to standard output, all else to standard error. NO_COLOR is honoured.
Ctrl-C drops the case being solved and keeps those that are done.

examples:
  raiser solve hanger.toml
  raiser solve plates/*.toml --out results
  raiser solve hanger.toml --json --no-files > hanger.json
)";

constexpr const char* check_help = R"(usage: raiser check CASE... [--quiet]

Reads and validates each case file, and prints the case as understood: every
value with its unit, every default marked as one. Nothing is solved or written.

  CASE      case files (TOML)
  --quiet   print only faults

example:
  raiser check hanger.toml
)";

constexpr const char* validate_help =
    R"(usage: raiser validate [FAMILY...] [--out DIR] [--quick] [--json] [--list]

Solves the plates of published solutions, family by family, and prints each
published value beside the one computed, with its source, the accuracy that the
source claims, and whether it keeps it.

  FAMILY     ids of families, as --list prints them; all when none is given
  --out DIR  also write validation.md, validation.json and a chart FAMILY.svg
             for each family into DIR; DIR is made where it is missing
  --no-charts
             write no charts
  --quick    a few plates of each family only
  --json     print one JSON document instead of the tables
  --list     print the ids of all families and what they are; solve nothing
  --quiet    print no tables, only faults

Exit code 5 says that a plate was not solved to its tolerance or that an exact
solution was not met. A source that is less accurate than it claims is reported
and is no fault of this program.

examples:
  raiser validate --quick
  raiser validate ellipse-strip slot-infinite
  raiser validate --out validation
)";

constexpr const char* grow_help =
    R"(usage: raiser grow CASE [--crack NAME] [--tip NAME] [--from LENGTH] --to LENGTH
                  [--steps N] [--kinked] [--out DIR] [--json] [--no-files]

Solves a case at one length of a crack after the other, each with a mesh of its
own, and gives K_I, K_II, T and G at every length with a bound, the factor
Y = K_I / (S sqrt(pi a)) fitted over a/W, and for a crack at a hole or notch the
limits of a short and a long crack.

  CASE            a case file (TOML) with a crack
  --crack NAME    the crack that grows; given twice, both grow by as much
  --tip NAME      of its tips only this one; all of them otherwise
  --from LENGTH   first length, e.g. "0.5 mm"; otherwise that of the case
  --to LENGTH     last length
  --steps N       how many lengths, both ends among them (20)
  --kinked        each step in the direction of the largest hoop stress of the
                  step before; otherwise along the crack's own line
  --out DIR       write results into DIR instead of beside the case
  --json          print one JSON document instead of the table
  --no-files      write no result files
  --quiet         print no table and no remarks, only faults

Results of STEM.toml: STEM-grow.csv, STEM-grow.json, STEM-grow.svg and
STEM-grow.png. A length that cannot be solved says why and stops no other on a
straight path; the exit code is then 5.

examples:
  raiser grow cracked-hanger.toml --from "0.5 mm" --to "20 mm" --steps 40
  raiser grow vane.toml --crack flaw --tip "flaw B" --to "30 mm" --kinked
)";

void add_grow(CLI::App& command, GrowOptions& options, std::vector<std::string>& cases) {
  command.set_help_flag("-h,--help");
  command.add_option("CASE", cases)->required()->expected(1);
  command.add_option("--crack", options.cracks)->expected(1)->take_all();
  command.add_option("--tip", options.tips)->expected(1)->take_all();
  command.add_option("--from", options.from);
  command.add_option("--to", options.to)->required();
  command.add_option("--steps", options.steps);
  command.add_flag("--kinked", options.kinked);
}

void add_validate(CLI::App& command, Options& options) {
  command.set_help_flag("-h,--help");
  command.add_option("FAMILY", options.families);
  command.add_flag("--quick", options.quick);
  command.add_flag("--list", options.list);
  command.add_flag("!--no-charts", options.charts);
}

void add_cases(CLI::App& command, std::vector<std::string>& cases) {
  command.set_help_flag("-h,--help");
  command.add_option("CASE", cases)->required();
}

// The first argument that is no option, when it is no command either.
std::string no_command(const std::vector<std::string>& arguments) {
  const auto word = std::find_if(arguments.begin(), arguments.end(),
                                 [](const std::string& text) { return text.rfind('-', 0) != 0; });
  const std::string what =
      word == arguments.end() ? "no command is given" : "\"" + *word + "\" is no command";
  return what + "; write raiser solve CASE..., raiser check CASE..., raiser grow CASE or raiser validate";
}

Reply usage_fault(std::string what, const CLI::App& app) {
  const auto chosen = app.get_subcommands();
  const std::string command = chosen.empty() ? "raiser" : "raiser " + chosen.front()->get_name();
  what.erase(std::find(what.begin(), what.end(), '\n'), what.end());
  if (what == "CASE is required") what = "no case file is named";
  if (what == "--to is required") what = "--to is missing: how long the crack becomes, e.g. --to \"20 mm\"";
  return {command + ": " + what + "; see " + command + " --help\n", Exit::usage};
}

}  // namespace

std::variant<Options, Reply> parse(const std::vector<std::string>& arguments) {
  Options options;
  std::vector<std::string> cases;
  std::string folder;
  CLI::App app("raiser", "raiser");
  app.set_help_flag("-h,--help");
  app.set_version_flag("--version", "raiser " + version());
  app.require_subcommand(1);
  CLI::App& solve = *app.add_subcommand("solve");
  CLI::App& check = *app.add_subcommand("check");
  add_cases(solve, cases);
  add_cases(check, cases);
  CLI::App& validate = *app.add_subcommand("validate");
  add_validate(validate, options);
  CLI::App& grow = *app.add_subcommand("grow");
  add_grow(grow, options.grow, cases);
  bool no_files = false;
  for (CLI::App* command : {&solve, &grow}) command->add_flag("--no-files", no_files);
  bool charts = false;
  solve.add_flag("--charts", charts);
  for (CLI::App* command : {&solve, &validate, &grow}) {
    command->add_option("-o,--out", folder);
    command->add_flag("--json", options.json);
  }
  for (CLI::App* command : {&solve, &check, &validate, &grow}) command->add_flag("-q,--quiet", options.quiet);
  if (arguments.empty()) return Reply{general_help, Exit::usage};
  try {
    app.parse(std::vector<std::string>(arguments.rbegin(), arguments.rend()));
  } catch (const CLI::CallForHelp&) {
    if (solve.parsed()) return Reply{std::string(solve_help) + exit_codes, Exit::settled};
    if (check.parsed()) return Reply{std::string(check_help) + exit_codes, Exit::settled};
    if (validate.parsed()) return Reply{std::string(validate_help) + exit_codes, Exit::settled};
    if (grow.parsed()) return Reply{std::string(grow_help) + exit_codes, Exit::settled};
    return Reply{std::string(general_help) + exit_codes, Exit::settled};
  } catch (const CLI::CallForVersion&) {
    return Reply{"raiser " + version() + "\n", Exit::settled};
  } catch (const CLI::RequiredError& error) {
    const bool named = solve.parsed() || check.parsed() || grow.parsed();
    return usage_fault(named ? error.what() : no_command(arguments), app);
  } catch (const CLI::ParseError& error) {
    return usage_fault(error.what(), app);
  }
  const bool has_folder = solve.count("--out") + validate.count("--out") + grow.count("--out") > 0;
  if (has_folder && folder.empty()) return usage_fault("--out names no folder", app);
  if (check.parsed()) options.command = Options::Command::check;
  if (validate.parsed()) options.command = Options::Command::validate;
  if (grow.parsed()) options.command = Options::Command::grow;
  options.cases.assign(cases.begin(), cases.end());
  options.files = !no_files;
  if (solve.parsed()) options.charts = charts;
  if (charts && no_files) return usage_fault("--charts writes files and --no-files forbids them", app);
  if (has_folder) options.folder = folder;
  return options;
}

}  // namespace raiser::io
