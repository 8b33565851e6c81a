#pragma once

namespace merestone {

/// The version of both programs, from the build.
inline constexpr const char* kProgramVersion = MERESTONE_VERSION;

}  // namespace merestone
