#pragma once

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <string>

namespace raiser::io::test {

/// A folder of its own while it lives. Tests run side by side, each in its own
/// process: no two may share a folder.
class ScratchFolder {
 public:
  ScratchFolder() {
    std::string pattern = (std::filesystem::temp_directory_path() / "raiser-test-XXXXXX").string();
    if (!::mkdtemp(pattern.data())) throw std::filesystem::filesystem_error("no scratch folder", {});
    path_ = pattern;
  }
  ScratchFolder(const ScratchFolder&) = delete;
  ScratchFolder& operator=(const ScratchFolder&) = delete;
  ~ScratchFolder() {
    std::error_code ignored;
    std::filesystem::remove_all(path_, ignored);
  }

  const std::filesystem::path& path() const { return path_; }
  std::filesystem::path operator/(const std::filesystem::path& name) const { return path_ / name; }
  /// A file of that content in it.
  std::filesystem::path file(const std::string& name, const std::string& content) const {
    std::ofstream(path_ / name, std::ios::binary) << content;
    return path_ / name;
  }

 private:
  std::filesystem::path path_;
};

}  // namespace raiser::io::test
