// Takes the place of the STEP reader in the fuzzers: every STEP file is refused.

#include "io/import/step.hpp"

namespace raiser::io {

DrawingReading read_step(const std::filesystem::path& /*path*/, const std::string& file,
                         const std::optional<std::array<double, 3>>& /*face_at*/) {
  return {
      std::nullopt,
      {{Diagnostic::Kind::input, file, std::nullopt, "file", "", "STEP is not fuzzed", "give a .dxf file"}}};
}

}  // namespace raiser::io
