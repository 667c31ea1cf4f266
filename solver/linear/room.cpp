#include "solver/linear/room.hpp"

#include <cstdint>
#include <cstdlib>
#include <new>

namespace raiser::solver {

void Room::Free::operator()(double* memory) const { std::free(memory); }

double* Room::take(std::size_t count) {
  if (count <= count_) return memory_.get();
  if (count > SIZE_MAX / sizeof(double)) throw std::bad_alloc();
  // realloc keeps large blocks' pages where the system can move them.
  void* grown = std::realloc(memory_.get(), count * sizeof(double));
  if (grown == nullptr) throw std::bad_alloc();
  static_cast<void>(memory_.release());
  memory_.reset(static_cast<double*>(grown));
  count_ = count;
  return memory_.get();
}

}  // namespace raiser::solver
