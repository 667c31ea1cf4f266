#pragma once

#include <filesystem>
#include <functional>
#include <stdexcept>
#include <string>
#include <string_view>
#include <vector>

namespace raiser::io {

/// An output could not be written. what() names the file, the reason and what
/// to do about it.
class WriteError : public std::runtime_error {
 public:
  /// `reason` says what is wrong and what to do.
  WriteError(const std::filesystem::path& file, const std::string& reason);
  const std::string& reason() const { return reason_; }

 private:
  std::string reason_;
};

/// Writes a whole file under a temporary name beside it and renames it, so
/// that `file` is either complete or as it was before. Throws WriteError.
void write_file(const std::filesystem::path& file, std::string_view bytes);

/// A set of files that appear in a folder together or not at all: each is
/// written inside a hidden folder and moved into place by publish().
/// Whatever has not been published is removed with the object, the folders that
/// were made for it too.
class Staging {
 public:
  /// Creates `folder` where it is missing. Throws WriteError.
  explicit Staging(std::filesystem::path folder);
  Staging(const Staging&) = delete;
  Staging& operator=(const Staging&) = delete;
  ~Staging();

  /// Lets `write` write the file that publish() will call `name`. A WriteError
  /// of it is passed on under that name.
  void add(const std::string& name, const std::function<void(const std::filesystem::path&)>& write);
  void add(const std::string& name, std::string_view bytes);

  /// Moves every file into place; returns their final paths in the order in
  /// which they were named. Throws WriteError.
  std::vector<std::filesystem::path> publish();

 private:
  std::filesystem::path folder_;
  std::filesystem::path hidden_;
  std::vector<std::filesystem::path> made_;  ///< innermost first; emptied by publish()
  std::vector<std::string> names_;
};

}  // namespace raiser::io
