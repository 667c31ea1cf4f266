#pragma once

#include <filesystem>
#include <optional>
#include <string>
#include <variant>
#include <vector>

#include "io/command/run.hpp"

namespace raiser::io {

/// What the command line asks for.
struct Options {
  enum class Command { solve, check };
  Command command = Command::solve;
  std::vector<std::filesystem::path> cases;     ///< at least one
  std::optional<std::filesystem::path> folder;  ///< --out
  bool json = false;
  bool quiet = false;
  bool files = true;  ///< write result files
};

/// The command line is answered by a text: help, version, or what is wrong.
struct Reply {
  std::string text;
  Exit code = Exit::settled;
};

/// Understands the arguments. Faults are a Reply with Exit::usage.
std::variant<Options, Reply> parse(const std::vector<std::string>& arguments);

}  // namespace raiser::io
