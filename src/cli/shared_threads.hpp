#pragma once

namespace merestone {

/// The processors that this process may use: the least of its affinity mask, the control group's quota and what a batch
/// system granted. At least 1.
unsigned allowed_threads();

}  // namespace merestone
