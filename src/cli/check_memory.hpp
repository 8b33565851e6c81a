#pragma once

namespace merestone {

/// Ends the program with a message and ExitCode::io_failed.
[[noreturn]] void out_of_memory();

/// Makes the end of memory, in whichever thread and library, call out_of_memory. Requires that no number has
/// been made yet.
void end_when_memory_ends();

}  // namespace merestone
