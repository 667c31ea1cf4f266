// libFuzzer entry: whatever the bytes, the import gives an outline or faults,
// each with its cure; an outline is closed and the right way round, and becomes a
// plate or faults.

#include <cmath>
#include <cstddef>
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "io/import/contour.hpp"
#include "io/import/curve_tools.hpp"
#include "io/import/dxf.hpp"
#include "io/import/part_plate.hpp"
#include "io/import/shapes.hpp"

namespace {

void require(bool condition) {
  if (!condition) std::abort();
}

void check(const raiser::mesh::Loop& loop) {
  require(!loop.empty());
  for (std::size_t k = 0; k < loop.size(); ++k) {
    const auto& next = loop[(k + 1) % loop.size()];
    const double size = 1 + raiser::io::finish(loop[k]).norm();
    require((raiser::io::finish(loop[k]) - raiser::io::start(next)).norm() < 1e-6 * size);
  }
}

}  // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  using namespace raiser::io;
  const std::string_view content(reinterpret_cast<const char*>(data), size);
  const auto reading = read_dxf(content, "part.dxf", std::nullopt);
  require(reading.value.has_value() == reading.faults.empty());
  for (const auto& fault : reading.faults) require(!fault.what.empty() && !fault.cure.empty());
  if (!reading.value) return 0;
  const Contours found = contours(reading.value->strokes, {});
  require(found.faults.empty() == !found.outer.empty());
  if (!found.faults.empty()) return 0;
  check(found.outer);
  for (const auto& loop : found.inner) {
    check(loop);
    static_cast<void>(hole_of(loop, 1e-6));
  }
  const auto box = box_of(found.outer);
  Part part{found.outer, found.inner, (box[0] + box[1]) / 2, box[1] - box[0], {}};
  for (auto& curve : part.outer) curve.centre -= part.centre;
  for (auto& loop : part.inner)
    for (auto& curve : loop) curve.centre -= part.centre;
  const PartPlate plate = plate_of(part, 1.0, {{"near", part.centre}}, {{"hole", part.centre}});
  require(plate.plate.has_value() == (plate.faults.empty() && plate.misplaced.empty()));
  const PartPlate plain = plate_of(part, 1.0, {}, {});
  if (plain.plate)
    for (const auto& fault : raiser::mesh::faults(*plain.plate)) require(!fault.what.empty());
  return 0;
}
