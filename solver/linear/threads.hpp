#pragma once

namespace raiser::solver {

/// Makes the dense kernels of the whole process use one thread: in fronts of
/// the size that plates have, more cost more than they give. For a program to
/// call once at its start; the library never does by itself.
void use_one_thread();

}  // namespace raiser::solver
