// libFuzzer entry: whatever the bytes, the reader gives a case or faults, each
// a whole one-line message, and a case can be described.

#include <cstddef>
#include <cstdint>
#include <cstdlib>
#include <string>
#include <string_view>

#include "io/case/case.hpp"
#include "io/case/describe.hpp"

namespace {

void require(bool condition) {
  if (!condition) std::abort();
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const std::string_view content(reinterpret_cast<const char*>(data), size);
  const auto reading = raiser::io::read_case_text(content, "case.toml");
  require(reading.value.has_value() == reading.faults.empty());
  for (const auto& fault : reading.faults) {
    require(!fault.what.empty() && !fault.cure.empty());
    require(text(fault).find('\n') == std::string::npos);
  }
  if (reading.value) {
    require(!describe(*reading.value).empty());
    const auto& problem = reading.value->problem;
    require(!reading.value->asks.empty() && !(problem.loads.empty() && problem.supports.empty()));
  }
  return 0;
}
