#pragma once

namespace raiser::solver {

/// Makes the dense kernels of the whole process use one thread: in fronts of
/// the size that plates have, more cost more than they give. For a program to
/// call once at its start; the library never does by itself.
void use_one_thread();

/// Whether the dense kernels can have their working memory. They ask for it at
/// their first use, and their threads when the process ends; where the system
/// refuses it they ask again for ever. For a program to look at before it
/// solves and before it ends.
bool has_workspace();

}  // namespace raiser::solver
