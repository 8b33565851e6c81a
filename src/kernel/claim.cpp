#include "kernel/claim.hpp"

namespace merestone {

bool operator==(const Witnesses& a, const Witnesses& b) { return a.claims == b.claims; }

bool operator==(const Quarters& a, const Quarters& b) { return a.rules == b.rules; }

}  // namespace merestone
