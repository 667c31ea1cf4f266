#include "solver/linear/threads.hpp"

#include <cblas.h>

namespace raiser::solver {

void use_one_thread() { openblas_set_num_threads(1); }

}  // namespace raiser::solver
