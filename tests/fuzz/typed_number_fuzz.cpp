// Any bytes as a parameter: read exactly or refused; the exact spelling of what was read denotes the same number.
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "format/spelling.hpp"
#include "kernel/typed_number.hpp"

using namespace merestone;

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  const Result<ComplexRational> c = parse_complex(std::string_view(reinterpret_cast<const char*>(data), size));
  if (!c) return 0;
  const std::string re = spell(c->re), im = spell(c->im);
  if (re.size() + im.size() > 20'000) return 0;  // beyond what is read as typed
  const Result<ComplexRational> again = parse_complex(re + "," + im);
  if (!again || !(*again == *c)) std::abort();
  return 0;
}
