#include "cli/check_memory.hpp"

#include <gmp.h>
#include <malloc.h>
#include <unistd.h>

#include <atomic>
#include <cstdio>
#include <cstdlib>
#include <new>

#include "cli/exit_code.hpp"
#include "kernel/flint.hpp"

namespace merestone {

namespace {

void* or_end(void* block, std::size_t size) {
  if (block == nullptr && size > 0) out_of_memory();
  return block;
}

void* allocate(std::size_t size) { return or_end(std::malloc(size), size); }
void* allocate_zeroed(std::size_t count, std::size_t size) { return or_end(std::calloc(count, size), count * size); }
void* reallocate(void* block, std::size_t size) { return or_end(std::realloc(block, size), size); }
void* reallocate_sized(void* block, std::size_t, std::size_t size) { return reallocate(block, size); }
void release(void* block) { std::free(block); }
void release_sized(void* block, std::size_t) { std::free(block); }

}  // namespace

void out_of_memory() {
  static std::atomic_flag said;
  while (said.test_and_set()) ::pause();  // another thread says it and ends the program
  std::fputs("merestone-check: out of memory; allow fewer --threads, or more memory\n", stderr);
  std::_Exit(static_cast<int>(ExitCode::io_failed));
}

// By themselves the libraries abort, and an exception cannot pass through every function in between.
void end_when_memory_ends() {
  std::set_new_handler(out_of_memory);
  mp_set_memory_functions(allocate, reallocate_sized, release_sized);
#ifdef __GLIBC__
  // canvases of millions of cells come and go: their memory is kept instead of being given back and cleared each time
  ::mallopt(M_MMAP_THRESHOLD, 1 << 26);
  ::mallopt(M_TRIM_THRESHOLD, 1 << 28);
#endif
  __flint_set_memory_functions(allocate, allocate_zeroed, reallocate, release);
}

}  // namespace merestone
