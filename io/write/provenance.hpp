#pragma once

#include <filesystem>
#include <string>
#include <string_view>

namespace raiser::io {

/// Where a result comes from: written into every file of results.
struct Provenance {
  std::string version;   ///< of raiser
  std::string compiler;  ///< that built it
  std::string case_file;
  std::string case_sha256;  ///< of the case file's bytes, as `sha256sum` prints it
};

/// The version of this library, e.g. "0.1.0".
std::string version();

/// Name and version of the compiler that built this library.
std::string compiler();

/// Provenance of results computed from `case_file`, whose content is `content`.
Provenance provenance(const std::filesystem::path& case_file, std::string_view content);

/// The same, reading the file; an empty hash when it cannot be read.
Provenance provenance(const std::filesystem::path& case_file);

/// SHA-256 of bytes in lower-case hexadecimal, after FIPS PUB 180-4, "Secure
/// Hash Standard", NIST 2015, section 6.2.
std::string sha256(std::string_view bytes);

}  // namespace raiser::io
