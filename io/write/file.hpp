#pragma once

#include <filesystem>
#include <stdexcept>
#include <string>
#include <string_view>
#include <vector>

namespace raiser::io {

/// An output could not be written. what() names the file, the reason and what
/// to do about it.
class WriteError : public std::runtime_error {
 public:
  WriteError(const std::filesystem::path& file, const std::string& reason);
};

/// Writes a whole file under a temporary name beside it and renames it, so
/// that `file` is either complete or as it was before. Throws WriteError.
void write_file(const std::filesystem::path& file, std::string_view bytes);

/// A set of files that appear in a folder together or not at all: each is
/// written inside a hidden folder of its own and moved into place by publish().
/// Whatever has not been published is removed with the object.
class Staging {
 public:
  /// Creates `folder` where it is missing. Throws WriteError.
  explicit Staging(std::filesystem::path folder);
  Staging(const Staging&) = delete;
  Staging& operator=(const Staging&) = delete;
  ~Staging();

  /// Where to write the file that publish() will call `name`.
  std::filesystem::path path(const std::string& name);

  /// Moves every file into place; returns their final paths in the order in
  /// which they were named. Throws WriteError.
  std::vector<std::filesystem::path> publish();

 private:
  std::filesystem::path folder_;
  std::filesystem::path hidden_;
  std::vector<std::string> names_;
};

}  // namespace raiser::io
