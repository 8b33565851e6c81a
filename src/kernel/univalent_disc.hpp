#pragma once
#include <optional>

#include "kernel/region.hpp"

namespace merestone {

/// Lemma U1. Let f be univalent on the unit disc with f(0) = centre, f'(0) = f1 and f''(0)/(2 f'(0)) = a2, both
/// enclosed. Returns a closed disc that lies in the image of f: about 0.64 |f1| wide, not concentric.
/// On failure (nothing): the enclosures are too wide.
std::optional<Disc> univalent_disc(const ComplexDyadic& centre, const Acb& f1, const Acb& a2, slong bits);

}  // namespace merestone
