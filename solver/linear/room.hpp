#pragma once

#include <cstddef>
#include <memory>

namespace raiser::solver {

/// Memory for factors that grows and is used again from one degree to the next:
/// the first touch of a fresh page costs as much as some hundred operations on
/// its numbers. It serves one Factorisation at a time.
class Room {
 public:
  /// At least `count` numbers of any value, which stay where they are until the
  /// next call. Throws std::bad_alloc when there is not that much memory.
  double* take(std::size_t count);

 private:
  struct Free {
    void operator()(double* memory) const;
  };
  std::unique_ptr<double, Free> memory_;
  std::size_t count_ = 0;
};

}  // namespace raiser::solver
