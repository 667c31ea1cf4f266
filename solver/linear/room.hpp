#pragma once

#include <cstddef>
#include <memory>

namespace raiser::solver {

/// Memory for factors that grows and is used again from one degree to the next:
/// the first touch of a fresh page costs as much as some hundred operations on
/// its numbers. It serves one Factorisation at a time. What it leaves serves the
/// next Room of the thread, up to 64 MiB.
class Room {
 public:
  Room() = default;
  Room(const Room&) = delete;
  Room& operator=(const Room&) = delete;
  ~Room();
  /// At least `count` numbers of any value, which stay where they are until the
  /// next call. Throws std::bad_alloc when there is not that much memory.
  double* take(std::size_t count);

  struct Free {
    void operator()(double* memory) const;
  };

 private:
  std::unique_ptr<double, Free> memory_;
  std::size_t count_ = 0;
};

}  // namespace raiser::solver
