#pragma once
#include "cli/answer.hpp"

namespace merestone {

/// Answers one line. A verdict about a region, and every verdict where `certified`, is established anew by the kernel; one
/// that is not is withdrawn, which a message on standard error calls a defect.
Answer answer_to(const PointLine& asked, const DecideOptions& options, bool certified);

}  // namespace merestone
