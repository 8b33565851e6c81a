# Ball arithmetic: Arb, as a library of its own beside FLINT 2 or as part of FLINT 3. Defines Balls::Balls.

find_path(Balls_INCLUDE_DIR NAMES flint/arb.h arb.h)
find_path(Balls_FLINT_INCLUDE_DIR NAMES flint/fmpq.h)
find_library(Balls_FLINT_LIBRARY NAMES flint)
if(Balls_INCLUDE_DIR AND NOT EXISTS "${Balls_INCLUDE_DIR}/flint/arb.h")
  find_library(Balls_ARB_LIBRARY NAMES arb flint-arb)
  set(Balls_needed Balls_ARB_LIBRARY)
endif()
find_library(Balls_MPFR_LIBRARY NAMES mpfr)
find_library(Balls_GMP_LIBRARY NAMES gmp)

include(FindPackageHandleStandardArgs)
find_package_handle_standard_args(Balls
  REQUIRED_VARS Balls_FLINT_LIBRARY ${Balls_needed} Balls_MPFR_LIBRARY Balls_GMP_LIBRARY Balls_INCLUDE_DIR
                Balls_FLINT_INCLUDE_DIR
  REASON_FAILURE_MESSAGE "on Debian: apt-get install libflint-dev libflint-arb-dev")

if(Balls_FOUND AND NOT TARGET Balls::Balls)
  add_library(Balls::Balls INTERFACE IMPORTED)
  target_include_directories(Balls::Balls SYSTEM INTERFACE "${Balls_INCLUDE_DIR}" "${Balls_FLINT_INCLUDE_DIR}")
  target_link_libraries(Balls::Balls INTERFACE ${Balls_ARB_LIBRARY} "${Balls_FLINT_LIBRARY}" "${Balls_MPFR_LIBRARY}"
                                               "${Balls_GMP_LIBRARY}")
endif()
mark_as_advanced(Balls_INCLUDE_DIR Balls_FLINT_INCLUDE_DIR Balls_FLINT_LIBRARY Balls_ARB_LIBRARY Balls_MPFR_LIBRARY
                 Balls_GMP_LIBRARY)
