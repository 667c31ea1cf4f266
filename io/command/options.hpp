#pragma once

#include <filesystem>
#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "io/command/run.hpp"

namespace raiser::io {

/// What `raiser grow` is asked for; lengths as written.
struct GrowOptions {
  std::vector<std::string> cracks;  ///< names; empty for the only one
  std::vector<std::string> tips;    ///< names; empty for all tips of those cracks
  std::string from;                 ///< empty for the length in the case
  std::string to;
  std::size_t steps = 20;  ///< lengths, both ends among them
  bool kinked = false;
};

/// What the command line asks for.
struct Options {
  enum class Command { solve, check, validate, grow };
  Command command = Command::solve;
  std::vector<std::filesystem::path> cases;     ///< at least one, but for validate
  std::optional<std::filesystem::path> folder;  ///< --out
  bool json = false;
  bool quiet = false;
  bool files = true;                  ///< write result files
  std::vector<std::string> families;  ///< of validate: their ids; empty for all
  bool quick = false;                 ///< of validate: the short run
  bool charts = true;  ///< of validate: a chart for each family; of solve: of edges and ligaments
  bool list = false;   ///< of validate: name the families only
  GrowOptions grow;
};

/// The command line is answered by a text: help, version, or what is wrong.
struct Reply {
  std::string text;
  Exit code = Exit::settled;
};

/// Understands the arguments. Faults are a Reply with Exit::usage.
std::variant<Options, Reply> parse(const std::vector<std::string>& arguments);

}  // namespace raiser::io
