# What every target is compiled with, and the check that this machine's floating point is the one the proofs assume.

if(NOT CMAKE_BUILD_TYPE AND NOT CMAKE_CONFIGURATION_TYPES)
  set(CMAKE_BUILD_TYPE Release CACHE STRING "Build type" FORCE)
endif()

set(CMAKE_CXX_STANDARD 20)
set(CMAKE_CXX_STANDARD_REQUIRED ON)
set(CMAKE_CXX_EXTENSIONS OFF)
set(CMAKE_EXPORT_COMPILE_COMMANDS ON)

# The policy for floating point, PUBLIC on all libraries: no contraction to fused multiply-add, so that digests do not
# depend on the machine. Fast-math is an error in the sources themselves.
set(MERESTONE_FLOATING_POINT_OPTIONS -ffp-contract=off)

function(merestone_options target)
  target_compile_options(${target} PRIVATE -Wall -Wextra -Wconversion -Wshadow -Wnon-virtual-dtor
                                           $<$<BOOL:${MERESTONE_WERROR}>:-Werror>)
  # GCC 12 warns wrongly about std::string's operator+ (GCC bug 105329) and about moved variants of vectors.
  target_compile_options(${target} PRIVATE $<$<CXX_COMPILER_ID:GNU>:-Wno-restrict -Wno-maybe-uninitialized>)
  if(MERESTONE_SANITIZE)
    target_compile_options(${target} PRIVATE -fsanitize=${MERESTONE_SANITIZE} -fno-sanitize-recover=all
                                             -fno-omit-frame-pointer)
    target_link_options(${target} PUBLIC -fsanitize=${MERESTONE_SANITIZE})
  endif()
endfunction()

# A room of the house: a library with the headers of its folder, which may include the rooms it links only.
function(merestone_room name)
  cmake_parse_arguments(room "" "" "SOURCES;LINKS" ${ARGN})
  add_library(merestone_${name} STATIC ${room_SOURCES})
  add_library(merestone::${name} ALIAS merestone_${name})
  set_target_properties(merestone_${name} PROPERTIES EXPORT_NAME ${name})
  target_include_directories(merestone_${name} PUBLIC $<BUILD_INTERFACE:${PROJECT_SOURCE_DIR}/src>
                                                      $<INSTALL_INTERFACE:${CMAKE_INSTALL_INCLUDEDIR}/merestone>)
  target_compile_options(merestone_${name} PUBLIC ${MERESTONE_FLOATING_POINT_OPTIONS})
  target_compile_features(merestone_${name} PUBLIC cxx_std_20)
  target_link_libraries(merestone_${name} PUBLIC ${room_LINKS})
  merestone_options(merestone_${name})
endfunction()

include(CheckCXXSourceRuns)
set(CMAKE_REQUIRED_FLAGS "-ffp-contract=off")
check_cxx_source_runs("
#include <cfenv>
#include <cfloat>
#include <limits>
static_assert(FLT_EVAL_METHOD == 0);
static_assert(std::numeric_limits<double>::is_iec559 && std::numeric_limits<double>::digits == 53);
int main() {
  volatile double denormal = 0x1p-1074, one = 1, tiny = 0x1p-53, scale = 0x1p1000;
  return std::fegetround() == FE_TONEAREST && one + tiny == 1 && denormal * scale == 0x1p-74 ? 0 : 1;
}" MERESTONE_FLOATING_POINT_IS_IEEE_754)
unset(CMAKE_REQUIRED_FLAGS)
if(NOT MERESTONE_FLOATING_POINT_IS_IEEE_754 AND NOT CMAKE_CROSSCOMPILING)
  message(FATAL_ERROR "merestone needs IEEE 754 doubles evaluated as doubles (FLT_EVAL_METHOD 0), rounded to nearest, "
                      "with subnormal numbers; this compiler or processor mode has other ones. "
                      "On 32-bit x86 compile with -msse2 -mfpmath=sse; remove -ffast-math from CXXFLAGS.")
endif()
