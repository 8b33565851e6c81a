#pragma once
#include <string>
#include <string_view>

#include "kernel/result.hpp"

namespace merestone {

/// The bytes in zlib format (RFC 1950).
Result<std::string> deflated(std::string_view bytes);

/// Inflates one zlib stream that must fill `stored` and yield exactly `length` bytes: never writes more, whatever the
/// stream says. Memory grows with what comes out.
Result<std::string> inflated(std::string_view stored, std::size_t length);

}  // namespace merestone
