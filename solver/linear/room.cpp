#include "solver/linear/room.hpp"

#include <sys/mman.h>

#include <cstdint>
#include <cstdlib>
#include <new>
#include <utility>

namespace raiser::solver {

namespace {

/// Memory that a Room left, for the next one of this thread.
struct Spare {
  std::unique_ptr<double, Room::Free> memory;
  std::size_t count = 0;
};
thread_local Spare spare;

/// Memory in pages of two megabytes where the system has them: a five hundredth of
/// the first touches. Nothing when there is not that much.
void* in_large_pages(std::size_t bytes) {
  constexpr std::size_t page = std::size_t{2} << 20;
  const std::size_t whole = (bytes + page - 1) / page * page;
  void* memory = std::aligned_alloc(page, whole);
  if (memory != nullptr) static_cast<void>(madvise(memory, whole, MADV_HUGEPAGE));  // a wish, no need
  return memory;
}

}  // namespace

void Room::Free::operator()(double* memory) const { std::free(memory); }

Room::~Room() {
  constexpr std::size_t most_kept = std::size_t{64} << 20;  // bytes
  if (count_ <= spare.count || count_ * sizeof(double) > most_kept) return;
  spare = {std::move(memory_), count_};
}

double* Room::take(std::size_t count) {
  constexpr std::size_t large = std::size_t{32} << 20;  // bytes
  if (count <= count_) return memory_.get();
  if (count <= spare.count) {
    memory_ = std::move(spare.memory);
    count_ = std::exchange(spare.count, 0);
    return memory_.get();
  }
  if (count > SIZE_MAX / sizeof(double) / 2) throw std::bad_alloc();
  memory_.reset();  // its values are not needed
  count_ = 0;
  const std::size_t bytes = count * sizeof(double);
  memory_.reset(static_cast<double*>(bytes < large ? std::malloc(bytes) : in_large_pages(bytes)));
  if (!memory_) throw std::bad_alloc();
  count_ = count;
  return memory_.get();
}

}  // namespace raiser::solver
