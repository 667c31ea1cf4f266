#include "io/write/file.hpp"

#include <fcntl.h>
#include <fmt/format.h>
#include <stdlib.h>
#include <unistd.h>

#include <cerrno>
#include <system_error>
#include <utility>

namespace raiser::io {
namespace {

std::string cure(int error) {
  switch (error) {
    case ENOSPC:
    case EDQUOT:
    case EFBIG:
      return "make room there, or choose another folder with --out";
    case EACCES:
    case EPERM:
    case EROFS:
      return "choose a folder that may be written to with --out";
    case ENOTDIR:
    case ENOENT:
    case EISDIR:
      return "check the path";
    default:
      return "check the path, or choose another folder with --out";
  }
}

std::string reason(int error) {
  return fmt::format("{}; {}", std::generic_category().message(error), cure(error));
}

// Writes all bytes; returns 0 or the error number.
int write_all(int descriptor, std::string_view bytes) {
  while (!bytes.empty()) {
    const ssize_t written = ::write(descriptor, bytes.data(), bytes.size());
    if (written < 0 && errno != EINTR) return errno;
    if (written > 0) bytes.remove_prefix(static_cast<std::size_t>(written));
  }
  return 0;
}

// The folder and those above it that do not exist, innermost first.
std::vector<std::filesystem::path> missing(std::filesystem::path folder) {
  std::vector<std::filesystem::path> found;
  std::error_code ignored;
  for (; !folder.empty() && !std::filesystem::exists(folder, ignored); folder = folder.parent_path())
    found.push_back(folder);
  return found;
}

// Folders that others have put something into in the meantime stay.
void remove_empty(const std::vector<std::filesystem::path>& folders) {
  for (const auto& folder : folders) ::rmdir(folder.c_str());
}

}  // namespace

WriteError::WriteError(const std::filesystem::path& file, const std::string& why)
    : std::runtime_error(fmt::format("cannot write {}: {}", file.string(), why)), reason_(why) {}

void write_file(const std::filesystem::path& file, std::string_view bytes) {
  std::filesystem::path temporary = file;
  temporary.replace_filename(fmt::format(".{}.{}.part", file.filename().string(), ::getpid()));
  const int descriptor = ::open(temporary.c_str(), O_WRONLY | O_CREAT | O_TRUNC | O_CLOEXEC, 0666);
  if (descriptor < 0) throw WriteError(file, reason(errno));
  int error = write_all(descriptor, bytes);
  if (::close(descriptor) != 0 && error == 0) error = errno;
  if (error == 0 && ::rename(temporary.c_str(), file.c_str()) != 0) error = errno;
  if (error == 0) return;
  ::unlink(temporary.c_str());
  throw WriteError(file, reason(error));
}

Staging::Staging(std::filesystem::path folder) : folder_(std::move(folder)) {
  if (folder_.empty()) folder_ = ".";
  made_ = missing(folder_);
  std::error_code error;
  std::filesystem::create_directories(folder_, error);
  std::string pattern = (folder_ / ".raiser-XXXXXX").string();
  const int fault = error ? error.value() : ::mkdtemp(pattern.data()) == nullptr ? errno : 0;
  if (fault != 0) {
    remove_empty(made_);
    throw WriteError(folder_, reason(fault));
  }
  hidden_ = pattern;
}

Staging::~Staging() {
  std::error_code ignored;
  std::filesystem::remove_all(hidden_, ignored);
  remove_empty(made_);
}

void Staging::add(const std::string& name, const std::function<void(const std::filesystem::path&)>& write) {
  try {
    write(hidden_ / name);
  } catch (const WriteError& error) {
    throw WriteError(folder_ / name, error.reason());
  }
  names_.push_back(name);
}

void Staging::add(const std::string& name, std::string_view bytes) {
  add(name, [&](const std::filesystem::path& file) { write_file(file, bytes); });
}

std::vector<std::filesystem::path> Staging::publish() {
  // A folder in the way of any file must stop all of them, not the later ones.
  for (const std::string& name : names_) {
    if (std::filesystem::is_directory(folder_ / name)) throw WriteError(folder_ / name, reason(EISDIR));
  }
  std::vector<std::filesystem::path> published;
  for (const std::string& name : names_) {
    const std::filesystem::path target = folder_ / name;
    if (::rename((hidden_ / name).c_str(), target.c_str()) != 0) throw WriteError(target, reason(errno));
    published.push_back(folder_ == "." ? std::filesystem::path(name) : target);
  }
  names_.clear();
  made_.clear();
  return published;
}

}  // namespace raiser::io
