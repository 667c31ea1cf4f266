#include "solver/linear/threads.hpp"

#include <cblas.h>

#include <cstdlib>

namespace raiser::solver {

void use_one_thread() { openblas_set_num_threads(1); }

bool has_workspace() {
  constexpr std::size_t workspace = std::size_t{288} << 20;  // OpenBLAS: 128 MB for each of two threads
  void* volatile room = std::malloc(workspace);              // never touched, hence cheap
  const bool is_there = room != nullptr;
  std::free(room);
  return is_there;
}

}  // namespace raiser::solver
